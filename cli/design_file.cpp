#include "cli/design_file.h"

#include <algorithm>
#include <filesystem>

#include "cli/combination_file.h"
#include "cli/nearest.h"
#include "cli/read_file.h"
#include "cli/trough_messages.h"
#include "cli/trough_reader.h"

namespace focalframe::cli {
namespace {

const std::vector<std::string> kinds{"trough", "dish", "frame"};

Message& say(DesignFile& design, int line, std::string head, std::string text) {
  Message m;
  m.file = design.path;
  m.line = line;
  m.head = std::move(head);
  m.text = std::move(text);
  design.messages.push_back(std::move(m));
  return design.messages.back();
}

bool read_kind(DesignFile& design, const XmlElement& root) {
  const XmlAttribute* kind = root.find("kind");
  if (!kind) {
    say(design, root.line, "collector without kind",
        "The kind decides what is read: trough and dish (built from their parts) or frame (nodes and "
        "members).")
        .advice = "Add one of: kind=\"trough\" | kind=\"dish\" | kind=\"frame\"";
    return false;
  }
  if (std::find(kinds.begin(), kinds.end(), kind->value) == kinds.end()) {
    Message& m = say(design, kind->line, "collector kind=\"" + kind->value + "\"",
                     "The kinds read here are " + joined_or(kinds) + ".");
    if (const std::string near = nearest_name(kind->value, kinds); !near.empty())
      m.likely = "kind=\"" + near + "\"";
    return false;
  }
  design.kind = kind->value;
  return true;
}

void read_root_attributes(DesignFile& design, const XmlElement& root) {
  const std::vector<std::string> known{"name", "kind", "format"};
  for (const XmlAttribute& a : root.attributes) {
    if (a.name.starts_with("xmlns") || a.name.starts_with("xsi:")) continue;
    if (a.name == "format" && a.value != "1")
      say(design, a.line, "collector format=\"" + a.value + "\"", "The format read here is 1.").likely =
          "format=\"1\"";
    if (std::find(known.begin(), known.end(), a.name) != known.end()) continue;
    Message& m = say(design, a.line, "collector " + a.name + "=\"" + a.value + "\"",
                     "<collector> has no \"" + a.name + "\". It knows: " + joined(known) + ".");
    if (const std::string near = nearest_name(a.name, known); !near.empty() && !root.find(near))
      m.likely = near + "=\"" + a.value + "\"";
  }
  if (const XmlAttribute* name = root.find("name")) design.name = name->value;
}

}  // namespace

DesignFile read_design_text(const std::string& text, const std::string& path) {
  DesignFile design;
  design.path = path;
  design.text = text;
  design.name = std::filesystem::path(path).stem().string();
  XmlFile xml = parse_xml(text, path);
  design.messages = std::move(xml.messages);
  if (has_stop(design.messages)) return design;
  const XmlElement& root = xml.root;
  if (root.name != "collector") {
    Message& m =
        say(design, root.line, "<" + root.name + ">", "A design's outermost element is <collector>.");
    if (!nearest_name(root.name, {"collector"}).empty()) m.likely = "<collector>";
    return design;
  }
  if (read_kind(design, root)) {
    read_root_attributes(design, root);
    if (design.kind == "trough") {
      TroughText read = read_trough(root, path);
      read.design.name = design.name;
      for (Message& m : trough_messages(read, path)) design.messages.push_back(std::move(m));
      design.trough = std::move(read.design);
      design.lines = std::move(read.lines);
      const auto strength = design.lines.find("limits/strength");
      resolve_combinations(design.trough, path, strength == design.lines.end() ? 0 : strength->second,
                           design.messages);
    }
    design.root = std::move(xml.root);
  }
  sort_by_line(design.messages);
  return design;
}

DesignFile read_design(const std::string& path) {
  FileText file = read_file(path, "design");
  if (file.ok) return read_design_text(file.text, path);
  DesignFile design;
  design.path = path;
  design.messages.push_back(std::move(file.message));
  return design;
}

}  // namespace focalframe::cli
