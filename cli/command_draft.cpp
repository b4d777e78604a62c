#include <cmath>
#include <filesystem>
#include <iostream>

#include "cli/commands.h"
#include "cli/design_file.h"
#include "cli/draft.h"
#include "cli/exit_code.h"
#include "cli/quantity.h"
#include "cli/shipped_tables.h"
#include "cli/write_file.h"
#include "fem/mechanism.h"
#include "models/schema.h"
#include "models/settle.h"

namespace focalframe::cli {
namespace {

int fail(Message message) {
  std::cerr << to_text(std::vector<Message>{std::move(message)}, true);
  return bad_input;
}

Message about(const std::string& place, std::string head, std::string text) {
  Message m;
  m.file = place;
  m.head = std::move(head);
  m.text = std::move(text);
  return m;
}

double* slot_of(DraftSizes& sizes, const std::string& name) {
  if (name == "aperture") return &sizes.aperture;
  if (name == "length") return &sizes.length;
  if (name == "module-length") return &sizes.module_length;
  if (name == "focal-length") return &sizes.focal_length;
  if (name == "depth") return &sizes.depth;
  if (name == "axis-height") return &sizes.axis_height;
  if (name == "altitude") return &sizes.altitude;
  return nullptr;
}

// Reads the sizes; what cannot be read is appended to `messages`.
DraftSizes read_sizes(const DraftCommand& command, std::vector<Message>& messages) {
  DraftSizes sizes;
  for (const auto& [name, text] : command.sizes) {
    double* slot = slot_of(sizes, name);
    const ParsedQuantity parsed = parse_quantity(text, slot ? Quantity::length : Quantity::count);
    const bool positive = parsed.value > 0 || name == "altitude";
    if (parsed.ok() && positive) {
      if (slot)
        *slot = parsed.value;
      else
        sizes.modules = static_cast<int>(parsed.value);
      continue;
    }
    Message m = about("command line", "--" + name + " " + text,
                      parsed.ok() ? "This must be more than 0." : parsed.problem);
    if (!parsed.suggestions.empty()) {
      std::string value = parsed.suggestions.front();
      std::erase(value, ' ');
      m.likely = "--" + name + " " + value;
    }
    messages.push_back(std::move(m));
  }
  return sizes;
}

int write_draft(const std::string& file, const std::string& text, const std::string& what) {
  if (const std::string problem = write_new_file(file, text); !problem.empty())
    return fail(about(file, "", problem));
  std::cout << "Wrote " << file << ": " << what << "\n";
  return all_met;
}

// Rules of thumb first, then sizes up the catalogue until the design meets its own limits.
models::Settled settled_trough(const DraftSizes& sizes) {
  models::Settled out;
  out.design = starter_trough(sizes);
  std::vector<Message> messages;
  const auto table = find_table(out.design.wind.table, "", {}, messages);
  if (!table || has_stop(messages)) return out;
  for (const models::Violation& v : models::validate(out.design))
    if (v.level == models::Violation::Level::stop) return out;  // told when the text is read again
  try {
    return models::settle(out.design, table->table);
  } catch (const fem::Mechanism&) {
    return out;
  }
}

// "It meets its own limits" or which it does not.
std::string standing(const models::Settled& settled) {
  if (settled.rounds == 0) return {};
  if (settled.missed.empty())
    return "It meets its own limits (checked " + std::to_string(settled.rounds) + " times).";
  std::string names;
  for (const models::Criterion& c : settled.missed) names += (names.empty() ? "" : ", ") + c.name;
  return "It does NOT meet these of its own limits: " + names +
         ". A shorter row, shorter modules or another "
         "kind of tube and ribs is needed.";
}

int draft_trough(const DraftCommand& command, const std::string& name) {
  std::vector<Message> messages;
  const DraftSizes sizes = read_sizes(command, messages);
  if (!messages.empty()) {
    std::cerr << to_text(messages, true);
    return bad_input;
  }
  const models::Settled settled = settled_trough(sizes);
  const models::TroughDesign& design = settled.design;
  const std::string text = command.every_field ? every_field_text(design, name) : trough_text(design, name);
  // A starter design that check would refuse is of no use to anybody: the sizes given do not fit together.
  const DesignFile trial = read_design_text(text, command.file);
  if (!trial.sound()) {
    std::vector<Message> stops;
    for (Message m : trial.messages)
      if (m.level == Level::stop) {
        m.file = "command line";
        m.line = 0;
        stops.push_back(std::move(m));
      }
    std::cerr << to_text(stops, true);
    return bad_input;
  }
  const double module_length = design.row.module_length;
  if (std::abs(sizes.module_length - module_length) > 1e-3) {
    Message m =
        about("command line", "--module-length",
              "Modules of " + models::quantity_text(sizes.module_length, Quantity::length) +
                  " do not make up a row of " + models::quantity_text(sizes.length, Quantity::length) +
                  ". Written are " + std::to_string(design.row.modules) + " of " +
                  models::quantity_text(module_length, Quantity::length) + ".");
    m.level = Level::note;
    std::cerr << to_text(std::vector<Message>{std::move(m)}, true);
  }
  return write_draft(command.file, text,
                     "a trough to start from. " + standing(settled) +
                         "\nChange what is yours, then: focalframe check " + command.file);
}

}  // namespace

const std::vector<std::string>& draft_size_options() {
  static const std::vector<std::string> names{"aperture",     "length", "modules",     "module-length",
                                              "focal-length", "depth",  "axis-height", "altitude"};
  return names;
}

int run_draft(const DraftCommand& command) {
  const std::string name = std::filesystem::path(command.file).stem().string();
  if (command.kind == "xsd") return write_draft(command.file, xsd_text(), "a schema for XML editors");
  if (command.kind == "trough") return draft_trough(command, name);
  if (!command.sizes.empty())
    return fail(about("command line", "--" + command.sizes.front().first,
                      "Sizes are for `draft trough`; a frame is given by its nodes."));
  return write_draft(command.file, frame_starter_text(name),
                     "a frame to start from. Change it, then: focalframe check " + command.file);
}

}  // namespace focalframe::cli
