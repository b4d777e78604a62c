#pragma once

/// One pose under any velocity pressure of given winds: everything is a sum of few basis columns, found once,
/// with weights that cost a triangular solve of the size of the module count. No factorisation per speed.
///
/// The rotations of the modules feed back on the wind's moment (twist feedback of models/wind_load.h):
/// theta(q) = (I - q T D)^-1 (theta_weight + q theta_wind). T times the modules' areas is brought to
/// triangular form once per pose; the slope of the moment coefficient only scales it, so every wind shares
/// it.

#include <Eigen/Core>
#include <limits>
#include <vector>

#include "models/row_model.h"
#include "models/wind_load.h"

namespace focalframe::models {

class PoseWinds {
 public:
  /// `winds`: pressures in them are ignored. Row and pose must outlive it.
  PoseWinds(const RowModel& row, const PoseModel& pose, std::vector<WindOnRow> winds);

  int winds() const { return static_cast<int>(winds_.size()); }
  const WindOnRow& wind(int k) const { return winds_[static_cast<std::size_t>(k)]; }

  /// Load amplitudes: the weight, one wind of 1 Pa each, the moment of one radian times one pascal of every
  /// module; #amplitudes x (1 + #winds + #modules).
  const Eigen::MatrixXd& basis() const { return basis_; }
  int weight_column() const { return 0; }

  /// What wind k at `pressure` [Pa] adds to the weight, as weights of the basis columns; zero for the other
  /// winds and the weight itself.
  Eigen::VectorXd mix(int k, double pressure) const;

  /// Load amplitudes of weight and wind k together.
  Eigen::VectorXd amplitudes(int k, double pressure) const;

  /// Velocity pressure at which wind k winds the row up [Pa]; infinity where its slope is not positive.
  double divergence_pressure(int k) const;
  double divergence_pressure_at_slope(double moment_slope) const;

 private:
  std::vector<WindOnRow> winds_;
  Eigen::MatrixXd basis_;
  Eigen::MatrixXcd schur_, vectors_;  ///< T diag(area width) = vectors schur vectors^H
  Eigen::MatrixXcd turn_;             ///< module rotations of weight and winds, in those vectors
  double greatest_eigenvalue_ = 0;    ///< of T diag(area width) [rad/Pa per slope]
};

}  // namespace focalframe::models
