#pragma once

/// Rules that need the coefficient table beside the design: gusts counted twice, a table used outside the
/// geometry it was made for, poses it does not cover.

#include <vector>

#include "loads/coefficients.h"
#include "models/schema.h"

namespace focalframe::models {

/// All broken rules at once; `table_zone`: the field position the table was made for, empty = isolated; an
/// accepted rule becomes a note with its reason. Poses without coefficients cannot be accepted away: there is
/// no number to go on with.
std::vector<Violation> wind_rules(const TroughDesign& design, const loads::CoefficientTable& table,
                                  const std::string& table_zone = {});

}  // namespace focalframe::models
