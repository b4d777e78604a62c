#include "models/strength_check.h"

#include <algorithm>
#include <cmath>
#include <cstdio>

#include "fem/section.h"
#include "loads/combination.h"

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

// Factor pairs of the combinations in which wind leads, each once; a set that names none for STUCK takes it
// as accidental with factors of 1.
std::vector<ActionFactors> pairs(const loads::CombinationSet& set, bool stuck) {
  double leading = 0;
  std::vector<ActionFactors> out;
  for (const loads::Combination& c : set.combinations) {
    const bool fits = stuck ? c.states == loads::StateGroup::stuck
                            : c.purpose == loads::Purpose::strength && c.states != loads::StateGroup::stuck;
    if (!fits || c.wind <= 0) continue;
    out.push_back({c.permanent, c.wind});
    leading = std::max(leading, c.wind);
  }
  std::erase_if(out, [&](const ActionFactors& f) { return f.wind < leading; });
  std::sort(out.begin(), out.end(), [](const auto& x, const auto& y) { return x.permanent > y.permanent; });
  out.erase(std::unique(out.begin(), out.end(),
                        [](const auto& x, const auto& y) { return x.permanent == y.permanent; }),
            out.end());
  if (out.empty()) out.push_back({1, 1});
  return out;
}

std::string pairs_text(const loads::CombinationSet& set, bool stuck) {
  std::string text;
  for (const ActionFactors& f : pairs(set, stuck)) {
    char one[40];
    std::snprintf(one, sizeof one, "%s%.2f G + %.2f W", text.empty() ? "" : ", ", f.permanent, f.wind);
    text += one;
  }
  return text;
}

}  // namespace

StrengthRule strength_rule(const LimitsInput& limits, const SiteInput& site) {
  if (limits.strength == "EN 1990") {
    const loads::CombinationSet set = loads::en_1990(std::isnan(site.altitude) ? 0 : site.altitude);
    return {set.name, pairs(set, false), pairs(set, true), 1.0,
            "EN 1990 " + set.edition + ": " + pairs_text(set, false) + "; STUCK as accidental " +
                pairs_text(set, true) + "; yield over 1.0 (factors from memory; check your national annex)"};
  }
  if (limits.strength == "ASCE 7") {
    const loads::CombinationSet set = loads::asce_7_strength(site.asce_edition);
    return {set.name, pairs(set, false), pairs(set, true), 0.9,
            "ASCE " + set.edition + " strength: " + pairs_text(set, false) + "; STUCK " +
                pairs_text(set, true) + "; wind from " +
                (set.ultimate_wind_map ? "an ultimate-level map" : "a service-level map") +
                "; 0.9 times yield (from memory; check your edition)"};
  }
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

StrengthCheck::StrengthCheck(const RowModel& row, StrengthRule rule) : row_(row), rule_(std::move(rule)) {
  for (const fem::Member& member : row.collector().body.members)
    of_member_.push_back(&result_.groups[member.group]);
  const Collector& c = row.collector();
  columns_ = buckling_resistances(c.body, c.buckling, rule_.on_yield);
  for (const MemberResistance& r : columns_)
    of_column_.push_back(&result_.buckling[c.body.members[static_cast<std::size_t>(r.member)].group]);
  for (const Stand& stand : c.stands)
    stand_columns_.push_back(buckling_resistances(stand.frame, stand.buckling, rule_.on_yield));
}

const std::vector<ActionFactors>& StrengthCheck::factors(StateKind kind) const {
  return kind == StateKind::stuck ? rule_.accidental : rule_.usual;
}

void StrengthCheck::add(const PoseModel& pose, const std::vector<StateLoads>& states) {
  if (states.empty()) return;
  add_members(pose, states);
  for (const StateLoads& loads : states) {
    add_drive(pose, loads);
    add_stands(pose, loads);
  }
}

void StrengthCheck::judge(const fem::Member& member, const fem::Frame& frame,
                          const Eigen::Ref<const VectorXd>& ends, const StateLoads& loads, int variant,
                          StressUse& worst) const {
  const fem::Section& section = frame.sections[static_cast<std::size_t>(member.section)];
  const fem::Material& material = frame.materials[static_cast<std::size_t>(member.material)];
  const double stress = std::max(fem::von_mises_bound(section, at_end(ends, false)),
                                 fem::von_mises_bound(section, at_end(ends, true)));
  const double allowed = material.yield * rule_.on_yield;
  const double used = allowed > 0 ? stress / allowed : 0;
  if (!worst.part.empty() && (allowed > 0 ? used <= worst.used : stress <= worst.stress)) return;
  worst = {stress, allowed, used, member.name, loads.state, loads.spread[static_cast<std::size_t>(variant)]};
}

void StrengthCheck::judge_buckling(const MemberResistance& resistance, const fem::Member& member,
                                   const Eigen::Ref<const VectorXd>& ends, const StateLoads& loads,
                                   int variant, BucklingUse& worst) const {
  const BucklingShare share = buckling_share(resistance, ends);
  if (!worst.part.empty() && share.used <= worst.used) return;
  worst = {share.used,  share.compression, resistance.N,
           member.name, loads.state,       loads.spread[static_cast<std::size_t>(variant)]};
}

void StrengthCheck::add_members(const PoseModel& pose, const std::vector<StateLoads>& states) {
  // One product for everything this pose is asked: weight, then every wind of every state.
  int columns = 1;
  for (const StateLoads& loads : states) columns += static_cast<int>(loads.wind.cols());
  MatrixXd amplitudes(states[0].weight.size(), columns);
  amplitudes.col(0) = states[0].weight;
  int at = 1;
  for (const StateLoads& loads : states) {
    amplitudes.middleCols(at, loads.wind.cols()) = loads.wind;
    at += static_cast<int>(loads.wind.cols());
  }
  const MatrixXd forces = row_.end_forces(pose, amplitudes);
  const fem::Frame& frame = row_.collector().body;
  VectorXd ends(12);
  at = 1;
  for (const StateLoads& loads : states)
    for (int v = 0; v < loads.wind.cols(); ++v, ++at)
      for (const ActionFactors& f : factors(loads.state.kind)) {
        const auto take = [&](std::size_t m) {
          const int first = 12 * static_cast<int>(m);
          ends = f.permanent * forces.block<12, 1>(first, 0) + f.wind * forces.block<12, 1>(first, at);
        };
        for (std::size_t m = 0; m < frame.members.size(); ++m) {
          take(m);
          judge(frame.members[m], frame, ends, loads, v, *of_member_[m]);
        }
        for (std::size_t c = 0; c < columns_.size(); ++c) {
          const std::size_t m = static_cast<std::size_t>(columns_[c].member);
          take(m);
          judge_buckling(columns_[c], frame.members[m], ends, loads, v, *of_column_[c]);
        }
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

void StrengthCheck::add_stands(const PoseModel& pose, const StateLoads& loads) {
  for (std::size_t k = 0; k < row_.collector().stands.size(); ++k) {
    const Stand& stand = row_.collector().stands[k];
    const int number = static_cast<int>(k);
    const VectorXd weight = row_.evaluate_stand(number, pose, loads.weight);
    const MatrixXd wind = row_.evaluate_stand(number, pose, loads.wind);
    for (int v = 0; v < wind.cols(); ++v) {
      // The drive pylon gathers the whole row's torque; the others stand alone in a gust.
      const double gathered = stand.driven ? loads.gathered : 1;
      for (const ActionFactors& f : factors(loads.state.kind)) {
        const VectorXd ends = f.permanent * weight + f.wind * gathered * wind.col(v);
        judge(stand.frame.members[0], stand.frame, ends, loads, v,
              result_.groups[stand.frame.members[0].group]);
        for (const MemberResistance& r : stand_columns_[k])
          judge_buckling(r, stand.frame.members[0], ends, loads, v,
                         result_.buckling[stand.frame.members[0].group]);
      }
      const VectorXd plain = weight + gathered * wind.col(v);
      // Post axes x, y, z are world Z, X, Y once the section's roll is taken back.
      const double c = std::cos(stand.roll), s = std::sin(stand.roll);
      FootReaction foot{{c * plain[1] - s * plain[2], s * plain[1] + c * plain[2], plain[0],
                         c * plain[4] - s * plain[5], s * plain[4] + c * plain[5], plain[3]},
                        number,
                        loads.state};
      for (std::size_t i = 0; i < 6; ++i) {
        if (foot.value[i] > result_.greatest[i].value[i]) result_.greatest[i] = foot;
        if (foot.value[i] < result_.least[i].value[i]) result_.least[i] = foot;
      }
      result_.least_bearing_force = std::min(result_.least_bearing_force, -plain[6]);
    }
  }
}

}  // namespace focalframe::models
