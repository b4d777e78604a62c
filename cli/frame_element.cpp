#include "cli/frame_element.h"

#include <Eigen/Geometry>
#include <algorithm>
#include <charconv>
#include <cmath>

#include "cli/nearest.h"
#include "cli/quantity.h"

namespace focalframe::cli {
namespace {

std::vector<std::string> words_in(const std::string& text) {
  std::vector<std::string> words;
  for (std::size_t at = 0; at < text.size();) {
    const std::size_t start = text.find_first_not_of(" \t\n,", at);
    if (start == std::string::npos) break;
    at = std::min(text.find_first_of(" \t\n,", start), text.size());
    words.push_back(text.substr(start, at - start));
  }
  return words;
}

std::string written(const std::string& name, const std::string& value) { return name + "=\"" + value + "\""; }

}  // namespace

FrameElementReader::FrameElementReader(const XmlElement& xml, const FrameElement& words,
                                       const std::string& file, std::vector<Message>& messages)
    : xml_(xml), words_(words), file_(file), messages_(messages) {
  check_names();
}

bool FrameElementReader::has(const std::string& attribute) const { return xml_.find(attribute) != nullptr; }

std::string FrameElementReader::text(const std::string& attribute) const {
  const XmlAttribute* found = xml_.find(attribute);
  return found ? found->value : "";
}

std::string FrameElementReader::head(const std::string& attribute) const {
  std::string result = xml_.name;
  if (attribute != "id" && has("id")) result += " " + written("id", text("id"));
  if (!attribute.empty() && has(attribute)) result += " " + written(attribute, text(attribute));
  if (!has("id") && attribute.empty() && !xml_.attributes.empty())
    result += " " + written(xml_.attributes.front().name, xml_.attributes.front().value);
  return result;
}

Message& FrameElementReader::say(const std::string& attribute, std::string message, Level level) const {
  const XmlAttribute* found = xml_.find(attribute);
  Message m;
  m.level = level;
  m.file = file_;
  m.line = found ? found->line : xml_.line;
  m.head = head(attribute);
  m.text = std::move(message);
  messages_.push_back(std::move(m));
  return messages_.back();
}

void FrameElementReader::check_names() {
  std::vector<std::string> known, absent;
  for (const FrameWord& word : words_.attributes) {
    known.push_back(word.name);
    if (!has(word.name)) absent.push_back(word.name);
  }
  std::vector<std::string> meant;
  for (const XmlAttribute& a : xml_.attributes) {
    if (a.name == "basis" || std::find(known.begin(), known.end(), a.name) != known.end()) continue;
    const std::string near = nearest_name(a.name, absent);
    const auto word = std::find_if(words_.attributes.begin(), words_.attributes.end(),
                                   [&](const FrameWord& w) { return w.name == near; });
    const bool needed = !near.empty() && word->required;
    Message& m = say(a.name, "<" + xml_.name + "> has no \"" + a.name + "\"" +
                                 (needed ? ", and its \"" + near + "\" is missing" : "") +
                                 ". It knows: " + joined(known) + ".");
    if (!near.empty() && (word->quantity == Quantity::none || parse_quantity(a.value, word->quantity).ok()))
      m.likely = written(near, a.value);
    if (!near.empty()) meant.push_back(near);
  }
  for (const FrameWord& word : words_.attributes)
    if (word.required && !has(word.name) && std::find(meant.begin(), meant.end(), word.name) == meant.end())
      say("", "<" + xml_.name + "> needs \"" + word.name + "\": " + word.help + ".").head +=
          " without " + word.name;
  for (const XmlElement& child : xml_.children) {
    Message& m = say("", "<" + xml_.name + "> holds no elements; end its tag with />.");
    m.line = child.line;
    m.head = "<" + child.name + "> inside <" + xml_.name + ">";
  }
}

std::optional<double> FrameElementReader::number(const std::string& attribute) const {
  const XmlAttribute* found = xml_.find(attribute);
  const auto word = std::find_if(words_.attributes.begin(), words_.attributes.end(),
                                 [&](const FrameWord& w) { return w.name == attribute; });
  if (!found || word == words_.attributes.end()) return std::nullopt;
  const ParsedQuantity parsed = parse_quantity(found->value, word->quantity);
  if (parsed.ok()) return parsed.value;
  Message& m = say(attribute, parsed.problem);
  std::vector<std::string> ways;
  for (const std::string& s : parsed.suggestions)
    if (parse_quantity(s, word->quantity).ok()) ways.push_back(written(attribute, s));
  if (ways.size() == 1)
    m.likely = ways.front();
  else if (ways.size() > 1)
    m.advice = "One of: " + joined(ways, " | ");
  return std::nullopt;
}

fem::Six FrameElementReader::freedoms(const std::string& attribute) const {
  fem::Six flags{};
  const std::vector<std::string>& known = freedom_words();
  for (const std::string& word : words_in(text(attribute))) {
    const auto at = std::find(known.begin(), known.end(), word);
    if (at != known.end()) {
      flags[static_cast<std::size_t>(at - known.begin())] = true;
      continue;
    }
    Message& m = say(attribute,
                     "\"" + word + "\" is no freedom. They are: " + joined(known) + ", separated by spaces.");
    if (word == "all") m.likely = written(attribute, joined(known));
  }
  return flags;
}

std::optional<fem::Vec3> FrameElementReader::direction(const std::string& attribute) const {
  if (!has(attribute)) return std::nullopt;
  const std::vector<std::string> words = words_in(text(attribute));
  fem::Vec3 value = fem::Vec3::Zero();
  bool good = words.size() == 3;
  for (std::size_t i = 0; good && i < 3; ++i) {
    const ParsedQuantity parsed = parse_quantity(words[i], Quantity::ratio);
    good = parsed.ok() && std::abs(parsed.value) < 1e12;
    value[static_cast<Eigen::Index>(i)] = parsed.value;
  }
  if (good && value.norm() > 1e-12) return value;
  say(attribute, good ? "A direction cannot be zero."
                      : "A direction is three plain numbers separated by spaces, such as 0 0 1.");
  return std::nullopt;
}

std::string FrameElementReader::word(const std::string& attribute,
                                     const std::vector<std::string>& allowed) const {
  const std::string found = text(attribute);
  if (!has(attribute) || std::find(allowed.begin(), allowed.end(), found) != allowed.end()) return found;
  Message& m = say(attribute, "This is one of: " + joined(allowed) + ".");
  if (const std::string near = nearest_name(found, allowed); !near.empty())
    m.likely = written(attribute, near);
  return "";
}

fem::Mat3 FrameElementReader::axes() const {
  if (!has("x-axis")) {
    if (has("up")) say("up", "Own axes need \"x-axis\" too: three numbers for the direction of x.");
    return fem::Mat3::Identity();
  }
  const auto x = direction("x-axis"), given = direction("up");
  if (!x || (has("up") && !given)) return fem::Mat3::Identity();
  const fem::Vec3 along = x->normalized(), upright(0, 0, 1), sideways(1, 0, 0);
  const bool steep = along.cross(upright).norm() < 1e-6;
  const fem::Vec3 up = given ? given->normalized() : steep ? sideways : upright;
  if (along.cross(up).norm() < 1e-6) {
    say("up", "\"up\" is parallel to \"x-axis\", so it cannot say where z is.");
    return fem::Mat3::Identity();
  }
  fem::Mat3 columns;
  columns.col(0) = along;
  columns.col(1) = up.cross(along).normalized();
  columns.col(2) = along.cross(columns.col(1));
  return columns;
}

}  // namespace focalframe::cli
