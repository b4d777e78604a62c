/// Second-order statics. Stability functions: Timoshenko and Gere (from memory; values computed). The AISC
/// benchmark of ANSI/AISC 360 Commentary C2.1, case 1 (load sets read, numbers from memory, recomputed
/// without shear deformation; AISC's own tolerance is 3 % on moments and 5 % on deflections).

#include "fem/buckling.h"
#include "tests/fem/frames.h"

using namespace focalframe::test;

namespace {

constexpr double E = 210e9, I = 8e-6, L = 4, euler = 9.869604401089358 * E * I / (L * L);

struct Column {
  Builder b;
  std::vector<int> nodes;
};

Column simple_span(int pieces) {
  Column c;
  c.b.material(E, E / 2.6);
  c.b.section(1e3, 1e-3, I, 1e-3);  // no axial shortening to speak of
  c.nodes = c.b.line(Vec3::Zero(), Vec3(L, 0, 0), pieces);
  c.b.support(c.nodes.front(), fix("xyzXY"));
  c.b.support(c.nodes.back(), fix("yzXY"));
  return c;
}

struct Factors {
  double deflection, moment;
};

/// Mid-span values over those of first order.
Factors amplification(const Column& c, LoadCase load, double r) {
  const auto middle = static_cast<int>(c.nodes.size() / 2);
  const Response first = StaticSolver(c.b.frame).solve(load);
  load.nodes.push_back({c.nodes.back(), Vec3(-r * euler, 0, 0)});
  const Response second = second_order(c.b.frame, load).response;
  return {second.displacement(middle, uy) / first.displacement(middle, uy),
          second.end_force(middle, 5) / first.end_force(middle, 5)};
}

}  // namespace

TEST_CASE("a pressed simple span under uniform load grows as the stability functions say") {
  struct Row {
    double r, deflection, moment;
  };
  const auto row =
      GENERATE(Row{0.25, 1.33450, 1.34300}, Row{0.5, 2.00362, 2.02994}, Row{0.8, 5.01503, 5.12470});
  const Column c = simple_span(16);
  const Factors f = amplification(c, uniform_load(c.b.frame, {0, -500, 0}), row.r);
  CHECK(f.deflection == near(row.deflection, 2e-4));
  CHECK(f.moment == near(row.moment, 2e-3));  // fixed-end moments of the pieces are of first order
}

TEST_CASE("a pressed simple span under a mid load grows as the stability functions say") {
  struct Row {
    double r, deflection, moment;
  };
  const auto row =
      GENERATE(Row{0.25, 1.32888, 1.27324}, Row{0.5, 1.98629, 1.81683}, Row{0.8, 4.94339, 4.25262});
  const Column c = simple_span(16);
  const Factors f = amplification(c, node_force(c.nodes[8], {0, -1000, 0}), row.r);
  CHECK(f.deflection == near(row.deflection, 2e-4));
  CHECK(f.moment == near(row.moment, 2e-4));
}

TEST_CASE("equal end moments grow by the secant") {
  const Column c = simple_span(16);
  LoadCase load;
  load.nodes.push_back({c.nodes.front(), Vec3::Zero(), Vec3(0, 0, 1200)});
  load.nodes.push_back({c.nodes.back(), Vec3::Zero(), Vec3(0, 0, -1200)});
  CHECK(amplification(c, load, 0.5).moment == near(2.25217, 2e-4));
}

TEST_CASE("a pressed cantilever with a lateral tip load") {
  struct Row {
    double r, deflection, moment;
  };
  const auto row = GENERATE(Row{0.25, 1.32888, 1.27324}, Row{0.5, 1.98629, 1.81683});
  Builder b;
  b.material(E, E / 2.6);
  b.section(1e3, 1e-3, I, 1e-3);
  const auto nodes = b.line(Vec3::Zero(), Vec3(L, 0, 0), 8);
  b.support(0, all_fixed);
  LoadCase load = node_force(nodes.back(), {0, 1000, 0});
  load.nodes.push_back({nodes.back(), Vec3(-row.r * euler / 4, 0, 0)});
  const Response r = second_order(b.frame, load).response;
  CHECK(r.displacement(8, uy) == near(row.deflection * 1000 * L * L * L / (3 * E * I), 2e-4));
  CHECK(r.reaction(0, rz) == near(-row.moment * 1000 * L, 2e-4));
}

TEST_CASE("the AISC benchmark column, case 1") {
  struct Row {
    double P, published_moment, published_deflection, moment, deflection;
  };
  const auto row = GENERATE(Row{0, 235, 0.197, 235.200, 0.197061}, Row{150, 269, 0.224, 268.890, 0.224601},
                            Row{300, 313, 0.261, 313.517, 0.261055}, Row{450, 375, 0.311, 375.414, 0.311588});
  Builder b;  // W14x48, 28 ft, 0.2 kip/ft; inch and kip
  b.material(29000, 11200);
  b.section(14.1e4, 1e4, 484, 1e4);
  const double length = 28 * 12;
  const auto nodes = b.line(Vec3::Zero(), Vec3(length, 0, 0), 16);
  b.support(nodes.front(), fix("xyzXY"));
  b.support(nodes.back(), fix("yzXY"));
  LoadCase load = uniform_load(b.frame, {0, -0.2 / 12, 0});
  load.nodes.push_back({nodes.back(), Vec3(-row.P, 0, 0)});
  const Response r = second_order(b.frame, load).response;
  const double moment = -r.end_force(8, 5), deflection = -r.displacement(nodes[8], uy);
  CHECK(moment == near(row.published_moment, 0.003));
  CHECK(deflection == near(row.published_deflection, 0.003));
  CHECK(moment == near(row.moment, 1e-3));
  CHECK(deflection == near(row.deflection, 1e-4));
}

// Secant formula, CHS 219.1 x 8, L = 6 m, P = 400 kN at e = 20 mm: mid deflection 7.62047 mm.
TEST_CASE("an eccentrically pressed tube bends as the secant formula says") {
  Builder b;
  b.material(210e9, 81e9);
  b.section(1e3, 2.95963e-5, 2.95963e-5, 5.91927e-5);
  const auto nodes = b.line(Vec3::Zero(), Vec3(6, 0, 0), 16);
  b.support(nodes.front(), fix("xyzXY"));
  b.support(nodes.back(), fix("yzXY"));
  LoadCase load;
  load.nodes.push_back({nodes.back(), Vec3(-400e3, 0, 0), Vec3(0, 0, -8000)});
  load.nodes.push_back({nodes.front(), Vec3::Zero(), Vec3(0, 0, 8000)});
  CHECK(std::abs(second_order(b.frame, load).response.displacement(nodes[8], uy)) == near(7.62047e-3, 1e-4));
}

// A bow of L / 300 grows by 1 / (1 - P / P_E): 20 mm -> 26.1353 mm, moment 10454.1 N m.
TEST_CASE("an initial bow grows by 1 / (1 - P / P_E)") {
  Builder b;
  b.material(210e9, 81e9);
  b.section(1e3, 2.95963e-5, 2.95963e-5, 5.91927e-5);
  const int pieces = 32;
  for (int i = 0; i <= pieces; ++i)
    b.node(6.0 * i / pieces, 0.02 * std::sin(std::numbers::pi * i / pieces), 0);
  for (int i = 0; i < pieces; ++i) b.member(i, i + 1);
  b.support(0, fix("xyzXY"));
  b.support(pieces, fix("yzXY"));
  const Response r = second_order(b.frame, node_force(pieces, {-400e3, 0, 0})).response;
  CHECK(0.02 + r.displacement(pieces / 2, uy) == near(26.1353e-3, 1e-3));
  CHECK(std::abs(r.end_force(pieces / 2, 5)) == near(10454.1, 2e-3));
}

TEST_CASE("a column above its Euler load has no second-order answer") {
  const Column c = simple_span(4);
  LoadCase load = node_force(c.nodes.back(), {-1.05 * euler, 0, 0});
  CHECK_THROWS_AS(second_order(c.b.frame, load), Unstable);
}
