#pragma once

/// Stress, drive loads and ground reactions of a dish over all states: who is worst, where, under which wind.

#include <array>
#include <map>
#include <string>
#include <vector>

#include "models/dish_design.h"
#include "models/dish_model.h"
#include "models/dish_states.h"
#include "models/strength_check.h"

namespace focalframe::models {

/// Worst use of one group of members.
struct DishUse {
  double value = 0;    ///< von Mises bound [Pa], or compression [N]
  double allowed = 0;  ///< 0 = yield not known
  double used = 0;     ///< value / allowed
  std::string part;
  DishState state;
  Spread spread = Spread::linear;
};

/// A force or torque with where it came from.
struct DishForce {
  double value = 0;  ///< signed [N] or [N m]
  DishState state;
  Spread spread = Spread::linear;
};

/// What the elevation drive feels at one elevation.
struct DriveAtPose {
  double arm = 0, length = 0;      ///< [m]; a slewing drive has arm 1 and no length
  double weight = 0;               ///< push or torque of the weight alone
  double moving = 0, holding = 0;  ///< greatest magnitude, OPERATE and TURNING; all states
  double back_driving = 0;         ///< greatest push against the drive while it rests
  double buckling = not_given;     ///< Euler load at this length [N]
};

struct DishStrengthResult {
  std::map<std::string, DishUse> stress;      ///< per group
  std::map<std::string, DishUse> buckling;    ///< struts and legs, curves of models/member_buckling.h
  DishForce moving, holding;                  ///< of the elevation drive: push [N] or torque [N m]
  DishForce rod_compression;                  ///< push nearest to its Euler load
  double rod_share = 0;                       ///< there, push over Euler load
  DishForce azimuth_moving, azimuth_holding;  ///< about the azimuth axis [N m]
  DishForce bearing;                          ///< greatest radial force of an elevation bearing [N]
  std::map<double, DriveAtPose> drive;        ///< by elevation
  std::array<DishForce, 6> greatest,
      least;              ///< reaction at ground level under the axis, world: force, moment
  DishForce overturning;  ///< greatest level moment there [N m]
  DishForce uplift;       ///< greatest pull on one foot [N]
};

class DishStrength {
 public:
  DishStrength(const DishModel& model, const DishDesign& design);

  struct Loads {
    DishState state;
    Eigen::VectorXd weight;
    Eigen::MatrixXd wind;  ///< one column per variant
    std::vector<Spread> spread;
    double gathered = 1;  ///< size and dynamic factor on drives, yoke and base
  };
  void add(const DishPose& pose, const Loads& loads);
  const DishStrengthResult& result() const { return result_; }
  const StrengthRule& rule() const { return rule_; }

 private:
  struct Column {
    double length = 0, resistance = 0;  ///< 0 = not judged
  };
  void add_members(const fem::Frame& frame, const std::vector<Column>& columns, const Eigen::MatrixXd& weight,
                   const Eigen::MatrixXd& wind, double gathered, const Loads& loads);
  void add_drive(const DishPose& pose, const Loads& loads);
  void add_azimuth(const DishPose& pose, const Loads& loads);
  void add_ground(const DishPose& pose, const Loads& loads);
  const std::vector<ActionFactors>& factors(StateKind kind) const;

  const DishModel& model_;
  StrengthRule rule_;
  ActuatorInput rod_;
  double friction_ = 0;
  std::vector<Column> body_columns_, no_columns_;
  DishStrengthResult result_;
};

}  // namespace focalframe::models
