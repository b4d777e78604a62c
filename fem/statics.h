#pragma once

/// Linear statics: factor once, solve any number of load cases.

#include <Eigen/Core>
#include <limits>
#include <memory>
#include <vector>

#include "fem/assembly.h"
#include "fem/frame.h"
#include "fem/load_case.h"
#include "fem/mechanism.h"

namespace focalframe::fem {

struct Response {
  Eigen::MatrixXd displacement;  ///< #nodes x 6 [m, rad]; empty = not computed
  Eigen::MatrixXd reaction;      ///< #nodes x 6, forces of supports and ground springs on the frame [N, N m]
  Eigen::MatrixXd end_force;     ///< #members x 12, member axes, forces on the member [N, N m]
  Eigen::MatrixXd joint_force;   ///< #joints x 6, the joint's axes, force on `node`; on `other` its opposite
  Eigen::MatrixXd spring_force;  ///< #springs x 6, the spring's axes, force on `node` [N, N m]
  double residual = std::numeric_limits<double>::quiet_NaN();  ///< |K u - f| / |f| over the kept freedoms [-]
};

/// Holds the factor of one frame. Throws Mechanism when the frame can move freely and std::invalid_argument
/// with the first fault of find_faults otherwise.
class StaticSolver {
 public:
  explicit StaticSolver(const Frame& frame);
  ~StaticSolver();
  StaticSolver(StaticSolver&&) noexcept;
  StaticSolver& operator=(StaticSolver&&) noexcept;

  Response solve(const LoadCase& load) const;
  /// All cases in one go, which is faster than one by one.
  std::vector<Response> solve(const std::vector<LoadCase>& loads) const;
  /// Full displacement vectors for given full load vectors, (6 #nodes) x #cases both; imposed displacements
  /// apply.
  Eigen::MatrixXd displacements(const Eigen::MatrixXd& loads) const;
  double smallest_pivot_ratio() const;  ///< pivot over original diagonal [-]
  double condition_estimate() const;    ///< 1-norm estimate of the diagonally scaled stiffness [-]

 private:
  struct Data;
  std::unique_ptr<Data> data_;
};

}  // namespace focalframe::fem
