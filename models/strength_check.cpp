#include "models/strength_check.h"

#include <algorithm>
#include <cmath>
#include <cstdio>
#include <stdexcept>

#include "fem/section.h"
#include "models/factored_cases.h"

namespace focalframe::models {
namespace {

using Eigen::MatrixXd;
using Eigen::VectorXd;

int column_count(const StateLoads& loads) {
  return 1 + static_cast<int>(loads.wind.cols()) + static_cast<int>(loads.others.size());
}

// Weight, winds, others: the order FactoredTerm counts in.
MatrixXd columns_of(const StateLoads& loads) {
  MatrixXd all(loads.weight.size(), column_count(loads));
  all.col(0) = loads.weight;
  const int winds = static_cast<int>(loads.wind.cols());
  all.middleCols(1, winds) = loads.wind;
  for (std::size_t i = 0; i < loads.others.size(); ++i)
    all.col(1 + winds + static_cast<int>(i)) = loads.others[i].amplitudes;
  return all;
}

Spread spread_of(const FactoredCase& factored, const StateLoads& loads) {
  return factored.variant < 0 ? Spread::linear : loads.spread[static_cast<std::size_t>(factored.variant)];
}

bool moves(StateKind kind) { return kind == StateKind::operate || kind == StateKind::turning; }

template <class Ends>
fem::Resultants at_end(const Ends& f, bool far_end) {
  const int o = far_end ? 6 : 0;
  const double s = far_end ? 1 : -1;  // forces on the face with outward normal +x
  return {s * f[o], s * f[o + 1], s * f[o + 2], s * f[o + 3], s * f[o + 4], s * f[o + 5]};
}

template <class Ends>
double greatest_stress(const fem::Section& section, const Ends& ends) {
  return std::max(fem::von_mises_bound(section, at_end(ends, false)),
                  fem::von_mises_bound(section, at_end(ends, true)));
}

double allowed_stress(const fem::Frame& frame, const fem::Member& member, double on_yield) {
  return frame.materials[static_cast<std::size_t>(member.material)].yield * on_yield;
}

// Stress of every member under each column alone. The bound on von Mises is a norm of the resultants, so the
// stress of a factored sum is at most the factored sum of these: most cases need no closer look.
MatrixXd stress_alone(const fem::Frame& frame, const Eigen::Ref<const MatrixXd>& forces) {
  MatrixXd alone(frame.members.size(), forces.cols());
  for (int c = 0; c < forces.cols(); ++c)
    for (int m = 0; m < alone.rows(); ++m) {
      const fem::Member& member = frame.members[static_cast<std::size_t>(m)];
      alone(m, c) = greatest_stress(frame.sections[static_cast<std::size_t>(member.section)],
                                    forces.col(c).segment<12>(12 * m));
    }
  return alone;
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

StrengthRule plain_rule(const char* name, double on_yield, const char* text) {
  return {name, {{1, 1}}, {{1, 1}}, on_yield, text, plain_set()};
}

}  // namespace

StrengthRule strength_rule(const TroughDesign& design) {
  const loads::CombinationSet& set = design.combinations;
  if (!design.limits.strength.empty()) {
    if (set.combinations.empty())
      throw std::invalid_argument("limits.strength names a set of combinations, but the design holds none");
    char yield[48];
    std::snprintf(yield, sizeof yield, "%.3g times yield", set.on_yield);
    return {set.title,
            pairs(set, false),
            pairs(set, true),
            set.on_yield,
            set.title + " (" + set.edition + "): " + pairs_text(set, false) + "; STUCK " +
                pairs_text(set, true) + "; wind from " +
                (set.ultimate_wind_map ? "an ultimate-level map" : "a service-level map") + "; " + yield +
                ". " + set.source,
            set};
  }
  const double factor = design.limits.strength_factor;
  if (!std::isnan(factor)) {
    char text[96];
    std::snprintf(text, sizeof text, "unfactored actions, yield over %.2f", factor);
    return plain_rule("plain factor", 1 / factor, text);
  }
  return plain_rule("none", 1.0, "no strength rule asked for: unfactored actions against yield, not judged");
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

void StrengthCheck::add(const PoseModel& pose, const std::vector<StateLoads>& states) {
  if (states.empty()) return;
  add_members(pose, states);
  for (const StateLoads& loads : states) {
    add_drive(pose, loads);
    add_stands(pose, loads);
  }
}

void StrengthCheck::judge(const fem::Member& member, const fem::Frame& frame,
                          const Eigen::Ref<const VectorXd>& ends, const StateLoads& loads,
                          const FactoredCase& factored, StressUse& worst) const {
  const fem::Section& section = frame.sections[static_cast<std::size_t>(member.section)];
  const double stress = greatest_stress(section, ends);
  const double allowed = allowed_stress(frame, member, rule_.on_yield);
  const double used = allowed > 0 ? stress / allowed : 0;
  if (!worst.part.empty() && (allowed > 0 ? used <= worst.used : stress <= worst.stress)) return;
  worst = {stress,
           allowed,
           used,
           member.name,
           loads.state,
           spread_of(factored, loads),
           case_text(factored, loads)};
}

void StrengthCheck::judge_buckling(const MemberResistance& resistance, const fem::Member& member,
                                   const Eigen::Ref<const VectorXd>& ends, const StateLoads& loads,
                                   const FactoredCase& factored, BucklingUse& worst) const {
  const BucklingShare share = buckling_share(resistance, ends);
  if (!worst.part.empty() && share.used <= worst.used) return;
  worst = {share.used, share.compression, resistance.N, member.name, loads.state, spread_of(factored, loads)};
}

void StrengthCheck::add_members(const PoseModel& pose, const std::vector<StateLoads>& states) {
  // One product for everything this pose is asked: weight, every wind and every other action of every state.
  int columns = 0;
  for (const StateLoads& loads : states) columns += column_count(loads);
  MatrixXd amplitudes(states[0].weight.size(), columns);
  int at = 0;
  for (const StateLoads& loads : states) {
    amplitudes.middleCols(at, column_count(loads)) = columns_of(loads);
    at += column_count(loads);
  }
  const MatrixXd forces = row_.end_forces(pose, amplitudes);
  const fem::Frame& frame = row_.collector().body;
  Eigen::Matrix<double, 12, 1> ends;
  VectorXd most(frame.members.size());
  at = 0;
  for (const StateLoads& loads : states) {
    const MatrixXd alone = stress_alone(frame, forces.middleCols(at, column_count(loads)));
    for (const FactoredCase& factored : factored_cases(rule_.set, loads, Wanted::strength)) {
      most.setZero();
      for (const FactoredTerm& t : factored.terms) most += std::abs(t.factor) * alone.col(t.column);
      const auto take = [&](std::size_t m) {
        const int first = 12 * static_cast<int>(m);
        const FactoredTerm& weight = factored.terms.front();
        ends = weight.factor * forces.block<12, 1>(first, at + weight.column);
        for (std::size_t t = 1; t < factored.terms.size(); ++t)
          ends += factored.terms[t].factor * forces.block<12, 1>(first, at + factored.terms[t].column);
      };
      for (std::size_t m = 0; m < frame.members.size(); ++m) {
        const StressUse& worst = *of_member_[m];
        const double allowed = allowed_stress(frame, frame.members[m], rule_.on_yield);
        const double known = allowed > 0 ? worst.used * allowed : worst.stress;
        if (!worst.part.empty() && most[static_cast<int>(m)] <= known) continue;
        take(m);
        judge(frame.members[m], frame, ends, loads, factored, *of_member_[m]);
      }
      for (std::size_t c = 0; c < columns_.size(); ++c) {
        const std::size_t m = static_cast<std::size_t>(columns_[c].member);
        take(m);
        judge_buckling(columns_[c], frame.members[m], ends, loads, factored, *of_column_[c]);
      }
    }
    at += column_count(loads);
  }
}

void StrengthCheck::add_drive(const PoseModel& pose, const StateLoads& loads) {
  const Eigen::RowVectorXd torques = pose.bearing_force.row(row_.drive_turn()) * columns_of(loads);
  const bool moving = moves(loads.state.kind);
  for (const FactoredCase& factored : factored_cases(rule_.set, loads, Wanted::service)) {
    double bare = 0;
    for (const FactoredTerm& t : factored.terms)
      bare += t.factor * (t.wind ? loads.gathered : 1) * torques[t.column];
    // Friction works against the drive while it moves, and may do so either way.
    const double torque = moving ? bare + std::copysign(loads.friction, bare) : bare;
    const auto use = [&] {
      return TorqueUse{torque, loads.state, spread_of(factored, loads), case_text(factored, loads)};
    };
    if (std::abs(torque) > std::abs(result_.holding.torque)) result_.holding = use();
    if (!moving || factored.earthquake) continue;
    if (std::abs(torque) > std::abs(result_.moving.torque)) result_.moving = use();
    double& at_pose = result_.moving_torque[loads.state.elevation];
    at_pose = std::max(at_pose, std::abs(torque));
  }
}

void StrengthCheck::add_stands(const PoseModel& pose, const StateLoads& loads) {
  const MatrixXd amplitudes = columns_of(loads);
  const std::vector<FactoredCase> factored = factored_cases(rule_.set, loads, Wanted::strength),
                                  plain = factored_cases(rule_.set, loads, Wanted::service);
  for (std::size_t k = 0; k < row_.collector().stands.size(); ++k) {
    const Stand& stand = row_.collector().stands[k];
    const MatrixXd columns = row_.evaluate_stand(static_cast<int>(k), pose, amplitudes);
    // The drive pylon gathers the whole row's torque; the others stand alone in a gust.
    const double gathered = stand.driven ? loads.gathered : 1;
    const auto sum = [&](const FactoredCase& c) {
      VectorXd ends = VectorXd::Zero(12);
      for (const FactoredTerm& t : c.terms)
        ends += t.factor * (t.wind ? gathered : 1) * columns.col(t.column);
      return ends;
    };
    const fem::Member& post = stand.frame.members[0];
    for (const FactoredCase& c : factored) {
      const VectorXd ends = sum(c);
      judge(post, stand.frame, ends, loads, c, result_.groups[post.group]);
      for (const MemberResistance& r : stand_columns_[k])
        judge_buckling(r, post, ends, loads, c, result_.buckling[post.group]);
    }
    for (const FactoredCase& c : plain) note_foot(sum(c), static_cast<int>(k), loads, c);
  }
}

void StrengthCheck::note_foot(const VectorXd& ends, int stand, const StateLoads& loads,
                              const FactoredCase& factored) {
  // Post axes x, y, z are world Z, X, Y once the section's roll is taken back.
  const double roll = row_.collector().stands[static_cast<std::size_t>(stand)].roll;
  const double c = std::cos(roll), s = std::sin(roll);
  const FootReaction foot{{c * ends[1] - s * ends[2], s * ends[1] + c * ends[2], ends[0],
                           c * ends[4] - s * ends[5], s * ends[4] + c * ends[5], ends[3]},
                          stand,
                          loads.state,
                          {}};
  const auto keep = [&](FootReaction& place) {
    place = foot;
    place.combination = case_text(factored, loads);
  };
  for (std::size_t i = 0; i < 6; ++i) {
    if (foot.value[i] > result_.greatest[i].value[i]) keep(result_.greatest[i]);
    if (foot.value[i] < result_.least[i].value[i]) keep(result_.least[i]);
  }
  result_.least_bearing_force = std::min(result_.least_bearing_force, -ends[6]);
}

}  // namespace focalframe::models
