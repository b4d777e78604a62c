#pragma once

/// The one place where text with a unit becomes a number: "139.7 mm", "3.5 kN m", "7 ft 10 in", "95 %".
///
/// Units are taken as people write them (`2.4m`, `kNm`, `N/mm2`, `mm²`, `m/s^2`); words that mean two things
/// (`lb`, `t`, `2,4 m`) are refused with the readings they could have.

#include <limits>
#include <string>
#include <string_view>
#include <vector>

#include "models/quantity.h"

namespace focalframe::cli {

using models::Quantity;

struct ParsedQuantity {
  double value = std::numeric_limits<double>::quiet_NaN();  ///< SI; NaN when there is a problem
  std::string problem;                                      ///< one or two sentences; empty = understood
  std::vector<std::string> suggestions;  ///< whole values to write instead, most likely first
  bool bare = false;                     ///< the only problem is that the unit is missing

  bool ok() const { return problem.empty(); }
};

/// `rigid` is understood for stiffnesses (infinity).
ParsedQuantity parse_quantity(std::string_view text, Quantity quantity);

/// "A length", "A bending or twisting moment" ...
std::string quantity_name(Quantity quantity);
/// "mm, cm, m, in or ft": units shown when one is missing or wrong.
std::string quantity_units(Quantity quantity);
/// Units that a number may have been meant in, most common first; used to guess at slips of units.
const std::vector<std::string>& common_units(Quantity quantity);

/// Splits the leading number from the unit: "4.0 m" -> {"4.0", "m"}; {"", text} when there is no number.
std::pair<std::string, std::string> split_number(std::string_view text);

/// Value in a customary unit ("69.85 mm"); see models/quantity.h.
using models::number_text;
using models::quantity_text;

}  // namespace focalframe::cli
