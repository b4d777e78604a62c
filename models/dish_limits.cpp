#include "models/dish_limits.h"

#include <algorithm>
#include <cmath>
#include <limits>

#include "fem/units.h"
#include "models/dish.h"

namespace focalframe::models {
namespace {

// The axis wind of any stated state: density, height and turbulence do not depend on its speed.
loads::WindAtHeight some_wind(const DishDesign& design) {
  const StateWinds winds = winds_at_axis(design);
  for (StateKind kind : {StateKind::stow, StateKind::operate, StateKind::stuck})
    if (!std::isnan(winds.of(kind).height)) return winds.of(kind);
  return {};
}

bool within(double a, double b, double reach) {
  return std::abs(std::remainder(a - b, 360 * deg)) <= reach + 1e-9;
}

}  // namespace

DishShare hardest_use(const DishStrengthResult& r, const DishDesign& d, bool moving) {
  DishShare hardest;
  const auto take = [&](double used, const std::string& what) {
    if (used > hardest.used) hardest = {used, what};
  };
  const auto force = [&](const DishForce& f, double capacity, const char* what) {
    if (!std::isnan(capacity)) take(std::abs(f.value) / capacity, what);
  };
  if (!d.limits.strength.empty() || !std::isnan(d.limits.strength_factor)) {
    for (const auto& [group, use] : r.stress)
      if (use.allowed > 0) take(use.used, group + " yields");
    for (const auto& [group, use] : r.buckling) take(use.used, group + " buckles");
  }
  const DishInput& dish = d.dish;
  if (std::isnan(dish.actuator.stiffness)) {
    force(r.holding, dish.slewing.holding_torque, "elevation drive slips");
    if (moving) force(r.moving, dish.slewing.moving_torque, "elevation drive cannot move");
  } else {
    force(r.holding, dish.actuator.hold, "actuator slips");
    if (moving) force(r.moving, dish.actuator.push, "actuator cannot move");
    if (!std::isnan(dish.actuator.rod_diameter)) take(3 * r.rod_share, "rod buckles");
  }
  force(r.azimuth_holding, dish.azimuth.holding_torque, "azimuth drive slips");
  if (moving) force(r.azimuth_moving, dish.azimuth.moving_torque, "azimuth drive cannot move");
  force(r.overturning, dish.pedestal.footing.overturning_capacity, "footing overturns");
  force(r.uplift, dish.pedestal.footing.uplift_capacity, "foot lifts");
  return hardest;
}

DishLimits::DishLimits(const DishDesign& design, const loads::CoefficientTable& table)
    : design_(design), model_(build_dish(design)), winds_(design, table), air_(some_wind(design)) {}

DishLimit DishLimits::at(StateKind kind, double elevation, double wind_from) const {
  const DishState state{{kind, elevation, wind_from}, 0};
  const DishPose pose = model_.pose(elevation, yoke_from_world(design_, 0));
  DishStrength::Loads loads;
  loads.state = state;
  loads.weight = dish_weight_amplitudes(pose);
  loads.gathered = winds_.size_factor(air_) * design_.wind.dynamic_factor;
  Eigen::MatrixXd unit(DishColumns::all, 6);
  const double angle = winds_.gust_angle(kind);
  int at = 0;
  for (double offset : {-angle, 0.0, angle})
    for (Spread spread : {Spread::linear, Spread::edge}) {
      unit.col(at++) = dish_wind_amplitudes(model_, pose, winds_.at(state, spread, offset, true));
      loads.spread.push_back(spread);
    }
  const bool moving = kind == StateKind::operate || kind == StateKind::turning;
  const auto use = [&](double q) {
    loads.wind = q * unit;
    DishStrength strength(model_, design_);
    strength.add(pose, loads);
    return hardest_use(strength.result(), design_, moving);
  };
  DishLimit out{elevation, wind_from, not_given, {}};
  double low = 0, high = air_.density / 2 * 100 * 100;
  DishShare share = use(high);
  out.governs = share.what;
  if (share.used <= 1) {
    out.gust = std::numeric_limits<double>::infinity();
    return out;
  }
  if (share = use(0); share.used > 1) {
    out.gust = 0;
    out.governs = share.what;
    return out;
  }
  while (high - low > 2e-3 * high) {
    const double middle = (low + high) / 2;
    share = use(middle);
    if (share.used > 1) {
      high = middle;
      out.governs = share.what;
    } else {
      low = middle;
    }
  }
  out.gust = std::sqrt(2 * low / air_.density);
  return out;
}

std::vector<DishLimit> DishLimits::map(StateKind kind) const {
  std::vector<double> elevations{design_.drive.turns_from, design_.drive.turns_to, design_.operation.stow_at};
  for (double e = -180 * deg; e < design_.drive.turns_to; e += 15 * deg)
    if (e > design_.drive.turns_from) elevations.push_back(e);
  std::erase_if(elevations, [](double e) { return std::isnan(e); });
  std::sort(elevations.begin(), elevations.end());
  elevations.erase(std::unique(elevations.begin(), elevations.end(),
                               [](double a, double b) { return std::abs(a - b) < 1e-9; }),
                   elevations.end());
  std::vector<DishLimit> out;
  for (double e : elevations)
    for (int k = 0; k < 8; ++k) out.push_back(at(kind, e, k * 45 * deg));
  return out;
}

StowSearch search_stow(const std::vector<DishLimit>& map, const DishDesign& design) {
  StowSearch out;
  const auto least = [&](double elevation, double towards, double reach) {
    DishStowPose pose{elevation, std::numeric_limits<double>::infinity(), {}, {}};
    for (const DishLimit& l : map)
      if (std::abs(l.elevation - elevation) < 1e-9 && within(l.wind_from, towards, reach) &&
          !(l.gust >= pose.gust)) {
        pose.gust = l.gust;
        pose.governs = l.governs;
      }
    return pose;
  };
  const auto better = [](const DishStowPose& a, const DishStowPose& b) {
    return std::isnan(b.gust) || a.gust > b.gust;
  };
  std::vector<double> done;
  for (const DishLimit& l : map) {
    if (std::any_of(done.begin(), done.end(), [&](double e) { return std::abs(e - l.elevation) < 1e-9; }))
      continue;
    done.push_back(l.elevation);
    DishStowPose any = least(l.elevation, 0, 180 * deg);
    any.azimuth = "any";
    if (better(any, out.any)) out.any = any;
    if (std::abs(l.elevation - design.operation.stow_at) < 1e-9) out.asked = any;
    for (const auto& [towards, word] :
         {std::pair(0.0, "face to the wind"), std::pair(180 * deg, "back to the wind")}) {
      DishStowPose turned = least(l.elevation, towards, 45 * deg);
      turned.azimuth = word;
      if (better(turned, out.turned)) out.turned = turned;
    }
  }
  return out;
}

}  // namespace focalframe::models
