#include "cli/command_dish.h"

#include <cmath>
#include <cstdio>

#include "cli/command_modes.h"
#include "cli/dish_file.h"
#include "cli/dish_json.h"
#include "cli/exit_code.h"
#include "cli/input_hash.h"
#include "cli/report_dish.h"
#include "cli/report_text.h"
#include "cli/shipped_tables.h"
#include "cli/violation_message.h"
#include "cli/write_file.h"
#include "fem/mechanism.h"
#include "fem/units.h"
#include "models/dish_assess.h"
#include "models/dish_full_frame.h"
#include "models/schema_dish.h"

namespace focalframe::cli {
namespace {

int print_problems(const std::vector<Message>& messages, bool verbose) {
  std::fputs(to_text(messages, verbose).c_str(), stderr);
  return exit_code(messages);
}

// The design's table; messages hold a STOP when there is none that fits.
auto table_of(const DishFile& dish, const std::string& path, std::vector<Message>& messages) {
  models::Violation at;
  at.element = "wind";
  at.attribute = "table";
  Message place = message_of(at, dish.lines, path);
  place.head = "wind table=\"" + dish.design.wind.table + "\"";
  auto table = find_table(dish.design.wind.table, path, place, messages);
  if (table && !has_stop(messages))
    for (const models::Violation& v : models::dish_wind_rules(dish.design, table->table))
      messages.push_back(message_of(v, dish.lines, path));
  return table;
}

Message unsolved(const std::string& path, const std::string& why) {
  Message m;
  m.file = path;
  m.head = "the dish has no solution";
  m.text = why;
  m.no_solution = true;
  return m;
}

bool save(const std::string& path, const std::string& text) {
  if (path.empty()) return true;
  const std::string problem = write_file(path, text);
  if (problem.empty()) return true;
  Message m;
  m.file = path;
  m.text = problem;
  std::fputs(to_text(m).c_str(), stderr);
  return false;
}

}  // namespace

int run_dish_check(const DesignFile& design, const DesignCommand& command, int warnings) {
  const DishFile dish = read_dish(design);
  std::vector<Message> messages = dish.messages;
  if (!command.out_folder.empty()) {
    Message m;
    m.head = "--out " + command.out_folder;
    m.text = "The report folder is written for troughs only so far.";
    m.advice = "Use --verbose for everything in words, --json FILE for everything in numbers";
    messages.push_back(m);
  }
  if (has_stop(messages)) return print_problems(messages, command.verbose);
  const auto table = table_of(dish, command.design, messages);
  if (!table || has_stop(messages)) return print_problems(messages, command.verbose);
  models::DishAssessment a;
  try {
    models::DishAssessOptions asked;
    asked.parking = command.verbose || !command.json_path.empty();
    a = models::assess_dish(dish.design, table->table, asked);
  } catch (const fem::Mechanism& mechanism) {
    return print_problems({unsolved(command.design, mechanism.what())}, command.verbose);
  }
  for (const models::Violation& v : a.common.remarks)
    messages.push_back(message_of(v, dish.lines, command.design));
  const std::string hash = input_hash(design.text, table->table.name);
  for (const Message& m : messages) warnings += m.level == Level::warn ? 1 : 0;
  if (command.quiet) {
    std::fputs(verdict_line(a.common).c_str(), stdout);
  } else {
    for (const Message& m : messages) std::fputs(to_text(m).c_str(), stderr);
    std::fputs(dish_summary_text(a, hash).c_str(), stdout);
    if (command.verbose) std::fputs(dish_detail_text(a).c_str(), stdout);
  }
  const bool strict = command.strict && (!a.common.not_judged.empty() || warnings > 0);
  if (strict && a.common.limits_missed == 0)
    std::printf("STRICT: %zu not judged and %d warnings count as missed.\n", a.common.not_judged.size(),
                warnings);
  if (!save(command.json_path, dish_json(a, hash))) return bad_input;
  return a.common.limits_missed > 0 || strict ? criterion_failed : all_met;
}

int run_dish_stow(const DesignFile& design, const DesignCommand& command) {
  const DishFile dish = read_dish(design);
  std::vector<Message> messages = dish.messages;
  if (has_stop(messages)) return print_problems(messages, command.verbose);
  const auto table = table_of(dish, command.design, messages);
  if (!table || has_stop(messages)) return print_problems(messages, command.verbose);
  models::DishAssessOptions asked;
  asked.parking = true;
  asked.discretisation = false;
  models::DishAssessment a;
  try {
    a = models::assess_dish(dish.design, table->table, asked);
  } catch (const fem::Mechanism& mechanism) {
    return print_problems({unsolved(command.design, mechanism.what())}, command.verbose);
  }
  if (!command.quiet)
    std::printf("%s: how much wind?\n%s", a.common.name.c_str(), dish_parking_text(a).c_str());
  if (!save(command.json_path, dish_json(a, input_hash(design.text, table->table.name)))) return bad_input;
  double wanted = 0;
  for (const models::WindUse& use : a.common.winds)
    if (use.kind == models::StateKind::stow) wanted = use.at_axis.gust_speed;
  std::printf("STOW asks for a gust of %.1f m/s at the axis: %s\n", wanted,
              a.stow.asked.gust >= wanted ? "it holds" : "it does NOT hold");
  return a.stow.asked.gust >= wanted ? all_met : criterion_failed;
}

int run_dish_modes(const DesignFile& design, const DesignCommand& command) {
  const DishFile dish = read_dish(design);
  std::vector<Message> messages = dish.messages;
  if (has_stop(messages)) return print_problems(messages, command.verbose);
  const auto table = table_of(dish, command.design, messages);
  if (!table || has_stop(messages)) return print_problems(messages, command.verbose);
  std::vector<models::RowStability> poses;
  const double stow = dish.design.operation.stow_at, low = dish.design.operation.track_from;
  try {
    for (double pose : {low, 45 * deg, stow})
      if (std::isfinite(pose) && (poses.empty() || std::abs(poses.back().elevation - pose) > 1e-9))
        poses.push_back(models::dish_stability(dish.design, table->table, pose, command.count));
  } catch (const fem::Mechanism& mechanism) {
    return print_problems({unsolved(command.design, mechanism.what())}, command.verbose);
  }
  if (!save(command.json_path, stability_json(dish.design.name, poses))) return bad_input;
  if (!command.quiet) std::fputs(stability_text(dish.design.name, poses).c_str(), stdout);
  return all_met;
}

}  // namespace focalframe::cli
