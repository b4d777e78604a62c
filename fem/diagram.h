#pragma once

/// What happens between a member's ends: forces, motions and their extremes, exact for the shear-flexible
/// member under the loads of fem/load_case.h.

#include <limits>

#include "fem/statics.h"

namespace focalframe::fem {

/// Stress resultants at fraction xi, member axes [N, N m]. At a point load: the value just behind it (at
/// xi = 1: just before the end).
Resultants resultants_at(const Frame& frame, const LoadCase& load, const Response& response, int member,
                         double xi);

/// Displacement and rotation of the member's axis at fraction xi, frame axes [m, rad], loads on the member
/// included. `of_section` gives the rotation of the cross-section instead, which differs by the shear angle.
Vec6 deflection_at(const Frame& frame, const LoadCase& load, const Response& response, int member, double xi,
                   bool of_section = false);

struct Extreme {
  double at = std::numeric_limits<double>::quiet_NaN();     ///< fraction of the length
  double value = std::numeric_limits<double>::quiet_NaN();  ///< [N m] or [m]
};

/// Greatest and least value inside one member and where they are.
struct Extremes {
  Extreme most_My, least_My, most_Mz, least_Mz;  ///< [N m]
  /// Deflection along member y and z from the straight line between the displaced ends [m].
  Extreme most_y, least_y, most_z, least_z;
};
Extremes extremes(const Frame& frame, const LoadCase& load, const Response& response, int member);

/// Fractions at which loads begin, end or act, with 0 and 1; between them all diagrams are smooth.
std::vector<double> load_breaks(const LoadCase& load, int member);

}  // namespace focalframe::fem
