#pragma once

/// A Monte-Carlo trace of exact rays on a dish's deformed skin: the independent check of
/// models/dish_optics.h. Nothing is linearised; shading is not modelled; the same seed gives the same result
/// with every compiler.

#include <Eigen/Core>
#include <cstdint>

#include "models/dish_optics.h"
#include "models/ray_trace.h"

namespace focalframe::models {

struct TracedDish {
  Parabola parabola;
  double inner_radius = 0;     ///< of the mirror [m]
  double receiver_radius = 0;  ///< [m]
  PointReceiver kind = PointReceiver::flat;
  BeamError error;  ///< as DishIntercept reads it; `tracking_rms` about each of x and y
  Eigen::Vector3d aim = Eigen::Vector3d::Zero();  ///< rotation of the light relative to the collector [rad]
  Eigen::Vector3d receiver = Eigen::Vector3d::Zero();  ///< displacement of the receiver's centre [m]
  SkinMotionAt skin;                                   ///< empty = none
};

TracedIntercept trace_rays(const TracedDish& dish, std::int64_t rays = 1'000'000, std::uint64_t seed = 1);

}  // namespace focalframe::models
