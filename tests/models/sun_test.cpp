#include "models/sun.h"

#include <algorithm>
#include <catch2/catch.hpp>
#include <cmath>
#include <numbers>
#include <stdexcept>
#include <vector>

#include "fem/units.h"

using namespace focalframe;
using namespace focalframe::models;

namespace {

double integral(const SunShape& sun) {
  double sum = 0;
  for (std::size_t k = 1; k < sun.angle.size(); ++k)
    sum += (sun.angle[k] - sun.angle[k - 1]) * (sun.density[k] + sun.density[k - 1]);
  return sum;
}

}  // namespace

TEST_CASE("every sun's line profile holds all its light") {
  for (const SunShape& sun : {pillbox_sun(), buie_sun(0.02), buie_sun(0.40)}) {
    CHECK(integral(sun) == Approx(1).epsilon(1e-12));
    CHECK(std::is_sorted(sun.angle.begin(), sun.angle.end()));
    CHECK(*std::min_element(sun.density.begin(), sun.density.end()) >= 0);
  }
}

TEST_CASE("a uniform disc projects to half an ellipse with an rms of half its radius") {
  // Closed form: B(s) = 2 sqrt(t^2 - s^2) / (pi t^2).
  const SunShape sun = pillbox_sun();
  const double t = solar_disc_half_angle;
  CHECK(line_rms(sun) / mrad == Approx(2.325).margin(1e-4));
  for (std::size_t k = 0; k < sun.angle.size(); k += 37) {
    const double s = sun.angle[k];
    CHECK(sun.density[k] * t ==
          Approx(2 * std::sqrt(t * t - s * s) / (std::numbers::pi * t)).epsilon(1e-4).margin(1e-6));
  }
}

TEST_CASE("Buie's formula yields another circumsolar ratio than its parameter says") {
  // Computed here from the published formula (Buie, Monger, Dey 2003, Solar Energy 74, 113-122) by
  // integrating it.
  const double table[][2] = {{0.01, 0.00042}, {0.02, 0.00581}, {0.03, 0.01666}, {0.05, 0.04313},
                             {0.08, 0.07949}, {0.10, 0.10027}, {0.15, 0.14540}, {0.20, 0.18714},
                             {0.30, 0.27426}, {0.40, 0.37265}};
  for (const auto& [chi, ratio] : table) CHECK(buie_circumsolar_ratio(chi) == Approx(ratio).margin(6e-6));
}

TEST_CASE("Buie's parameter is found for the circumsolar ratio asked for") {
  // Computed here.
  const double table[][2] = {{0.01, 0.02429}, {0.02, 0.03263}, {0.03, 0.04018}, {0.05, 0.05527},
                             {0.10, 0.09973}, {0.20, 0.21538}, {0.30, 0.32737}, {0.40, 0.42598}};
  for (const auto& [ratio, chi] : table) CHECK(buie_parameter(ratio) == Approx(chi).margin(6e-6));
  for (const double ratio : {1e-4, 0.003, 0.07, 0.5, 0.7})
    CHECK(buie_circumsolar_ratio(buie_parameter(ratio)) == Approx(ratio).epsilon(1e-9));
  CHECK_THROWS_AS(buie_sun(0), std::invalid_argument);
  CHECK_THROWS_AS(buie_sun(0.8), std::invalid_argument);
}

TEST_CASE("the 1-D rms of Buie's sun grows with its parameter") {
  // Computed here, aureole to 43.6 mrad.
  const double table[][2] = {{0.02, 2.479}, {0.05, 3.469}, {0.10, 4.373}, {0.20, 5.470}};
  for (const auto& [chi, rms] : table)
    CHECK(line_rms(buie_sun_of_parameter(chi)) / mrad == Approx(rms).margin(1e-3));
}

TEST_CASE("a table of Buie's own radiance gives Buie's own sun") {
  const double chi = 0.10, kappa = 0.53891, gamma = -2.51659;  // from the formula, computed here
  std::vector<double> angle, radiance;
  for (double theta = 0; theta < 43.6; theta += theta < 4.6 ? 0.1 : theta < 4.7 ? 0.001 : 0.1) {
    angle.push_back(theta * mrad);
    radiance.push_back(theta <= 4.65 ? std::cos(0.326 * theta) / std::cos(0.308 * theta)
                                     : std::exp(kappa) * std::pow(theta, gamma));
  }
  const BeamSpread by_table(table_sun(angle, radiance), 1, 5 * mrad);
  const BeamSpread by_formula(buie_sun_of_parameter(chi), 1, 5 * mrad);
  for (const double u : {1.0, 5.0, 12.0, 20.0})
    CHECK(by_table.cumulative(u * mrad) == Approx(by_formula.cumulative(u * mrad)).margin(1e-4));
}

TEST_CASE("a table of constant radiance is the pillbox, and tables that are none are refused") {
  const std::vector<double> angle{0, 4.65 * mrad}, radiance{7, 7}, short_one{7}, dark{0, 0}, negative{1, -1};
  const std::vector<double> falling{0, -1}, late{1 * mrad, 2 * mrad};
  const BeamSpread table(table_sun(angle, radiance), 1, 2 * mrad), disc(pillbox_sun(), 1, 2 * mrad);
  for (const double u : {0.5, 3.0, 6.0})
    CHECK(table.cumulative(u * mrad) == Approx(disc.cumulative(u * mrad)).margin(1e-6));
  CHECK_THROWS_AS(table_sun(angle, short_one), std::invalid_argument);
  CHECK_THROWS_AS(table_sun(angle, dark), std::invalid_argument);
  CHECK_THROWS_AS(table_sun(angle, negative), std::invalid_argument);
  CHECK_THROWS_AS(table_sun(falling, radiance), std::invalid_argument);
  CHECK_THROWS_AS(table_sun(late, radiance), std::invalid_argument);
}

TEST_CASE("the convolution of a uniform disc with a Gaussian is exact at every width of the Gaussian") {
  // Second route: with s = t sin a the disc's profile has weights 2/pi cos^2 a, integrated by the midpoint
  // rule, which converges faster than any power for this periodic integrand.
  const double t = solar_disc_half_angle;
  for (const double sigma : {0.5, 2.0, 5.5}) {
    const BeamSpread spread(pillbox_sun(), 1, sigma * mrad);
    for (const double u : {0.0, 1.0, 4.0, 4.65, 6.0, 12.0}) {
      const int n = 2000;
      double sum = 0;
      for (int i = 0; i < n; ++i) {
        const double a = std::numbers::pi * ((i + 0.5) / n - 0.5);
        const double x = (u * mrad - t * std::sin(a)) / (sigma * mrad);
        sum += 2.0 / n * std::cos(a) * std::cos(a) * std::erfc(-x / std::numbers::sqrt2) / 2;
      }
      CHECK(spread.cumulative(u * mrad) == Approx(sum).margin(1e-6));
    }
  }
  // Without any error: the disc's own cumulative, closed form.
  const BeamSpread bare(pillbox_sun(), 1, 0);
  for (const double s : {-0.9, -0.3, 0.0, 0.5, 0.99})
    CHECK(bare.cumulative(s * t) ==
          Approx(0.5 + (s * std::sqrt(1 - s * s) + std::asin(s)) / std::numbers::pi).margin(5e-6));
}

TEST_CASE("a beam's density is the derivative of its cumulative, and both are symmetric") {
  for (const SunShape& sun : {gaussian_sun(2.6 * mrad), pillbox_sun(), buie_sun(0.05)}) {
    const BeamSpread spread(sun, 1.3, 3 * mrad);
    for (const double u : {0.3, 2.0, 7.0, 15.0}) {
      const double h = 1e-3 * mrad;
      const double slope = (spread.cumulative(u * mrad + h) - spread.cumulative(u * mrad - h)) / (2 * h);
      CHECK(spread.density(u * mrad) == Approx(slope).epsilon(1e-4).margin(1e-4));
      CHECK(spread.density(-u * mrad) == spread.density(u * mrad));
      CHECK(spread.cumulative(-u * mrad) == Approx(1 - spread.cumulative(u * mrad)).margin(1e-14));
    }
    CHECK(spread.cumulative(spread.reach()) == Approx(1).margin(1e-12));
  }
}

TEST_CASE("a widened sun is the same sun with all its angles stretched") {
  const BeamSpread stretched(buie_sun(0.05), 2, 6 * mrad), plain(buie_sun(0.05), 1, 3 * mrad);
  for (const double u : {1.0, 4.0, 10.0})
    CHECK(stretched.cumulative(2 * u * mrad) == Approx(plain.cumulative(u * mrad)).margin(1e-7));
}

TEST_CASE("a Gaussian beam holds 68, 95 and 99.7 percent within one, two and three sigma") {
  // Error function.
  const BeamSpread spread(gaussian_sun(3 * mrad), 1, 4 * mrad);
  const double expected[] = {0.682689, 0.954500, 0.997300};
  for (int n = 1; n <= 3; ++n)
    CHECK(2 * spread.cumulative(n * 5 * mrad) - 1 == Approx(expected[n - 1]).margin(1e-6));
}

TEST_CASE("a point sun without errors is a step") {
  const BeamSpread spread(gaussian_sun(0), 1, 0);
  CHECK(spread.cumulative(1e-9) == 1);
  CHECK(spread.cumulative(-1e-9) == 0);
  CHECK(spread.reach() == 0);
}
