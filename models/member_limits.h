#pragma once

/// The gust at which the first member of a row reaches its allowed stress, in one pose with the wind from one
/// side.
///
/// Without twist feedback every end force is affine in the velocity pressure and the stress bound convex, so
/// a member that is below its limit at two speeds is below it between them. Feedback bends this a little:
/// members that come within a tenth of their limit at a step are followed on their own.

#include <Eigen/Core>
#include <functional>
#include <vector>

#include "models/pose_winds.h"
#include "models/row_model.h"
#include "models/strength_check.h"
#include "models/wind_limits.h"

namespace focalframe::models {

/// One wind of a PoseWinds that strength and drive are asked about.
struct GustWind {
  int wind = 0;
  double offset = 0;  ///< gust angle [rad]
  Spread spread = Spread::linear;
};

class MemberLimits {
 public:
  /// All must outlive it. `gathered`: size and dynamic factor on the drive pylon.
  MemberLimits(const RowModel& row, const PoseModel& pose, const PoseWinds& winds, double gathered,
               double on_yield);

  /// 12 end forces per member and per basis column of the winds.
  const Eigen::MatrixXd& ends() const { return ends_; }
  /// The 12 end forces of the post of stand k, likewise; without the size factor.
  const Eigen::MatrixXd& stand(int k) const { return stands_[static_cast<std::size_t>(k)]; }

  struct Question {
    std::vector<GustWind> gusts;
    std::vector<ActionFactors> factors;
    double cap = 0;                          ///< greatest gust looked at [m/s]
    std::function<double(double)> pressure;  ///< of a gust [m/s] -> [Pa]
  };
  /// gust, part, spread and gust angle; infinity when no member reaches its limit up to the cap.
  CriterionLimit first(const Question& question) const;

 private:
  struct Follow {
    int part = 0, gust = 0;  ///< member number, or members + stand number
    ActionFactors factors;
    double used = 0;
  };
  double used(int part, const ActionFactors& f, const Eigen::VectorXd& mix) const;
  void look(const Question& question, double speed, std::vector<Follow>& out) const;
  std::string name(int part) const;

  const RowModel& row_;
  const PoseWinds& winds_;
  double gathered_;
  Eigen::MatrixXd ends_;
  std::vector<Eigen::MatrixXd> stands_;
  std::vector<double> allowed_;  ///< per member [Pa]; 0 = not known
  std::vector<double> stand_allowed_;
};

}  // namespace focalframe::models
