#include "fem/beam.h"

#include <Eigen/Geometry>
#include <cmath>

#include "fem/element.h"
#include "fem/member_loads.h"
#include "fem/quadrature.h"

namespace focalframe::fem {
namespace {

Vec3 member_vector(const Frame& frame, int index) {
  const Member& m = frame.members.at(static_cast<std::size_t>(index));
  return frame.nodes.at(static_cast<std::size_t>(m.to)).at + m.offset_to -
         frame.nodes.at(static_cast<std::size_t>(m.from)).at - m.offset_from;
}

}  // namespace

double member_length(const Frame& frame, int member) { return member_vector(frame, member).norm(); }

Mat3 member_axes(const Frame& frame, int member) {
  const Vec3 x = member_vector(frame, member).normalized();
  const Vec3& up = frame.members[static_cast<std::size_t>(member)].up;
  const Vec3 z = (up - up.dot(x) * x).normalized();
  Mat3 axes;
  axes.row(0) = x;
  axes.row(1) = z.cross(x);
  axes.row(2) = z;
  return axes;
}

Mat12 stiffness(const Frame& frame, int member) {
  const Element e = make_element(frame, member);
  return e.carry.transpose() * e.between * e.carry;
}

Mat12 consistent_mass(const Frame& frame, int member) {
  return consistent_mass(frame, member, make_element(frame, member));
}

Mat12 consistent_mass(const Frame& frame, int member, const Element& e) {
  const Member& m = frame.members[static_cast<std::size_t>(member)];
  const Section& s = frame.sections[static_cast<std::size_t>(m.section)];
  const double density = frame.materials[static_cast<std::size_t>(m.material)].density;
  Vec6 per_length;  // rotary inertia of the section included
  per_length << s.A, s.A, s.A, s.Iy + s.Iz, s.Iy, s.Iz;
  per_length *= density;
  Mat12 mass = Mat12::Zero();
  for (const GaussPoint& g : gauss_points) {
    const Mat6x12 B = span_motion(e.span, g.at, true);
    mass += g.weight * e.span.length * (B.transpose() * per_length.asDiagonal() * B);
  }
  const Mat12 carry = e.soft ? Mat12(e.inner() * e.carry) : e.carry;
  return carry.transpose() * mass * carry;
}

Mat12 end_force_matrix(const Frame& frame, int member) {
  const Element e = make_element(frame, member);
  return e.between * e.carry;
}

Vec12 fixed_end_force(const Frame& frame, int member, const LoadCase& load) {
  require_sound_loads(frame, load);
  const Element e = make_element(frame, member);
  return released_end_force(frame, member, e, held_part_forces(frame, member, e.axes, load, 0, 1));
}

Mat6x12 motion_at(const Frame& frame, int member, double xi, bool of_section) {
  const Element e = make_element(frame, member);
  Mat6x12 motion = span_motion(e.span, xi, of_section) * (e.soft ? Mat12(e.inner() * e.carry) : e.carry);
  motion.topRows<3>() = (e.axes.transpose() * motion.topRows<3>()).eval();
  motion.bottomRows<3>() = (e.axes.transpose() * motion.bottomRows<3>()).eval();
  return motion;
}

}  // namespace focalframe::fem
