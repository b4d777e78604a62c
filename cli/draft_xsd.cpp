#include <algorithm>
#include <set>
#include <string>

#include "cli/dish_file.h"
#include "cli/draft.h"
#include "cli/draft_xml.h"
#include "cli/escaped.h"
#include "cli/frame_words.h"
#include "models/schema.h"
#include "models/schema_dish.h"

namespace focalframe::cli {
namespace {

using models::Quantity;

// A text that begins like a number and holds a unit. The reader is stricter; whatever it takes, this takes.
constexpr const char* with_unit =
    R"([\s\p{Z}]*[+\-−]?[\s\p{Z}]*([0-9]|\.[0-9]|½|¼|¾)(.|\s)*[A-Za-z°µ%](.|\s)*)";
constexpr const char* bare = R"([\s\p{Z}]*[+\-−]?[\s\p{Z}]*([0-9]|\.[0-9]|½|¼|¾)(.|\s)*)";
constexpr const char* whole = R"([\s\p{Z}]*[+\-−]?[0-9]+[\s\p{Z}]*)";

std::string type_name(Quantity quantity) {
  switch (quantity) {
    case Quantity::count:
      return "count";
    case Quantity::ratio:
      return "ratio";
    case Quantity::stiffness:
    case Quantity::twist_stiffness:
      return "stiffness";
    default:
      return "quantity";
  }
}

std::string pattern_type(const char* name, const std::string& pattern) {
  return std::string("  <xs:simpleType name=\"") + name +
         "\">\n    <xs:restriction base=\"xs:string\"><xs:pattern value=\"" + escaped(pattern) +
         "\"/></xs:restriction>\n  </xs:simpleType>\n";
}

std::string enumeration(const std::vector<std::string>& words) {
  std::string text = "<xs:simpleType><xs:restriction base=\"xs:string\">";
  for (const std::string& word : words) text += "<xs:enumeration value=\"" + escaped(word) + "\"/>";
  return text + "</xs:restriction></xs:simpleType>";
}

std::string documentation(const std::string& help) {
  return help.empty()
             ? ""
             : "<xs:annotation><xs:documentation>" + escaped(help) + "</xs:documentation></xs:annotation>";
}

std::string attribute(const std::string& name, bool required, const std::string& type,
                      const std::string& inner, const std::string& help, const std::string& indent) {
  return indent + "<xs:attribute name=\"" + name + "\"" + (type.empty() ? "" : " type=\"" + type + "\"") +
         (required ? " use=\"required\"" : "") + ">" + documentation(help) + inner + "</xs:attribute>\n";
}

std::string field_attribute(const models::Field& f, const std::string& indent) {
  if (f.quantity == Quantity::none && f.words.empty())
    return attribute(f.name, f.required, "xs:string", "", f.help, indent);
  if (f.quantity == Quantity::none)
    return attribute(f.name, f.required, "", enumeration(f.words), f.help, indent);
  if (f.words.empty()) return attribute(f.name, f.required, type_name(f.quantity), "", f.help, indent);
  return attribute(f.name, f.required, "",
                   "<xs:simpleType><xs:union memberTypes=\"" + type_name(f.quantity) + "\">" +
                       enumeration(f.words) + "</xs:union></xs:simpleType>",
                   f.help, indent);
}

// A word with the same name in both kinds of collector: the schema takes whatever either of them takes.
models::Field merged(models::Field one, const models::Field& other) {
  one.required = one.required && other.required;
  if (one.quantity != other.quantity || one.words.empty() != other.words.empty()) {
    one.quantity = Quantity::none;
    one.words.clear();
  }
  for (const std::string& word : one.words.empty() ? std::vector<std::string>{} : other.words)
    if (std::find(one.words.begin(), one.words.end(), word) == one.words.end()) one.words.push_back(word);
  return one;
}

void merge(models::Element& into, const models::Element& other) {
  std::vector<models::Field> fields;
  for (const models::Field& f : into.fields) {
    const models::Field* same = models::find_field(other, f.name);
    fields.push_back(same ? merged(f, *same) : f);
    fields.back().required = fields.back().required && same;
  }
  for (const models::Field& f : other.fields)
    if (!models::find_field(into, f.name)) fields.push_back(f), fields.back().required = false;
  into.fields = std::move(fields);
}

// XSD 1.0 knows one type for one name in one place, so the elements of both kinds are laid over each other.
const std::vector<models::Element>& all_elements() {
  static const std::vector<models::Element> all = [] {
    std::vector<models::Element> made = models::trough_schema();
    for (const models::Element& e : models::dish_schema()) {
      const auto same =
          std::find_if(made.begin(), made.end(), [&](const auto& t) { return t.path == e.path; });
      if (same == made.end())
        made.push_back(e);
      else
        merge(*same, e);
    }
    for (const std::string& path : dish_attributes_with_own_units())
      for (models::Element& e : made)
        if (path.starts_with(e.path + "/")) {
          models::Field field;
          field.name = path.substr(e.path.size() + 1);
          field.help = "of an antenna";
          e.fields.push_back(field);
        }
    return made;
  }();
  return all;
}

std::string collector_element(const models::Element& element, const std::string& indent) {
  const std::size_t slash = element.path.rfind('/');
  const bool child = slash != std::string::npos;
  std::string text = indent + "<xs:element name=\"" + element.path.substr(child ? slash + 1 : 0) + "\"" +
                     (child ? " minOccurs=\"0\"" : "") + ">\n" + indent + "  " + documentation(element.help) +
                     "\n" + indent + "  <xs:complexType>\n";
  std::string inside;
  for (const models::Element& other : all_elements())
    if (other.path.starts_with(element.path + "/")) inside += collector_element(other, indent + "      ");
  if (!inside.empty()) text += indent + "    <xs:all>\n" + inside + indent + "    </xs:all>\n";
  for (const models::Field& f : element.fields) text += field_attribute(f, indent + "    ");
  return text + indent + "    <xs:attribute name=\"basis\" type=\"basis\"/>\n" + indent +
         "  </xs:complexType>\n" + indent + "</xs:element>\n";
}

std::string frame_word(const FrameWord& word, const std::string& indent) {
  const bool text = word.quantity == Quantity::none;
  return attribute(word.name, word.required, text ? "xs:string" : type_name(word.quantity), "", word.help,
                   indent);
}

std::string frame_element_type() {
  std::string text =
      "      <xs:element name=\"frame\">\n        <xs:complexType>\n          <xs:choice minOccurs=\"0\" "
      "maxOccurs=\"unbounded\">\n";
  for (const FrameElement& e : frame_elements()) {
    text += "            <xs:element name=\"" + e.name + "\">\n              " + documentation(e.help) +
            "\n              <xs:complexType>\n";
    for (const FrameWord& word : e.attributes) text += frame_word(word, "                ");
    text +=
        "                <xs:attribute name=\"basis\" type=\"xs:string\"/>\n              "
        "</xs:complexType>\n            </xs:element>\n";
  }
  return text +
         "          </xs:choice>\n          <xs:anyAttribute processContents=\"skip\"/>\n        "
         "</xs:complexType>\n      </xs:element>\n";
}

}  // namespace

std::string xsd_text() {
  std::string text =
      "<?xml version=\"1.0\" encoding=\"UTF-8\"?>\n"
      "<!-- Written by `focalframe draft xsd`: for editors, to complete and to check while typing. It knows "
      "the\n"
      "     words and that a unit is there; ranges and rules across values are the program's. -->\n"
      "<xs:schema xmlns:xs=\"http://www.w3.org/2001/XMLSchema\">\n";
  text += pattern_type("quantity", with_unit) + pattern_type("stiffness", std::string("rigid|") + with_unit) +
          pattern_type("ratio", bare) + pattern_type("count", whole);
  text += "  <xs:simpleType name=\"basis\">\n    <xs:restriction base=\"xs:string\">\n";
  for (const std::string& word : models::basis_words())
    text += "      <xs:enumeration value=\"" + word + "\"/>\n";
  text +=
      "    </xs:restriction>\n  </xs:simpleType>\n\n  <xs:element name=\"collector\">\n    "
      "<xs:complexType>\n      <xs:choice minOccurs=\"0\" maxOccurs=\"unbounded\">\n";
  for (const models::Element& element : all_elements())
    if (element.path.find('/') == std::string::npos) text += collector_element(element, "      ");
  text += frame_element_type();
  text +=
      "      </xs:choice>\n      <xs:attribute name=\"name\" type=\"xs:string\"/>\n      <xs:attribute "
      "name=\"kind\" use=\"required\">" +
      enumeration({"trough", "dish", "frame"}) + "</xs:attribute>\n      <xs:attribute name=\"format\">" +
      enumeration({"1"}) + "</xs:attribute>\n    </xs:complexType>\n  </xs:element>\n</xs:schema>\n";
  return text;
}

}  // namespace focalframe::cli
