#include "loads/snow.h"

#include <catch2/catch.hpp>
#include <cmath>
#include <numbers>

#include "fem/units.h"

using namespace focalframe;
using namespace focalframe::loads;

namespace {

constexpr double pi = std::numbers::pi;
const Aperture trough{.width = 5, .focal_length = 1.5}, dish{.width = 3, .focal_length = 1.2, .dish = true};

// Water by counting small columns below the level of the lower rim, from the geometry alone.
HeldWater counted(const Aperture& a, double elevation) {
  const double c = std::cos(elevation), s = std::sin(elevation), half = a.width / 2, f = a.focal_length;
  const auto up = [&](double y, double z) { return -c * y + s * z; };
  const double rim = half * half / (4 * f), level = std::min(up(half, rim), up(-half, rim));
  HeldWater sum;
  const int n = 1200;
  double my = 0, mz = 0;
  for (int i = 0; i < n; ++i)
    for (int j = 0; j < (a.dish ? n : 1); ++j) {
      const double y = a.width * (-0.5 + (i + 0.5) / n), x = a.dish ? a.width * (-0.5 + (j + 0.5) / n) : 0;
      if (a.dish && x * x + y * y > half * half) continue;
      const double bottom = (x * x + y * y) / (4 * f), top = (level + c * y) / s;
      if (top <= bottom) continue;
      const double part = (top - bottom) * (a.width / n) * (a.dish ? a.width / n : 1);
      sum.amount += part;
      my += part * y;
      mz += part * (top + bottom) / 2;
    }
  sum.centre_y = my / sum.amount;
  sum.centre_z = mz / sum.amount;
  return sum;
}

}  // namespace

TEST_CASE("a face-up reflector holds water up to its rim", "[loads][snow]") {
  CHECK(held_water(trough, 90 * deg).amount == Approx(125 / (24 * 1.5)));                 // W^3 / 24 f
  CHECK(held_water(dish, 90 * deg).amount == Approx(pi * std::pow(1.5, 4) / (8 * 1.2)));  // pi R^4 / 8 f
}

TEST_CASE("tilted water is what lies below the lower rim", "[loads][snow]") {
  for (const Aperture& a : {trough, dish})
    for (const double e : {90.0, 80.0, 70.0, 105.0, 115.0}) {
      const HeldWater exact = held_water(a, e * deg), brute = counted(a, e * deg);
      CHECK(exact.amount == Approx(brute.amount).epsilon(5e-3));
      CHECK(exact.centre_y == Approx(brute.centre_y).margin(5e-3));
      CHECK(exact.centre_z == Approx(brute.centre_z).margin(5e-3));
    }
}

TEST_CASE("a reflector tilted past its rim angle or turned down holds no water", "[loads][snow]") {
  for (const double e : {45.0, 0.0, -30.0, -90.0, 180.0}) CHECK(held_water(trough, e * deg).amount == 0);
}

TEST_CASE("face-up snow covers the whole aperture at 0.8, face-down there is none", "[loads][snow]") {
  CHECK(snow_area(trough, 90 * deg).area == Approx(0.8 * 5).epsilon(1e-3));
  CHECK(snow_area(dish, 90 * deg).area == Approx(0.8 * pi * 2.25).epsilon(5e-3));
  CHECK(snow_area(trough, 90 * deg).centre_y == Approx(0).margin(1e-9));
  CHECK(snow_area(trough, -90 * deg).area == 0);
  CHECK(snow_area(trough, -90 * deg, SnowOnBack::holds).area > 0.5 * 5);
}

TEST_CASE("snow grows as the face turns up and is the same on both sides of the zenith", "[loads][snow]") {
  double last = -1;
  for (double e = 0; e <= 90; e += 5) {
    const SnowArea here = snow_area(trough, e * deg), there = snow_area(trough, (180 - e) * deg);
    CHECK(here.area >= last);
    CHECK(there.area == Approx(here.area));
    CHECK(there.centre_y == Approx(-here.centre_y).margin(1e-9));
    last = here.area;
  }
}

TEST_CASE("snow slides off slopes beyond 60 deg", "[loads][snow]") {
  CHECK(snow_shape_coefficient(0) == 0.8);
  CHECK(snow_shape_coefficient(30 * deg) == Approx(0.8));
  CHECK(snow_shape_coefficient(-45 * deg) == Approx(0.4));
  CHECK(snow_shape_coefficient(60 * deg) == Approx(0).margin(1e-12));
  CHECK(snow_shape_coefficient(70 * deg) == 0);
}

TEST_CASE("ice adds its volume times 900 kg/m3", "[loads][snow]") {
  CHECK(ice_on_sheet(0.025) == Approx(45));
  CHECK(ice_on_tube({.outside_diameter = 0.1, .thickness = 0.02}) ==
        Approx(900 * pi * (0.07 * 0.07 - 0.05 * 0.05)));
}
