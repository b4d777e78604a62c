#pragma once

/// XML elements into a TroughDesign, by the table of models/schema.h; used by cli/design_file.cpp.

#include <map>
#include <set>
#include <string>
#include <vector>

#include "cli/design_file.h"
#include "cli/quantity.h"
#include "models/schema.h"

namespace focalframe::cli {

/// A value that could not be taken.
struct Unread {
  std::string element, attribute, raw;
  int line = 0;
  std::string problem;
  std::vector<std::string> suggestions;  ///< other texts for the whole value
  bool bare = false;                     ///< only the unit is missing
};

/// An attribute that the element does not have.
struct Unknown {
  std::string element, attribute, raw;
  int line = 0;
};

/// What reading has found, before the rules across fields are applied.
struct TroughText {
  models::TroughDesign design;
  Lines lines;
  std::map<std::string, std::string> raw;  ///< "element/attribute" -> text as written
  std::vector<Unread> unread;
  std::vector<Unknown> unknown;
  std::vector<Message> messages;  ///< about elements
};

TroughText read_trough(const XmlElement& root, const std::string& file);

/// Puts `text` into the field; empty problem = done.
Unread set_field(const models::Element& element, const models::Field& field, const std::string& text,
                 models::TroughDesign& design);

/// Last word of an element path: "posts" of "receiver/posts".
std::string leaf(const std::string& path);

}  // namespace focalframe::cli
