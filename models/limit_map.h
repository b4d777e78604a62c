#pragma once

/// The greatest winds over all poses and both sides, what follows for every kind of state, and where to park.

#include <string>
#include <vector>

#include "loads/coefficients.h"
#include "models/pose_limits.h"
#include "models/wind_limits.h"

namespace focalframe::models {

/// Least limit of one kind of state over its poses.
struct StateLimit {
  StateKind kind = StateKind::operate;
  double from = not_given, to = not_given;  ///< poses [rad]
  bool judged = false;                      ///< a pose with a criterion was found
  bool covered = true;                      ///< the table knows all its poses
  double gust = no_limit;                   ///< 3 s gust at the axis [m/s]
  double asked = not_given;                 ///< gust the design asks for [m/s]
  State at;                                 ///< governing pose
  CriterionLimit governing;
  CriterionLimit next;  ///< what would govern were the governing criterion lifted; gust infinite if nothing
  State next_at;
  bool holds() const { return !(asked > gust); }
};

/// One way from a tracking pose to stow, every pose between included.
struct Way {
  double from = not_given, to = not_given;  ///< [rad]
  double time = not_given;                  ///< [s]; NaN without a turning rate
  StateLimit limit;
};

/// A pose to park at, its tolerance included.
struct StowPose {
  double elevation = not_given;  ///< [rad]
  StateLimit parked;
  Way way;  ///< the worst one to it from the tracking range
};

struct WindLimits {
  AxisWind axis;
  double mapped_from = not_given, mapped_to = not_given;  ///< poses of the map [rad]
  std::vector<double> elevations;                         ///< of the map, ascending [rad]
  std::vector<PoseLimit> map;                             ///< every kind, pose and side
  std::vector<LightCurve> light;                          ///< tracking poses, both sides
  StateLimit operate, operate_safe;                       ///< all criteria; those that break something
  StateLimit turning, stow, stuck;
  std::vector<Way> ways;  ///< to the stow pose: from either end of tracking, and round the other way
  StowPose chosen, best;  ///< the design's stow pose; the best found
  double drive_reversal = not_given;  ///< least mean speed at which the drive's load changes sign [m/s]
  std::vector<std::string> order;     ///< what is wrong with survival >= turning >= operate, explained
};

struct MapOptions {
  bool whole = true;                    ///< false: only the poses that OPERATE and TURNING need
  bool light = true;                    ///< false: without the optical criteria
  std::vector<double> elevations = {};  ///< instead of map_elevations [rad]
};

/// Deterministic for any number of threads.
WindLimits wind_limits(const RowModel& row, const TroughDesign& design, const loads::CoefficientTable& table,
                       const MapOptions& options = {});

/// nullptr when that pose was not looked at.
const PoseLimit* find_pose(const std::vector<PoseLimit>& map, StateKind kind, double elevation,
                           double wind_from);

/// Greatest gust at the axis [m/s] of a pose for wind from any direction (psi of loads/pose.h).
double gust_from(const PoseLimit& side, double wind_from);

/// Poses the map is made of: the drive's range (else what the states span) at equal steps, at least 37, with
/// the ends of tracking and stow added.
std::vector<double> map_elevations(const TroughDesign& design);

}  // namespace focalframe::models
