#include "fem/statics.h"

#include "fem/mechanism.h"
#include "tests/fem/frames.h"

using namespace focalframe::test;
using Catch::Matchers::Contains;

namespace {
constexpr double E = 210e9, I = 8e-6, P = 1000;
}

TEST_CASE("a tip load on a cantilever deflects it by P L^3 / 3 E I and turns it by P L^2 / 2 E I") {
  Builder b = straight_beam(3, 1);
  b.support(0, all_fixed);
  const StaticSolver solver(b.frame);
  const Response y = solver.solve(node_force(1, {0, P, 0})), z = solver.solve(node_force(1, {0, 0, P}));
  CHECK(y.displacement(1, uy) == near(P * 27 / (3 * E * I), 1e-12));
  CHECK(y.displacement(1, rz) == near(P * 9 / (2 * E * I), 1e-12));
  CHECK(z.displacement(1, uz) == near(P * 27 / (3 * E * I), 1e-12));
  CHECK(z.displacement(1, ry) == near(-P * 9 / (2 * E * I), 1e-12));
  CHECK(y.reaction(0, uy) == near(-P, 1e-12));
  CHECK(y.reaction(0, rz) == near(-3 * P, 1e-12));
  CHECK(y.end_force(0, 1) == near(-P, 1e-12));
  CHECK(y.end_force(0, 7) == near(P, 1e-12));
  CHECK(y.residual < 1e-12);
}

TEST_CASE("a torque on a cantilever twists it by T L / G J and a pull stretches it by N L / E A") {
  Builder b = straight_beam(3, 2);
  b.support(0, all_fixed);
  const Response r = StaticSolver(b.frame).solve(node_force(2, {5000, 0, 0}, {700, 0, 0}));
  CHECK(r.displacement(2, rx) == near(700 * 3 / (E / 2.6 * 2 * I), 1e-12));
  CHECK(r.displacement(2, ux) == near(5000 * 3 / (E * 4e-3), 1e-12));
}

TEST_CASE("a release makes the end force zero and a simple span of a clamped one") {
  Builder b = straight_beam(4, 2);
  b.support(0, all_fixed);
  b.support(2, all_fixed);
  b.frame.members[0].release_from = fix("Z");
  b.frame.members[1].release_to = fix("Z");
  const LoadCase load = uniform_load(b.frame, {0, -500, 0});
  const Response r = StaticSolver(b.frame).solve(load);
  CHECK(r.displacement(1, uy) == near(-5 * 500 * 256 / (384 * E * I), 1e-11));
  CHECK(r.end_force(0, 5) == 0);
  CHECK(r.end_force(0, 11) == near(500 * 16 / 8.0, 1e-11));  // sags, so v'' > 0
}

TEST_CASE("an end spring in a cantilever's root adds P L / k to the tip's turn") {
  Builder b = straight_beam(3, 1);
  b.support(0, all_fixed);
  b.last().spring_from[5] = 4e5;
  const Response r = StaticSolver(b.frame).solve(node_force(1, {0, P, 0}));
  CHECK(r.displacement(1, rz) == near(P * 9 / (2 * E * I) + P * 3 / 4e5, 1e-11));
  CHECK(r.displacement(1, uy) == near(P * 27 / (3 * E * I) + P * 9 / 4e5, 1e-11));
}

TEST_CASE("a rigid arm at the tip carries the load's moment into the member") {
  Builder b = straight_beam(3, 1);
  b.support(0, all_fixed);
  b.frame.nodes[1].at = Vec3(3, 0.4, 0);
  b.last().offset_to = Vec3(0, -0.4, 0);
  const Response r = StaticSolver(b.frame).solve(node_force(1, {P, 0, 0}));
  const double turn = -P * 0.4 * 3 / (E * I);
  CHECK(r.displacement(1, rz) == near(turn, 1e-11));
  CHECK(r.displacement(1, ux) == near(P * 3 / (E * 4e-3) - 0.4 * turn, 1e-11));
}

TEST_CASE("a hinge between two nodes passes force but no moment about its axis") {
  Builder b;
  b.material(E, E / 2.6);
  b.section(4e-3, I, I, 2 * I);
  const auto left = b.line({0, 0, 0}, {2, 0, 0}, 1), right = b.line({2, 0, 0}, {4, 0, 0}, 1);
  b.support(left[0], all_fixed);
  b.support(right[1], all_fixed);
  const bool node_first = GENERATE(true, false);
  Joint hinge{left[1], right[0], fix("xyzXY"), Mat3::Identity(), "hinge"};
  if (!node_first) std::swap(hinge.node, hinge.other);
  b.frame.joints.push_back(hinge);
  const Response r = StaticSolver(b.frame).solve(node_force(left[1], {0, P, 0}));
  CHECK(r.displacement(left[1], uy) == near(P / 2 * 8 / (3 * E * I), 1e-11));  // two cantilevers share P
  CHECK(r.displacement(right[0], uy) == near(r.displacement(left[1], uy), 1e-14));
  CHECK(r.displacement(right[0], rz) == near(-r.displacement(left[1], rz), 1e-11));
  CHECK(r.joint_force(0, uy) == near((node_first ? -1 : 1) * P / 2, 1e-11));
  CHECK(r.reaction(right[1], uy) == near(-P / 2, 1e-11));
}

TEST_CASE("a joint with turned axes slides only along its free axis") {
  Builder b;
  b.material(E, E / 2.6);
  b.section(4e-3, I, I, 2 * I);
  const auto left = b.line({0, 0, 0}, {2, 0, 0}, 1), right = b.line({2, 0, 0}, {4, 0, 0}, 1);
  b.support(left[0], all_fixed);
  b.support(right[1], all_fixed);
  const Mat3 axes = turned(0.5, {1, 2, 3});
  b.frame.joints.push_back({left[1], right[0], fix("xzXYZ"), axes, "slide"});
  const Response r = StaticSolver(b.frame).solve(node_force(left[1], {300, P, -200}, {10, 20, 30}));
  const Eigen::RowVectorXd gap = r.displacement.row(left[1]) - r.displacement.row(right[0]);
  const Vec3 slide = axes.transpose() * gap.head<3>().transpose();
  CHECK(std::abs(slide.x()) < 1e-15);
  CHECK(std::abs(slide.z()) < 1e-15);
  CHECK(std::abs(slide.y()) > 1e-5);
  CHECK(gap.tail<3>().norm() < 1e-15);
  CHECK(std::abs(r.joint_force(0, 1)) < 1e-9);
}

TEST_CASE("a support on a joined node and the joint itself carry separate forces") {
  Builder b;
  b.material(E, E / 2.6);
  b.section(4e-3, I, I, 2 * I);
  const auto left = b.line({0, 0, 0}, {2, 0, 0}, 1), right = b.line({2, 0, 0}, {4, 0, 0}, 1);
  b.support(left[0], all_fixed);
  b.support(right[0], fix("y"));
  b.support(right[1], fix("xyzX"));
  b.frame.joints.push_back({left[1], right[0], all_fixed, Mat3::Identity(), "weld"});
  const Response r = StaticSolver(b.frame).solve(uniform_load(b.frame, {0, -500, 0}));
  // Clamped - held - pinned with two equal spans of 2 m: three-moment equation gives M1 = wL^2/14, M2 =
  // 3wL^2/28.
  const double w = 500, L = 2;
  CHECK(r.reaction(left[0], rz) == near(w * L * L / 14, 1e-10));
  CHECK(r.reaction(right[0], uy) == near(w * L + (3.0 / 28 - 1.0 / 14) * w * L + 3.0 / 28 * w * L, 1e-10));
  CHECK(r.reaction.col(uy).sum() == near(4 * w, 1e-12));
}

TEST_CASE("springs to ground react and springs between nodes pass their force on") {
  Builder b;
  b.material(E, E / 2.6);
  b.section(4e-3, I, I, 2 * I);
  const int fixed = b.node(0, 0, 0), middle = b.node(0, 0, 1), top = b.node(0, 0, 2);
  b.member(fixed, middle, 0, 0, Vec3::UnitX());
  b.support(fixed, all_fixed);
  Vec6 k;
  k << 1e6, 2e6, 3e6, 1e5, 1e5, 1e5;
  b.frame.springs.push_back({top, middle, k, Mat3::Identity(), "link"});
  Vec6 ground = Vec6::Zero();
  ground(0) = 5e5;
  b.frame.springs.push_back({top, -1, ground, Mat3::Identity(), "ground"});
  const Response r = StaticSolver(b.frame).solve(node_force(top, {800, 0, 0}));
  CHECK(r.reaction(top, ux) == near(-5e5 * r.displacement(top, ux), 1e-12));
  CHECK(r.reaction(top, ux) + r.reaction(fixed, ux) == near(-800, 1e-11));
  CHECK(r.spring_force(0, 0) == near(r.reaction(fixed, ux), 1e-10));
  // Moments about the base balance, so the arm between the two nodes makes no moment of its own.
  CHECK(r.reaction(fixed, ry) + 2 * r.reaction(top, ux) == near(-1600, 1e-10));
}

TEST_CASE("an imposed support displacement bends a clamped beam as the textbook says") {
  Builder b = straight_beam(4, 1);
  b.support(0, all_fixed);
  Vec6 settle = Vec6::Zero();
  settle(uy) = -0.005;
  b.support(1, all_fixed, settle);
  const Response r = StaticSolver(b.frame).solve(LoadCase{});
  CHECK(r.displacement(1, uy) == -0.005);
  CHECK(r.reaction(0, rz) == near(6 * E * I * 0.005 / 16, 1e-12));  // Roark: 6 E I d / L^2
  CHECK(r.reaction(0, uy) == near(12 * E * I * 0.005 / 64, 1e-12));
}

TEST_CASE("a frame without supports is reported as a mechanism of the whole frame") {
  Builder b = straight_beam(3, 3);
  CHECK_THROWS_AS(StaticSolver(b.frame), Mechanism);
  CHECK_THROWS_WITH(StaticSolver(b.frame), Contains("no support"));
}

TEST_CASE("a shaft that can spin about its own axis is named with its direction") {
  Builder b = straight_beam(3, 3);
  b.support(0, fix("xyz"));
  b.support(3, fix("yz"));
  try {
    StaticSolver solver(b.frame);
    FAIL("no mechanism reported");
  } catch (const Mechanism& m) {
    CHECK(m.dof == rx);
    CHECK(m.pivot_ratio < 1e-7);
    CHECK_THAT(m.what(), Contains("turns about x") && Contains("hold rx"));
  }
}

TEST_CASE("a node at which every member is released is named") {
  Builder b = straight_beam(3, 3);
  b.support(0, all_fixed);
  b.support(3, all_fixed);
  b.frame.members[0].release_to = fix("Y");
  b.frame.members[1].release_from = fix("Y");
  try {
    StaticSolver solver(b.frame);
    FAIL("no mechanism reported");
  } catch (const Mechanism& m) {
    CHECK(m.node == 1);
    CHECK(m.dof == ry);
    CHECK_THAT(m.what(), Contains("'n1'") && Contains("'b0'"));
  }
}

TEST_CASE("a member that its releases let slide under its own weight is named") {
  Builder b = straight_beam(3, 1);
  b.frame.materials[0].density = 7850;
  b.support(0, all_fixed);
  b.support(1, all_fixed);
  b.last().release_from = b.last().release_to = fix("z");
  LoadCase weight;
  weight.gravity = Vec3(0, 0, -9.81);
  const StaticSolver solver(b.frame);
  CHECK_THROWS_WITH(solver.solve(weight), Contains("'b0'") && Contains("moves along z"));
}

TEST_CASE("a fine cantilever is no mechanism although its last pivot is tiny") {
  Builder b = straight_beam(30, 400);
  b.support(0, all_fixed);
  const StaticSolver solver(b.frame);
  CHECK(solver.solve(node_force(400, {0, P, 0})).displacement(400, uy) ==
        near(P * 27000 / (3 * E * I), 1e-5));
}
