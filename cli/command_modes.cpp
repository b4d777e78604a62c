#include "cli/command_modes.h"

#include <cmath>
#include <cstdio>
#include <nlohmann/json.hpp>

#include "cli/exit_code.h"
#include "cli/report_units.h"
#include "cli/shipped_tables.h"
#include "cli/write_file.h"
#include "fem/units.h"
#include "models/row_modes.h"

namespace focalframe::cli {
namespace {

using Json = nlohmann::ordered_json;

// Wrapped behind the number that stands before it.
std::string shape_lines(const std::string& moves) {
  return wrapped(std::string(13, ' ') + moves, 13).substr(13);
}

template <class Mode>
std::string proof_line(const std::vector<Mode>& modes, const models::StabilityProof& proof, const char* what,
                       const char* unit) {
  if (modes.empty()) return "";
  double residual = 0;
  for (const Mode& m : modes) residual = std::max(residual, m.residual);
  return wrapped(
      text_of("  proof: greatest residual %.1e; a count of pivots finds %d %s below %.4g%s, none "
              "is missing; members divided into up to %d pieces inside, finer ones would lower "
              "the last value by about %.2g %%",
              residual, proof.counted, what, proof.count_at, unit, proof.most_pieces, 100 * proof.error),
      2);
}

Json proof_json(const models::StabilityProof& p) {
  return {{"most_pieces_of_a_member", p.most_pieces},
          {"discretisation_error_ratio", p.error},
          {"counted", p.counted},
          {"count_below", p.count_at}};
}

std::string in_words(const models::RowStability& s) {
  std::string out = text_of("\nLooking at %.0f deg (%d freedoms, what turns and what stands together)\n",
                            s.elevation / deg, s.freedoms);
  for (const models::RowMode& m : s.modes) out += text_of("  %8.3f Hz  ", m.frequency) + shape_lines(m.moves);
  out += proof_line(s.modes, s.modes_proof, "frequencies", " Hz");
  if (s.load.empty()) return out + "  buckling: no STOW wind is stated\n";
  if (s.buckling.empty())
    return out + "  buckling: no factor below 1000 under weight and the STOW gust, either wind\n";
  out += "  buckling factor on " + s.load + "\n";
  for (const models::RowBuckling& b : s.buckling)
    out += text_of("  %8.2f     ", b.factor) + shape_lines(b.moves);
  out += proof_line(s.buckling, s.buckling_proof, "factors", "");
  if (s.buckling[0].factor <= 1)
    out += "  BELOW 1: IT BUCKLES under this load\n";
  else if (s.buckling[0].factor < 10)
    out += text_of("  below 10: second-order effects enlarge deflections by about %.0f %%\n",
                   100 / (s.buckling[0].factor - 1));
  return out;
}

Json as_json(const models::RowStability& s) {
  Json modes = Json::array(), buckling = Json::array();
  for (const auto& m : s.modes)
    modes.push_back({{"frequency_hz", m.frequency}, {"residual_ratio", m.residual}, {"moves", m.moves}});
  for (const auto& b : s.buckling)
    buckling.push_back({{"factor_ratio", b.factor}, {"residual_ratio", b.residual}, {"moves", b.moves}});
  return {{"elevation_rad", s.elevation},
          {"freedoms", s.freedoms},
          {"modes", modes},
          {"modes_proof", proof_json(s.modes_proof)},
          {"buckling_proof", proof_json(s.buckling_proof)},
          {"buckling_load", s.load},
          {"buckling", buckling}};
}

}  // namespace

std::string stability_text(const std::string& name, const std::vector<models::RowStability>& poses) {
  std::string text = name + ": how it swings and where it would buckle\n";
  for (const models::RowStability& s : poses) text += in_words(s);
  return text;
}

std::string stability_json(const std::string& name, const std::vector<models::RowStability>& poses) {
  Json all = {{"schema", "focalframe-modes-1"}, {"name", name}, {"poses", Json::array()}};
  for (const models::RowStability& s : poses) all["poses"].push_back(as_json(s));
  return all.dump(1) + "\n";
}

int run_trough_modes(const DesignFile& design, const DesignCommand& command) {
  std::vector<Message> messages;
  Message place;
  place.file = command.design;
  place.head = "wind table=\"" + design.trough.wind.table + "\"";
  if (const auto at = design.lines.find("wind/table"); at != design.lines.end()) place.line = at->second;
  const auto table = find_table(design.trough.wind.table, command.design, place, messages);
  if (!table || has_stop(messages)) {
    std::fputs(to_text(messages, command.verbose).c_str(), stderr);
    return exit_code(messages);
  }
  std::vector<double> poses = {90 * deg};
  if (std::isfinite(design.trough.operation.stow_at) &&
      std::abs(design.trough.operation.stow_at - poses[0]) > 1e-9)
    poses.push_back(design.trough.operation.stow_at);
  std::vector<models::RowStability> found;
  for (double pose : poses)
    found.push_back(models::row_stability(design.trough, table->table, pose, command.count));
  if (!command.json_path.empty())
    if (const std::string problem = write_file(command.json_path, stability_json(design.trough.name, found));
        !problem.empty()) {
      std::fprintf(stderr, "%s\n", problem.c_str());
      return bad_input;
    }
  if (!command.quiet) std::fputs(stability_text(design.trough.name, found).c_str(), stdout);
  return all_met;
}

}  // namespace focalframe::cli
