#pragma once

/// L D L^T of a sparse symmetric matrix with the freedoms of one node kept together.

#include <Eigen/SparseCholesky>
#include <vector>

#include "fem/assembly.h"

namespace focalframe::fem {

class Factor {
 public:
  /// `group[i]` is the node of row i: the ordering works on nodes, which is far faster than on freedoms.
  Factor(const SparseMatrix& matrix, const std::vector<int>& group);

  /// False when a pivot was exactly zero: nothing else may be asked then.
  bool ok() const { return ok_; }
  /// Solutions for all columns of `b`.
  Eigen::MatrixXd solve(const Eigen::MatrixXd& b) const;
  /// Pivots in the order of the matrix's own rows.
  const Eigen::VectorXd& pivots() const { return pivots_; }
  int negative_pivots() const;

  /// x -> D^(1/2) L^T x and its inverse's parts, for a positive matrix A = (L D^(1/2)) (L D^(1/2))^T, rows in
  /// the factor's own order: y = lower_inverse(b) with b in the matrix's order, x = upper_inverse(y).
  Eigen::VectorXd lower_inverse(const Eigen::VectorXd& b) const;
  Eigen::VectorXd upper_inverse(const Eigen::VectorXd& y) const;

 private:
  template <int width>
  void solve_panel(const Eigen::MatrixXd& b, Eigen::Index first, Eigen::MatrixXd& x) const;

  bool ok_ = false;
  std::vector<int> place_;  ///< row of the matrix -> row of the factor
  SparseMatrix lower_;      ///< strictly lower part of L
  Eigen::VectorXd diagonal_, pivots_;
};

/// 1-norm condition estimate of D^(-1/2) A D^(-1/2), D = diag A (Hager 1984; from memory).
double condition_estimate(const SparseMatrix& matrix, const Factor& factor);

}  // namespace focalframe::fem
