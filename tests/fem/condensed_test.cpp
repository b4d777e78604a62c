#include "fem/condensed.h"

#include <Eigen/Cholesky>

#include "fem/mechanism.h"
#include "fem/statics.h"
#include "tests/fem/frames.h"

using namespace focalframe::test;
using Catch::Matchers::Contains;

namespace {

/// A small grid with releases, offsets, a hinge and a spring, without supports at the first two nodes.
Builder grid() {
  Builder b;
  b.material(210e9, 81e9, 7850);
  b.section(4e-3, 8e-6, 5e-6, 3e-6, 2e-3, 1.5e-3);
  const auto spine = b.line({0, 0, 0}, {6, 0, 0}, 4);
  const auto rib = b.line({3, 0, 0.2}, {3, 2, 0.7}, 3);
  b.frame.joints.push_back({});
  const int seat = b.node(3, 0, 0.2);
  b.member(spine[2], seat, 0, 0, Vec3::UnitX());
  b.frame.joints[0] = {rib[0], seat, fix("xyzXZ"), turned(0.3, {0, 0, 1}), "hinge"};
  b.member(rib[3], spine[4]);
  b.last().release_from = fix("YZ");
  b.last().offset_to = Vec3(0, 0.1, -0.1);
  Vec6 k;
  k << 1e5, 2e5, 0, 0, 0, 3e3;
  b.frame.springs.push_back({rib[2], -1, k, turned(0.4, {1, 1, 0}), "stay"});
  return b;
}

Eigen::MatrixXd two_loads(const Frame& frame) {
  LoadCase weight = uniform_load(frame, {100, -50, 20});
  weight.gravity = Vec3(0, 0, -9.81);
  return assemble_loads(frame, {weight, node_force(6, {10, 20, 30}, {1, 2, 3})});
}

}  // namespace

TEST_CASE("a condensed frame joined to springs answers as the full frame on the same springs") {
  Builder b = grid();
  const Eigen::MatrixXd loads = two_loads(b.frame);
  std::vector<Freedom> freedoms;
  for (const int node : {0, 4})
    for (int d = 0; d < 6; ++d) freedoms.push_back({node, d});
  const Condensed c = condense(b.frame, freedoms, loads);
  Vec6 k;
  k << 2e6, 3e6, 4e6, 5e5, 6e5, 7e5;
  Eigen::MatrixXd joined = c.stiffness;
  joined.diagonal() += k.replicate(2, 1);
  const Eigen::MatrixXd v = joined.ldlt().solve(c.load);
  const Eigen::MatrixXd u = c.held_response + c.joint_response * v;
  for (const int node : {0, 4}) b.frame.springs.push_back({node, -1, k, Mat3::Identity(), "ground"});
  CHECK(difference(u, StaticSolver(b.frame).displacements(loads)) < 1e-9);
  CHECK(difference(c.stiffness, c.stiffness.transpose()) == 0);
  CHECK(c.residual < 1e-9);
  CHECK(c.condition_estimate > 1);
}

TEST_CASE("chosen freedoms may lie on either side of a joint") {
  Builder b = grid();
  const Joint hinge = b.frame.joints[0];
  const int side = GENERATE(0, 1);
  std::vector<Freedom> freedoms;
  for (int d = 0; d < 6; ++d) freedoms.push_back({side == 0 ? hinge.node : hinge.other, d});
  b.support(0, all_fixed);
  const Eigen::MatrixXd loads = two_loads(b.frame);
  const Condensed c = condense(b.frame, freedoms, loads);
  const Eigen::MatrixXd v = c.stiffness.ldlt().solve(c.load);
  CHECK(difference(c.held_response + c.joint_response * v, StaticSolver(b.frame).displacements(loads)) <
        1e-9);
}

TEST_CASE("a chosen freedom that is fixed or chosen on both sides of a joint is refused in words") {
  Builder b = grid();
  b.support(0, all_fixed);
  const Eigen::MatrixXd loads = two_loads(b.frame);
  CHECK_THROWS_WITH(condense(b.frame, {{0, uy}}, loads), Contains("uy") && Contains("fixed by a support"));
  const Joint hinge = b.frame.joints[0];
  CHECK_THROWS_WITH(
      condense(b.frame, {{hinge.node, ux}, {hinge.node, uy}, {hinge.other, ux}, {hinge.other, uy}}, loads),
      Contains("'hinge'"));
}

TEST_CASE("a frame that its chosen freedoms do not hold is a mechanism") {
  Builder b = straight_beam(3, 2);
  CHECK_THROWS_AS(condense(b.frame, {{0, ux}, {0, uy}, {0, uz}}, Eigen::MatrixXd::Zero(18, 1)), Mechanism);
}

TEST_CASE("rigid motion of all chosen freedoms needs no force") {
  Builder b;
  b.material(210e9, 81e9);
  b.section(4e-3, 8e-6, 5e-6, 3e-6);
  b.line({0, 0, 0}, {3, 1, 2}, 4);
  std::vector<Freedom> freedoms;
  for (const int node : {0, 4})
    for (int d = 0; d < 6; ++d) freedoms.push_back({node, d});
  const Condensed c = condense(b.frame, freedoms, Eigen::MatrixXd::Zero(b.frame.freedoms(), 1));
  Eigen::VectorXd v(12);
  const Vec3 turn(0.1, -0.2, 0.3), shift(1, 2, 3);
  v << shift, turn, shift + turn.cross(Vec3(3, 1, 2)), turn;
  CHECK((c.stiffness * v).norm() < 1e-9 * c.stiffness.norm() * v.norm());
}

namespace {

/// A tube of `modules` times 12 m with ribs on both sides, tied by purlins at their tips; axis x.
struct Row {
  Frame frame;
  std::vector<int> bearings;  ///< tube nodes at the module ends
};

Row row_of(int modules, int pieces_of_arm) {
  Builder b;
  b.material(210e9, 81e9, 7850);
  b.section(9.0e-3, 8.2e-5, 8.2e-5, 1.64e-4, 4.5e-3, 4.5e-3);  // tube
  b.section(4.0e-4, 4e-8, 2e-7, 4e-9, 3e-4, 3e-4);             // rib
  b.section(3.0e-4, 3.6e-8, 3.6e-8, 7.2e-8);                   // purlin
  Row row;
  std::vector<int> tips(2, -1);
  int last = b.node(0, 0, 0);
  row.bearings.push_back(last);
  for (int i = 1; i <= 6 * modules; ++i) {
    const double x = 2.0 * i;
    const int root = b.node(x, 0, 0);
    b.member(last, root, 0);
    last = root;
    if (i % 6 == 0) row.bearings.push_back(root);
    for (int side = 0; side < 2; ++side) {
      int before = root;
      for (int k = 1; k <= pieces_of_arm; ++k) {
        const double t = static_cast<double>(k) / pieces_of_arm;
        const int next = b.node(x, (side == 0 ? 2.7 : -2.7) * t, 0.2 + t * t);
        b.member(before, next, 1);
        if (k == 1) b.last().offset_from = Vec3(0, 0, 0.15);
        before = next;
      }
      if (tips[static_cast<std::size_t>(side)] >= 0)
        b.member(tips[static_cast<std::size_t>(side)], before, 2);
      tips[static_cast<std::size_t>(side)] = before;
    }
  }
  row.frame = b.frame;
  return row;
}

/// What the stands transmit: y and z at every bearing, x and the turn about x in the middle.
std::vector<Freedom> transmitted(const Row& row) {
  std::vector<Freedom> freedoms;
  for (const int node : row.bearings)
    for (const int d : {uy, uz}) freedoms.push_back({node, d});
  const int drive = row.bearings[row.bearings.size() / 2];
  freedoms.push_back({drive, ux});
  freedoms.push_back({drive, rx});
  return freedoms;
}

/// The stands as springs in axes that the row's pose turns about x.
std::vector<Spring> stands(const Row& row, double pose) {
  std::vector<Spring> springs;
  for (const int node : row.bearings) {
    Spring s;
    s.node = node;
    s.axes = turned(pose, Vec3::UnitX());
    s.stiffness << 0, 2e6, 2e7, 0, 0, 0;
    if (node == row.bearings[row.bearings.size() / 2]) s.stiffness[ux] = 3e6, s.stiffness[rx] = 5e6;
    springs.push_back(s);
  }
  return springs;
}

/// Solves the condensed frame on its stands: all displacements for the load columns.
Eigen::MatrixXd on_stands(const Condensed& c, const SparseMatrix& stands_stiffness) {
  Eigen::MatrixXd joined = c.stiffness;
  const auto number = [&](Eigen::Index i) {
    const Freedom& f = c.freedoms[static_cast<std::size_t>(i)];
    return 6 * f.node + f.dof;
  };
  for (Eigen::Index i = 0; i < joined.rows(); ++i)
    for (Eigen::Index j = 0; j < joined.cols(); ++j)
      joined(i, j) += stands_stiffness.coeff(number(i), number(j));
  return c.held_response + c.joint_response * joined.llt().solve(c.load);
}

/// Greatest differences from the full solve: as it comes, and after one step of iterative refinement.
std::pair<double, double> errors(const Row& row, double pose) {
  Frame full = row.frame;
  full.springs = stands(row, pose);
  Frame only_stands = full;
  only_stands.members.clear();
  LoadCase weight;
  weight.gravity = Vec3(0, -9.81 * std::sin(pose), -9.81 * std::cos(pose));
  const LoadCase wind = uniform_load(row.frame, {0, 30, -70});
  const Eigen::MatrixXd loads = assemble_loads(row.frame, {weight, wind});
  const SparseMatrix K = assemble_stiffness(full), S = assemble_stiffness(only_stands);
  const Eigen::MatrixXd exact = StaticSolver(full).displacements(loads);
  const std::vector<Freedom> freedoms = transmitted(row);
  const Eigen::MatrixXd first = on_stands(condense(row.frame, freedoms, loads), S);
  const Eigen::MatrixXd rest = loads - K * first;
  const Eigen::MatrixXd second = first + on_stands(condense(row.frame, freedoms, rest), S);
  return {difference(first, exact), difference(second, exact)};
}

}  // namespace

TEST_CASE("rows of one, two and four modules on stands: condensed as full, in any pose") {
  const int modules = GENERATE(1, 2, 4);
  const double pose = GENERATE(-1.6, 0.0, 0.7, 2.5);
  const auto [first, second] = errors(row_of(modules, 6), pose);
  CHECK(first < 1e-7);
  CHECK(second < 1e-9);
}

TEST_CASE("twenty thousand freedoms: condensed as full to 1e-7, and to 1e-9 after one refinement") {
  const Row row = row_of(12, 23);
  REQUIRE(row.frame.freedoms() > 20000);
  const auto [first, second] = errors(row, 0.7);
  CHECK(first < 1e-7);
  CHECK(second < 1e-9);
}
