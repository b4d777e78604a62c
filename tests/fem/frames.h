#pragma once

/// Small frames and comparisons shared by the tests of fem/ and published/.

#include <Eigen/Geometry>
#include <catch2/catch.hpp>
#include <cmath>
#include <random>
#include <string>
#include <vector>

#include "fem/frame.h"
#include "fem/load_case.h"

namespace focalframe::test {

using namespace focalframe::fem;

inline constexpr Six all_fixed{true, true, true, true, true, true};

/// Nodes and members by hand, one material and section at a time.
struct Builder {
  Frame frame;

  int node(double x, double y, double z) {
    frame.nodes.push_back({Vec3(x, y, z), "n" + std::to_string(frame.nodes.size())});
    return static_cast<int>(frame.nodes.size()) - 1;
  }
  int material(double E, double G, double density = 0, double expansion = 0) {
    frame.materials.push_back({.name = "m", .E = E, .G = G, .density = density, .expansion = expansion});
    return static_cast<int>(frame.materials.size()) - 1;
  }
  int section(double A, double Iy, double Iz, double J, double shear_y = 0, double shear_z = 0) {
    frame.sections.push_back(
        {.name = "s", .A = A, .Iy = Iy, .Iz = Iz, .J = J, .shear_area_y = shear_y, .shear_area_z = shear_z});
    return static_cast<int>(frame.sections.size()) - 1;
  }
  int member(int from, int to, int section = 0, int material = 0, const Vec3& up = Vec3::UnitZ()) {
    Member m;
    m.from = from;
    m.to = to;
    m.section = section;
    m.material = material;
    m.up = up;
    m.name = "b" + std::to_string(frame.members.size());
    frame.members.push_back(m);
    return static_cast<int>(frame.members.size()) - 1;
  }
  Member& last() { return frame.members.back(); }
  void support(int node, const Six& fix, const Vec6& imposed = Vec6::Zero()) {
    frame.supports.push_back({node, fix, imposed});
  }
  void mass(int node, double value, const Mat3& inertia = Mat3::Zero(), const Vec3& offset = Vec3::Zero()) {
    frame.masses.push_back({node, value, offset, inertia, "mass", ""});
  }
  /// Members in a row along a straight line of nodes; returns all node indices.
  std::vector<int> line(const Vec3& a, const Vec3& b, int pieces, int section = 0, int material = 0,
                        const Vec3& up = Vec3::UnitZ()) {
    std::vector<int> nodes;
    for (int i = 0; i <= pieces; ++i) {
      const Vec3 p = a + (b - a) * (static_cast<double>(i) / pieces);
      nodes.push_back(node(p.x(), p.y(), p.z()));
      if (i > 0) member(nodes[nodes.size() - 2], nodes.back(), section, material, up);
    }
    return nodes;
  }
};

/// Freedoms by letters: fix("xyzXZ") holds ux uy uz rx rz.
inline Six fix(const std::string& letters) {
  Six six{};
  const std::string order = "xyzXYZ";
  for (const char c : letters) six.at(order.find(c)) = true;
  return six;
}

/// Straight beam along x, loaded in the x-y plane by the tests (Iz = Iy = I), E-B unless shear areas are set.
inline Builder straight_beam(double length, int pieces, double E = 210e9, double I = 8e-6, double A = 4e-3) {
  Builder b;
  b.material(E, E / 2.6);
  b.section(A, I, I, 2 * I);
  b.line(Vec3::Zero(), Vec3(length, 0, 0), pieces);
  return b;
}

inline LoadCase node_force(int node, const Vec3& force, const Vec3& moment = Vec3::Zero()) {
  LoadCase load;
  load.nodes.push_back({node, force, moment});
  return load;
}

/// Uniform load per length on every member.
inline LoadCase uniform_load(const Frame& frame, const Vec3& per_length) {
  LoadCase load;
  for (int m = 0; m < static_cast<int>(frame.members.size()); ++m)
    load.lines.push_back({.member = m, .at_from = per_length, .at_to = per_length});
  return load;
}

inline Approx near(double value, double relative = 1e-5) { return Approx(value).epsilon(relative).margin(0); }

/// Largest difference over the largest value.
inline double difference(const Eigen::MatrixXd& a, const Eigen::MatrixXd& b) {
  const double scale = std::max(a.cwiseAbs().maxCoeff(), b.cwiseAbs().maxCoeff());
  return scale > 0 ? (a - b).cwiseAbs().maxCoeff() / scale : 0;
}

inline Mat3 turned(double angle, const Vec3& axis) {
  return Eigen::AngleAxisd(angle, axis.normalized()).toRotationMatrix();
}

}  // namespace focalframe::test
