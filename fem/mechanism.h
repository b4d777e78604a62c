#pragma once

#include <stdexcept>
#include <string>

namespace focalframe::fem {

/// The frame can move without deforming: no solution exists. what() is a sentence a user can act on.
class Mechanism : public std::runtime_error {
 public:
  Mechanism(int node_, int dof_, double pivot_ratio_, const std::string& text)
      : std::runtime_error(text), node(node_), dof(dof_), pivot_ratio(pivot_ratio_) {}
  int node;            ///< the node that moves most
  int dof;             ///< 0..5, its strongest direction
  double pivot_ratio;  ///< pivot over original diagonal; below 1e-7 counts as a mechanism
};

}  // namespace focalframe::fem
