#pragma once

/// Stress, drive torque and ground reactions over all states: who is worst, where, under which wind.

#include <Eigen/Core>
#include <array>
#include <map>
#include <string>
#include <vector>

#include "models/member_buckling.h"
#include "models/row_model.h"
#include "models/states.h"
#include "models/wind_load.h"

namespace focalframe::models {

/// Factors on permanent and wind actions.
struct ActionFactors {
  double permanent = 1, wind = 1;
};

/// What a strength rule asks: factors per kind of state and a factor on the yield stress.
struct StrengthRule {
  std::string name;
  std::vector<ActionFactors> usual, accidental;  ///< of weight and leading wind; accidental: STUCK
  double on_yield = 1;                           ///< allowed stress over yield
  std::string text;                              ///< in words, with edition and confidence
  loads::CombinationSet set;                     ///< every combination
};
/// The design's set of combinations, or its plain factor; with neither given, unfactored against yield (not
/// judged).
StrengthRule strength_rule(const TroughDesign& design);

struct StressUse {
  double stress = 0;   ///< von Mises bound under factored actions [Pa]
  double allowed = 0;  ///< [Pa]; 0 = yield not known
  double used = 0;     ///< stress / allowed
  std::string part;    ///< member in the builder's words
  State state;
  Spread spread = Spread::linear;
  std::string combination;  ///< "1.35 G + 1.5 W + 0.75 S (snow)"
};

/// Worst buckling of one member group, see models/member_buckling.h.
struct BucklingUse {
  double used = 0;         ///< 1 = at the limit
  double compression = 0;  ///< axial force in that member [N]
  double resistance = 0;   ///< chi A f of it [N]
  std::string part;
  State state;
  Spread spread = Spread::linear;
};

struct TorqueUse {
  double torque =
      0;  ///< what the drive must bring about the rotation axis, unfactored, sign as the body feels it [N m]
  State state;
  Spread spread = Spread::linear;
  std::string combination;  ///< as in StressUse; factors 1 but for accompanying actions
};

/// Reaction of the ground on a foot, world axes: force X Y Z [N], moment X Y Z about the foot [N m].
struct FootReaction {
  std::array<double, 6> value{};
  int stand = 0;
  State state;
  std::string combination;
};

struct StrengthResult {
  std::map<std::string, StressUse> groups;      ///< worst of each member group, "pylon" included
  std::map<std::string, BucklingUse> buckling;  ///< worst of each group that can buckle
  TorqueUse moving, holding;                    ///< worst of OPERATE and TURNING; worst of all states
  std::map<double, double>
      moving_torque;  ///< greatest |torque| at each elevation of OPERATE and TURNING [rad -> N m]
  std::array<FootReaction, 6> greatest, least;  ///< per component, unfactored
  double least_bearing_force = 0;               ///< most negative vertical bearing force: uplift [N]
};

/// A variable action other than wind, in one of its ways ("snow", "hottest frame").
struct OtherLoad {
  loads::Action action = loads::Action::snow;
  std::string name;
  Eigen::VectorXd amplitudes;
};

/// Wind columns of one state: amplitudes of weight and of every wind variant (patterns x gust angles),
/// feedback included; what else may act in it.
struct StateLoads {
  State state;
  Eigen::VectorXd weight;
  Eigen::MatrixXd wind;        ///< one column per variant
  std::vector<Spread> spread;  ///< per column
  std::vector<OtherLoad> others;
  double ice_wind_share = 0;  ///< share of the wind columns that goes with ice [-]
  double gathered = 1;        ///< size and dynamic factor on drive torque and reactions [-]
  double friction = 0;        ///< torque of the bearings, added to the drive's [N m]
};

struct FactoredCase;

class StrengthCheck {
 public:
  StrengthCheck(const RowModel& row, StrengthRule rule);
  StrengthCheck(const StrengthCheck&) = delete;
  StrengthCheck& operator=(const StrengthCheck&) = delete;
  /// All states of one pose at once.
  void add(const PoseModel& pose, const std::vector<StateLoads>& states);
  const StrengthResult& result() const { return result_; }

 private:
  void add_members(const PoseModel& pose, const std::vector<StateLoads>& states);
  void add_drive(const PoseModel& pose, const StateLoads& loads);
  void add_stands(const PoseModel& pose, const StateLoads& loads);
  void note_foot(const Eigen::VectorXd& ends, int stand, const StateLoads& loads,
                 const FactoredCase& factored);
  void judge(const fem::Member& member, const fem::Frame& frame,
             const Eigen::Ref<const Eigen::VectorXd>& ends, const StateLoads& loads,
             const FactoredCase& factored, StressUse& worst) const;
  void judge_buckling(const MemberResistance& resistance, const fem::Member& member,
                      const Eigen::Ref<const Eigen::VectorXd>& ends, const StateLoads& loads,
                      const FactoredCase& factored, BucklingUse& worst) const;

  const RowModel& row_;
  StrengthRule rule_;
  StrengthResult result_;
  std::vector<StressUse*> of_member_;  ///< every member's group in result_
  std::vector<MemberResistance> columns_;
  std::vector<BucklingUse*> of_column_;                       ///< likewise, per column
  std::vector<std::vector<MemberResistance>> stand_columns_;  ///< per stand
};

}  // namespace focalframe::models
