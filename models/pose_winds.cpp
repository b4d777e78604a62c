#include "models/pose_winds.h"

#include <Eigen/Eigenvalues>
#include <algorithm>
#include <utility>

namespace focalframe::models {

using Eigen::MatrixXd;
using Eigen::VectorXd;

PoseWinds::PoseWinds(const RowModel& row, const PoseModel& pose, std::vector<WindOnRow> winds)
    : winds_(std::move(winds)) {
  const int modules = row.columns().modules, count = this->winds();
  basis_ = MatrixXd::Zero(row.columns().all(), 1 + count + modules);
  basis_.col(0) = weight_amplitudes(row, pose.elevation);
  for (int k = 0; k < count; ++k) basis_.col(1 + k) = wind_amplitudes(row, pose.elevation, wind(k));
  VectorXd gain(modules);
  for (int m = 0; m < modules; ++m) {
    const int column = row.columns().basis(m, Pattern::linear);
    basis_(column, 1 + count + m) = 1 / row.integral(column, m).moment;
    gain[m] = row.module_area(m) * row.collector().width;
  }
  const Eigen::ComplexSchur<Eigen::MatrixXcd> schur(
      MatrixXd(pose.twist_gain * gain.asDiagonal()).cast<std::complex<double>>());
  schur_ = schur.matrixT();
  vectors_ = schur.matrixU();
  greatest_eigenvalue_ = schur_.diagonal().real().maxCoeff();
  turn_ = vectors_.adjoint() *
          row.evaluate(row.module_turn, pose, basis_.leftCols(1 + count)).cast<std::complex<double>>();
}

VectorXd PoseWinds::mix(int k, double pressure) const {
  VectorXd out = VectorXd::Zero(basis_.cols());
  out[1 + k] = pressure;
  const double loop = pressure * wind(k).moment_slope;
  if (loop == 0) return out;
  Eigen::VectorXcd turn = turn_.col(0) + pressure * turn_.col(1 + k);
  Eigen::MatrixXcd system = -loop * schur_;
  system.diagonal().array() += 1;
  system.triangularView<Eigen::Upper>().solveInPlace(turn);
  out.tail(schur_.rows()) = loop * (vectors_ * turn).real();
  return out;
}

VectorXd PoseWinds::amplitudes(int k, double pressure) const {
  return basis_.col(0) + basis_ * mix(k, pressure);
}

double PoseWinds::divergence_pressure(int k) const {
  return divergence_pressure_at_slope(wind(k).moment_slope);
}

double PoseWinds::divergence_pressure_at_slope(double slope) const {
  const double loop = slope * greatest_eigenvalue_;
  return loop > 0 ? 1 / loop : std::numeric_limits<double>::infinity();
}

}  // namespace focalframe::models
