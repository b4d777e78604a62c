#include "models/strength_check.h"

#include <cmath>
#include <cstdio>

#include "fem/section.h"

namespace focalframe::models {
namespace {

using Eigen::MatrixXd;
using Eigen::VectorXd;

bool moves(StateKind kind) { return kind == StateKind::operate || kind == StateKind::turning; }

fem::Resultants at_end(const Eigen::Ref<const VectorXd>& f, bool far_end) {
  const int o = far_end ? 6 : 0;
  const double s = far_end ? 1 : -1;  // forces on the face with outward normal +x
  return {s * f[o], s * f[o + 1], s * f[o + 2], s * f[o + 3], s * f[o + 4], s * f[o + 5]};
}

}  // namespace

StrengthRule strength_rule(const LimitsInput& limits) {
  if (limits.strength == "EN 1990")
    return {limits.strength,
            {{1.35, 1.5}, {1.0, 1.5}},
            {{1.0, 1.0}},
            1.0,
            "EN 1990 eq. 6.10: 1.35 G + 1.5 W and 1.0 G + 1.5 W, STUCK as accidental 1.0 G + 1.0 W; yield "
            "over 1.0 "
            "(factors from memory; check your national annex)"};
  if (limits.strength == "ASCE 7")
    return {limits.strength,
            {{1.2, 1.0}, {0.9, 1.0}},
            {{1.0, 1.0}},
            0.9,
            "ASCE 7 strength design: 1.2 D + 1.0 W and 0.9 D + 1.0 W for ultimate wind speeds (7-10 and "
            "later), STUCK "
            "1.0 D + 1.0 W; 0.9 times yield (from memory; check your edition)"};
  if (!std::isnan(limits.strength_factor)) {
    char text[96];
    std::snprintf(text, sizeof text, "unfactored actions, yield over %.2f", limits.strength_factor);
    return {"plain factor", {{1, 1}}, {{1, 1}}, 1 / limits.strength_factor, text};
  }
  return {"none",
          {{1, 1}},
          {{1, 1}},
          1.0,
          "no strength rule asked for: unfactored actions against yield, not judged"};
}

void StrengthCheck::add(const PoseModel& pose, const StateLoads& loads) {
  const auto& factors = loads.state.kind == StateKind::stuck ? rule_.accidental : rule_.usual;
  add_members(pose, loads, factors);
  add_drive(pose, loads);
  add_stands(pose, loads, factors);
}

void StrengthCheck::judge(const fem::Member& member, const fem::Frame& frame,
                          const Eigen::Ref<const VectorXd>& ends, const StateLoads& loads, int variant) {
  const fem::Section& section = frame.sections[static_cast<std::size_t>(member.section)];
  const fem::Material& material = frame.materials[static_cast<std::size_t>(member.material)];
  const double stress = std::max(fem::von_mises_bound(section, at_end(ends, false)),
                                 fem::von_mises_bound(section, at_end(ends, true)));
  const double allowed = material.yield * rule_.on_yield;
  const double used = allowed > 0 ? stress / allowed : 0;
  StressUse& worst = result_.groups[member.group];
  if (!worst.part.empty() && (allowed > 0 ? used <= worst.used : stress <= worst.stress)) return;
  worst = {stress, allowed, used, member.name, loads.state, loads.spread[static_cast<std::size_t>(variant)]};
}

void StrengthCheck::add_members(const PoseModel& pose, const StateLoads& loads,
                                const std::vector<ActionFactors>& factors) {
  const MatrixXd weight = row_.evaluate(row_.end_force, pose, loads.weight);
  const MatrixXd wind = row_.evaluate(row_.end_force, pose, loads.wind);
  const fem::Frame& frame = row_.collector().body;
  VectorXd ends(12);
  for (int v = 0; v < wind.cols(); ++v)
    for (std::size_t m = 0; m < frame.members.size(); ++m)
      for (const ActionFactors& f : factors) {
        const int at = 12 * static_cast<int>(m);
        ends = f.permanent * weight.block<12, 1>(at, 0) + f.wind * wind.block<12, 1>(at, v);
        judge(frame.members[m], frame, ends, loads, v);
      }
}

void StrengthCheck::add_drive(const PoseModel& pose, const StateLoads& loads) {
  const Eigen::RowVectorXd row = pose.bearing_force.row(row_.drive_turn());
  const double weight = row.dot(loads.weight);
  for (int v = 0; v < loads.wind.cols(); ++v) {
    const double bare = weight + loads.gathered * row.dot(loads.wind.col(v));
    // Friction works against the drive while it moves, and may do so either way.
    const double torque = moves(loads.state.kind) ? bare + std::copysign(loads.friction, bare) : bare;
    const TorqueUse use{torque, loads.state, loads.spread[static_cast<std::size_t>(v)]};
    if (std::abs(torque) > std::abs(result_.holding.torque)) result_.holding = use;
    if (!moves(loads.state.kind)) continue;
    if (std::abs(torque) > std::abs(result_.moving.torque)) result_.moving = use;
    double& at_pose = result_.moving_torque[loads.state.elevation];
    at_pose = std::max(at_pose, std::abs(torque));
  }
}

void StrengthCheck::add_stands(const PoseModel& pose, const StateLoads& loads,
                               const std::vector<ActionFactors>& factors) {
  for (std::size_t k = 0; k < row_.collector().stands.size(); ++k) {
    const Stand& stand = row_.collector().stands[k];
    const int number = static_cast<int>(k);
    const VectorXd weight = row_.evaluate_stand(number, pose, loads.weight);
    const MatrixXd wind = row_.evaluate_stand(number, pose, loads.wind);
    for (int v = 0; v < wind.cols(); ++v) {
      for (const ActionFactors& f : factors) {
        const VectorXd ends = f.permanent * weight + f.wind * wind.col(v);
        judge(stand.frame.members[0], stand.frame, ends, loads, v);
      }
      const VectorXd plain = weight + loads.gathered * wind.col(v);
      // Post axes x, y, z are world Z, X, Y.
      FootReaction foot{{plain[1], plain[2], plain[0], plain[4], plain[5], plain[3]}, number, loads.state};
      for (std::size_t i = 0; i < 6; ++i) {
        if (foot.value[i] > result_.greatest[i].value[i]) result_.greatest[i] = foot;
        if (foot.value[i] < result_.least[i].value[i]) result_.least[i] = foot;
      }
      result_.least_bearing_force = std::min(result_.least_bearing_force, -plain[6]);
    }
  }
}

}  // namespace focalframe::models
