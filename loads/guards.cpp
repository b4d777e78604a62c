#include "loads/guards.h"

#include <algorithm>
#include <cmath>

#include "fem/units.h"
#include "loads/air.h"
#include "loads/number_text.h"

namespace focalframe::loads {

namespace {

std::string n(double value) { return number_text(value, 3); }

bool given(double value) { return !std::isnan(value); }

Verdict refused(const char* rule, const std::string& text, const std::string& fix) {
  return {Severity::refused, rule, text, fix};
}
Verdict warned(const char* rule, const std::string& text, const std::string& fix) {
  return {Severity::warned, rule, text, fix};
}
Verdict noted(const char* rule, const std::string& text, const std::string& fix) {
  return {Severity::noted, rule, text, fix};
}

}  // namespace

Opinion guard_gusts(CoefficientKind kind, PressureKind pressure, Use use, double turbulence) {
  const bool peak = kind == CoefficientKind::peak, gust = pressure == PressureKind::gust;
  const std::string ratio = n(1 + 7 * turbulence);
  if (peak && gust)
    return refused(
        "gust-twice",
        "The table holds peak coefficients for the mean speed; on a gust the gusts count twice, here about " +
            ratio + " x the load.",
        "Use the mean wind with this table, or a table of mean coefficients with the gust.");
  if (!peak && !gust && use == Use::strength)
    return warned("gust-left-out",
                  "Mean coefficients on the mean wind leave the gusts out: strength sees about 1/" + ratio +
                      " of the load.",
                  "Use the 3 s gust for strength, drive and foundation.");
  if (peak && use == Use::optics)
    return warned("peak-for-optics", "Peak coefficients overstate what the mean wind does to the image.",
                  "Use a table of mean coefficients for optics.");
  return std::nullopt;
}

Opinion guard_load_factor(const MapFactor& in) {
  if (in.ultimate_map && in.wind_factor > 1.0)
    return refused("factor-twice",
                   "The speed is from an ultimate-level map, which holds the wind factor already; the "
                   "combination multiplies by " +
                       n(in.wind_factor) + " again.",
                   "Take a wind factor of 1.0, or a service-level speed.");
  if (!in.ultimate_map && in.wind_factor > 0.9 && in.wind_factor < 1.3)
    return warned(
        "factor-missing",
        "A service-level speed with a wind factor of " + n(in.wind_factor) + " has no margin for strength.",
        "Say that the map is ultimate-level, or take the factor of the code that goes with it.");
  return std::nullopt;
}

Opinion guard_density(const DensityUse& in) {
  const bool thin = given(in.density) && in.density < 0.98 * sea_level_density;
  if (thin && (in.code_altitude_factor < 0.999 || in.map_includes_altitude))
    return refused("density-twice",
                   "The air density " + n(in.density) + " kg/m3 is already that of the altitude and " +
                       (in.map_includes_altitude ? std::string("the map includes the altitude as well.")
                                                 : "the code's altitude factor " +
                                                       n(in.code_altitude_factor) + " reduces it again."),
                   "Use sea-level density with the code's factor, or the site's density without it.");
  if (given(in.density) && (in.density < 0.6 || in.density > 1.5))
    return refused("density", "Air density " + n(in.density) + " kg/m3 must lie between 0.6 and 1.5.",
                   "Check its unit.");
  return std::nullopt;
}

Opinion guard_speeds(const SpeedPair& in) {
  constexpr double km_h = 1 / 3.6, mph = 0.44704;
  const auto readings = [&](double v) {
    return n(v) + " km/h = " + n(v * km_h) + " m/s; " + n(v) + " mph = " + n(v * mph) + " m/s";
  };
  if (given(in.operate) && in.operate > 35)
    return warned("speed-unit",
                  "Operation up to " + n(in.operate) + " m/s is more than any collector is run in.",
                  readings(in.operate));
  if (given(in.survive) && in.survive > 90)
    return warned("speed-unit", "A survival wind of " + n(in.survive) + " m/s is beyond any map.",
                  readings(in.survive));
  if (!given(in.operate) || !given(in.survive) || in.operate <= 0) return std::nullopt;
  if (in.survive < in.operate)
    return warned(
        "speed-order",
        "The survival wind " + n(in.survive) + " m/s is below the operating wind " + n(in.operate) + " m/s.",
        "Check which is which, and the averaging of each.");
  const double ratio = in.survive / in.operate;
  if (ratio < 1.3 || ratio > 6)
    return warned("speed-ratio", "Survival over operating wind is " + n(ratio) + "; usual is 1.3 to 6.",
                  "Check units and averaging of both.");
  return std::nullopt;
}

Opinion guard_heights(const Heights& in) {
  if (given(in.altitude) && in.altitude > 5500)
    return refused("altitude", "Altitude " + n(in.altitude) + " m: no collector stands above 5500 m.",
                   "Check its unit; it is above sea level.");
  if (given(in.axis) && given(in.altitude) && in.axis > 0 && in.axis == in.altitude)
    return warned("height-altitude", "Axis height and altitude are both " + n(in.axis) + " m.",
                  "Axis height is above the ground, altitude above the sea.");
  if (given(in.axis) && in.axis > 60)
    return warned("height", "The axis is " + n(in.axis) + " m above ground.",
                  "Axis height is above the ground, altitude above the sea.");
  return std::nullopt;
}

Opinion guard_profile(const WindAtHeight& at_axis, const WindAtHeight& at_10m) {
  if (!(at_axis.height < 10) || !(at_axis.mean_speed > at_10m.mean_speed)) return std::nullopt;
  return warned("profile",
                "The wind at the axis, " + n(at_axis.mean_speed) + " m/s at " + n(at_axis.height) +
                    " m, is above that at 10 m, " + n(at_10m.mean_speed) + " m/s.",
                "Check the height the wind was stated at and the terrain.");
}

Opinion guard_zone(const ZoneUse& in) {
  const bool sheltered = in.zone == "second-row" || in.zone == "interior";
  if (sheltered && in.faces_open_ground)
    return refused("zone",
                   "A row that faces open ground has no shelter; zone \"" + in.zone +
                       "\" takes up to half of its load away.",
                   "Use zone \"edge\" for it.");
  const bool measured_sheltered = in.table_zone == "second-row" || in.table_zone == "interior";
  if (measured_sheltered && sheltered)
    return refused("zone-twice",
                   "The table was measured in zone \"" + in.table_zone + "\": its shelter would count twice.",
                   "Use zone \"isolated\" with this table, or a table of an isolated row.");
  if (measured_sheltered)
    return warned("zone-table",
                  "The table was measured in zone \"" + in.table_zone + "\", the design stands in zone \"" +
                      in.zone + "\".",
                  "Take a table of an isolated or edge row.");
  return std::nullopt;
}

Opinion guard_validity(const CoefficientTable& table, const TableUse& use) {
  struct Bound {
    const char* what;
    double value, least, most, unit;
  };
  const Bound bounds[] = {
      {"focal length / width", use.focal_ratio, table.focal_ratio_min, table.focal_ratio_max, 1},
      {"axis height / width", use.height_ratio, table.height_ratio_min, table.height_ratio_max, 1},
      {"yaw [deg]", use.yaw, not_given, table.yaw_max, deg}};
  std::string outside;
  bool far = false;
  for (const Bound& b : bounds) {
    if (!given(b.value)) continue;
    const bool below = given(b.least) && b.value < b.least, above = given(b.most) && b.value > b.most;
    if (!below && !above) continue;
    // Beyond the yaw of a table the cos^2 rule takes over: never refused.
    if (b.unit == 1) far = far || (below && b.value < b.least / 1.333) || (above && b.value > b.most * 1.333);
    outside += (outside.empty() ? "" : "; ") + std::string(b.what) + " " + n(b.value / b.unit) +
               ", made for " + (given(b.least) ? n(b.least / b.unit) + " to " : "up to ") +
               n(b.most / b.unit);
  }
  if (outside.empty()) return std::nullopt;
  const std::string text =
      "Table \"" + table.name + "\" is used outside the shapes it was made for: " + outside + ".";
  const std::string fix = "Use a table for this shape, or accept the rule table-range with a reason.";
  return far ? refused("table-range", text, fix) : warned("table-range", text, fix);
}

Opinion guard_snow(const SnowUse& in) {
  if (std::sin(in.elevation) <= 0)
    return noted("snow-face-down", "Turned face down the reflector carries no snow here.",
                 "Count snow on the back if it is flat or rough.");
  if (in.extreme_wind)
    return noted("snow-with-storm",
                 "Full snow and the return-period wind do not come together; the combinations' factors say "
                 "how much of each does.",
                 "Check the snow factor of the combination.");
  return std::nullopt;
}

Opinion guard_solidity(double solidity) {
  if (!(solidity > 0 && solidity <= 1))
    return refused(
        "solidity",
        "Solidity " + n(solidity) + " must lie above 0 and up to 1: it is the solid share of the mesh.",
        "Write 0.65 for a mesh with 35 % holes.");
  if (solidity < 0.2)
    return warned("solidity",
                  "Solidity " + n(solidity) + ": such a mesh hardly reflects. Was the open share meant?",
                  "The solid share would then be " + n(1 - solidity) + ".");
  return std::nullopt;
}

Opinion guard_hours(bool daylight_only) {
  if (daylight_only) return std::nullopt;
  return warned(
      "hours-all",
      "The wind statistics are for all hours, the collector works by day, when it is usually windier.",
      "Use the daylight hours of the record.");
}

}  // namespace focalframe::loads
