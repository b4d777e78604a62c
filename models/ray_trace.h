#pragma once

/// A Monte-Carlo trace of exact rays on a trough's deformed skin: the independent check of the intercept got
/// from first-order misses.
///
/// Nothing here is linearised: points are displaced, normals turned by finite rotations, rays reflected in
/// space. Rays start evenly over the undeformed aperture. Shading and the row's ends are not modelled. The
/// same seed gives the same result with every compiler.

#include <Eigen/Core>
#include <cstdint>
#include <functional>
#include <span>
#include <vector>

#include "models/intercept.h"
#include "models/rays.h"

namespace focalframe::models {

/// Motion of a mirror point in collector axes (x along the row, y across, z optical).
struct SkinMotion {
  Eigen::Vector3d displacement = Eigen::Vector3d::Zero();  ///< [m]
  Eigen::Vector3d rotation = Eigen::Vector3d::Zero();      ///< of the normal, a rotation vector [rad]
};

/// Motion at undeformed x and y; empty = none.
using SkinMotionAt = std::function<SkinMotion(double x, double y)>;

/// Displacement of the receiver's axis opposite the mirror at x [m]; empty = none.
using ReceiverMotionAt = std::function<Eigen::Vector3d(double x)>;

/// Motion given at samples [station][row], linear between them and beyond the outer ones. Stations and rows
/// ascend. Throws std::invalid_argument when the arrays do not fit.
SkinMotionAt sampled_motion(std::vector<double> station_x, std::vector<double> row_y,
                            std::vector<SkinMotion> samples);

struct TracedTrough {
  Parabola parabola;
  double receiver_radius = 0;  ///< [m]
  LineReceiver kind = LineReceiver::tube;
  BeamError error;
  double aim = 0;               ///< rotation of the light about +x relative to the collector [rad]
  double x_from = 0, x_to = 1;  ///< mirror's ends [m]
  SkinMotionAt skin;
  ReceiverMotionAt receiver;
};

TracedIntercept trace_rays(const TracedTrough& trough, std::int64_t rays = 1'000'000, std::uint64_t seed = 1);

}  // namespace focalframe::models
