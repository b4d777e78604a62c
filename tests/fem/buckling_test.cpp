#include "fem/buckling.h"

#include "fem/assembly.h"
#include "fem/geometric.h"
#include "tests/fem/random_frame.h"

using namespace focalframe::test;

namespace {

Builder column(int pieces) {
  Builder b = straight_beam(4, pieces);
  b.frame.sections[0].Iy = 1e-3;
  b.frame.sections[0].J = 1e-3;
  b.support(0, fix("xyzXY"));
  b.support(pieces, fix("yzXY"));
  return b;
}

constexpr double euler = 9.869604401089358 * 210e9 * 8e-6 / 16;

}  // namespace

// A stressed member turned as a rigid body: its end forces turn with it, moments (semitangential) by half.
TEST_CASE("geometric stiffness turns the forces of a member that turns as a rigid body") {
  const unsigned seed = GENERATE(1u, 2u, 3u, 4u);
  const Frame frame = random_frame(seed);
  LoadCase load = node_force(2, {1000, -2000, 500}, {300, 200, -400});
  load.nodes.push_back({5, Vec3(400, 100, -3000), Vec3(-100, 500, 50)});
  const Response r = StaticSolver(frame).solve(load);
  const Vec3 turn(0.2, -0.3, 0.1);
  for (int m = 0; m < static_cast<int>(frame.members.size()); ++m) {
    const Member& member = frame.members[static_cast<std::size_t>(m)];
    const Vec3 a = frame.nodes[static_cast<std::size_t>(member.from)].at,
               b = frame.nodes[static_cast<std::size_t>(member.to)].at;
    Vec12 u;
    u << turn.cross(a), turn, turn.cross(b), turn;
    const Vec12 change = geometric_stiffness(frame, load, r, m) * u;
    const Mat3 axes = member_axes(frame, m);
    const Vec12 ends = r.end_force.row(m);
    Vec12 expected;
    for (int end = 0; end < 2; ++end) {
      const Vec3 force = axes.transpose() * ends.segment<3>(6 * end),
                 moment = axes.transpose() * ends.segment<3>(6 * end + 3);
      const Vec3 arm = end == 0 ? member.offset_from : member.offset_to;
      expected.segment<3>(6 * end) = turn.cross(force);
      // Moment about the node: half of the couple's turn, and the arm's end moves by turn x arm under the
      // force that the node feels, in the symmetric form of the arm's own second-order motion.
      expected.segment<3>(6 * end + 3) = turn.cross(moment) / 2 + arm.cross(turn.cross(force)) +
                                         (force * arm.dot(turn) + arm * force.dot(turn)) / 2 -
                                         force.dot(arm) * turn;
    }
    CHECK((change - expected).norm() < 1e-9 * ends.norm());
  }
}

// The same for a whole frame with hinges, springs, releases and arms, its supports replaced by what they
// give: every node is in equilibrium as before, but for the turned outside forces.
TEST_CASE("a stressed frame turned as a rigid body needs nothing but its outside forces turned with it") {
  const unsigned seed = GENERATE(1u, 2u, 3u, 4u, 5u, 6u);
  Frame frame = random_frame(seed, 9, false);
  const Frame loose = frame;
  frame.supports.push_back({0, all_fixed, Vec6::Zero()});
  LoadCase load = node_force(2, {1000, -2000, 500}, {300, 200, -400});
  load.nodes.push_back({7, Vec3(400, 100, -3000), Vec3(-100, 500, 50)});
  const Response r = StaticSolver(frame).solve(load);
  load.nodes.push_back({0, r.reaction.row(0).head<3>().transpose(), r.reaction.row(0).tail<3>().transpose()});
  const Vec3 turn(0.2, -0.3, 0.1);
  Eigen::VectorXd u(loose.freedoms()), expected = Eigen::VectorXd::Zero(loose.freedoms());
  for (int n = 0; n < static_cast<int>(loose.nodes.size()); ++n)
    u.segment<6>(6 * n) << turn.cross(loose.nodes[static_cast<std::size_t>(n)].at), turn;
  for (const NodeLoad& n : load.nodes) {
    expected.segment<3>(6 * n.node) += turn.cross(n.force);
    expected.segment<3>(6 * n.node + 3) += turn.cross(n.moment) / 2;
  }
  const SparseMatrix free = freedom_map(loose).map;
  const Eigen::VectorXd change = free.transpose() * (assemble_geometric_stiffness(loose, load, r) * u);
  CHECK(difference(change, free.transpose() * expected) < 1e-9);
}

TEST_CASE("geometric stiffness is symmetric and proportional to the load") {
  const Frame frame = random_frame(6);
  const LoadCase one = random_load(frame, 7);
  LoadCase two = one;
  two.gravity *= 2;
  for (NodeLoad& l : two.nodes) l.force *= 2, l.moment *= 2;
  for (LineLoad& l : two.lines) l.at_from *= 2, l.at_to *= 2;
  for (MemberPointLoad& l : two.points) l.force *= 2, l.moment *= 2;
  for (MemberTemperature& l : two.temperatures) l.uniform *= 2, l.gradient_y *= 2, l.gradient_z *= 2;
  const StaticSolver solver(frame);
  const Eigen::MatrixXd A = assemble_geometric_stiffness(frame, one, solver.solve(one));
  const Eigen::MatrixXd B = assemble_geometric_stiffness(frame, two, solver.solve(two));
  CHECK(difference(A, A.transpose()) < 1e-12);
  CHECK(difference(2 * A, B) < 1e-9);
}

TEST_CASE("buckling factors ascend, solve their equation and do not depend on axes") {
  const Frame frame = random_frame(8);
  LoadCase load = random_load(frame, 9);
  const auto modes = buckling_modes(frame, load, 4);
  REQUIRE(modes.size() == 4);
  const SparseMatrix K = assemble_stiffness(frame);
  const SparseMatrix G = assemble_geometric_stiffness(frame, load, StaticSolver(frame).solve(load));
  for (std::size_t k = 0; k < 4; ++k) {
    CHECK(modes[k].residual < 1e-6);
    if (k > 0) CHECK(modes[k].factor >= modes[k - 1].factor);
    const Eigen::MatrixXd t = modes[k].shape.transpose();
    const Eigen::VectorXd x = Eigen::Map<const Eigen::VectorXd>(t.data(), t.size());
    CHECK(x.dot(K * x) == near(-modes[k].factor * x.dot(G * x), 1e-6));
  }
  load.gravity = Vec3::Zero();
  load.nodes = {{4, Vec3(1e3, 2e3, -3e3)}};
  load.lines.clear(), load.points.clear(), load.temperatures.clear();
  Frame turned_one = random_frame(8);
  turned_one.supports.erase(turned_one.supports.begin() + 1);  // that one holds frame axes
  Frame straight = turned_one;
  const Mat3 R = turned(0.9, {1, -2, 0.5});
  for (Node& n : turned_one.nodes) n.at = R * n.at;
  for (Member& m : turned_one.members)
    m.up = R * m.up, m.offset_from = R * m.offset_from, m.offset_to = R * m.offset_to;
  for (Spring& s : turned_one.springs) s.axes = R * s.axes;
  for (Joint& j : turned_one.joints) j.axes = R * j.axes;
  const double before = buckling_modes(straight, load, 1).at(0).factor;
  load.nodes[0].force = R * load.nodes[0].force;
  CHECK(buckling_modes(turned_one, load, 1).at(0).factor == near(before, 1e-7));
}

TEST_CASE("a pulled bar does not buckle") {
  Builder b = column(8);
  CHECK(buckling_modes(b.frame, node_force(8, {1000, 0, 0}), 3).empty());
}

TEST_CASE("factors above the greatest one asked for are left out") {
  Builder b = column(8);
  const LoadCase load = node_force(8, {-euler / 10, 0, 0});
  CHECK(buckling_modes(b.frame, load, 1).at(0).factor == near(10, 1e-3));
  CHECK(buckling_modes(b.frame, load, 1, {}, 5).empty());
  CHECK(buckling_modes(b.frame, load, 8, {}, 45).size() == 2);  // 10, 40, 90 ...
}

TEST_CASE("a constant load takes its share of the stability") {
  Builder b = column(8);
  const LoadCase unit = node_force(8, {-euler / 10, 0, 0});
  CHECK(buckling_modes(b.frame, unit, 1, node_force(8, {-0.4 * euler, 0, 0})).at(0).factor == near(6, 1e-3));
  CHECK(buckling_modes(b.frame, unit, 1, node_force(8, {0.5 * euler, 0, 0})).at(0).factor == near(15, 1e-3));
  CHECK_THROWS_AS(buckling_modes(b.frame, unit, 1, node_force(8, {-1.1 * euler, 0, 0})), Unstable);
}

// k = P h: a rigid arm, an offset mass and a stiff member, each standing on a rotational spring.
TEST_CASE("inverted pendulums fall when the load's moment outgrows the spring") {
  Vec6 k;
  k << 1e9, 1e9, 1e9, 1e9, 5e3, 1e9;
  SECTION("mass on an offset") {
    Builder b;
    b.node(0, 0, 0);
    b.frame.springs.push_back({0, -1, k, Mat3::Identity(), "foot"});
    b.mass(0, 100, Mat3::Zero(), Vec3(0, 0, 2));
    LoadCase weight;
    weight.gravity = Vec3(0, 0, -10);
    CHECK(buckling_modes(b.frame, weight, 1).at(0).factor == near(5e3 / (100 * 10 * 2), 1e-6));
  }
  SECTION("stiff member on two rigid arms") {
    Builder b;
    b.material(1e11, 4e10);
    b.section(1, 1, 1, 1);
    b.node(0, 0, 0), b.node(0, 0, 2);
    b.member(0, 1, 0, 0, Vec3::UnitX());
    b.last().offset_from = Vec3(0, 0, 0.5);
    b.last().offset_to = Vec3(0, 0, -0.3);
    b.frame.springs.push_back({0, -1, k, Mat3::Identity(), "foot"});
    CHECK(buckling_modes(b.frame, node_force(1, {0, 0, -1}), 1).at(0).factor == near(5e3 / 2, 1e-6));
  }
  SECTION("a node held by springs at the end of an arm") {
    Builder b;
    b.node(0, 0, 0), b.node(0, 0, -1);
    b.support(1, all_fixed);
    Vec6 stiff;
    stiff << 1e9, 1e9, 1e9, 1e9, 5e3, 1e9;
    b.frame.springs.push_back({0, 1, stiff, Mat3::Identity(), "arm"});
    CHECK(buckling_modes(b.frame, node_force(0, {0, 0, -1}), 1).at(0).factor == near(5e3, 1e-5));
  }
}

TEST_CASE("second order without axial force is first order") {
  Builder b = column(4);
  const LoadCase load = node_force(2, {0, 10, 0});
  const SecondOrder s = second_order(b.frame, load);
  CHECK(difference(s.response.displacement, StaticSolver(b.frame).solve(load).displacement) < 1e-6);
  CHECK(s.change < 1e-6);
}

TEST_CASE("second-order reactions balance the loads on the undeformed and moments on the deformed column") {
  Builder b = column(8);
  LoadCase load = node_force(4, {0, 1000, 0});
  load.nodes.push_back({8, Vec3(-0.5 * euler, 0, 0)});
  const Response r = second_order(b.frame, load).response;
  CHECK(r.reaction.col(uy).sum() == near(-1000, 1e-8));
  CHECK(r.reaction(0, ux) == near(0.5 * euler, 1e-8));
  // Free body of half the column, its arm shortened by the compression: M = R_y (L / 2 + u) + P v.
  const double M = std::abs(r.end_force(4, 5)), v = r.displacement(4, uy), u = r.displacement(4, ux);
  CHECK(M == near(500 * (2 + u) + 0.5 * euler * v, 1e-7));
}
