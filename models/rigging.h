#pragma once

/// At which elevation the panels are best set true: gravity is rigged out there and comes back elsewhere.

#include <vector>

#include "models/optics_check.h"

namespace focalframe::models {

struct RiggingChoice {
  double set_true = not_given;  ///< [rad]
  double least = not_given;     ///< light caught in the worst of the poses, weight alone [-]
  double mean = not_given;      ///< mean of the poses [-]
};

struct Rigging {
  RiggingChoice now;                 ///< as the design says; set_true NaN: set unloaded
  RiggingChoice best;                ///< the greatest `least`, to 1 deg
  std::vector<RiggingChoice> tried;  ///< every 15 deg over the poses
};

/// `poses`: elevations with light, in the design's tracking range. Weight alone: wind cannot be rigged out.
Rigging best_rigging(const OpticsCheck& check, const std::vector<double>& poses, double set_true_now);

}  // namespace focalframe::models
