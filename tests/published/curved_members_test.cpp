/// Curved members by Castigliano, thin and inextensible (Roark; Timoshenko, Strength of Materials; Dahlberg,
/// Int. J. Engng Ed. 20, 2004). Modelled by straight pieces with nodes on the curve: their error falls as 1 /
/// n^2.

#include "fem/statics.h"
#include "tests/fem/frames.h"

using namespace focalframe::test;

namespace {

using std::numbers::pi;

/// Pieces along an arc of radius R about the origin in the x-y plane, from angle a to b; z is up.
Builder arc(double R, double a, double b, int pieces, double E = 200e9, double I = 4e-6) {
  Builder builder;
  builder.material(E, E / 2.6);
  builder.section(1e3, I, I, 2 * I);  // no axial flexibility
  for (int i = 0; i <= pieces; ++i) {
    const double t = a + (b - a) * i / pieces;
    builder.node(R * std::cos(t), R * std::sin(t), 0);
    if (i > 0) builder.member(i - 1, i);
  }
  return builder;
}

}  // namespace

TEST_CASE("B24, B25: a quarter circle, R = 2 m, E I = 8e5 N m2, clamped at one end") {
  const int n = 60;
  Builder b = arc(2, 0, pi / 2, n);  // clamped at (2, 0); tip at (0, 2) with its tangent along -x
  b.support(0, all_fixed);
  const StaticSolver solver(b.frame);
  const auto tip = [&](const Vec3& force) {
    return Eigen::RowVectorXd(solver.solve(node_force(n, force)).displacement.row(n));
  };
  // Radial tip load: along y, normal to the tangent.
  CHECK(tip({0, 1000, 0})(uy) == near(7.85398e-3, 4e-4));
  CHECK(std::abs(tip({0, 1000, 0})(ux)) == near(5.0e-3, 4e-4));
  CHECK(std::abs(tip({0, 1000, 0})(rz)) == near(5.0e-3, 4e-4));
  CHECK(tip({1000, 0, 0})(ux) == near(3.56194e-3, 4e-4));
  CHECK(std::abs(tip({1000, 0, 0})(uy)) == near(5.0e-3, 4e-4));
  CHECK(std::abs(tip({1000, 0, 0})(rz)) == near(2.85398e-3, 4e-4));
  CHECK(tip({0, 0, 1000})(uz) == near(1.24845e-2, 4e-4));
}

// Timoshenko's case: rod d = 2 in, R = 100 in, P = 50 lb, E = 30e6 psi, nu = 0.3: 2.648 in (from memory).
TEST_CASE("B25b: the classical quarter ring loaded out of its plane") {
  const int n = 60;
  const double I = pi / 64 * 16;
  Builder b = arc(100, 0, pi / 2, n, 30e6, I);
  b.support(0, all_fixed);
  const double w = StaticSolver(b.frame).solve(node_force(n, {0, 0, 50})).displacement(n, uz);
  CHECK(w == near(2.648, 1e-3));
  CHECK(w == near(2.6493, 4e-4));
}

// A quarter of the ring with symmetry at both ends. Shape factors 0.1488, 0.1366, 0.3183, 0.1817.
TEST_CASE("B26: a ring pulled at two opposite points") {
  const int n = 60;
  Builder b = arc(2, 0, pi / 2, n);  // loads along y at (0, +-2), half of P on this quarter
  b.support(0, fix("yzXYZ"));
  b.support(n, fix("xzXYZ"));
  const Response r = StaticSolver(b.frame).solve(node_force(n, {0, -500, 0}));
  CHECK(2 * r.displacement(n, uy) == near(-1.48778e-3, 5e-4));
  CHECK(2 * r.displacement(0, ux) == near(1.36620e-3, 5e-4));
  CHECK(std::abs(r.reaction(n, rz)) == near(636.620, 5e-4));
  CHECK(std::abs(r.reaction(0, rz)) == near(363.380, 5e-4));
}

TEST_CASE("B27: a two-hinged semicircular arch with a crown load") {
  const int n = 200;
  Builder b = arc(2, 0, pi, n);
  b.support(0, fix("xyzXY"));
  b.support(n, fix("xyz"));
  const Response r = StaticSolver(b.frame).solve(node_force(n / 2, {0, -1000, 0}));
  CHECK(std::abs(r.reaction(0, ux)) == near(318.310, 5e-4));
  CHECK(-r.displacement(n / 2, uy) == near(1.89423e-4, 5e-4));
  CHECK(-r.displacement(n / 2, uy) == near(1.89401e-4, 1e-4));  // a frame of the same 200 pieces
}

TEST_CASE("B28: a parabolic arch under load uniform in plan does not bend") {
  Builder b;
  b.material(200e9, 77e9);
  b.section(1e3, 4e-6, 4e-6, 8e-6);
  const int n = 40;
  LoadCase load;
  for (int i = 0; i <= n; ++i) {
    const double x = 10.0 * i / n, y = 4 * 2 * x * (10 - x) / 100;
    b.node(x, y, 0);
    if (i > 0) b.member(i - 1, i);
    if (i > 0 && i < n) load.nodes.push_back({i, Vec3(0, -1000 * 10.0 / n, 0)});
  }
  b.support(0, fix("xyzXY"));
  b.support(n, fix("xyz"));
  const Response r = StaticSolver(b.frame).solve(load);
  CHECK(r.reaction(0, ux) == near(6250, 1e-3));
  // Loads at nodes on a parabola hang exactly in the funicular polygon.
  for (int i = 0; i < n; ++i) CHECK(std::abs(r.end_force(i, 11)) < 0.1);
}

// Rib y = x^2 / 4 f, f = 1.5 m, clamped at the vertex, free at x = 2.5 m, E I = 1.4e5 N m2, 400 N/m normal to
// the curve away from the focus. Castigliano by quadrature; the piecewise values are those of an independent
// frame.
TEST_CASE("B29: a parabolic rib under normal pressure") {
  const auto rib = [](int n) {
    Builder b;
    b.material(70e9, 27e9);
    b.section(1.0, 2e-6, 2e-6, 4e-6);  // stretches the rib by 4e-6 of what it bends
    LoadCase load;
    for (int i = 0; i <= n; ++i) {
      const double x = 2.5 * i / n;
      b.node(x, x * x / 6, 0);
      if (i == 0) continue;
      b.member(i - 1, i);
      const Vec3 along = b.frame.nodes.back().at - b.frame.nodes[static_cast<std::size_t>(i - 1)].at;
      const Vec3 q = 400 * Vec3(along.y(), -along.x(), 0).normalized();
      load.lines.push_back({.member = i - 1, .at_from = q, .at_to = q});
    }
    b.support(0, all_fixed);
    return StaticSolver(b.frame).solve(load);
  };
  CHECK(rib(8).displacement(8, ux) == near(9.0398e-3, 5e-5));
  CHECK(rib(20).displacement(20, ux) == near(9.0689e-3, 5e-5));
  CHECK(rib(60).displacement(60, ux) == near(9.0739e-3, 5e-5));
  const Response r = rib(160);
  CHECK(r.displacement(160, ux) == near(9.07424e-3, 1e-4));
  CHECK(r.displacement(160, uy) == near(-1.79269e-2, 1e-4));
  CHECK(r.displacement(160, rz) == near(-9.85169e-3, 1e-4));
  CHECK(std::abs(r.reaction(0, rz)) == near(1467.01, 1e-4));
  CHECK(r.reaction(0, uy) == near(1000, 1e-7));
  CHECK(r.reaction(0, ux) == near(-416.667, 1e-6));
}
