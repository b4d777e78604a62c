#include "fem/beam.h"

#include <Eigen/Eigenvalues>

#include "fem/section.h"
#include "tests/fem/random_frame.h"

using namespace focalframe::test;

namespace {

/// Node motions of a rigid body.
Vec12 rigid_motion(const Frame& frame, int member, const Vec3& shift, const Vec3& turn) {
  const Member& m = frame.members[static_cast<std::size_t>(member)];
  const auto at = [&](int n) { return frame.nodes[static_cast<std::size_t>(n)].at; };
  Vec12 u;
  u << shift + turn.cross(at(m.from)), turn, shift + turn.cross(at(m.to)), turn;
  return u;
}

/// One member between two nodes with offsets at both ends.
Builder one_member(double shear_area = 1e-3) {
  Builder b;
  b.material(210e9, 81e9, 7850, 12e-6);
  b.section(3e-3, 5e-6, 2e-6, 3e-6, shear_area, shear_area / 2);
  b.node(0.3, -0.2, 0.5), b.node(2.1, 1.4, 1.3);
  b.member(0, 1, 0, 0, Vec3(0.2, -0.1, 1));
  b.last().offset_from = Vec3(0.05, 0.1, -0.15);
  b.last().offset_to = Vec3(-0.1, 0.02, 0.2);
  return b;
}

}  // namespace

TEST_CASE("rigid motion strains no member, whatever its offsets, releases and end springs") {
  const Frame frame = random_frame(GENERATE(range(1u, 9u)));
  Random random(77);
  for (int m = 0; m < static_cast<int>(frame.members.size()); ++m) {
    const Mat12 K = stiffness(frame, m);
    const Vec12 u = rigid_motion(frame, m, random.vector(1), random.vector(0.1));
    CHECK((K * u).norm() < 1e-11 * K.norm() * u.norm());
    CHECK((end_force_matrix(frame, m) * u).norm() < 1e-11 * K.norm() * u.norm());
  }
}

TEST_CASE("a member's stiffness is symmetric and never negative") {
  const Frame frame = random_frame(GENERATE(range(11u, 15u)));
  for (int m = 0; m < static_cast<int>(frame.members.size()); ++m) {
    const Mat12 K = stiffness(frame, m);
    CHECK(difference(K, K.transpose()) < 1e-13);
    const Eigen::SelfAdjointEigenSolver<Mat12> eigen(K);
    CHECK(eigen.eigenvalues()(0) > -1e-9 * eigen.eigenvalues()(11));
  }
}

TEST_CASE("a released end force is exactly zero") {
  Builder b = one_member();
  b.last().release_from = fix("YZ");
  b.last().release_to = fix("xZ");
  const Mat12 forces = end_force_matrix(b.frame, 0);
  const Vec12 fixed = fixed_end_force(b.frame, 0, random_load(b.frame, 3));
  for (const int k : {4, 5, 6, 11}) {
    CHECK(forces.row(k).norm() == 0);
    CHECK(fixed(k) == 0);
  }
  CHECK(forces.row(10).norm() > 0);
}

TEST_CASE("a very stiff end spring is no spring and a very soft one a release") {
  Builder rigid = one_member(), stiff = one_member(), soft = one_member(), released = one_member();
  stiff.last().spring_to = {1e16, 1e16, 1e16, 1e14, 1e14, 1e14};
  soft.last().spring_to = {0, 0, 0, 0, 1e-3, 1e-3};
  released.last().release_to = fix("YZ");
  CHECK(difference(stiffness(rigid.frame, 0), stiffness(stiff.frame, 0)) < 1e-6);
  CHECK(difference(stiffness(released.frame, 0), stiffness(soft.frame, 0)) < 1e-6);
}

TEST_CASE("the consistent mass of a rigidly moving member is its mass and its inertia") {
  const Builder b = one_member();
  const Mat12 M = consistent_mass(b.frame, 0);
  CHECK(difference(M, M.transpose()) < 1e-14);
  const double L = member_length(b.frame, 0), mass = 7850 * 3e-3 * L;
  const Vec12 shift = rigid_motion(b.frame, 0, Vec3(1, 2, -1), Vec3::Zero());
  CHECK(shift.dot(M * shift) == near(6 * mass, 1e-12));
  const Mat3 axes = member_axes(b.frame, 0);
  const Vec3 start = b.frame.nodes[0].at + b.frame.members[0].offset_from;
  const Vec3 centre = start + axes.row(0).transpose() * L / 2;
  const Vec3 turn(0.3, -0.2, 0.5);
  const Vec12 u = rigid_motion(b.frame, 0, Vec3::Zero(), turn);
  const Vec3 local = axes * turn;
  const double rod = mass * L * L / 12, density = 7850 * L;
  const double own = density * 7e-6 * local.x() * local.x() + (rod + density * 5e-6) * local.y() * local.y() +
                     (rod + density * 2e-6) * local.z() * local.z();
  CHECK(u.dot(M * u) == near(mass * turn.cross(centre).squaredNorm() + own, 1e-12));
}

TEST_CASE("fixed-end forces balance the load on the member about any point") {
  Builder b = one_member();
  const unsigned kind = GENERATE(0u, 1u, 2u);
  if (kind == 1) b.last().release_from = fix("YZ");
  if (kind == 2) b.last().spring_to = {0, 1e6, 0, 0, 1e5, 2e5};
  LoadCase load;
  load.gravity = Vec3(1, -2, -9);
  load.lines.push_back({0, 0.1, 0.7, Vec3(100, 200, -300), Vec3(-50, 20, 400), false});
  load.points.push_back({0, 0.3, Vec3(500, -100, 50), Vec3(10, 20, 30), false});
  const Vec12 fixed = fixed_end_force(b.frame, 0, load);
  const Mat3 axes = member_axes(b.frame, 0);
  const double L = member_length(b.frame, 0);
  const Vec3 start = b.frame.nodes[0].at + b.frame.members[0].offset_from, x = axes.row(0);
  Vec3 force = axes.transpose() * (fixed.segment<3>(0) + fixed.segment<3>(6));
  Vec3 moment = axes.transpose() * (fixed.segment<3>(3) + fixed.segment<3>(9)) +
                start.cross(axes.transpose() * fixed.segment<3>(0)) +
                (start + L * x).cross(axes.transpose() * fixed.segment<3>(6));
  const auto add = [&](double at, const Vec3& f, const Vec3& m = Vec3::Zero()) {
    force += f;
    moment += m + (start + at * L * x).cross(f);
  };
  add(0.5, 7850 * 3e-3 * L * load.gravity);
  add(0.3, load.points[0].force, load.points[0].moment);
  const int n = 2000;
  for (int i = 0; i < n; ++i) {
    const double s = (i + 0.5) / n;
    add(0.1 + 0.6 * s, ((1 - s) * load.lines[0].at_from + s * load.lines[0].at_to) * 0.6 * L / n);
  }
  CHECK(force.norm() < 1e-9 * fixed.norm());
  CHECK(moment.norm() < 1e-6 * fixed.norm());
}

TEST_CASE("a line load is the sum of its parts and a short one a point load") {
  Builder b = one_member();
  b.last().release_to = fix("Z");
  const Vec3 q(100, -200, 300), r(50, 500, -100);
  const auto fixed = [&](const LineLoad& l) {
    LoadCase load;
    load.lines.push_back(l);
    return fixed_end_force(b.frame, 0, load);
  };
  const Vec12 whole = fixed({0, 0.2, 0.8, q, r, false});
  const Vec3 half = (q + r) / 2;
  const Vec12 parts = fixed({0, 0.2, 0.5, q, half, false}) + fixed({0, 0.5, 0.8, half, r, false});
  CHECK(difference(whole, parts) < 1e-12);
  LoadCase point;
  point.points.push_back({0, 0.4, q, Vec3::Zero(), false});
  const double width = 1e-4, L = member_length(b.frame, 0);
  const Vec12 narrow = fixed({0, 0.4 - width, 0.4 + width, q / (2 * width * L), q / (2 * width * L), false});
  CHECK(difference(narrow, fixed_end_force(b.frame, 0, point)) < 1e-6);
}

TEST_CASE("loads in member axes are the same loads turned") {
  const Builder b = one_member();
  const Mat3 axes = member_axes(b.frame, 0);
  LoadCase local, global;
  local.lines.push_back({0, 0.1, 0.9, Vec3(1, 2, 3), Vec3(-4, 5, 6), true});
  local.points.push_back({0, 0.6, Vec3(7, 8, 9), Vec3(1, -2, 3), true});
  global.lines.push_back(
      {0, 0.1, 0.9, axes.transpose() * Vec3(1, 2, 3), axes.transpose() * Vec3(-4, 5, 6), false});
  global.points.push_back(
      {0, 0.6, axes.transpose() * Vec3(7, 8, 9), axes.transpose() * Vec3(1, -2, 3), false});
  CHECK(difference(fixed_end_force(b.frame, 0, local), fixed_end_force(b.frame, 0, global)) < 1e-13);
}

TEST_CASE("the motion along a rigidly moving member is that of the body") {
  Builder b = one_member();
  const Vec3 shift(0.1, 0.2, -0.3), turn(0.02, -0.01, 0.03);
  const Vec12 u = rigid_motion(b.frame, 0, shift, turn);
  const Vec3 start = b.frame.nodes[0].at + b.frame.members[0].offset_from;
  const Vec3 along = member_axes(b.frame, 0).row(0).transpose() * member_length(b.frame, 0);
  for (const double xi : {0.0, 0.3, 1.0})
    for (const bool of_section : {false, true}) {
      const Vec6 motion = motion_at(b.frame, 0, xi, of_section) * u;
      CHECK((motion.head<3>() - shift - turn.cross(start + xi * along)).norm() < 1e-14);
      CHECK((motion.tail<3>() - turn).norm() < 1e-13);
    }
}

TEST_CASE("the axis turns as its displacement's slope, the section less by the shear angle") {
  const Builder b = one_member();
  const Mat3 axes = member_axes(b.frame, 0);
  const double L = member_length(b.frame, 0), h = 1e-5, xi = 0.37;
  Vec12 u;
  Random random(5);
  for (int k = 0; k < 12; ++k) u(k) = random.between(-1, 1);
  const auto local = [&](double at, bool of_section) {
    const Vec6 m = motion_at(b.frame, 0, at, of_section) * u;
    Vec6 turned_motion;
    turned_motion << axes * m.head<3>(), axes * m.tail<3>();
    return turned_motion;
  };
  const Vec6 slope = (local(xi + h, false) - local(xi - h, false)) / (2 * h * L);
  CHECK(local(xi, false)(rz) == near(slope(uy), 1e-8));
  CHECK(local(xi, false)(ry) == near(-slope(uz), 1e-8));
  const Vec12 forces = end_force_matrix(b.frame, 0) * u;
  CHECK(local(xi, false)(rz) - local(xi, true)(rz) == near(forces(7) / (81e9 * 1e-3), 1e-6));
  CHECK(local(xi, false)(ry) - local(xi, true)(ry) == near(-forces(8) / (81e9 * 0.5e-3), 1e-6));
}

TEST_CASE("a member read from its other end is the same member") {
  const Builder b = one_member();
  Frame reversed = b.frame;
  Member& m = reversed.members[0];
  std::swap(m.from, m.to);
  std::swap(m.offset_from, m.offset_to);
  const Mat12 K = stiffness(b.frame, 0), R = stiffness(reversed, 0);
  Mat12 swapped;
  swapped << R.bottomRightCorner<6, 6>(), R.bottomLeftCorner<6, 6>(), R.topRightCorner<6, 6>(),
      R.topLeftCorner<6, 6>();
  CHECK(difference(K, swapped) < 1e-13);
}
