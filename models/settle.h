#pragma once

/// Brings a first design to where it meets its own limits, by sizes and ratings alone.

#include <string>
#include <vector>

#include "loads/coefficients.h"
#include "models/assessment.h"
#include "models/design.h"

namespace focalframe::models {

struct Settled {
  TroughDesign design;
  std::vector<Criterion> missed;  ///< limits that still do not hold
  int rounds = 0;                 ///< checks that were run
};

/// Checks the design again and again; every missed limit lifts the drive's rating to what is needed or takes
/// the parts it points at one size up the catalogue (see models/cure_ladders.h), at most `most` times.
Settled settle(const TroughDesign& design, const loads::CoefficientTable& table, int most = 16);

}  // namespace focalframe::models
