#include "models/body_maker.h"

#include <utility>

#include "models/catalogue.h"
#include "models/profile.h"

namespace focalframe::models {

int BodyMaker::node(const fem::Vec3& at, const std::string& name) {
  out.body.nodes.push_back({at, name});
  return static_cast<int>(out.body.nodes.size()) - 1;
}

int BodyMaker::section(fem::Section s) {
  out.body.sections.push_back(std::move(s));
  return static_cast<int>(out.body.sections.size()) - 1;
}

int BodyMaker::material(const std::string& name, double thickness) {
  const std::string key = name + "@" + std::to_string(thickness);
  for (std::size_t i = 0; i < material_keys_.size(); ++i)
    if (material_keys_[i] == key) return static_cast<int>(i);
  return add_material(material_of(name, thickness), key);
}

int BodyMaker::material(const ProfileInput& profile) {
  return material(profile.material, profile_thickness(profile));
}

int BodyMaker::add_material(fem::Material material, const std::string& key) {
  out.body.materials.push_back(std::move(material));
  material_keys_.push_back(key);
  return static_cast<int>(material_keys_.size()) - 1;
}

fem::Member& BodyMaker::member(int from, int to, int section, int material, const fem::Vec3& up,
                               const std::string& name, const std::string& group) {
  fem::Member m;
  m.from = from;
  m.to = to;
  m.section = section;
  m.material = material;
  m.up = up;
  m.name = name;
  m.group = group;
  out.body.members.push_back(m);
  return out.body.members.back();
}

void BodyMaker::point_mass(int at, double mass, const fem::Vec3& offset, const std::string& name,
                           const std::string& group) {
  if (mass <= 0) return;
  fem::PointMass p;
  p.node = at;
  p.mass = mass;
  p.offset = offset;
  p.name = name;
  p.group = group;
  out.body.masses.push_back(p);
}

std::string place_name(const std::string& what, int number, int module) {
  return what + " " + std::to_string(number + 1) + " of module " + std::to_string(module + 1);
}

}  // namespace focalframe::models
