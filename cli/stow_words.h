#pragma once

/// Words and letters of wind limits.

#include <string>

#include "models/wind_limits.h"

namespace focalframe::cli {

char limit_letter(models::LimitKey key);
std::string letter_meaning(models::LimitKey key);  ///< "light", "moving" ...
std::string limit_short(models::LimitKey key);     ///< "drive cannot hold"
/// "45 deg, back"
std::string pose_words(const models::State& state);

}  // namespace focalframe::cli
