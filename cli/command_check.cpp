#include "cli/command_check.h"

#include <unistd.h>

#include <cstdio>
#include <string>

#include "cli/exit_code.h"
#include "cli/input_hash.h"
#include "cli/report/out_folder.h"
#include "cli/report/trough_report.h"
#include "cli/report_detail.h"
#include "cli/report_json.h"
#include "cli/report_optics.h"
#include "cli/report_text.h"
#include "cli/shipped_tables.h"
#include "cli/stow_text.h"
#include "cli/violation_message.h"
#include "cli/write_file.h"
#include "fem/mechanism.h"
#include "models/assess.h"
#include "models/cures.h"
#include "models/guesses.h"
#include "models/row_modes.h"
#include "models/wind_rules.h"

namespace focalframe::cli {
namespace {

// A line that is overwritten while a terminal waits; nothing elsewhere.
models::Progress progress_line(const char* what, bool quiet) {
  if (quiet || isatty(STDERR_FILENO) == 0) return {};
  return [what](int done, int all) {
    std::fprintf(stderr, "\r%s: %d of %d%s", what, done, all, done == all ? "\r\033[K" : "");
    std::fflush(stderr);
  };
}

int verdict_code(const models::Assessment& a, const CheckOptions& options, std::size_t warnings) {
  if (a.limits_missed > 0) return criterion_failed;
  if (options.strict && (!a.not_judged.empty() || warnings > 0)) return criterion_failed;
  return all_met;
}

int print_problems(const std::vector<Message>& messages, bool verbose) {
  std::fputs(to_text(messages, verbose).c_str(), stderr);
  return exit_code(messages);
}

}  // namespace

int run_trough_check(const models::TroughDesign& design, const Lines& lines, const CheckOptions& options) {
  std::vector<Message> messages;
  models::Violation table_place;
  table_place.element = "wind";
  table_place.attribute = "table";
  Message place = message_of(table_place, lines, options.design_path);
  place.head = "wind table=\"" + design.wind.table + "\"";
  const auto table = find_table(design.wind.table, options.design_path, place, messages);
  if (!table || has_stop(messages)) return print_problems(messages, options.verbose);
  for (const models::Violation& v : models::wind_rules(design, table->table, table->zone))
    messages.push_back(message_of(v, lines, options.design_path));
  if (has_stop(messages)) return print_problems(messages, options.verbose);

  models::Assessment a;
  models::BuiltRow built;
  models::Trigger trigger;
  try {
    built = models::build_row(design, table->table);
    models::AssessOptions with_row;
    with_row.built = &built;
    with_row.trace_rays = options.trace_rays;
    with_row.maps = options.maps;
    with_row.rigging = options.verbose || !options.json_path.empty() || !options.out_folder.empty();
    a = models::assess(design, table->table, with_row);
    trigger = models::quick_trigger(design, table->table, *built.row);
  } catch (const fem::Mechanism& mechanism) {
    Message m;
    m.file = options.design_path;
    m.head = "the row has no solution";
    m.text = mechanism.what();
    m.no_solution = true;
    return print_problems({m}, options.verbose);
  }
  a.deciding_guesses =
      models::deciding_guesses(design, table->table, a, progress_line("trying the guesses", options.quiet));
  a.cures = models::find_cures(design, table->table, a, progress_line("trying changes", options.quiet));

  for (const models::Violation& v : models::frame_remarks(design, table->table)) a.remarks.push_back(v);

  for (const models::Violation& v : a.remarks) messages.push_back(message_of(v, lines, options.design_path));
  const std::string hash = input_hash(options.design_text, table->table.name);
  const std::size_t warnings = messages.size() + static_cast<std::size_t>(options.warnings);
  if (options.quiet) {
    std::fputs(verdict_line(a).c_str(), stdout);
  } else {
    for (const Message& m : messages) std::fputs(to_text(m).c_str(), stderr);
    std::fputs(summary_text(a, hash).c_str(), stdout);
    std::fputs(stow_headline(trigger, design).c_str(), stdout);
    if (options.verbose) std::fputs(detail_text(a).c_str(), stdout);
    std::fputs(trace_text(a).c_str(), stdout);
  }
  if (options.strict && a.limits_missed == 0 && (!a.not_judged.empty() || warnings > 0))
    std::printf("STRICT: %zu not judged and %zu warnings count as missed.\n", a.not_judged.size(), warnings);
  const auto written = [](const std::string& path, const std::string& problem) {
    if (problem.empty()) return true;
    Message m;
    m.file = path;
    m.text = problem;
    std::fputs(to_text(m).c_str(), stderr);
    return false;
  };
  if (!options.json_path.empty() &&
      !written(options.json_path, write_file(options.json_path, trough_json(a, hash, &trigger))))
    return bad_input;
  if (!options.out_folder.empty()) {
    const auto files =
        trough_report_files({design, table->table, *built.row, a, messages, hash, options.design_text});
    if (!written(options.out_folder, write_report_folder(options.out_folder, files))) return bad_input;
  }
  return verdict_code(a, options, warnings);
}

}  // namespace focalframe::cli
