#pragma once

/// From coefficients, velocity pressure and wind direction to load amplitudes of a row.

#include <Eigen/Core>
#include <string>
#include <vector>

#include "loads/coefficients.h"
#include "models/row_model.h"

namespace focalframe::models {

/// How the net pressure is spread over the aperture; the first three meet the same coefficients exactly.
enum class Spread {
  linear,      ///< straight from rim to rim
  edge,        ///< even, with a peak at the upwind rim
  profile,     ///< the table's own net-pressure profile
  half_minus,  ///< even on the -y half of the module beside the drive and nothing on its other half; else
               ///< straight
  half_plus,   ///< likewise on its +y half
};
std::string spread_text(Spread spread);

/// One wind on the row: how it strikes and how hard.
struct WindOnRow {
  double wind_from = 0;              ///< psi of loads/pose.h [rad]
  loads::Coefficients coefficients;  ///< zone and yaw factors already in
  Spread spread = Spread::linear;
  std::vector<double> profile;   ///< net pressure at RowModel::hat_stations, only for Spread::profile
  double moment_slope = 0;       ///< dCm/dp for the twist feedback [1/rad]
  double pressure = 0;           ///< velocity pressure [Pa]
  bool bare_members = true;      ///< false: the coefficients hold the drag of frame and receiver already
  bool mirrors = true;           ///< false: no mirror is on yet, tube and ribs stand in the open
  bool half_everywhere = false;  ///< half patterns on every module: mirrors on one side only
};

/// Share of the wind that tube and ribs see behind the mirror at a pitch: 1 edge-on, 0 with the mirror across
/// the wind ("mirror": sin^2 p, a judgement), always 1 ("none") or 0 ("all").
double bare_share(const std::string& shielding, double pitch);

/// What a pattern came out as on the first module.
struct PatternNumbers {
  double slope = 0;                           ///< b of the straight pattern [-]
  double edge_upwind = 0, edge_downwind = 0;  ///< net pressure coefficient at the rims (s/W = -0.5, +0.5) [-]
  double residual_side = 0;                   ///< line force along the vertex line over q A [-]
};
PatternNumbers pattern_numbers(const RowModel& row, double elevation, const WindOnRow& wind);

/// Amplitudes of one pascal of velocity pressure, without twist feedback: pattern and line force on every
/// module; drag of receiver, pylons, tube and ribs by the wind's part across the row; drag and friction by
/// its part along the row.
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
