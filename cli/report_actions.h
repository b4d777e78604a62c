#pragma once

/// The part of a trough's report that follows the wind from velocity pressure to newtons, state by state, and
/// the other actions. Text for the screen, values for JSON.

#include <string>

#include "models/assessment.h"

namespace focalframe::cli {

/// One block per kind of state: what every row is made of, then a row per pose and wind.
std::string wind_loads_text(const models::Assessment& a);

/// Snow, water, ice, earthquake by pose; receiver expansion; dynamic factor. Empty when there is none.
std::string other_actions_text(const models::Assessment& a);

/// The first row of OPERATE, multiplied out as a reader would with a pocket calculator.
std::string worked_wind_text(const models::Assessment& a);

}  // namespace focalframe::cli
