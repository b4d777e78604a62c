#include "loads/net_pressure.h"

#include <catch2/catch.hpp>
#include <cmath>
#include <numbers>

#include "fem/units.h"

using namespace focalframe;
using namespace focalframe::loads;

namespace {

const Aperture apertures[] = {{.width = 5.77, .focal_length = 1.71},
                              {.width = 2.4, .focal_length = 0.8},
                              {.width = 1.0, .focal_length = 0.2},
                              {.width = 3.0, .focal_length = 1.2, .dish = true},
                              {.width = 8.0, .focal_length = 2.4, .dish = true}};
const Coefficients loads_to_meet[] = {
    {1.7, 0, 0}, {1.2, 0.3, -0.1}, {-0.4, 0.45, 0.3}, {0, 0.1, 0.08}, {0, 0, 0}};

// A curve as many straight pieces, fine enough for the check.
template <class Pattern>
std::vector<PressureStation> sampled(const Pattern& pattern, int pieces = 2000) {
  std::vector<PressureStation> all;
  for (int i = 0; i <= pieces; ++i) {
    const double s = -0.5 + double(i) / pieces;
    all.push_back({s, net_pressure(pattern, s)});
  }
  return all;
}

// Forces on the real surface by brute force: midpoint rule over (s, t), pressure along the true normal.
// Written from the geometry alone, without the formulas under test.
template <class Pressure>
Coefficients brute_force(const Aperture& a, const Pressure& pressure) {
  Coefficients sum;
  const int n = a.dish ? 800 : 20000, m = a.dish ? 800 : 1;
  const double w = a.width, area = a.dish ? std::numbers::pi * w * w / 4 : w;
  for (int i = 0; i < n; ++i)
    for (int j = 0; j < m; ++j) {
      const double s = w * (-0.5 + (i + 0.5) / n), t = a.dish ? w * (-0.5 + (j + 0.5) / m) : 0;
      if (a.dish && s * s + t * t > w * w / 4) continue;
      const double cell = (w / n) * (a.dish ? w / m : 1);
      const double z = (s * s + t * t) / (4 * a.focal_length), slope = s / (2 * a.focal_length);
      const double along_s = pressure(s / w) * slope * cell, along_axis = -pressure(s / w) * cell;
      sum.Ca -= along_axis / area;
      sum.Cs += along_s / area;
      // Towards larger pitch: the optical axis turns towards +s.
      sum.Cm += (z * along_s - s * along_axis) / (area * w);
    }
  return sum;
}

}  // namespace

TEST_CASE("the linear unit is what the pressure does on the real surface", "[loads][net]") {
  for (const Aperture& a : apertures) {
    const Coefficients exact = linear_unit(a), brute = brute_force(a, [](double s) { return 2 * s; });
    CHECK(brute.Ca == Approx(0).margin(1e-9));
    CHECK(brute.Cs == Approx(exact.Cs).epsilon(2e-3));
    CHECK(brute.Cm == Approx(exact.Cm).epsilon(2e-3));
  }
}

TEST_CASE("the linear pattern meets axial force, vertex moment and, with its residual, the side force",
          "[loads][net]") {
  for (const Aperture& a : apertures)
    for (const Coefficients& c : loads_to_meet) {
      const LinearPattern p = linear_pattern(c, a);
      const Coefficients got = integrate({{-0.5, p.edge_upwind}, {0.5, p.edge_downwind}}, a);
      CHECK(got.Ca == Approx(c.Ca).margin(1e-9));
      CHECK(got.Cm == Approx(c.Cm).margin(1e-9));
      CHECK(got.Cs + p.residual_side == Approx(c.Cs).margin(1e-9));
      CHECK(p.looks_like_thin_shell == (std::abs(p.residual_side) <= 0.15));
    }
}

TEST_CASE("the edge pattern meets axial force, vertex moment and, with its residual, the side force",
          "[loads][net]") {
  for (const Aperture& a : apertures)
    for (const Coefficients& c : loads_to_meet)
      for (const double rim : {-0.5, 0.5}) {
        const EdgePattern p = edge_pattern(c, a, rim);
        const Coefficients got = integrate(sampled(p), a);
        CHECK(got.Ca == Approx(c.Ca).margin(2e-6));
        CHECK(got.Cm == Approx(c.Cm).margin(2e-6));
        CHECK(got.Cs + p.residual_side == Approx(c.Cs).margin(2e-6));
      }
}

TEST_CASE("the edge pattern's moment comes from its upwind rim", "[loads][net]") {
  const EdgePattern p = edge_pattern({1, 0, -0.1}, apertures[0]);
  CHECK(p.peak > 0);
  CHECK(net_pressure(p, -0.5) == Approx(p.uniform + p.peak));
  CHECK(net_pressure(p, -0.3) == Approx(p.uniform + p.peak / std::exp(1)));
}

TEST_CASE("patterns of mirrored poses are mirror images", "[loads][net]") {
  for (const Aperture& a : apertures) {
    const Coefficients c{0.8, 0.3, 0.12}, mirrored{c.Ca, -c.Cs, -c.Cm};
    const LinearPattern l = linear_pattern(c, a), lm = linear_pattern(mirrored, a);
    const EdgePattern e = edge_pattern(c, a, -0.5), em = edge_pattern(mirrored, a, 0.5);
    for (double s = -0.5; s <= 0.5; s += 0.125) {
      CHECK(net_pressure(lm, s) == Approx(net_pressure(l, -s)));
      CHECK(net_pressure(em, s) == Approx(net_pressure(e, -s)));
    }
    CHECK(lm.residual_side == Approx(-l.residual_side));
    CHECK(em.residual_side == Approx(-e.residual_side));
  }
}

TEST_CASE("on a flat plate the linear pattern has its rims at Cn -+ 6 Cm and no side force", "[loads][net]") {
  const LinearPattern p = linear_pattern({1, 0, 0.1}, {.width = 1, .focal_length = 1e9});
  CHECK(p.edge_downwind == Approx(1.6));
  CHECK(p.edge_upwind == Approx(0.4));
  CHECK(p.residual_side == Approx(0).margin(1e-9));
}

TEST_CASE("a triangular pressure on a flat plate acts at a third of its width", "[loads][net]") {
  // Edge-on model: k at the leading rim, 0 at the trailing one: force k / 2, moment k / 12.
  const Coefficients c = integrate({{-0.5, 1}, {0.5, 0}}, {.width = 1, .focal_length = 1e9});
  CHECK(c.Ca == Approx(0.5));
  CHECK(c.Cm == Approx(-1.0 / 12));
}

TEST_CASE("a half aperture carries half the force and steps exactly at the vertex", "[loads][net]") {
  for (const Aperture& a : apertures) {
    const Coefficients minus = integrate(half_pattern({1.6, 0, 0}, Half::minus_s), a);
    const Coefficients plus = integrate(half_pattern({1.6, 0, 0}, Half::plus_s), a);
    CHECK(minus.Ca == Approx(0.8));
    CHECK(plus.Ca == Approx(0.8));
    CHECK(plus.Cm > 0);
    CHECK(minus.Cm == Approx(-plus.Cm));
    CHECK(minus.Cs == Approx(-plus.Cs));
  }
}

TEST_CASE("outermost stations short of the rims are held to the rims", "[loads][net]") {
  const Aperture a = apertures[0];
  const Coefficients c = integrate({{-0.4, 1.3}, {0.4, 1.3}}, a);
  CHECK(c.Ca == Approx(1.3));
  CHECK(c.Cm == Approx(0).margin(1e-12));
  CHECK(net_pressure(std::vector<PressureStation>{{-0.4, 1}, {0.4, 3}}, -0.5) == 1);
  CHECK(net_pressure(std::vector<PressureStation>{{-0.4, 1}, {0.4, 3}}, 0) == Approx(2));
}

TEST_CASE("a table's profile meets the coefficients asked for and says when little of its shape is left",
          "[loads][net]") {
  CoefficientTable t;
  t.collector_kind = "trough";
  t.stations = {-0.48, -0.2, 0, 0.3, 0.48};
  t.rows = {{0, {}, {}}, {180 * deg, {}, {}}};
  t.profiles = {
      {0, {1, 1.3, 1.4, 1.2, 0.8}}, {90 * deg, {-1, 0.2, 1.1, 0.3, -0.6}}, {180 * deg, {-1, -1, -1, -1, -1}}};
  for (const Aperture& a : apertures)
    for (const Coefficients& c : loads_to_meet)
      for (const double pitch : {-120 * deg, 0.0, 40 * deg, 90 * deg}) {
        const ProfilePattern p = profile_pattern(t, pitch, c, a);
        const Coefficients got = integrate(p.distribution, a);
        CHECK(got.Ca == Approx(c.Ca).margin(1e-9));
        CHECK(got.Cm == Approx(c.Cm).margin(1e-9));
        CHECK(got.Cs + p.residual_side == Approx(c.Cs).margin(1e-9));
      }
  const Aperture a = apertures[0];
  const Coefficients own = integrate({{-0.48, 1}, {-0.2, 1.3}, {0, 1.4}, {0.3, 1.2}, {0.48, 0.8}}, a);
  const ProfilePattern same = profile_pattern(t, 0, own, a);
  CHECK(same.factor == Approx(1));
  CHECK(same.slope == Approx(0).margin(1e-9));
  CHECK(same.own_shape);
  CHECK_FALSE(profile_pattern(t, 0, {-1.5, 0, 0}, a).own_shape);
  CHECK(profile_pattern(CoefficientTable{}, 0, own, a).distribution.empty());
}

TEST_CASE("an aperture without size is refused", "[loads][net]") {
  CHECK_THROWS_AS(linear_pattern({1, 0, 0}, {.width = 0, .focal_length = 1}), std::invalid_argument);
  CHECK_THROWS_AS(integrate({{0, 1}}, {.width = 1, .focal_length = 0}), std::invalid_argument);
}
