#include "cli/nearest.h"
#include "cli/quantity_problem.h"

namespace focalframe::cli {
namespace {

struct Words {
  const char* name;
  Dimension dimension;
  std::vector<std::string> units;
};

const Words& words_of(Quantity quantity) {
  static const Words none{"A value", {}, {}}, count{"A count", {}, {}}, ratio{"A ratio", {}, {"%"}},
      length{"A length", {1, 0, 0, 0, 0}, {"m", "mm", "cm", "in", "ft"}},
      angle{"An angle", {0, 0, 0, 0, 1}, {"deg", "mrad", "rad"}},
      mass{"A mass", {0, 1, 0, 0, 0}, {"kg", "g", "lbm"}},
      area_density{"A mass per area", {-2, 1, 0, 0, 0}, {"kg/m2"}},
      density{"A density", {-3, 1, 0, 0, 0}, {"kg/m3", "g/cm3"}},
      force{"A force", {1, 1, -2, 0, 0}, {"N", "kN", "lbf"}},
      torque{"A moment", {2, 1, -2, 0, 0}, {"N m", "kN m", "MN m", "lbf in", "lbf ft"}},
      pressure{"A pressure or stress", {-1, 1, -2, 0, 0}, {"MPa", "GPa", "kPa", "Pa", "N/mm2", "psi", "ksi"}},
      stiffness{"A stiffness", {0, 1, -2, 0, 0}, {"N/m", "kN/m", "MN/m", "kN/mm", "N/mm"}},
      twist{"A turning stiffness", {2, 1, -2, 0, -1}, {"N m/rad", "kN m/rad", "MN m/rad", "N m/deg"}},
      speed{"A speed", {1, 0, -1, 0, 0}, {"m/s", "km/h", "mph", "kn"}},
      turning_rate{"A turning rate", {0, 0, -1, 0, 1}, {"deg/s", "deg/min", "rad/s"}},
      time{"A time", {0, 0, 1, 0, 0}, {"s", "min", "h"}},
      temperature{"A temperature", {0, 0, 0, 1, 0}, {"degC", "K", "degF"}},
      per_angle{"A slope per angle", {0, 0, 0, 0, -1}, {"1/rad", "1/deg"}},
      area{"An area", {2, 0, 0, 0, 0}, {"mm2", "cm2", "m2", "in2"}},
      area_moment{"A second moment of area", {4, 0, 0, 0, 0}, {"mm4", "cm4", "m4", "in4"}},
      section_modulus{"A section modulus", {3, 0, 0, 0, 0}, {"mm3", "cm3", "m3", "in3"}},
      line_load{"A load per length", {0, 1, -2, 0, 0}, {"N/m", "kN/m", "N/mm", "lbf/ft"}},
      acceleration{"An acceleration", {1, 0, -2, 0, 0}, {"m/s2", "ft/s2"}},
      expansion{"An expansion coefficient", {0, 0, 0, -1, 0}, {"1/K"}},
      temperature_change{"A change of temperature", {0, 0, 0, 1, 0}, {"K"}},
      temperature_gradient{"A change of temperature per length", {-1, 0, 0, 1, 0}, {"K/m", "K/mm"}},
      mass_moment{"A moment of inertia", {2, 1, 0, 0, 0}, {"kg m2", "kg mm2"}};
  switch (quantity) {
    case Quantity::none:
      return none;
    case Quantity::count:
      return count;
    case Quantity::ratio:
      return ratio;
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
      return twist;
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

}  // namespace

Dimension dimension_of(Quantity quantity) { return words_of(quantity).dimension; }
std::string quantity_name(Quantity quantity) { return words_of(quantity).name; }
std::string quantity_units(Quantity quantity) { return joined_or(words_of(quantity).units); }
const std::vector<std::string>& common_units(Quantity quantity) { return words_of(quantity).units; }

}  // namespace focalframe::cli
