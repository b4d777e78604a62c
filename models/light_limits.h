#pragma once

/// Greatest mean winds the optical limits allow in one pose, and the light caught on the way there.

#include <vector>

#include "models/optics_check.h"
#include "models/pose_winds.h"
#include "models/wind_limits.h"

namespace focalframe::models {

struct LightQuestion {
  const RowModel& row;
  const OpticsCheck& optics;
  const PoseModel& pose;
  const PoseWinds& winds;
  std::vector<int> patterns;  ///< winds that spread the same mean wind differently
  const LimitsInput& limits;
  AxisWind axis;
  double cap = 0;  ///< greatest mean speed looked at [m/s]
};

struct LightAnswer {
  std::vector<CriterionLimit> criteria;  ///< of the optical limits asked for
  std::vector<double> speed, intercept;  ///< worst pattern, ascending 10 min mean at the axis [m/s], [-]
};

/// All patterns are followed upwards together, a block of speeds at a time, until every limit is met with.
LightAnswer light_limits(const LightQuestion& question);

}  // namespace focalframe::models
