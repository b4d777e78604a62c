#pragma once

/// Puts a frame together from profiles and names; shared by the builders of a dish's parts.

#include <map>
#include <string>

#include "fem/frame.h"
#include "models/design.h"

namespace focalframe::models {

class FrameMaker {
 public:
  explicit FrameMaker(fem::Frame& frame) : frame_(frame) {}

  int node(const fem::Vec3& at, std::string name);
  int section(const fem::Section& section);
  /// Catalogue material of a part this thick [m].
  int material(const std::string& name, double thickness);
  /// The same stiffness without mass, for parts whose mass is put in as point masses.
  int massless(const std::string& name, double thickness, double yield_share);

  /// Straight member; `up` as in fem/frame.h. The reference stays good until the next member.
  fem::Member& member(int from, int to, int section, int material, const fem::Vec3& up, std::string name,
                      std::string group);
  fem::Member& member(int from, int to, const ProfileInput& profile, const fem::Vec3& up, std::string name,
                      std::string group);
  /// Hinged about both bending axes at both ends.
  fem::Member& strut(int from, int to, const ProfileInput& profile, const fem::Vec3& up, std::string name,
                     std::string group);
  fem::PointMass& mass(int node, double mass, const fem::Vec3& offset, std::string name, std::string group);

  int members() const { return static_cast<int>(frame_.members.size()); }
  const fem::Vec3& at(int node) const { return frame_.nodes[static_cast<std::size_t>(node)].at; }

 private:
  fem::Frame& frame_;
  std::map<std::string, int> materials_;
};

}  // namespace focalframe::models
