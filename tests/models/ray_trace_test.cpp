#include "models/ray_trace.h"

#include <catch2/catch.hpp>
#include <cmath>

#include "fem/units.h"
#include "models/quadrature.h"
#include "models/shape_fit.h"

using namespace focalframe;
using namespace focalframe::models;
using Eigen::Vector3d;

namespace {

constexpr Parabola wide{5.77, 1.71};
constexpr std::int64_t rays = 200'000;

TracedTrough trough(double total) {
  TracedTrough t;
  t.parabola = wide;
  t.receiver_radius = 35 * mm;
  t.error.scatter_rms = total;
  return t;
}

/// A deviation dz(y) along z; the normal turns by the true change of the tangent's angle.
SkinMotion lifted(double y, double dz, double derivative) {
  const double slope = y / (2 * wide.focal_length);
  return {{0, 0, dz}, {std::atan(slope + derivative) - std::atan(slope), 0, 0}};
}

/// `first_order`: what linearising the miss may cost.
void check_against(const TracedIntercept& traced, double expected, double first_order = 0) {
  CAPTURE(traced.intercept, traced.standard_error, expected);
  CHECK(std::abs(traced.intercept - expected) < 4 * traced.standard_error + first_order);
}

}  // namespace

TEST_CASE("traced and integrated intercepts of an undeformed trough agree within four standard errors") {
  // Expected: computed here by adaptive quadrature.
  check_against(trace_rays(trough(5 * mrad), rays), 0.997352);
  check_against(trace_rays(trough(8 * mrad), rays), 0.955550);
  TracedTrough t = trough(1.5 * mrad);
  t.error.sun = gaussian_sun(2.6 * mrad);
  t.error.slope_rms = 3 * mrad;
  t.error.tracking_rms = 2 * mrad;
  check_against(trace_rays(t, rays), 0.97624);
  t = trough(5.5 * mrad);
  t.error.sun = pillbox_sun();
  check_against(trace_rays(t, rays), 0.990632);
  t.error.sun = buie_sun_of_parameter(0.10);
  check_against(trace_rays(t, rays), 0.973301);
}

TEST_CASE("traced and integrated intercepts of misaimed and displaced receivers agree") {
  TracedTrough t = trough(6 * mrad);
  t.aim = 10 * mrad;
  check_against(trace_rays(t, rays), 0.855407);
  t.aim = 4 * mrad;
  t.receiver = [](double) { return Vector3d(0, 0, 10 * mm); };
  check_against(trace_rays(t, rays), 0.957798, 1e-3);
  t.aim = 0;
  t.receiver = [](double) { return Vector3d(0, 20 * mm, 0); };
  check_against(trace_rays(t, rays), 0.951819, 1e-3);
}

TEST_CASE("the trace tells the two signs of a combined misaim and axial shift on half a mirror apart") {
  // Only the half y > 0 is lit by moving the other half's normals far away; one-sided values computed here.
  TracedTrough t = trough(6 * mrad);
  t.aim = 4 * mrad;
  t.receiver = [](double) { return Vector3d(0, 0, 10 * mm); };
  t.skin = [](double, double y) { return SkinMotion{{0, 0, 0}, {y < 0 ? 0.5 : 0, 0, 0}}; };
  check_against(trace_rays(t, rays), 0.989653 / 2, 1e-3);
  t.skin = [](double, double y) { return SkinMotion{{0, 0, 0}, {y > 0 ? 0.5 : 0, 0, 0}}; };
  check_against(trace_rays(t, rays), 0.925944 / 2, 1e-3);
}

TEST_CASE("traced and integrated intercepts of a drooping and of a twisted trough agree") {
  TracedTrough t = trough(6 * mrad);
  t.skin = [](double, double y) {
    return lifted(y, -0.004 * std::pow(y / 2.885, 4), -0.016 * std::pow(y / 2.885, 3) / 2.885);
  };
  check_against(trace_rays(t, rays), 0.979149, 2e-4);
  // Mirror alone turned 4 mrad about the vertex.
  const auto turn_about_vertex = [](double y, double turn) {
    return SkinMotion{{0, -turn * wide.height(y), turn * y}, {turn, 0, 0}};
  };
  t.skin = [&](double, double y) { return turn_about_vertex(y, 4 * mrad); };
  check_against(trace_rays(t, rays), 0.956920, 2e-4);
  // Mirror and receiver twisted together, linearly from 0 to 12 mrad along the row.
  t.x_to = 12;
  t.skin = [&](double x, double y) { return turn_about_vertex(y, x * mrad); };
  t.receiver = [](double x) { return Vector3d(0, -x * mrad * wide.focal_length, 0); };
  check_against(trace_rays(t, rays), 0.928755, 2e-4);
}

TEST_CASE("at an incidence angle sun, scatter and longitudinal slope widen the beam as the formula says") {
  TracedTrough t = trough(2 * mrad);
  t.error.sun = gaussian_sun(2.6 * mrad);
  t.error.slope_rms = 2 * mrad;
  t.error.longitudinal_slope_rms = 2.5 * mrad;
  for (const double incidence : {30.0, 50.0}) {
    t.error.incidence = incidence * deg;
    const TroughIntercept intercept(wide, t.receiver_radius, t.error, {0.0});
    check_against(trace_rays(t, rays), intercept.undeformed(), 2e-4);
  }
}

TEST_CASE("a flat strip is traced as it is integrated") {
  TracedTrough t = trough(6 * mrad);
  t.parabola = {3.0, 1.71};
  t.kind = LineReceiver::strip;
  const TroughIntercept intercept(t.parabola, t.receiver_radius, t.error, {0.0}, t.kind);
  check_against(trace_rays(t, rays), intercept.undeformed(), 1e-3);
}

TEST_CASE("a sampled skin is traced as its first-order misses say") {
  const Quadrature rule = gauss_legendre(8, 4, -wide.width / 2, wide.width / 2);
  const std::vector<double> stations{0, 3, 6, 9};
  std::vector<SkinMotion> motion;
  std::vector<double> v, w, rotation;
  for (const double x : stations)
    for (const double y : rule.point) {
      const double turn = 0.4 * mrad * x, bent = 1e-4 * x;
      SkinMotion m = lifted(y, bent * y * y, 2 * bent * y);
      m.displacement += Vector3d(0, 2 * mm - turn * wide.height(y), turn * y);
      m.rotation.x() += turn;
      v.push_back(m.displacement.y());
      w.push_back(m.displacement.z());
      rotation.push_back(m.rotation.x());
      motion.push_back(m);
    }
  TracedTrough t = trough(6 * mrad);
  t.x_to = 9;
  t.skin = sampled_motion(stations, rule.point, motion);
  // Motion is linear along the row: interpolating reproduces it between the stations.
  const SkinMotion between = t.skin(4.5, rule.point[3]);
  CHECK(between.rotation.x() == Approx((motion[32 + 3].rotation.x() + motion[64 + 3].rotation.x()) / 2));
  CHECK(between.displacement.z() ==
        Approx((motion[32 + 3].displacement.z() + motion[64 + 3].displacement.z()) / 2));

  const TroughIntercept intercept(wide, t.receiver_radius, t.error, rule.point);
  const std::vector<double> miss =
      miss_distances(wide, {rule.point, rule.weight, v, w, rotation, {}, {}, {}});
  // Simpson's 3/8 weights along the row.
  std::vector<double> weight;
  for (const double share : {1.0, 3.0, 3.0, 1.0})
    for (const double across : rule.weight) weight.push_back(share * across);
  check_against(trace_rays(t, rays), intercept.mean(miss, weight), 5e-4);
}

TEST_CASE("the same seed gives the same trace, another seed another, and the interval holds the estimate") {
  const TracedTrough t = trough(7 * mrad);
  const TracedIntercept a = trace_rays(t, 20'000, 7), b = trace_rays(t, 20'000, 7),
                        c = trace_rays(t, 20'000, 8);
  CHECK(a.intercept == b.intercept);
  CHECK(a.intercept != c.intercept);
  CHECK(a.low < a.intercept);
  CHECK(a.intercept < a.high);
  CHECK(a.high - a.low == Approx(2 * 1.96 * a.standard_error).epsilon(0.01));
  // All rays hit: the interval still admits a loss of about 4 in n.
  const TracedIntercept all = trace_rays(trough(0), 1000);
  CHECK(all.intercept == 1);
  CHECK(all.low == Approx(1 - 3.84 / 1003.84).margin(1e-5));
}

TEST_CASE("a trace without rays and a skin without samples are refused") {
  CHECK_THROWS_AS(trace_rays(trough(5 * mrad), 0), std::invalid_argument);
  CHECK_THROWS_AS(sampled_motion({0, 1}, {0}, {SkinMotion{}}), std::invalid_argument);
  CHECK_THROWS_AS(sampled_motion({1, 1}, {0}, {SkinMotion{}, SkinMotion{}}), std::invalid_argument);
}
