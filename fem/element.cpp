#include "fem/element.h"

#include <Eigen/Dense>

#include "fem/mechanism.h"
#include "fem/text.h"

namespace focalframe::fem {
namespace {

Mat3 cross_matrix(const Vec3& a) {
  Mat3 m;
  m << 0, -a.z(), a.y(), a.z(), 0, -a.x(), -a.y(), a.x(), 0;
  return m;
}

/// Fills the four freedoms of one bending plane; `turn` is the sign of rotation against the slope.
void add_bending(Mat12& K, double EI, double phi, double L, std::array<int, 4> at, double turn) {
  const double unit = EI / (L * (1 + phi));
  const double a = 12 * unit / (L * L), b = turn * 6 * unit / L, c = (4 + phi) * unit, d = (2 - phi) * unit;
  Eigen::Matrix4d k;
  k << a, b, -a, b, b, c, -b, d, -a, -b, a, -b, b, d, -b, c;
  for (int i = 0; i < 4; ++i)
    for (int j = 0; j < 4; ++j) K(at[static_cast<std::size_t>(i)], at[static_cast<std::size_t>(j)]) = k(i, j);
}

/// Displacement, section rotation (against the slope of a rigid section: shear is left out) and their
/// derivatives for unit end motions v1 r1 v2 r2, r counted as a slope.
struct Bending {
  Eigen::RowVector4d v, r, dv, dr;
};

Bending bending_shape(double xi, double L, double phi) {
  const double mu = 1 / (1 + phi), x2 = xi * xi, x3 = x2 * xi;
  Bending s;
  s.v << mu * (1 - 3 * x2 + 2 * x3 + phi * (1 - xi)), mu * L * (xi - 2 * x2 + x3 + phi / 2 * (xi - x2)),
      mu * (3 * x2 - 2 * x3 + phi * xi), mu * L * (x3 - x2 - phi / 2 * (xi - x2));
  s.dv << mu * (6 * (x2 - xi) - phi) / L, mu * (1 - 4 * xi + 3 * x2 + phi / 2 * (1 - 2 * xi)),
      mu * (6 * (xi - x2) + phi) / L, mu * (3 * x2 - 2 * xi - phi / 2 * (1 - 2 * xi));
  s.r << mu * 6 * (x2 - xi) / L, mu * (1 - 4 * xi + 3 * x2 + phi * (1 - xi)), mu * 6 * (xi - x2) / L,
      mu * (3 * x2 - 2 * xi + phi * xi);
  s.dr << mu * 6 * (2 * xi - 1) / (L * L), mu * (6 * xi - 4 - phi) / L, mu * 6 * (1 - 2 * xi) / (L * L),
      mu * (6 * xi - 2 + phi) / L;
  return s;
}

constexpr std::array<int, 4> plane_xy{1, 5, 7, 11}, plane_xz{2, 4, 8, 10};

/// Puts a row over (v1 r1 v2 r2) of one plane into a row of twelve; in the x-z plane ry turns against the
/// slope.
void place(Mat6x12& B, int row, const Eigen::RowVector4d& shape, const std::array<int, 4>& at, double turn,
           double sign) {
  for (int k = 0; k < 4; ++k)
    B(row, at[static_cast<std::size_t>(k)]) = sign * (k % 2 == 1 ? turn : 1.0) * shape(k);
}

/// Inverse of the inner stiffness over the soft ends; a motion that meets no stiffness gets no motion.
Mat12 soft_flexibility(const Mat12& K, const std::vector<int>& soft, const std::array<double, 12>& spring) {
  const auto n = static_cast<Eigen::Index>(soft.size());
  Eigen::MatrixXd A(n, n);
  for (Eigen::Index i = 0; i < n; ++i)
    for (Eigen::Index j = 0; j < n; ++j)
      A(i, j) = K(soft[static_cast<std::size_t>(i)], soft[static_cast<std::size_t>(j)]);
  for (Eigen::Index i = 0; i < n; ++i)
    A(i, i) += spring[static_cast<std::size_t>(soft[static_cast<std::size_t>(i)])];
  const Eigen::VectorXd scale = A.diagonal().cwiseSqrt().cwiseInverse();
  const Eigen::SelfAdjointEigenSolver<Eigen::MatrixXd> eigen(scale.asDiagonal() * A * scale.asDiagonal());
  const Eigen::VectorXd inverse =
      (eigen.eigenvalues().array() > 1e-10).select(eigen.eigenvalues().cwiseInverse(), 0.0);
  const Eigen::MatrixXd S = scale.asDiagonal() * eigen.eigenvectors() * inverse.asDiagonal() *
                            eigen.eigenvectors().transpose() * scale.asDiagonal();
  Mat12 give = Mat12::Zero();
  for (Eigen::Index i = 0; i < n; ++i)
    for (Eigen::Index j = 0; j < n; ++j)
      give(soft[static_cast<std::size_t>(i)], soft[static_cast<std::size_t>(j)]) = S(i, j);
  return give;
}

void add_releases(Element& e, const Member& member) {
  std::vector<int> soft;
  std::array<double, 12> spring{};
  for (int k = 0; k < 12; ++k) {
    const auto i = static_cast<std::size_t>(k), end = static_cast<std::size_t>(k % 6);
    e.released[i] = k < 6 ? member.release_from[end] : member.release_to[end];
    spring[i] = e.released[i] ? 0.0 : k < 6 ? member.spring_from[end] : member.spring_to[end];
    if (e.released[i] || spring[i] > 0) soft.push_back(k);
  }
  e.soft = !soft.empty();
  e.between = e.rigid;
  if (!e.soft) return;
  e.give = soft_flexibility(e.rigid, soft, spring);
  const Mat12 K = e.rigid - e.rigid * e.give * e.rigid;
  e.between = (K + K.transpose()) / 2;
  for (int k = 0; k < 12; ++k)
    if (e.released[static_cast<std::size_t>(k)]) {  // exact zeros, so that a freedom nobody holds shows
      e.between.row(k).setZero();
      e.between.col(k).setZero();
    }
}

}  // namespace

Span make_span(const Section& s, const Material& m, double length) {
  const double L2 = length * length;
  const double phi_y = s.shear_area_y > 0 ? 12 * m.E * s.Iz / (m.G * s.shear_area_y * L2) : 0.0;
  const double phi_z = s.shear_area_z > 0 ? 12 * m.E * s.Iy / (m.G * s.shear_area_z * L2) : 0.0;
  return {length, phi_y, phi_z};
}

Mat12 span_stiffness(const Section& s, const Material& m, const Span& span) {
  const double L = span.length;
  Mat12 K = Mat12::Zero();
  K(0, 0) = K(6, 6) = m.E * s.A / L;
  K(0, 6) = K(6, 0) = -m.E * s.A / L;
  K(3, 3) = K(9, 9) = m.G * s.J / L;
  K(3, 9) = K(9, 3) = -m.G * s.J / L;
  add_bending(K, m.E * s.Iz, span.phi_y, L, plane_xy, 1);
  add_bending(K, m.E * s.Iy, span.phi_z, L, plane_xz, -1);
  return K;
}

Mat6x12 span_motion(const Span& span, double xi, bool of_section) {
  const Bending y = bending_shape(xi, span.length, span.phi_y),
                z = bending_shape(xi, span.length, span.phi_z);
  Mat6x12 B = Mat6x12::Zero();
  B(0, 0) = B(3, 3) = 1 - xi;
  B(0, 6) = B(3, 9) = xi;
  place(B, 1, y.v, plane_xy, 1, 1);
  place(B, 2, z.v, plane_xz, -1, 1);
  place(B, 4, of_section ? z.r : z.dv, plane_xz, -1, -1);
  place(B, 5, of_section ? y.r : y.dv, plane_xy, 1, 1);
  return B;
}

Mat6x12 span_motion_slope(const Span& span, double xi) {
  const Bending y = bending_shape(xi, span.length, span.phi_y),
                z = bending_shape(xi, span.length, span.phi_z);
  Mat6x12 B = Mat6x12::Zero();
  B(0, 0) = B(3, 3) = -1 / span.length;
  B(0, 6) = B(3, 9) = 1 / span.length;
  place(B, 1, y.dv, plane_xy, 1, 1);
  place(B, 2, z.dv, plane_xz, -1, 1);
  place(B, 4, z.dr, plane_xz, -1, -1);
  place(B, 5, y.dr, plane_xy, 1, 1);
  return B;
}

Element make_element(const Frame& frame, int index) {
  const Member& member = frame.members.at(static_cast<std::size_t>(index));
  const Section& section = frame.sections.at(static_cast<std::size_t>(member.section));
  const Material& material = frame.materials.at(static_cast<std::size_t>(member.material));
  Element e;
  e.span = make_span(section, material, member_length(frame, index));
  e.axes = member_axes(frame, index);
  e.rigid = span_stiffness(section, material, e.span);
  for (int b = 0; b < 12; b += 3) e.carry.block<3, 3>(b, b) = e.axes;
  e.carry.block<3, 3>(0, 3) = -e.axes * cross_matrix(member.offset_from);
  e.carry.block<3, 3>(6, 9) = -e.axes * cross_matrix(member.offset_to);
  add_releases(e, member);
  return e;
}

std::vector<Element> make_elements(const Frame& frame) {
  std::vector<Element> elements;
  elements.reserve(frame.members.size());
  for (int m = 0; m < static_cast<int>(frame.members.size()); ++m) elements.push_back(make_element(frame, m));
  return elements;
}

Vec12 released_end_force(const Frame& frame, int member, const Element& e, const Vec12& held) {
  if (!e.soft) return held;
  Vec12 force = held - e.rigid * (e.give * held);
  const double L = e.span.length;
  const double scale = held.segment<3>(0).norm() + held.segment<3>(6).norm() +
                       (held.segment<3>(3).norm() + held.segment<3>(9).norm()) / L;
  for (int k = 0; k < 12; ++k) {
    if (!e.released[static_cast<std::size_t>(k)]) continue;
    if (std::abs(force(k)) > 1e-8 * scale * (k % 6 < 3 ? 1.0 : L)) {
      const Member& m = frame.members[static_cast<std::size_t>(member)];
      throw Mechanism(k < 6 ? m.from : m.to, k % 6, 0,
                      member_words(frame, member) + " " + dof_words(k % 6) +
                          " (member axes) freely under its own load: its releases hold nothing in that "
                          "direction. Take one of them off");
    }
    force(k) = 0;
  }
  return force;
}

}  // namespace focalframe::fem
