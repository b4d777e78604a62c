#pragma once

/// Natural frequencies and mode shapes, K x = omega^2 M x with consistent member mass.

#include <limits>
#include <vector>

#include "fem/frame.h"

namespace focalframe::fem {

struct Mode {
  double frequency = std::numeric_limits<double>::quiet_NaN();  ///< [Hz]; 0 for a free motion
  Eigen::MatrixXd shape;  ///< #nodes x 6; greatest displacement 1 (greatest rotation, if nothing moves)
  double modal_mass = std::numeric_limits<double>::quiet_NaN();  ///< x^T M x for this shape [kg]
  Vec3 effective_mass = Vec3::Constant(std::numeric_limits<double>::quiet_NaN());  ///< along x, y, z [kg]
  double residual =
      std::numeric_limits<double>::quiet_NaN();  ///< |K x - omega^2 M x| / |(omega^2 + s) M x| [-]
  /// The count that proves the whole result complete: `counted` frequencies lie below `count_at` [Hz].
  double count_at = std::numeric_limits<double>::quiet_NaN();
  int counted = 0;
};

/// The lowest `count` modes, ascending; fewer when the frame has fewer freedoms with mass. Frames that move
/// freely are allowed: their free motions come first with frequency 0. A count of negative pivots of
/// K - omega^2 M has proved that none is missing. Throws std::invalid_argument (first fault, or no mass at
/// all), Mechanism (a part without mass moves freely) and std::runtime_error (no convergence).
std::vector<Mode> natural_modes(const Frame& frame, int count);

}  // namespace focalframe::fem
