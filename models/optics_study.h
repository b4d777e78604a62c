#pragma once

/// One state looked at closely: what each part and each cause costs, what the sensor's kind is worth, the
/// error budget, and the bounds that play, friction and a pause in tracking put on it.

#include <string>
#include <vector>

#include "models/error_budget.h"
#include "models/optics_check.h"
#include "models/shape_fit.h"

namespace focalframe::models {

/// Light caught with each way of aiming [-].
struct AimChoices {
  SensorReadings readings;  ///< [rad]
  double none = not_given, encoder = not_given, inclinometer = not_given, sun = not_given;
  double row_mean = not_given;
};

/// Backlash and friction leave the row anywhere within a band; modelled twist does not know of them.
struct PlayBound {
  double drive = 0, joint = 0;   ///< half of the full play [rad]
  double friction_twist = 0;     ///< greatest turn of a module by all bearings' friction together [rad]
  double farthest = 0;           ///< greatest aim error of a module from all three [rad]
  double intercept = not_given;  ///< least light with all three to one side, the worse side [-]
  double torque_weight = not_given, torque_all = not_given;         ///< of the drive on the row [N m]
  bool reverses() const { return torque_weight * torque_all < 0; }  ///< the play is crossed in this wind
};

struct OpticsStudy {
  bool made = false;
  double perfect = not_given;        ///< caught by the undeformed row at these samples [-]
  std::vector<Attribution> modules;  ///< parts as in OpticalResult::attribution
  Attribution causes;                ///< "weight" and "wind", the correction as chosen with both acting
  Attribution by_weight;             ///< parts of the weight alone, aimed anew for it
  AimChoices aims;
  ErrorBudget budget;  ///< random lines first, then the parts of the miss as systematic ones
  PlayBound play;
  double re_aim_least = not_given;  ///< the light to be kept: the limit, or nine tenths of what is caught [-]
  double re_aim_angle = not_given;  ///< how far the sun may move on [rad]
  double re_aim_time = not_given;   ///< at 15 deg an hour [s]
  int module = 0;                   ///< the one that catches least; of it:
  TroughShape fit;                  ///< best-fit parabola of the whole module, panels included
  double slope_radial = not_given;  ///< root of transverse^2 + longitudinal^2 after the fit [rad]
  double end_loss = not_given;      ///< past the row's end at the stated incidence, not in the intercept [-]
  double shade_receiver = not_given;  ///< receiver's outer width over the aperture, not in the intercept [-]
  double behind_posts = not_given;    ///< length of the receiver behind its posts, not in the intercept [-]
  std::string panel_method;
};

/// `weight`: amplitudes of the weight alone; `all`: of the state.
OpticsStudy study_optics(const OpticsCheck& check, const TroughDesign& design, const PoseModel& pose,
                         const Eigen::VectorXd& weight, const Eigen::VectorXd& all);

/// The sun's apparent motion [rad/s].
inline constexpr double sun_rate = 15.0 * 3.14159265358979323846 / 180.0 / 3600.0;

}  // namespace focalframe::models
