#include "fem/assembly.h"

#include <Eigen/Geometry>

#include "fem/assembly_parts.h"
#include "fem/member_loads.h"

namespace focalframe::fem {
namespace {

using Index = Eigen::Index;

/// Adds a 12 x 12 block of the freedoms of two nodes; `other` < 0 leaves the last six out.
void add_block(Triplets& triplets, const Mat12& block, int node, int other) {
  const int size = other < 0 ? 6 : 12;
  const auto freedom = [&](int k) { return k < 6 ? 6 * node + k : 6 * other + k - 6; };
  for (int j = 0; j < size; ++j)
    for (int i = 0; i < size; ++i)
      if (block(i, j) != 0) triplets.emplace_back(freedom(i), freedom(j), block(i, j));
}

SparseMatrix summed(int rows, int cols, const Triplets& triplets) {
  SparseMatrix matrix(rows, cols);
  matrix.setFromTriplets(triplets.begin(), triplets.end());
  return matrix;
}

Mat3 cross_matrix(const Vec3& a) {
  Mat3 m;
  m << 0, -a.z(), a.y(), a.z(), 0, -a.x(), -a.y(), a.x(), 0;
  return m;
}

Eigen::Matrix<double, 6, 6> point_mass_matrix(const PointMass& p) {
  Eigen::Matrix<double, 6, 6> carry = Eigen::Matrix<double, 6, 6>::Identity();
  carry.block<3, 3>(0, 3) = -cross_matrix(p.offset);
  Eigen::Matrix<double, 6, 6> at_centre = Eigen::Matrix<double, 6, 6>::Zero();
  at_centre.block<3, 3>(0, 0) = p.mass * Mat3::Identity();
  at_centre.block<3, 3>(3, 3) = p.inertia;
  return carry.transpose() * at_centre * carry;
}

}  // namespace

Mat6x12 spring_motion(const Frame& frame, const Spring& spring) {
  Mat6x12 motion = Mat6x12::Zero();
  const Mat3 to_axes = spring.axes.transpose();
  motion.block<3, 3>(0, 0) = to_axes;
  motion.block<3, 3>(3, 3) = to_axes;
  if (spring.other < 0) return motion;
  const Vec3 arm = frame.nodes[static_cast<std::size_t>(spring.other)].at -
                   frame.nodes[static_cast<std::size_t>(spring.node)].at;
  motion.block<3, 3>(0, 3) = -to_axes * cross_matrix(arm);
  motion.block<3, 3>(0, 6) = -to_axes;
  motion.block<3, 3>(3, 9) = -to_axes;
  return motion;
}

SparseMatrix assemble_stiffness(const Frame& frame, const std::vector<Element>& elements) {
  Triplets triplets;
  triplets.reserve(144 * (elements.size() + frame.springs.size()));
  for (std::size_t m = 0; m < elements.size(); ++m) {
    const Element& e = elements[m];
    add_block(triplets, e.carry.transpose() * e.between * e.carry, frame.members[m].from,
              frame.members[m].to);
  }
  for (const Spring& s : frame.springs) {
    const Mat6x12 motion = spring_motion(frame, s);
    add_block(triplets, motion.transpose() * s.stiffness.asDiagonal() * motion, s.node, s.other);
  }
  return summed(frame.freedoms(), frame.freedoms(), triplets);
}

SparseMatrix assemble_mass(const Frame& frame, const std::vector<Element>& elements) {
  Triplets triplets;
  triplets.reserve(144 * elements.size() + 36 * frame.masses.size());
  for (std::size_t m = 0; m < elements.size(); ++m)
    add_block(triplets, consistent_mass(frame, static_cast<int>(m), elements[m]), frame.members[m].from,
              frame.members[m].to);
  for (const PointMass& p : frame.masses) {
    Mat12 block = Mat12::Zero();
    block.topLeftCorner<6, 6>() = point_mass_matrix(p);
    add_block(triplets, block, p.node, -1);
  }
  return summed(frame.freedoms(), frame.freedoms(), triplets);
}

SparseMatrix assemble_end_forces(const Frame& frame, const std::vector<Element>& elements) {
  Triplets triplets;
  triplets.reserve(144 * elements.size());
  for (std::size_t m = 0; m < elements.size(); ++m) {
    const Mat12 forces = elements[m].between * elements[m].carry;
    for (int j = 0; j < 12; ++j) {
      const int node = j < 6 ? frame.members[m].from : frame.members[m].to;
      for (int i = 0; i < 12; ++i)
        if (forces(i, j) != 0)
          triplets.emplace_back(12 * static_cast<int>(m) + i, 6 * node + j % 6, forces(i, j));
    }
  }
  return summed(12 * static_cast<int>(elements.size()), frame.freedoms(), triplets);
}

AssembledLoads assemble_loads(const Frame& frame, const std::vector<Element>& elements,
                              const std::vector<LoadCase>& cases) {
  const auto count = static_cast<Index>(cases.size());
  AssembledLoads loads{Eigen::MatrixXd::Zero(frame.freedoms(), count),
                       Eigen::MatrixXd::Zero(12 * static_cast<Index>(elements.size()), count)};
  for (Index c = 0; c < count; ++c) {
    const LoadCase& load = cases[static_cast<std::size_t>(c)];
    const Eigen::MatrixXd held = held_end_forces(frame, elements, load);
    auto force = loads.node_force.col(c);
    for (std::size_t m = 0; m < elements.size(); ++m) {
      const auto col = static_cast<Index>(m);
      if (held.col(col).isZero(0)) continue;
      const Vec12 fixed = released_end_force(frame, static_cast<int>(m), elements[m], held.col(col));
      const Vec12 at_nodes = elements[m].carry.transpose() * fixed;
      loads.fixed_end_force.block<12, 1>(12 * col, c) = fixed;
      force.segment<6>(6 * frame.members[m].from) -= at_nodes.head<6>();
      force.segment<6>(6 * frame.members[m].to) -= at_nodes.tail<6>();
    }
    for (const PointMass& p : frame.masses) {
      const Vec3 weight = p.mass * load.gravity;
      force.segment<3>(6 * p.node) += weight;
      force.segment<3>(6 * p.node + 3) += p.offset.cross(weight);
    }
    for (const NodeLoad& l : load.nodes) {
      force.segment<3>(6 * l.node) += l.force;
      force.segment<3>(6 * l.node + 3) += l.moment;
    }
  }
  return loads;
}

SparseMatrix assemble_stiffness(const Frame& frame) {
  return assemble_stiffness(frame, make_elements(frame));
}

SparseMatrix assemble_mass(const Frame& frame) { return assemble_mass(frame, make_elements(frame)); }

SparseMatrix assemble_end_forces(const Frame& frame) {
  return assemble_end_forces(frame, make_elements(frame));
}

Eigen::MatrixXd assemble_loads(const Frame& frame, const std::vector<LoadCase>& cases) {
  return assemble_loads(frame, make_elements(frame), cases).node_force;
}

Eigen::MatrixXd assemble_fixed_end_forces(const Frame& frame, const std::vector<LoadCase>& cases) {
  return assemble_loads(frame, make_elements(frame), cases).fixed_end_force;
}

}  // namespace focalframe::fem
