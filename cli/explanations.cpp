#include "cli/explanations.h"

#include <algorithm>
#include <cctype>
#include <sstream>

#include "cli/draft_xml.h"
#include "cli/embedded.h"
#include "cli/messages.h"
#include "cli/nearest.h"
#include "models/schema.h"

namespace focalframe::cli {
namespace {

std::string lower(std::string text) {
  for (char& c : text) c = static_cast<char>(std::tolower(static_cast<unsigned char>(c)));
  return text;
}

std::vector<std::string> split(const std::string& text, const std::string& between) {
  std::vector<std::string> out;
  std::size_t at = 0;
  for (std::size_t next; (next = text.find(between, at)) != std::string::npos; at = next + between.size())
    out.push_back(text.substr(at, next - at));
  out.push_back(text.substr(at));
  return out;
}

std::vector<Explanation> read_explanations() {
  std::vector<Explanation> out;
  std::istringstream lines(explanation_texts().front().text);
  for (std::string line; std::getline(lines, line);) {
    if (line.rfind("= ", 0) == 0) {
      const auto names = split(line.substr(2), " | ");
      out.push_back({names[0], {}, {}});
      if (names.size() > 1) out.back().also = split(names[1], ", ");
    } else if (const std::size_t colon = line.find(": "); colon != std::string::npos && !out.empty()) {
      out.back().parts.emplace_back(line.substr(0, colon), line.substr(colon + 2));
    }
  }
  return out;
}

bool called(const Explanation& e, const std::string& what) {
  if (lower(e.name) == what) return true;
  return std::any_of(e.also.begin(), e.also.end(), [&](const auto& name) { return lower(name) == what; });
}

std::string topic_text(const Explanation& e) {
  std::string out = e.name + "\n";
  for (const auto& [part, text] : e.parts) out += wrapped(part == "means" ? text : part + ": " + text, 2);
  return out;
}

std::string range_text(const models::Field& f) {
  if (f.least == f.most) return "";
  return std::string(" ") + (f.above_least ? "More than " : "From ") + value_text(f.least, f) + " to " +
         value_text(f.most, f) + ".";
}

std::string field_text(const models::Element& element, const models::Field& f) {
  std::string text = f.help + ".";
  if (!f.words.empty()) text += " Words: " + joined_or(f.words) + ".";
  text += range_text(f);
  text += f.required               ? " Required."
          : f.default_text.empty() ? " May be left out."
                                   : " Default: " + f.default_text + ".";
  return "<" + element.path + " " + f.name + ">\n" + wrapped(text, 2);
}

std::string element_text(const models::Element& element) {
  std::string names;
  for (const models::Field& f : element.fields) names += " " + f.name;
  return "<" + element.path + ">\n" + wrapped(element.help + ".", 2) +
         wrapped("attributes:" + names + " basis", 2);
}

std::string last_name(const std::string& path) { return path.substr(path.rfind('/') + 1); }

}  // namespace

const std::vector<Explanation>& explanations() {
  static const std::vector<Explanation> all = read_explanations();
  return all;
}

std::string explain(const std::string& what) {
  const std::string asked = lower(what);
  std::string out;
  for (const Explanation& e : explanations())
    if (called(e, asked)) out += topic_text(e);
  const auto words = split(asked, " ");
  for (const models::Element& element : models::trough_schema()) {
    const bool this_element = words[0] == element.path || words[0] == last_name(element.path);
    if (words.size() == 1 && this_element) out += element_text(element);
    if (words.size() > 2 || (words.size() == 2 && !this_element)) continue;
    for (const models::Field& f : element.fields)
      if (lower(f.name) == words.back()) out += field_text(element, f);
  }
  return out;
}

std::vector<std::string> explained_names() {
  std::vector<std::string> names;
  for (const Explanation& e : explanations()) {
    names.push_back(e.name);
    names.insert(names.end(), e.also.begin(), e.also.end());
  }
  for (const models::Element& element : models::trough_schema()) {
    names.push_back(last_name(element.path));
    for (const models::Field& f : element.fields) names.push_back(f.name);
  }
  return names;
}

}  // namespace focalframe::cli
