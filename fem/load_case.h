#pragma once

/// Actions on a frame. All vectors in frame axes unless a field says member axes.

#include <string>
#include <vector>

#include "fem/frame.h"

namespace focalframe::fem {

struct NodeLoad {
  int node = 0;
  Vec3 force = Vec3::Zero(), moment = Vec3::Zero();  ///< [N], [N m]
};

/// Load per length, linear between two places on a member; 0 = member start, 1 = member end.
struct LineLoad {
  int member = 0;
  double from = 0, to = 1;                            ///< fractions of the length, 0 <= from < to <= 1
  Vec3 at_from = Vec3::Zero(), at_to = Vec3::Zero();  ///< [N/m]
  bool member_axes = false;
};

struct MemberPointLoad {
  int member = 0;
  double at = 0.5;                                   ///< fraction of the length
  Vec3 force = Vec3::Zero(), moment = Vec3::Zero();  ///< [N], [N m]
  bool member_axes = false;
};

struct MemberTemperature {
  int member = 0;
  double uniform = 0;     ///< [K]
  double gradient_y = 0;  ///< dT/dy, member axes [K/m]
  double gradient_z = 0;  ///< dT/dz, member axes [K/m]
};

struct LoadCase {
  std::string name;
  Vec3 gravity = Vec3::Zero();  ///< acts on member and point masses [m/s^2]; (0, 0, -9.80665) is weight down
  std::vector<NodeLoad> nodes;
  std::vector<LineLoad> lines;
  std::vector<MemberPointLoad> points;
  std::vector<MemberTemperature> temperatures;
};

}  // namespace focalframe::fem
