#pragma once

/// A collector in one pose as one frame in world axes: body, stands and joints together, nothing condensed.
/// For modes, for stability, and to prove the condensed way right.

#include "models/collector.h"

namespace focalframe::models {

struct FullFrame {
  fem::Frame frame;         ///< world axes, origin at ground level under the row's first end
  int first_body_node = 0;  ///< body node n is frame node first_body_node + n; likewise for members
  int first_body_member = 0;
};

FullFrame full_frame(const Collector& collector, double elevation);

/// Loads on the body given in collector axes, (6 #body nodes), as node loads of the full frame.
std::vector<fem::NodeLoad> in_world(const FullFrame& full, const Eigen::VectorXd& body_loads,
                                    double elevation);

}  // namespace focalframe::models
