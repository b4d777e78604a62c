#include "models/dish_model.h"

#include <Eigen/Cholesky>
#include <cmath>
#include <stdexcept>

#include "fem/assembly.h"
#include "fem/beam.h"
#include "loads/pose.h"

namespace focalframe::models {
namespace {

using Eigen::MatrixXd;
using Eigen::VectorXd;
using fem::Mat3;
using fem::Vec3;
using C = DishColumns;

Mat3 skew(const Vec3& a) {
  Mat3 m;
  m << 0, -a.z(), a.y(), a.z(), 0, -a.x(), -a.y(), a.x(), 0;
  return m;
}

std::vector<fem::Freedom> all_six(const std::vector<int>& nodes) {
  std::vector<fem::Freedom> freedoms;
  for (int node : nodes)
    for (int dof = 0; dof < 6; ++dof) freedoms.push_back({node, dof});
  return freedoms;
}

fem::LoadCase gravity_case(const Vec3& g) {
  fem::LoadCase made;
  made.gravity = g;
  return made;
}

// Nodal loads of a pressure or force field on the samples.
template <class Field>
VectorXd spread(const DishSkin& skin, Field field) {
  VectorXd force(3 * skin.samples());
  for (int s = 0; s < skin.samples(); ++s)
    force.segment<3>(3 * s) =
        skin.weight[static_cast<std::size_t>(s)] * field(skin.at[static_cast<std::size_t>(s)]);
  return skin.move.transpose() * force;
}

// dcp = value pushes against the normal that points to the focus; per projected area.
Vec3 push(double value, const Vec3& at, double f) {
  return value * Vec3(at.x() / (2 * f), at.y() / (2 * f), -1);
}

}  // namespace

Eigen::Matrix3d DishPose::collector_from_yoke() const { return loads::world_to_collector(elevation); }

DishModel::DishModel(DishCollector collector) : collector_(std::move(collector)) {
  std::vector<fem::LoadCase> cases;
  loads_ = body_loads(cases);
  body_ = fem::condense(collector_.body, all_six(collector_.held), loads_);
  residual = body_.residual;
  condition = body_.condition_estimate;
  const fem::MassSummary mass = fem::total_mass(collector_.body);
  body_mass = mass.mass;
  body_centre = mass.centre;
  totals_ = MatrixXd::Zero(6, C::body);
  for (std::size_t n = 0; n < collector_.body.nodes.size(); ++n) {
    const auto part = loads_.middleRows(6 * static_cast<int>(n), 6);
    totals_ += part;
    totals_.bottomRows(3) += skew(collector_.body.nodes[n].at) * part.topRows(3);
  }
  condense_stand();
  make_outputs(fem::assemble_fixed_end_forces(collector_.body, cases));
}

MatrixXd DishModel::body_loads(std::vector<fem::LoadCase>& cases) const {
  const fem::Frame& body = collector_.body;
  cases.assign(C::body, {});
  for (int i = 0; i < 3; ++i) {
    const Vec3 axis = Vec3::Unit(i);
    cases[static_cast<std::size_t>(C::gravity + i)] = gravity_case(axis);
    const Vec3 arm = -body.nodes[static_cast<std::size_t>(collector_.hub)].at;  // hub -> vertex
    cases[static_cast<std::size_t>(C::vertex_force + i)].nodes = {{collector_.hub, axis, arm.cross(axis)}};
    auto& drag = cases[static_cast<std::size_t>(C::front_drag + i)];
    const double face = 3.14159265358979323846 / 4 * collector_.feed_width * collector_.feed_width;
    drag.nodes = {{collector_.focus, face * axis, Vec3::Zero()}};
    for (int m : collector_.feed_members) {
      const fem::Member& leg = body.members[static_cast<std::size_t>(m)];
      const double width = body.sections[static_cast<std::size_t>(leg.section)].depth_z;
      fem::LineLoad line;
      line.member = m;
      line.at_from = line.at_to = width * axis;
      drag.lines.push_back(line);
    }
  }
  MatrixXd loads = fem::assemble_loads(body, cases);
  const DishSkin& skin = collector_.skin;
  const double f = collector_.focal_length, D = collector_.diameter, decay = dish_edge_decay * D;
  const auto pressure = [&](int column, auto value) {
    loads.col(column) = spread(skin, [&](const Vec3& p) { return push(value(p), p, f); });
  };
  pressure(C::uniform, [](const Vec3&) { return 1.0; });
  pressure(C::linear, [&](const Vec3& p) { return 2 * p.x() / D; });
  pressure(C::linear + 1, [&](const Vec3& p) { return 2 * p.y() / D; });
  pressure(C::bowl, [&](const Vec3& p) { return 4 * (p.x() * p.x() + p.y() * p.y()) / (D * D); });
  // exp(rho cos(t) / L) = I_0 + 2 sum I_m cos(m t), modified Bessel functions of rho / L.
  for (int m = 0; m < C::edge_terms; ++m) {
    const auto radial = [&](const Vec3& p) {
      const double rho = std::hypot(p.x(), p.y());
      return std::exp(-D / 2 / decay) * (m == 0 ? 1 : 2) * std::cyl_bessel_i(m, rho / decay);
    };
    const auto angle = [](const Vec3& p) { return std::atan2(p.y(), p.x()); };
    pressure(C::edge_cos(m), [&](const Vec3& p) { return radial(p) * std::cos(m * angle(p)); });
    if (m > 0) pressure(C::edge_sin(m), [&](const Vec3& p) { return radial(p) * std::sin(m * angle(p)); });
  }
  for (int i = 0; i < 3; ++i)
    loads.col(C::area_force + i) = spread(skin, [&](const Vec3&) { return Vec3(Vec3::Unit(i)); });
  return loads;
}

void DishModel::condense_stand() {
  yoke_nodes_ = {collector_.azimuth, collector_.yoke_left, collector_.yoke_right};
  if (collector_.yoke_pin >= 0 && collector_.yoke_pin != collector_.azimuth)
    yoke_nodes_.push_back(collector_.yoke_pin);
  std::vector<fem::LoadCase> yoke_cases, base_cases;
  for (int i = 0; i < 3; ++i) yoke_cases.push_back(gravity_case(Vec3::Unit(i)));
  base_cases.push_back(gravity_case(-Vec3::UnitZ()));
  for (int i = 0; i < 2; ++i) {
    base_cases.emplace_back();
    for (std::size_t m = 0; m < collector_.base.members.size(); ++m) {
      fem::LineLoad line;
      line.member = static_cast<int>(m);
      line.at_from = line.at_to = Vec3::Unit(i);
      base_cases.back().lines.push_back(line);
    }
  }
  yoke_ =
      fem::condense(collector_.yoke, all_six(yoke_nodes_), fem::assemble_loads(collector_.yoke, yoke_cases));
  base_ = fem::condense(collector_.base, all_six({collector_.head}),
                        fem::assemble_loads(collector_.base, base_cases));
  yoke_mass = fem::total_mass(collector_.yoke).mass;
  base_mass = fem::total_mass(collector_.base).mass;
  const auto ends = [](const fem::Frame& frame, const fem::Condensed& c,
                       const std::vector<fem::LoadCase>& cases) {
    const fem::SparseMatrix forces = fem::assemble_end_forces(frame);
    return LinearOutput{MatrixXd(forces * c.held_response) + fem::assemble_fixed_end_forces(frame, cases),
                        MatrixXd(forces * c.joint_response)};
  };
  yoke_ends_ = ends(collector_.yoke, yoke_, yoke_cases);
  base_ends_ = ends(collector_.base, base_, base_cases);
}

void DishModel::make_outputs(const MatrixXd& fixed_ends) {
  const auto &B = body_.held_response, &J = body_.joint_response;
  skin_move = {collector_.skin.move * B, collector_.skin.move * J};
  skin_turn = {collector_.skin.turn * B, collector_.skin.turn * J};
  focus = {B.middleRows(6 * collector_.focus, 6), J.middleRows(6 * collector_.focus, 6)};
  hub = {B.middleRows(6 * collector_.hub, 6), J.middleRows(6 * collector_.hub, 6)};
  const fem::SparseMatrix ends = fem::assemble_end_forces(collector_.body);
  end_force = {MatrixXd(ends * B) + fixed_ends, MatrixXd(ends * J)};
}

DishPose DishModel::pose(double elevation, const Eigen::Matrix3d& yoke_from_world) const {
  DishPose out;
  out.elevation = elevation;
  out.yoke_from_world = yoke_from_world;
  const Mat3 from_yoke = out.collector_from_yoke(), to_yoke = from_yoke.transpose();
  const int nb = 6 * static_cast<int>(collector_.held.size()), ny = 6 * static_cast<int>(yoke_nodes_.size());
  const bool own_pin = ny == 24;
  // Unknowns: body, azimuth rotations, rotations of the left arm, x and rotations of the right arm, pin,
  // head.
  const int az = nb, left = az + 3, right = left + 3, pin = right + 4, head = pin + (own_pin ? 6 : 0);
  const int unknowns = head + 6, raw = nb + ny + 6;
  const auto anchor = [&](const Anchor& a) {  // 6 x unknowns: motion in yoke axes
    MatrixXd m = MatrixXd::Zero(6, unknowns);
    for (std::size_t i = 0; i < collector_.held.size(); ++i) {
      if (collector_.held[i] != a.node) continue;
      const int at = 6 * static_cast<int>(i);
      const Vec3 arm = a.at - collector_.body.nodes[static_cast<std::size_t>(a.node)].at;
      m.block<3, 3>(0, at) = to_yoke;
      m.block<3, 3>(0, at + 3) = -to_yoke * skew(arm);
      m.block<3, 3>(3, at + 3) = to_yoke;
    }
    return m;
  };
  const MatrixXd at_left = anchor(collector_.left), at_right = anchor(collector_.right);
  MatrixXd map = MatrixXd::Zero(raw, unknowns);
  map.topLeftCorner(nb, nb).setIdentity();
  map.block<3, 3>(nb, head) = yoke_from_world;
  map.block<3, 3>(nb + 3, az).setIdentity();
  map.middleRows(nb + 6, 3) = at_left.topRows(3);
  map.block<3, 3>(nb + 9, left).setIdentity();
  map(nb + 12, right) = 1;
  map.middleRows(nb + 13, 2) = at_right.middleRows(1, 2);
  map.block<3, 3>(nb + 15, right + 1).setIdentity();
  if (own_pin) map.block<6, 6>(nb + 18, pin).setIdentity();
  map.bottomRows(6).rightCols(6).setIdentity();

  MatrixXd stiffness = MatrixXd::Zero(raw, raw), load = MatrixXd::Zero(raw, C::all);
  stiffness.topLeftCorner(nb, nb) = body_.stiffness;
  stiffness.block(nb, nb, ny, ny) = yoke_.stiffness;
  stiffness.bottomRightCorner(6, 6) = base_.stiffness;
  load.topLeftCorner(nb, C::body) = body_.load;
  load.block(nb, C::yoke_gravity, ny, 3) = yoke_.load;
  load.bottomRightCorner(6, 3) = base_.load;
  MatrixXd K = map.transpose() * stiffness * map;

  Eigen::RowVectorXd stretch(unknowns);
  if (collector_.slewing) {
    stretch = at_left.row(3) - map.row(nb + 9);
    out.arm = 1;
  } else {
    const Vec3 axis(0, 0, collector_.axis_height);
    const Vec3 lug = axis + to_yoke * (collector_.lug.at + collector_.axis_to_vertex * Vec3::UnitZ());
    const Vec3 at_pin = collector_.yoke.nodes[static_cast<std::size_t>(collector_.yoke_pin)].at;
    const Vec3 along = (lug - at_pin).normalized();
    const int pin_row = own_pin ? nb + 18 : nb;
    stretch = along.transpose() * (anchor(collector_.lug).topRows(3) - map.middleRows(pin_row, 3));
    out.arm = along.dot(Vec3::UnitX().cross(lug - axis));
  }
  K += collector_.drive_stiffness * stretch.transpose() * stretch;
  MatrixXd turn = map.middleRows(nb + 3, 3);  // of the yoke against the head, yoke axes
  turn.rightCols(3) -= yoke_from_world;
  const Vec3 bearing(collector_.tilt_stiffness, collector_.tilt_stiffness, collector_.twist_stiffness);
  K += turn.transpose() * bearing.asDiagonal() * turn;

  const Eigen::LDLT<MatrixXd> factor(K);
  if (factor.info() != Eigen::Success || !factor.isPositive())
    throw std::logic_error("a dish of held parts must be positive definite");
  const MatrixXd solution = factor.solve(map.transpose() * load), motion = map * solution;
  out.held_motion = motion.topRows(nb);
  out.yoke_motion = motion.middleRows(nb, ny);
  out.head_motion = motion.bottomRows(6);
  const MatrixXd on_yoke = yoke_.stiffness * out.yoke_motion - load.middleRows(nb, ny);
  out.left = -on_yoke.middleRows(6, 3);
  out.right = -on_yoke.middleRows(12, 3);
  out.drive = -collector_.drive_stiffness * (stretch * solution);
  const MatrixXd on_head = base_.stiffness * out.head_motion - load.bottomRows(6);
  out.azimuth.resize(6, C::all);
  out.azimuth.topRows(3) = -yoke_from_world * on_head.topRows(3);
  out.azimuth.bottomRows(3) = -yoke_from_world * on_head.bottomRows(3);
  return out;
}

MatrixXd DishModel::evaluate(const LinearOutput& output, const DishPose& pose,
                             const MatrixXd& amplitudes) const {
  return output.held * amplitudes.topRows(C::body) + output.joint * (pose.held_motion * amplitudes);
}

MatrixXd DishModel::yoke_end_forces(const DishPose& pose, const MatrixXd& amplitudes) const {
  return yoke_ends_.held * amplitudes.middleRows(C::yoke_gravity, 3) +
         yoke_ends_.joint * (pose.yoke_motion * amplitudes);
}

MatrixXd DishModel::base_end_forces(const DishPose& pose, const MatrixXd& amplitudes) const {
  return base_ends_.held * amplitudes.bottomRows(3) + base_ends_.joint * (pose.head_motion * amplitudes);
}

MatrixXd DishModel::foot_reactions(const DishPose& pose, const MatrixXd& amplitudes) const {
  const MatrixXd ends = base_end_forces(pose, amplitudes);
  MatrixXd out = MatrixXd::Zero(6 * static_cast<int>(collector_.feet.size()), amplitudes.cols());
  for (std::size_t f = 0; f < collector_.feet.size(); ++f)
    for (int m : collector_.feet[f].members) {
      const Mat3 to_world = fem::member_axes(collector_.base, m).transpose();
      const int at = 6 * static_cast<int>(f);
      out.middleRows(at, 3) += to_world * ends.middleRows(12 * m, 3);
      out.middleRows(at + 3, 3) += to_world * ends.middleRows(12 * m + 3, 3);
    }
  return out;
}

}  // namespace focalframe::models
