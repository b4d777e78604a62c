#include "models/least_squares.h"

#include <Eigen/SVD>
#include <limits>

namespace focalframe::models {

LeastSquares least_squares(const Eigen::MatrixXd& a, const Eigen::VectorXd& b) {
  Eigen::VectorXd scale = a.colwise().norm();
  for (double& length : scale)
    if (!(length > 0)) length = 1;
  Eigen::JacobiSVD<Eigen::MatrixXd> svd(a * scale.cwiseInverse().asDiagonal(),
                                        Eigen::ComputeThinU | Eigen::ComputeThinV);
  svd.setThreshold(1e-8);
  const auto& values = svd.singularValues();
  const double least = values(values.size() - 1);
  const double condition = least > 0 ? values(0) / least : std::numeric_limits<double>::infinity();
  return {svd.solve(b).cwiseQuotient(scale), static_cast<int>(svd.rank()), condition};
}

}  // namespace focalframe::models
