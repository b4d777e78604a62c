#include "models/dish_trace.h"

#include <Eigen/Geometry>
#include <catch2/catch.hpp>
#include <cmath>
#include <numbers>
#include <vector>

#include "fem/units.h"
#include "models/quadrature.h"

using namespace focalframe;
using namespace focalframe::models;
using Eigen::Vector3d;

namespace {

constexpr std::int64_t rays = 200'000;

TracedDish dish(double receiver_radius, double scatter, double slope = 0) {
  TracedDish d;
  d.parabola = {10.0, 6.0};
  d.receiver_radius = receiver_radius;
  d.error.scatter_rms = scatter;
  d.error.slope_rms = slope;
  return d;
}

/// `first_order`: what linearising the miss and the cone may cost.
void check_against(const TracedIntercept& traced, double expected, double first_order = 2e-4) {
  CAPTURE(traced.intercept, traced.standard_error, expected);
  CHECK(std::abs(traced.intercept - expected) < 4 * traced.standard_error + first_order);
}

}  // namespace

TEST_CASE("traced and integrated intercepts of a perfect dish agree within four standard errors") {
  // Expected: computed here by adaptive quadrature; the sphere by its closed form.
  TracedDish d = dish(0.10, 7 * mrad);
  check_against(trace_rays(d, rays), 0.857042);
  d.kind = PointReceiver::sphere;
  check_against(trace_rays(d, rays), 0.908428);
  check_against(trace_rays(dish(0.10, 0, 3.5 * mrad), rays), 0.865975);
  check_against(trace_rays(dish(0.10, 3 * mrad, 2.5 * mrad), rays), 0.938749);
}

TEST_CASE("tracking errors of a dish blur its beam as scatter of the same size does") {
  TracedDish d = dish(0.10, 0);
  d.error.tracking_rms = 7 * mrad;
  check_against(trace_rays(d, rays), 0.857042);
}

TEST_CASE("traced and integrated intercepts of a sphere displaced along the axis agree") {
  TracedDish d = dish(0.10, 15 * mrad);
  d.parabola.width = 3;  // shallow, so that the beam's growth with distance shows beside the miss
  d.kind = PointReceiver::sphere;
  const DishIntercept intercept(d.parabola, d.receiver_radius, d.error, d.kind);
  const Quadrature square = gauss_legendre(16, 0, 2.25);
  for (const double rise : {400 * mm, -400 * mm}) {
    d.receiver = {0, 0, rise};
    DishMotion motion;
    motion.receiver = d.receiver;
    double expected = 0;
    for (std::size_t i = 0; i < square.point.size(); ++i) {
      const double rho = std::sqrt(square.point[i]);
      expected += square.weight[i] / 2.25 * intercept.at(rho, dish_miss(d.parabola, rho, 0, motion));
    }
    check_against(trace_rays(d, rays), expected, 1e-3);
  }
}

TEST_CASE("traced and integrated intercepts of mispointed dishes and displaced receivers agree") {
  TracedDish d = dish(0.125, 7 * mrad);
  d.aim = {6 * mrad, -8 * mrad, 0};
  check_against(trace_rays(d, rays), 0.78095, 1e-3);
  d.aim.setZero();
  d.receiver = {0, 0, 50 * mm};
  check_against(trace_rays(d, rays), 0.90886, 1e-3);
  d.receiver = {18 * mm, 24 * mm, 0};
  check_against(trace_rays(d, rays), 0.92275, 1e-3);
}

TEST_CASE("traced and integrated intercepts under a real sun agree") {
  for (const SunShape& sun : {pillbox_sun(), buie_sun(0.10)}) {
    TracedDish d = dish(0.10, 2 * mrad, 2 * mrad);
    d.error.sun = sun;
    d.inner_radius = 1;
    check_against(trace_rays(d, rays),
                  DishIntercept(d.parabola, d.receiver_radius, d.error).undeformed(d.inner_radius), 5e-4);
  }
}

TEST_CASE("traced and integrated intercepts of an astigmatic dish agree") {
  // The rim of a four-fold saddle: dz = 5 mm (rho/5)^2 cos 2 theta, normals turned accordingly.
  const auto saddle = [](double x, double y) {
    const double scale = 5 * mm / 25, f = 6;
    const Vector3d before = Vector3d(-x / (2 * f), -y / (2 * f), 1).normalized();
    const Vector3d after =
        Vector3d(-x / (2 * f) - 2 * scale * x, -y / (2 * f) + 2 * scale * y, 1).normalized();
    return SkinMotion{{0, 0, scale * (x * x - y * y)}, before.cross(after)};
  };
  TracedDish d = dish(0.10, 5 * mrad);
  d.skin = saddle;
  const DishIntercept intercept(d.parabola, d.receiver_radius, d.error);
  const Quadrature square = gauss_legendre(12, 0, 25);
  std::vector<double> rho, weight;
  std::vector<DishMiss> miss;
  for (std::size_t i = 0; i < square.point.size(); ++i)
    for (int k = 0; k < 24; ++k) {
      const double angle = 2 * std::numbers::pi * (k + 0.5) / 24, r = std::sqrt(square.point[i]);
      const SkinMotion m = saddle(r * std::cos(angle), r * std::sin(angle));
      DishMotion motion;
      motion.displacement = m.displacement;
      motion.rotation = m.rotation;
      rho.push_back(r);
      weight.push_back(square.weight[i]);
      miss.push_back(dish_miss(d.parabola, r * std::cos(angle), r * std::sin(angle), motion));
    }
  const double expected = intercept.mean(rho, miss, weight);
  CHECK(intercept.undeformed() - expected > 0.005);
  check_against(trace_rays(d, rays), expected, 5e-4);
}

TEST_CASE("a dish trace without rays is refused") {
  CHECK_THROWS_AS(trace_rays(dish(0.1, 5 * mrad), 0), std::invalid_argument);
}
