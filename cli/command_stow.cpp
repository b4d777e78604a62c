#include "cli/command_stow.h"

#include <unistd.h>

#include <cstdio>

#include "cli/exit_code.h"
#include "cli/input_hash.h"
#include "cli/shipped_tables.h"
#include "cli/stow_json.h"
#include "cli/stow_text.h"
#include "cli/violation_message.h"
#include "cli/wind_record_file.h"
#include "cli/write_file.h"
#include "fem/mechanism.h"
#include "models/assess.h"
#include "models/wind_rules.h"

namespace focalframe::cli {
namespace {

int print_problems(const std::vector<Message>& messages, bool verbose) {
  std::fputs(to_text(messages, verbose).c_str(), stderr);
  return exit_code(messages);
}

}  // namespace

int run_trough_stow(const DesignFile& file, const DesignCommand& command) {
  const models::TroughDesign& design = file.trough;
  std::vector<Message> messages;
  Message place;
  place.file = command.design;
  place.head = "wind table=\"" + design.wind.table + "\"";
  if (const auto at = file.lines.find("wind/table"); at != file.lines.end()) place.line = at->second;
  const auto table = find_table(design.wind.table, command.design, place, messages);
  if (!table || has_stop(messages)) return print_problems(messages, command.verbose);
  for (const models::Violation& v : models::wind_rules(design, table->table))
    messages.push_back(message_of(v, file.lines, command.design));
  models::WindRecord record;
  if (!design.wind.year.record.empty())
    record = read_wind_record(design.wind.year.record, command.design, messages);
  if (has_stop(messages)) return print_problems(messages, command.verbose);
  if (!command.quiet)
    for (const Message& m : messages) std::fputs(to_text(m).c_str(), stderr);

  models::StowReport report;
  try {
    const models::BuiltRow built = models::build_row(design, table->table);
    models::StowOptions options;
    options.sensitivity = !command.quiet;
    if (!record.speed.empty()) options.record = &record;
    if (!command.quiet && isatty(STDERR_FILENO) != 0)
      options.progress = [](int done, int all) {
        std::fprintf(stderr, "\rtrying a tenth more and less: %d of %d%s", done, all,
                     done == all ? "\r\033[K" : "");
        std::fflush(stderr);
      };
    report = models::stow_report(design, table->table, *built.row, options);
  } catch (const fem::Mechanism& mechanism) {
    Message m;
    m.file = command.design;
    m.head = "the row has no solution";
    m.text = mechanism.what();
    m.no_solution = true;
    return print_problems({m}, command.verbose);
  }
  const std::string hash = input_hash(file.text, table->table.name);
  std::fputs(command.quiet ? trigger_line(report.trigger).c_str() : stow_text(report, design, hash).c_str(),
             stdout);
  if (command.verbose) std::fputs(stow_detail(report, design).c_str(), stdout);
  if (!command.json_path.empty())
    if (const std::string problem = write_file(command.json_path, stow_json(report, hash));
        !problem.empty()) {
      Message m;
      m.file = command.json_path;
      m.text = problem;
      std::fputs(to_text(m).c_str(), stderr);
      return bad_input;
    }
  const bool exists = report.trigger.known && report.trigger.speed > 0;
  return report.states_missed == 0 && exists ? all_met : criterion_failed;
}

}  // namespace focalframe::cli
