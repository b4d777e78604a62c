#pragma once

/// A measured sun written in a design file: "0 mrad 1, 4 mrad 0.9, 4.65 mrad 0.4, 10 mrad 0.01", angles from
/// the sun's centre with their radiance in any unit.

#include <string>

#include "models/sun.h"

namespace focalframe::models {

/// Throws std::invalid_argument with the reason in words when the text is no table of a sun.
SunShape sun_of_table(const std::string& text);

}  // namespace focalframe::models
