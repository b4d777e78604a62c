#include "models/pose_limits.h"

#include <algorithm>
#include <cmath>
#include <map>
#include <numbers>
#include <optional>

#include "loads/pose.h"
#include "models/first_crossing.h"
#include "models/light_limits.h"

namespace focalframe::models {
using Eigen::MatrixXd;
using Eigen::RowVectorXd;
using Eigen::VectorXd;

// Everything about one pose and one side of the wind that does not depend on the kind of state.
struct PoseLimits::Side {
  Side(double e, double from, const PoseModel& p) : elevation(e), wind_from(from), pose(p) {}

  double elevation, wind_from;
  const PoseModel& pose;
  std::optional<PoseWinds> winds;
  std::vector<int> mean;                       // winds of the optics
  std::vector<GustWind> gusts;                 // winds of strength and drive
  double cap = greatest_gust;                  // gusts looked at
  std::vector<double> speeds;                  // steps up to it
  std::map<int, std::vector<VectorXd>> mixes;  // per gust wind, at the steps
  std::optional<MemberLimits> members;
  std::map<std::pair<double, bool>, CriterionLimit> strength;  // by gust angle and kind of factors
};

PoseLimits::PoseLimits(const RowModel& row, const TroughDesign& design, const loads::CoefficientTable& table)
    : row_(row),
      design_(design),
      winds_(design, table),
      optics_(row, design),
      rule_(strength_rule(design)),
      strength_judged_(!design.limits.strength.empty() || !std::isnan(design.limits.strength_factor)),
      peak_(table.kind == loads::CoefficientKind::peak),
      axis_(axis_wind(design)),
      moving_torque_(moving_capacity(design)) {
  const Collector& c = row.collector();
  for (std::size_t i = 0; i < c.body.members.size(); ++i) {
    const fem::Member& tube = c.body.members[i];
    if (tube.group != "torque tube") continue;
    for (std::size_t k = 1; k + 1 < c.bearings.size(); ++k) {
      if (static_cast<int>(k) == c.drive_bearing) continue;
      const bool far_end = c.body.nodes[static_cast<std::size_t>(tube.to)].at.x() == c.stands[k].x;
      if (!far_end) continue;  // the torque passes the joint, so one side tells it
      joints_.push_back(
          {12 * static_cast<int>(i) + 6, tube.offset_to.z(), "joint at pylon " + std::to_string(k + 1)});
    }
  }
}

double moving_capacity(const TroughDesign& design) {
  const OperationInput& run = design.operation;
  if (run.turned_by != "hand") return design.drive.moving_torque;
  return std::fmin(run.push * run.crank * run.gear, design.drive.moving_torque);
}

CriterionLimit PoseLimits::empty(LimitKey key) const {
  CriterionLimit c;
  c.key = key;
  c.averaging = peak_ ? 600 : 3;
  return c;
}

PoseSolution PoseLimits::solve(double elevation, const std::vector<StateKind>& kinds, bool light) const {
  PoseSolution out;
  const PoseModel pose = row_.pose(elevation);
  for (const double from : {0.0, std::numbers::pi}) {
    Side side(elevation, from, pose);
    solve_side(side, kinds, light, out);
  }
  return out;
}

double PoseLimits::pressure(double gust) const {
  return axis_.pressure(peak_ ? gust / axis_.gust_over_mean : gust);
}

void PoseLimits::prepare(Side& side, const std::vector<StateKind>& kinds) const {
  const std::vector<Spread> spreads =
      winds_.spreads(loads::pitch_seen_by_wind(side.elevation, side.wind_from));
  std::vector<WindOnRow> winds;
  for (const Spread spread : spreads) {
    side.mean.push_back(static_cast<int>(winds.size()));
    winds.push_back(winds_.at(side.elevation, side.wind_from, spread, 0, false, 0));
  }
  std::vector<double> offsets = {0};
  for (const StateKind kind : kinds)
    if (const double angle = winds_.gust_angle(kind); winds_.covers(side.elevation, side.wind_from, angle))
      for (const double offset : {-angle, angle})
        if (std::find(offsets.begin(), offsets.end(), offset) == offsets.end()) offsets.push_back(offset);
  for (const double offset : offsets)
    for (const Spread spread : spreads) {
      side.gusts.push_back({static_cast<int>(winds.size()), offset, spread});
      winds.push_back(winds_.at(side.elevation, side.wind_from, spread, offset, true, 0));
    }
  side.winds.emplace(row_, side.pose, std::move(winds));

  // The wind-up speed is a limit itself, so nothing beyond it is asked for.
  side.cap = std::min(side.cap, wind_up_gust(side));
  for (const GustWind& gust : side.gusts) {
    const double q = 0.98 * side.winds->divergence_pressure(gust.wind);
    const double speed = std::sqrt(2 * q / axis_.density) * (peak_ ? axis_.gust_over_mean : 1);
    side.cap = std::min(side.cap, speed);
  }
  const int steps = std::max(2, static_cast<int>(std::ceil(side.cap / gust_step)));
  for (int i = 0; i <= steps; ++i) side.speeds.push_back(side.cap * i / steps);
  side.members.emplace(row_, side.pose, *side.winds, axis_.size_factor, rule_.on_yield);
  for (const GustWind& gust : side.gusts)
    for (const double speed : side.speeds)
      side.mixes[gust.wind].push_back(side.winds->mix(gust.wind, pressure(speed)));
}

void PoseLimits::solve_side(Side& side, const std::vector<StateKind>& kinds, bool light,
                            PoseSolution& out) const {
  const bool known = winds_.covers(side.elevation, side.wind_from, 0);
  if (known) prepare(side, kinds);
  for (const StateKind kind : kinds) {
    PoseLimit limit{kind, side.elevation, side.wind_from, true, {}};
    limit.covered = known && winds_.covers(side.elevation, side.wind_from, winds_.gust_angle(kind));
    if (limit.covered) {
      if (kind == StateKind::operate && light) add_light(side, limit, out);
      add_wind_up(side, limit);
      add_drive(side, limit);
      add_joints(side, limit);
      add_feet(side, limit);
      if (strength_judged_) add_strength(side, limit);
      std::stable_sort(limit.criteria.begin(), limit.criteria.end(),
                       [](const CriterionLimit& a, const CriterionLimit& b) { return a.gust < b.gust; });
    }
    out.limits.push_back(std::move(limit));
  }
}

double PoseLimits::wind_up_gust(const Side& side) const {
  const double q = side.winds->divergence_pressure(side.mean.front());
  return 0.5 * std::sqrt(2 * q / axis_.density) * axis_.gust_over_mean;
}

void PoseLimits::add_wind_up(const Side& side, PoseLimit& limit) const {
  const double gust = wind_up_gust(side);
  if (!std::isfinite(gust)) return;
  CriterionLimit c = empty(LimitKey::wind_up);
  c.averaging = 600;
  c.gust = gust;
  c.speed = gust / axis_.gust_over_mean;
  limit.criteria.push_back(c);
}

std::vector<GustWind> PoseLimits::gusts_of(const Side& side, StateKind kind) const {
  const double angle = winds_.gust_angle(kind);
  std::vector<GustWind> out;
  for (const GustWind& gust : side.gusts)
    if (gust.offset == 0 || std::abs(gust.offset) == angle) out.push_back(gust);
  return out;
}

CriterionLimit PoseLimits::first_of(const Side& side, StateKind kind, LimitKey key, double limit,
                                    const Use& use) const {
  CriterionLimit found = empty(key);
  for (const GustWind& gust : gusts_of(side, kind)) {
    const Margin margin = [&](double speed) {
      return 1 - use(side.winds->mix(gust.wind, pressure(speed))) / limit;
    };
    Samples samples{side.speeds, {}};
    for (const VectorXd& mix : side.mixes.at(gust.wind)) samples.margin.push_back(1 - use(mix) / limit);
    const double speed = first_crossing(samples, margin);
    if (speed >= found.gust) continue;
    found.gust = speed;
    found.spread = gust.spread;
    found.gust_angle = gust.offset;
  }
  found.speed = peak_ ? found.gust / axis_.gust_over_mean : found.gust;
  return found;
}

void PoseLimits::add_drive(const Side& side, PoseLimit& limit) const {
  const bool moves = limit.kind == StateKind::operate || limit.kind == StateKind::turning;
  const RowVectorXd row = side.pose.bearing_force.row(row_.drive_turn()) * side.winds->basis();
  const double friction = moves ? design_.drive.friction : 0;
  const Use torque = [&](const VectorXd& mix) {
    return std::abs(row[0] + axis_.size_factor * row.dot(mix)) + friction;
  };
  if (moves && moving_torque_ > 0)
    limit.criteria.push_back(first_of(side, limit.kind, LimitKey::moving_torque, moving_torque_, torque));
  if (design_.drive.holding_torque > 0)
    limit.criteria.push_back(
        first_of(side, limit.kind, LimitKey::holding_torque, design_.drive.holding_torque, torque));
}

double PoseLimits::reversal(const Side& side) const {
  const RowVectorXd row = side.pose.bearing_force.row(row_.drive_turn()) * side.winds->basis();
  double least = no_limit;
  for (const int wind : side.mean) {
    const Margin same_sign = [&](double speed) {
      return 1 + row.dot(side.winds->mix(wind, axis_.pressure(speed))) / row[0];
    };
    if (row[0] != 0) least = std::min(least, first_crossing(same_sign, side.cap / axis_.gust_over_mean, 40));
  }
  return least;
}

void PoseLimits::add_joints(const Side& side, PoseLimit& limit) const {
  if (std::isnan(design_.end_plates.torque_capacity)) return;
  CriterionLimit worst = empty(LimitKey::joint_torque);
  const bool accidental = limit.kind == StateKind::stuck;
  const MatrixXd& ends = side.members->ends();
  for (const Joint& joint : joints_) {
    const RowVectorXd row = ends.row(joint.first_row + 3) - joint.offset * ends.row(joint.first_row + 1);
    for (const ActionFactors& f : accidental ? rule_.accidental : rule_.usual) {
      const Use torque = [&](const VectorXd& mix) {
        return std::abs(f.permanent * row[0] + f.wind * row.dot(mix));
      };
      CriterionLimit c =
          first_of(side, limit.kind, LimitKey::joint_torque, design_.end_plates.torque_capacity, torque);
      c.part = joint.name;
      if (c.gust < worst.gust) worst = c;
    }
  }
  limit.criteria.push_back(worst);
}

void PoseLimits::add_feet(const Side& side, PoseLimit& limit) const {
  const FootingInput& footing = design_.pylons.footing;
  const auto judge = [&](LimitKey key, double capacity, int component, double sign) {
    if (std::isnan(capacity)) return;
    CriterionLimit worst = empty(key);
    for (std::size_t k = 0; k < row_.collector().stands.size(); ++k) {
      const double gathered = row_.collector().stands[k].driven ? axis_.size_factor : 1;
      const RowVectorXd row = side.members->stand(static_cast<int>(k)).row(component);
      const Use force = [&](const VectorXd& mix) {
        const double value = row[0] + gathered * row.dot(mix);
        return sign == 0 ? std::abs(value) : sign * value;
      };
      CriterionLimit c = first_of(side, limit.kind, key, capacity, force);
      c.part = "pylon " + std::to_string(k + 1);
      if (c.gust < worst.gust) worst = c;
    }
    limit.criteria.push_back(worst);
  };
  // Post axes x, y are world Z, X: the foot's vertical force and its moment about the row's direction.
  judge(LimitKey::overturning, footing.overturning_capacity, 4, 0);
  judge(LimitKey::uplift, footing.uplift_capacity, 0, -1);
}

void PoseLimits::add_strength(Side& side, PoseLimit& limit) const {
  const bool accidental = limit.kind == StateKind::stuck;
  const std::pair<double, bool> key{winds_.gust_angle(limit.kind), accidental};
  auto known = side.strength.find(key);
  if (known == side.strength.end()) {
    CriterionLimit found =
        side.members->first({gusts_of(side, limit.kind), accidental ? rule_.accidental : rule_.usual,
                             side.cap, [this](double gust) { return pressure(gust); }});
    found.key = LimitKey::member;
    found.averaging = peak_ ? 600 : 3;
    found.speed = peak_ ? found.gust / axis_.gust_over_mean : found.gust;
    known = side.strength.emplace(key, found).first;
  }
  limit.criteria.push_back(known->second);
}

void PoseLimits::add_light(const Side& side, PoseLimit& limit, PoseSolution& out) const {
  const LightAnswer light = light_limits({row_, optics_, side.pose, *side.winds, side.mean, design_.limits,
                                          axis_, side.cap / axis_.gust_over_mean});
  limit.criteria.insert(limit.criteria.end(), light.criteria.begin(), light.criteria.end());
  out.reversal = std::min(out.reversal, reversal(side));
  out.light.push_back({side.elevation, side.wind_from, light.speed, light.intercept});
}

}  // namespace focalframe::models
