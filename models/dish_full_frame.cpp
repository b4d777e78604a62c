#include "models/dish_full_frame.h"

#include <cmath>

#include "fem/shape_parts.h"
#include "fem/units.h"
#include "loads/pose.h"
#include "models/append_frame.h"
#include "models/dish.h"
#include "models/dish_states.h"
#include "models/inside_proof.h"

namespace focalframe::models {
namespace {

using fem::Mat3;
using fem::Vec3;

// The yoke without the nodes on top of its arms. Each arm then ends on its own foot until it is led to the
// body.
struct Arms {
  fem::Frame yoke;
  int azimuth = 0, pin = -1, left = -1, right = -1;  // nodes; members
};

Arms bare_yoke(const DishCollector& c) {
  Arms out{c.yoke, 0, -1, -1, -1};
  std::vector<int> number;
  out.yoke.nodes.clear();
  for (std::size_t n = 0; n < c.yoke.nodes.size(); ++n) {
    const bool top = static_cast<int>(n) == c.yoke_left || static_cast<int>(n) == c.yoke_right;
    number.push_back(top ? -1 : static_cast<int>(out.yoke.nodes.size()));
    if (!top) out.yoke.nodes.push_back(c.yoke.nodes[n]);
  }
  for (std::size_t m = 0; m < out.yoke.members.size(); ++m) {
    fem::Member& member = out.yoke.members[m];
    if (member.to == c.yoke_left) out.left = static_cast<int>(m);
    if (member.to == c.yoke_right) out.right = static_cast<int>(m);
    member.from = number[static_cast<std::size_t>(member.from)];
    const int to = number[static_cast<std::size_t>(member.to)];
    member.to = to >= 0 ? to : member.from;
  }
  for (fem::PointMass& mass : out.yoke.masses) {
    const int node = number[static_cast<std::size_t>(mass.node)];
    if (node >= 0) {
      mass.node = node;
      continue;
    }
    // A drive on an arm's top: carried by the arm's foot, at its place.
    const int foot = out.yoke.members[static_cast<std::size_t>(out.left)].from;
    mass.offset += c.yoke.nodes[static_cast<std::size_t>(mass.node)].at -
                   out.yoke.nodes[static_cast<std::size_t>(foot)].at;
    mass.node = foot;
  }
  out.azimuth = number[static_cast<std::size_t>(c.azimuth)];
  if (c.yoke_pin >= 0) out.pin = number[static_cast<std::size_t>(c.yoke_pin)];
  return out;
}

std::string words_of(const fem::Frame& frame, const Eigen::MatrixXd& shape) {
  return fem::shape_words(frame, fem::shape_parts(frame, shape),
                          {"along the elevation axis", "to and fro", "up and down"});
}

}  // namespace

DishFullFrame dish_full_frame(const DishCollector& c, double elevation) {
  const Mat3 turn = loads::world_to_collector(elevation).transpose();
  const Arms arms = bare_yoke(c);
  DishFullFrame full;
  fem::Frame& whole = full.frame;
  append_frame(whole, c.base, Mat3::Identity(), Vec3::Zero(), Vec3::Zero());
  full.head = c.head;
  full.first_yoke_node = static_cast<int>(whole.nodes.size());
  const int first_yoke_member = static_cast<int>(whole.members.size());
  append_frame(whole, arms.yoke, Mat3::Identity(), Vec3::Zero(), Vec3::Zero());
  full.first_body_node = static_cast<int>(whole.nodes.size());
  append_frame(whole, c.body, turn, Vec3(0, 0, -c.axis_to_vertex), Vec3(0, 0, c.axis_height));

  const auto lead = [&](int arm, const Anchor& anchor, bool slides) {
    fem::Member& m = whole.members[static_cast<std::size_t>(first_yoke_member + arm)];
    m.to = full.first_body_node + anchor.node;
    m.offset_to = turn * (anchor.at - c.body.nodes[static_cast<std::size_t>(anchor.node)].at);
    m.release_to = {false, slides, false, true, true, true};  // an arm's own y lies along the elevation axis
    return &m;
  };
  fem::Member* left = lead(arms.left, c.left, false);
  lead(arms.right, c.right, true);
  if (c.slewing) {
    left->release_to[fem::ry] = false;
    left->spring_to[fem::ry] = c.drive_stiffness;
  } else {
    fem::Member rod;
    rod.from = full.first_body_node + c.lug.node;
    rod.to = full.first_yoke_node + arms.pin;
    rod.offset_from = turn * (c.lug.at - c.body.nodes[static_cast<std::size_t>(c.lug.node)].at);
    const double length = (whole.nodes[static_cast<std::size_t>(rod.to)].at -
                           whole.nodes[static_cast<std::size_t>(rod.from)].at - rod.offset_from)
                              .norm();
    fem::Section section;
    section.name = "rod";
    section.A = 1e-3;
    section.Iy = section.Iz = section.J = 1e-8;
    fem::Material material;
    material.name = "rod of the actuator's stiffness";
    material.E = c.drive_stiffness * length / section.A;
    material.G = material.E / 2.6;
    rod.section = static_cast<int>(whole.sections.size());
    rod.material = static_cast<int>(whole.materials.size());
    rod.up = Vec3::UnitX();
    rod.release_from = {false, false, false, true, true, true};
    rod.release_to = {false, false, false, false, true, true};
    rod.name = rod.group = "actuator";
    whole.sections.push_back(section);
    whole.materials.push_back(material);
    whole.members.push_back(rod);
  }
  fem::Joint bearing;
  bearing.node = full.first_yoke_node + arms.azimuth;
  bearing.other = full.head;
  bearing.held = {true, true, true, false, false, false};
  bearing.name = "azimuth bearing";
  whole.joints.push_back(bearing);
  fem::Spring drive;
  drive.node = bearing.node;
  drive.other = bearing.other;
  drive.stiffness << 0, 0, 0, c.tilt_stiffness, c.tilt_stiffness, c.twist_stiffness;
  drive.name = "azimuth bearing and drive";
  whole.springs.push_back(drive);
  return full;
}

RowStability dish_stability(const DishDesign& design, const loads::CoefficientTable& table, double elevation,
                            int count) {
  const DishModel model(build_dish(design));
  const DishFullFrame full = dish_full_frame(model.collector(), elevation);
  RowStability out;
  out.elevation = elevation;
  out.freedoms = full.frame.freedoms();
  const fem::InsideModes inside = fem::modes_inside(full.frame, count, collector_limits);
  for (const fem::Mode& mode : inside.modes)
    out.modes.push_back({mode.frequency, mode.residual, words_of(inside.divided.frame, mode.shape)});
  out.modes_proof = proof_of(inside);
  if (!design.wind.stow.given) return out;
  const DishWinds winds(design, table);
  const DishPose pose = model.pose(elevation);
  const double pressure = winds_at_axis(design).stow.gust_pressure;
  const Mat3 turn = loads::world_to_collector(elevation).transpose();
  // The half turn on one side is enough to find the worst direction; the dish's own frame is even sided.
  for (int k = 0; k < 5; k += 2) {
    const DishState state{{StateKind::stow, elevation, k * 45 * deg}, 0};
    const Eigen::VectorXd a =
        pressure * dish_wind_amplitudes(model, pose, winds.at(state, Spread::linear, 0, true));
    const Eigen::VectorXd forces = model.nodal_loads() * a.head(DishColumns::body);
    fem::LoadCase load;
    load.gravity = {0, 0, -standard_gravity};
    for (int n = 0; 6 * n < forces.size(); ++n)
      load.nodes.push_back(
          {full.first_body_node + n, turn * forces.segment<3>(6 * n), turn * forces.segment<3>(6 * n + 3)});
    std::vector<RowBuckling> found;
    const fem::InsideBuckling bows = fem::buckling_inside(full.frame, load, 3, 1000, collector_limits);
    for (const fem::BucklingMode& mode : bows.modes)
      found.push_back({mode.factor, mode.residual, words_of(bows.divided.frame, mode.shape)});
    const bool worse = !found.empty() && (out.buckling.empty() || found[0].factor < out.buckling[0].factor);
    if (!worse && !out.load.empty()) continue;
    out.load = "weight and the STOW gust, wind " + std::to_string(k * 45) + " deg off the front";
    out.buckling = found;
    out.buckling_proof = proof_of(bows);
  }
  return out;
}

}  // namespace focalframe::models
