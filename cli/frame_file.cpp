#include "cli/frame_file.h"

#include <algorithm>
#include <cmath>
#include <map>
#include <set>
#include <stdexcept>

#include "cli/frame_element.h"
#include "cli/frame_section.h"
#include "cli/nearest.h"
#include "cli/quantity.h"
#include "fem/units.h"

namespace focalframe::cli {
namespace {

using Ids = std::map<std::string, int>;

class FrameReader {
 public:
  explicit FrameReader(const DesignFile& design) : file_(design.path) {}

  FrameFile run(const XmlElement& root) {
    const XmlElement* frame = find_frame(root);
    if (frame) {
      // Definitions first: elements may come in any order.
      for (const char* kind : {"material", "section", "node", "member", "support", "spring", "mass"})
        for (const XmlElement& xml : frame->children)
          if (xml.name == kind) read(xml);
      for (const XmlElement& xml : frame->children)
        if (xml.name == "load" || xml.name == "member-load" || xml.name == "gravity") read(xml);
      for (const XmlElement& xml : frame->children)
        if (!find_frame_element(xml.name)) unknown(xml);
      if (!has_stop(out_.messages)) check_whole();
    }
    sort_by_line(out_.messages);
    return std::move(out_);
  }

 private:
  Message& say(int line, std::string head, std::string text, Level level = Level::stop) {
    Message m;
    m.level = level;
    m.file = file_;
    m.line = line;
    m.head = std::move(head);
    m.text = std::move(text);
    out_.messages.push_back(std::move(m));
    return out_.messages.back();
  }

  const XmlElement* find_frame(const XmlElement& root) {
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

  void unknown(const XmlElement& xml) {
    std::vector<std::string> known;
    for (const FrameElement& e : frame_elements()) known.push_back(e.name);
    const std::string near = nearest_name(xml.name, known);
    say(xml.line, "<" + xml.name + ">", "<frame> has no <" + xml.name + ">. It knows: " + joined(known) + ".")
        .likely = near.empty() ? "" : "<" + near + ">";
  }

  void read(const XmlElement& xml) {
    const FrameElementReader element(xml, *find_frame_element(xml.name), file_, out_.messages);
    if (xml.name == "material") read_material(element);
    if (xml.name == "section") read_section(element);
    if (xml.name == "node") read_node(element);
    if (xml.name == "member") read_member(element);
    if (xml.name == "support") read_support(element);
    if (xml.name == "spring") read_spring(element);
    if (xml.name == "mass") read_mass(element);
    if (xml.name == "load") read_load(element);
    if (xml.name == "member-load") read_member_load(element);
    if (xml.name == "gravity") read_gravity(element);
  }

  // Ids are registered even when the rest of their element is in trouble, so that one fault gives one
  // message.
  void enter_id(const FrameElementReader& element, Ids& ids, int index) {
    if (!element.has("id")) return;
    const std::string id = element.text("id");
    const auto [at, fresh] = ids.insert({id, index});
    if (id.find_first_not_of(" \t\n") == std::string::npos)
      element.say("id", "An id is a name or a number.");
    else if (!fresh)
      element.say("id", "Another " + element.name() + " has this id already, in line " +
                            std::to_string(lines_[element.name() + "/" + id]) + ". Ids tell " +
                            element.name() + "s apart.");
    if (fresh) lines_[element.name() + "/" + id] = element.line();
  }

  // Index of the thing `attribute` names; -1 when it is missing or not known.
  int find_id(const FrameElementReader& element, const std::string& attribute, const Ids& ids,
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

  void read_material(const FrameElementReader& element) {
    fem::Material material;
    material.name = element.text("id");
    enter_id(element, materials_, static_cast<int>(out_.frame.materials.size()));
    material.E = positive(element, "E").value_or(1);
    const bool own_G = element.has("G");
    material.G = own_G ? positive(element, "G").value_or(1) : material.E / 2.6;
    if (!own_G) element.say("", "G is not given: E / 2.6 is used (Poisson's ratio 0.3).", Level::note);
    if (element.has("density")) material.density = positive(element, "density", true).value_or(0);
    if (element.has("yield")) material.yield = positive(element, "yield").value_or(0);
    if (own_G && !(material.G <= material.E))
      element.say("G", "A shear modulus is less than the Young's modulus, usually E / 2.6.");
    warn_outside(element, "E", material.E, 1 * GPa, 300 * GPa,
                 "Materials of frames lie between 1 and 300 GPa.");
    if (element.has("yield"))
      warn_outside(element, "yield", material.yield, 5 * MPa, 2 * GPa,
                   "Yield stresses lie between 5 and 2000 MPa.");
    if (material.density > 0)
      warn_outside(element, "density", material.density, 100, 20000,
                   "Densities lie between 100 and 20000 kg/m3.");
    out_.frame.materials.push_back(material);
  }

  std::optional<double> positive(const FrameElementReader& element, const std::string& attribute,
                                 bool zero = false) {
    const auto value = element.number(attribute);
    if (value && (*value < 0 || (*value == 0 && !zero))) {
      element.say(attribute, std::string("This must be ") + (zero ? "0 or more." : "more than 0."));
      return std::nullopt;
    }
    return value;
  }

  // A value that is possible but far from any real one is most often a slip of units.
  void warn_outside(const FrameElementReader& element, const std::string& attribute, double value,
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

  void read_section(const FrameElementReader& element) {
    enter_id(element, sections_, static_cast<int>(out_.frame.sections.size()));
    out_.frame.sections.push_back(frame_section(element));
  }

  void read_node(const FrameElementReader& element) {
    enter_id(element, nodes_, static_cast<int>(out_.frame.nodes.size()));
    fem::Node node;
    node.name = element.text("id");
    const char* axes[] = {"x", "y", "z"};
    for (int i = 0; i < 3; ++i) node.at[i] = element.number(axes[i]).value_or(0);
    out_.frame.nodes.push_back(node);
    out_.node_line.push_back(element.line());
  }

  void read_member(const FrameElementReader& element) {
    enter_id(element, members_, static_cast<int>(out_.frame.members.size()));
    fem::Member member;
    member.name = element.text("id");
    member.from = find_id(element, "from", nodes_, "node");
    member.to = find_id(element, "to", nodes_, "node");
    member.section = find_id(element, "section", sections_, "section");
    member.material = find_id(element, "material", materials_, "material");
    if (const auto up = element.direction("up")) member.up = *up;
    member.release_from = element.freedoms("release-from");
    member.release_to = element.freedoms("release-to");
    if (member.from >= 0 && member.from == member.to)
      element.say("to", "A member needs two different nodes.");
    for (std::size_t i : {0u, 1u, 2u, 3u})
      if (member.release_from[i] && member.release_to[i])
        element.say("release-to", freedom_words()[i] +
                                      " is let go at both ends, so the member would slide or spin freely.");
    out_.frame.members.push_back(member);
    out_.member_line.push_back(element.line());
  }

  void read_support(const FrameElementReader& element) {
    fem::Support support;
    support.node = find_id(element, "node", nodes_, "node");
    support.fix = element.freedoms("fix");
    if (element.has("fix") && element.text("fix").find_first_not_of(" ") == std::string::npos)
      element.say("fix", "This support holds nothing.", Level::warn);
    out_.frame.supports.push_back(support);
  }

  void read_spring(const FrameElementReader& element) {
    fem::Spring spring;
    fem::Support rigid;
    spring.node = rigid.node = find_id(element, "node", nodes_, "node");
    bool any = false;
    for (int i = 0; i < 6; ++i) {
      const std::string& word = freedom_words()[static_cast<std::size_t>(i)];
      const auto value = positive(element, word, true);
      any = any || element.has(word);
      if (value && std::isinf(*value))
        rigid.fix[static_cast<std::size_t>(i)] = true;
      else
        spring.stiffness[i] = value.value_or(0);
    }
    if (!any) element.say("", "A spring needs at least one of: " + joined(freedom_words()) + ".");
    spring.name = "spring at node " + element.text("node");
    out_.frame.springs.push_back(spring);
    if (rigid.fix != fem::Six{}) out_.frame.supports.push_back(rigid);
  }

  void read_mass(const FrameElementReader& element) {
    fem::PointMass mass;
    mass.node = find_id(element, "node", nodes_, "node");
    mass.mass = positive(element, "value", true).value_or(0);
    mass.name = "mass at node " + element.text("node");
    out_.frame.masses.push_back(mass);
  }

  fem::LoadCase& load_case(const std::string& name) {
    for (fem::LoadCase& load : out_.cases)
      if (load.name == name) return load;
    out_.cases.emplace_back().name = name;
    return out_.cases.back();
  }

  void read_load(const FrameElementReader& element) {
    fem::NodeLoad load;
    load.node = find_id(element, "node", nodes_, "node");
    const char* words[] = {"fx", "fy", "fz", "mx", "my", "mz"};
    bool any = false;
    for (int i = 0; i < 6; ++i) {
      const double value = element.number(words[i]).value_or(0);
      any = any || element.has(words[i]);
      (i < 3 ? load.force : load.moment)[i % 3] = value;
    }
    if (!any) element.say("", "A load needs at least one of: fx fy fz mx my mz.");
    load_case(element.text("case")).nodes.push_back(load);
  }

  void read_member_load(const FrameElementReader& element) {
    fem::LineLoad load;
    load.member = find_id(element, "member", members_, "member");
    const char* words[] = {"fx", "fy", "fz"};
    bool any = false;
    for (int i = 0; i < 3; ++i) {
      load.at_from[i] = load.at_to[i] = element.number(words[i]).value_or(0);
      any = any || element.has(words[i]);
    }
    if (!any) element.say("", "A load needs at least one of: fx fy fz.");
    load_case(element.text("case")).lines.push_back(load);
  }

  void read_gravity(const FrameElementReader& element) {
    const double value = element.number("value").value_or(0);
    if (std::abs(value) > 0 && (std::abs(value) < 0.5 || std::abs(value) > 100))
      warn_outside(element, "value", std::abs(value), 0.5, 100, "On the ground this is 9.80665 m/s2.");
    if (const auto direction = element.direction("direction"))
      load_case(element.text("case")).gravity += value * direction->normalized();
    gravity_line_ = element.line();
  }

  void check_whole() {
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
          fault.member >= 0
              ? "member id=\"" + frame.members[static_cast<std::size_t>(fault.member)].name + "\""
          : fault.node >= 0 ? "node id=\"" + frame.nodes[static_cast<std::size_t>(fault.node)].name + "\""
                            : "the frame cannot be built";
      Message& m = say(line, head, sentence(fault.what));
      if (fault.what.find("up is parallel") != std::string::npos)
        m.advice = "Give it another: up=\"1 0 0\" or up=\"0 1 0\", whichever is not along the member";
    }
    const bool held = std::any_of(frame.supports.begin(), frame.supports.end(),
                                  [](const fem::Support& s) { return s.fix != fem::Six{}; }) ||
                      std::any_of(frame.springs.begin(), frame.springs.end(),
                                  [](const fem::Spring& s) { return s.stiffness.norm() > 0; });
    if (!held) {
      Message& m =
          say(0, "nothing holds the frame",
              "There is no support and no spring to the ground, so the whole frame can move freely.");
      m.advice = "Add <support node=\"...\" fix=\"ux uy uz rx ry rz\"/>";
      m.no_solution = true;
    }
    check_mass();
  }

  static std::string sentence(const std::string& text) {
    std::string result = text;
    if (!result.empty()) result[0] = static_cast<char>(std::toupper(static_cast<unsigned char>(result[0])));
    return result + ".";
  }

  void check_mass() {
    std::set<std::string> without;
    for (const fem::Member& m : out_.frame.members) {
      const fem::Material& material = out_.frame.materials[static_cast<std::size_t>(m.material)];
      if (material.density > 0)
        out_.has_mass = true;
      else
        without.insert(material.name);
    }
    for (const fem::PointMass& m : out_.frame.masses) out_.has_mass = out_.has_mass || m.mass > 0;
    for (const std::string& name : without)
      say(lines_["material/" + name], "material id=\"" + name + "\"",
          std::string("No density is given, so its members have no mass") +
              (gravity_line_ > 0 ? " and no weight, though gravity acts." : "."),
          gravity_line_ > 0 ? Level::warn : Level::note);
  }

  const std::string& file_;
  FrameFile out_;
  Ids materials_, sections_, nodes_, members_;
  std::map<std::string, int> lines_;
  int gravity_line_ = 0;
};

}  // namespace

FrameFile read_frame(const DesignFile& design) { return FrameReader(design).run(design.root); }

}  // namespace focalframe::cli
