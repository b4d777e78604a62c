#include "cli/trough_reader.h"

#include <algorithm>
#include <cmath>

#include "cli/nearest.h"

namespace focalframe::cli {
namespace {

using models::Element;
using models::Field;

std::vector<std::string> children_of(const std::string& path) {
  std::vector<std::string> names;
  for (const Element& e : models::trough_schema()) {
    const std::size_t slash = e.path.rfind('/');
    const std::string parent = slash == std::string::npos ? "" : e.path.substr(0, slash);
    if (parent == path) names.push_back(leaf(e.path));
  }
  return names;
}

// Where an element of this name belongs; empty when nowhere.
std::string parent_of(const std::string& name) {
  for (const Element& e : models::trough_schema())
    if (leaf(e.path) == name) {
      const std::size_t slash = e.path.rfind('/');
      return slash == std::string::npos ? "collector" : leaf(e.path.substr(0, slash));
    }
  return "";
}

Unread set_yes_no(const std::string& text, bool& value) {
  Unread result;
  if (text == "yes" || text == "no") {
    value = text == "yes";
    return result;
  }
  result.problem = "Allowed is yes or no.";
  std::string low = text;
  for (char& c : low) c = static_cast<char>(std::tolower(static_cast<unsigned char>(c)));
  if (low == "true" || low == "1" || low == "on" || low == "y" || low == "yes") result.suggestions = {"yes"};
  if (low == "false" || low == "0" || low == "off" || low == "n" || low == "no") result.suggestions = {"no"};
  return result;
}

Unread set_number(const Field& field, const std::string& text, models::TroughDesign& design) {
  Unread result;
  const std::string plain = text;
  if (std::find(field.words.begin(), field.words.end(), plain) != field.words.end() && field.word_slot) {
    *field.word_slot(design) = plain;
    return result;
  }
  const ParsedQuantity parsed = parse_quantity(text, field.quantity);
  if (parsed.ok()) {
    const auto slot = field.slot(design);
    if (auto* number = std::get_if<double*>(&slot)) **number = parsed.value;
    if (auto* count = std::get_if<int*>(&slot)) **count = static_cast<int>(parsed.value);
    return result;
  }
  result.problem = parsed.problem;
  result.suggestions = parsed.suggestions;
  result.bare = parsed.bare;
  if (!field.words.empty()) {
    result.problem += " Or the word " + joined_or(field.words) + ".";
    if (const std::string near = nearest_name(text, field.words); !near.empty())
      result.suggestions.insert(result.suggestions.begin(), near);
  }
  return result;
}

class Reader {
 public:
  explicit Reader(const std::string& file) : file_(file) {}

  TroughText run(const XmlElement& root) {
    read_children(root, "");
    return std::move(out_);
  }

 private:
  void say(int line, std::string head, std::string text, std::string likely = {}, std::string advice = {}) {
    Message m;
    m.file = file_;
    m.line = line;
    m.head = std::move(head);
    m.text = std::move(text);
    m.likely = std::move(likely);
    m.advice = std::move(advice);
    out_.messages.push_back(std::move(m));
  }

  void read_children(const XmlElement& xml, const std::string& path) {
    for (const XmlElement& child : xml.children) {
      const std::string child_path = path.empty() ? child.name : path + "/" + child.name;
      if (const Element* element = models::find_element(child_path))
        read_element(child, *element);
      else
        unknown_element(child, path);
    }
  }

  void unknown_element(const XmlElement& child, const std::string& path) {
    const std::vector<std::string> known = children_of(path);
    const std::string inside = path.empty() ? "collector" : leaf(path);
    const std::string belongs = parent_of(child.name), near = nearest_name(child.name, known);
    std::string text = "<" + inside + "> has no <" + child.name + ">. ";
    std::string advice;
    if (!belongs.empty()) advice = "It belongs inside <" + belongs + ">";
    if (known.empty())
      text += "It holds no elements, only attributes.";
    else
      text += "It knows: " + joined(known) + ".";
    say(child.line, "<" + child.name + ">", text, belongs.empty() && !near.empty() ? "<" + near + ">" : "",
        advice);
  }

  void read_element(const XmlElement& xml, const Element& element) {
    if (out_.lines.count(element.path) && !element.repeats) {
      say(xml.line, "<" + xml.name + ">",
          "A second <" + xml.name + ">; the first stands in line " +
              std::to_string(out_.lines[element.path]) + ". Only one of them can count.",
          {}, "Keep the right one and delete the other");
      return;
    }
    out_.lines[element.path] = xml.line;
    if (element.presence) *element.presence(out_.design) = true;
    if (element.repeats) out_.design.accepted.emplace_back();
    for (const XmlAttribute& attribute : xml.attributes) read_attribute(element, attribute);
    read_children(xml, element.path);
  }

  void read_attribute(const Element& element, const XmlAttribute& attribute) {
    const std::string key = element.path + "/" + attribute.name;
    if (attribute.name == "basis") {
      read_basis(element, attribute);
      return;
    }
    const Field* field = models::find_field(element, attribute.name);
    if (!field) {
      out_.unknown.push_back({element.path, attribute.name, attribute.value, attribute.line});
      return;
    }
    out_.lines[key] = attribute.line;
    out_.raw[key] = attribute.value;
    Unread unread = set_field(element, *field, attribute.value, out_.design);
    if (unread.problem.empty()) return;
    unread.line = attribute.line;
    out_.unread.push_back(std::move(unread));
  }

  void read_basis(const Element& element, const XmlAttribute& attribute) {
    const auto& words = models::basis_words();
    if (std::find(words.begin(), words.end(), attribute.value) != words.end()) {
      out_.design.basis[element.path] = attribute.value;
      return;
    }
    const std::string near = nearest_name(attribute.value, words);
    say(attribute.line, leaf(element.path) + " basis=\"" + attribute.value + "\"",
        "How a value is known is one of: " + joined(words) + ".",
        near.empty() ? "" : "basis=\"" + near + "\"");
  }

  const std::string& file_;
  TroughText out_;
};

}  // namespace

std::string leaf(const std::string& path) { return path.substr(path.rfind('/') + 1); }

Unread set_field(const Element& element, const Field& field, const std::string& text,
                 models::TroughDesign& design) {
  const auto slot = field.slot(design);
  Unread result;
  if (auto* yes = std::get_if<bool*>(&slot))
    result = set_yes_no(text, **yes);
  else if (auto* words = std::get_if<std::string*>(&slot))
    if (text.find_first_not_of(" \t\n") == std::string::npos)
      result.problem = "The value is empty.";
    else
      **words = text;
  else
    result = set_number(field, text, design);
  result.element = element.path;
  result.attribute = field.name;
  result.raw = text;
  return result;
}

TroughText read_trough(const XmlElement& root, const std::string& file) { return Reader(file).run(root); }

}  // namespace focalframe::cli
