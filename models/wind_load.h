#pragma once

/// From coefficients, velocity pressure and wind direction to load amplitudes of a row.

#include <Eigen/Core>
#include <string>
#include <vector>

#include "loads/coefficients.h"
#include "models/row_model.h"

namespace focalframe::models {

/// How the net pressure is spread over the aperture; all meet the same three coefficients exactly.
enum class Spread {
  linear,   ///< straight from rim to rim
  edge,     ///< even, with a peak at the upwind rim
  profile,  ///< the table's own net-pressure profile
};
std::string spread_text(Spread spread);

/// One wind on the row: how it strikes and how hard.
struct WindOnRow {
  double wind_from = 0;              ///< psi of loads/pose.h [rad]
  loads::Coefficients coefficients;  ///< zone and yaw factors already in
  Spread spread = Spread::linear;
  std::vector<double> profile;  ///< net pressure at RowModel::hat_stations, only for Spread::profile
  double moment_slope = 0;      ///< dCm/dp for the twist feedback [1/rad]
  double pressure = 0;          ///< velocity pressure [Pa]
};

/// Drag of members that the coefficient table does not include [-]: subcritical long cylinder 1.2 and
/// sharp-edged square bar 2.0-2.2 (Munson, Young, Okiishi, Fundamentals of Fluid Mechanics, Fig. 9.19, read
/// in a page scan).
inline constexpr double receiver_drag = 1.2, post_drag = 2.1;

/// Amplitudes of one pascal of velocity pressure, without twist feedback: pattern and line force on every
/// module, drag of the receiver and of the posts.
Eigen::VectorXd wind_amplitudes(const RowModel& row, double elevation, const WindOnRow& wind);

/// Adds to `amplitudes` (weight + pressure * wind) the moments that the modules' own twist brings:
/// theta = (I - q T D)^-1 theta_0, D = W^2 L dCm/dp. Returns the module rotations [rad].
Eigen::VectorXd add_twist_feedback(const RowModel& row, const PoseModel& pose, const WindOnRow& wind,
                                   Eigen::VectorXd& amplitudes);

/// Velocity pressure at which the row winds itself up (divergence), 1 / greatest eigenvalue of T D; infinity
/// when the slope is not positive [Pa].
double divergence_pressure(const RowModel& row, const PoseModel& pose, double moment_slope);

/// Weight at an elevation: gravity turned into collector axes, and the stands' own.
Eigen::VectorXd weight_amplitudes(const RowModel& row, double elevation);

}  // namespace focalframe::models
