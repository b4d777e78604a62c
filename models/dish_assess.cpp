#include "models/dish_assess.h"

#include <algorithm>
#include <cmath>
#include <map>

#include "fem/modes.h"
#include "fem/units.h"
#include "models/dish.h"
#include "models/dish_full_frame.h"
#include "models/dish_gravity.h"

namespace focalframe::models {
namespace {

using Eigen::MatrixXd;
using Eigen::VectorXd;
using C = DishColumns;

class Check {
 public:
  Check(const DishDesign& design, const loads::CoefficientTable& table, int refine)
      : d_(design),
        table_(table),
        model_(build_dish(design, refine)),
        optics_(model_, design),
        strength_(model_, design),
        winds_(winds_at_axis(design)),
        on_dish_(design, table) {}

  DishAssessment run(bool frequency) {
    describe();
    std::map<std::pair<double, double>, std::vector<DishState>> poses;
    for (const DishState& s : dish_states(d_)) poses[{s.state.elevation, s.hour}].push_back(s);
    for (const auto& [place, states] : poses) {
      const DishPose pose = model_.pose(place.first, yoke_from_world(d_, place.second));
      look(pose, states);
      for (const DishState& state : states) strength_.add(pose, loads_of(pose, state));
    }
    out_.strength = strength_.result();
    out_.gravity = gravity_map(model_, optics_, d_);
    out_.bowl = bowl_check(model_, d_);
    find_worst();
    prove();
    if (frequency)
      out_.frequency = fem::natural_modes(dish_full_frame(model_.collector(), stow_or_zenith()).frame, 1)
                           .front()
                           .frequency;
    return std::move(out_);
  }

  DishOptical again(const DishOpticalRow& row) {
    const DishPose pose = model_.pose(row.state.state.elevation, yoke_from_world(d_, row.state.hour));
    return optics_.look(pose, dish_weight_amplitudes(pose),
                        row.calm ? VectorXd() : mean_wind(pose, row.state, row.spread));
  }

 private:
  double stow_or_zenith() const { return std::isnan(d_.operation.stow_at) ? 90 * deg : d_.operation.stow_at; }

  void describe() {
    const DishCollector& c = model_.collector();
    out_.common.name = d_.name;
    out_.radio = optics_.radio();
    out_.slewing = c.slewing;
    out_.diameter = c.diameter;
    out_.focal_length = c.focal_length;
    out_.rim_angle = optics_.parabola().rim_angle();
    out_.surface_area = c.surface_area;
    out_.counterweight = std::isnan(d_.dish.counterweight.mass) ? 0 : d_.dish.counterweight.mass;
    out_.yoke_mass = model_.yoke_mass;
    out_.base_mass = model_.base_mass;
    out_.mass_per_area = (model_.body_mass - out_.counterweight) / c.area;
    out_.centre_behind_axis = -(model_.body_centre.z() + c.axis_to_vertex);
    out_.weight_torque = model_.body_mass * standard_gravity * std::abs(out_.centre_behind_axis);
    out_.beamwidth = optics_.beamwidth();
    out_.built_db = optics_.built_db();
    if (out_.radio) out_.wavelength = wavelength(d_.dish.radio.frequency);
    Assessment& a = out_.common;
    a.aperture = c.diameter;
    a.focal_length = c.focal_length;
    a.mirror_area = c.area;
    a.mass = model_.body_mass;
    a.undeformed = optics_.undeformed();
    a.beam_rms = optics_.beam_rms();
    a.freedoms = c.body.freedoms();
    a.table = table_.name;
    a.table_title = table_.title;
    a.table_confidence = table_.confidence;
    a.table_source = table_.source;
    a.cautions = table_.cautions;
    a.zone = d_.wind.zone;
    a.rule = strength_.rule().text;
    for (StateKind kind : {StateKind::operate, StateKind::turning, StateKind::stow, StateKind::stuck}) {
      const loads::WindAtHeight& wind = winds_.of(kind);
      if (!std::isnan(wind.height)) a.winds.push_back({kind, wind, on_dish_.size_factor(wind)});
    }
  }

  VectorXd unit_wind(const DishPose& pose, const DishWind& wind) {
    DishPattern pattern;
    const VectorXd unit = dish_wind_amplitudes(model_, pose, wind, &pattern);
    out_.residual_side = std::max(out_.residual_side, std::abs(pattern.residual_side));
    const double area = model_.collector().area;
    const Eigen::Vector3d have = wind_integrals(model_, pose, wind, unit);
    const loads::Coefficients& k = wind.coefficients;
    const Eigen::Vector3d want(k.Ca * area, k.Cs * area, k.Cm * area * model_.collector().diameter);
    const double error =
        (have - want).cwiseAbs().maxCoeff() / (area * std::max(0.01, std::hypot(k.Ca, k.Cs)));
    if (!(error <= out_.common.proof.load_error)) out_.common.proof.load_error = error;
    return unit;
  }

  VectorXd mean_wind(const DishPose& pose, const DishState& state, Spread spread) {
    return winds_.of(state.state.kind).mean_pressure * unit_wind(pose, on_dish_.at(state, spread, 0, false));
  }

  void look(const DishPose& pose, const std::vector<DishState>& states) {
    const VectorXd weight = dish_weight_amplitudes(pose);
    bool calm_done = false;
    for (const DishState& state : states) {
      if (state.state.kind != StateKind::operate) continue;
      if (!calm_done) out_.optics.push_back({state, true, Spread::linear, optics_.look(pose, weight, {})});
      calm_done = true;
      for (Spread spread : {Spread::linear, Spread::edge})
        out_.optics.push_back(
            {state, false, spread, optics_.look(pose, weight, mean_wind(pose, state, spread))});
    }
  }

  DishStrength::Loads loads_of(const DishPose& pose, const DishState& state) {
    const loads::WindAtHeight& wind = winds_.of(state.state.kind);
    const bool peak = table_.kind == loads::CoefficientKind::peak;
    const double pressure = peak ? wind.mean_pressure : wind.gust_pressure;
    const double angle = on_dish_.gust_angle(state.state.kind);
    DishStrength::Loads out;
    out.state = state;
    out.weight = dish_weight_amplitudes(pose);
    out.gathered = on_dish_.size_factor(wind) * d_.wind.dynamic_factor;
    out.wind.resize(C::all, 6);
    int at = 0;
    for (double offset : {-angle, 0.0, angle})
      for (Spread spread : {Spread::linear, Spread::edge}) {
        out.wind.col(at++) = pressure * unit_wind(pose, on_dish_.at(state, spread, offset, true));
        out.spread.push_back(spread);
      }
    return out;
  }

  void find_worst() {
    const auto worse = [&](const DishOptical& a, const DishOptical& b) {
      return out_.radio ? a.gain_loss > b.gain_loss : a.intercept < b.intercept;
    };
    for (std::size_t i = 0; i < out_.optics.size(); ++i)
      if (out_.worst < 0 ||
          worse(out_.optics[i].result, out_.optics[static_cast<std::size_t>(out_.worst)].result))
        out_.worst = static_cast<int>(i);
  }

  // Sum of everything on body, yoke and base against the ground's reaction, in the governing optical state.
  void prove() {
    Proof& proof = out_.common.proof;
    proof.residual = model_.residual;
    proof.condition = model_.condition;
    const std::vector<DishState> states = dish_states(d_);
    if (states.empty()) return;
    DishState state = states.front();
    if (out_.worst >= 0) state = out_.optics[static_cast<std::size_t>(out_.worst)].state;
    const DishPose pose = model_.pose(state.state.elevation, yoke_from_world(d_, state.hour));
    const double pressure = winds_.of(state.state.kind).mean_pressure;
    const DishWind wind = on_dish_.at(state, Spread::linear, 0, false);
    const VectorXd unit = unit_wind(pose, wind);
    const Eigen::Vector3d have = wind_integrals(model_, pose, wind, unit);
    proof.wind_force = pressure * std::hypot(have[0], have[1]);
    proof.q_area_c =
        pressure * model_.collector().area * std::hypot(wind.coefficients.Ca, wind.coefficients.Cs);
    VectorXd all = dish_weight_amplitudes(pose) + pressure * unit;
    all.segment<2>(C::base_wind).setZero();
    const MatrixXd feet = model_.foot_reactions(pose, all);
    Eigen::Vector3d sum = pose.yoke_from_world.transpose() * pose.collector_from_yoke().transpose() *
                          (model_.totals() * all.head(C::body)).head<3>();
    sum.z() -= standard_gravity * (model_.yoke_mass + model_.base_mass);
    const double scale = sum.norm();
    for (Eigen::Index f = 0; 6 * f < feet.rows(); ++f) sum += feet.block<3, 1>(6 * f, 0);
    proof.balance = sum.norm() / scale;
  }

  const DishDesign& d_;
  const loads::CoefficientTable& table_;
  DishModel model_;
  DishOpticsCheck optics_;
  DishStrength strength_;
  StateWinds winds_;
  DishWinds on_dish_;
  DishAssessment out_;
};

}  // namespace

DishAssessment assess_dish(const DishDesign& design, const loads::CoefficientTable& table,
                           const DishAssessOptions& options) {
  DishAssessment out = Check(design, table, options.refine).run(options.frequency);
  if (options.discretisation && out.worst >= 0) {
    const DishOpticalRow& worst = out.optics[static_cast<std::size_t>(out.worst)];
    const DishOptical fine = Check(design, table, 2 * options.refine).again(worst);
    out.common.proof.slope_change = fine.slope / worst.result.slope - 1;
    out.common.proof.intercept_change =
        out.radio ? fine.gain_loss - worst.result.gain_loss : fine.intercept - worst.result.intercept;
  }
  if (options.parking) {
    out.parking = DishLimits(design, table).map(StateKind::stow);
    out.stow = search_stow(out.parking, design);
  }
  judge_dish(design, out);
  return out;
}

}  // namespace focalframe::models
