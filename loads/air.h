#pragma once

/// Density of air. Standard atmosphere: 288.15 K and 101325 Pa at sea level, 6.5 K/km, 1.225 kg/m^3 (ISO 2533
/// values, read second hand); dry air as an ideal gas.

namespace focalframe::loads {

inline constexpr double sea_level_density = 1.225;       ///< [kg/m^3]
inline constexpr double sea_level_pressure = 101325.0;   ///< [Pa]
inline constexpr double sea_level_temperature = 288.15;  ///< [K]
inline constexpr double lapse_rate = 0.0065;             ///< [K/m]
inline constexpr double dry_air_constant = 287.05;       ///< [J/(kg K)]
/// EN 1991-1-4, 4.5 note 2, recommended value [kg/m^3]; safe at any altitude.
inline constexpr double eurocode_density = 1.25;

/// Standard atmosphere up to 11 km, altitude above sea level [m]: density [kg/m^3] and pressure [Pa].
double standard_density(double altitude);
double standard_pressure(double altitude);

/// p / (R T) [kg/m^3], pressure [Pa], temperature [K].
struct AirState {
  double pressure = sea_level_pressure, temperature = sea_level_temperature;
};
double dry_air_density(const AirState& state);

}  // namespace focalframe::loads
