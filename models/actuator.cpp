#include "models/actuator.h"

#include <cmath>
#include <numbers>

#include "fem/units.h"

namespace focalframe::models {

Eigen::Vector2d dish_pin(const ActuatorInput& a, double elevation) {
  const double c = std::cos(elevation), s = std::sin(elevation);
  const double y = a.dish_pin.front, z = -a.dish_pin.below;
  return {c * y - s * z, s * y + c * z};
}

Eigen::Vector2d stand_pin(const ActuatorInput& a) { return {a.stand_pin.front, -a.stand_pin.below}; }

double actuator_length(const ActuatorInput& a, double elevation) {
  return (dish_pin(a, elevation) - stand_pin(a)).norm();
}

double actuator_arm(const ActuatorInput& a, double elevation) {
  const Eigen::Vector2d pin = dish_pin(a, elevation), along = (pin - stand_pin(a)).normalized();
  const Eigen::Vector2d motion(-pin.y(), pin.x());  // of the dish pin per radian
  return along.dot(motion);
}

ActuatorRange actuator_range(const ActuatorInput& a, double from, double to) {
  ActuatorRange range;
  const int steps = std::max(1, static_cast<int>(std::ceil((to - from) / (0.25 * deg) - 1e-9)));
  double sign = 0;
  for (int i = 0; i <= steps; ++i) {
    const double e = from + (to - from) * i / steps;
    const double length = actuator_length(a, e), arm = actuator_arm(a, e);
    if (i == 0 || length < range.shortest) range.shortest = length, range.shortest_at = e;
    if (i == 0 || length > range.longest) range.longest = length, range.longest_at = e;
    if (i == 0 || std::abs(arm) < range.least_arm) range.least_arm = std::abs(arm), range.least_arm_at = e;
    range.greatest_arm = std::fmax(range.greatest_arm, std::abs(arm));
    if (sign * arm < 0) range.turns_back = true;
    if (arm != 0) sign = arm;
  }
  return range;
}

double rod_buckling_force(const ActuatorInput& a, double length) {
  constexpr double steel = 210e9;
  const double I = std::numbers::pi / 64 * std::pow(a.rod_diameter, 4);
  return std::numbers::pi * std::numbers::pi * steel * I / (length * length);
}

}  // namespace focalframe::models
