#pragma once

/// From coefficients and wind direction to load amplitudes of a dish.

#include <Eigen/Core>

#include "loads/coefficients.h"
#include "models/dish_model.h"
#include "models/wind_load.h"

namespace focalframe::models {

/// Drag of receiver or feed, its legs and the base [-]: subcritical long cylinder 1.2 and sharp-edged square
/// bar 2.0-2.2 (Munson, Young, Okiishi, Fundamentals of Fluid Mechanics, Fig. 9.19, read in a page scan).
inline constexpr double receiver_drag = 1.2, post_drag = 2.1;

/// Unit vector towards where the wind comes from, world or yoke axes: psi clockwise from +Y seen from above.
Eigen::Vector3d upwind_of(double wind_from);

struct DishWind {
  Eigen::Vector3d upwind = Eigen::Vector3d::UnitY();  ///< yoke axes
  loads::Coefficients coefficients;                   ///< zone, mesh and gust angle already in
  Spread spread = Spread::linear;                     ///< linear or edge
};

/// How the coefficients were met.
struct DishPattern {
  double uniform = 0, shaped = 0;  ///< amplitudes of the even and the shaped pressure per pascal [-]
  double residual_side = 0;        ///< in-plane coefficient left to the force at the vertex [-]
};

/// Amplitudes of one pascal of velocity pressure: pattern, side force at the vertex, drag of receiver or feed
/// with its legs and of the base. Axial force, side force and moment about the vertex are those of the
/// coefficients to round-off.
Eigen::VectorXd dish_wind_amplitudes(const DishModel& model, const DishPose& pose, const DishWind& wind,
                                     DishPattern* pattern = nullptr);

/// Weight in a pose.
Eigen::VectorXd dish_weight_amplitudes(const DishPose& pose);

/// The same three integrals from amplitudes: axial and side force and moment about the vertex, each along the
/// axes of loads/coefficients.h for this wind [N, N, N m].
Eigen::Vector3d wind_integrals(const DishModel& model, const DishPose& pose, const DishWind& wind,
                               const Eigen::VectorXd& amplitudes);

}  // namespace focalframe::models
