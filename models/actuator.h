#pragma once

/// A linear actuator between what turns with the elevation and the yoke: a triangle of two pins and the
/// elevation axis.
///
/// Places in the plane across the elevation axis, from the axis, world axes Y (front, where the dish looks at
/// elevation 0) and Z (up). Growing elevation turns the dish pin about +X.

#include <Eigen/Core>

#include "models/dish_design.h"

namespace focalframe::models {

/// Pin on the dish and pin on the yoke, (Y, Z) from the axis at this elevation [m].
Eigen::Vector2d dish_pin(const ActuatorInput& actuator, double elevation);
Eigen::Vector2d stand_pin(const ActuatorInput& actuator);

double actuator_length(const ActuatorInput& actuator, double elevation);  ///< pin to pin [m]

/// Moment arm dL/d(elevation) [m]: positive while the rod grows with the elevation; 0 at a dead point.
double actuator_arm(const ActuatorInput& actuator, double elevation);

/// What the pins do over a range of elevations, looked at every quarter degree.
struct ActuatorRange {
  double shortest = 0, longest = 0;        ///< [m]
  double shortest_at = 0, longest_at = 0;  ///< [rad]
  double least_arm = 0, greatest_arm = 0;  ///< of the magnitude [m]
  double least_arm_at = 0;                 ///< [rad]
  bool turns_back = false;                 ///< the arm changes its sign: a dead point
};
ActuatorRange actuator_range(const ActuatorInput& actuator, double from, double to);

/// An arm below this share of the greatest one has no say over the dish any more (judgement).
inline constexpr double least_arm_share = 0.15;

/// Euler load of the solid steel rod over the full pin distance, hinged ends [N]; NaN without a rod diameter.
double rod_buckling_force(const ActuatorInput& actuator, double length);

}  // namespace focalframe::models
