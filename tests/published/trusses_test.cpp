/// Trusses: bars with both ends released in bending.

#include "fem/statics.h"
#include "tests/fem/frames.h"

using namespace focalframe::test;

namespace {

/// A bar that carries axial force only.
void bar(Builder& b, int from, int to, int section) {
  const Vec3 along =
      b.frame.nodes[static_cast<std::size_t>(to)].at - b.frame.nodes[static_cast<std::size_t>(from)].at;
  b.member(from, to, section, 0, std::abs(along.normalized().z()) > 0.9 ? Vec3::UnitX() : Vec3::UnitZ());
  b.last().release_from = fix("YZ");
  b.last().release_to = fix("XYZ");
}

/// Nothing turns at the nodes of a truss.
void hold_rotations(Builder& b) {
  for (int n = 0; n < static_cast<int>(b.frame.nodes.size()); ++n) b.support(n, fix("XYZ"));
}

}  // namespace

// Logan, A First Course in the Finite Element Method, example 3.8; Ferreira's book uses the same data and
// prints -948.19, 1445.37, -2868.54 psi (from memory).
TEST_CASE("F01: space truss of three bars") {
  Builder b;
  b.material(1.2e6, 0.5e6);
  for (const double area : {0.302, 0.729, 0.187}) b.section(area, 1, 1, 1);
  b.node(72, 0, 0), b.node(0, 36, 0), b.node(0, 36, 72), b.node(0, 0, -48);
  for (int k = 1; k < 4; ++k) {
    bar(b, 0, k, k - 1);
    b.support(k, fix("xyz"));
  }
  b.support(0, fix("y"));
  hold_rotations(b);
  const Response r = StaticSolver(b.frame).solve(node_force(0, {0, 0, -1000}));
  CHECK(r.displacement(0, ux) == near(-0.0711140));
  CHECK(r.displacement(0, uz) == near(-0.266239));
  CHECK(r.reaction(0, uy) == near(-223.163));
  const std::vector<double> published{-948.19, 1445.37, -2868.54};
  for (int k = 0; k < 3; ++k)
    CHECK(r.end_force(k, 6) / b.frame.sections[static_cast<std::size_t>(k)].A ==
          near(published[static_cast<std::size_t>(k)], 5e-6));
}

// Felippa, Introduction to Finite Element Methods, three-bar example (from memory): exact values.
TEST_CASE("F05: plane truss of three bars") {
  Builder b;
  b.material(1, 1);
  for (const double area : {100.0, 50.0, 200 * std::sqrt(2.0)}) b.section(area, 1, 1, 1);
  b.node(0, 0, 0), b.node(10, 0, 0), b.node(10, 10, 0);
  bar(b, 0, 1, 0), bar(b, 1, 2, 1), bar(b, 0, 2, 2);
  b.support(0, fix("xyz")), b.support(1, fix("yz")), b.support(2, fix("z"));
  hold_rotations(b);
  const Response r = StaticSolver(b.frame).solve(node_force(2, {2, 1, 0}));
  CHECK(std::abs(r.displacement(1, ux)) < 1e-14);
  CHECK(r.displacement(2, ux) == near(0.4, 1e-12));
  CHECK(r.displacement(2, uy) == near(-0.2, 1e-12));
  CHECK(r.reaction(0, ux) == near(-2, 1e-12));
  CHECK(r.reaction(0, uy) == near(-2, 1e-12));
  CHECK(r.reaction(1, uy) == near(1, 1e-12));
  CHECK(r.end_force(1, 6) == near(-1, 1e-12));
  CHECK(r.end_force(2, 6) == near(2.828427, 1e-6));
}

// Gramoll, eCourses Statics, case study of section 6.3: 2400 kN on 8 joints, two bars a joint, 162.7 kN each.
TEST_CASE("F09: bars between two rings") {
  Builder b;
  b.material(210e9, 81e9);
  b.section(1e-3, 1e-8, 1e-8, 1e-8);
  const double c = std::cos(22.5 * std::numbers::pi / 180), s = std::sin(22.5 * std::numbers::pi / 180);
  const int low = b.node(0, -1, 0), right = b.node(0.75 * s, -0.75 * c, 1),
            left = b.node(-0.75 * s, -0.75 * c, 1);
  bar(b, low, right, 0), bar(b, low, left, 0);
  for (const int n : {right, left}) b.support(n, fix("xyz"));
  b.support(low, fix("y"));  // the ring's own thrust
  hold_rotations(b);
  const Response r = StaticSolver(b.frame).solve(node_force(low, {0, 0, 300}));
  CHECK(r.end_force(0, 6) == near(-162.7, 1e-3));
  CHECK(r.end_force(0, 6) == near(-162.71, 5e-5));
}

TEST_CASE("F14: tripod, apex 3 m above a circle of 2 m, E A = 6.3e7 N") {
  Builder b;
  b.material(6.3e7, 1);
  b.section(1, 1, 1, 1);
  const int apex = b.node(0, 0, 3);
  for (int k = 0; k < 3; ++k) {
    const double t = 2 * std::numbers::pi * k / 3;
    const int foot = b.node(2 * std::cos(t), 2 * std::sin(t), 0);
    bar(b, apex, foot, 0);
    b.support(foot, fix("xyz"));
  }
  hold_rotations(b);
  const StaticSolver solver(b.frame);
  const Response down = solver.solve(node_force(apex, {0, 0, -10e3}));
  CHECK(down.end_force(0, 6) == near(-4006.17));
  CHECK(down.displacement(apex, uz) == near(-2.75557e-4));
  CHECK(solver.solve(node_force(apex, {2000, 0, 0})).displacement(apex, ux) == near(2.48001e-4));
  CHECK(solver.solve(node_force(apex, {0, 2000, 0})).displacement(apex, uy) == near(2.48001e-4));
}

TEST_CASE("F15: bracket of a horizontal bar of 1 m and one at 45 degrees") {
  Builder b;
  b.material(1.05e8, 1);
  b.section(1, 1, 1, 1);
  const int tip = b.node(1, 0, 0), top = b.node(0, 0, 0), foot = b.node(0, -1, 0);
  bar(b, tip, top, 0), bar(b, tip, foot, 0);
  for (const int n : {top, foot}) b.support(n, fix("xyz"));
  b.support(tip, fix("z"));
  hold_rotations(b);
  CHECK(StaticSolver(b.frame).solve(node_force(tip, {0, -10e3, 0})).displacement(tip, uy) ==
        near(-3.64612e-4));
}
