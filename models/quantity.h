#pragma once

/// Kinds of quantities that stand in a design file, and how a value of each is written for people.

#include <string>

namespace focalframe::models {

enum class Quantity {
  none,  ///< words, text, yes/no
  count,
  ratio,  ///< bare number or per cent
  length,
  angle,
  mass,
  area_density,  ///< kg/m2
  density,
  force,
  torque,
  pressure,         ///< and stress
  stiffness,        ///< N/m
  twist_stiffness,  ///< N m/rad
  speed,
  turning_rate,  ///< rad/s
  time,
  temperature,           ///< absolute, K inside
  per_angle,             ///< 1/rad
  area,                  ///< m2
  area_moment,           ///< m4
  section_modulus,       ///< m3
  line_load,             ///< N/m
  acceleration,          ///< m/s2
  expansion,             ///< 1/K
  temperature_change,    ///< K, a difference
  temperature_gradient,  ///< K/m
  mass_moment,           ///< moment of inertia, kg m2
};

/// `value` (SI) in a unit of customary size, four significant digits: "69.85 mm", "2.4 m", "3.5 kN m".
/// Infinity is "rigid", NaN is "not given".
std::string quantity_text(double value, Quantity quantity);

/// The same in the unit that `like` would be written in, so that two numbers can be compared at a glance.
std::string quantity_text(double value, Quantity quantity, double like);

/// A plain number with four significant digits and no exponent where that stays readable.
std::string number_text(double value);

}  // namespace focalframe::models
