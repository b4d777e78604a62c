#pragma once

/// Snow, water, ice, temperature, earthquake, a person and half-built mirrors as load amplitudes of a row.

#include <string>
#include <vector>

#include "models/strength_check.h"

namespace focalframe::models {

/// What else than weight and wind acts in a state, one entry per way it can act. Snow and water lie in any
/// pose that holds them but while people work or the row turns; a person stands only in MAINTENANCE.
std::vector<OtherLoad> other_loads(const TroughDesign& design, const RowModel& row, const State& state);

/// Temperatures that the light is judged in besides none: hottest and coldest frame, each with the gradients
/// if there are any. Empty when the design gives no temperature.
std::vector<OtherLoad> optical_temperatures(const TroughDesign& design, const RowModel& row);

/// Weight of a row whose mirrors are not all on (UNFINISHED); `side`: -1 mirrors on the -Y side in collector
/// axes only, +1 on the +Y side, 0 none, 2 all.
Eigen::VectorXd unfinished_weight(const RowModel& row, double elevation, int side);

/// Amounts behind the loads of one pose, for the report.
struct ActionAmounts {
  double snow_per_length = not_given;   ///< [N/m], snow lying on the mirror
  double snow_lever = not_given;        ///< its centre across the axis, collector y [m]
  double water_per_length = not_given;  ///< [N/m]
  double ice_mass = not_given;          ///< of the whole row [kg]
  double earthquake = not_given;        ///< [m/s^2]
};
ActionAmounts action_amounts(const TroughDesign& design, const RowModel& row, double elevation);

/// Level acceleration of the earthquake stated [m/s^2]; NaN when none is. Without a period: the greatest over
/// all periods.
double design_acceleration(const EarthquakeInput& quake);

/// Kinematic drop of a receiver post of height h whose head moved by d along the row: d^2 / (2 h) [m].
double post_drop(double shift, double height);

}  // namespace focalframe::models
