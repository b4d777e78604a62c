#include <Eigen/LU>

#include "fem/beam.h"
#include "fem/condensed.h"
#include "fem/statics.h"
#include "tests/fem/random_frame.h"

using namespace focalframe::test;

namespace {

unsigned some_seed() { return GENERATE(101u, 202u, 303u, 404u, 505u, 606u); }

Eigen::VectorXd flat_of(const Eigen::MatrixXd& by_node) {
  const Eigen::MatrixXd t = by_node.transpose();
  return Eigen::Map<const Eigen::VectorXd>(t.data(), t.size());
}

Eigen::MatrixXd unit_loads(const Frame& frame, unsigned seed, int count) {
  Random random(seed);
  Eigen::MatrixXd loads(frame.freedoms(), count);
  for (int c = 0; c < count; ++c)
    for (int i = 0; i < frame.freedoms(); ++i) loads(i, c) = random.between(-1000, 1000);
  return loads;
}

/// The whole frame and its load turned about a point and shifted.
Frame turned_frame(Frame f, const Mat3& R, const Vec3& shift) {
  for (Node& n : f.nodes) n.at = R * n.at + shift;
  for (Member& m : f.members) {
    m.up = R * m.up;
    m.offset_from = R * m.offset_from;
    m.offset_to = R * m.offset_to;
  }
  for (Spring& s : f.springs) s.axes = R * s.axes;
  for (Joint& j : f.joints) j.axes = R * j.axes;
  for (PointMass& p : f.masses) {
    p.offset = R * p.offset;
    p.inertia = R * p.inertia * R.transpose();
  }
  return f;
}

LoadCase turned_load(LoadCase l, const Mat3& R) {
  l.gravity = R * l.gravity;
  for (NodeLoad& n : l.nodes) n.force = R * n.force, n.moment = R * n.moment;
  for (LineLoad& q : l.lines)
    if (!q.member_axes) q.at_from = R * q.at_from, q.at_to = R * q.at_to;
  for (MemberPointLoad& p : l.points)
    if (!p.member_axes) p.force = R * p.force, p.moment = R * p.moment;
  return l;
}

/// Holds what random_frame holds, in any axes: by joints to held nodes.
void hold(Frame& f, int node, const Six& fix_what, const Mat3& axes) {
  f.nodes.push_back({f.nodes[static_cast<std::size_t>(node)].at, "ground of " + std::to_string(node)});
  const int ground = static_cast<int>(f.nodes.size()) - 1;
  f.supports.push_back({ground, all_fixed, Vec6::Zero()});
  f.joints.push_back({node, ground, fix_what, axes, "bearing"});
}

Frame held_by_joints(unsigned seed) {
  Frame f = random_frame(seed, 9, false);
  hold(f, 0, all_fixed, Mat3::Identity());
  hold(f, 4, fix("xyzX"), turned(0.4, {1, 1, 1}));
  return f;
}

}  // namespace

TEST_CASE("the stiffness and mass of a frame are symmetric and see no rigid motion or all of the mass") {
  const Frame f = random_frame(some_seed(), 9, false);
  const Eigen::MatrixXd K = assemble_stiffness(f), M = assemble_mass(f);
  CHECK(difference(K, K.transpose()) < 1e-13);
  CHECK(difference(M, M.transpose()) < 1e-13);
  const Vec3 shift(1, -2, 0.5), turn(0.1, 0.3, -0.2);
  Eigen::VectorXd u(f.freedoms()), s = Eigen::VectorXd::Zero(f.freedoms());
  for (std::size_t n = 0; n < f.nodes.size(); ++n) {
    u.segment<6>(static_cast<int>(6 * n)) << shift + turn.cross(f.nodes[n].at), turn;
    s(static_cast<int>(6 * n) + 1) = 1;
  }
  CHECK((K * u).norm() < 1e-12 * K.norm() * u.norm());
  CHECK(s.dot(M * s) == near(total_mass(f).mass, 1e-12));
}

TEST_CASE("gravity's node forces are the weight and act at the centre of mass") {
  const Frame f = random_frame(some_seed());
  LoadCase weight;
  weight.gravity = Vec3(1, 2, -9.81);
  const Eigen::VectorXd force = assemble_loads(f, {weight});
  Vec3 sum = Vec3::Zero(), moment = Vec3::Zero();
  for (std::size_t n = 0; n < f.nodes.size(); ++n) {
    const Vec6 at = force.segment<6>(static_cast<int>(6 * n));
    sum += at.head<3>();
    moment += at.tail<3>() + f.nodes[n].at.cross(Vec3(at.head<3>()));
  }
  const MassSummary mass = total_mass(f);
  CHECK((sum - mass.mass * weight.gravity).norm() < 1e-9 * sum.norm());
  CHECK((moment - mass.centre.cross(Vec3(mass.mass * weight.gravity))).norm() < 1e-9 * moment.norm());
}

TEST_CASE("sparse, dense and condensed solutions of a random frame agree") {
  const unsigned seed = some_seed();
  const Frame f = random_frame(seed);
  const LoadCase load = random_load(f, seed + 1);
  const Response r = StaticSolver(f).solve(load);
  CHECK(r.residual < 1e-10);

  const FreedomMap map = freedom_map(f);
  const Eigen::MatrixXd K = assemble_stiffness(f), P = map.map, A = P.transpose() * K * P;
  const Eigen::VectorXd loads = assemble_loads(f, {load}), x = A.fullPivLu().solve(P.transpose() * loads);
  CHECK(difference(flat_of(r.displacement), P * x) < 1e-9);

  const std::vector<Freedom> freedoms{{1, ux}, {1, rz}, {5, uy}, {7, rx}, {7, ry}};
  const Condensed c = condense(f, freedoms, loads);
  const Eigen::VectorXd v = c.stiffness.ldlt().solve(c.load);
  CHECK(difference(c.held_response + c.joint_response * v, flat_of(r.displacement)) < 1e-9);
}

TEST_CASE("reactions and loads are in equilibrium and every node is") {
  const unsigned seed = some_seed();
  const Frame f = held_by_joints(seed);
  const LoadCase load = random_load(f, seed + 2);
  const Response r = StaticSolver(f).solve(load);
  const Eigen::VectorXd applied = [&] {
    LoadCase without = load;  // temperature's node forces are not loads from outside
    without.temperatures.clear();
    return Eigen::VectorXd(assemble_loads(f, {without}));
  }();
  Vec3 force = Vec3::Zero(), moment = Vec3::Zero();
  for (std::size_t n = 0; n < f.nodes.size(); ++n) {
    const auto i = static_cast<int>(n);
    const Vec6 at = applied.segment<6>(6 * i) + r.reaction.row(i).transpose();
    force += at.head<3>();
    moment += at.tail<3>() + f.nodes[n].at.cross(Vec3(at.head<3>()));
  }
  const double scale = r.reaction.cwiseAbs().maxCoeff();
  CHECK(force.norm() < 1e-8 * scale);
  CHECK(moment.norm() < 1e-7 * scale);
  // Joint forces load both nodes: the bearing's axis that is free carries nothing.
  const auto last = static_cast<int>(f.joints.size()) - 1;
  CHECK(r.joint_force.row(last).tail<2>().norm() == 0);
  CHECK(r.joint_force.row(last).head<4>().norm() > 0);
}

TEST_CASE("Maxwell and Betti: work of one load on another's displacements is mutual") {
  const Frame f = random_frame(some_seed());
  const Eigen::MatrixXd loads = unit_loads(f, 9, 2), u = StaticSolver(f).displacements(loads);
  CHECK(loads.col(0).dot(u.col(1)) == near(loads.col(1).dot(u.col(0)), 1e-9));
}

TEST_CASE("the load's work is twice the strain energy") {
  const Frame f = random_frame(some_seed());
  const Eigen::VectorXd load = unit_loads(f, 8, 1), u = StaticSolver(f).displacements(load);
  CHECK(u.dot(assemble_stiffness(f) * u) == near(load.dot(u), 1e-9));
}

TEST_CASE("responses to loads add up") {
  const unsigned seed = some_seed();
  const Frame f = random_frame(seed);
  const LoadCase a = random_load(f, seed + 3), b = random_load(f, seed + 4);
  LoadCase both = a;
  both.gravity += b.gravity;
  both.nodes.insert(both.nodes.end(), b.nodes.begin(), b.nodes.end());
  both.lines.insert(both.lines.end(), b.lines.begin(), b.lines.end());
  both.points.insert(both.points.end(), b.points.begin(), b.points.end());
  both.temperatures.insert(both.temperatures.end(), b.temperatures.begin(), b.temperatures.end());
  const StaticSolver solver(f);
  const auto r = solver.solve(std::vector<LoadCase>{a, b, both});
  CHECK(difference(r[0].displacement + r[1].displacement, r[2].displacement) < 1e-10);
  CHECK(difference(r[0].end_force + r[1].end_force, r[2].end_force) < 1e-9);
  CHECK(difference(r[0].reaction + r[1].reaction, r[2].reaction) < 1e-9);
  CHECK(difference(solver.solve(both).displacement, r[2].displacement) < 1e-13);
}

TEST_CASE("turning and shifting frame and load turns the answer with them") {
  const unsigned seed = some_seed();
  const Frame f = held_by_joints(seed);
  const LoadCase load = random_load(f, seed + 5);
  const Mat3 R = turned(1.1, {0.3, -0.7, 0.5});
  const Response a = StaticSolver(f).solve(load);
  const Response b = StaticSolver(turned_frame(f, R, {4, -7, 11})).solve(turned_load(load, R));
  Eigen::MatrixXd expected = a.displacement;
  expected.leftCols<3>() = a.displacement.leftCols<3>() * R.transpose();
  expected.rightCols<3>() = a.displacement.rightCols<3>() * R.transpose();
  CHECK(difference(b.displacement, expected) < 1e-9);
  CHECK(difference(b.end_force, a.end_force) < 1e-9);
  CHECK(difference(b.joint_force, a.joint_force) < 1e-8);
}

TEST_CASE("a frame twice as large under the same forces moves as dimensions say") {
  Builder small, large;
  for (Builder* b : {&small, &large}) {
    const double k = b == &large ? 2 : 1;
    b->material(210e9, 81e9);
    b->section(3e-3 * k * k, 5e-6 * std::pow(k, 4), 2e-6 * std::pow(k, 4), 3e-6 * std::pow(k, 4),
               1e-3 * k * k, 2e-3 * k * k);
    b->node(0, 0, 0), b->node(2 * k, 0, k), b->node(k, 3 * k, 0);
    b->member(0, 1), b->member(1, 2);
    b->support(0, all_fixed);
  }
  const Response a = StaticSolver(small.frame).solve(node_force(2, {100, 200, 300}));
  const Response b = StaticSolver(large.frame).solve(node_force(2, {100, 200, 300}));
  CHECK(difference(2 * b.displacement.leftCols<3>(), a.displacement.leftCols<3>()) < 1e-11);
  CHECK(difference(4 * b.displacement.rightCols<3>(), a.displacement.rightCols<3>()) < 1e-11);
}

TEST_CASE("numbering nodes and members differently changes nothing") {
  const unsigned seed = some_seed();
  const Frame f = random_frame(seed);
  const LoadCase load = random_load(f, seed + 6);
  const int n = static_cast<int>(f.nodes.size()), count = static_cast<int>(f.members.size());
  const auto node = [&](int i) { return (i * 7 + 3) % n; };  // n = 10 and 7 have no common factor
  Frame g = f;
  LoadCase other = load;
  for (int i = 0; i < n; ++i)
    g.nodes[static_cast<std::size_t>(node(i))] = f.nodes[static_cast<std::size_t>(i)];
  for (int m = 0; m < count; ++m)
    g.members[static_cast<std::size_t>(count - 1 - m)] = f.members[static_cast<std::size_t>(m)];
  for (Member& m : g.members) m.from = node(m.from), m.to = node(m.to);
  for (Support& s : g.supports) s.node = node(s.node);
  for (Spring& s : g.springs) s.node = node(s.node), s.other = s.other < 0 ? -1 : node(s.other);
  for (Joint& j : g.joints) j.node = node(j.node), j.other = node(j.other);
  for (PointMass& p : g.masses) p.node = node(p.node);
  for (NodeLoad& l : other.nodes) l.node = node(l.node);
  for (LineLoad& l : other.lines) l.member = count - 1 - l.member;
  for (MemberPointLoad& l : other.points) l.member = count - 1 - l.member;
  for (MemberTemperature& l : other.temperatures) l.member = count - 1 - l.member;
  const Response a = StaticSolver(f).solve(load), b = StaticSolver(g).solve(other);
  Eigen::MatrixXd moved(n, 6);
  for (int i = 0; i < n; ++i) moved.row(i) = b.displacement.row(node(i));
  CHECK(difference(moved, a.displacement) < 1e-9);
}

TEST_CASE("reading every member from its other end changes no displacement") {
  const unsigned seed = some_seed();
  const Frame f = random_frame(seed);
  LoadCase load = random_load(f, seed + 7);
  for (LineLoad& l : load.lines) l.member_axes = false;
  for (MemberPointLoad& l : load.points) l.member_axes = false;
  Frame g = f;
  LoadCase other = load;
  for (Member& m : g.members) {
    std::swap(m.from, m.to);
    std::swap(m.offset_from, m.offset_to);
    std::swap(m.release_from, m.release_to);
    std::swap(m.spring_from, m.spring_to);
  }
  for (LineLoad& l : other.lines) {
    l = {l.member, 1 - l.to, 1 - l.from, l.at_to, l.at_from, false};
  }
  for (MemberPointLoad& l : other.points) l.at = 1 - l.at;
  for (MemberTemperature& t : other.temperatures) t.gradient_y = -t.gradient_y;  // y turns over, z stays
  CHECK(difference(StaticSolver(f).solve(load).displacement, StaticSolver(g).solve(other).displacement) <
        1e-9);
}

TEST_CASE("dividing members changes no node's displacement") {
  const Frame f = random_frame(777, 6);
  LoadCase load;
  load.gravity = Vec3(0, 1, -9.81);
  load.nodes.push_back({3, Vec3(100, 200, 300), Vec3(10, 20, 30)});
  Frame g = f;
  g.members.clear();
  for (const Member& m : f.members) {
    const Vec3 a = f.nodes[static_cast<std::size_t>(m.from)].at + m.offset_from;
    const Vec3 b = f.nodes[static_cast<std::size_t>(m.to)].at + m.offset_to;
    Member first = m, second = m;
    g.nodes.push_back({a + 0.3 * (b - a), m.name + " divided"});
    first.to = second.from = static_cast<int>(g.nodes.size()) - 1;
    first.offset_to = second.offset_from = Vec3::Zero();
    first.release_to = second.release_from = {};
    first.spring_to = second.spring_from = {};
    g.members.push_back(first);
    g.members.push_back(second);
  }
  const Eigen::MatrixXd u = StaticSolver(f).solve(load).displacement;
  CHECK(difference(StaticSolver(g).solve(load).displacement.topRows(u.rows()), u) < 1e-8);
}

TEST_CASE("patch tests: constant strain, curvature and twist in unequal pieces") {
  Builder b;
  b.material(210e9, 81e9);
  b.section(3e-3, 5e-6, 2e-6, 3e-6, 1e-3, 2e-3);
  const Mat3 R = turned(0.8, {1, 2, -1});
  const std::vector<double> places{0, 0.4, 0.5, 1.3, 2.0};
  for (std::size_t i = 0; i < places.size(); ++i) {
    const Vec3 at = R * Vec3(places[i], 0, 0);
    b.node(at.x(), at.y(), at.z());
    if (i > 0) b.member(static_cast<int>(i) - 1, static_cast<int>(i), 0, 0, R * Vec3::UnitZ());
  }
  b.support(0, all_fixed);
  const Vec3 force = R * Vec3(1000, 0, 0), moment = R * Vec3(300, 200, -100);
  const Response r = StaticSolver(b.frame).solve(node_force(4, force, moment));
  for (std::size_t i = 0; i < places.size(); ++i) {
    const double x = places[i];
    const Eigen::RowVectorXd row = r.displacement.row(static_cast<int>(i));
    const Vec3 u = R.transpose() * row.head<3>().transpose(),
               turn = R.transpose() * row.tail<3>().transpose();
    CHECK((u - Vec3(1000 * x / (210e9 * 3e-3), -100 * x * x / (2 * 210e9 * 2e-6),
                    -200 * x * x / (2 * 210e9 * 5e-6)))
              .norm() < 1e-12);
    CHECK((turn - Vec3(300 * x / (81e9 * 3e-6), 200 * x / (210e9 * 5e-6), -100 * x / (210e9 * 2e-6))).norm() <
          1e-12);
  }
}
