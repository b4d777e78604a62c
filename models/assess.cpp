#include "models/assess.h"

#include <algorithm>
#include <cmath>
#include <map>

#include "fem/units.h"
#include "loads/averaging.h"
#include "loads/pose.h"
#include "models/catalogue.h"
#include "models/judgement.h"
#include "models/profile.h"
#include "models/quantity.h"
#include "models/row_winds.h"
#include "models/same_frame.h"
#include "models/torque_box.h"
#include "models/trough.h"

namespace focalframe::models {
namespace {

using Eigen::MatrixXd;
using Eigen::VectorXd;

class Check {
 public:
  Check(const TroughDesign& design, const loads::CoefficientTable& table, std::shared_ptr<const RowModel> row,
        const AssessOptions& options)
      : d_(design),
        options_(options),
        table_(table),
        owned_(std::move(row)),
        row_(*owned_),
        optics_(row_, design),
        strength_(row_, strength_rule(design)),
        winds_(winds_at_axis(design)),
        on_row_(design, table) {}

  Assessment run() {
    describe();
    std::map<double, std::vector<State>> poses;
    for (const State& state : asked_states(d_)) poses[state.elevation].push_back(state);
    for (const auto& [elevation, states] : poses) {
      const PoseModel pose = row_.pose(elevation);
      if (has_actions()) out_.actions.push_back({elevation, action_amounts(d_, row_, elevation)});
      look(pose, states);
      std::vector<StateLoads> loads_here;
      for (const State& state : states) add_loads(pose, state, loads_here);
      strength_.add(pose, loads_here);
    }
    out_.strength = strength_.result();
    finish_optics();
    prove();
    return std::move(out_);
  }

  /// Residual slope and intercept of one optical row again (for the discretisation check).
  OpticalResult again(const OpticalRow& row) {
    const PoseModel pose = row_.pose(row.state.elevation);
    VectorXd amplitudes = weight_amplitudes(row_, row.state.elevation);
    if (!row.calm) amplitudes += mean_wind(pose, row.state, row.spread);
    for (const auto& [name, also] : optical_extras())
      if (name == row.also) amplitudes += also;
    return optics_.look(pose, amplitudes)[0];
  }

 private:
  bool has_actions() const {
    return !std::isnan(d_.snow.on_ground) || d_.water.drains == "blocked" || !std::isnan(d_.ice.thickness) ||
           !std::isnan(design_acceleration(d_.earthquake));
  }

  void describe() {
    const Collector& c = row_.collector();
    const Parabola parabola{c.width, c.focal_length};
    out_.name = d_.name;
    out_.aperture = c.width;
    out_.length = d_.row.modules * d_.row.module_length;
    out_.focal_length = c.focal_length;
    out_.rim_angle = parabola.rim_angle();
    out_.axis_to_vertex = c.axis_to_vertex;
    out_.mirror_area = c.mirror_area;
    out_.mass = row_.body_mass;
    out_.mass_per_area = row_.body_mass / c.mirror_area;
    out_.stand_mass = 0;
    for (const Stand& stand : c.stands) out_.stand_mass += fem::total_mass(stand.frame).mass;
    out_.centre_below_axis = -(row_.body_centre.z() + c.axis_to_vertex);
    out_.weight_torque = row_.body_mass * standard_gravity * std::abs(out_.centre_below_axis);
    const CounterweightsInput& cw = d_.counterweights;
    if (cw.per_module > 0) {
      const TroughLayout at = lay_out(d_);
      const double lever = cw.behind_tube + at.tube_to_vertex - c.axis_to_vertex;
      // Moment of everything else about the axis, carried by the counterweights at their lever.
      const double number = cw.per_module * d_.row.modules;
      const double rest = -row_.body_mass * out_.centre_below_axis + number * cw.mass * lever;
      if (lever > 0 && rest > 0) out_.balancing_counterweight = rest / (number * lever);
    }
    out_.tube_torsion = tube_torsion();
    out_.undeformed = optics_.undeformed();
    out_.beam_rms = total_rms(optics_.beam());
    out_.freedoms = c.body.freedoms();
    out_.table = table_.name;
    out_.table_title = table_.title;
    out_.table_confidence = table_.confidence;
    out_.table_source = table_.source;
    out_.zone = d_.wind.zone;
    out_.cautions = table_.cautions;
    out_.rule = strength_rule(d_).text;
    describe_averaging();
    describe_receiver();
    for (StateKind kind : all_state_kinds) {
      if (kind == StateKind::maintenance) continue;  // the OPERATE wind
      const loads::WindAtHeight& wind = winds_.of(kind);
      if (!std::isnan(wind.height)) out_.winds.push_back({kind, wind, on_row_.size_factor(wind)});
    }
  }

  double tube_torsion() const {
    const ProfileInput& tube = d_.tube.profile;
    if (tube.shape == "lattice-box") return lattice_box_torsion(d_, lay_out(d_));
    return material_of(tube.material, profile_thickness(tube)).G * section_of(tube).J;
  }

  // The light is judged in the mean wind; another averaging changes its pressure by the square of the factor.
  void describe_averaging() {
    const double asked = d_.optics.wind_averaging;
    if (std::abs(asked - 600) < 1e-6) return;
    out_.optics_averaging = quantity_text(asked, Quantity::time) + (asked <= 3.5 ? " gust" : " mean");
    const loads::WindAtHeight& wind = winds_.operate;
    if (std::isnan(wind.mean_pressure)) return;
    out_.optics_pressure_factor =
        asked <= 3.5
            ? wind.gust_pressure / wind.mean_pressure
            : std::pow(loads::averaging_factor({600, asked}, loads::GustMethod::durst, wind.turbulence).value,
                       2);
  }

  // The receiver is held beside the drive; its far end moves most and swings the posts.
  void describe_receiver() {
    const TemperatureInput& t = d_.temperature;
    if (std::isnan(t.receiver_at) || std::isnan(t.set_at) || row_.collector().receiver_members.empty())
      return;
    const Collector& c = row_.collector();
    const fem::Member& tube = c.body.members[static_cast<std::size_t>(c.receiver_members.front())];
    const double drive = c.stands[static_cast<std::size_t>(c.drive_bearing)].x;
    const double reach = std::max(drive, out_.length - drive);
    out_.receiver_expansion = c.body.materials[static_cast<std::size_t>(tube.material)].expansion *
                              (t.receiver_at - t.set_at) * reach;
    out_.receiver_drop = post_drop(out_.receiver_expansion, c.focal_length + lay_out(d_).tube_to_vertex);
  }

  // Everything the wind adds to the weight, twist feedback included.
  VectorXd wind_part(const PoseModel& pose, const WindOnRow& wind) {
    const VectorXd weight = weight_amplitudes(row_, pose.elevation);
    const VectorXd unit = wind_amplitudes(row_, pose.elevation, wind);
    compare_totals(unit, wind);
    VectorXd both = weight + wind.pressure * unit;
    add_twist_feedback(row_, pose, wind, both);
    return both - weight;
  }

  VectorXd mean_wind(const PoseModel& pose, const State& state, Spread spread) {
    return wind_part(pose, on_row_.at(state.elevation, state.wind_from, spread, 0, false,
                                      winds_.of(state.kind).mean_pressure * out_.optics_pressure_factor));
  }

  // What the light is judged under besides weight and wind: nothing, temperatures, friction either way.
  std::vector<std::pair<std::string, VectorXd>> optical_extras() const {
    std::vector<std::pair<std::string, VectorXd>> extras;
    extras.emplace_back("", VectorXd::Zero(row_.columns().all()));
    for (const OtherLoad& t : optical_temperatures(d_, row_)) extras.emplace_back(t.name, t.amplitudes);
    if (const int friction = row_.units().at.friction; friction >= 0)
      for (double way : {1.0, -1.0}) {
        VectorXd a = VectorXd::Zero(row_.columns().all());
        a[row_.columns().unit(friction)] = way * d_.drive.friction;
        extras.emplace_back(way > 0 ? "friction +" : "friction -", a);
      }
    return extras;
  }

  // Weight alone, then both winds in both patterns, each also with what else acts.
  void look(const PoseModel& pose, const std::vector<State>& states) {
    const VectorXd weight = weight_amplitudes(row_, pose.elevation);
    std::vector<OpticalRow> rows;
    std::vector<VectorXd> columns;
    const auto extras = optical_extras();
    const auto add = [&](const State& state, bool calm, Spread spread, const VectorXd& load) {
      for (const auto& [name, also] : extras) {
        rows.push_back({state, calm, spread, {}, {}, name});
        columns.push_back(load + also);
      }
    };
    for (const State& state : states) {
      if (state.kind != StateKind::operate) continue;
      if (rows.empty()) add(state, true, Spread::linear, weight);
      for (Spread spread : on_row_.spreads(loads::pitch_seen_by_wind(state.elevation, state.wind_from)))
        add(state, false, spread, weight + mean_wind(pose, state, spread));
    }
    if (rows.empty()) return;
    MatrixXd amplitudes(weight.size(), static_cast<int>(columns.size()));
    for (std::size_t i = 0; i < columns.size(); ++i) amplitudes.col(static_cast<int>(i)) = columns[i];
    const std::vector<OpticalResult> results = optics_.look(pose, amplitudes);
    std::vector<OpticalMotion> motions;
    if (options_.trace_rays > 0) motions = optics_.motions(pose, amplitudes);
    for (std::size_t i = 0; i < rows.size(); ++i) {
      rows[i].result = results[i];
      if (!motions.empty()) rows[i].trace = trace_row(optics_, motions[i], options_.trace_rays);
      out_.optics.push_back(rows[i]);
    }
  }

  // Every wind of one state: patterns x gust angles; half of one module loaded at the pitch itself.
  void add_winds(const PoseModel& pose, const State& state, double pressure, StateLoads& loads_here) {
    std::vector<VectorXd> columns;
    const double angle = on_row_.gust_angle(state.kind);
    const double pitch = loads::pitch_seen_by_wind(state.elevation, state.wind_from);
    const auto add = [&](Spread spread, double offset) {
      columns.push_back(
          wind_part(pose, on_row_.at(state.elevation, state.wind_from, spread, offset, true, pressure)));
      loads_here.spread.push_back(spread);
    };
    for (double offset : {-angle, 0.0, angle})
      for (Spread spread : on_row_.spreads(pitch)) add(spread, offset);
    // Half patterns are for the winds to survive.
    if (state.kind == StateKind::stow || state.kind == StateKind::stuck)
      for (Spread half : {Spread::half_minus, Spread::half_plus}) add(half, 0);
    set_winds(columns, loads_here);
  }

  void set_winds(const std::vector<VectorXd>& columns, StateLoads& loads_here) const {
    loads_here.wind.resize(row_.columns().all(), static_cast<int>(columns.size()));
    for (std::size_t i = 0; i < columns.size(); ++i) loads_here.wind.col(static_cast<int>(i)) = columns[i];
  }

  // Mirrors on one side or none: their weight is missing, and so is the wind on them.
  StateLoads unfinished(const PoseModel& pose, const State& state, double pressure, int side) {
    StateLoads loads_here = plain_loads(state);
    loads_here.weight = unfinished_weight(row_, state.elevation, side);
    std::vector<VectorXd> columns;
    const double angle = on_row_.gust_angle(state.kind);
    for (double offset : {-angle, 0.0, angle}) {
      const Spread spread = side < 0 ? Spread::half_minus : Spread::half_plus;
      WindOnRow wind = on_row_.at(state.elevation, state.wind_from, spread, offset, true, pressure);
      wind.mirrors = side != 0;
      wind.half_everywhere = true;
      wind.moment_slope = 0;  // of the whole aperture; half a mirror has no table
      columns.push_back(wind_part(pose, wind));
      loads_here.spread.push_back(spread);
    }
    set_winds(columns, loads_here);
    return loads_here;
  }

  StateLoads plain_loads(const State& state) const {
    StateLoads loads_here;
    loads_here.state = state;
    loads_here.weight = weight_amplitudes(row_, state.elevation);
    loads_here.gathered = on_row_.size_factor(winds_.of(state.kind)) * d_.wind.dynamic_factor;
    loads_here.friction = d_.drive.friction;
    loads_here.others = other_loads(d_, row_, state);
    loads_here.ice_wind_share = d_.ice.wind_share;
    return loads_here;
  }

  double gust_of(const State& state) const {
    const loads::WindAtHeight& wind = winds_.of(state.kind);
    return table_.kind == loads::CoefficientKind::peak ? wind.mean_pressure : wind.gust_pressure;
  }

  void add_loads(const PoseModel& pose, const State& state, std::vector<StateLoads>& out) {
    if (state.kind == StateKind::unfinished && d_.erection.mirrors != "all") {
      for (int side : d_.erection.mirrors == "none" ? std::vector<int>{0} : std::vector<int>{-1, 1})
        out.push_back(unfinished(pose, state, gust_of(state), side));
      return;
    }
    out.push_back(load(pose, state));
    out_.wind_loads.push_back(wind_chain_row(row_, on_row_, state, true, gust_of(state)));
    if (state.kind == StateKind::operate)
      out_.wind_loads.push_back(wind_chain_row(
          row_, on_row_, state, false, winds_.of(state.kind).mean_pressure * out_.optics_pressure_factor));
  }

  StateLoads load(const PoseModel& pose, const State& state) {
    const loads::WindAtHeight& wind = winds_.of(state.kind);
    const double pressure = gust_of(state);
    StateLoads loads_here = plain_loads(state);
    const double pitch = loads::pitch_seen_by_wind(state.elevation, state.wind_from);
    add_winds(pose, state, pressure, loads_here);
    const double divergence = divergence_pressure(row_, pose, on_row_.moment_slope(pitch));
    const double speed = std::sqrt(2 * divergence / wind.density);
    const double used = wind.mean_speed / speed;
    if (std::isnan(out_.divergence_speed) || used > divergence_used_) {
      divergence_used_ = used;
      out_.divergence_speed = speed;
      out_.divergence_state = state;
    }
    note_moment(loads_here, pressure);
    return loads_here;
  }

  // Effective moment coefficient about the rotation axis of the whole row, for the line beside the drive's
  // rating.
  void note_moment(const StateLoads& loads_here, double pressure) {
    const double scale = pressure * out_.aperture * row_.collector().mirror_area;
    for (int v = 0; v < loads_here.wind.cols(); ++v) {
      const double moment =
          row_.load_totals().row(2).dot(loads_here.wind.col(v).head(row_.columns().body())) *
          loads_here.gathered;
      if (std::isnan(out_.row_moment_coefficient) || std::abs(moment) / scale > out_.row_moment_coefficient)
        out_.row_moment_coefficient = std::abs(moment) / scale;
    }
  }

  // Sum of the nodal loads of the pressure columns alone.
  Eigen::Vector3d pressure_sum(const VectorXd& unit) const {
    const int first = 4, count = row_.columns().unit(0) - first;
    return row_.load_totals().middleCols(first, count) * unit.segment(first, count);
  }

  // Nodal loads of the pressure columns against A C, per pascal, both forces and the moment about the axis.
  void compare_totals(const VectorXd& unit, const WindOnRow& wind) {
    const bool half = wind.spread == Spread::half_minus || wind.spread == Spread::half_plus;
    if (half || !wind.mirrors) return;  // no coefficients describe these
    const Eigen::Vector3d have = pressure_sum(unit);
    const double side = loads::upwind_side(wind.wind_from), area = row_.collector().mirror_area;
    const double y = -side * wind.coefficients.Cs * area, z = -wind.coefficients.Ca * area;
    // From the vertex to the axis by statics: the axis lies axis_to_vertex behind the vertex.
    const double moment =
        side * wind.coefficients.Cm * area * out_.aperture - row_.collector().axis_to_vertex * y;
    const double scale = area * std::max(0.01, std::hypot(wind.coefficients.Ca, wind.coefficients.Cs));
    const double error =
        std::max({std::abs(have[0] - y), std::abs(have[1] - z), std::abs(have[2] - moment) / out_.aperture}) /
        scale;
    if (!(error <= out_.proof.load_error)) out_.proof.load_error = error;
  }

  void finish_optics() {
    for (std::size_t i = 0; i < out_.optics.size(); ++i)
      if (out_.worst_light < 0 ||
          out_.optics[i].result.intercept <
              out_.optics[static_cast<std::size_t>(out_.worst_light)].result.intercept)
        out_.worst_light = static_cast<int>(i);
    if (out_.worst_light < 0) return;
    const OpticalRow& worst = out_.optics[static_cast<std::size_t>(out_.worst_light)];
    const PoseModel pose = row_.pose(worst.state.elevation);
    const VectorXd weight = weight_amplitudes(row_, worst.state.elevation);
    const VectorXd all = worst.calm ? weight : VectorXd(weight + mean_wind(pose, worst.state, worst.spread));
    out_.study = study_optics(optics_, d_, pose, weight, all);
    if (options_.maps) {
      const OpticalMotion motion = optics_.motions(pose, all).front();
      out_.maps = aperture_maps(optics_, motion);
      out_.receiver_map = receiver_map(optics_, motion);
    }
    if (!options_.rigging) return;
    std::vector<double> poses;
    for (const OpticalRow& row : out_.optics)
      if (row.calm) poses.push_back(row.state.elevation);
    out_.rigging = best_rigging(optics_, poses, d_.optics.set_true);
  }

  void prove() {
    out_.proof.residual = row_.residual;
    out_.proof.condition = row_.condition;
    State state{StateKind::operate, d_.operation.track_from, 0};
    Spread spread = Spread::linear;
    if (out_.worst_light >= 0) {
      state = out_.optics[static_cast<std::size_t>(out_.worst_light)].state;
      spread = out_.optics[static_cast<std::size_t>(out_.worst_light)].spread;
    } else {
      const std::vector<State> states = asked_states(d_);
      if (states.empty()) return;
      state = states.front();
    }
    const double pressure = winds_.of(state.kind).mean_pressure;
    const WindOnRow wind = on_row_.at(state.elevation, state.wind_from, spread, 0, false, pressure);
    const PoseModel pose = row_.pose(state.elevation);
    const VectorXd unit = wind_amplitudes(row_, state.elevation, wind);
    const Eigen::Vector3d sum = pressure_sum(unit);
    out_.proof.wind_force = pressure * std::hypot(sum[0], sum[1]);
    out_.proof.q_area_c =
        pressure * row_.collector().mirror_area * std::hypot(wind.coefficients.Ca, wind.coefficients.Cs);

    const VectorXd all = weight_amplitudes(row_, state.elevation) + wind_part(pose, wind);
    const Eigen::Vector3d loads_sum = row_.load_totals() * all.head(row_.columns().body());
    const VectorXd bearings = pose.bearing_force * all;
    double y = loads_sum[0], z = loads_sum[1];
    for (std::size_t k = 0; k < row_.collector().bearings.size(); ++k) {
      y += bearings[RowModel::bearing_y(static_cast<int>(k))];
      z += bearings[RowModel::bearing_y(static_cast<int>(k)) + 1];
    }
    // Bearings lie on the axis, so only the drive balances the moment about it.
    const double turn = loads_sum[2] + bearings[row_.drive_turn()];
    const double scale = std::hypot(loads_sum[0], loads_sum[1]);
    out_.proof.balance = std::max({std::abs(y), std::abs(z), std::abs(turn) / out_.aperture}) / scale;
  }

  const TroughDesign& d_;
  const AssessOptions& options_;
  const loads::CoefficientTable& table_;
  std::shared_ptr<const RowModel> owned_;
  const RowModel& row_;
  OpticsCheck optics_;
  StrengthCheck strength_;
  StateWinds winds_;
  RowWinds on_row_;
  Assessment out_;
  double divergence_used_ = 0;
};

std::shared_ptr<const RowModel> make_row(const TroughDesign& design, const loads::CoefficientTable& table,
                                         int refine) {
  Collector collector = build_trough(design, refine);
  UnitCases units = unit_cases(design, collector);
  return std::make_shared<const RowModel>(std::move(collector), table.stations, std::move(units));
}

}  // namespace

BuiltRow build_row(const TroughDesign& design, const loads::CoefficientTable& table) {
  return {design, make_row(design, table, 1)};
}

Assessment assess(const TroughDesign& asked, const loads::CoefficientTable& table,
                  const AssessOptions& options) {
  RowDynamics dynamics;
  const TroughDesign design = with_dynamic_factor(asked, &dynamics);
  const auto built = [&](int refine) {
    if (refine == 1 && options.built && same_frame(design, options.built->design)) return options.built->row;
    return make_row(design, table, refine);
  };
  Check check(design, table, built(options.refine), options);
  Assessment out = check.run();
  out.dynamics = dynamics;
  if (options.discretisation && out.worst_light >= 0) {
    const OpticalRow& worst = out.optics[static_cast<std::size_t>(out.worst_light)];
    const OpticalResult fine = Check(design, table, built(2 * options.refine), options).again(worst);
    out.proof.slope_change = fine.slope / worst.result.slope - 1;
    out.proof.intercept_change = fine.intercept - worst.result.intercept;
  }
  judge(design, out);
  return out;
}

}  // namespace focalframe::models
