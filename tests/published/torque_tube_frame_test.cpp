/// Two references computed with general-purpose libraries: a space frame of a tube, ribs and purlins by an
/// independent sparse assembly (no shear deformation; its own residual was below 4e-10 and its values carry 7
/// digits), and a thick tube by three-dimensional elasticity with quadratic hexahedra.

#include "fem/modes.h"
#include "fem/statics.h"
#include "tests/fem/frames.h"

using namespace focalframe::test;

namespace {

struct TubeFrame {
  Builder b;
  std::vector<int> tube;    ///< x = 0, 1.5, 3, 4.5, 6
  std::vector<int> tip[2];  ///< y = +2 and -2 at x = 1.5, 3, 4.5
  int first_rib = 0;
};

TubeFrame tube_frame() {
  TubeFrame f;
  f.b.material(210e9, 81e9);
  f.b.section(5.3055e-3, 2.9596e-5, 2.9596e-5, 5.9193e-5);
  f.b.section(5.4082e-4, 2.5379e-7, 1.3440e-7, 2.9284e-7);
  f.b.section(3.0664e-4, 3.6048e-8, 3.6048e-8, 7.2096e-8);
  f.tube = f.b.line(Vec3::Zero(), Vec3(6, 0, 0), 4);
  f.first_rib = static_cast<int>(f.b.frame.members.size());
  for (int side = 0; side < 2; ++side)
    for (int k = 1; k <= 3; ++k) {
      f.tip[side].push_back(f.b.node(1.5 * k, side == 0 ? 2 : -2, 0.6));
      f.b.member(f.tube[static_cast<std::size_t>(k)], f.tip[side].back(), 1);
    }
  for (const auto& tips : f.tip)
    for (std::size_t k = 0; k < 2; ++k) f.b.member(tips[k], tips[k + 1], 2);
  f.b.support(f.tube.front(), all_fixed);
  f.b.support(f.tube.back(), fix("yz"));
  return f;
}

}  // namespace

TEST_CASE("R01: tube with ribs and purlins against an independent assembly") {
  const TubeFrame f = tube_frame();
  LoadCase load;
  load.nodes = {{f.tip[0][0], Vec3(0, 0, -300)},
                {f.tip[0][1], Vec3(0, 100, -400)},
                {f.tip[0][2], Vec3(0, 0, -200)},
                {f.tip[1][2], Vec3(150, 0, 250)}};
  const Response r = StaticSolver(f.b.frame).solve(load);
  const auto check = [](const Eigen::RowVectorXd& row, const std::vector<double>& expected, double relative) {
    for (std::size_t k = 0; k < expected.size(); ++k) {
      INFO("component " << k);
      CHECK(row(static_cast<int>(k)) == Approx(expected[k]).epsilon(relative).margin(1e-12));
    }
  };
  const std::vector<std::pair<int, std::vector<double>>> published{
      {f.tube[1], {2.019468e-07, 1.458226e-05, -7.839116e-05, -7.383255e-04, 7.360654e-05, 1.855924e-05}},
      {f.tube[2], {3.455465e-07, 3.872563e-05, -1.535451e-04, -1.261485e-03, 1.460460e-05, 1.121352e-05}},
      {f.tube[3], {4.074379e-07, 3.504983e-05, -1.155660e-04, -1.534533e-03, -6.043679e-05, -1.306683e-05}},
      {f.tube[4], {4.074379e-07, 0, 0, -1.534533e-03, -8.534762e-05, -2.851641e-05}},
      {f.tip[0][0], {-5.914328e-06, 5.692024e-03, -1.900872e-02, -1.385122e-02, 1.177525e-03, 3.584006e-04}},
      {f.tip[1][0], {2.427305e-03, 6.548115e-04, 2.058103e-03, -1.321925e-03, -8.202985e-04, 1.463117e-03}},
      {f.tip[0][1],
       {-5.918224e-06, 6.123924e-03, -2.043876e-02, -1.445379e-02, -7.418579e-04, -2.206111e-04}},
      {f.tip[1][1], {2.428318e-03, 1.715761e-03, 5.436690e-03, -3.652372e-03, -2.886619e-03, 1.649515e-03}},
      {f.tip[0][2],
       {-5.919941e-06, 4.964605e-03, -1.655110e-02, -1.166548e-02, -2.271467e-03, -6.781958e-04}},
      {f.tip[1][2], {2.430743e-03, 3.754991e-03, 1.228632e-02, -8.354707e-03, -3.068513e-03, 2.148365e-03}}};
  for (const auto& [node, expected] : published) check(r.displacement.row(node), expected, 5e-7);
  check(r.reaction.row(f.tube[0]), {-150, -14.6474, 512.378, 2360, -689.268, -87.8847}, 5e-6);
  check(r.reaction.row(f.tube[4]).segment(1, 2), {-85.3526, 137.622}, 5e-6);
  // Printed there: forces of the start on the member.
  check(r.end_force.row(0).head(6), {-150, -14.6474, 512.378, 2360, -689.268, -87.8847}, 5e-6);
  check(r.end_force.row(f.first_rib + 1).head(6), {19.0144, 0.0935527, 335.166, 8.98761, -686.645, 0.160928},
        1e-5);
  check(r.end_force.row(f.first_rib + 2).head(6), {57.5491, 0.0737003, 237.280, 26.2288, -506.311, 0.100508},
        1e-5);
  check(r.end_force.row(3).segment(1, 5), {85.3526, -137.622, 0, 206.433, 128.029}, 5e-6);
}

// Full clamping of the solid's root stiffens it by up to 0.8 %, which no beam model has: 1 %.
TEST_CASE("R02: thick tubes against three-dimensional elasticity") {
  struct Row {
    double ro, ri, L, deflection, euler_ratio, rotation_ratio, twist;
  };
  const auto row = GENERATE(Row{0.15, 0.10, 3.0, 1.35243e-3, 1.00687, 0.99625, 5.82052e-4},
                            Row{0.15, 0.10, 1.5, 1.74824e-4, 1.04124, 0.99389, 5.82052e-4 / 2},
                            Row{0.15, 0.135, 1.5, 4.17667e-4, 1.06607, 0.99696, 6.79091e-4});
  Builder b;
  b.material(210e9, 210e9 / 2.6);
  b.frame.sections.push_back(round_tube({.outside_diameter = 2 * row.ro, .wall = row.ro - row.ri}));
  b.line(Vec3::Zero(), Vec3(row.L, 0, 0), 1);
  b.support(0, all_fixed);
  const StaticSolver solver(b.frame);
  const Response bent = solver.solve(node_force(1, {0, 0, 10e3}));
  const double bending = 10e3 * std::pow(row.L, 3) / (3 * 210e9 * b.frame.sections[0].Iy);
  CHECK(bent.displacement(1, uz) == near(row.deflection, 0.01));
  CHECK(bent.displacement(1, uz) / bending == near(row.euler_ratio, 0.01));
  CHECK(-bent.displacement(1, ry) == near(row.rotation_ratio * bending * 1.5 / row.L, 0.01));
  CHECK(solver.solve(node_force(1, Vec3::Zero(), {10e3, 0, 0})).displacement(1, rx) == near(row.twist, 2e-5));
}

// The same with exact St-Venant tractions at both ends: Cowper's beam to 5 digits.
TEST_CASE(
    "R02: a thick tube under St-Venant tractions bends as Timoshenko's beam with Cowper's coefficient") {
  struct Row {
    double ri, deflection;
  };
  const auto row = GENERATE(Row{0.10, 1.7628294e-4}, Row{0.135, 4.1772822e-4});
  Builder b;
  b.material(210e9, 210e9 / 2.6);
  b.frame.sections.push_back(round_tube({.outside_diameter = 0.3, .wall = 0.15 - row.ri}));
  b.line(Vec3::Zero(), Vec3(1.5, 0, 0), 1);
  b.support(0, all_fixed);
  CHECK(StaticSolver(b.frame).solve(node_force(1, {0, 10e3, 0})).displacement(1, uy) ==
        near(row.deflection, 5e-6));
}

// Frequencies of the solid, root clamped, ro = 0.15, ri = 0.135, L = 3, density 7850: 1 % for the clamping.
TEST_CASE("R02: natural frequencies of a tube against three-dimensional elasticity") {
  Builder b;
  b.material(210e9, 210e9 / 2.6, 7850);
  b.frame.sections.push_back(round_tube({.outside_diameter = 0.3, .wall = 0.015}));
  b.line(Vec3::Zero(), Vec3(3, 0, 0), 40);
  b.support(0, all_fixed);
  const std::vector<double> solid{32.042, 32.042, 185.05, 185.05, 267.305, 431.68, 467.4, 467.4};
  const std::vector<double> theory{31.960, 31.960, 184.53, 184.53, 267.305, 431.016, 465.38, 465.38};
  const auto modes = natural_modes(b.frame, 8);
  for (std::size_t k = 0; k < solid.size(); ++k) {
    CHECK(modes[k].frequency == near(solid[k], 0.01));
    CHECK(modes[k].frequency == near(theory[k], 1e-3));
  }
}
