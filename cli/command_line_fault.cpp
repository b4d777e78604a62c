#include "cli/command_line_fault.h"

#include <algorithm>
#include <filesystem>

#include "cli/commands.h"
#include "cli/nearest.h"

namespace focalframe::cli {
namespace {

using Words = std::vector<std::string>;

const Words commands{"check", "stow", "draft", "frame", "modes", "tables"};
const Words draft_kinds{"trough", "frame", "xsd"};

struct Options {
  Words flags, with_value;
};

Options options_of(const std::string& command) {
  if (command == "check") return {{"--quiet", "--verbose", "--strict", "--help"}, {"--json"}};
  if (command == "stow") return {{"--quiet", "--verbose", "--help"}, {"--json"}};
  if (command == "modes") return {{"--quiet", "--verbose", "--help"}, {"--json", "--count"}};
  if (command == "draft") {
    Options options{{"--every-field", "--help"}, {}};
    for (const std::string& name : draft_size_options()) options.with_value.push_back("--" + name);
    return options;
  }
  if (command == "frame") return {{"--help"}, {"--elevation"}};
  if (command == "tables") return {{"--help"}, {}};
  return {{"--help", "--version"}, {}};
}

bool has(const Words& words, const std::string& word) {
  return std::find(words.begin(), words.end(), word) != words.end();
}

bool is_design_name(const std::string& word) { return std::filesystem::path(word).extension() == ".xml"; }

std::string replaced(Words words, const std::string& from, const std::string& to) {
  std::replace(words.begin(), words.end(), from, to);
  return "focalframe " + joined(words);
}

// The command line taken apart: options with their values, and the words that belong to none.
struct Parts {
  Words free, unknown;
  std::vector<std::pair<std::string, std::string>> values;
  std::string without_value;
};

Parts take_apart(const Words& words, const std::string& command) {
  const Options options = options_of(command);
  Parts parts;
  for (std::size_t i = 1; i < words.size(); ++i) {
    const std::string& word = words[i];
    const std::string name = word.substr(0, word.find('='));
    if (!word.starts_with("-") || word == "-") {
      parts.free.push_back(word);
    } else if (has(options.with_value, name)) {
      if (name != word)
        parts.values.emplace_back(name, word.substr(name.size() + 1));
      else if (i + 1 < words.size() && !words[i + 1].starts_with("--"))
        parts.values.emplace_back(name, words[++i]);
      else
        parts.without_value = name;
    } else if (!has(options.flags, word) && word != "-h") {
      parts.unknown.push_back(word);
    }
  }
  return parts;
}

void unknown_command(Message& m, const Words& words) {
  const std::string& word = words.front();
  m.text = "The first word is what to do: " + joined_or(commands) + ".";
  if (is_design_name(word)) {
    m.likely = "focalframe check " + joined(words);
  } else if (word == "help") {
    m.likely = "focalframe --help";
  } else if (word.starts_with("-")) {
    const std::string near = nearest_name(word, {"--help", "--version"});
    if (!near.empty()) m.likely = replaced(words, word, near);
    for (const std::string& other : words)
      if (has(commands, other)) m.text = "The word \"" + other + "\" comes first, its options after it.";
  } else if (const std::string near = nearest_name(word, commands); !near.empty()) {
    m.likely = replaced(words, word, near);
  }
}

void missing_design(Message& m, const Words& words, const Parts& parts) {
  for (const auto& [name, value] : parts.values)
    if (name == "--json" && is_design_name(value)) {
      m.text = "No design is named: --json took " + value + " as the file to write. It was not touched.";
      const std::string json = std::filesystem::path(value).replace_extension(".json").string();
      m.likely = "focalframe " + words.front() + " " + value + " --json " + json;
      return;
    }
  m.text = "No design is named.";
  m.advice =
      "Write: focalframe " + words.front() + " my-row.xml; to get one: focalframe draft trough my-row.xml";
}

void draft_fault(Message& m, const Words& words, const Parts& parts) {
  if (parts.free.empty()) {
    m.text = "What to draft is not said: " + joined_or(draft_kinds) + ", and the file to write.";
    m.advice = "Write: focalframe draft trough my-row.xml";
  } else if (!has(draft_kinds, parts.free.front())) {
    const std::string& kind = parts.free.front();
    m.text = "\"" + kind + "\" cannot be drafted; known are " + joined_or(draft_kinds) + ".";
    if (is_design_name(kind))
      m.likely = "focalframe draft trough " + joined(parts.free);
    else if (const std::string near = nearest_name(kind, draft_kinds); !near.empty())
      m.likely = replaced(words, kind, near);
  } else if (parts.free.size() == 1) {
    m.text = "The file to write is not named.";
    m.likely =
        "focalframe " + joined(words) + (parts.free.front() == "xsd" ? " collector.xsd" : " my-row.xml");
  } else {
    m.text = "One file is written at a time; \"" + parts.free[2] +
             "\" is a word too many. A size is given like --aperture 2.4m, without a space before the unit "
             "or in quotation marks.";
  }
}

}  // namespace

Message command_line_fault(const Words& words, const std::string& reason) {
  Message m;
  m.file = "command line";
  m.head = "focalframe " + joined(words);
  if (words.empty() || !has(commands, words.front())) {
    if (words.empty())
      m.text = "What to do is not said: " + joined_or(commands) + ".";
    else
      unknown_command(m, words);
    return m;
  }
  const std::string& command = words.front();
  const Parts parts = take_apart(words, command);
  const Options options = options_of(command);
  if (!parts.unknown.empty()) {
    Words known = options.flags;
    known.insert(known.end(), options.with_value.begin(), options.with_value.end());
    const std::string name = parts.unknown.front().substr(0, parts.unknown.front().find('='));
    m.text = command + " has no \"" + name + "\". It knows: " + joined(known) + ".";
    if (const std::string near = nearest_name(name, known); !near.empty())
      m.likely = replaced(words, parts.unknown.front(), near + parts.unknown.front().substr(name.size()));
  } else if (!parts.without_value.empty()) {
    m.text = parts.without_value + " needs a value after it.";
    if (parts.without_value == "--json" && !parts.free.empty())
      m.likely =
          replaced(words, "--json",
                   "--json " + std::filesystem::path(parts.free.front()).replace_extension(".json").string());
  } else if (command == "draft" && (parts.free.size() != 2 || !has(draft_kinds, parts.free.front()))) {
    draft_fault(m, words, parts);
  } else if ((command == "check" || command == "stow" || command == "modes") && parts.free.empty()) {
    missing_design(m, words, parts);
  } else if (command != "draft" && parts.free.size() > 1) {
    m.text = "One " + std::string(command == "tables" ? "table" : "design") + " at a time; \"" +
             parts.free[1] + "\" is a word too many. A name with spaces stands in quotation marks.";
  } else {
    m.text = reason;
  }
  return m;
}

}  // namespace focalframe::cli
