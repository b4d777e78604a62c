#include "models/states.h"

#include <algorithm>
#include <cmath>
#include <cstdio>
#include <numbers>

#include "fem/units.h"
#include "loads/pose.h"
#include "loads/statistics.h"
#include "models/quantity.h"

namespace focalframe::models {
namespace {

constexpr double pi = std::numbers::pi;

// Both ends and every multiple of 15 deg between them, so that all states share their poses.
std::vector<double> sweep(double one, double other) {
  const double from = std::min(one, other), to = std::max(one, other);
  std::vector<double> poses = {from};
  for (int k = static_cast<int>(std::floor(from / (15 * deg))); k * 15 * deg < to; ++k)
    if (k * 15 * deg > from + 1e-9 && k * 15 * deg < to - 1e-9) poses.push_back(k * 15 * deg);
  if (to > from) poses.push_back(to);
  return poses;
}

void add(std::vector<State>& states, StateKind kind, const std::vector<double>& poses) {
  for (double e : poses)
    for (double from : {0.0, pi}) states.push_back({kind, e, from});
}

loads::WindAtHeight wind_of(const TroughDesign& design, const WindStateInput& wind, double factor = 1) {
  if (!wind.given) return {};
  loads::StatedWind stated;
  stated.speed = wind.speed * factor;
  stated.averaging = wind.averaging;
  if (!std::isnan(wind.height)) stated.height = wind.height;
  stated.pressure = wind.pressure * factor * factor;
  stated.over = wind.over == "site" ? loads::StatedOver::site : loads::StatedOver::open_country;
  const double years = wind.return_period;
  const double rarer = std::isnan(years) ? 1 : loads::return_period_factor({.years = years});
  stated.speed *= rarer;
  stated.pressure *= rarer * rarer;
  loads::WindAtHeight at_axis = loads::wind_at(design.row.axis_height, stated, site_of(design.site));
  if (!std::isnan(years))
    at_axis.chain.insert(at_axis.chain.begin(),
                         {"return-period factor c_prob", rarer, "-",
                          "((1 - 0.2 ln(-ln(1 - 1/T))) / (1 - 0.2 ln(-ln 0.98)))^0.5, T = " +
                              number_text(years) + " years, on the speed stated for 50 (EN 1991-1-4, 4.2)"});
  return at_axis;
}

}  // namespace

std::string state_text(StateKind kind) {
  switch (kind) {
    case StateKind::operate:
      return "OPERATE";
    case StateKind::turning:
      return "TURNING";
    case StateKind::stow:
      return "STOW";
    case StateKind::stuck:
      return "STUCK";
    case StateKind::unfinished:
      return "UNFINISHED";
    case StateKind::maintenance:
      return "MAINTENANCE";
  }
  return {};
}

std::string place_text(const State& state) {
  // Edge-on the wind strikes neither face: say which side it comes from.
  const double pitch = std::abs(loads::pitch_seen_by_wind(state.elevation, state.wind_from));
  const char* face = std::abs(pitch - pi / 2) < 1e-6
                         ? (loads::upwind_side(state.wind_from) > 0 ? "from +Y" : "from -Y")
                     : pitch < pi / 2 ? "face"
                                      : "back";
  const double off = loads::yaw(state.wind_from);
  char text[80];
  if (off > along_row_angle - 1e-6)
    std::snprintf(text, sizeof text, "%s %.0f deg, along the row", state_text(state.kind).c_str(),
                  std::round(state.elevation / deg) + 0.0);
  else if (off > 1e-6)
    std::snprintf(text, sizeof text, "%s %.0f deg, %s, %.0f deg oblique", state_text(state.kind).c_str(),
                  std::round(state.elevation / deg) + 0.0, face, off / deg);
  else
    std::snprintf(text, sizeof text, "%s %.0f deg, %s", state_text(state.kind).c_str(),
                  std::round(state.elevation / deg) + 0.0, face);
  return text;
}

std::vector<State> asked_states(const TroughDesign& design) {
  const OperationInput& op = design.operation;
  const DriveInput& drive = design.drive;
  std::vector<State> states;
  if (design.wind.operate.given) add(states, StateKind::operate, sweep(op.track_from, op.track_to));
  double lowest = op.track_from, highest = op.track_to;
  if (!std::isnan(op.stow_at)) {
    const double far_end = std::abs(op.stow_at - op.track_to) > std::abs(op.stow_at - op.track_from)
                               ? op.track_to
                               : op.track_from;
    if (design.wind.operate.given || design.wind.turning.given)
      add(states, StateKind::turning, sweep(op.stow_at, far_end));
    if (design.wind.stow.given) {
      const double within = std::isnan(op.stow_within) ? 0 : op.stow_within;
      add(states, StateKind::stow,
          within > 0 ? std::vector<double>{op.stow_at - within, op.stow_at, op.stow_at + within}
                     : std::vector<double>{op.stow_at});
    }
    lowest = std::min(lowest, op.stow_at);
    highest = std::max(highest, op.stow_at);
  }
  if (design.wind.stuck.given)
    add(states, StateKind::stuck,
        sweep(std::isnan(drive.turns_from) ? lowest : drive.turns_from,
              std::isnan(drive.turns_to) ? highest : drive.turns_to));
  if (design.wind.unfinished.given && !std::isnan(design.erection.at)) {
    add(states, StateKind::unfinished, {design.erection.at});
    if (design.wind.along_row) states.push_back({StateKind::unfinished, design.erection.at, along_row_angle});
  }
  if (!std::isnan(design.maintenance.at)) add(states, StateKind::maintenance, {design.maintenance.at});
  return states;
}

loads::Site site_of(const SiteInput& input) {
  loads::Site site;
  site.altitude = input.altitude;
  site.temperature = input.temperature;
  site.pressure = input.pressure;
  site.density = input.air_density;
  site.orography = input.orography;
  if (!std::isnan(input.power_exponent)) site.power_exponent = input.power_exponent;
  site.turbulence = input.turbulence;
  site.asce_edition = input.asce_edition;
  const std::pair<const char*, loads::Terrain> words[] = {
      {"EN 0", loads::Terrain::en_0},          {"EN I", loads::Terrain::en_1},
      {"EN II", loads::Terrain::en_2},         {"EN III", loads::Terrain::en_3},
      {"EN IV", loads::Terrain::en_4},         {"ASCE B", loads::Terrain::asce_b},
      {"ASCE C", loads::Terrain::asce_c},      {"ASCE D", loads::Terrain::asce_d},
      {"power law", loads::Terrain::power_law}};
  for (const auto& [word, terrain] : words)
    if (input.terrain == word) site.terrain = terrain;
  return site;
}

const loads::WindAtHeight& StateWinds::of(StateKind kind) const {
  switch (kind) {
    case StateKind::operate:
      return operate;
    case StateKind::turning:
      return turning;
    case StateKind::stow:
      return stow;
    case StateKind::stuck:
      return stuck;
    case StateKind::unfinished:
      return unfinished;
    case StateKind::maintenance:
      return operate;
  }
  return operate;
}

StateWinds winds_at_axis(const TroughDesign& design) {
  StateWinds winds;
  winds.operate = wind_of(design, design.wind.operate);
  winds.turning = design.wind.turning.given ? wind_of(design, design.wind.turning)
                                            : wind_of(design, design.wind.operate, turning_over_operate);
  if (!design.wind.turning.given && design.wind.operate.given)
    winds.turning.chain.insert(winds.turning.chain.begin(),
                               {"turning wind over operate wind", turning_over_operate, "-", "judgement"});
  winds.stow = wind_of(design, design.wind.stow);
  winds.stuck = wind_of(design, design.wind.stuck);
  winds.unfinished = wind_of(design, design.wind.unfinished);
  return winds;
}

std::vector<Violation> table_gaps(const TroughDesign& design, const loads::CoefficientTable& table) {
  std::vector<Violation> gaps;
  const double tolerance = std::isnan(design.operation.stow_within) ? 0 : design.operation.stow_within;
  for (const State& state : asked_states(design)) {
    const double spread = state.kind == StateKind::operate ? turbulence_angle : turbulence_angle + tolerance;
    const double pitch = loads::pitch_seen_by_wind(state.elevation, state.wind_from);
    bool covered = true;
    for (double offset : {-spread, 0.0, spread})
      covered = covered && loads::coefficients_at(table, loads::wrap_angle(pitch + offset)).has_value();
    if (covered) continue;
    const char* element[] = {"operation", "operation", "operation", "drive", "erection", "maintenance"};
    const char* attribute[] = {"track-from", "stow-at", "stow-at", "turns-from", "at", "at"};
    const auto kind = static_cast<std::size_t>(state.kind);
    char text[400];
    std::snprintf(
        text, sizeof text,
        "Table \"%s\" covers pitch %.0f to %.0f deg; %s needs %.0f to %.0f deg (pose tolerance and 5 deg of "
        "turbulence). Coefficients are never extrapolated.",
        table.name.c_str(), table.pitch_min / deg, table.pitch_max / deg, place_text(state).c_str(),
        (pitch - spread) / deg, (pitch + spread) / deg);
    Violation v;
    v.element = element[kind];
    v.attribute = attribute[kind];
    v.text = text;
    v.advice = "Add rows to the table, choose another pose, or name a table that covers it.";
    v.rule = "table-range";
    gaps.push_back(v);
    return gaps;  // one is enough: the mend is the same for all
  }
  return gaps;
}

}  // namespace focalframe::models
