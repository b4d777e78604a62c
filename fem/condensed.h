#pragma once

/// A frame condensed exactly onto a few of its freedoms (static condensation), for frames that are factored
/// once and then joined to others in many positions.
///
/// With the chosen freedoms held, u = held_response * a + joint_response * v, where a are the amplitudes of
/// the unit load columns and v the values of the chosen freedoms. Forces needed at the chosen freedoms: f =
/// stiffness * v - load * a, i.e. stiffness * v = (outside forces on the chosen freedoms) + load * a.

#include <Eigen/Core>
#include <vector>

#include "fem/assembly.h"
#include "fem/frame.h"

namespace focalframe::fem {

struct Freedom {
  int node = 0;
  int dof = 0;  ///< 0..5, frame axes
};

struct Condensed {
  std::vector<Freedom> freedoms;  ///< the kept ones, order of all rows below
  Eigen::MatrixXd stiffness;      ///< #freedoms x #freedoms, symmetric [N/m, N, N m]
  Eigen::MatrixXd load;           ///< #freedoms x #columns: condensed unit loads [N, N m]
  Eigen::MatrixXd
      held_response;  ///< (6 #nodes) x #columns: displacements with the kept freedoms held at zero
  Eigen::MatrixXd joint_response;  ///< (6 #nodes) x #freedoms: displacements per unit of each kept freedom
  double residual = 0;             ///< greatest relative residual over all columns [-]
  double smallest_pivot_ratio = 0;
  double condition_estimate = 0;
};

/// `loads` is (6 #nodes) x #columns. The frame's own supports and joints are kept; a chosen freedom must not
/// be fixed or eliminated by a support or joint. Throws Mechanism when the frame moves freely with the chosen
/// freedoms held.
Condensed condense(const Frame& frame, const std::vector<Freedom>& freedoms, const Eigen::MatrixXd& loads);

}  // namespace focalframe::fem
