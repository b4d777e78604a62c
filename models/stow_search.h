#pragma once

/// Ways to stow, the best pose to park at, and whether survival, turning and operation stand in order. Parts
/// of models/limit_map.h.

#include <string>
#include <vector>

#include "models/limit_map.h"

namespace focalframe::models {

struct PoseTask {
  double elevation = 0;
  std::vector<StateKind> kinds;
};
/// One solution per task, on the machine's cores.
std::vector<PoseSolution> solve_poses(const PoseLimits& solver, const std::vector<PoseTask>& tasks,
                                      bool light = true);

/// Least limit of a kind over the poses from one elevation to another that the map holds.
StateLimit least_limit(const std::vector<PoseLimit>& map, StateKind kind, double from, double to,
                       bool safety_only);

/// Fills turning, stow, ways, chosen and best; adds the poses it looks at to the map's list of limits. The
/// best stow pose is the one that bears the greatest gust with its tolerance; a pose whose way bears less
/// than the design's own way is passed over; ties within 1 % go to the nearer one.
void find_stow(const PoseLimits& solver, const TroughDesign& design, bool search, WindLimits& out);

/// What is wrong with survival >= turning >= operate, and what stands behind it.
std::vector<std::string> order_remarks(const TroughDesign& design, const WindLimits& limits);

}  // namespace focalframe::models
