/// Torsion of bars and tubes: Bredt and St-Venant (any strength-of-materials text), Roark's and Timoshenko's
/// coefficients for rectangles (recomputed by two-dimensional finite elements), and torque-tube arithmetic.

#include <numbers>

#include "fem/diagram.h"
#include "fem/statics.h"
#include "fem/units.h"
#include "tests/fem/frames.h"

using namespace focalframe::test;
using namespace focalframe;

namespace {

/// Cantilever shaft along x with `pieces` equal members.
Builder shaft(const Section& section, double length, double G, int pieces = 1) {
  Builder b;
  b.material(210e9, G);
  b.frame.sections.push_back(section);
  b.line(Vec3::Zero(), Vec3(length, 0, 0), pieces);
  b.support(0, all_fixed);
  return b;
}

}  // namespace

TEST_CASE("B19: a tube 219.1 x 8 under 15 kN m over 6 m") {
  const Section s = round_tube({.outside_diameter = 219.1 * mm, .wall = 8 * mm});
  CHECK(s.J == near(5.91927e-5));
  const auto turn = [&](double G) {
    return StaticSolver(shaft(s, 6, G).frame)
        .solve(node_force(1, Vec3::Zero(), {15e3, 0, 0}))
        .displacement(1, rx);
  };
  CHECK(turn(81 * GPa) == near(0.0187711));
  CHECK(turn(210 * GPa / 2.6) == near(0.0188247));
  CHECK(15e3 / s.Wt == near(27.7610 * MPa));
  CHECK(von_mises_bound(s, {.T = 15e3}) == near(std::sqrt(3.0) * 27.7610 * MPa));
}

TEST_CASE("B20: a sharp-cornered box 200 x 100 x 6 by Bredt") {
  const Section s = rectangular_tube(
      {.depth_z = 0.2, .width_y = 0.1, .wall = 6 * mm, .outer_radius = 0, .inner_radius = 0});
  // EN 10219-2 Annex B adds t^3 h / 3 to Bredt's 4 Am^2 t / s.
  const double around = 2 * (0.2 + 0.1 - 0.012);
  CHECK(s.J - std::pow(6 * mm, 3) * around / 3 == near(1.38563e-5));
  CHECK(s.J == near(1.38563e-5, 4e-3));
  const double turn = StaticSolver(shaft(s, 4, 81 * GPa).frame)
                          .solve(node_force(1, Vec3::Zero(), {8e3, 0, 0}))
                          .displacement(1, rx);
  CHECK(turn == near(0.0285113, 4e-3));
}

// A tube slit along its length is a strip rolled up. Thin: J = 2 pi r t^3 / 3, closed over open 3 (r / t)^2.
// 150 x 5 mm by a two-dimensional finite-element solution of St-Venant's problem (cubic elements, general
// library, computed for this test): 18852.3 mm4 where the thin formula says 18980.5.
TEST_CASE("B21: a slit tube twists as the strip it is rolled from") {
  const double r = 72.5 * mm, t = 5 * mm;
  const Section strip = flat({.depth_z = 2 * std::numbers::pi * r, .thickness_y = t});
  CHECK(strip.J == near(18852.3e-12, 1e-3));
  CHECK(strip.J == near(2 * std::numbers::pi * r * t * t * t / 3, 7.5e-3));
  CHECK_FALSE(strip.closed);
  const double mean = 105.55 * mm, wall = 8 * mm;
  const Section slit = flat({.depth_z = 2 * std::numbers::pi * mean, .thickness_y = wall}),
                closed = round_tube({.outside_diameter = 219.1 * mm, .wall = wall});
  CHECK(slit.J == near(1.13184e-7, 8e-3));  // the slit's two ends lower it by 0.63 t / (2 pi r)
  CHECK(closed.J / slit.J == near(522.975, 8e-3));
}

// J = beta a b^3 with b the shorter side. Published to three digits (Roark; a torsion table), recomputed to
// six.
TEST_CASE("B22: St-Venant's torsion constant of rectangles") {
  struct Row {
    double ratio, published, recomputed;
  };
  const auto row = GENERATE(Row{1, 0.141, 0.140577}, Row{1.5, 0.196, 0.195761}, Row{2, 0.229, 0.228682},
                            Row{3, 0.263, 0.263317}, Row{4, 0.281, 0.280813}, Row{6, 0.298, 0.298320},
                            Row{10, 0.312, 0.312325});
  const double b = 0.01;
  const Section upright = flat({.depth_z = row.ratio * b, .thickness_y = b});
  const Section lying = flat({.depth_z = b, .thickness_y = row.ratio * b});
  const double beta = upright.J / (row.ratio * std::pow(b, 4));
  CHECK(beta == near(row.published, 3e-3));
  CHECK(beta == near(row.recomputed, 2e-5));
  CHECK(lying.J == near(upright.J, 1e-14));
}

// Greatest stress T / (alpha a b^2): alpha = 0.208, 0.231, 0.246, 0.267, 0.282, 0.299, 0.312 (Timoshenko and
// Goodier; from memory).
TEST_CASE("the torsion modulus of rectangles") {
  struct Row {
    double ratio, alpha;
  };
  const auto row = GENERATE(Row{1, 0.208}, Row{1.5, 0.231}, Row{2, 0.246}, Row{3, 0.267}, Row{4, 0.282},
                            Row{6, 0.299}, Row{10, 0.312});
  const Section s = flat({.depth_z = row.ratio * 0.01, .thickness_y = 0.01});
  CHECK(s.Wt / (row.ratio * 1e-6) == near(row.alpha, 3e-3));
}

// Problem 311 of a strength-of-materials collection: steel shaft 50 mm, G = 28 GPa, steps of 2, 3 and 2 m
// that carry 800, -300 and 600 N m: 0.1106 rad, 6.34 deg.
TEST_CASE("B23b: a shaft with torques along it") {
  Builder b = shaft(round_bar({.diameter = 50 * mm}), 7, 28 * GPa);
  LoadCase load;
  load.points.push_back({0, 2.0 / 7, Vec3::Zero(), Vec3(1100, 0, 0)});
  load.points.push_back({0, 5.0 / 7, Vec3::Zero(), Vec3(-900, 0, 0)});
  load.nodes.push_back({1, Vec3::Zero(), Vec3(600, 0, 0)});
  const Response r = StaticSolver(b.frame).solve(load);
  CHECK(r.displacement(1, rx) == near(0.1106, 5e-4));
  CHECK(r.displacement(1, rx) == near(0.110590));
  CHECK(resultants_at(b.frame, load, r, 0, 0.1).T == near(800));
  CHECK(resultants_at(b.frame, load, r, 0, 0.5).T == near(-300));
  CHECK(resultants_at(b.frame, load, r, 0, 0.9).T == near(600));
}

// T01, T02: 12 m fixed at the drive, GJ = 81 GPa x 5.91927e-5 m4: spread 400 N m/m against six ribs of 800 N
// m.
TEST_CASE("T01, T02: a tube twisted by ribs turns more than by the same torque spread out") {
  Section s = round_tube({.outside_diameter = 219.1 * mm, .wall = 8 * mm});
  Builder b = shaft(s, 12, 81 * GPa, 6);
  LoadCase ribs, spread;
  for (int n = 1; n <= 6; ++n) ribs.nodes.push_back({n, Vec3::Zero(), Vec3(800, 0, 0)});
  for (int m = 0; m < 6; ++m)
    for (int k = 0; k < 100; ++k) spread.points.push_back({m, (k + 0.5) / 100, Vec3::Zero(), Vec3(8, 0, 0)});
  const StaticSolver solver(b.frame);
  CHECK(solver.solve(ribs).displacement(6, rx) == near(7.00787e-3));
  CHECK(solver.solve(spread).displacement(6, rx) == near(6.00675e-3, 1e-4));
}

TEST_CASE("T04: bending 12 kN m and torsion 15 kN m together in a tube") {
  const Section s = round_tube({.outside_diameter = 219.1 * mm, .wall = 8 * mm});
  CHECK(12e3 / s.Wy == near(44.4177 * MPa));
  CHECK(von_mises_bound(s, {.T = 15e3, .My = 12e3}) == near(65.4596 * MPa));
  CHECK(von_mises_bound(s, {.T = 15e3, .My = 7.2e3, .Mz = 9.6e3}) == near(65.4596 * MPa));
}

// 41.6483 kg/m x 9.80665 m/s2 = 408.430 N/m.
TEST_CASE("T05: a tube of 12 m sags under its own weight by 17.7 mm") {
  Section s = round_tube({.outside_diameter = 219.1 * mm, .wall = 8 * mm});
  s.shear_area_y = s.shear_area_z = 0;
  Builder b;
  b.material(210e9, 81e9, 7850);
  b.frame.sections.push_back(s);
  b.line(Vec3::Zero(), Vec3(12, 0, 0), 2);
  b.support(0, fix("xyzX"));
  b.support(2, fix("yz"));
  LoadCase weight;
  weight.gravity = Vec3(0, 0, -standard_gravity);
  const Response r = StaticSolver(b.frame).solve(weight);
  CHECK(r.displacement(1, uz) == near(-17.7429 * mm));
  CHECK(r.displacement(0, ry) == near(4.73144 * mrad));
  CHECK(total_mass(b.frame).mass == near(12 * 41.6483));
}
