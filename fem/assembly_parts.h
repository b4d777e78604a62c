#pragma once

/// Assembly from elements that are already made: what the public functions of fem/assembly.h and the solvers
/// share.

#include "fem/assembly.h"
#include "fem/element.h"

namespace focalframe::fem {

using Triplets = std::vector<Eigen::Triplet<double>>;

SparseMatrix assemble_stiffness(const Frame& frame, const std::vector<Element>& elements);
SparseMatrix assemble_mass(const Frame& frame, const std::vector<Element>& elements);
SparseMatrix assemble_end_forces(const Frame& frame, const std::vector<Element>& elements);

/// What one load case does: node forces over all freedoms, and the fixed-end part of the end forces.
struct AssembledLoads {
  Eigen::MatrixXd node_force;       ///< (6 #nodes) x #cases [N, N m]
  Eigen::MatrixXd fixed_end_force;  ///< (12 #members) x #cases, member axes [N, N m]
};
AssembledLoads assemble_loads(const Frame& frame, const std::vector<Element>& elements,
                              const std::vector<LoadCase>& cases);

/// Relative motion of a spring (its own axes) per node freedoms of `node` (first six) and `other` (last six,
/// zero for a spring to ground).
Mat6x12 spring_motion(const Frame& frame, const Spring& spring);

}  // namespace focalframe::fem
