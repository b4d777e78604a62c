#include "cli/xml.h"

#include <tinyxml2.h>

#include "cli/prescan.h"

namespace focalframe::cli {
namespace {

// Depth is bounded by the pre-scan.
XmlElement copied(const tinyxml2::XMLElement& from) {
  XmlElement result{from.Name(), from.GetLineNum(), {}, {}};
  for (const tinyxml2::XMLAttribute* a = from.FirstAttribute(); a; a = a->Next())
    result.attributes.push_back({a->Name(), a->Value(), a->GetLineNum()});
  for (const tinyxml2::XMLElement* e = from.FirstChildElement(); e; e = e->NextSiblingElement())
    result.children.push_back(copied(*e));
  return result;
}

}  // namespace

const XmlAttribute* XmlElement::find(const std::string& attribute) const {
  for (const XmlAttribute& a : attributes)
    if (a.name == attribute) return &a;
  return nullptr;
}

XmlFile parse_xml(const std::string& text, const std::string& file) {
  XmlFile result;
  result.messages = prescan(text, file);
  if (has_stop(result.messages)) return result;
  tinyxml2::XMLDocument document;
  const tinyxml2::XMLError error = document.Parse(text.data(), text.size());
  if (error != tinyxml2::XML_SUCCESS || !document.RootElement()) {
    Message message;
    message.file = file;
    message.line = document.ErrorLineNum();
    message.head = "the XML cannot be read";
    message.text = "A tag or an attribute near this line is broken. Nothing was read.";
    result.messages.push_back(std::move(message));
    return result;
  }
  result.root = copied(*document.RootElement());
  return result;
}

}  // namespace focalframe::cli
