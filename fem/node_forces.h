#pragma once

#include "fem/statics.h"

namespace focalframe::fem {

/// Shares K u - f (all freedoms) out between supports and joints: sets reaction and joint_force.
void share_unbalanced_force(const Frame& frame, const Eigen::VectorXd& unbalanced, Response& response);
/// Sets spring_force and adds ground springs to the reactions. `u`: all freedoms.
void add_spring_forces(const Frame& frame, const Eigen::VectorXd& u, Response& response);

}  // namespace focalframe::fem
