#include "loads/air.h"

#include <cmath>
#include <stdexcept>

#include "loads/number_text.h"
#include "loads/wind.h"

namespace focalframe::loads {

namespace {

// g M / (R lapse) = 5.2559 for pressure, one less for density (from memory, and the published table agrees).
constexpr double pressure_exponent = 5.2559;

double temperature_ratio(double altitude) {
  if (!(altitude > -500 && altitude < 11000))
    throw std::invalid_argument("altitude " + number_text(altitude) + " m must lie between -500 and 11000 m");
  return 1 - lapse_rate * altitude / sea_level_temperature;
}

ChainStep step(double value, std::string how) {
  if (!(value > 0.6 && value < 1.5))
    throw std::invalid_argument("air density " + number_text(value) +
                                " kg/m3 must lie between 0.6 and 1.5 (" + how + ")");
  return {"air density", value, "kg/m3", std::move(how)};
}

}  // namespace

double standard_density(double altitude) {
  return sea_level_density * std::pow(temperature_ratio(altitude), pressure_exponent - 1);
}

double standard_pressure(double altitude) {
  return sea_level_pressure * std::pow(temperature_ratio(altitude), pressure_exponent);
}

double dry_air_density(const AirState& state) {
  if (!(state.pressure > 0 && state.temperature > 0))
    throw std::invalid_argument("air pressure and absolute temperature must be > 0");
  return state.pressure / (dry_air_constant * state.temperature);
}

ChainStep air_density(const Site& site) {
  const bool has_altitude = !std::isnan(site.altitude), has_temperature = !std::isnan(site.temperature);
  const bool has_pressure = !std::isnan(site.pressure);
  if (!std::isnan(site.density)) return step(site.density, "as given");
  if (!has_altitude && !has_temperature && !has_pressure)
    return step(sea_level_density, "sea level, 15 degC, no altitude given: safe for any higher site");
  if (!has_temperature && !has_pressure)
    return step(standard_density(site.altitude), "1.225 (1 - 0.0065 h / 288.15)^4.2559, h = " +
                                                     number_text(site.altitude) + " m (standard atmosphere)");
  AirState state;
  std::string pressure_from = "sea-level pressure";
  if (has_pressure) {
    state.pressure = site.pressure;
    pressure_from = "pressure as given, at the site";
  } else if (has_altitude) {
    state.pressure = standard_pressure(site.altitude);
    pressure_from = "101325 (1 - 0.0065 h / 288.15)^5.2559, h = " + number_text(site.altitude) + " m";
  }
  std::string temperature_from = "as given";
  if (has_temperature) {
    state.temperature = site.temperature;
  } else if (has_altitude) {
    state.temperature = sea_level_temperature - lapse_rate * site.altitude;
    temperature_from = "288.15 - 0.0065 h";
  } else {
    temperature_from = "15 degC";
  }
  return step(dry_air_density(state), "p / (287.05 T), p = " + number_text(state.pressure, 6) + " Pa (" +
                                          pressure_from + "), T = " + number_text(state.temperature) +
                                          " K (" + temperature_from + ")");
}

}  // namespace focalframe::loads
