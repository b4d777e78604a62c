#include "models/quantity.h"

#include <array>
#include <cmath>
#include <cstdio>
#include <numbers>
#include <vector>

namespace focalframe::models {
namespace {

struct Unit {
  const char* text;
  double factor;  // SI value of one
  double from;    // used for magnitudes of at least this [SI]
};

const std::vector<Unit>& units_of(Quantity quantity) {
  constexpr double degree = std::numbers::pi / 180;
  static const std::vector<Unit> none{{"", 1, 0}}, length{{"mm", 1e-3, 0}, {"m", 1, 0.5}},
      angle{{"mrad", 1e-3, 0}, {"deg", degree, 0.2 * degree}}, mass{{"g", 1e-3, 0}, {"kg", 1, 0.1}},
      area_density{{"kg/m2", 1, 0}}, density{{"kg/m3", 1, 0}},
      force{{"N", 1, 0}, {"kN", 1e3, 1e3}, {"MN", 1e6, 1e6}},
      torque{{"N m", 1, 0}, {"kN m", 1e3, 1e3}, {"MN m", 1e6, 1e6}},
      pressure{{"Pa", 1, 0}, {"kPa", 1e3, 1e4}, {"MPa", 1e6, 1e6}, {"GPa", 1e9, 1e10}},
      stiffness{{"N/m", 1, 0}, {"kN/m", 1e3, 1e3}, {"MN/m", 1e6, 1e6}},
      twist_stiffness{{"N m/rad", 1, 0}, {"kN m/rad", 1e3, 1e3}, {"MN m/rad", 1e6, 1e6}},
      speed{{"m/s", 1, 0}}, turning_rate{{"deg/s", degree, 0}},
      time{{"s", 1, 0}, {"min", 60, 60}, {"h", 3600, 3600}}, temperature{{"K", 1, 0}},
      per_angle{{"1/rad", 1, 0}}, area{{"mm2", 1e-6, 0}, {"cm2", 1e-4, 1e-4}, {"m2", 1, 1}},
      area_moment{{"mm4", 1e-12, 0}, {"cm4", 1e-8, 1e-8}},
      section_modulus{{"mm3", 1e-9, 0}, {"cm3", 1e-6, 1e-6}}, line_load{{"N/m", 1, 0}, {"kN/m", 1e3, 1e3}},
      acceleration{{"m/s2", 1, 0}}, expansion{{"1/K", 1, 0}}, temperature_change{{"K", 1, 0}},
      temperature_gradient{{"K/m", 1, 0}}, mass_moment{{"kg m2", 1, 0}};
  switch (quantity) {
    case Quantity::none:
    case Quantity::count:
    case Quantity::ratio:
      return none;
    case Quantity::length:
      return length;
    case Quantity::angle:
      return angle;
    case Quantity::mass:
      return mass;
    case Quantity::area_density:
      return area_density;
    case Quantity::density:
      return density;
    case Quantity::force:
      return force;
    case Quantity::torque:
      return torque;
    case Quantity::pressure:
      return pressure;
    case Quantity::stiffness:
      return stiffness;
    case Quantity::twist_stiffness:
      return twist_stiffness;
    case Quantity::speed:
      return speed;
    case Quantity::turning_rate:
      return turning_rate;
    case Quantity::time:
      return time;
    case Quantity::temperature:
      return temperature;
    case Quantity::per_angle:
      return per_angle;
    case Quantity::area:
      return area;
    case Quantity::area_moment:
      return area_moment;
    case Quantity::section_modulus:
      return section_modulus;
    case Quantity::line_load:
      return line_load;
    case Quantity::acceleration:
      return acceleration;
    case Quantity::expansion:
      return expansion;
    case Quantity::temperature_change:
      return temperature_change;
    case Quantity::temperature_gradient:
      return temperature_gradient;
    case Quantity::mass_moment:
      return mass_moment;
  }
  return none;
}

const Unit& unit_for(double value, Quantity quantity) {
  const std::vector<Unit>& units = units_of(quantity);
  const Unit* chosen = &units.front();
  if (quantity == Quantity::angle && value == 0) return units.back();
  for (const Unit& unit : units)
    if (std::abs(value) >= unit.from * (1 - 1e-9)) chosen = &unit;
  return *chosen;
}

}  // namespace

std::string number_text(double value) {
  if (std::isnan(value)) return "not given";
  if (std::isinf(value)) return value > 0 ? "infinite" : "minus infinite";
  std::array<char, 64> buffer{};
  const double size = std::abs(value);
  const char* format = size >= 1e4 && size < 1e9 ? "%.0f" : "%.4g";
  std::snprintf(buffer.data(), buffer.size(), format, value == 0 ? 0.0 : value);
  return buffer.data();
}

std::string quantity_text(double value, Quantity quantity, double like) {
  if (std::isnan(value)) return "not given";
  if (std::isinf(value)) return "rigid";
  const Unit& unit = unit_for(like, quantity);
  const std::string number = number_text(value / unit.factor);
  return *unit.text ? number + " " + unit.text : number;
}

std::string quantity_text(double value, Quantity quantity) { return quantity_text(value, quantity, value); }

}  // namespace focalframe::models
