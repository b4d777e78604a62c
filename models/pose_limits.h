#pragma once

/// Solves one pose for the greatest wind of every criterion. The row is condensed already: a pose costs one
/// small dense solve (PoseModel) whatever the number of winds, speeds and criteria.

#include <functional>
#include <string>
#include <vector>

#include "loads/coefficients.h"
#include "models/member_limits.h"
#include "models/optics_check.h"
#include "models/pose_winds.h"
#include "models/row_model.h"
#include "models/row_winds.h"
#include "models/strength_check.h"
#include "models/wind_limits.h"

namespace focalframe::models {

/// Gusts above this are not looked at: no place on land sees them [m/s] (judgement).
inline constexpr double greatest_gust = 100;
/// Bounded step in which a criterion is followed upwards [m/s of gust] (judgement; brute force over fine
/// steps agrees in the tests).
inline constexpr double gust_step = 2.0;

struct PoseSolution {
  std::vector<PoseLimit> limits;  ///< kinds asked for, both sides
  std::vector<LightCurve> light;  ///< both sides, when OPERATE was asked for
  /// Least 10 min mean at the axis at which the drive's load changes sign (play is crossed), sides and
  /// patterns of OPERATE; infinity when it never does [m/s].
  double reversal = no_limit;
};

/// Row, design and table must outlive it. Thread-safe once made.
class PoseLimits {
 public:
  PoseLimits(const RowModel& row, const TroughDesign& design, const loads::CoefficientTable& table);

  /// `light` = false leaves the optical criteria of OPERATE out.
  PoseSolution solve(double elevation, const std::vector<StateKind>& kinds, bool light = true) const;

  const AxisWind& axis() const { return axis_; }

 private:
  struct Side;
  /// Share of something from the weights of the basis columns.
  using Use = std::function<double(const Eigen::VectorXd& mix)>;

  void prepare(Side& side, const std::vector<StateKind>& kinds) const;
  void solve_side(Side& side, const std::vector<StateKind>& kinds, bool light, PoseSolution& out) const;
  double pressure(double gust) const;  ///< that strength and drive are loaded with [Pa]
  double wind_up_gust(const Side& side) const;
  std::vector<GustWind> gusts_of(const Side& side, StateKind kind) const;
  CriterionLimit empty(LimitKey key) const;
  CriterionLimit first_of(const Side& side, StateKind kind, LimitKey key, double limit, const Use& use) const;
  void add_wind_up(const Side& side, PoseLimit& limit) const;
  void add_light(const Side& side, PoseLimit& limit, PoseSolution& out) const;
  void add_drive(const Side& side, PoseLimit& limit) const;
  double reversal(const Side& side) const;
  void add_joints(const Side& side, PoseLimit& limit) const;
  void add_feet(const Side& side, PoseLimit& limit) const;
  void add_strength(Side& side, PoseLimit& limit) const;

  /// Torque of a joint between modules about the rotation axis from the end forces of the tube beside it.
  struct Joint {
    int first_row = 0;  ///< of the end's six forces among all end forces
    double offset = 0;  ///< tube above the rotation axis [m]
    std::string name;
  };

  const RowModel& row_;
  const TroughDesign& design_;
  RowWinds winds_;
  OpticsCheck optics_;
  StrengthRule rule_;
  bool strength_judged_, peak_;
  AxisWind axis_;
  double moving_torque_;
  std::vector<Joint> joints_;
};

/// Torque that can move the row: the drive's rating, or what a person brings through crank and gear; NaN when
/// neither is given [N m].
double moving_capacity(const TroughDesign& design);

}  // namespace focalframe::models
