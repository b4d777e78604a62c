#include <Eigen/Geometry>
#include <algorithm>
#include <cmath>

#include "cli/frame_reader.h"
#include "cli/frame_section.h"
#include "cli/nearest.h"
#include "cli/quantity.h"
#include "fem/beam.h"
#include "fem/units.h"

namespace focalframe::cli {

fem::Vec3 FrameReader::place(const FrameElementReader& element) {
  return {element.number("x").value_or(0), element.number("y").value_or(0), element.number("z").value_or(0)};
}

void FrameReader::read_material(const FrameElementReader& element) {
  fem::Material material;
  material.name = element.text("id");
  enter_id(element, materials_, static_cast<int>(out_.frame.materials.size()));
  material.E = positive(element, "E").value_or(1);
  const bool own_G = element.has("G");
  material.G = own_G ? positive(element, "G").value_or(1) : material.E / 2.6;
  if (!own_G) element.say("", "G is not given: E / 2.6 is used (Poisson's ratio 0.3).", Level::note);
  if (element.has("density")) material.density = positive(element, "density", true).value_or(0);
  if (element.has("expansion")) material.expansion = element.number("expansion").value_or(0);
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

void FrameReader::read_section(const FrameElementReader& element) {
  enter_id(element, sections_, static_cast<int>(out_.frame.sections.size()));
  FrameSection read = frame_section(element);
  out_.frame.sections.push_back(std::move(read.section));
  tilts_.push_back(read.tilt);
}

void FrameReader::read_node(const FrameElementReader& element) {
  enter_id(element, nodes_, static_cast<int>(out_.frame.nodes.size()));
  out_.frame.nodes.push_back({place(element), element.text("id")});
  out_.node_line.push_back(element.line());
}

// `up` of an angle points along its leg; the member's axes are the principal ones.
void FrameReader::turn_to_principal_axes(fem::Member& member) const {
  if (member.section < 0 || member.from < 0 || member.to < 0) return;
  const double tilt = tilts_[static_cast<std::size_t>(member.section)];
  if (tilt == 0) return;
  const fem::Vec3 x = (out_.frame.nodes[static_cast<std::size_t>(member.to)].at + member.offset_to -
                       out_.frame.nodes[static_cast<std::size_t>(member.from)].at - member.offset_from)
                          .normalized();
  const fem::Vec3 upright = member.up - x.dot(member.up) * x;
  if (!(upright.norm() > 1e-9 * member.up.norm())) return;  // said by the check of the whole
  const fem::Vec3 leg_z = upright.normalized(), leg_y = leg_z.cross(x);
  member.up = std::cos(tilt) * leg_z - std::sin(tilt) * leg_y;
}

void FrameReader::read_member(const FrameElementReader& element) {
  enter_id(element, members_, static_cast<int>(out_.frame.members.size()));
  fem::Member member;
  member.name = element.text("id");
  member.group = element.text("group");
  member.from = find_id(element, "from", nodes_, "node");
  member.to = find_id(element, "to", nodes_, "node");
  member.section = find_id(element, "section", sections_, "section");
  member.material = find_id(element, "material", materials_, "material");
  if (const auto up = element.direction("up")) member.up = *up;
  member.release_from = element.freedoms("release-from");
  member.release_to = element.freedoms("release-to");
  if (member.from >= 0 && member.from == member.to) element.say("to", "A member needs two different nodes.");
  for (std::size_t i : {0u, 1u, 2u, 3u})
    if (member.release_from[i] && member.release_to[i])
      element.say("release-to",
                  freedom_words()[i] + " is let go at both ends, so the member would slide or spin freely.");
  out_.frame.members.push_back(member);
  out_.member_line.push_back(element.line());
}

fem::Member* FrameReader::find_end(const FrameElementReader& element, bool& at_from) {
  const int member = find_id(element, "member", members_, "member");
  const std::string end = element.word("end", {"from", "to"});
  if (member < 0 || end.empty()) return nullptr;
  const std::string key = element.name() + " " + end + "/" + element.text("member");
  if (const auto [at, fresh] = lines_.insert({key, element.line()}); !fresh) {
    element.say("end", "This end has its <" + element.name() + "> already, in line " +
                           std::to_string(at->second) + ".");
    return nullptr;
  }
  at_from = end == "from";
  return &out_.frame.members[static_cast<std::size_t>(member)];
}

void FrameReader::read_offset(const FrameElementReader& element) {
  bool at_from = false;
  fem::Member* member = find_end(element, at_from);
  const fem::Vec3 arm = place(element);
  if (!element.has("x") && !element.has("y") && !element.has("z"))
    element.say("", "An offset needs at least one of: x y z.");
  if (member) (at_from ? member->offset_from : member->offset_to) = arm;
}

void FrameReader::read_end_spring(const FrameElementReader& element) {
  bool at_from = false;
  fem::Member* member = find_end(element, at_from);
  bool any = false;
  for (std::size_t i = 0; i < 6; ++i) {
    const std::string& word = freedom_words()[i];
    if (!element.has(word)) continue;
    any = true;
    const auto value = positive(element, word);
    if (!value || std::isinf(*value) || !member) continue;
    (at_from ? member->spring_from : member->spring_to)[i] = *value;
    if ((at_from ? member->release_from : member->release_to)[i])
      element.say(word,
                  "The member lets this freedom go at this end, so no spring can act in it. Leave "
                  "one of the two out.");
  }
  if (!any) element.say("", "An end spring needs at least one of: " + joined(freedom_words()) + ".");
}

void FrameReader::read_joint(const FrameElementReader& element) {
  enter_id(element, joints_, static_cast<int>(out_.frame.joints.size()));
  fem::Joint joint;
  joint.name = element.text("id");
  joint.node = find_id(element, "node", nodes_, "node");
  joint.other = find_id(element, "other", nodes_, "node");
  joint.held = element.freedoms("hold");
  joint.axes = element.axes();
  if (joint.node >= 0 && joint.node == joint.other)
    element.say("other", "A joint needs two different nodes in one place.");
  if (joint.held == fem::Six{} && element.has("hold"))
    element.say("hold", "This joint holds nothing: its two nodes would not be connected.");
  if (joint.held == fem::Six{true, true, true, true, true, true})
    element.say("hold", "This joint holds everything: one node would do.", Level::note);
  out_.frame.joints.push_back(joint);
  out_.joint_line.push_back(element.line());
}

void FrameReader::read_support(const FrameElementReader& element) {
  fem::Support support;
  support.node = find_id(element, "node", nodes_, "node");
  support.fix = element.freedoms("fix");
  if (element.has("fix") && element.text("fix").find_first_not_of(" ") == std::string::npos)
    element.say("fix", "This support holds nothing.", Level::warn);
  const fem::Mat3 axes = element.axes();
  if (axes == fem::Mat3::Identity() || support.node < 0) {
    out_.frame.supports.push_back(support);
    return;
  }
  // A turned support is exact too: a joint to a ground node in the same place.
  const int node = support.node;
  if (const auto [at, fresh] = own_ground_.insert({node, static_cast<int>(out_.frame.nodes.size())});
      !fresh) {
    element.say("", "This node has a support with its own axes already; name all held freedoms there.");
    return;
  }
  const fem::Node& held = out_.frame.nodes[static_cast<std::size_t>(node)];
  const fem::Node ground{held.at, "ground of " + held.name};
  out_.frame.joints.push_back({own_ground_[node], node, support.fix, axes, "support of " + held.name});
  out_.joint_line.push_back(element.line());
  out_.frame.nodes.push_back(ground);
  out_.node_line.push_back(element.line());
  out_.frame.supports.push_back({own_ground_[node], {true, true, true, true, true, true}});
}

void FrameReader::read_spring(const FrameElementReader& element) {
  if (element.has("id")) enter_id(element, springs_, static_cast<int>(out_.frame.springs.size()));
  fem::Spring spring;
  fem::Support rigid;
  spring.node = rigid.node = find_id(element, "node", nodes_, "node");
  if (element.has("other")) spring.other = find_id(element, "other", nodes_, "node");
  spring.axes = element.axes();
  if (element.has("other") && spring.other == spring.node && spring.node >= 0)
    element.say("other", "A spring between two nodes needs two different ones.");
  bool any = false;
  for (int i = 0; i < 6; ++i) {
    const std::string& word = freedom_words()[static_cast<std::size_t>(i)];
    const auto value = positive(element, word, true);
    any = any || element.has(word);
    const bool is_rigid = value && std::isinf(*value);
    if (is_rigid && (element.has("other") || element.has("x-axis")))
      element.say(word, element.has("other")
                            ? "A rigid connection of two nodes is a <joint>, which is exact."
                            : "A rigid hold in own axes is a <support> with x-axis, which is exact.");
    else if (is_rigid)
      rigid.fix[static_cast<std::size_t>(i)] = true;
    else
      spring.stiffness[i] = value.value_or(0);
  }
  if (!any) element.say("", "A spring needs at least one of: " + joined(freedom_words()) + ".");
  spring.name = element.has("id") ? element.text("id") : "spring at node " + element.text("node");
  out_.frame.springs.push_back(spring);
  if (rigid.fix != fem::Six{}) out_.frame.supports.push_back(rigid);
}

void FrameReader::read_mass(const FrameElementReader& element) {
  if (element.has("id")) enter_id(element, masses_, static_cast<int>(out_.frame.masses.size()));
  fem::PointMass mass;
  mass.node = find_id(element, "node", nodes_, "node");
  mass.mass = positive(element, "value", true).value_or(0);
  mass.offset = place(element);
  mass.group = element.text("group");
  mass.name = element.has("id") ? element.text("id") : "mass at node " + element.text("node");
  const char* axes[] = {"x", "y", "z"};
  for (int i = 0; i < 3; ++i)
    for (int j = i; j < 3; ++j) {
      const std::string word = std::string("I") + axes[i] + axes[j];
      mass.inertia(i, j) = mass.inertia(j, i) =
          i == j ? positive(element, word, true).value_or(0) : element.number(word).value_or(0);
    }
  // A body's moments of inertia obey the triangle inequality in its principal axes.
  const fem::Vec3 d = mass.inertia.diagonal();
  if (d.sum() - 2 * d.maxCoeff() < -1e-9 * d.sum())
    element.say("", "No body has these moments of inertia: none can exceed the sum of the other two.",
                Level::warn);
  out_.frame.masses.push_back(mass);
}

}  // namespace focalframe::cli
