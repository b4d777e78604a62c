/// Plane frames and grids: a textbook example and closed forms (Kleinlogel, Rahmenformeln; from memory).

#include "fem/beam.h"
#include "fem/statics.h"
#include "tests/fem/frames.h"

using namespace focalframe::test;

// Hibbeler, Structural Analysis, example 16.1 (SI teaching slides of the 6th edition).
TEST_CASE("F06: column and beam with a roller") {
  Builder b;
  b.material(200e9, 77e9);
  b.section(6000e-6, 180e-6, 180e-6, 1e-4);
  const int corner = b.node(6, 6, 0), roller = b.node(0, 6, 0), base = b.node(6, 0, 0);
  b.member(base, corner), b.member(corner, roller);
  for (const int n : {corner, roller}) b.support(n, fix("zXY"));
  b.support(base, all_fixed);
  b.support(roller, fix("y"));
  const Response r = StaticSolver(b.frame).solve(node_force(corner, {20e3, 0, 0}));
  CHECK(r.displacement(corner, ux) == near(17.51e-3, 3e-4));
  CHECK(r.displacement(corner, uy) == near(-37.47e-6, 3e-4));
  CHECK(r.displacement(corner, rz) == near(-2.505e-3, 3e-4));
  CHECK(r.displacement(roller, rz) == near(1.243e-3, 3e-4));
  CHECK(r.reaction(roller, uy) == near(-7.50e3, 1e-3));
  CHECK(r.reaction(base, rz) == near(75.0e3, 1e-3));
  CHECK(r.displacement(corner, ux) == near(1.751405e-2, 1e-6));
  CHECK(r.displacement(corner, uy) == near(-3.747658e-5, 1e-6));
  CHECK(r.displacement(corner, rz) == near(-2.504685e-3, 1e-6));
  CHECK(r.displacement(roller, ux) == near(1.751405e-2, 1e-6));
  CHECK(r.displacement(roller, rz) == near(1.242970e-3, 5e-6));
  CHECK(r.reaction(roller, uy) == near(-7495.315, 1e-6));
  CHECK(r.reaction(base, ux) == near(-20e3, 1e-9));
  CHECK(r.reaction(base, uy) == near(7495.315, 1e-6));
  CHECK(r.reaction(base, rz) == near(75028.11, 1e-6));
}

// Worked sheet on plane frame elements: E = 2e8 kN/m2, A = 4.533e-3, I = 6.933e-5, L = 6 m.
TEST_CASE("F08: terms of the element stiffness") {
  Builder b;
  b.material(2e8, 1e8);
  b.section(4.533e-3, 6.933e-5, 6.933e-5, 1e-4);
  b.line(Vec3::Zero(), Vec3(6, 0, 0), 1);
  const Mat12 K = stiffness(b.frame, 0);
  CHECK(K(1, 1) == near(770.333, 1e-6));
  CHECK(K(1, 5) == near(2311, 1e-6));
  CHECK(K(5, 5) == near(9244, 1e-6));
  CHECK(K(5, 11) == near(4622, 1e-6));
  CHECK(K(0, 0) == near(151100, 1e-6));
  CHECK(K(2, 4) == near(-2311, 1e-6));
}

namespace {

struct Portal {
  Response response;
  int foot = 0, top = 0;
};

/// h = l = 4 m, column I = 8e-6 m4, beam gamma times that, 5 kN along the beam; no axial flexibility.
Portal portal(double gamma, const std::string& foot) {
  Builder b;
  b.material(210e9, 81e9);
  b.section(1e4, 1, 8e-6, 1);
  b.section(1e4, 1, gamma * 8e-6, 1);
  b.node(0, 0, 0), b.node(0, 4, 0), b.node(4, 4, 0), b.node(4, 0, 0);
  b.member(0, 1), b.member(1, 2, 1), b.member(2, 3);
  for (const int n : {0, 3}) b.support(n, fix("xyzXY" + foot));
  for (const int n : {1, 2}) b.support(n, fix("zXY"));
  LoadCase load;
  for (const int n : {1, 2}) load.nodes.push_back({n, Vec3(2500, 0, 0)});
  return {StaticSolver(b.frame).solve(load), 0, 1};
}

}  // namespace

TEST_CASE("F10, F11: portals with fixed and pinned feet under a sway load") {
  struct Row {
    double gamma;
    const char* foot;
    double sway, base, top;
  };
  const auto row =
      GENERATE(Row{1, "Z", 1.13379e-2, 5714.29, 4285.71}, Row{2, "Z", 9.76801e-3, 5384.62, 4615.38},
               Row{1, "", 4.76190e-2, 0, 10000}, Row{2, "", 3.96825e-2, 0, 10000});
  const Portal p = portal(row.gamma, row.foot);
  CHECK(p.response.displacement(p.top, ux) == near(row.sway, 1e-5));
  CHECK(std::abs(p.response.end_force(0, 11)) == near(row.top, 1e-5));
  if (row.base > 0) CHECK(std::abs(p.response.reaction(p.foot, rz)) == near(row.base, 1e-5));
}

TEST_CASE("F12: grid of two members at right angles, loaded at the corner") {
  Builder b;
  b.material(210e9, 84e9);
  b.section(0.02, 16.6e-5, 1e-4, 4.6e-5);
  const int corner = b.node(0, 0, 0), a = b.node(3, 0, 0), c = b.node(0, 3, 0);
  b.member(a, corner), b.member(c, corner);
  for (const int n : {a, c}) b.support(n, all_fixed);
  const Response r = StaticSolver(b.frame).solve(node_force(corner, {0, 0, -22e3}));
  CHECK(r.displacement(corner, uz) == near(-2.62740e-3));
  CHECK(std::abs(r.displacement(corner, ry)) == near(1.27828e-3));
  CHECK(r.reaction(a, uz) == near(11000));
  CHECK(std::abs(r.reaction(a, ry)) == near(31353.58));
  CHECK(std::abs(r.reaction(a, rx)) == near(1646.421));
}

TEST_CASE("F13: a tube with an arm across its end: bending, bending and twist add up") {
  Builder b;
  b.material(210e9, 81e9);
  b.section(5.3055e-3, 2.9596e-5, 2.9596e-5, 5.9193e-5);
  b.node(0, 0, 0), b.node(2, 0, 0), b.node(2, 0.8, 0);
  b.member(0, 1), b.member(1, 2);
  b.support(0, all_fixed);
  const Response r = StaticSolver(b.frame).solve(node_force(2, {0, 0, 500}));
  CHECK(r.displacement(2, uz) == near(3.61742e-4));
  CHECK(r.displacement(1, uz) == near(2.14529e-4));
  CHECK(r.displacement(1, rx) * 0.8 == near(1.33483e-4));
}
