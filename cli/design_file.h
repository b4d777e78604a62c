#pragma once

/// Reads a design file. Everything wrong with it is said at once, each with its line and, where a fix would
/// pass, the fix.

#include <map>
#include <string>
#include <vector>

#include "cli/messages.h"
#include "cli/xml.h"
#include "models/design.h"

namespace focalframe::cli {

/// "receiver/posts/side" -> line of the attribute, "receiver/posts" -> line of the element.
using Lines = std::map<std::string, int>;

struct DesignFile {
  std::string path;
  std::string text;  ///< as read, line ends as \n; what a hash of the input is made from
  std::string name;  ///< of the collector; the file's name when it gives none
  std::string kind;  ///< "trough" | "frame"; empty = not even that could be read
  XmlElement root;   ///< kind "frame": what cli/frame_file.h reads on
  models::TroughDesign trough;
  Lines lines;
  std::vector<Message> messages;  ///< sorted by line

  bool sound() const { return !has_stop(messages); }
};

DesignFile read_design(const std::string& path);
/// The same from text already in memory.
DesignFile read_design_text(const std::string& text, const std::string& path);

}  // namespace focalframe::cli
