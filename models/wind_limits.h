#pragma once

/// Greatest winds a pose bears, criterion by criterion. Plain values, SI; everything a map, a trigger or a
/// report needs is in here.
///
/// A trough's wind is taken in the plane across its axis, from one side or the other; for a wind at a yaw
/// angle all cross-plane loads keep their share yaw_factor(yaw) (loads/pose.h), so its limit in velocity
/// pressure is that of the same side divided by the share. Loads along the axis are not covered.

#include <limits>
#include <string>
#include <vector>

#include "models/design.h"
#include "models/states.h"
#include "models/wind_load.h"

namespace focalframe::models {

enum class LimitKey {
  intercept,       ///< light caught
  lost_to_frame,   ///< light lost to the bent frame
  slope,           ///< residual slope
  twist,           ///< module against the sensor
  receiver_shift,  ///< receiver against the focus
  member,          ///< stress in a member, pylons included
  moving_torque,   ///< the drive cannot move the row
  holding_torque,  ///< the drive cannot hold the row
  joint_torque,    ///< joint between two modules
  overturning,     ///< moment on a foot
  uplift,          ///< pull on a foot
  wind_up,         ///< half the speed at which the row winds itself up (divergence)
};
/// Short word of the JSON: "intercept", "moving-torque" ...
std::string limit_word(LimitKey key);
/// True for the criteria that cost light only and break nothing.
bool is_optical(LimitKey key);

inline constexpr double no_limit = std::numeric_limits<double>::infinity();

struct CriterionLimit {
  LimitKey key = LimitKey::member;
  double averaging = 3;     ///< the criterion's own [s]
  double speed = no_limit;  ///< greatest at the axis, in that averaging; 0 = weight alone fails [m/s]
  double gust = no_limit;   ///< the same wind as its 3 s gust at the axis [m/s]
  Spread spread = Spread::linear;
  double gust_angle = 0;  ///< added to the pitch the wind sees [rad]
  std::string part;       ///< member, pylon or module, where it has one
};

/// One pose as one kind of state, wind from one side (0: from +Y, pi: from -Y).
struct PoseLimit {
  StateKind kind = StateKind::operate;
  double elevation = 0, wind_from = 0;   ///< [rad]
  bool covered = true;                   ///< false: the table has no coefficients here, nothing is known
  std::vector<CriterionLimit> criteria;  ///< those with a limit asked for, least gust first
  double gust() const { return criteria.empty() ? no_limit : criteria.front().gust; }
  /// Least gust of the criteria that break something; infinity when none is asked for.
  const CriterionLimit* governing(bool safety_only = false) const;
};

/// How speeds at the axis hang together; it does not depend on the speed.
struct AxisWind {
  double height = not_given, density = not_given, turbulence = not_given;
  double gust_over_mean = not_given;  ///< 3 s gust over 10 min mean [-]
  double size_factor = 1;             ///< on drive and drive pylon, dynamic factor included [-]
  std::string how;                    ///< formula of the ratio
  double pressure(double speed) const { return 0.5 * density * speed * speed; }
};
AxisWind axis_wind(const TroughDesign& design);

/// Light caught at ascending mean speeds, worst pattern.
struct LightCurve {
  double elevation = 0, wind_from = 0;   ///< [rad]
  std::vector<double> speed, intercept;  ///< 10 min mean at the axis [m/s], [-]
};

}  // namespace focalframe::models
