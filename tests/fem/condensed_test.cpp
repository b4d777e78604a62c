#include "fem/condensed.h"

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
