/// Beam formulas of any handbook (Roark, Formulas for Stress and Strain; from memory unless named), all with
/// E = 210 GPa, I = 8e-6 m4, w = 500 N/m, P = 1000 N, M = 1200 N m. One exact member per span: tolerance is
/// that of the six printed digits.

#include "fem/beam.h"
#include "fem/diagram.h"
#include "fem/statics.h"
#include "fem/units.h"
#include "tests/fem/frames.h"

using namespace focalframe::test;
using namespace focalframe;

namespace {

constexpr double E = 210e9, I = 8e-6, P = 1000, w = 500, M = 1200;

/// Spans in a row in the x-y plane on unyielding supports; `ends` tells what the first and last hold.
struct Spans {
  Builder b;
  std::vector<int> nodes;

  explicit Spans(const std::vector<double>& lengths, const std::string& first = "y",
                 const std::string& last = "y") {
    b.material(E, E / 2.6, 0, 12e-6);
    b.section(4e-3, I, I, 2 * I);
    double x = 0;
    nodes.push_back(b.node(0, 0, 0));
    for (const double l : lengths) {
      x += l;
      nodes.push_back(b.node(x, 0, 0));
      b.member(nodes[nodes.size() - 2], nodes.back());
    }
    for (const int n : nodes) b.support(n, fix("zXY"));
    b.support(0, fix("x" + first));
    for (std::size_t i = 1; i + 1 < nodes.size(); ++i) b.support(nodes[i], fix("y"));
    if (!last.empty()) b.support(nodes.back(), fix(last));
  }
  Response solve(const LoadCase& load) const { return StaticSolver(b.frame).solve(load); }
};

LoadCase down_on(int member, double from = 0, double to = 1) {
  LoadCase load;
  load.lines.push_back(
      {.member = member, .from = from, .to = to, .at_from = Vec3(0, -w, 0), .at_to = Vec3(0, -w, 0)});
  return load;
}

LoadCase point_on(int member, double at, const Vec3& force, const Vec3& moment = Vec3::Zero()) {
  LoadCase load;
  load.points.push_back({member, at, force, moment});
  return load;
}

}  // namespace

TEST_CASE("B01-B03, B12: cantilevers of 3 m") {
  const Spans s({3}, "yZ", "");
  const auto tip = [&](const LoadCase& load) {
    return Eigen::RowVectorXd(s.solve(load).displacement.row(1));
  };
  CHECK(tip(node_force(1, {0, P, 0}))(uy) == near(5.35714e-3));
  CHECK(tip(node_force(1, {0, P, 0}))(rz) == near(2.67857e-3));
  CHECK(tip(down_on(0))(uy) == near(-3.01339e-3));
  CHECK(tip(down_on(0))(rz) == near(-1.33929e-3));
  CHECK(tip(node_force(1, Vec3::Zero(), {0, 0, M}))(uy) == near(3.21429e-3));
  CHECK(tip(node_force(1, Vec3::Zero(), {0, 0, M}))(rz) == near(2.14286e-3));
  LoadCase triangle = down_on(0);
  triangle.lines[0].at_to = Vec3::Zero();
  CHECK(tip(triangle)(uy) == near(-8.03571e-4));
  CHECK(tip(triangle)(rz) == near(-3.34821e-4));
}

TEST_CASE("B04-B06: simple spans of 4 m, deflections inside the one member") {
  const Spans s({4});
  const auto middle = [&](const LoadCase& load) {
    return deflection_at(s.b.frame, load, s.solve(load), 0, 0.5)(uy);
  };
  const LoadCase mid = point_on(0, 0.5, {0, -P, 0});
  CHECK(middle(mid) == near(-7.93651e-4));
  CHECK(s.solve(mid).displacement(0, rz) == near(-5.95238e-4));
  CHECK(middle(down_on(0)) == near(-9.92063e-4));
  CHECK(s.solve(down_on(0)).displacement(0, rz) == near(-7.93651e-4));
  const LoadCase side = point_on(0, 0.25, {0, -P, 0});
  const Response r = s.solve(side);
  CHECK(deflection_at(s.b.frame, side, r, 0, 0.25)(uy) == near(-4.46429e-4));
  const Extremes e = extremes(s.b.frame, side, r, 0);
  CHECK(e.least_y.value == near(-5.54580e-4));
  CHECK(4 - 4 * e.least_y.at == near(2.23607, 1e-5));
  CHECK(r.displacement(0, rz) == near(-5.20833e-4));
  CHECK(r.displacement(1, rz) == near(3.72024e-4));
  CHECK(e.most_Mz.value == near(P * 1 * 3 / 4.0));
  CHECK(e.most_Mz.at == near(0.25));
}

TEST_CASE("B07: clamped spans of 4 m") {
  const Spans s({4}, "yZ", "yZ");
  const LoadCase uniform = down_on(0), mid = point_on(0, 0.5, {0, -P, 0});
  const Response u = s.solve(uniform), m = s.solve(mid);
  CHECK(deflection_at(s.b.frame, uniform, u, 0, 0.5)(uy) == near(-1.98413e-4));
  CHECK(resultants_at(s.b.frame, uniform, u, 0, 0).Mz == near(-666.667));
  CHECK(resultants_at(s.b.frame, uniform, u, 0, 0.5).Mz == near(333.333));
  CHECK(deflection_at(s.b.frame, mid, m, 0, 0.5)(uy) == near(-1.98413e-4));
  CHECK(resultants_at(s.b.frame, mid, m, 0, 0.5).Mz == near(500));
  CHECK(resultants_at(s.b.frame, mid, m, 0, 1).Mz == near(-500));
}

// Reactions and moment also in engineersedge.com's copy of Lindeburg's tables (0.00541 at 0.4215 L).
TEST_CASE("B08: propped cantilever of 4 m under uniform load") {
  const Spans s({4}, "y", "yZ");
  const Response r = s.solve(down_on(0));
  CHECK(r.reaction(0, uy) == near(750));
  CHECK(r.reaction(1, uy) == near(1250));
  CHECK(std::abs(r.reaction(1, rz)) == near(1000));
  const Extremes e = extremes(s.b.frame, down_on(0), r, 0);
  CHECK(e.least_y.value == near(-4.12657e-4));
  CHECK(4 * e.least_y.at == near(1.68614));
  CHECK(e.least_y.value * E * I / (w * 256) == near(-0.00541, 2e-3));
  CHECK(e.least_y.at == near(0.4215, 1e-3));
}

// Civil Engineering Formulas, table 2.1, and closed fractions.
TEST_CASE("B09: reactions and support moments of two to five equal spans") {
  struct Row {
    std::vector<double> reactions, moments;
  };
  const auto row = GENERATE(Row{{0.375, 1.25}, {0.125}}, Row{{0.4, 1.1}, {0.1, 0.1}},
                            Row{{0.392857, 1.142857, 0.928571}, {0.107143, 0.0714286, 0.107143}},
                            Row{{0.394737, 1.131579, 0.973684}, {0.105263, 0.0789474, 0.0789474, 0.105263}});
  const std::size_t count = row.moments.size() + 1;
  const Spans s(std::vector<double>(count, 4.0));
  const Response r = s.solve(uniform_load(s.b.frame, {0, -w, 0}));
  for (std::size_t i = 0; i < row.reactions.size(); ++i)
    CHECK(r.reaction(static_cast<int>(i), uy) / (w * 4) == near(row.reactions[i], 2e-6));
  for (std::size_t i = 0; i < row.moments.size(); ++i)
    CHECK(r.end_force(static_cast<int>(i), 11) / (-w * 16) == near(row.moments[i], 2e-6));
}

// piping-designer.com, three spans: 0.0069 at 0.446 L; loads on two spans: 0.383, 1.2, 0.45, -0.033, 0.0059.
TEST_CASE("B10: three equal spans, loaded on all or on two") {
  const Spans s({4, 4, 4});
  const LoadCase all = uniform_load(s.b.frame, {0, -w, 0});
  const Response r = s.solve(all);
  const Extremes e = extremes(s.b.frame, all, r, 0);
  CHECK(e.least_y.value == near(-5.24511e-4));
  CHECK(e.least_y.at == near(0.446037));
  CHECK(e.least_y.value * E * I / (w * 256) == near(-0.0069, 3e-3));
  CHECK(e.most_Mz.value == near(0.080 * w * 16));
  CHECK(deflection_at(s.b.frame, all, r, 1, 0.5)(uy) == near(-3.96825e-5));
  CHECK(resultants_at(s.b.frame, all, r, 1, 0.5).Mz == near(0.025 * w * 16));
  CHECK(r.end_force(0, 11) == near(-800));

  LoadCase two = down_on(0);
  two.lines.push_back(down_on(1).lines[0]);
  const Response q = s.solve(two);
  const std::vector<double> reactions{0.383333, 1.2, 0.45, -0.0333333};
  for (int i = 0; i < 4; ++i)
    CHECK(q.reaction(i, uy) / (w * 4) == near(reactions[static_cast<std::size_t>(i)], 2e-6));
  CHECK(q.end_force(0, 11) / (-w * 16) == near(0.116667, 1e-5));
  CHECK(q.end_force(1, 11) / (-w * 16) == near(0.0333333, 1e-5));
  CHECK(extremes(s.b.frame, two, q, 0).least_y.value * E * I / (w * 256) == near(-0.0059, 5e-3));
}

TEST_CASE("B11: a span of 4 m with an overhang of 1 m") {
  const Spans s({4, 1}, "y", "");
  CHECK(s.solve(node_force(2, {0, -P, 0})).displacement(2, uy) == near(-9.92063e-4));
  CHECK(s.solve(down_on(1)).displacement(2, uy) == near(-2.35615e-4));
}

// 64 P L^3 / (3 pi E d1 d0^3); pieces of constant section at their middle: error falls as 1 / n^2.
TEST_CASE("B13: a tapered round cantilever") {
  Builder b;
  b.material(E, E / 2.6);
  const int n = 80;
  b.node(0, 0, 0);
  for (int i = 0; i < n; ++i) {
    const double d = 0.08 - 0.03 * (i + 0.5) / n;
    Section s = round_bar({.diameter = d});
    s.shear_area_y = s.shear_area_z = 0;
    b.frame.sections.push_back(s);
    b.node(2.0 * (i + 1) / n, 0, 0);
    b.member(i, i + 1, i);
  }
  b.support(0, all_fixed);
  CHECK(StaticSolver(b.frame).solve(node_force(n, {0, P, 0})).displacement(n, uy) == near(1.01051e-2, 1e-4));
}

TEST_CASE("B14: a support of a clamped span of 4 m settles by 5 mm") {
  Spans s({4}, "yZ", "yZ");
  Vec6 settle = Vec6::Zero();
  settle(uy) = -5 * mm;
  s.b.frame.supports.push_back({1, fix("y"), settle});
  const Response r = s.solve({});
  CHECK(r.reaction(0, rz) == near(3150));
  CHECK(r.reaction(0, uy) == near(1575));
  CHECK(r.reaction(1, uy) == near(-1575));
}

TEST_CASE("B15, B16: temperature bends a free cantilever and presses a held bar") {
  const Spans cantilever({3}, "yZ", ""), held({3}, "yZ", "xyZ");
  LoadCase gradient, uniform;
  gradient.temperatures.push_back({.member = 0, .gradient_y = -30 / 0.2});
  uniform.temperatures.push_back({.member = 0, .uniform = 40});
  const Response bent = cantilever.solve(gradient), pressed = held.solve(uniform);
  CHECK(bent.displacement(1, uy) == near(8.1e-3));
  CHECK(bent.end_force.row(0).cwiseAbs().maxCoeff() < 1e-6);
  CHECK(deflection_at(cantilever.b.frame, gradient, bent, 0, 0.5)(uy) == near(8.1e-3 / 4));
  const Resultants r = resultants_at(held.b.frame, uniform, pressed, 0, 0.5);
  CHECK(r.N == near(-403.2e3));
  CHECK(r.N / 4e-3 == near(-100.8 * MPa));
  CHECK(pressed.displacement.cwiseAbs().maxCoeff() < 1e-15);
}

// Timoshenko's beam with Cowper's coefficient (J. Appl. Mech. 33, 1966) for a thick tube, nu = 0.3.
TEST_CASE("B17, B18: a short thick tube bends and shears") {
  Builder b;
  b.material(210e9, 210e9 / 2.6);
  b.frame.sections.push_back(round_tube({.outside_diameter = 0.3, .wall = 0.05}));
  const Section& s = b.frame.sections[0];
  b.line(Vec3::Zero(), Vec3(1.5, 0, 0), 1);
  CHECK(s.A == near(0.0392699));
  CHECK(s.Iy == near(3.19068e-4));
  CHECK(s.shear_area_z / s.A == near(0.564105));
  LoadCase uniform;
  uniform.lines.push_back({.member = 0, .at_from = Vec3(0, 0, -10e3), .at_to = Vec3(0, 0, -10e3)});
  SECTION("cantilever with a tip load") {
    b.support(0, all_fixed);
    const Response r = StaticSolver(b.frame).solve(node_force(1, {0, 0, 10e3}));
    CHECK(r.displacement(1, uz) == near(1.76283e-4));
    CHECK(r.displacement(1, uz) - 1.67900e-4 == near(8.38351e-6, 1e-3));
  }
  SECTION("clamped span") {
    b.support(0, all_fixed);
    b.support(1, all_fixed);
    const Response r = StaticSolver(b.frame).solve(uniform);
    CHECK(deflection_at(b.frame, uniform, r, 0, 0.5)(uz) == near(-3.53948e-6));
  }
  SECTION("simple span") {
    b.support(0, fix("xyzX"));
    b.support(1, fix("yz"));
    const Response r = StaticSolver(b.frame).solve(uniform);
    CHECK(deflection_at(b.frame, uniform, r, 0, 0.5)(uz) == near(-1.14098e-5));
  }
}

// Plate strip between ribs: E I -> D = E t^3 / 12 (1 - nu^2) per metre of width; glass 70 GPa, nu 0.22, 4 mm,
// q = 600 Pa, rib spacing 0.8 m.
TEST_CASE("B30, B31: a strip of glass between ribs bends as a beam of plate stiffness") {
  const double t = 4 * mm, nu = 0.22, D = 70e9 * t * t * t / (12 * (1 - nu * nu)), q = 600, span = 0.8;
  CHECK(D == near(392.322));
  const bool clamped = GENERATE(false, true);
  Builder b;
  b.material(70e9, 70e9 / 2.44);
  b.section(t, D / 70e9, 1e-6, 1e-6);
  b.line(Vec3::Zero(), Vec3(span, 0, 0), 1);
  b.support(0, clamped ? all_fixed : fix("xyzX"));
  b.support(1, clamped ? all_fixed : fix("yzX"));
  LoadCase load;
  load.lines.push_back({.member = 0, .at_from = Vec3(0, 0, -q), .at_to = Vec3(0, 0, -q)});
  const Response r = StaticSolver(b.frame).solve(load);
  const auto slope = [&](double xi) { return deflection_at(b.frame, load, r, 0, xi)(ry); };
  double square = 0;
  for (int i = 0; i < 400; ++i) square += std::pow(slope((i + 0.5) / 400), 2) / 400;
  CHECK(deflection_at(b.frame, load, r, 0, 0.5)(uz) == near(clamped ? -1.63131e-3 : -8.15657e-3));
  CHECK(slope(clamped ? 0.2113249 : 0) == near(clamped ? 6.27893e-3 : 3.26263e-2));
  CHECK(std::sqrt(square) == near(clamped ? 4.50286e-3 : 2.27383e-2, 1e-4));
}
