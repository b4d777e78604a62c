#pragma once

/// Combinations of a set written out for one state: which columns (weight, a wind variant, other actions) are
/// summed with which factors.

#include <string>
#include <vector>

#include "models/strength_check.h"

namespace focalframe::models {

/// Columns of a state: 0 weight, 1 .. winds, then the others.
struct FactoredTerm {
  int column = 0;
  double factor = 1;
  bool wind = false;  ///< takes the size and dynamic factor where loads are gathered
};

struct FactoredCase {
  std::vector<FactoredTerm> terms;  ///< weight first
  int variant = -1;                 ///< wind column counted from 0; -1 = calm
  bool earthquake = false;
  const loads::Combination* combination = nullptr;
  std::vector<int> others;  ///< numbers of the other actions in it
};

enum class Wanted {
  strength,  ///< factored: strength, accidental for STUCK, seismic
  service    ///< unfactored: service and seismic, and always weight + wind
};

/// Variable actions act or do not, whichever is worse; a leading one acts. Seismic combinations are run once
/// per pose of OPERATE and STOW, without wind. The set must outlive the result.
std::vector<FactoredCase> factored_cases(const loads::CombinationSet& set, const StateLoads& loads,
                                         Wanted wanted);

/// "1.35 G + 1.5 W + 0.75 S (snow)".
std::string case_text(const FactoredCase& factored, const StateLoads& loads);

/// Weight + wind, and weight + each other action, all with factor 1: when no set is named.
const loads::CombinationSet& plain_set();

}  // namespace focalframe::models
