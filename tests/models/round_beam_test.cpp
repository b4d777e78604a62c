#include "models/round_beam.h"

#include <catch2/catch.hpp>
#include <cmath>
#include <numbers>
#include <stdexcept>

#include "fem/units.h"
#include "models/dish_optics.h"

using namespace focalframe;
using namespace focalframe::models;

TEST_CASE("a round beam holds all its light, and projects to the beam of a line focus") {
  for (const SunShape& sun : {pillbox_sun(), buie_sun(0.05)})
    for (const double sigma : {1 * mrad, 5 * mrad}) {
      const RoundBeam beam(sun, sigma);
      CHECK(beam.inside_ellipse(0, 0, 0.2, 0.2) == Approx(1).margin(2e-6));
      const BeamSpread line(sun, 1, sigma);
      // A wide, tall ellipse cut at x by shifting it: all light beyond x, nearly straight cut.
      const double semi = 1;
      for (const double x : {-3 * mrad, 0.0, 4 * mrad, 12 * mrad})
        CHECK(beam.inside_ellipse(x + semi, 0, semi, 100 * semi) ==
              Approx(1 - line.cumulative(x)).margin(5e-6));
    }
}

TEST_CASE("the share of a tabulated beam in an ellipse is the mean of Gaussian spots over the sun") {
  // Second route: rings of the sun, each point of which makes a Gaussian spot.
  const SunShape sun = buie_sun_of_parameter(0.20);
  const double kappa = 0.9 * std::log(13.5 * 0.2) * std::pow(0.2, -0.3);
  const double gamma = 2.2 * std::log(0.52 * 0.2) * std::pow(0.2, 0.43) - 0.1;
  const auto radiance = [&](double theta) {
    return theta <= 4.65 ? std::cos(0.326 * theta) / std::cos(0.308 * theta)
                         : std::exp(kappa) * std::pow(theta, gamma);
  };
  const double sigma = 3 * mrad, semi = 16 * mrad;
  const RoundBeam beam(sun, sigma);
  for (const auto& [x, y] : {std::pair{0.0, 0.0}, {5.0, 2.0}, {16.0, 0.0}, {3.0, 22.0}}) {
    double sum = 0, total = 0;
    for (const auto& [from, to, n] : {std::tuple{0.0, 4.65, 10}, {4.65, 12.0, 12}, {12.0, 43.6, 24}}) {
      const Quadrature ring = gauss_legendre(n, from, to);
      for (std::size_t i = 0; i < ring.point.size(); ++i) {
        const double share = ring.weight[i] * ring.point[i] * radiance(ring.point[i]);
        const int around = 60;
        for (int k = 0; k < around; ++k) {
          const double angle = 2 * std::numbers::pi * k / around, r = ring.point[i] * mrad;
          sum += share / around *
                 spot_inside_circle(semi, x * mrad + r * std::cos(angle), y * mrad + r * std::sin(angle),
                                    sigma, sigma);
        }
        total += share;
      }
    }
    CHECK(beam.inside_ellipse(x * mrad, y * mrad, semi, semi) == Approx(sum / total).margin(1e-5));
    CHECK(beam.inside_ellipse(-y * mrad, x * mrad, semi, semi) == Approx(sum / total).margin(1e-5));
  }
}

TEST_CASE("the share in an ellipse is the share of the swapped ellipse with x and y swapped") {
  const RoundBeam beam(buie_sun(0.05), 2 * mrad);
  CHECK(beam.inside_ellipse(4 * mrad, -6 * mrad, 9 * mrad, 14 * mrad) ==
        Approx(beam.inside_ellipse(-6 * mrad, 4 * mrad, 14 * mrad, 9 * mrad)).margin(1e-6));
  CHECK(beam.inside_ellipse(0.3, 0, 9 * mrad, 9 * mrad) == 0);
}

TEST_CASE("a beam without an error or with a Gaussian sun needs no table and is refused") {
  CHECK_THROWS_AS(RoundBeam(pillbox_sun(), 0), std::invalid_argument);
  CHECK_THROWS_AS(RoundBeam(gaussian_sun(1 * mrad), 1 * mrad), std::invalid_argument);
}
