#include "models/wind_rules.h"

#include <cmath>

#include "loads/guards.h"
#include "models/quantity.h"
#include "models/states.h"
#include "models/trough_layout.h"

namespace focalframe::models {
namespace {

Violation violation_of(const loads::Verdict& verdict, const char* element, const char* attribute) {
  Violation v;
  v.level = verdict.severity == loads::Severity::refused  ? Violation::Level::stop
            : verdict.severity == loads::Severity::warned ? Violation::Level::warn
                                                          : Violation::Level::note;
  v.element = element;
  v.attribute = attribute;
  v.text = verdict.text;
  v.advice = verdict.fix;
  v.rule = verdict.rule;
  return v;
}

// Thin air counted in the density and in the speed.
void check_density(const TroughDesign& d, std::vector<Violation>& found) {
  const double density = loads::air_density(site_of(d.site)).value;
  if (const auto v =
          loads::guard_density({.density = density, .map_includes_altitude = d.wind.altitude_in_speed}))
    found.push_back(violation_of(*v, "wind", "altitude-in-speed"));
}

// The level of the map against the factors of the combinations.
void check_map(const TroughDesign& d, std::vector<Violation>& found) {
  if (d.wind.map.empty() || d.limits.strength.empty()) return;
  const loads::MapFactor use{d.wind.map == "ultimate", loads::greatest_wind_factor(d.combinations)};
  // A service map with the factor of an ultimate one, and an allowable-stress set, have no factor above 1.
  if (d.combinations.on_yield < 0.7 && !use.ultimate_map) return;
  if (const auto v = loads::guard_load_factor(use)) found.push_back(violation_of(*v, "wind", "map"));
}

void check_field(const TroughDesign& d, const std::string& table_zone, std::vector<Violation>& found) {
  if (const auto v = loads::guard_zone({d.wind.zone, table_zone, d.wind.faces_open_ground}))
    found.push_back(violation_of(*v, "wind", "zone"));
}

// What the chain makes of the stated winds: an axis windier than 10 m above it, gusts that are hardly gusts.
void check_chain(const TroughDesign& d, const loads::CoefficientTable& table, std::vector<Violation>& found) {
  if (!d.wind.operate.given) return;
  const StateWinds winds = winds_at_axis(d);
  TroughDesign high = d;
  high.row.axis_height = 10;
  if (std::isnan(d.wind.operate.pressure))
    if (const auto v = loads::guard_profile(winds.operate, winds_at_axis(high).operate))
      found.push_back(violation_of(*v, "wind/operate", "height"));
  const bool hardly = winds.operate.gust_pressure < 1.3 * winds.operate.mean_pressure;
  if (hardly && table.kind == loads::CoefficientKind::mean)
    if (const auto v = loads::guard_gusts(table.kind, loads::PressureKind::mean, loads::Use::strength, 0.2)) {
      found.push_back(violation_of(*v, "site", "turbulence"));
      found.back().text += " The gust pressure here is only " +
                           number_text(winds.operate.gust_pressure / winds.operate.mean_pressure) +
                           " times that of the mean.";
    }
}

// A rule the design accepts with a reason is no longer in the way, but stays in sight.
void accept(const TroughDesign& design, Violation& v) {
  for (const AcceptInput& exception : design.accepted)
    if (!v.rule.empty() && exception.rule == v.rule) {
      v.level = Violation::Level::note;
      v.text += " Accepted because: " + exception.because + ".";
      v.advice.clear();
    }
}

}  // namespace

std::vector<Violation> wind_rules(const TroughDesign& design, const loads::CoefficientTable& table,
                                  const std::string& table_zone) {
  std::vector<Violation> found;
  if (table.collector_kind == "dish") {
    Violation v;
    v.element = "wind";
    v.attribute = "table";
    v.text = "Table \"" + table.name +
             "\" is for dishes: its coefficients are on the area of a disc and its moment on a diameter. A "
             "trough needs a "
             "table of its own kind.";
    v.advice = "Name a trough table, for example table=\"trough-computed\"";
    return {v};
  }
  const std::pair<const char*, const WindStateInput*> winds[] = {
      {"wind/operate", &design.wind.operate},
      {"wind/turning", &design.wind.turning},
      {"wind/stow", &design.wind.stow},
      {"wind/stuck", &design.wind.stuck},
      {"wind/unfinished", &design.wind.unfinished}};
  for (const auto& [element, wind] : winds) {
    if (!wind->given) continue;
    const auto pressure = wind->averaging <= 3.5 ? loads::PressureKind::gust : loads::PressureKind::mean;
    // Only the peak table is at stake here: a mean table gets its gusts from the wind chain.
    if (table.kind != loads::CoefficientKind::peak) continue;
    if (const auto v = loads::guard_gusts(table.kind, pressure, loads::Use::strength, 0.2))
      found.push_back(violation_of(*v, element, "averaging"));
  }
  check_density(design, found);
  check_map(design, found);
  check_field(design, table_zone, found);
  check_chain(design, table, found);
  const double width = design.parabola.aperture;
  if (table.kind == loads::CoefficientKind::peak)
    if (const auto v = loads::guard_gusts(table.kind, loads::PressureKind::mean, loads::Use::optics, 0.2))
      found.push_back(violation_of(*v, "wind", "table"));
  loads::TableUse use;
  use.focal_ratio = focal_length_of(design.parabola) / width;
  use.height_ratio = design.row.axis_height / width;
  use.yaw = 0;
  if (const auto v = loads::guard_validity(table, use)) found.push_back(violation_of(*v, "wind", "table"));
  for (Violation& v : found) accept(design, v);
  for (const Violation& gap : table_gaps(design, table)) found.push_back(gap);
  return found;
}

}  // namespace focalframe::models
