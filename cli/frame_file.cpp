#include "cli/frame_file.h"

#include <algorithm>
#include <cctype>
#include <set>

#include "cli/frame_reader.h"
#include "cli/nearest.h"
#include "cli/quantity.h"

namespace focalframe::cli {

FrameFile FrameReader::run(const XmlElement& root) {
  if (const XmlElement* frame = find_frame(root)) {
    // Definitions first: elements may come in any order.
    for (const char* kind : {"material", "section", "node", "member", "offset", "end-spring", "joint",
                             "support", "spring", "mass"})
      for (const XmlElement& xml : frame->children)
        if (xml.name == kind) read(xml);
    for (fem::Member& member : out_.frame.members) turn_to_principal_axes(member);
    const std::set<std::string> loads{"load",        "member-load",      "point-load",
                                      "temperature", "support-movement", "gravity"};
    for (const XmlElement& xml : frame->children)
      if (loads.count(xml.name)) read(xml);
    for (const XmlElement& xml : frame->children)
      if (!find_frame_element(xml.name)) unknown(xml);
    if (!has_stop(out_.messages)) check_whole();
  }
  sort_by_line(out_.messages);
  return std::move(out_);
}

Message& FrameReader::say(int line, std::string head, std::string text, Level level) {
  Message m;
  m.level = level;
  m.file = file_;
  m.line = line;
  m.head = std::move(head);
  m.text = std::move(text);
  out_.messages.push_back(std::move(m));
  return out_.messages.back();
}

const XmlElement* FrameReader::find_frame(const XmlElement& root) {
  const std::vector<std::string> shared{"site", "wind", "operation", "optics", "limits", "accept"};
  const XmlElement* frame = nullptr;
  for (const XmlElement& child : root.children) {
    if (child.name == "frame" && !frame)
      frame = &child;
    else if (child.name == "frame")
      say(child.line, "<frame>", "A second <frame>; only one of them can count.").advice =
          "Move its elements into the first";
    else if (std::find(shared.begin(), shared.end(), child.name) != shared.end())
      say(child.line, "<" + child.name + ">", "Not used: a frame without a mirror is not judged by it.",
          Level::note);
    else
      say(child.line, "<" + child.name + ">",
          "A design of kind=\"frame\" has one element here: <frame>." +
              std::string(find_frame_element(child.name) ? " This one belongs inside it." : ""))
          .likely = nearest_name(child.name, {"frame"}).empty() ? "" : "<frame>";
  }
  if (!frame && !has_stop(out_.messages))
    say(root.line, "collector without <frame>",
        "A design of kind=\"frame\" holds its nodes and members in <frame> ... </frame>.");
  return frame;
}

void FrameReader::unknown(const XmlElement& xml) {
  std::vector<std::string> known;
  for (const FrameElement& e : frame_elements()) known.push_back(e.name);
  const std::string near = nearest_name(xml.name, known);
  say(xml.line, "<" + xml.name + ">", "<frame> has no <" + xml.name + ">. It knows: " + joined(known) + ".")
      .likely = near.empty() ? "" : "<" + near + ">";
}

void FrameReader::read(const XmlElement& xml) {
  static const std::map<std::string, void (FrameReader::*)(const FrameElementReader&)> readers{
      {"material", &FrameReader::read_material},
      {"section", &FrameReader::read_section},
      {"node", &FrameReader::read_node},
      {"member", &FrameReader::read_member},
      {"offset", &FrameReader::read_offset},
      {"end-spring", &FrameReader::read_end_spring},
      {"joint", &FrameReader::read_joint},
      {"support", &FrameReader::read_support},
      {"spring", &FrameReader::read_spring},
      {"mass", &FrameReader::read_mass},
      {"load", &FrameReader::read_load},
      {"member-load", &FrameReader::read_member_load},
      {"point-load", &FrameReader::read_point_load},
      {"temperature", &FrameReader::read_temperature},
      {"support-movement", &FrameReader::read_support_movement},
      {"gravity", &FrameReader::read_gravity}};
  (this->*readers.at(xml.name))(FrameElementReader(xml, *find_frame_element(xml.name), file_, out_.messages));
}

// Ids are registered even when the rest of their element is in trouble, so that one fault gives one
// message.
void FrameReader::enter_id(const FrameElementReader& element, Ids& ids, int index) {
  if (!element.has("id")) return;
  const std::string id = element.text("id");
  const auto [at, fresh] = ids.insert({id, index});
  if (id.find_first_not_of(" \t\n") == std::string::npos)
    element.say("id", "An id is a name or a number.");
  else if (!fresh)
    element.say("id", "Another " + element.name() + " has this id already, in line " +
                          std::to_string(lines_[element.name() + "/" + id]) + ". Ids tell " + element.name() +
                          "s apart.");
  if (fresh) lines_[element.name() + "/" + id] = element.line();
}

// Index of the thing `attribute` names; -1 when it is missing or not known.
int FrameReader::find_id(const FrameElementReader& element, const std::string& attribute, const Ids& ids,
                         const std::string& what) {
  if (!element.has(attribute)) return -1;
  const std::string id = element.text(attribute);
  if (const auto at = ids.find(id); at != ids.end()) return at->second;
  std::vector<std::string> known;
  for (const auto& [name, index] : ids) known.push_back(name);
  Message& m =
      element.say(attribute, "There is no " + what + " with this id." +
                                 (known.empty()        ? std::string(" No ") + what + " is there at all."
                                  : known.size() <= 12 ? " The " + what + "s are: " + joined(known) + "."
                                                       : ""));
  if (const std::string near = nearest_name(id, known); !near.empty())
    m.likely = attribute + "=\"" + near + "\"";
  return -1;
}

std::optional<double> FrameReader::positive(const FrameElementReader& element, const std::string& attribute,
                                            bool zero) {
  const auto value = element.number(attribute);
  if (value && (*value < 0 || (*value == 0 && !zero))) {
    element.say(attribute, std::string("This must be ") + (zero ? "0 or more." : "more than 0."));
    return std::nullopt;
  }
  return value;
}

// A value that is possible but far from any real one is most often a slip of units.
void FrameReader::warn_outside(const FrameElementReader& element, const std::string& attribute, double value,
                               double least, double most, const std::string& usual) {
  if (value >= least && value <= most) return;
  const FrameElement& words = *find_frame_element(element.name());
  const auto word = std::find_if(words.attributes.begin(), words.attributes.end(),
                                 [&](const FrameWord& w) { return w.name == attribute; });
  if (!element.has(attribute) || !parse_quantity(element.text(attribute), word->quantity).ok()) return;
  Message& m =
      element.say(attribute, usual + " Found " + quantity_text(value, word->quantity) + ".", Level::warn);
  const auto [number, unit] = split_number(element.text(attribute));
  for (const std::string& other : common_units(word->quantity)) {
    const ParsedQuantity parsed = parse_quantity(number + " " + other, word->quantity);
    if (m.likely.empty() && parsed.ok() && parsed.value >= least && parsed.value <= most)
      m.likely = attribute + "=\"" + number + " " + other + "\"";
  }
}

void FrameReader::check_whole() {
  fem::Frame& frame = out_.frame;
  if (frame.members.empty()) {
    say(0, "the frame has no members", "A frame needs nodes and at least one member between them.");
    return;
  }
  for (const fem::FrameFault& fault : fem::find_faults(frame)) {
    const int line = fault.member >= 0 ? out_.member_line[static_cast<std::size_t>(fault.member)]
                     : fault.node >= 0 ? out_.node_line[static_cast<std::size_t>(fault.node)]
                                       : 0;
    const std::string head =
        fault.member >= 0 ? "member id=\"" + frame.members[static_cast<std::size_t>(fault.member)].name + "\""
        : fault.node >= 0 ? "node id=\"" + frame.nodes[static_cast<std::size_t>(fault.node)].name + "\""
                          : "the frame cannot be built";
    Message& m = say(line, head, sentence(fault.what));
    if (fault.what.find("up is parallel") != std::string::npos)
      m.advice = "Give it another: up=\"1 0 0\" or up=\"0 1 0\", whichever is not along the member";
  }
  const bool held = std::any_of(frame.supports.begin(), frame.supports.end(),
                                [](const fem::Support& s) { return s.fix != fem::Six{}; }) ||
                    std::any_of(frame.springs.begin(), frame.springs.end(),
                                [](const fem::Spring& s) { return s.other < 0 && s.stiffness.norm() > 0; });
  if (!held) {
    Message& m = say(0, "nothing holds the frame",
                     "There is no support and no spring to the ground, so the whole frame can move freely.");
    m.advice = "Add <support node=\"...\" fix=\"ux uy uz rx ry rz\"/>";
    m.no_solution = true;
  }
  check_mass();
}

std::string FrameReader::sentence(const std::string& text) {
  std::string result = text;
  if (!result.empty()) result[0] = static_cast<char>(std::toupper(static_cast<unsigned char>(result[0])));
  return result + ".";
}

void FrameReader::check_mass() {
  std::set<std::string> without;
  for (const fem::Member& m : out_.frame.members) {
    const fem::Material& material = out_.frame.materials[static_cast<std::size_t>(m.material)];
    if (material.density > 0)
      out_.has_mass = true;
    else
      without.insert(material.name);
  }
  for (const fem::PointMass& m : out_.frame.masses)
    out_.has_mass = out_.has_mass || m.mass > 0 || !m.inertia.isZero(0);
  for (const std::string& name : without)
    say(lines_["material/" + name], "material id=\"" + name + "\"",
        std::string("No density is given, so its members have no mass") +
            (gravity_line_ > 0 ? " and no weight, though gravity acts." : "."),
        gravity_line_ > 0 ? Level::warn : Level::note);
}

FrameFile read_frame(const DesignFile& design) { return FrameReader(design).run(design.root); }

}  // namespace focalframe::cli
