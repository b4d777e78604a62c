#pragma once

/// A linear frame: nodes with six freedoms, straight members, springs, joints, supports, point masses.
///
/// Axes: one right-handed set for the whole frame; the caller decides whether it is fixed or turns.
/// Freedom order at a node, everywhere: ux uy uz rx ry rz [m, rad]; rotations positive by the right-hand
/// rule. Global freedom number of (node, dof) is 6 * node + dof in every vector of this library (#nodes * 6
/// long).
///
/// Member axes: x from the member's start to its end (after offsets); z is the part of `up` normal to x;
/// y = z cross x. A frame is a value: build it, hand it to a solver, it is never changed by one.

#include <Eigen/Core>
#include <array>
#include <string>
#include <vector>

#include "fem/material.h"
#include "fem/section.h"

namespace focalframe::fem {

using Vec3 = Eigen::Vector3d;
using Mat3 = Eigen::Matrix3d;
using Vec6 = Eigen::Matrix<double, 6, 1>;
using Six = std::array<bool, 6>;  ///< one flag per freedom: ux uy uz rx ry rz

enum Dof { ux = 0, uy, uz, rx, ry, rz };

struct Node {
  Vec3 at = Vec3::Zero();  ///< [m]
  std::string name;        ///< place in the builder's words; used in every message
};

struct Member {
  int from = 0, to = 0;              ///< node indices
  int section = 0, material = 0;     ///< indices into Frame::sections and Frame::materials
  Vec3 up = Vec3::UnitZ();           ///< reference vector of the member's z axis, frame axes
  Vec3 offset_from = Vec3::Zero();   ///< rigid arm node -> member start, frame axes [m]
  Vec3 offset_to = Vec3::Zero();     ///< rigid arm node -> member end, frame axes [m]
  Six release_from{}, release_to{};  ///< true = that end force (member axes) is zero
  std::array<double, 6> spring_from{},
      spring_to{};  ///< 0 = rigid (or released); > 0 = end spring, member axes
  std::string name;
  std::string group;  ///< what it belongs to ("torque tube", "rib", ...): results are grouped by it
};

/// A held or imposed freedom; several supports may name one node and add up.
struct Support {
  int node = 0;
  Six fix{};                    ///< frame axes
  Vec6 imposed = Vec6::Zero();  ///< imposed value of the held freedoms [m, rad]
};

/// Spring from node to ground (other < 0) or between two nodes; acts on (node - other) at the same place, in
/// `axes`. If the nodes do not coincide the arm node -> other is carried exactly (no fictitious moment).
struct Spring {
  int node = 0, other = -1;
  Vec6 stiffness = Vec6::Zero();  ///< [N/m] x 3, [N m/rad] x 3
  Mat3 axes = Mat3::Identity();   ///< columns = the spring's x, y, z in frame axes
  std::string name;
};

/// Exact connection of two coincident nodes: held freedoms (in `axes`) are equal, the others are free.
/// A hinge about y is held = {1,1,1,1,0,1}. No penalty: the freedoms are eliminated.
struct Joint {
  int node = 0, other = 0;
  Six held{};
  Mat3 axes = Mat3::Identity();
  std::string name;
};

struct PointMass {
  int node = 0;
  double mass = 0;              ///< [kg]
  Vec3 offset = Vec3::Zero();   ///< node -> centre of mass, frame axes [m]
  Mat3 inertia = Mat3::Zero();  ///< about its own centre of mass, frame axes [kg m^2]
  std::string name;
  std::string group;
};

struct Frame {
  std::vector<Node> nodes;
  std::vector<Material> materials;
  std::vector<Section> sections;
  std::vector<Member> members;
  std::vector<Support> supports;
  std::vector<Spring> springs;
  std::vector<Joint> joints;
  std::vector<PointMass> masses;

  int freedoms() const { return 6 * static_cast<int>(nodes.size()); }
};

/// One thing that is wrong with a frame, in words that name the part.
struct FrameFault {
  std::string what;  ///< e.g. "member 'rib 3': up is parallel to the member"
  int node = -1, member = -1;
};

/// Index out of range, zero-length member, `up` parallel to its member, non-positive section values, joints
/// between separated nodes, duplicate members, coincident unconnected nodes, parts that are neither connected
/// with the rest nor held by a support or ground spring. Empty = sound.
std::vector<FrameFault> find_faults(const Frame& frame);
/// The same for a frame that will also be held at some nodes (condensation).
std::vector<FrameFault> find_faults(const Frame& frame, const std::vector<int>& held_nodes);

/// Mass of the frame and its centre, members and point masses [kg], [m].
struct MassSummary {
  double mass = 0;
  Vec3 centre = Vec3::Zero();
};
MassSummary total_mass(const Frame& frame);

}  // namespace focalframe::fem
