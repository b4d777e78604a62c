#include "cli/frame_words.h"

#include <algorithm>

namespace focalframe::cli {

using Q = models::Quantity;

const std::vector<FrameElement>& frame_elements() {
  static const std::vector<FrameElement> all{
      {"material",
       {{"id", Q::none, true, "name members use"},
        {"E", Q::pressure, true, "Young's modulus"},
        {"G", Q::pressure, false, "shear modulus; E / 2.6 when left out"},
        {"density", Q::density, false, "no mass when left out"},
        {"yield", Q::pressure, false, "stresses are compared with it"}},
       "what members are made of"},
      {"section",
       {{"id", Q::none, true, "name members use"},
        {"shape", Q::none, true, "round-tube, square-tube, rectangular-tube, round-bar, flat or properties"},
        {"outside-diameter", Q::length, false, "round-tube, round-bar"},
        {"side", Q::length, false, "square-tube"},
        {"depth", Q::length, false, "rectangular-tube, flat: size along member z"},
        {"width", Q::length, false, "rectangular-tube: size along member y"},
        {"wall", Q::length, false, "tubes"},
        {"thickness", Q::length, false, "flat: size along member y"},
        {"area", Q::area, false, "properties"},
        {"Iy", Q::area_moment, false, "properties: bending about member y"},
        {"Iz", Q::area_moment, false, "properties: bending about member z"},
        {"J", Q::area_moment, false, "properties: torsion constant"},
        {"shear-area-y", Q::area, false, "properties: left out = no shear flexibility"},
        {"shear-area-z", Q::area, false, "properties: left out = no shear flexibility"},
        {"Wy", Q::section_modulus, false, "properties: for stresses"},
        {"Wz", Q::section_modulus, false, "properties: for stresses"}},
       "cross-section of members"},
      {"node",
       {{"id", Q::none, true, "name of the node"},
        {"x", Q::length, true, "place"},
        {"y", Q::length, true, "place"},
        {"z", Q::length, true, "place"}},
       "a point with six freedoms"},
      {"member",
       {{"id", Q::none, true, "name of the member"},
        {"from", Q::none, true, "node it starts at"},
        {"to", Q::none, true, "node it ends at"},
        {"section", Q::none, true, "id of its section"},
        {"material", Q::none, true, "id of its material"},
        {"up", Q::none, false, "three numbers; member z is the part of it normal to the member"},
        {"release-from", Q::none, false, "freedoms let go at its start, member axes"},
        {"release-to", Q::none, false, "freedoms let go at its end, member axes"}},
       "a straight beam between two nodes"},
      {"support",
       {{"node", Q::none, true, "node it holds"},
        {"fix", Q::none, true, "freedoms it holds: ux uy uz rx ry rz"}},
       "holds a node"},
      {"spring",
       {{"node", Q::none, true, "node it holds to the ground"},
        {"ux", Q::stiffness, false, ""},
        {"uy", Q::stiffness, false, ""},
        {"uz", Q::stiffness, false, ""},
        {"rx", Q::twist_stiffness, false, ""},
        {"ry", Q::twist_stiffness, false, ""},
        {"rz", Q::twist_stiffness, false, ""}},
       "ties a node to the ground elastically"},
      {"mass",
       {{"node", Q::none, true, "node it sits on"}, {"value", Q::mass, true, "mass"}},
       "a point mass"},
      {"load",
       {{"case", Q::none, true, "load case"},
        {"node", Q::none, true, "node it acts on"},
        {"fx", Q::force, false, ""},
        {"fy", Q::force, false, ""},
        {"fz", Q::force, false, ""},
        {"mx", Q::torque, false, ""},
        {"my", Q::torque, false, ""},
        {"mz", Q::torque, false, ""}},
       "force and moment on a node"},
      {"member-load",
       {{"case", Q::none, true, "load case"},
        {"member", Q::none, true, "member it acts on"},
        {"fx", Q::line_load, false, ""},
        {"fy", Q::line_load, false, ""},
        {"fz", Q::line_load, false, ""}},
       "load per length along a whole member, frame axes"},
      {"gravity",
       {{"case", Q::none, true, "load case"},
        {"value", Q::acceleration, true, "9.80665 m/s2 on the ground"},
        {"direction", Q::none, true, "three numbers: where things fall, for example 0 0 -1"}},
       "weight of members and masses"}};
  return all;
}

const FrameElement* find_frame_element(const std::string& name) {
  const auto& all = frame_elements();
  const auto at = std::find_if(all.begin(), all.end(), [&](const FrameElement& e) { return e.name == name; });
  return at == all.end() ? nullptr : &*at;
}

const std::vector<std::string>& freedom_words() {
  static const std::vector<std::string> words{"ux", "uy", "uz", "rx", "ry", "rz"};
  return words;
}

const std::vector<ShapeWords>& section_shapes() {
  static const std::vector<ShapeWords> shapes{
      {"round-tube", {"outside-diameter", "wall"}, {}},
      {"square-tube", {"side", "wall"}, {}},
      {"rectangular-tube", {"depth", "width", "wall"}, {}},
      {"round-bar", {"outside-diameter"}, {}},
      {"flat", {"depth", "thickness"}, {}},
      {"properties", {"area", "Iy", "Iz", "J"}, {"shear-area-y", "shear-area-z", "Wy", "Wz"}}};
  return shapes;
}

}  // namespace focalframe::cli
