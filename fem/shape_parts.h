#pragma once

/// What a mode or buckling shape is made of: which parts bend, twist or stretch, and whether all sways.

#include <array>
#include <string>
#include <vector>

#include "fem/frame.h"

namespace focalframe::fem {

enum class Strain { bending, twist, stretch, give };  ///< give: of springs, end springs

struct ShapePart {
  std::string part;  ///< group of the members, or the member's or spring's own name without one
  Strain how = Strain::bending;
  double share = 0;  ///< of the shape's strain energy [-]
};

struct ShapeParts {
  std::vector<ShapePart> parts;  ///< descending, down to 1 % of the energy; empty for a rigid motion
  /// Mean displacement along the members over its root mean square: near 1 when all moves one way [-].
  Vec3 sway = Vec3::Zero();
  int node = -1,
      dof = 0;  ///< greatest displacement (rotation, if nothing is displaced) and its main direction
};

/// "sways along y; bending of column 82 %, give of drive 12 %; most at head, along y". `ways`: words for
/// motion along x, y, z.
std::string shape_words(const Frame& frame, const ShapeParts& parts, const std::array<std::string, 3>& ways);

/// `shape` is #nodes x 6, as in fem/modes.h.
ShapeParts shape_parts(const Frame& frame, const Eigen::MatrixXd& shape);

}  // namespace focalframe::fem
