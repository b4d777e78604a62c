#pragma once

/// From the gust a row bears at its axis to the reading at which it must be sent to stow, one step at a time,
/// in the terms of the instrument that is read. Every step can be settled in the design (operation/trigger).

#include <string>
#include <vector>

#include "models/limit_map.h"

namespace focalframe::models {

// Defaults of the steps; all of them judgement.
inline constexpr double default_resume = 0.8;       ///< resume speed over the trigger
inline constexpr double default_dwell = 20 * 60;    ///< below it before it resumes [s]
inline constexpr double default_second = 0.85;      ///< instantaneous trigger over the gust borne
inline constexpr double shelter_among_rows = 0.85;  ///< reading of a meter among the rows over the free wind
inline constexpr double hand_meter_height = 2.0, hand_meter_averaging = 60;  ///< [m], [s]

/// Growth of the wind while the row turns, when the design states none: 1 + 0.1 sqrt(minutes), at most 1.5: a
/// passing front rises fast at first (judgement; no measured rule was found).
double default_growth(double time);

/// The instrument.
struct Meter {
  double height = not_given, averaging = not_given, tolerance = 0;  ///< [m], [s], [m/s]
  bool among_rows = false;
  bool hand_held = false;  ///< a hand-held meter stands in for an anemometer that is not there
};
Meter meter_of(const TroughDesign& design);

struct TriggerStep {
  char sign = '*';     ///< '*', '/' or '-'
  double by = 1;       ///< factor, or [m/s]
  std::string what;    ///< "gust at 6 m against 1.7 m"
  std::string source;  ///< "EN terrain II", "judgement", "yours"
  double after = 0;    ///< [m/s]
};

struct Trigger {
  bool known = false;  ///< false: no criterion that breaks something was asked for
  Meter meter;
  StateLimit basis;              ///< what limits it: TURNING, or OPERATE where that is less
  double axis_gust = not_given;  ///< [m/s]
  double travel = not_given;     ///< longest way to stow, notice included [s]
  std::vector<TriggerStep> steps;
  double speed = not_given;   ///< the trigger, in the meter's averaging [m/s], rounded down to 0.1
  double second = not_given;  ///< instantaneous trigger: one 3 s gust at the meter [m/s]
  double second_ratio = not_given;
  double resume = not_given, dwell = not_given;  ///< [m/s], [s]
  double light_speed = not_given;  ///< 10 min mean at the meter from which the light falls short [m/s]
  double mean_at_10m = not_given;  ///< the trigger as a 10 min mean at 10 m [m/s]
  int beaufort = 0;                ///< of that
  /// Factor from this meter's mean to the 10 min mean that brings the same gust, both at the meter [-].
  double to_ten_minutes = 1;
  std::vector<std::string> reminders;
};

/// The trigger for a meter; `from_light` also counts the optical limits of OPERATE.
Trigger stow_trigger(const TroughDesign& design, const WindLimits& limits, const Meter& meter);

/// 10 min mean at one height over that at another, on the site [-].
double mean_ratio(const TroughDesign& design, double height, double over_height);
double gust_ratio(const TroughDesign& design, double height, double over_height);

}  // namespace focalframe::models
