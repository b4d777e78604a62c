#pragma once

/// An antenna whose panels are set true at one elevation: what gravity leaves of its surface elsewhere, and
/// the elevation at which to set them.

#include <limits>
#include <span>
#include <vector>

#include "models/antenna.h"

namespace focalframe::models {

/// Displacements of the reflector's points under 1 g along y and along z of the collector axes, linear
/// between.
struct AntennaGravity {
  DishSamples along_y, along_z;  ///< same x, y, weight in both
};

/// Rms half path error after the best fit at `elevation`, the panels set true at `rigged` [m]. Both from the
/// horizon; at the zenith gravity pulls along -z, at the horizon along +y [rad].
double gravity_half_path(const Parabola& parabola, const AntennaGravity& gravity, double elevation,
                         double rigged, DishFit fit = DishFit::no_shift);

struct AntennaRigging {
  double elevation = std::numeric_limits<double>::quiet_NaN();  ///< [rad]
  double worst = std::numeric_limits<double>::quiet_NaN();      ///< rms half path error, worst elevation [m]
};

/// The setting with the least worst error over these elevations, to 0.1 deg. Throws std::invalid_argument on
/// an empty list.
AntennaRigging best_rigging(const Parabola& parabola, const AntennaGravity& gravity,
                            std::span<const double> elevations, DishFit fit = DishFit::no_shift);

}  // namespace focalframe::models
