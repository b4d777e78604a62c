#pragma once

/// Hands a builder its nodes, members, sections and materials while it puts a collector together.

#include <string>
#include <vector>

#include "models/collector.h"
#include "models/design.h"

namespace focalframe::models {

class BodyMaker {
 public:
  Collector out;

  const fem::Vec3& at(int node) const { return out.body.nodes[static_cast<std::size_t>(node)].at; }
  int node(const fem::Vec3& at, const std::string& name);
  int section(fem::Section section);
  /// Of a catalogue material in this thickness; the same pair gives the same index.
  int material(const std::string& name, double thickness);
  int material(const ProfileInput& profile);
  int add_material(fem::Material material, const std::string& key);
  /// The reference is good until the next member is added.
  fem::Member& member(int from, int to, int section, int material, const fem::Vec3& up,
                      const std::string& name, const std::string& group);
  int last_member() const { return static_cast<int>(out.body.members.size()) - 1; }
  void point_mass(int at, double mass, const fem::Vec3& offset, const std::string& name,
                  const std::string& group);

 private:
  std::vector<std::string> material_keys_;
};

/// "rib 3 of module 2", from numbers that count from 0.
std::string place_name(const std::string& what, int number, int module);

}  // namespace focalframe::models
