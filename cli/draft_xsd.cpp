#include <set>
#include <string>

#include "cli/draft.h"
#include "cli/draft_xml.h"
#include "cli/escaped.h"
#include "cli/frame_words.h"
#include "models/schema.h"

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

std::string trough_element(const models::Element& element, const std::string& indent) {
  const std::size_t slash = element.path.rfind('/');
  const bool child = slash != std::string::npos;
  std::string text = indent + "<xs:element name=\"" + element.path.substr(child ? slash + 1 : 0) + "\"" +
                     (child ? " minOccurs=\"0\"" : "") + ">\n" + indent + "  " + documentation(element.help) +
                     "\n" + indent + "  <xs:complexType>\n";
  std::string inside;
  for (const models::Element& other : models::trough_schema())
    if (other.path.starts_with(element.path + "/")) inside += trough_element(other, indent + "      ");
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
  for (const models::Element& element : models::trough_schema())
    if (element.path.find('/') == std::string::npos) text += trough_element(element, "      ");
  text += frame_element_type();
  text +=
      "      </xs:choice>\n      <xs:attribute name=\"name\" type=\"xs:string\"/>\n      <xs:attribute "
      "name=\"kind\" use=\"required\">" +
      enumeration({"trough", "frame"}) + "</xs:attribute>\n      <xs:attribute name=\"format\">" +
      enumeration({"1"}) + "</xs:attribute>\n    </xs:complexType>\n  </xs:element>\n</xs:schema>\n";
  return text;
}

}  // namespace focalframe::cli
