#include "models/frame_maker.h"

#include <cmath>
#include <utility>

#include "models/catalogue.h"
#include "models/profile.h"

namespace focalframe::models {
namespace {

double thickness_of(const ProfileInput& p) {
  if (!std::isnan(p.wall)) return p.wall;
  return std::isnan(p.thickness) ? p.outside_diameter : p.thickness;
}

}  // namespace

int FrameMaker::node(const fem::Vec3& at, std::string name) {
  frame_.nodes.push_back({at, std::move(name)});
  return static_cast<int>(frame_.nodes.size()) - 1;
}

int FrameMaker::section(const fem::Section& section) {
  for (std::size_t i = 0; i < frame_.sections.size(); ++i) {
    const fem::Section& s = frame_.sections[i];
    if (s.name == section.name && s.A == section.A && s.Iy == section.Iy && s.Iz == section.Iz)
      return static_cast<int>(i);
  }
  frame_.sections.push_back(section);
  return static_cast<int>(frame_.sections.size()) - 1;
}

int FrameMaker::material(const std::string& name, double thickness) {
  const std::string key = name + " " + std::to_string(thickness);
  const auto [at, fresh] = materials_.try_emplace(key, static_cast<int>(frame_.materials.size()));
  if (fresh) frame_.materials.push_back(material_of(name, thickness));
  return at->second;
}

int FrameMaker::massless(const std::string& name, double thickness, double yield_share) {
  fem::Material made = material_of(name, thickness);
  made.density = 0;
  made.yield *= yield_share;
  frame_.materials.push_back(made);
  return static_cast<int>(frame_.materials.size()) - 1;
}

fem::Member& FrameMaker::member(int from, int to, int section, int material, const fem::Vec3& up,
                                std::string name, std::string group) {
  fem::Member m;
  m.from = from;
  m.to = to;
  m.section = section;
  m.material = material;
  m.up = up;
  m.name = std::move(name);
  m.group = std::move(group);
  frame_.members.push_back(std::move(m));
  return frame_.members.back();
}

fem::Member& FrameMaker::member(int from, int to, const ProfileInput& profile, const fem::Vec3& up,
                                std::string name, std::string group) {
  const int s = section(section_of(profile)), m = material(profile.material, thickness_of(profile));
  return member(from, to, s, m, up, std::move(name), std::move(group));
}

fem::Member& FrameMaker::strut(int from, int to, const ProfileInput& profile, const fem::Vec3& up,
                               std::string name, std::string group) {
  fem::Member& m = member(from, to, profile, up, std::move(name), std::move(group));
  for (const int dof : {fem::ry, fem::rz}) {
    m.release_from[static_cast<std::size_t>(dof)] = true;
    m.release_to[static_cast<std::size_t>(dof)] = true;
  }
  return m;
}

fem::PointMass& FrameMaker::mass(int node, double mass, const fem::Vec3& offset, std::string name,
                                 std::string group) {
  fem::PointMass m;
  m.node = node;
  m.mass = mass;
  m.offset = offset;
  m.name = std::move(name);
  m.group = std::move(group);
  frame_.masses.push_back(std::move(m));
  return frame_.masses.back();
}

}  // namespace focalframe::models
