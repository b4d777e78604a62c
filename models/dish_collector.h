#pragma once

/// A built dish: what turns with the elevation (collector axes), the yoke (turns with the azimuth, yoke
/// axes), the base (fixed), and where they meet.
///
/// Collector axes: origin at the vertex, z along the optical axis, x along the elevation axis. Yoke axes: Z
/// along the azimuth axis, X along the elevation axis, origin at ground level under it. At azimuth 0 and
/// without a polar tilt yoke and world axes coincide.

#include <Eigen/SparseCore>
#include <string>
#include <vector>

#include "fem/frame.h"

namespace focalframe::models {

/// The reflecting surface sampled in polar rows: each sample moves as a linear function of the frame's
/// freedoms. Between neighbouring ribs the skin is straight; along a rib it follows the beam's own shape. Its
/// transpose carries pressure to the frame with total force and moment kept to round-off.
struct DishSkin {
  std::vector<fem::Vec3> at;                          ///< undeformed places on the paraboloid [m]
  std::vector<double> weight;                         ///< projected area each stands for [m^2]
  Eigen::SparseMatrix<double, Eigen::RowMajor> move;  ///< (3 #samples) x (6 #nodes) [m]
  Eigen::SparseMatrix<double, Eigen::RowMajor> turn;  ///< (3 #samples) x (6 #nodes), rotation vector [rad]

  int samples() const { return static_cast<int>(at.size()); }
};

/// A point rigidly tied to a node.
struct Anchor {
  int node = 0;
  fem::Vec3 at = fem::Vec3::Zero();  ///< axes of the node's frame [m]
};

struct DishFoot {
  int node = 0;
  std::vector<int> members;  ///< those that end in it (their `from` end)
};

struct DishCollector {
  fem::Frame body;                ///< what turns with the elevation, collector axes
  int hub = 0;                    ///< node at the hub's middle; the side force of the wind acts there
  std::vector<int> held;          ///< nodes through which the body meets bearings and drive
  Anchor left, right;             ///< elevation bearings at -x and +x; the left one also holds x
  Anchor lug;                     ///< the actuator's pin; unused with a slewing drive
  int focus = 0;                  ///< node of receiver or feed
  std::vector<int> feed_members;  ///< legs or boom
  DishSkin skin;

  fem::Frame yoke;  ///< yoke axes
  int azimuth = 0;  ///< node on the azimuth bearing
  int yoke_left = 0, yoke_right = 0, yoke_pin = -1;

  fem::Frame base;  ///< true world axes, origin at ground level under the azimuth axis
  int head = 0;     ///< node under the azimuth bearing, at the same place as `azimuth` at azimuth 0
  std::vector<DishFoot> feet;
  double post_width = 0;  ///< seen by the wind, each member of the base [m]

  double diameter = 0, focal_length = 0;
  double axis_to_vertex = 0;   ///< the elevation axis lies at z = -axis_to_vertex [m]
  double axis_height = 0;      ///< [m]
  double area = 0;             ///< pi D^2 / 4, what the coefficients are multiplied by [m^2]
  double surface_area = 0;     ///< projected area of the skin (hole out) [m^2]
  double feed_width = 0;       ///< diameter of what the wind meets in the focus [m]
  double drive_stiffness = 0;  ///< [N/m] of the actuator, or [N m/rad] of a slewing drive
  bool slewing = false;
  double twist_stiffness = 0, tilt_stiffness = 0;  ///< of the azimuth drive and bearing [N m/rad]
};

}  // namespace focalframe::models
