#include "models/antenna.h"

#include <Eigen/Geometry>
#include <array>
#include <catch2/catch.hpp>
#include <cmath>
#include <numbers>

#include "fem/units.h"
#include "models/quadrature.h"

using namespace focalframe;
using namespace focalframe::models;
using Eigen::Vector3d;

namespace {

constexpr Parabola dish{10.0, 6.0};
constexpr double GHz = 1e9, inch = 25.4 * mm;

/// Samples on a square grid clipped to the aperture.
struct Grid {
  std::vector<double> x, y, weight, u, v, w;

  Grid() {
    for (int i = 0; i < 41; ++i)
      for (int j = 0; j < 41; ++j) {
        const double a = -5 + 0.25 * i, b = -5 + 0.25 * j;
        if (a * a + b * b > 25 + 1e-9) continue;
        x.push_back(a);
        y.push_back(b);
      }
    weight.assign(x.size(), 1.0);
    u = v = w = std::vector<double>(x.size(), 0.0);
  }
  DishSamples samples() const { return {x, y, weight, u, v, w}; }
};

}  // namespace

TEST_CASE("a surface of 0.020 inch rms at 24 GHz loses 1.133 dB") {
  // Published worked example on an amateur satellite list, 2001, after Ruze, Proc. IEEE 54, 1966, 633.
  CHECK(ruze_loss_db(0.020 * inch, 3e8 / (24 * GHz)) == Approx(1.133).margin(5e-4));
  CHECK(ruze_loss_db(0.020 * inch, wavelength(24 * GHz)) == Approx(1.1343).margin(5e-5));
}

TEST_CASE("Ruze's loss of four surfaces, and of fractions of a wavelength") {
  // Closed form; the first confirmed here by summing 4 million random phases.
  CHECK(wavelength(10 * GHz) / mm == Approx(29.97925).margin(5e-6));
  CHECK(ruze_loss_db(1 * mm, wavelength(10 * GHz)) == Approx(0.763067).margin(1e-6));
  CHECK(ruze_loss_db(0.5 * mm, wavelength(10 * GHz)) == Approx(0.190767).margin(1e-6));
  CHECK(ruze_loss_db(0.3 * mm, wavelength(32 * GHz)) == Approx(0.703242).margin(1e-6));
  CHECK(ruze_loss_db(2 * mm, wavelength(4 * GHz)) == Approx(0.488363).margin(1e-6));
  const double gain[][2] = {{16, 0.5396}, {20, 0.6738}, {30, 0.8391}, {40, 0.9060}, {50, 0.9388}};
  for (const auto& [part, left] : gain)
    CHECK(std::pow(10, -ruze_loss_db(1 / part, 1) / 10) == Approx(left).margin(5e-5));
}

TEST_CASE("an astigmatic surface loses nearly what Ruze says, the summed phases tell how nearly") {
  // Half path error 1 mm (rho/a)^2 cos 2 theta: rms 1/sqrt 6 mm, closed form; losses computed here by
  // quadrature.
  const Quadrature square = gauss_legendre(24, 0, 1);
  std::vector<double> error, weight;
  double mean_square = 0;
  for (std::size_t i = 0; i < square.point.size(); ++i)
    for (int k = 0; k < 64; ++k) {
      error.push_back(1 * mm * square.point[i] * std::cos(4 * std::numbers::pi * k / 64));
      weight.push_back(square.weight[i] / 64);
      mean_square += weight.back() * error.back() * error.back();
    }
  CHECK(std::sqrt(mean_square) / mm == Approx(0.408248).margin(1e-6));
  CHECK(phase_loss_db(error, weight, wavelength(10 * GHz)) == Approx(0.127271).margin(1e-6));
  CHECK(ruze_loss_db(std::sqrt(mean_square), wavelength(10 * GHz)) == Approx(0.127178).margin(1e-6));
}

TEST_CASE("a common path changes no gain") {
  const std::vector<double> error(3, 2 * mm), weight{1, 2, 3};
  CHECK(phase_loss_db(error, weight, 10 * mm) == Approx(0).margin(1e-12));
}

TEST_CASE("half the path changes by the normal displacement times the cosine of incidence") {
  // Computed here: f = 6 m, 4 m off the axis, 1 mm along the normal; exact path 0.948680 mm.
  const double slope = dish.slope_angle(4);
  const double u = -1 * mm * std::sin(slope), w = 1 * mm * std::cos(slope);
  CHECK(half_path_error(dish, 4, 0, u, 0, w) / mm == Approx(0.948683).margin(1e-6));
  CHECK(half_path_error(dish, 0, 4, 0, u, w) / mm == Approx(0.948683).margin(1e-6));
  CHECK((w - 4 * u / 12) / mm == Approx(1.054093).margin(1e-6));
  const Vector3d point(4 + u, 0, dish.height(4) + w), before(4, 0, dish.height(4)), focus(0, 0, 6);
  const double exact = ((focus - before).norm() - before.z() - (focus - point).norm() + point.z()) / 2;
  CHECK(exact / mm == Approx(0.948680).margin(1e-6));
  // Sliding along the surface changes nothing to first order.
  CHECK(half_path_error(dish, 4, 0, std::cos(slope), 0, std::sin(slope)) == Approx(0).margin(1e-14));
}

TEST_CASE("the best-fit paraboloid finds an exactly moved and refocused dish") {
  // Computed here: exact motion of the material points (rotations first, y after x), equal weights. The fit
  // is first order, which costs 0.1 % of the motion.
  Grid grid;
  const Vector3d move(3 * mm, -2 * mm, 1 * mm);
  const Eigen::Matrix3d turn =
      (Eigen::AngleAxisd(-0.3 * mrad, Vector3d::UnitY()) * Eigen::AngleAxisd(0.5 * mrad, Vector3d::UnitX()))
          .toRotationMatrix();
  for (std::size_t i = 0; i < grid.x.size(); ++i) {
    const double rho2 = grid.x[i] * grid.x[i] + grid.y[i] * grid.y[i];
    const Vector3d before(grid.x[i], grid.y[i], dish.height(std::sqrt(rho2)));
    const Vector3d refocused(grid.x[i], grid.y[i], rho2 / (4 * (dish.focal_length + 8 * mm)));
    const Vector3d d = turn * refocused + move - before;
    grid.u[i] = d.x();
    grid.v[i] = d.y();
    grid.w[i] = d.z();
  }
  const DishShape full = fit_paraboloid(dish, grid.samples());
  CHECK(full.shift_x / mm == Approx(2.9952).margin(5e-5));
  CHECK(full.shift_y / mm == Approx(-2.0080).margin(5e-5));
  CHECK(full.shift_z / mm == Approx(1.0000).margin(5e-5));
  CHECK(full.tilt_x / mrad == Approx(0.49933).margin(5e-6));
  CHECK(full.tilt_y / mrad == Approx(-0.29960).margin(5e-6));
  CHECK(full.focal_change / mm == Approx(7.9893).margin(5e-5));
  CHECK(full.half_path_after == Approx(0.0645e-6).margin(5e-11));
  CHECK(full.condition == Approx(101).margin(0.1));
  CHECK(full.rank == 6);
  CHECK(full.half_path_before > 100 * full.half_path_after);

  const DishShape four = fit_paraboloid(dish, grid.samples(), DishFit::no_shift);
  CHECK(four.focal_change / mm == Approx(7.9893).margin(5e-5));
  CHECK(four.tilt_x / mrad == Approx(0.65768).margin(5e-6));
  CHECK(four.tilt_y / mrad == Approx(-0.06341).margin(5e-6));
  CHECK(four.half_path_after == Approx(13.355e-6).margin(5e-10));
  CHECK(four.condition == Approx(3.565).margin(0.001));
  CHECK(four.rank == 4);
  CHECK(four.shift_x == 0);
}

TEST_CASE("displacements along the surface do not disturb the best fit") {
  Grid grid;
  for (std::size_t i = 0; i < grid.x.size(); ++i) {
    const double move = 5 * mm * std::sin(grid.x[i] + 2 * grid.y[i]);
    grid.u[i] = move;
    grid.w[i] = move * grid.x[i] / (2 * dish.focal_length);
  }
  const DishShape shape = fit_paraboloid(dish, grid.samples());
  CHECK(shape.half_path_before == Approx(0).margin(1e-12));
  CHECK(shape.tilt_x == Approx(0).margin(1e-12));
}

TEST_CASE("a homologous dish has no error left, and its focus is where the fit says") {
  Grid grid;
  const double df = 5 * mm, shift = 2 * mm, turn = 0.4 * mrad;
  for (std::size_t i = 0; i < grid.x.size(); ++i) {
    const double rho2 = grid.x[i] * grid.x[i] + grid.y[i] * grid.y[i];
    grid.u[i] = turn * rho2 / (4 * dish.focal_length);
    grid.w[i] = shift - turn * grid.x[i] - rho2 * df / (4 * dish.focal_length * dish.focal_length);
  }
  const DishShape shape = fit_paraboloid(dish, grid.samples());
  CHECK(shape.half_path_after == Approx(0).margin(1e-12));
  CHECK(shape.focus_x == Approx(turn * dish.focal_length).epsilon(1e-7));
  CHECK(shape.focus_y == Approx(0).margin(1e-12));
  CHECK(shape.focus_z == Approx(shift + df).epsilon(1e-7));
}

TEST_CASE("a dish so shallow that shifts and tilts look alike says so by its rank") {
  Grid grid;
  for (std::size_t i = 0; i < grid.x.size(); ++i) grid.w[i] = 1e-3 * grid.x[i];
  const DishShape shape = fit_paraboloid({10, 1e5}, grid.samples());
  CHECK(shape.rank < 6);
  CHECK(shape.half_path_after == Approx(0).margin(1e-9));
  CHECK(fit_paraboloid({10, 6}, grid.samples()).condition < 200);
}

TEST_CASE("a spherical mirror crosses its axis short of the paraxial focus") {
  // Closed form and ray trace, computed here: radius 12 m.
  const double table[][2] = {{1, 5.979058}, {2, 5.914889}, {3, 5.803227}, {4, 5.636039}, {5, 5.399771}};
  for (const auto& [h, crossing] : table) {
    const double slope = std::asin(h / 12), z = 12 * (1 - std::cos(slope));
    CHECK(z + h / std::tan(2 * slope) == Approx(crossing).margin(1e-6));
    CHECK(12 - 6 / std::cos(slope) == Approx(crossing).margin(1e-6));
  }
  // The same as a deviation from the paraboloid: its marginal part is the spherical aberration x^4 / 8 R^3.
  Grid grid;
  for (std::size_t i = 0; i < grid.x.size(); ++i) {
    const double rho = std::hypot(grid.x[i], grid.y[i]);
    grid.w[i] = 12 - std::sqrt(144 - rho * rho) - dish.height(rho);
  }
  const DishShape shape = fit_paraboloid(dish, grid.samples());
  CHECK(shape.focal_change < 0);
  CHECK(shape.focal_change > 5.399771 - 6);
}

TEST_CASE("turning the reflector in front of a fixed feed turns the beam by one plus the deviation factor") {
  DishShape shape;
  shape.shift_x = shape.shift_y = shape.shift_z = shape.focal_change = 0;
  shape.tilt_x = 1 * mrad;
  shape.tilt_y = -2 * mrad;
  shape.focus_x = dish.focal_length * shape.tilt_y;
  shape.focus_y = -dish.focal_length * shape.tilt_x;
  const double k = beam_deviation_factor(dish);
  CHECK(k > 0.8);
  CHECK(k < 0.95);
  const BeamTurn fixed = beam_turn(dish, shape, 0, 0);
  CHECK(fixed.about_x == Approx((1 + k) * 1 * mrad));
  CHECK(fixed.about_y == Approx(-(1 + k) * 2 * mrad));
  const BeamTurn carried = beam_turn(dish, shape, shape.focus_x, shape.focus_y);
  CHECK(carried.about_x == Approx(1 * mrad));
  CHECK(carried.about_y == Approx(-2 * mrad));
  CHECK(carried.size() == Approx(std::sqrt(5.0) * mrad));
}

TEST_CASE("a beam off by half its width loses half its power") {
  // Closed form for a Gaussian beam.
  CHECK(pointing_loss_db(0.5 * mrad, 1 * mrad) == Approx(10 * std::log10(2.0)));
  CHECK(pointing_loss_db(1 * mrad, 1 * mrad) == Approx(4 * pointing_loss_db(0.5 * mrad, 1 * mrad)));
  CHECK(beamwidth(dish, 30 * mm) == Approx(1.22 * 3 * mrad));
}

TEST_CASE("a defocused feed loses what the spread of its path errors says") {
  CHECK(defocus_loss_db(dish, 0, 30 * mm) == Approx(0).margin(1e-12));
  CHECK(defocus_loss_db(dish, 5 * mm, 30 * mm) == Approx(defocus_loss_db(dish, -5 * mm, 30 * mm)));
  // Small shifts: Ruze with the rms of shift x cos(psi) / 2, here by closed form in p uniform on [f, p_rim].
  const double f = 6, rim = dish.local_focal_distance(5), span = rim - f;
  const double mean = 2 * f * std::log(rim / f) / span - 1;
  const double square = (4 * f * f * (1 / f - 1 / rim) - 4 * f * std::log(rim / f)) / span + 1;
  const double shift = 0.5 * mm, rms = shift / 2 * std::sqrt(square - mean * mean);
  CHECK(defocus_loss_db(dish, shift, 30 * mm) == Approx(ruze_loss_db(rms, 30 * mm)).epsilon(1e-4));
}

TEST_CASE("a feed that follows the focus of a refocused dish loses nothing") {
  DishShape shape;
  shape.shift_x = shape.shift_y = shape.tilt_x = shape.tilt_y = shape.focus_x = shape.focus_y = 0;
  shape.focus_z = 8 * mm;
  shape.half_path_after = 0;
  const std::array<double, 3> follows{0, 0, 8 * mm}, stays{0, 0, 0}, aside{10 * mm, 0, 8 * mm};
  CHECK(gain_loss(dish, shape, follows, 30 * mm).total() == Approx(0).margin(1e-12));
  CHECK(gain_loss(dish, shape, stays, 30 * mm).total() == Approx(defocus_loss_db(dish, 8 * mm, 30 * mm)));
  const GainLoss off = gain_loss(dish, shape, aside, 30 * mm);
  CHECK(off.pointing ==
        Approx(pointing_loss_db(beam_deviation_factor(dish) * 10 * mm / 6, beamwidth(dish, 30 * mm))));
  CHECK(gain_loss(dish, shape, aside, 30 * mm, true).total() == Approx(0).margin(1e-12));
}

TEST_CASE("dish arrays that do not fit each other are refused") {
  const std::vector<double> one{1.0}, zero{0.0}, none;
  CHECK_THROWS_AS(fit_paraboloid(dish, {none, none, none, none, none, none}), std::invalid_argument);
  CHECK_THROWS_AS(fit_paraboloid(dish, {one, one, one, one, one, none}), std::invalid_argument);
  CHECK_THROWS_AS(fit_paraboloid(dish, {one, one, zero, one, one, one}), std::invalid_argument);
}
