#include "cli/command_frame_file.h"

#include <cmath>
#include <iostream>

#include "cli/exit_code.h"
#include "cli/frame_writer.h"
#include "cli/input_hash.h"
#include "cli/quantity.h"
#include "cli/report_units.h"
#include "cli/shipped_tables.h"
#include "cli/write_file.h"
#include "fem/units.h"
#include "models/posed_row.h"

namespace focalframe::cli {
namespace {

int refuse(Message m) {
  std::cerr << to_text({std::move(m)}, true);
  return bad_input;
}

}  // namespace

int write_trough_frame(const DesignFile& design, const FrameCommand& command) {
  Message place;
  place.file = command.design;
  const ParsedQuantity elevation = parse_quantity(command.elevation, Quantity::angle);
  if (!elevation.ok() || std::abs(elevation.value) > 360 * deg) {
    place.file = "command line";
    place.head = "--elevation " + command.elevation;
    place.text = elevation.ok() ? "The angle of the optical axis above the horizon; 90 deg is the zenith."
                                : elevation.problem;
    if (!elevation.suggestions.empty())
      place.likely = "--elevation \"" + elevation.suggestions.front() + "\"";
    return refuse(place);
  }
  std::vector<Message> messages;
  place.head = "wind table=\"" + design.trough.wind.table + "\"";
  if (const auto at = design.lines.find("wind/table"); at != design.lines.end()) place.line = at->second;
  const auto table = find_table(design.trough.wind.table, command.design, place, messages);
  if (!table || has_stop(messages)) {
    std::cerr << to_text(messages, true);
    return exit_code(messages);
  }
  const models::PosedRow row = models::posed_row(design.trough, table->table, elevation.value);
  const std::string pose = text_of("%.6g deg", elevation.value / deg);
  const std::vector<std::string> remarks{
      "The frame that focalframe " FOCALFRAME_VERSION " builds from " + command.design + " (input " +
          input_hash(design.text, table->table.name).substr(0, 8) + "), looking at " + pose +
          ": what turns and what stands together.",
      "World axes: x along the row, z up, y level across it; at elevation 0 the mirror faces +y. SI units, "
      "every digit.",
      "Wind cases hold the wind alone, as node loads; add them to the weight with your own factors.",
      "Sections are written as properties in principal axes. The mirror carries nothing: it is mass only."};
  const std::string text =
      frame_design_text(design.trough.name + ", " + pose, remarks, row.full.frame, row.cases);
  if (const std::string problem = write_new_file(command.file, text); !problem.empty()) {
    Message m;
    m.file = command.file;
    m.text = problem;
    return refuse(m);
  }
  std::cout << "Wrote " << command.file << ": " << row.full.frame.nodes.size() << " nodes, "
            << row.full.frame.members.size() << " members, " << row.cases.size() << " load cases:\n";
  for (const fem::LoadCase& load : row.cases) std::cout << "  " << load.name << "\n";
  std::cout << "Solve it: focalframe check " << command.file << "\n";
  return all_met;
}

}  // namespace focalframe::cli
