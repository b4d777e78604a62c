#include "models/parabola.h"

#include <catch2/catch.hpp>
#include <cmath>
#include <numbers>

#include "fem/units.h"

using namespace focalframe;
using namespace focalframe::models;

namespace {
constexpr Parabola wide{5.77, 1.71};
}

TEST_CASE("the rim's angle, distance, height and arc follow from width and focal length") {
  // Closed forms, computed here.
  CHECK(wide.rim_angle() / deg == Approx(80.2998).margin(5e-5));
  CHECK(wide.local_focal_distance(2.885) == Approx(2.926846).margin(5e-7));
  CHECK(wide.depth() == Approx(1.216846).margin(5e-7));
  CHECK(wide.arc_length() == Approx(6.395241).margin(5e-7));
  CHECK(concentration(wide, 0.070) == Approx(26.2378).margin(5e-5));
  CHECK(aperture_ratio(wide, 0.070) == Approx(82.4286).margin(5e-5));
  CHECK(least_receiver_diameter(wide, 4.65 * mrad) / mm == Approx(27.2196).margin(5e-5));
}

TEST_CASE("the two closed forms of rim distance, smallest receiver and depth agree") {
  const double phi = wide.rim_angle(), r = wide.local_focal_distance(wide.width / 2);
  CHECK(r == Approx(2 * wide.focal_length / (1 + std::cos(phi))).epsilon(1e-14));
  CHECK(r == Approx(wide.width / (2 * std::sin(phi))).epsilon(1e-14));
  CHECK(least_receiver_diameter(wide, 0.01) ==
        Approx(wide.width * std::sin(0.01) / std::sin(phi)).epsilon(1e-14));
  CHECK(focal_length_from_depth(wide.width, wide.depth()) == Approx(wide.focal_length).epsilon(1e-14));
}

TEST_CASE("every axial ray reflected by the parabola passes through its focus") {
  for (const double y : {-2.885, -1.0, 0.3, 2.0}) {
    const double s = wide.slope_angle(y);
    // Light along -z turns by twice the slope; from the mirror it must point at (0, f).
    const double ray_y = -std::sin(2 * s), ray_z = std::cos(2 * s);
    const double r = wide.local_focal_distance(y);
    CHECK(y + r * ray_y == Approx(0).margin(1e-14));
    CHECK(wide.height(y) + r * ray_z == Approx(wide.focal_length).epsilon(1e-14));
    CHECK(wide.ray_angle(y) == Approx(2 * s));
  }
}

TEST_CASE("arc length and mean focal distance equal their integrals") {
  const int n = 20000;
  const double step = wide.width / n;
  double arc = 0, distance = 0;
  for (int i = 0; i < n; ++i) {
    const double y = -wide.width / 2 + (i + 0.5) * step;
    arc += step / std::cos(wide.slope_angle(y));
    distance += step * wide.local_focal_distance(y) / wide.width;
  }
  CHECK(wide.arc_length() == Approx(arc).epsilon(1e-8));
  CHECK(wide.mean_local_focal_distance() == Approx(distance).epsilon(1e-8));
}

TEST_CASE("adding c y^2 to the mirror changes the focal length to f / (1 + 4 f c)") {
  // Closed form; 1.711170 m from -1e-4 y^2 on f = 1.71 m.
  const double y = 2, c = -1e-4;
  const double bent = y * y / (4 * (wide.height(y) + c * y * y));
  CHECK(bent == Approx(1.71 / (1 + 4 * 1.71 * c)).epsilon(1e-13));
  CHECK(bent == Approx(1.711170).margin(5e-7));
}

// Common practice, no source: y = x^2 / n has its focus n / 4 above the vertex.
TEST_CASE("y = x^2 / n has its focus at n / 4, and the rays meet there") {
  const double n[] = {4, 10, 20, 40}, focus[] = {1, 2.5, 5, 10};
  for (int i = 0; i < 4; ++i) {
    const double width = 3.0;
    const Parabola parabola{width, focal_length_from_depth(width, width * width / 4 / n[i])};
    CHECK(parabola.focal_length == Approx(focus[i]).epsilon(1e-14));
    for (double x : {0.2, 0.9, 1.5}) {
      CHECK(parabola.height(x) == Approx(x * x / n[i]).epsilon(1e-14));
      // An axial ray turns by twice the mirror's slope: where it crosses the axis, by elementary geometry.
      const double slope = std::atan(2 * x / n[i]);
      CHECK(x * x / n[i] + x / std::tan(2 * slope) == Approx(focus[i]).epsilon(1e-12));
    }
  }
}
