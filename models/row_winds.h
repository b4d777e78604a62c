#pragma once

/// Which winds a pose of a row is loaded with: the table's coefficients at the pitch the wind sees, with
/// zone, pattern and gust angle. Shared by the check at asked speeds and the search for the greatest ones.

#include <vector>

#include "loads/coefficients.h"
#include "loads/wind.h"
#include "models/design.h"
#include "models/states.h"
#include "models/wind_load.h"

namespace focalframe::models {

/// Half width of the secant that gives dCm/dp for the twist feedback [rad].
inline constexpr double moment_slope_half_width = 7.5 * 3.14159265358979323846 / 180.0;

/// Design and table must outlive it.
class RowWinds {
 public:
  RowWinds(const TroughDesign& design, const loads::CoefficientTable& table);

  const loads::CoefficientTable& table() const { return table_; }
  const loads::ZoneFactors& zone() const { return zone_; }

  /// dCm/dp at a pitch, zone in; the design's own value where it states one [1/rad].
  double moment_slope(double pitch) const;

  /// The patterns a pitch is loaded with; the first is the table's own profile where it has one.
  std::vector<Spread> spreads(double pitch) const;

  /// The wind of one pose at a velocity pressure [Pa]. `offset`: gust angle added to the pitch [rad];
  /// `upper`: upper-bound column. The table must cover the pitch.
  WindOnRow at(double elevation, double wind_from, Spread spread, double offset, bool upper,
               double pressure) const;

  /// Whether the table covers a pose and gust angles of so much to either side [rad].
  bool covers(double elevation, double wind_from, double offset) const;

  /// Gust angles of strength and drive: none and this to either side [rad]. The stow tolerance is swept as
  /// poses of its own; elsewhere but while tracking it widens the angle.
  double gust_angle(StateKind kind) const;

  /// EN size factor of the whole row at a height and turbulence, 1 when the design declines it.
  double size_factor(const loads::WindAtHeight& wind) const;

 private:
  const TroughDesign& design_;
  const loads::CoefficientTable& table_;
  loads::ZoneFactors zone_;
};

}  // namespace focalframe::models
