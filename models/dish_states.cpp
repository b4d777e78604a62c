#include "models/dish_states.h"

#include <Eigen/Geometry>
#include <algorithm>
#include <cmath>
#include <cstdio>
#include <numbers>

#include "fem/units.h"
#include "loads/pose.h"

namespace focalframe::models {
namespace {

constexpr double pi = std::numbers::pi;

// Angle between the optical axis and where the wind comes from, both in yoke axes.
double pitch_of(double elevation, const Eigen::Vector3d& upwind) {
  return loads::dish_pitch({0, std::cos(elevation), std::sin(elevation)}, upwind);
}

}  // namespace

std::string place_text(const DishState& s) {
  const double pitch = pitch_of(s.state.elevation, upwind_of(s.state.wind_from));
  const char* face = pitch < 60 * deg ? "face" : pitch > 120 * deg ? "back" : "side";
  char text[64];
  int used = std::snprintf(text, sizeof text, "%s %.0f deg, %s %.0f", state_text(s.state.kind).c_str(),
                           std::round(s.state.elevation / deg) + 0.0, face, s.state.wind_from / deg);
  if (s.hour != 0)
    std::snprintf(text + used, sizeof text - static_cast<std::size_t>(used), ", %+.0f h",
                  s.hour / (15 * deg));
  return text;
}

std::vector<DishState> dish_states(const DishDesign& design) {
  std::vector<double> hours{0};
  if (design.dish.azimuth.tilt > 0) hours = {-60 * deg, 0, 60 * deg};
  std::vector<DishState> states;
  for (const State& asked : asked_states(design)) {
    if (asked.wind_from != 0) continue;  // the trough's two winds; a dish has its own directions
    for (double hour : hours)
      for (int k = 0; k < 8; ++k) states.push_back({{asked.kind, asked.elevation, k * pi / 4}, hour});
  }
  return states;
}

Eigen::Matrix3d yoke_from_world(const DishDesign& design, double hour) {
  const Eigen::AngleAxisd lean(design.dish.azimuth.tilt, Eigen::Vector3d::UnitX());
  const Eigen::AngleAxisd turn(hour, Eigen::Vector3d::UnitZ());
  return (lean * turn).toRotationMatrix().transpose();
}

Eigen::Vector3d upwind_in_yoke(const DishDesign& design, const DishState& s) {
  if (design.dish.azimuth.tilt == 0) return upwind_of(s.state.wind_from);
  return yoke_from_world(design, s.hour) * upwind_of(s.state.wind_from);
}

double dish_pitch(const DishDesign& design, const DishState& s) {
  return pitch_of(s.state.elevation, upwind_in_yoke(design, s));
}

DishWinds::DishWinds(const DishDesign& design, const loads::CoefficientTable& table)
    : design_(design),
      table_(table),
      zone_(loads::zone_factors(design.wind.zone).value_or(loads::ZoneFactors{})) {}

DishWind DishWinds::at(const DishState& state, Spread spread, double offset, bool upper) const {
  DishWind wind;
  wind.upwind = upwind_in_yoke(design_, state);
  wind.spread = spread;
  double pitch = dish_pitch(design_, state) + offset;
  // Past face-on or back-on the gust strikes from the other side.
  bool other_side = false;
  if (pitch < 0) pitch = -pitch, other_side = true;
  if (pitch > pi) pitch = 2 * pi - pitch, other_side = true;
  loads::Coefficients c = loads::coefficients_at(table_, pitch, upper).value();
  if (other_side) c.Cs = -c.Cs, c.Cm = -c.Cm;
  const double solid = design_.dish.mesh_relief == "solidity" ? design_.dish.surface.solidity : 1;
  wind.coefficients = {c.Ca * zone_.Ca * solid, c.Cs * zone_.Cs * solid, c.Cm * zone_.Cm * solid};
  return wind;
}

double DishWinds::gust_angle(StateKind kind) const {
  const double within = design_.operation.stow_within;
  const bool swept = kind == StateKind::stow || kind == StateKind::operate;
  return turbulence_angle + (swept || std::isnan(within) ? 0 : within);
}

double DishWinds::size_factor(const loads::WindAtHeight& wind) const {
  if (!design_.wind.size_factor) return 1;
  const double D = design_.parabola.aperture;
  return loads::size_factor(D, D, wind.height, wind.turbulence, site_of(design_.site));
}

std::vector<Violation> dish_table_gaps(const DishDesign& design, const loads::CoefficientTable& table) {
  std::vector<Violation> found;
  for (const DishState& state : dish_states(design)) {
    const double pitch = dish_pitch(design, state);
    const double reach =
        turbulence_angle + (std::isnan(design.operation.stow_within) ? 0 : design.operation.stow_within);
    bool covered = true;
    for (double p : {std::abs(pitch - reach), pitch, pi - std::abs(pi - pitch - reach)})
      covered = covered && loads::coefficients_at(table, p).has_value();
    if (covered) continue;
    Violation v;
    v.element = "wind";
    v.attribute = "table";
    v.rule = "table-range";
    v.text = "Table \"" + table.name + "\" covers " + number_text(table.pitch_min / deg) + " to " +
             number_text(table.pitch_max / deg) + " deg between optical axis and wind; " + place_text(state) +
             " needs " + number_text(std::round((pitch - reach) / deg)) + " to " +
             number_text(std::round((pitch + reach) / deg)) + ". Coefficients are never extrapolated.";
    v.advice = "Add rows to the table: a dish that turns under the wind sees every angle from 0 to 180 deg";
    found.push_back(v);
    break;
  }
  return found;
}

}  // namespace focalframe::models
