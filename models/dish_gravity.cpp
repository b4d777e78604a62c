#include "models/dish_gravity.h"

#include <Eigen/QR>
#include <algorithm>
#include <cmath>

#include "fem/units.h"
#include "loads/snow.h"
#include "models/dish_wind.h"

namespace focalframe::models {
namespace {

using Eigen::MatrixXd;
using Eigen::VectorXd;
using C = DishColumns;

double set_true_of(const DishDesign& d) {
  return d.dish.radio.given ? d.dish.radio.set_true : d.optics.set_true;
}

// a + b cos e + c sin e through the up and down pointing.
void fit_terms(GravityMap& map) {
  const auto n = static_cast<Eigen::Index>(map.points.size());
  if (n < 4) return;
  MatrixXd terms(n, 3);
  VectorXd up(n);
  for (Eigen::Index i = 0; i < n; ++i) {
    const GravityPoint& p = map.points[static_cast<std::size_t>(i)];
    terms.row(i) << 1, std::cos(p.elevation), std::sin(p.elevation);
    up[i] = p.pointing.x();
  }
  const VectorXd fitted = terms.colPivHouseholderQr().solve(up);
  map.offset = fitted[0];
  map.sag_cos = fitted[1];
  map.sag_sin = fitted[2];
  map.left_over = (up - terms * fitted).norm() / std::sqrt(static_cast<double>(n));
}

}  // namespace

GravityMap gravity_map(const DishModel& model, const DishOpticsCheck& optics, const DishDesign& d) {
  GravityMap map;
  const double from = d.operation.track_from, to = d.operation.track_to, set = set_true_of(d);
  const int steps = std::max(1, static_cast<int>(std::lround((to - from) / (5 * deg))));
  std::vector<ResidualField> fields;
  ResidualField at_set;
  if (!std::isnan(set)) at_set = optics.gravity_residual(model.pose(set));
  for (int i = 0; i <= steps; ++i) {
    const DishPose pose = model.pose(from + (to - from) * i / steps);
    fields.push_back(optics.gravity_residual(pose));
    const DishOptical seen = optics.look(pose, dish_weight_amplitudes(pose), {});
    GravityPoint point;
    point.elevation = pose.elevation;
    point.surface = at_set.size() > 0 ? (fields.back() - at_set).norm() : fields.back().norm();
    point.pointing = seen.pointing.total();
    point.focus_along = seen.focus_along;
    map.points.push_back(point);
    if (!(point.surface <= map.worst)) map.worst = point.surface;
  }
  for (std::size_t s = 0; s < fields.size(); ++s) {
    double worst = 0;
    for (const ResidualField& field : fields) worst = std::max(worst, (field - fields[s]).norm());
    if (worst >= map.worst_at_best) continue;  // NaN at first
    map.worst_at_best = worst;
    map.best_set = map.points[s].elevation;
  }
  fit_terms(map);
  return map;
}

DishBowl bowl_check(const DishModel& model, const DishDesign& d) {
  DishBowl bowl;
  const double stow = d.operation.stow_at;
  if (std::isnan(stow) || d.dish.surface.kind == "mesh" || d.dish.surface.hole > 0) return bowl;
  const DishCollector& c = model.collector();
  const loads::HeldWater held = loads::held_water({c.diameter, c.focal_length, true}, stow);
  if (!(held.amount > 0)) return bowl;
  bowl.water = held.amount;
  bowl.water_force = held.amount * loads::water_density * standard_gravity;
  // Hydrostatic pressure of the full bowl, scaled to the water it holds at this pose; it acts straight down
  // on the vertex line, where the full bowl has its centre.
  const DishPose pose = model.pose(stow);
  VectorXd water = VectorXd::Zero(C::all);
  water[C::uniform] = 1;
  water[C::bowl] = -1;
  const double have = -(model.totals() * water.head(C::body))[2];
  water *= bowl.water_force / have;
  const MatrixXd ends = model.evaluate(model.end_force, pose, dish_weight_amplitudes(pose) + water);
  for (std::size_t m = 0; m < c.body.members.size(); ++m) {
    const fem::Member& member = c.body.members[m];
    const double yield = c.body.materials[static_cast<std::size_t>(member.material)].yield;
    if (!(yield > 0)) continue;
    const VectorXd f = ends.block<12, 1>(12 * static_cast<Eigen::Index>(m), 0);
    const fem::Section& section = c.body.sections[static_cast<std::size_t>(member.section)];
    const double used = std::max(fem::von_mises_bound(section, {-f[0], -f[1], -f[2], -f[3], -f[4], -f[5]}),
                                 fem::von_mises_bound(section, {f[6], f[7], f[8], f[9], f[10], f[11]})) /
                        yield;
    if (used <= bowl.water_stress_used) continue;  // NaN at first
    bowl.water_stress_used = used;
    bowl.water_part = member.name;
  }
  return bowl;
}

}  // namespace focalframe::models
