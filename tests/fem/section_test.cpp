#include "fem/section.h"

#include "fem/section_profiles.h"
#include "fem/units.h"
#include "tests/fem/frames.h"

using namespace focalframe::test;
using namespace focalframe;
using Catch::Matchers::Contains;

TEST_CASE("a tube without a hole is a bar") {
  const Section tube = round_tube({.outside_diameter = 50 * mm, .wall = 25 * mm});
  const Section bar = round_bar({.diameter = 50 * mm});
  CHECK(tube.A == near(bar.A, 1e-14));
  CHECK(tube.J == near(bar.J, 1e-14));
  CHECK(tube.shear_area_y == near(bar.shear_area_y, 1e-14));
  CHECK(tube.peak_shear_y == near(bar.A * 0.75, 1e-14));  // 4 V / 3 A
}

TEST_CASE("a very thin tube has twice the mean shear stress at its axis") {
  const Section s = round_tube({.outside_diameter = 1, .wall = 1e-6});
  CHECK(s.A / s.peak_shear_z == near(2, 1e-5));
}

TEST_CASE("swapping depth and width swaps the axes") {
  const Section a = rectangular_tube({.depth_z = 0.15, .width_y = 0.1, .wall = 6 * mm});
  const Section b = rectangular_tube({.depth_z = 0.1, .width_y = 0.15, .wall = 6 * mm});
  CHECK(a.Iy == near(b.Iz, 1e-14));
  CHECK(a.Wy == near(b.Wz, 1e-14));
  CHECK(a.shear_area_z == near(b.shear_area_y, 1e-14));
  CHECK(a.peak_shear_z == near(b.peak_shear_y, 1e-14));
  CHECK(a.J == near(b.J, 1e-14));
  const Section c = flat({.depth_z = 0.1, .thickness_y = 0.01}),
                d = flat({.depth_z = 0.01, .thickness_y = 0.1});
  CHECK(c.Iy == near(d.Iz, 1e-14));
  CHECK(c.Wt == near(d.Wt, 1e-14));
}

TEST_CASE("a sharp box is the difference of two rectangles") {
  const Section s = rectangular_tube(
      {.depth_z = 0.2, .width_y = 0.1, .wall = 6 * mm, .outer_radius = 0, .inner_radius = 0});
  CHECK(s.A == near(0.2 * 0.1 - 0.188 * 0.088, 1e-12));
  CHECK(s.Iy == near((0.1 * std::pow(0.2, 3) - 0.088 * std::pow(0.188, 3)) / 12, 1e-12));
  CHECK(s.Iz == near((0.2 * std::pow(0.1, 3) - 0.188 * std::pow(0.088, 3)) / 12, 1e-12));
  // V S / (I 2t) at the axis, S of the upper half.
  const double S = 0.1 * 0.1 * 0.05 - 0.088 * 0.094 * 0.047;
  CHECK(s.peak_shear_z == near(s.Iy * 2 * 6 * mm / S, 1e-12));
}

TEST_CASE("sizes twice as large scale every property by its dimension") {
  const double k = 2;
  const auto check = [&](const Section& a, const Section& b) {
    CHECK(b.A == near(k * k * a.A, 1e-12));
    CHECK(b.Iy == near(std::pow(k, 4) * a.Iy, 1e-12));
    CHECK(b.Iz == near(std::pow(k, 4) * a.Iz, 1e-12));
    CHECK(b.J == near(std::pow(k, 4) * a.J, 1e-12));
    CHECK(b.Wy == near(std::pow(k, 3) * a.Wy, 1e-12));
    CHECK(b.Wz == near(std::pow(k, 3) * a.Wz, 1e-12));
    CHECK(b.Wt == near(std::pow(k, 3) * a.Wt, 1e-12));
    CHECK(b.shear_area_y == near(k * k * a.shear_area_y, 1e-12));
    CHECK(b.perimeter == near(k * a.perimeter, 1e-12));
  };
  check(round_tube({.outside_diameter = 0.1, .wall = 0.004}),
        round_tube({.outside_diameter = 0.2, .wall = 0.008}));
  check(flat({.depth_z = 0.1, .thickness_y = 0.004}), flat({.depth_z = 0.2, .thickness_y = 0.008}));
  check(angle({0.1, 0.08, 0.01, 0.012, 0.006}).section, angle({0.2, 0.16, 0.02, 0.024, 0.012}).section);
  check(channel({0.2, 0.08, 0.006, 0.01}).section, channel({0.4, 0.16, 0.012, 0.02}).section);
}

TEST_CASE("sizes that cannot be are refused with the inequality and its values") {
  CHECK_THROWS_WITH(round_tube({.outside_diameter = 60 * mm, .wall = 31 * mm}),
                    Contains("31 mm must be <= half of 60 mm"));
  CHECK_THROWS_WITH(round_tube({.outside_diameter = -1, .wall = 1 * mm}), Contains("-1 m must be > 0"));
  CHECK_THROWS_WITH(round_bar({.diameter = std::nan("")}), Contains("must be > 0"));
  CHECK_THROWS_WITH(rectangular_tube({.depth_z = 0.1, .width_y = 0.05, .wall = 25 * mm}),
                    Contains("25 mm must be < half"));
  CHECK_THROWS_WITH(rectangular_tube({.depth_z = 0.1,
                                      .width_y = 0.05,
                                      .wall = 4 * mm,
                                      .outer_radius = 30 * mm,
                                      .inner_radius = 20 * mm}),
                    Contains("outer corner radius 30 mm"));
  CHECK_THROWS_WITH(
      rectangular_tube(
          {.depth_z = 0.1, .width_y = 0.1, .wall = 4 * mm, .outer_radius = 20 * mm, .inner_radius = 0}),
      Contains("no metal"));
  CHECK_THROWS_WITH(flat({.depth_z = 0, .thickness_y = 0.01}), Contains("0 m must be > 0"));
  CHECK_THROWS_WITH(angle({.leg_z = 0.05, .leg_y = 0.05, .thickness = 0.06}),
                    Contains("60 mm must be < the shorter leg"));
  CHECK_THROWS_WITH(channel({.depth_z = 0.02, .flange_y = 0.05, .web = 0.005, .flange = 0.01}),
                    Contains("10 mm must be < half"));
}

TEST_CASE("only open and very flat sections are marked weak in torsion") {
  CHECK(round_tube({.outside_diameter = 0.1, .wall = 0.004}).closed);
  CHECK(flat({.depth_z = 0.05, .thickness_y = 0.02}).closed);
  CHECK_FALSE(flat({.depth_z = 0.1, .thickness_y = 0.01}).closed);
  CHECK_FALSE(angle({.leg_z = 0.05, .leg_y = 0.05, .thickness = 0.005}).section.closed);
  CHECK_FALSE(channel({0.2, 0.08, 0.006, 0.01}).section.closed);
}

TEST_CASE("the stress bound is exact where one kind of force acts alone") {
  const Section s = rectangular_tube({.depth_z = 0.15, .width_y = 0.1, .wall = 6 * mm});
  const double root = std::sqrt(3.0);
  CHECK(von_mises_bound(s, {.N = -1000}) == near(1000 / s.A, 1e-14));
  CHECK(von_mises_bound(s, {.My = -50}) == near(50 / s.Wy, 1e-14));
  CHECK(von_mises_bound(s, {.My = 50, .Mz = 30}) == near(50 / s.Wy + 30 / s.Wz, 1e-14));
  CHECK(von_mises_bound(s, {.T = 70}) == near(root * 70 / s.Wt, 1e-14));
  CHECK(von_mises_bound(s, {.Vz = 900}) == near(root * 900 / s.peak_shear_z, 1e-14));
  CHECK(von_mises_bound(s, {.N = 1000, .T = 70}) == near(std::hypot(1000 / s.A, root * 70 / s.Wt), 1e-14));
  CHECK(von_mises_bound(s, {}) == 0);
}

// Every point of a solid rectangle by elementary theory; the bound may lie above, never below.
TEST_CASE("no point of a solid rectangle is stressed above the bound") {
  const double h = 0.08, b = 0.05;
  const Section s = flat({.depth_z = h, .thickness_y = b});
  const Resultants r{.N = 2e4, .Vy = 5e3, .Vz = -8e3, .My = 900, .Mz = -400};
  double worst = 0;
  for (int i = -20; i <= 20; ++i)
    for (int j = -20; j <= 20; ++j) {
      const double y = b / 2 * i / 20, z = h / 2 * j / 20;
      const double normal = r.N / s.A + r.My * z / s.Iy - r.Mz * y / s.Iz;
      const double ty = 1.5 * r.Vy / s.A * (1 - std::pow(2 * y / b, 2)),
                   tz = 1.5 * r.Vz / s.A * (1 - std::pow(2 * z / h, 2));
      worst = std::max(worst, std::sqrt(normal * normal + 3 * (ty * ty + tz * tz)));
    }
  CHECK(von_mises_bound(s, r) >= worst);
  CHECK(von_mises_bound(s, r) < 1.3 * worst);
}

TEST_CASE("a missing modulus gives no stress rather than a wrong one") {
  Section raw;
  raw.A = 1e-3;
  CHECK(von_mises_bound(raw, {.N = 100}) == near(1e5, 1e-12));
  CHECK(std::isnan(von_mises_bound(raw, {.My = 1})));
  CHECK(std::isnan(von_mises_bound(raw, {.T = 1})));
  CHECK(von_mises_bound(raw, {.Vy = 100}) == near(std::sqrt(3.0) * 100 / 4e-4, 1e-12));
}

TEST_CASE("an angle's leg axes and principal axes hold the same invariants") {
  const AngleSection s =
      angle({.leg_z = 0.08, .leg_y = 0.06, .thickness = 0.008, .root_radius = 0.008, .toe_radius = 0.004});
  CHECK(s.section.Iy + s.section.Iz == near(s.Iy_leg + s.Iz_leg, 1e-12));
  CHECK(s.section.Iy > s.Iy_leg);
  CHECK(s.section.Iz < s.Iz_leg);
  const double c = std::cos(s.tilt), n = std::sin(s.tilt);  // back from principal to leg axes
  CHECK(s.section.Iy * c * c + s.section.Iz * n * n == near(s.Iy_leg, 1e-12));
}

// UPN-like size with sharp corners, by hand: A = 2 * 80 * 10 + 180 * 6 mm2.
TEST_CASE("a channel's hand values") {
  const ChannelSection c = channel({.depth_z = 0.2, .flange_y = 0.08, .web = 0.006, .flange = 0.01});
  CHECK(c.section.A == near(2680e-6, 1e-12));
  const double Iy = (80 * std::pow(200, 3) - 74 * std::pow(180, 3)) / 12;
  CHECK(c.section.Iy == near(Iy * 1e-12, 1e-12));
  const double S = 2 * 800 * 40 + 1080 * 3, yc = S / 2680;
  CHECK(c.centroid_y == near(yc * 1e-3, 1e-12));
  CHECK(c.shear_centre_y < -c.centroid_y);  // behind the web
}
