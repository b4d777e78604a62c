#include "models/dish_strength.h"

#include <Eigen/Geometry>
#include <algorithm>
#include <cmath>
#include <numbers>

#include "fem/beam.h"
#include "models/actuator.h"
#include "models/member_buckling.h"

namespace focalframe::models {
namespace {

using Eigen::MatrixXd;
using Eigen::VectorXd;

bool moves(StateKind kind) { return kind == StateKind::operate || kind == StateKind::turning; }

fem::Resultants at_end(const VectorXd& f, int from, double sign) {
  return {sign * f[from],     sign * f[from + 1], sign * f[from + 2],
          sign * f[from + 3], sign * f[from + 4], sign * f[from + 5]};
}

// Axial force a hinged member of this length carries about its weaker axis [N]; 0 when its yield is not
// known.
double column_resistance(const fem::Section& s, const fem::Material& m, const std::string& shape,
                         double length) {
  if (!(m.yield > 0)) return 0;
  const double euler = std::numbers::pi * std::numbers::pi * m.E * std::min(s.Iy, s.Iz) / (length * length);
  const double squash = s.A * m.yield;
  return reduction(std::sqrt(squash / euler), column_curve(shape, m)) * squash;
}

void keep_greatest(DishForce& kept, double value, const DishStrength::Loads& loads, std::size_t variant) {
  if (std::abs(value) > std::abs(kept.value)) kept = {value, loads.state, loads.spread[variant]};
}

}  // namespace

DishStrength::DishStrength(const DishModel& model, const DishDesign& design)
    : model_(model),
      rule_(strength_rule(design)),
      rod_(design.dish.actuator),
      friction_(design.dish.axis.friction) {
  const fem::Frame& body = model.collector().body;
  for (std::size_t m = 0; m < body.members.size(); ++m) {
    const fem::Member& member = body.members[m];
    Column column;
    const bool leg = member.group == "feed leg";
    if (leg || member.group == "rib web" || member.group == "bracing") {
      // A leg is computed in three pieces and buckles as one.
      column.length = fem::member_length(body, static_cast<int>(m)) * (leg ? 3 : 1);
      const std::string& shape = leg                         ? design.dish.feed.legs.profile.shape
                                 : member.group == "rib web" ? design.dish.ribs.webs.shape
                                                             : design.dish.bracing.front().profile.shape;
      column.resistance =
          column_resistance(body.sections[static_cast<std::size_t>(member.section)],
                            body.materials[static_cast<std::size_t>(member.material)], shape, column.length);
    }
    body_columns_.push_back(column);
  }
}

const std::vector<ActionFactors>& DishStrength::factors(StateKind kind) const {
  return kind == StateKind::stuck ? rule_.accidental : rule_.usual;
}

void DishStrength::add(const DishPose& pose, const Loads& loads) {
  const DishCollector& c = model_.collector();
  add_members(c.body, body_columns_, model_.evaluate(model_.end_force, pose, loads.weight),
              model_.evaluate(model_.end_force, pose, loads.wind), 1, loads);
  add_members(c.yoke, no_columns_, model_.yoke_end_forces(pose, loads.weight),
              model_.yoke_end_forces(pose, loads.wind), loads.gathered, loads);
  add_members(c.base, no_columns_, model_.base_end_forces(pose, loads.weight),
              model_.base_end_forces(pose, loads.wind), loads.gathered, loads);
  add_drive(pose, loads);
  add_azimuth(pose, loads);
  add_ground(pose, loads);
}

void DishStrength::add_members(const fem::Frame& frame, const std::vector<Column>& columns,
                               const MatrixXd& weight, const MatrixXd& wind, double gathered,
                               const Loads& loads) {
  VectorXd ends(12);
  for (std::size_t m = 0; m < frame.members.size(); ++m) {
    const fem::Member& member = frame.members[m];
    const fem::Section& section = frame.sections[static_cast<std::size_t>(member.section)];
    const double yield = frame.materials[static_cast<std::size_t>(member.material)].yield * rule_.on_yield;
    DishUse& worst = result_.stress[member.group];
    for (Eigen::Index v = 0; v < wind.cols(); ++v)
      for (const ActionFactors& f : factors(loads.state.state.kind)) {
        const auto row = 12 * static_cast<Eigen::Index>(m);
        ends = f.permanent * weight.block<12, 1>(row, 0) + f.wind * gathered * wind.block<12, 1>(row, v);
        const double stress = std::max(fem::von_mises_bound(section, at_end(ends, 0, -1)),
                                       fem::von_mises_bound(section, at_end(ends, 6, 1)));
        const double used = yield > 0 ? stress / yield : stress;
        const Spread spread = loads.spread[static_cast<std::size_t>(v)];
        if (worst.part.empty() || used > worst.used)
          worst = {stress, yield, used, member.name, loads.state, spread};
        if (columns.empty() || !(columns[m].resistance > 0)) continue;
        const double push = std::max(ends[0], -ends[6]), share = push / columns[m].resistance;
        DishUse& column = result_.buckling[member.group];
        if (push > 0 && share > column.used)
          column = {push, columns[m].resistance, share, member.name, loads.state, spread};
      }
  }
}

void DishStrength::add_drive(const DishPose& pose, const Loads& loads) {
  DriveAtPose& at = result_.drive[loads.state.state.elevation];
  at.arm = pose.arm;
  const bool rod = !model_.collector().slewing;
  if (rod) {
    at.length = actuator_length(rod_, pose.elevation);
    at.buckling = rod_buckling_force(rod_, at.length);
  }
  at.weight = pose.drive.dot(loads.weight);
  for (Eigen::Index v = 0; v < loads.wind.cols(); ++v) {
    const auto variant = static_cast<std::size_t>(v);
    const double bare = at.weight + loads.gathered * pose.drive.dot(loads.wind.col(v));
    const double rubbing = friction_ / std::abs(pose.arm);
    const bool moving = moves(loads.state.state.kind);
    // Bearing friction works against the drive while it moves; at rest it helps and is left out.
    const double push = moving ? bare + std::copysign(rubbing, bare) : bare;
    keep_greatest(result_.holding, push, loads, variant);
    at.holding = std::max(at.holding, std::abs(push));
    at.back_driving = std::max(at.back_driving, std::abs(bare));
    if (moving) {
      keep_greatest(result_.moving, push, loads, variant);
      at.moving = std::max(at.moving, std::abs(push));
    }
    if (rod && push > 0 && push / at.buckling > result_.rod_share) {
      result_.rod_share = push / at.buckling;
      result_.rod_compression = {push, loads.state, loads.spread[variant]};
    }
  }
}

void DishStrength::add_azimuth(const DishPose& pose, const Loads& loads) {
  const Eigen::RowVectorXd about = pose.azimuth.row(5);
  const double weight = about.dot(loads.weight);
  for (Eigen::Index v = 0; v < loads.wind.cols(); ++v) {
    const auto variant = static_cast<std::size_t>(v);
    const VectorXd both = loads.weight + loads.gathered * loads.wind.col(v);
    const double torque = weight + loads.gathered * about.dot(loads.wind.col(v));
    keep_greatest(result_.azimuth_holding, torque, loads, variant);
    if (moves(loads.state.state.kind)) keep_greatest(result_.azimuth_moving, torque, loads, variant);
    keep_greatest(result_.bearing, std::max((pose.left * both).norm(), (pose.right * both).norm()), loads,
                  variant);
  }
}

void DishStrength::add_ground(const DishPose& pose, const Loads& loads) {
  const DishCollector& c = model_.collector();
  const MatrixXd weight = model_.foot_reactions(pose, loads.weight),
                 wind = model_.foot_reactions(pose, loads.wind);
  for (Eigen::Index v = 0; v < wind.cols(); ++v) {
    const auto variant = static_cast<std::size_t>(v);
    const VectorXd feet = weight.col(0) + loads.gathered * wind.col(v);
    Eigen::Matrix<double, 6, 1> sum = Eigen::Matrix<double, 6, 1>::Zero();
    for (std::size_t f = 0; f < c.feet.size(); ++f) {
      const auto row = 6 * static_cast<Eigen::Index>(f);
      const Eigen::Vector3d force = feet.segment<3>(row),
                            at = c.base.nodes[static_cast<std::size_t>(c.feet[f].node)].at;
      sum.head<3>() += force;
      sum.tail<3>() += feet.segment<3>(row + 3) + at.cross(force);
      if (-force.z() > result_.uplift.value)
        result_.uplift = {-force.z(), loads.state, loads.spread[variant]};
    }
    for (int i = 0; i < 6; ++i) {
      const auto k = static_cast<std::size_t>(i);
      if (sum[i] > result_.greatest[k].value)
        result_.greatest[k] = {sum[i], loads.state, loads.spread[variant]};
      if (sum[i] < result_.least[k].value) result_.least[k] = {sum[i], loads.state, loads.spread[variant]};
    }
    keep_greatest(result_.overturning, std::hypot(sum[3], sum[4]), loads, variant);
  }
}

}  // namespace focalframe::models
