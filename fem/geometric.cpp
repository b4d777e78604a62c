#include "fem/geometric.h"

#include "fem/diagram.h"
#include "fem/element.h"
#include "fem/geometric_parts.h"
#include "fem/member_loads.h"
#include "fem/quadrature.h"

namespace focalframe::fem {
namespace {

using Row = Eigen::Matrix<double, 1, 12>;

/// Hessian of a * b.
Mat12 product(const Row& a, const Row& b) { return a.transpose() * b + b.transpose() * a; }

/// Hessian of the energy per length in the head comment of geometric.h.
Mat12 energy_density(const Mat6x12& B, const Mat6x12& D, const Resultants& r, double polar_radius_2) {
  const Row u = D.row(0), v = D.row(1), w = D.row(2);
  const Row x = B.row(3), y = B.row(4), z = B.row(5);
  const Row dx = D.row(3), dy = D.row(4), dz = D.row(5);
  Mat12 H = r.N * (v.transpose() * v + w.transpose() * w + polar_radius_2 * dx.transpose() * dx);
  H += r.Vy * (product(x, w) - product(z, u) + product(x, y) / 2);
  H += r.Vz * (product(y, u) - product(x, v) + product(x, z) / 2);
  H -= r.T / 2 * (product(y, dz) - product(z, dy));
  H -= r.My / 2 * (product(z, dx) - product(x, dz));
  H -= r.Mz / 2 * (product(x, dy) - product(y, dx));
  return H;
}

/// Hessian of force . (theta x (theta x arm)) / 2 in theta: second-order motion of a rigid arm's end.
Mat3 arm_hessian(const Vec3& force, const Vec3& arm) {
  return (force * arm.transpose() + arm * force.transpose()) / 2 - force.dot(arm) * Mat3::Identity();
}

Mat3 cross_matrix(const Vec3& v) {
  Mat3 m;
  m << 0, -v.z(), v.y(), v.z(), 0, -v.x(), -v.y(), v.x(), 0;
  return m;
}

/// Hessian of -M . (theta_A x theta_B) / 2 - F . (theta_mean x (u_B - u_A)) over the freedoms of sides A and
/// B of a connection that puts force F and moment M on A.
Mat12 connection_hessian(const Vec3& force, const Vec3& moment) {
  Mat12 K = Mat12::Zero();
  K.block<3, 3>(3, 9) = cross_matrix(moment) / 2;
  for (const int turn : {3, 9}) {
    K.block<3, 3>(turn, 6) += cross_matrix(force) / 2;
    K.block<3, 3>(turn, 0) -= cross_matrix(force) / 2;
  }
  return K + K.transpose();
}

/// The connections between the outer and the inner side of a member's ends.
Mat12 soft_ends(const Element& e, const Vec12& end_force) {
  const Mat12 inner = e.inner();
  Mat12 K = Mat12::Zero();
  for (const int first : {0, 6}) {
    Eigen::Matrix<double, 12, 12> sides = Mat12::Zero();  // outer, inner motion of this end per outer motions
    sides.block<6, 6>(0, first) = Eigen::Matrix<double, 6, 6>::Identity();
    sides.bottomRows<6>() = inner.middleRows<6>(first);
    // The force on the outer side is the opposite of that on the member.
    K += sides.transpose() *
         connection_hessian(-end_force.segment<3>(first), -end_force.segment<3>(first + 3)) * sides;
  }
  return K;
}

}  // namespace

Mat12 inner_geometric_stiffness(const Frame& frame, const LoadCase& load, const Response& response,
                                int member, const Element& e) {
  const Section& s =
      frame.sections[static_cast<std::size_t>(frame.members[static_cast<std::size_t>(member)].section)];
  const double polar_radius_2 = (s.Iy + s.Iz) / s.A;
  const std::vector<double> breaks = load_breaks(load, member);
  Mat12 K = Mat12::Zero();
  for (std::size_t i = 1; i < breaks.size(); ++i) {
    const double a = breaks[i - 1], width = breaks[i] - a;
    for (const GaussPoint& g : gauss_points) {
      const double xi = a + g.at * width;
      K += g.weight * width * e.span.length *
           energy_density(span_motion(e.span, xi, true), span_motion_slope(e.span, xi),
                          resultants_at(frame, load, response, member, xi), polar_radius_2);
    }
  }
  if (!e.soft) return K;
  return e.inner().transpose() * K * e.inner() + soft_ends(e, response.end_force.row(member).transpose());
}

Mat12 geometric_stiffness(const Frame& frame, const LoadCase& load, const Response& response, int member) {
  const Member& m = frame.members.at(static_cast<std::size_t>(member));
  const Element e = make_element(frame, member);
  Mat12 K = e.carry.transpose() * inner_geometric_stiffness(frame, load, response, member, e) * e.carry;
  const Vec12 ends = response.end_force.row(member);
  K.block<3, 3>(3, 3) += arm_hessian(e.axes.transpose() * ends.segment<3>(0), m.offset_from);
  K.block<3, 3>(9, 9) += arm_hessian(e.axes.transpose() * ends.segment<3>(6), m.offset_to);
  return K;
}

SparseMatrix assemble_geometric_stiffness(const Frame& frame, const LoadCase& load,
                                          const Response& response) {
  std::vector<Eigen::Triplet<double>> triplets;
  const auto add_rotation = [&](int node, const Mat3& block) {
    for (int i = 0; i < 3; ++i)
      for (int j = 0; j < 3; ++j) triplets.emplace_back(6 * node + 3 + i, 6 * node + 3 + j, block(i, j));
  };
  const auto add = [&](int node, int other, const Mat12& K) {
    const auto freedom = [&](int k) { return k < 6 ? 6 * node + k : 6 * other + k - 6; };
    for (int i = 0; i < 12; ++i)
      for (int j = 0; j < 12; ++j)
        if (K(i, j) != 0) triplets.emplace_back(freedom(i), freedom(j), K(i, j));
  };
  const std::vector<LoadCase> own = loads_by_member(frame, load);
  for (int m = 0; m < static_cast<int>(frame.members.size()); ++m) {
    const Mat12 K = geometric_stiffness(frame, own[static_cast<std::size_t>(m)], response, m);
    const Member& member = frame.members[static_cast<std::size_t>(m)];
    add(member.from, member.to, K);
  }
  for (std::size_t i = 0; i < frame.joints.size(); ++i) {
    const Joint& joint = frame.joints[i];
    const Vec6 on_node = response.joint_force.row(static_cast<Eigen::Index>(i)).transpose();
    add(joint.node, joint.other,
        connection_hessian(joint.axes * on_node.head<3>(), joint.axes * on_node.tail<3>()));
  }
  for (const PointMass& p : frame.masses)
    if (!p.offset.isZero(0)) add_rotation(p.node, arm_hessian(-p.mass * load.gravity, p.offset));
  for (std::size_t i = 0; i < frame.springs.size(); ++i) {
    const Spring& s = frame.springs[i];
    if (s.other < 0) continue;
    const Vec3 arm =
        frame.nodes[static_cast<std::size_t>(s.other)].at - frame.nodes[static_cast<std::size_t>(s.node)].at;
    const Vec6 on_node = response.spring_force.row(static_cast<Eigen::Index>(i)).transpose();
    const Vec3 force = s.axes * on_node.head<3>(), moment = s.axes * on_node.tail<3>();
    // The arm belongs to the node's side, so the spring sits at the other node's place.
    Mat12 sides = Mat12::Identity();
    sides.block<3, 3>(0, 3) = -cross_matrix(arm);
    add(s.node, s.other, sides.transpose() * connection_hessian(force, moment) * sides);
    if (!arm.isZero(0)) add_rotation(s.node, arm_hessian(-force, arm));
  }
  SparseMatrix K(frame.freedoms(), frame.freedoms());
  K.setFromTriplets(triplets.begin(), triplets.end());
  return K;
}

}  // namespace focalframe::fem
