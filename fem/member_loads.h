#pragma once

/// Loads on members as forces that hold the member's inner ends.

#include <vector>

#include "fem/element.h"
#include "fem/load_case.h"

namespace focalframe::fem {

/// Throws std::invalid_argument when a load names a node or member that does not exist or a place outside it.
void require_sound_loads(const Frame& frame, const LoadCase& load);

/// For each member the part of the case that acts on it (gravity too): for loops over all members, which
/// would else search the whole case each time.
std::vector<LoadCase> loads_by_member(const Frame& frame, const LoadCase& load);

/// One column per member: forces that hold the inner ends against everything in `load` that acts on it,
/// member axes [N, N m]. Exact for the shear-flexible span.
Eigen::MatrixXd held_end_forces(const Frame& frame, const std::vector<Element>& elements,
                                const LoadCase& load);

/// The same for the part from fraction a to b of one member, taken as a span of its own. A point load exactly
/// at b is left to the next part, unless b = 1.
Vec12 held_part_forces(const Frame& frame, int member, const Mat3& axes, const LoadCase& load, double a,
                       double b);

}  // namespace focalframe::fem
