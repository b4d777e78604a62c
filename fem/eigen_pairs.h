#pragma once

/// Greatest eigenvalues of A x = mu B x, A symmetric, B symmetric positive definite.

#include "fem/factor.h"

namespace focalframe::fem {

struct EigenPairs {
  Eigen::VectorXd value;   ///< descending
  Eigen::MatrixXd vector;  ///< columns, x^T B x = 1
  double place = 0;        ///< where the count of pivots was made
  int counted = 0;         ///< values above `place` by that count: what the search found there
};

/// The `count` greatest values above `floor` > 0 (fewer when there are fewer). A count of negative pivots of
/// mu B - A proves that none was skipped, repeated values included; std::runtime_error when that cannot be
/// reached. `group`: node of each row.
EigenPairs greatest_pairs(const SparseMatrix& A, const SparseMatrix& B, const Factor& factor_of_B,
                          const std::vector<int>& group, int count, double floor);

}  // namespace focalframe::fem
