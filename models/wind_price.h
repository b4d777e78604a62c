#pragma once

/// What a stow trigger costs in a year: hours above it, their share of the light, the light lost below it,
/// and the price of one metre per second of caution.

#include <string>
#include <vector>

#include "models/trigger.h"

namespace focalframe::models {

/// Equal steps of one hour, gaps filled with not_given.
struct WindRecord {
  std::string source;             ///< file
  std::vector<double> speed;      ///< [m/s]; NaN = gap
  std::vector<double> direction;  ///< the wind blows from, clockwise from north [rad]; empty = not recorded
  std::vector<double> beam;  ///< irradiance on a surface that faces the sun [W/m^2]; empty = not recorded
  int gaps = 0;              ///< hours without a speed
};

/// The row's light against the wind: shares lost against no wind, means over the tracking poses (each counts
/// the same: judgement), for wind from the +Y side, the -Y side, and their mean.
struct LossCurve {
  std::vector<double> speed;  ///< 10 min mean at the axis, ascending [m/s]
  std::vector<double> from_plus, from_minus;
  double at(const std::vector<double>& side, double mean_speed) const;  ///< straight between, constant beyond
  double both(double mean_speed) const;
};
LossCurve loss_curve(const std::vector<LightCurve>& light);

struct PriceRow {
  double trigger = not_given;       ///< at the meter, in its averaging [m/s]
  double hours_above = not_given;   ///< in a year [h]
  double hours_stowed = not_given;  ///< with the wait for the resume speed; a record only [h]
  double share_stowed = not_given;  ///< of the year's light, stowed (or above, without a record) [-]
  double share_lost = not_given;    ///< of the year's light, lost to the wind while working [-]
  double share() const { return share_stowed + share_lost; }
};

struct Price {
  bool known = false;
  std::string source;         ///< "Weibull 4.2 m/s, 1.9" or the record's file
  bool daylight = false;      ///< hours of daylight only, else all hours
  bool weighted = false;      ///< weighted with beam irradiance
  bool directions = false;    ///< each hour's wind taken from its own side
  double hours = not_given;   ///< the year's hours it stands for [h]
  double to_record = 1;       ///< record's speed over the meter's reading at the trigger [-]
  double record_to_axis = 1;  ///< 10 min mean at the axis over the record's speed [-]
  std::string how;            ///< of the two factors
  int gaps = 0;
  std::vector<PriceRow> rows;  ///< ascending triggers in steps of 1 m/s; the trigger itself among them
  int at = -1;                 ///< the trigger's row
};

/// Daylight is taken as half the year's 8760 hours.
inline constexpr double daylight_hours = 4380;

/// `record` overrides the design's Weibull values; nullptr = none. Not known without a year or a trigger.
Price stow_price(const TroughDesign& design, const WindLimits& limits, const Trigger& trigger,
                 const WindRecord* record);

}  // namespace focalframe::models
