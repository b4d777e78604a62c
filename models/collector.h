#pragma once

/// A built collector: what turns (in collector axes), what stands (in world axes), the joints between them,
/// the skin.
///
/// Collector axes: x along the rotation axis, z along the optical axis from vertex to focus, y = z cross x;
/// origin on the vertex line at the row's first end. World axes: X = x, Z up, Y = Z cross X. See loads/pose.h
/// for the elevation.

#include <string>
#include <vector>

#include "fem/condensed.h"
#include "fem/frame.h"
#include "models/skin.h"

namespace focalframe::models {

/// How far a member is held against buckling.
struct BucklingLength {
  int member = 0;
  double about_y = 0, about_z = 0;  ///< buckling lengths for bending about the section's y and z [m]
  double lateral = 0;  ///< between sideways holds of a plate on edge [m]; 0 = lateral buckling cannot occur
  std::string shape;   ///< profile word, for the buckling curve
};

/// One pylon on its footing, world axes with the origin at ground level under the rotation axis.
struct Stand {
  fem::Frame frame;
  int head = 0;                          ///< node on the rotation axis
  int foot = 0;                          ///< node at ground level
  double height = 0;                     ///< [m]
  double x = 0;                          ///< along the row [m]
  bool driven = false;                   ///< carries the drive and holds the row along x
  double post_width = 0;                 ///< seen by the wind [m]
  double roll = 0;                       ///< of the post's section axes about its own axis [rad]
  std::vector<BucklingLength> buckling;  ///< of the post
};

/// Where what turns meets a pylon: the bearing node of the body.
struct Bearing {
  int node = 0;
  int stand = 0;
};

struct ModulePart {
  double x_from = 0, x_to = 0;  ///< pylon to pylon [m]
  std::vector<int> rib_roots;   ///< tube nodes at the ribs
  std::vector<int> tube_nodes;  ///< all tube nodes, in order along x
};

struct Collector {
  fem::Frame body;                ///< what turns, collector axes
  std::vector<Bearing> bearings;  ///< one per pylon, in order along x
  std::vector<Stand> stands;      ///< one per pylon, in order along x
  std::vector<ModulePart> modules;
  std::vector<int> receiver_nodes;       ///< in order along x; empty without a receiver
  std::vector<int> receiver_members;     ///< between neighbouring receiver nodes
  std::vector<BucklingLength> buckling;  ///< of the members that are judged for it
  Skin skin;
  int drive_bearing = 0;       ///< index into bearings
  double drive_stiffness = 0;  ///< [N m/rad]; infinity = rigid
  double width = 0, focal_length = 0;
  double axis_to_vertex = 0;       ///< the rotation axis lies at z = -axis_to_vertex, y = 0 [m]
  double mirror_area = 0;          ///< projected, what the coefficients are multiplied by [m^2]
  double receiver_radius = 0;      ///< absorber [m]
  double receiver_drag_width = 0;  ///< outer width seen by the wind [m]
};

}  // namespace focalframe::models
