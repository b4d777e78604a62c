#include "models/dish_optics.h"

#include <Eigen/Geometry>
#include <catch2/catch.hpp>
#include <cmath>
#include <functional>
#include <numbers>

#include "fem/units.h"
#include "models/quadrature.h"

// Numbers named "computed here" come from adaptive quadrature and were confirmed by an independent
// Monte-Carlo trace of exact rays with millions of rays.

using namespace focalframe;
using namespace focalframe::models;
using Eigen::Vector3d;

namespace {

constexpr Parabola dish{10.0, 6.0};

BeamError beam(double rms, double slope = 0) {
  BeamError error;
  error.scatter_rms = rms;
  error.slope_rms = slope;
  return error;
}

/// Mean over the aperture for a motion given at (x, y).
double mean(const DishIntercept& intercept, const std::function<DishMotion(double, double)>& motion_at) {
  const Quadrature square = gauss_legendre(24, 0, 25);
  const int around = 24;
  std::vector<double> rho, weight;
  std::vector<DishMiss> miss;
  for (std::size_t i = 0; i < square.point.size(); ++i)
    for (int k = 0; k < around; ++k) {
      const double angle = 2 * std::numbers::pi * (k + 0.5) / around, r = std::sqrt(square.point[i]);
      const double x = r * std::cos(angle), y = r * std::sin(angle);
      rho.push_back(r);
      weight.push_back(square.weight[i]);
      miss.push_back(dish_miss(dish, x, y, motion_at(x, y)));
    }
  return intercept.mean(rho, miss, weight);
}

DishMotion rigid(double x, double y, const Vector3d& move, const Vector3d& turn) {
  const Vector3d at(x, y, dish.height(std::hypot(x, y))), focus(0, 0, dish.focal_length);
  return {move + turn.cross(at), turn, move + turn.cross(focus), Vector3d::Zero()};
}

}  // namespace

TEST_CASE("a sphere in the focus of a dish catches what the closed form says") {
  // Closed form and quadrature agree, computed here.
  CHECK(dish.rim_angle() / deg == Approx(45.2397).margin(5e-5));
  CHECK(dish.local_focal_distance(5) == Approx(7.041667).margin(5e-7));
  CHECK(sphere_intercept(dish, 0.10, 5 * mrad) == Approx(0.990359).margin(1e-6));
  CHECK(sphere_intercept(dish, 0.10, 7 * mrad) == Approx(0.908428).margin(1e-6));
  CHECK(sphere_intercept(dish, 0.125, 7 * mrad) == Approx(0.97563).margin(1e-5));
  for (const double sigma : {5 * mrad, 7 * mrad})
    CHECK(DishIntercept(dish, 0.10, beam(sigma), PointReceiver::sphere).undeformed() ==
          Approx(sphere_intercept(dish, 0.10, sigma)).margin(1e-9));
}

TEST_CASE("a shallow dish needs 2.15, 2.45 and 3.03 beam widths for 90, 95 and 99 percent") {
  // Closed form: 1 - exp(-k^2 / 2).
  const double table[][2] = {{2.1460, 0.90}, {2.4477, 0.95}, {3.0349, 0.99}};
  for (const auto& [k, share] : table) {
    CHECK(paraxial_intercept(6, k * 6 * 7 * mrad, 7 * mrad) == Approx(share).margin(1e-5));
    CHECK(sphere_intercept({0.01, 6}, k * 6 * 7 * mrad, 7 * mrad) == Approx(share).margin(1e-5));
  }
  CHECK(paraxial_intercept(6, 0.125, 7 * mrad) == Approx(0.98807).margin(1e-5));
}

TEST_CASE("a round spot holds 39, 86 and 99 percent within one, two and three sigma") {
  // Closed form: 1 - exp(-n^2 / 2).
  const double expected[] = {0.393469, 0.864665, 0.988891};
  for (int n = 1; n <= 3; ++n)
    CHECK(spot_inside_circle(n, 0, 0, 1, 1) == Approx(expected[n - 1]).margin(1e-6));
}

TEST_CASE("the share of a spot in a circle does not depend on which axis is called x") {
  CHECK(spot_inside_circle(1.0, 0.3, -0.2, 0.4, 0.7) ==
        Approx(spot_inside_circle(1.0, -0.2, 0.3, 0.7, 0.4)).epsilon(1e-9));
  CHECK(spot_inside_circle(1.0, 0.3, -0.2, 0.4, 0.4) ==
        Approx(spot_inside_circle(1.0, std::hypot(0.3, 0.2), 0, 0.4, 0.4)).epsilon(1e-9));
  CHECK(spot_inside_circle(1.0, 0.8, 0.5, 0.02, 0.02) ==
        Approx(spot_inside_circle(1.0, std::hypot(0.8, 0.5), 0, 0.02, 0.02)).epsilon(1e-6));
  CHECK(spot_inside_circle(1.0, 0.9, 0, 0, 0) == 1);
  CHECK(spot_inside_circle(1.0, 0.9, 0.9, 0, 0) == 0);
  CHECK(spot_inside_circle(1.0, 30, 0, 1, 1) == 0);
}

TEST_CASE("the share of a spot in a circle is accurate for narrow, long and eccentric spots") {
  // Second route: many panels of Gauss quadrature over chords the other way round.
  const Quadrature rule = gauss_legendre(16, 300, -std::numbers::pi / 2, std::numbers::pi / 2);
  const auto slow = [&](double x, double y, double rms_x, double rms_y) {
    double sum = 0;
    for (std::size_t i = 0; i < rule.point.size(); ++i) {
      const double h = std::cos(rule.point[i]), d = (std::sin(rule.point[i]) - y) / rms_y;
      sum += rule.weight[i] * h * std::exp(-d * d / 2) / (rms_y * std::sqrt(2 * std::numbers::pi)) *
             (std::erf((h - x) / (rms_x * std::numbers::sqrt2)) +
              std::erf((h + x) / (rms_x * std::numbers::sqrt2))) /
             2;
    }
    return sum;
  };
  for (const double width : {0.02, 0.2, 1.0})
    for (const double ratio : {0.25, 1.0, 4.0})
      for (const auto& [x, y] : {std::pair{0.0, 0.0}, {0.6, 0.7}, {0.0, 0.95}, {1.05, 0.2}})
        CHECK(spot_inside_circle(1, x, y, width, ratio * width) ==
              Approx(slow(x, y, width, ratio * width)).margin(1e-6));
}

TEST_CASE("a flat aperture catches less than a sphere, as computed") {
  // Computed here: receiver radius, beam rms, intercept.
  const double table[][3] = {{0.10, 5, 0.972834},
                             {0.10, 7, 0.857042},
                             {0.125, 7, 0.947197},
                             {0.15, 7, 0.982959},
                             {0.10, 10, 0.625261}};
  for (const auto& [radius, sigma, expected] : table) {
    const DishIntercept intercept(dish, radius, beam(sigma * mrad));
    CHECK(intercept.undeformed() == Approx(expected).margin(1e-6));
    CHECK(intercept.undeformed() < sphere_intercept(dish, radius, sigma * mrad));
  }
}

TEST_CASE("slope errors of a dish count twice radially and less tangentially") {
  // Computed here, slope error alone, then with a beam of 3 mrad.
  const double table[][2] = {{2, 0.995530}, {2.5, 0.975312}, {3, 0.930901}, {3.5, 0.865975}};
  for (const auto& [slope, expected] : table)
    CHECK(DishIntercept(dish, 0.10, beam(0, slope * mrad)).undeformed() == Approx(expected).margin(1e-6));
  CHECK(DishIntercept(dish, 0.10, beam(3 * mrad, 2.5 * mrad)).undeformed() == Approx(0.938749).margin(1e-6));
}

TEST_CASE("a mispointed dish and a displaced receiver lose light as computed") {
  // Computed here with a linearised cone; traced 0.94142, 0.90956, 0.78102; 0.90829, 0.91538, 0.79844;
  // 0.92290.
  const DishIntercept intercept(dish, 0.125, beam(7 * mrad));
  const double pointing[][2] = {{2, 0.94138}, {5, 0.90935}, {10, 0.78095}};
  for (const auto& [aim, expected] : pointing) {
    DishMotion motion;
    motion.aim = {aim * mrad, 0, 0};
    CHECK(mean(intercept, [&](double, double) { return motion; }) == Approx(expected).margin(5e-4));
    motion.aim = {0, -aim * mrad, 0};
    CHECK(mean(intercept, [&](double, double) { return motion; }) == Approx(expected).margin(5e-4));
  }
  const double axial[][2] = {{50, 0.90886}, {-50, 0.91453}, {100, 0.79912}};
  for (const auto& [rise, expected] : axial) {
    DishMotion motion;
    motion.receiver = {0, 0, rise * mm};
    CHECK(mean(intercept, [&](double, double) { return motion; }) == Approx(expected).margin(5e-4));
  }
  DishMotion motion;
  motion.receiver = {0, 30 * mm, 0};
  CHECK(mean(intercept, [&](double, double) { return motion; }) == Approx(0.92275).margin(5e-4));
}

TEST_CASE("the miss of a single mirror point agrees with exact reflection to first order") {
  // Computed here: f = 6 m, 4 m off the axis, raised 1 mm, slopes 1 mrad radial and 0.7 mrad tangential;
  // exact reflection gives -11.3967 and -8.3939 mm.
  const double slope = dish.slope_angle(4);
  CHECK(2 * slope / deg == Approx(36.8699).margin(5e-5));
  // Normal of the raised surface (-z', -z'', 1), first order, as the rotation that makes it.
  const Vector3d ideal(-std::sin(slope), 0, std::cos(slope));
  const Vector3d change(-1e-3, -0.7e-3, 0);
  const Vector3d turned = (change * std::cos(slope)) - ideal * ideal.dot(change * std::cos(slope));
  DishMotion motion;
  motion.displacement = {0, 0, 1 * mm};
  motion.rotation = ideal.cross(turned);
  const DishMiss miss = dish_miss(dish, 4, 0, motion);
  CHECK(miss.radial / mm == Approx(-11.4).margin(1e-9));
  CHECK(miss.tangential / mm == Approx(-8.4).margin(1e-9));
  CHECK(miss.radial / mm == Approx(-11.3967).epsilon(0.005));
  CHECK(miss.tangential / mm == Approx(-8.3939).epsilon(0.005));
}

TEST_CASE("a dish moved with its receiver does not miss, turned with it misses by the pointing alone") {
  for (const auto& [x, y] : {std::pair{3.0, 0.0}, {-1.0, 4.0}, {0.0, 0.0}}) {
    const DishMiss moved = dish_miss(dish, x, y, rigid(x, y, {3 * mm, -4 * mm, 5 * mm}, Vector3d::Zero()));
    CHECK(moved.radial == Approx(0).margin(1e-15));
    CHECK(moved.tangential == Approx(0).margin(1e-15));
    CHECK(moved.rise == Approx(0).margin(1e-15));
    const Vector3d turn(1 * mrad, -2 * mrad, 0);
    DishMotion turned = rigid(x, y, Vector3d::Zero(), turn), aimed;
    const DishMiss miss = dish_miss(dish, x, y, turned);
    aimed.aim = -turn;
    const DishMiss expected = dish_miss(dish, x, y, aimed);
    CHECK(miss.radial == Approx(expected.radial).margin(1e-15));
    CHECK(miss.tangential == Approx(expected.tangential).margin(1e-15));
    turned.aim = turn;
    CHECK(dish_miss(dish, x, y, turned).radial == Approx(0).margin(1e-15));
    CHECK(dish_miss(dish, x, y, turned).tangential == Approx(0).margin(1e-15));
  }
}

TEST_CASE("the meridian of a dish misses like a trough") {
  const MissTerms terms = miss_terms(dish, 3.0);
  DishMotion motion;
  motion.displacement = {0, 2 * mm, -1 * mm};
  motion.rotation = {0.7 * mrad, 0, 0};
  motion.receiver = {0, 1 * mm, 3 * mm};
  motion.aim = {-0.4 * mrad, 0, 0};
  CHECK(dish_miss(dish, 0, 3, motion).radial ==
        Approx(2 * mm * terms.mirror_v - 1 * mm * terms.mirror_w + 0.7 * mrad * terms.rotation +
               1 * mm * terms.receiver_v + 3 * mm * terms.receiver_w - 0.4 * mrad * terms.aim));
  CHECK(dish_miss(dish, 0, 3, motion).tangential == Approx(0).margin(1e-15));
}

TEST_CASE("turning a dish about its own axis misses nothing") {
  DishMotion motion;
  const Vector3d turn(0, 0, 5 * mrad);
  motion.displacement = turn.cross(Vector3d(2, 3, dish.height(std::hypot(2, 3))));
  motion.rotation = turn;
  const DishMiss miss = dish_miss(dish, 2, 3, motion);
  CHECK(miss.radial == Approx(0).margin(1e-15));
  CHECK(miss.tangential == Approx(0).margin(1e-15));
}

TEST_CASE("a uniform sun on a shallow dish gives the convolution of a disc with a Gaussian") {
  // Second route: radial integral over the disc of the Gaussian's share outside, by offset spots in a fine
  // sum.
  const Parabola shallow{0.1, 6};
  BeamError error = beam(4 * mrad);
  error.sun = pillbox_sun();
  const double radius = 0.06, t = solar_disc_half_angle;
  const Quadrature ring = gauss_legendre(40, 0, t);
  double sum = 0;
  for (std::size_t i = 0; i < ring.point.size(); ++i)
    sum += ring.weight[i] * 2 * ring.point[i] / (t * t) *
           spot_inside_circle(radius, ring.point[i] * 6, 0, 4 * mrad * 6, 4 * mrad * 6);
  CHECK(DishIntercept(shallow, radius, error, PointReceiver::sphere).undeformed() ==
        Approx(sum).margin(1e-5));
  // A sun of its own rms but Gaussian is near, not equal.
  error.sun = gaussian_sun(t / 2);
  const double gaussian = DishIntercept(shallow, radius, error, PointReceiver::sphere).undeformed();
  CHECK(gaussian == Approx(sum).margin(0.01));
  CHECK(std::abs(gaussian - sum) > 1e-4);
}

TEST_CASE("a hole in the middle of a dish leaves the mean over the rest") {
  const DishIntercept intercept(dish, 0.10, beam(7 * mrad));
  const double inner = 2.5, whole = intercept.undeformed(), outside = intercept.undeformed(inner);
  const Parabola middle{2 * inner, dish.focal_length};
  const double inside = DishIntercept(middle, 0.10, beam(7 * mrad)).undeformed();
  CHECK(whole == Approx(0.25 * inside + 0.75 * outside).epsilon(1e-9));
}

TEST_CASE("a dish refuses a trough's errors and sizes that are none") {
  BeamError error = beam(5 * mrad);
  error.incidence = 0.1;
  CHECK_THROWS_AS(DishIntercept(dish, 0.1, error), std::invalid_argument);
  CHECK_THROWS_AS(DishIntercept(dish, 0, beam(5 * mrad)), std::invalid_argument);
}
