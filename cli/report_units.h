#pragma once

/// Numbers of a report in the unit a reader of troughs expects.

#include <string>

#include "models/assessment.h"

namespace focalframe::cli {

/// "96.0 %", "0.82 mrad", "2.8 mm", "149 MPa", "3.68 kN m", "16.4 m/s"; "-" when not a number. Slopes and
/// twists are in mrad here, never in degrees. `extra` adds digits.
std::string shown(double value, models::Quantity quantity, int extra = 0);

/// Value and limit of a criterion with enough digits to tell them apart.
struct ShownPair {
  std::string value, limit;
};
ShownPair shown_pair(const models::Criterion& criterion);

/// printf into a string.
std::string text_of(const char* format, ...) __attribute__((format(printf, 1, 2)));

}  // namespace focalframe::cli
