#pragma once

/// XML as plain values with line numbers. TinyXML2 is used in xml.cpp only.

#include <string>
#include <vector>

#include "cli/messages.h"

namespace focalframe::cli {

struct XmlAttribute {
  std::string name, value;
  int line = 0;
};

struct XmlElement {
  std::string name;
  int line = 0;
  std::vector<XmlAttribute> attributes;
  std::vector<XmlElement> children;

  const XmlAttribute* find(const std::string& attribute) const;
};

struct XmlFile {
  XmlElement root;
  std::vector<Message> messages;  ///< any STOP: root is empty
};

/// `text` has plain line ends; see cli/read_file.h. Pre-scans, then parses.
XmlFile parse_xml(const std::string& text, const std::string& file);

}  // namespace focalframe::cli
