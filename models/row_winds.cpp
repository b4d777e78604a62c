#include "models/row_winds.h"

#include <cmath>

#include "loads/pose.h"

namespace focalframe::models {

RowWinds::RowWinds(const TroughDesign& design, const loads::CoefficientTable& table)
    : design_(design),
      table_(table),
      zone_(loads::zone_factors(design.wind.zone).value_or(loads::ZoneFactors{})) {}

double RowWinds::moment_slope(double pitch) const {
  if (!std::isnan(design_.wind.moment_slope)) return design_.wind.moment_slope;
  return zone_.Cm * loads::moment_slope(table_, pitch, moment_slope_half_width);
}

std::vector<Spread> RowWinds::spreads(double pitch) const {
  const bool own = !loads::profile_at(table_, pitch).empty();
  return {own ? Spread::profile : Spread::linear, Spread::edge};
}

WindOnRow RowWinds::at(double elevation, double wind_from, Spread spread, double offset, bool upper,
                       double pressure) const {
  const double pitch = loads::wrap_angle(loads::pitch_seen_by_wind(elevation, wind_from) + offset);
  const loads::Coefficients c = loads::coefficients_at(table_, pitch, upper).value();
  WindOnRow wind;
  wind.wind_from = wind_from;
  const double yaw = loads::yaw_factor(loads::yaw(wind_from));
  wind.coefficients = {c.Ca * zone_.Ca * yaw, c.Cs * zone_.Cs * yaw, c.Cm * zone_.Cm * yaw};
  wind.bare_members = !table_.includes_frame;
  wind.spread = spread;
  if (spread == Spread::profile) {
    wind.profile = loads::profile_at(table_, pitch, upper);
    for (double& p : wind.profile) p *= zone_.Ca * yaw;
    if (wind.profile.empty()) wind.spread = Spread::linear;
  }
  wind.moment_slope = moment_slope(pitch) * yaw;
  wind.pressure = pressure;
  return wind;
}

bool RowWinds::covers(double elevation, double wind_from, double offset) const {
  const double pitch = loads::pitch_seen_by_wind(elevation, wind_from);
  for (double by : {-offset, 0.0, offset})
    if (!loads::coefficients_at(table_, loads::wrap_angle(pitch + by))) return false;
  return true;
}

double RowWinds::gust_angle(StateKind kind) const {
  const bool widened = kind == StateKind::turning || kind == StateKind::stuck;
  const double tolerance = std::isnan(design_.operation.stow_within) ? 0 : design_.operation.stow_within;
  return turbulence_angle + (widened ? tolerance : 0);
}

double RowWinds::size_factor(const loads::WindAtHeight& wind) const {
  if (!design_.wind.size_factor) return 1;
  return loads::size_factor(design_.row.modules * design_.row.module_length, design_.parabola.aperture,
                            wind.height, wind.turbulence, site_of(design_.site));
}

}  // namespace focalframe::models
