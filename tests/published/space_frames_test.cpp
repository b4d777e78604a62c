/// Space frames from textbooks on the finite element method. The published tables have 3-4 digits; the longer
/// values were recomputed by an independent assembly and agree with the published ones, so they are checked
/// to 1e-5. Neither text has shear deformation.

#include "fem/statics.h"
#include "tests/fem/frames.h"

using namespace focalframe::test;

namespace {

void check_row(const Eigen::RowVectorXd& row, const std::vector<double>& expected, double relative) {
  for (int d = 0; d < 6; ++d) {
    INFO("component " << d);
    CHECK(row(d) == near(expected[static_cast<std::size_t>(d)], relative));
  }
}

Frame three_members(const Section& section, double E, double G, const std::array<Vec3, 4>& nodes,
                    const std::array<Vec3, 3>& up) {
  Builder b;
  b.material(E, G);
  b.frame.sections.push_back(section);
  for (const Vec3& p : nodes) b.node(p.x(), p.y(), p.z());
  for (int k = 1; k < 4; ++k) {
    b.member(0, k, 0, 0, up[static_cast<std::size_t>(k - 1)]);
    b.support(k, all_fixed);
  }
  return b.frame;
}

}  // namespace

// Logan, A First Course in the Finite Element Method, example 5.8 (from memory). Inch, kip.
TEST_CASE("Logan's three-member space frame") {
  const Section s{.name = "s", .A = 10, .Iy = 100, .Iz = 100, .J = 50};
  const Frame frame =
      three_members(s, 30000, 10000, {Vec3(0, 0, 0), Vec3(-100, 0, 0), Vec3(0, 0, -100), Vec3(0, -100, 0)},
                    {Vec3::UnitY(), Vec3::UnitY(), Vec3::UnitX()});
  const Response r = StaticSolver(frame).solve(node_force(0, {0, -50, 0}, {-1000, 0, 0}));
  CHECK(r.displacement(0, ux) == near(7.098e-5, 1e-4));
  CHECK(r.displacement(0, uy) == near(-0.014, 1e-3));
  CHECK(r.displacement(0, uz) == near(-2.352e-3, 1e-3));
  CHECK(r.displacement(0, rx) == near(-3.996e-3, 1e-3));
  CHECK(r.displacement(0, ry) == near(1.78e-5, 1e-3));
  CHECK(r.displacement(0, rz) == near(-1.033e-4, 1e-3));
  check_row(r.displacement.row(0),
            {7.09826e-5, -1.399513e-2, -2.351889e-3, -3.996090e-3, 1.780069e-5, -1.033429e-4}, 1e-5);
  check_row(r.reaction.row(1), {-0.212948, 0.317808, 0.0526270, 19.98045, -3.165359, 18.99067}, 1e-5);
  check_row(r.reaction.row(2), {0.0294859, 7.696788, 7.055668, -264.9567, 0.940273, 0.516715}, 1e-5);
  check_row(r.reaction.row(3), {0.183462, 41.98540, -7.108295, -235.5320, -0.0890035, -6.072806}, 1e-5);
}

// Ferreira, MATLAB Codes for Finite Element Analysis, problem 12: inputs as in the book's file, printed table
// from memory (it belongs to Fz = 20 kN). Member y axes: frame y, y and x.
TEST_CASE("Ferreira's three-member space frame with unequal second moments") {
  const Section s{.name = "s", .A = 0.02, .Iy = 10e-5, .Iz = 20e-5, .J = 5e-5};
  const Frame frame =
      three_members(s, 210e9, 84e9, {Vec3(0, 0, 0), Vec3(3, 0, 0), Vec3(0, 0, -3), Vec3(0, -4, 0)},
                    {Vec3::UnitZ(), Vec3::UnitX(), Vec3::UnitZ()});
  const StaticSolver solver(frame);
  const Response r = solver.solve(node_force(0, {-10e3, 0, 20e3}));
  CHECK(r.displacement(0, ux) == near(-7.05e-6, 1e-3));
  CHECK(r.displacement(0, uz) == near(1.418e-5, 1e-3));
  CHECK(r.displacement(0, rx) == near(1.45e-6, 3e-3));
  CHECK(r.displacement(0, ry) == near(1.75e-6, 3e-3));
  check_row(r.displacement.row(0),
            {-7.051478e-6, -6.653671e-8, 1.417696e-5, 1.447788e-6, 1.748584e-6, 1.136054e-6}, 1e-5);
  check_row(solver.solve(node_force(0, {-10e3, 0, 15e3})).displacement.row(0),
            {-7.060087e-6, -5.724023e-8, 1.062841e-5, 1.088029e-6, 8.756631e-7, 1.134800e-6}, 1e-5);
  check_row(r.reaction.row(1), {9872.069, -30.56750, -107.8381, -2.026903, -173.9972, 29.94649}, 1e-5);
  check_row(r.reaction.row(2), {90.29397, -39.29604, -19847.74, 38.67503, 123.2009, -1.590476}, 1e-5);
  check_row(r.reaction.row(3), {37.63753, 69.86355, -44.42044, -96.44177, -1.836013, -87.20363}, 1e-5);
}
