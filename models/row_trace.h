#pragma once

/// The ray trace of a design's deformed row: exact rays on the skin that a check found, to confirm its
/// analytic intercept.

#include <cstdint>

#include "models/optics_check.h"
#include "models/ray_trace.h"

namespace focalframe::models {

struct RowTrace {
  TracedIntercept traced;                    ///< rays == 0: not asked for
  double analytic = not_given;               ///< [-]
  double low = not_given, high = not_given;  ///< 99.9 % confidence interval of the trace [-]
  /// The analytic value lies within the interval, widened by what first-order misses may be wrong by.
  bool agrees = false;
  double allowance = not_given;  ///< that widening: misses longer and shorter by 0.5 % [-]
};

/// Mirror points move as at the samples: linear from rib to rib plus the panel's own line, linear between
/// rows; the receiver linear between stations. Rays start evenly over the mirror, gaps left out. Same seed,
/// same result. Throws std::invalid_argument unless rays > 0.
RowTrace trace_row(const OpticsCheck& check, const OpticalMotion& motion, std::int64_t rays,
                   std::uint64_t seed = 1);

}  // namespace focalframe::models
