#include "models/full_frame.h"

#include <cmath>

#include "loads/pose.h"
#include "models/append_frame.h"

namespace focalframe::models {

using fem::Mat3;
using fem::Vec3;

void append_frame(fem::Frame& whole, const fem::Frame& part, const Mat3& turn, const Vec3& pivot,
                  const Vec3& at) {
  const int nodes = static_cast<int>(whole.nodes.size());
  const int sections = static_cast<int>(whole.sections.size()),
            materials = static_cast<int>(whole.materials.size());
  for (fem::Node n : part.nodes) {
    n.at = at + turn * (n.at - pivot);
    whole.nodes.push_back(n);
  }
  whole.sections.insert(whole.sections.end(), part.sections.begin(), part.sections.end());
  whole.materials.insert(whole.materials.end(), part.materials.begin(), part.materials.end());
  for (fem::Member m : part.members) {
    m.from += nodes;
    m.to += nodes;
    m.section += sections;
    m.material += materials;
    m.up = turn * m.up;
    m.offset_from = turn * m.offset_from;
    m.offset_to = turn * m.offset_to;
    whole.members.push_back(m);
  }
  for (fem::Support s : part.supports) {
    s.node += nodes;
    whole.supports.push_back(s);
  }
  for (fem::Spring s : part.springs) {
    s.node += nodes;
    if (s.other >= 0) s.other += nodes;
    s.axes = turn * s.axes;
    whole.springs.push_back(s);
  }
  for (fem::Joint j : part.joints) {
    j.node += nodes;
    j.other += nodes;
    j.axes = turn * j.axes;
    whole.joints.push_back(j);
  }
  for (fem::PointMass p : part.masses) {
    p.node += nodes;
    p.offset = turn * p.offset;
    p.inertia = turn * p.inertia * turn.transpose();
    whole.masses.push_back(p);
  }
}

FullFrame full_frame(const Collector& collector, double elevation) {
  const Mat3 turn = loads::world_to_collector(elevation).transpose();
  FullFrame full;
  std::vector<int> heads;
  for (const Stand& stand : collector.stands) {
    heads.push_back(static_cast<int>(full.frame.nodes.size()) + stand.head);
    append_frame(full.frame, stand.frame, Mat3::Identity(), Vec3::Zero(), Vec3(stand.x, 0, 0));
  }
  full.first_body_node = static_cast<int>(full.frame.nodes.size());
  full.first_body_member = static_cast<int>(full.frame.members.size());
  append_frame(full.frame, collector.body, turn, Vec3(0, 0, -collector.axis_to_vertex),
               Vec3(0, 0, collector.stands.front().height));

  for (std::size_t k = 0; k < collector.bearings.size(); ++k) {
    const bool driven = static_cast<int>(k) == collector.drive_bearing;
    fem::Joint bearing;
    bearing.node = full.first_body_node + collector.bearings[k].node;
    bearing.other = heads[k];
    bearing.held = {driven, true, true, driven && std::isinf(collector.drive_stiffness), false, false};
    bearing.axes = turn;
    bearing.name = "bearing at pylon " + std::to_string(k + 1);
    full.frame.joints.push_back(bearing);
    if (!driven || std::isinf(collector.drive_stiffness)) continue;
    fem::Spring drive;
    drive.node = bearing.node;
    drive.other = bearing.other;
    drive.stiffness[fem::rx] = collector.drive_stiffness;
    drive.name = "drive";
    full.frame.springs.push_back(drive);
  }
  return full;
}

std::vector<fem::NodeLoad> in_world(const FullFrame& full, const Eigen::VectorXd& body_loads,
                                    double elevation) {
  const Mat3 turn = loads::world_to_collector(elevation).transpose();
  std::vector<fem::NodeLoad> loads;
  for (int n = 0; 6 * n < body_loads.size(); ++n) {
    const auto six = body_loads.segment<6>(6 * n);
    if (six.isZero(0)) continue;
    loads.push_back({full.first_body_node + n, turn * six.head<3>(), turn * six.tail<3>()});
  }
  return loads;
}

}  // namespace focalframe::models
