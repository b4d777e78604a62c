#pragma once

/// Linear buckling (K + factor * KG) x = 0 and second-order statics with the geometric stiffness of
/// fem/geometric.h.

#include <limits>
#include <stdexcept>
#include <vector>

#include "fem/statics.h"

namespace focalframe::fem {

struct BucklingMode {
  double factor = std::numeric_limits<double>::quiet_NaN();    ///< on the loads of the case [-]
  Eigen::MatrixXd shape;                                       ///< #nodes x 6, greatest displacement 1
  double residual = std::numeric_limits<double>::quiet_NaN();  ///< |K x + factor KG x| / |K x| [-]
  /// The count that proves the whole result complete: `counted` factors lie below `count_at`.
  double count_at = std::numeric_limits<double>::quiet_NaN();
  int counted = 0;
};

/// The lowest `count` positive load factors, ascending; fewer (or none) when no more lie below
/// `greatest_factor`. A count of negative pivots of K + factor KG has proved that none is missing. Members
/// must be divided where they buckle between their nodes: four pieces give the first factor to 0.1 %. Loads
/// of `constant` act all the time and are not multiplied.
std::vector<BucklingMode> buckling_modes(const Frame& frame, const LoadCase& load, int count,
                                         const LoadCase& constant = {}, double greatest_factor = 1e12);

/// The frame is past its stability limit under the load: no second-order answer exists.
class Unstable : public std::runtime_error {
 public:
  using std::runtime_error::runtime_error;
};

/// Equilibrium with the geometric stiffness of the forces that belong to it, found by repetition. End forces
/// are along the undeformed member axes and hold the second-order moments. Throws Unstable.
struct SecondOrder {
  Response response;
  int steps = 0;
  double change = std::numeric_limits<double>::quiet_NaN();  ///< of the last step, relative [-]
};
SecondOrder second_order(const Frame& frame, const LoadCase& load);

}  // namespace focalframe::fem
