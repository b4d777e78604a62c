#include "models/shape_fit.h"

#include <catch2/catch.hpp>
#include <cmath>
#include <functional>
#include <numbers>

#include "fem/units.h"
#include "models/intercept.h"
#include "models/quadrature.h"

using namespace focalframe;
using namespace focalframe::models;

namespace {

constexpr Parabola wide{5.77, 1.71};

/// A cross-section sampled at Gauss points, so that area means are exact.
struct Section {
  Quadrature rule = gauss_legendre(12, 8, -wide.width / 2, wide.width / 2);
  std::vector<double> v, w, rotation, receiver_v, receiver_w;

  /// Displacements and rotation as functions of y.
  Section(const std::function<double(double)>& v_of, const std::function<double(double)>& w_of,
          const std::function<double(double)>& rotation_of) {
    for (const double y : rule.point) {
      v.push_back(v_of(y));
      w.push_back(w_of(y));
      rotation.push_back(rotation_of(y));
    }
  }
  TroughSamples samples() const {
    return {rule.point, rule.weight, v, w, rotation, receiver_v, receiver_w, {}};
  }
};

/// A deviation dz(y) along z alone: no lateral motion, normal turned by dz' cos^2.
Section along_z(const std::function<double(double)>& dz, const std::function<double(double)>& derivative) {
  return {
      [](double) { return 0.0; }, dz,
      [derivative](double y) { return derivative(y) * wide.focal_length / wide.local_focal_distance(y); }};
}

Section droop() {
  return along_z([](double y) { return -0.004 * std::pow(y / 2.885, 4); },
                 [](double y) { return -0.016 * std::pow(y / 2.885, 3) / 2.885; });
}

Section rigid(double lateral, double up, double turn) {
  return {[=](double y) { return lateral - turn * wide.height(y); }, [=](double y) { return up + turn * y; },
          [=](double) { return turn; }};
}

double rms(const Section& section, const std::vector<double>& values) {
  double sum = 0;
  for (std::size_t i = 0; i < values.size(); ++i) sum += section.rule.weight[i] * values[i] * values[i];
  return std::sqrt(sum / wide.width);
}

}  // namespace

TEST_CASE("a trough moved and turned as one piece misses by r times the turn and has no slope error left") {
  Section s = rigid(5 * mm, -3 * mm, 2 * mrad);
  s.receiver_v = {5 * mm - 2 * mrad * wide.focal_length};
  s.receiver_w = {-3 * mm};
  const TroughShape shape = fit_shape(wide, s.samples());
  CHECK(shape.vertex_v == Approx(5 * mm).epsilon(1e-9));
  CHECK(shape.vertex_w == Approx(-3 * mm).epsilon(1e-9));
  CHECK(shape.tilt == Approx(2 * mrad).epsilon(1e-9));
  CHECK(shape.focal_change == Approx(0).margin(1e-12));
  CHECK(shape.slope_rms_after == Approx(0).margin(1e-12));
  CHECK(shape.receiver_lateral == Approx(0).margin(1e-12));
  CHECK(shape.receiver_axial == Approx(0).margin(1e-12));
  CHECK(shape.aim_error == Approx(2 * mrad).epsilon(1e-9));
  CHECK(shape.rank == 3);
  const std::vector<double> miss = miss_distances(wide, s.samples());
  for (std::size_t i = 0; i < miss.size(); ++i)
    CHECK(miss[i] == Approx(-2 * mrad * wide.local_focal_distance(s.rule.point[i])).epsilon(1e-9));
  for (const double left : miss_distances(wide, s.samples(), 2 * mrad))
    CHECK(left == Approx(0).margin(1e-12));
}

TEST_CASE("a trough translated with its receiver does not miss at all") {
  Section s = rigid(7 * mm, 4 * mm, 0);
  s.receiver_v = {7 * mm};
  s.receiver_w = {4 * mm};
  for (const double miss : miss_distances(wide, s.samples())) CHECK(miss == Approx(0).margin(1e-15));
}

TEST_CASE("a homologous deformation misses nothing but keeps a slope error against the design") {
  // f changes by df at fixed vertex: dz = -y^2 df / 4f^2; the receiver follows the focus.
  const double f = wide.focal_length, df = 6 * mm;
  Section s = along_z([=](double y) { return 1 * mm - y * y * df / (4 * f * f); },
                      [=](double y) { return -y * df / (2 * f * f); });
  s.receiver_v = {0};
  s.receiver_w = {1 * mm + df};
  const TroughShape shape = fit_shape(wide, s.samples());
  CHECK(shape.miss_rms == Approx(0).margin(1e-13));
  CHECK(shape.focal_change == Approx(df).epsilon(1e-9));
  CHECK(shape.focal_line_w == Approx(1 * mm + df).epsilon(1e-9));
  CHECK(shape.receiver_axial == Approx(df).epsilon(1e-9));
  CHECK(shape.slope_rms > 0.5 * mrad);
  CHECK(shape.slope_rms_after == Approx(0).margin(1e-12));
}

TEST_CASE("a fourth-power droop fits as Legendre's polynomials say") {
  // Closed form: dz = -a (y/e)^4 has vertex 3a/35, focal change (6/7)(a/e^2) 4 f^2, residual (8/105) a.
  const TroughShape shape = fit_shape(wide, droop().samples());
  CHECK(shape.vertex_w / mm == Approx(0.342857).margin(1e-6));
  CHECK(shape.focal_change / mm == Approx(4.818077).margin(1e-6));
  CHECK(shape.height_rms / mm == Approx(0.304762).margin(1e-6));
  CHECK(shape.tilt == Approx(0).margin(1e-12));
  CHECK(shape.vertex_v == Approx(0).margin(1e-12));
}

TEST_CASE("slope error, focus deviation and miss of three shapes equal their integrals") {
  // Computed here by adaptive quadrature, misses confirmed by an independent exact ray trace.
  const Section d = droop();
  const TroughShape a = fit_shape(wide, d.samples());
  CHECK(a.slope_rms / mrad == Approx(1.36464).margin(1e-5));
  CHECK(a.focus_deviation / mm == Approx(7.16888).margin(1e-5));
  CHECK(a.miss_rms / mm == Approx(5.91232).margin(1e-5));
  CHECK(rms(d, miss_distances(wide, d.samples())) == Approx(a.miss_rms));

  const Section s = along_z([](double y) { return 0.004 * std::pow(y / 2.885, 3); },
                            [](double y) { return 0.012 * std::pow(y / 2.885, 2) / 2.885; });
  const TroughShape b = fit_shape(wide, s.samples());
  CHECK(b.slope_rms / mrad == Approx(1.25473).margin(1e-5));
  CHECK(b.focus_deviation / mm == Approx(6.36175).margin(1e-5));
  CHECK(b.miss_rms / mm == Approx(4.97395).margin(1e-5));

  const double k = 2 * std::numbers::pi / 1.5;
  const Section wave = along_z([k](double y) { return 0.0005 * std::sin(k * y); },
                               [k](double y) { return 0.0005 * k * std::cos(k * y); });
  const TroughShape c = fit_shape(wide, wave.samples());
  CHECK(c.slope_rms / mrad == Approx(1.23496).margin(1e-5));
  CHECK(c.focus_deviation / mm == Approx(4.97810).margin(1e-5));
  CHECK(c.miss_rms / mm == Approx(4.99315).margin(1e-5));
}

TEST_CASE("the focal shift of a drooping trough is the receiver place of least rms miss") {
  // Computed here: least squares on the miss; a fit to the heights would say 5.161 mm.
  Section s = droop();
  const TroughShape shape = fit_shape(wide, s.samples());
  CHECK(shape.focal_line_w / mm == Approx(7.306).margin(1e-3));
  CHECK((shape.vertex_w + shape.focal_change) / mm == Approx(5.161).margin(1e-3));
  const auto miss_with_receiver_at = [&](double up) {
    s.receiver_v = {0};
    s.receiver_w = {up};
    return fit_shape(wide, s.samples()).miss_rms;
  };
  const double best = miss_with_receiver_at(shape.focal_line_w);
  CHECK(best < miss_with_receiver_at(shape.focal_line_w + 0.1 * mm));
  CHECK(best < miss_with_receiver_at(shape.focal_line_w - 0.1 * mm));
}

TEST_CASE("slopes from differences of node heights converge from below to the true slope error") {
  // Computed here; why slopes are taken from rotations and shape functions instead.
  const double expected[][2] = {{10, 1.35733}, {20, 1.36282}, {40, 1.36419}, {80, 1.36453}};
  for (const auto& [elements, slope] : expected) {
    const int n = static_cast<int>(elements);
    double sum = 0;
    for (int i = 0; i < n; ++i) {
      const double a = -2.885 + 5.77 * i / n, b = -2.885 + 5.77 * (i + 1) / n, y = (a + b) / 2;
      const double rise = -0.004 * (std::pow(b / 2.885, 4) - std::pow(a / 2.885, 4)) / (b - a);
      sum += std::pow(rise * wide.focal_length / wide.local_focal_distance(y), 2) / n;
    }
    CHECK(std::sqrt(sum) / mrad == Approx(slope).margin(1e-5));
    CHECK(std::sqrt(sum) < fit_shape(wide, droop().samples()).slope_rms);
  }
}

TEST_CASE("the parts of the miss add up to it, and each deformation lands in its own part") {
  Section s = rigid(3 * mm, -2 * mm, 1.5 * mrad);
  const Section bent = droop();
  for (std::size_t i = 0; i < s.v.size(); ++i) {
    s.w[i] += bent.w[i];
    s.rotation[i] += bent.rotation[i];
  }
  s.receiver_v = {3 * mm - 1.0 * mrad * wide.focal_length + 2 * mm};
  s.receiver_w = {-1 * mm};
  const TroughShape shape = fit_shape(wide, s.samples());
  const std::vector<double> twist{1.0 * mrad};
  const TroughMissParts p = split_miss(wide, s.samples(), shape, twist, 0.4 * mrad);
  const std::vector<double> miss = miss_distances(wide, s.samples(), 0.4 * mrad);
  for (std::size_t i = 0; i < miss.size(); ++i) {
    const double y = s.rule.point[i], r = wide.local_focal_distance(y), phi = wide.ray_angle(y);
    CHECK(p.twist[i] + p.tilt[i] + p.receiver[i] + p.focus[i] + p.residual[i] ==
          Approx(miss[i]).margin(1e-15));
    CHECK(p.twist[i] == Approx(-0.6 * mrad * r));
    CHECK(p.tilt[i] == Approx(-0.5 * mrad * (r + wide.focal_length * std::cos(phi))).epsilon(1e-6));
    CHECK(p.focus[i] == Approx(4.818077 * mm * std::sin(phi)).epsilon(1e-6).margin(1e-9));
    CHECK(p.receiver[i] ==
          Approx(-2 * mm * std::cos(phi) - (1 - 0.342857) * mm * std::sin(phi)).margin(1e-8));
  }
}

TEST_CASE("samples on a single line leave the fit without its full rank, and the fit says so") {
  const std::vector<double> y{1.0}, weight{1.0}, v{0.0, 0.0}, w{1e-3, 1e-3}, rotation{0.0, 0.0};
  const TroughShape shape = fit_shape(wide, {y, weight, v, w, rotation, {}, {}, {}});
  CHECK(shape.rank == 1);
  CHECK(shape.condition > 1e10);
  CHECK(shape.height_rms == Approx(0).margin(1e-12));
}

TEST_CASE("arrays that do not fit each other are refused") {
  const std::vector<double> y{-1.0, 1.0}, weight{1.0, 1.0}, none{0.0, 0.0}, three{0.0, 0.0, 0.0}, zero{0.0};
  CHECK_THROWS_AS(fit_shape(wide, {y, weight, none, three, none, {}, {}, {}}), std::invalid_argument);
  CHECK_THROWS_AS(fit_shape(wide, {y, weight, three, three, three, {}, {}, {}}), std::invalid_argument);
  CHECK_THROWS_AS(fit_shape(wide, {y, zero, none, none, none, {}, {}, {}}), std::invalid_argument);
}

TEST_CASE("a cantilever rib under uniform load has an rms slope of sqrt(9/14) of its tip slope") {
  // Closed form: slope = tip (1 - (1 - s)^3), tip slope = 4/3 of tip deflection over length; 1.83908 and
  // 1.47454 mrad for 4 mm on 2.9 m. So flat a mirror that its own slope does not matter.
  const double length = 2.9, tip = 4 * mm, tip_slope = 4 * tip / (3 * length);
  CHECK(tip_slope / mrad == Approx(1.83908).margin(5e-6));
  const Quadrature rule = gauss_legendre(8, 1, 0, length);
  std::vector<double> v, w, rotation;
  for (const double y : rule.point) {
    const double s = y / length;
    v.push_back(0);
    w.push_back(tip * (std::pow(1 - s, 4) + 4 * s - 1) / 3);
    rotation.push_back(tip_slope * (1 - std::pow(1 - s, 3)));
  }
  const TroughShape shape = fit_shape({5.8, 1e5}, {rule.point, rule.weight, v, w, rotation, {}, {}, {}});
  CHECK(shape.slope_rms / mrad == Approx(1.47454).margin(5e-6));
  CHECK(shape.slope_rms == Approx(std::sqrt(9.0 / 14) * tip_slope).epsilon(1e-7));
}

TEST_CASE("a longitudinal slope is reported only when it is given") {
  const std::vector<double> y{-1.0, 1.0}, weight{1.0, 3.0}, none{0.0, 0.0}, along{2 * mrad, 0.0};
  CHECK(std::isnan(fit_shape(wide, {y, weight, none, none, none, {}, {}, {}}).longitudinal_slope_rms));
  CHECK(fit_shape(wide, {y, weight, none, none, none, {}, {}, along}).longitudinal_slope_rms ==
        Approx(1 * mrad));
}
