#include "models/actuator.h"

#include <catch2/catch.hpp>
#include <numbers>

#include "fem/units.h"

using namespace focalframe;
using namespace focalframe::models;

namespace {

ActuatorInput pins(PinInput dish, PinInput stand) {
  ActuatorInput rod;
  rod.dish_pin = dish;
  rod.stand_pin = stand;
  return rod;
}

}  // namespace

TEST_CASE("an actuator's length is the distance of its pins in the plane across the axis",
          "[dish][actuator]") {
  // By hand: pins at (0.28, -0.28) and (0.12, -1.10), turned by 90 deg to (0.28, 0.28).
  const ActuatorInput rod = pins({0.28, 0.28}, {1.10, 0.12});
  CHECK(actuator_length(rod, 0) == Approx(std::hypot(0.16, 0.82)).epsilon(1e-12));
  CHECK(actuator_length(rod, 90 * deg) == Approx(std::hypot(0.16, 1.38)).epsilon(1e-12));
}

TEST_CASE("an actuator's arm is the slope of its length", "[dish][actuator]") {
  const ActuatorInput rod = pins({0.31, 0.22}, {0.95, 0.18});
  for (double e = -20 * deg; e < 110 * deg; e += 7 * deg) {
    const double h = 1e-6;
    const double slope = (actuator_length(rod, e + h) - actuator_length(rod, e - h)) / (2 * h);
    CHECK(actuator_arm(rod, e) == Approx(slope).margin(1e-8));
  }
}

TEST_CASE("an actuator at right angles to its lever has the whole lever as its arm", "[dish][actuator]") {
  // Pin straight in front of the axis, rod straight up to it from below.
  CHECK(actuator_arm(pins({0, 0.3}, {1.0, 0.3}), 0) == Approx(0.3).epsilon(1e-12));
  // The pin straight above the other one, on a line through the axis: a dead point.
  CHECK(actuator_arm(pins({0.3, 0}, {1.0, 0}), 0) == Approx(0).margin(1e-12));
}

TEST_CASE("a range of elevations shows stroke, weakest lever and dead point", "[dish][actuator]") {
  const ActuatorRange good = actuator_range(pins({0.28, 0.28}, {1.10, 0.12}), 0, 90 * deg);
  CHECK(good.shortest == Approx(actuator_length(pins({0.28, 0.28}, {1.10, 0.12}), 0)));
  CHECK(good.longest_at == Approx(90 * deg));
  CHECK_FALSE(good.turns_back);
  CHECK(good.least_arm > least_arm_share * good.greatest_arm);
  const ActuatorRange dead = actuator_range(pins({0.3, 0}, {1.0, 0}), -10 * deg, 60 * deg);
  CHECK(dead.turns_back);
  CHECK(dead.least_arm_at == Approx(0).margin(0.2 * deg));
}

TEST_CASE("a rod buckles at Euler's load over its pin distance", "[dish][actuator]") {
  ActuatorInput rod;
  rod.rod_diameter = 30 * mm;
  const double I = std::numbers::pi * std::pow(0.030, 4) / 64;
  CHECK(rod_buckling_force(rod, 1.2) == Approx(9.8696044 * 210e9 * I / 1.44).epsilon(1e-7));
}
