#pragma once

/// Element matrices summed over a frame. Rows and columns are 6 * node + dof, nothing is removed.

#include <Eigen/SparseCore>
#include <vector>

#include "fem/frame.h"
#include "fem/load_case.h"

namespace focalframe::fem {

using SparseMatrix = Eigen::SparseMatrix<double>;

/// Members and springs, without supports and joints; symmetric, full storage [N/m, N, N m].
SparseMatrix assemble_stiffness(const Frame& frame);
/// Members (consistent) and point masses [kg, kg m, kg m^2].
SparseMatrix assemble_mass(const Frame& frame);
/// One column per case: equivalent node forces [N, N m].
Eigen::MatrixXd assemble_loads(const Frame& frame, const std::vector<LoadCase>& cases);

/// (12 #members) x (6 #nodes): end forces on the members from node freedoms, member axes.
SparseMatrix assemble_end_forces(const Frame& frame);
/// (12 #members) x #cases: the fixed-end part to add.
Eigen::MatrixXd assemble_fixed_end_forces(const Frame& frame, const std::vector<LoadCase>& cases);

/// Supports and joints as one exact map: full freedoms = map * kept + shift.
struct FreedomMap {
  SparseMatrix map;       ///< (6 #nodes) x #kept
  Eigen::VectorXd shift;  ///< imposed displacements, (6 #nodes)
  std::vector<int> kept;  ///< column -> the full freedom that it is
};
/// Throws std::invalid_argument when supports and joints contradict each other, and Mechanism never.
FreedomMap freedom_map(const Frame& frame);
/// The same, but the full freedoms in `masters` are never eliminated by a joint. Throws std::invalid_argument
/// when a support fixes one of them or a joint holds two of them together.
FreedomMap freedom_map(const Frame& frame, const std::vector<int>& masters);

}  // namespace focalframe::fem
