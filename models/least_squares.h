#pragma once

/// Least squares that says how well its unknowns can be told apart.

#include <Eigen/Core>

namespace focalframe::models {

struct LeastSquares {
  Eigen::VectorXd answer;
  int rank = 0;          ///< unknowns that can be told apart
  double condition = 0;  ///< greatest over least singular value, infinite at rank 0
};

/// Minimises |a x - b| by singular values. Columns are first scaled to equal length, so rank and condition do
/// not depend on the units of the unknowns; singular values below 1e-8 of the greatest count as none, and
/// unknowns that cannot be told apart then share the answer of least scaled size.
LeastSquares least_squares(const Eigen::MatrixXd& a, const Eigen::VectorXd& b);

}  // namespace focalframe::models
