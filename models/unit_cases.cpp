#include "models/unit_cases.h"

#include <Eigen/Geometry>
#include <algorithm>
#include <cmath>
#include <numbers>

#include "loads/bare_members.h"
#include "loads/snow.h"
#include "models/catalogue.h"
#include "models/profile.h"
#include "models/schema.h"
#include "models/trough_layout.h"

namespace focalframe::models {
namespace {

using fem::LoadCase;
using fem::Vec3;

// A rib stands on the mirror like a fence on the ground: 1.2 of the 2 of a free plate (EN 1991-1-4, 7.4.1,
// the inner part of a free-standing wall, from memory).
constexpr double fence_share = 0.6;

double or_else(double given, double otherwise) { return std::isnan(given) ? otherwise : given; }

class Maker {
 public:
  Maker(const TroughDesign& design, const Collector& collector)
      : d_(design), c_(collector), layout_(lay_out(design)) {}

  UnitCases run() {
    out_.receiver_drag = or_else(d_.bare_members.receiver, 1.2);
    out_.pylon_drag = or_else(d_.bare_members.pylons, profile_drag(d_.pylons.profile));
    out_.shielding = d_.bare_members.shielding;
    add_bare();
    if (d_.wind.along_row) add_along();
    if (!std::isnan(d_.earthquake.ground_acceleration) || !std::isnan(d_.earthquake.s_ds)) {
      LoadCase push;
      push.gravity = Vec3::UnitX();
      out_.at.push_x = add(push);
    }
    if (!std::isnan(d_.ice.thickness)) add_ice();
    if (!std::isnan(d_.erection.at)) add_mirror_halves();
    if (!std::isnan(d_.temperature.set_at)) add_temperature();
    if (d_.drive.friction > 0) add_friction();
    if (!std::isnan(d_.maintenance.load)) add_person();
    if (!std::isnan(d_.snow.on_ground) || d_.water.drains == "blocked")
      for (int i = -8; i <= 8; ++i) out_.heap_stations.push_back(i / 16.0);
    return std::move(out_);
  }

 private:
  int add(LoadCase load) {
    out_.cases.push_back(std::move(load));
    return static_cast<int>(out_.cases.size()) - 1;
  }

  template <class Value>  // force per length of a member along one direction; 0 = none
  LoadCase along_members(const Vec3& direction, Value&& value) const {
    LoadCase load;
    for (std::size_t m = 0; m < c_.body.members.size(); ++m)
      if (const double per_length = value(c_.body.members[m]); per_length != 0)
        load.lines.push_back({.member = static_cast<int>(m),
                              .at_from = per_length * direction,
                              .at_to = per_length * direction});
    return load;
  }

  static bool is_rib(const fem::Member& m) { return m.group.starts_with("rib"); }
  static bool is_tube(const fem::Member& m) { return m.group == "torque tube" || m.group.starts_with("box"); }
  const fem::Section& section_at(const fem::Member& m) const {
    return c_.body.sections[static_cast<std::size_t>(m.section)];
  }

  void add_bare() {
    const auto drag = [&](const fem::Member& m) {
      const fem::Section& section = section_at(m);
      if (is_tube(m))
        return or_else(d_.bare_members.tube,
                       loads::drag_coefficient(section.round ? loads::BareShape::round
                                                             : loads::BareShape::square)) *
               section.depth_z;
      return is_rib(m) ? d_.bare_members.ribs * section.depth_y : 0.0;
    };
    out_.at.bare_y = add(along_members(Vec3::UnitY(), drag));
    out_.at.bare_z = add(along_members(Vec3::UnitZ(), drag));
  }

  void add_along() {
    const double posts = or_else(d_.bare_members.posts, profile_drag(d_.receiver.posts.profile)) *
                         profile_depth(d_.receiver.posts.profile);
    LoadCase load = along_members(Vec3::UnitX(), [&](const fem::Member& m) {
      return m.group == "receiver post" ? posts
             : is_rib(m)                ? fence_share * d_.bare_members.ribs * section_at(m).depth_z
                                        : 0.0;
    });
    const loads::Roughness back = d_.bare_members.back == "smooth"  ? loads::Roughness::smooth
                                  : d_.bare_members.back == "rough" ? loads::Roughness::rough
                                                                    : loads::Roughness::very_rough;
    const double friction =
        loads::friction_force({.area = 1, .front = loads::Roughness::smooth, .back = back}, 1);
    const Skin& skin = c_.skin;
    Eigen::VectorXd force = Eigen::VectorXd::Zero(3 * skin.samples());
    for (int st = 0; st < skin.modules * skin.stations; ++st)
      for (int r = 0; r < skin.rows; ++r)
        force[3 * skin.sample(st, r)] =
            friction * skin.station_weight[static_cast<std::size_t>(st)] *
            skin.row_weight[static_cast<std::size_t>(r)] *
            area_normal(skin.row_y[static_cast<std::size_t>(r)], c_.focal_length).norm();
    const Eigen::VectorXd nodal = skin.move.transpose() * force;
    for (int n = 0; n < static_cast<int>(c_.body.nodes.size()); ++n)
      if (nodal.segment<6>(6 * n).any())
        load.nodes.push_back({n, nodal.segment<3>(6 * n), nodal.segment<3>(6 * n + 3)});
    out_.at.along = add(load);
  }

  double mirror_per_area() const {
    if (!std::isnan(d_.mirror.mass)) return d_.mirror.mass + d_.mirror.pad_mass;
    return d_.mirror.thickness * material_of(d_.mirror.material, d_.mirror.thickness).density +
           d_.mirror.pad_mass;
  }

  // The share `part(y)` of every mirror strip's mass under 1 m/s^2.
  template <class Share>
  void push_mirror(LoadCase& load, const Vec3& direction, Share&& share) const {
    for (const fem::PointMass& p : c_.body.masses) {
      if (p.group != "mirror") continue;
      const double y = c_.body.nodes[static_cast<std::size_t>(p.node)].at.y() + p.offset.y();
      const Vec3 force = p.mass * share(y) * direction;
      if (force.any()) load.nodes.push_back({p.node, force, p.offset.cross(force)});
    }
  }

  void add_ice() {
    const ReceiverInput& r = d_.receiver;
    const double t = d_.ice.thickness, outer = or_else(r.sleeve.outside_diameter, r.outside_diameter);
    const double receiver = loads::ice_on_tube({.outside_diameter = outer, .thickness = t});
    const auto per_length = [&](const fem::Member& m) {
      const fem::Section& section = section_at(m);
      if (m.group == "receiver") return receiver;
      // Corners carry a quarter circle each: together pi t^2.
      return loads::ice_density * t * (section.perimeter + std::numbers::pi * t);
    };
    const double on_mirror = loads::ice_on_sheet(d_.ice.thickness) / mirror_per_area();
    for (const Vec3& direction : {Vec3(Vec3::UnitY()), Vec3(Vec3::UnitZ())}) {
      LoadCase load = along_members(direction, per_length);
      push_mirror(load, direction, [&](double) { return on_mirror; });
      (direction.y() == 1 ? out_.at.ice_y : out_.at.ice_z) = add(load);
    }
  }

  void add_mirror_halves() {
    int* const numbers[2][2] = {{&out_.at.minus_y, &out_.at.minus_z}, {&out_.at.plus_y, &out_.at.plus_z}};
    const double middle = layout_.tube_half_width / 2;  // strips over the tube belong to both sides
    for (int side = 0; side < 2; ++side)
      for (int axis = 0; axis < 2; ++axis) {
        LoadCase load;
        push_mirror(load, axis == 0 ? Vec3(Vec3::UnitY()) : Vec3(Vec3::UnitZ()), [&](double y) {
          return std::abs(y) < middle ? 0.5 : (y > 0) == (side == 1) ? 1.0 : 0.0;
        });
        *numbers[side][axis] = add(load);
      }
  }

  void add_temperature() {
    LoadCase warm, frame, receiver;
    for (std::size_t i = 0; i < c_.body.members.size(); ++i) {
      const fem::Member& m = c_.body.members[i];
      const int number = static_cast<int>(i);
      warm.temperatures.push_back({.member = number, .uniform = 1});
      if ((is_tube(m) || is_rib(m)) && section_at(m).depth_z > 0)
        frame.temperatures.push_back({.member = number, .gradient_z = 1 / section_at(m).depth_z});
      // The lit side looks at the mirror, along -z.
      if (m.group == "receiver")
        receiver.temperatures.push_back({.member = number, .gradient_z = -1 / d_.receiver.outside_diameter});
    }
    out_.at.warm = add(warm);
    out_.at.frame_gradient = add(frame);
    out_.at.receiver_gradient = add(receiver);
  }

  void add_friction() {
    LoadCase load;
    for (const Bearing& b : c_.bearings)
      load.nodes.push_back({b.node, Vec3::Zero(), Vec3(1.0 / static_cast<double>(c_.bearings.size()), 0, 0)});
    out_.at.friction = add(load);
  }

  // The middle of the module that lies farthest from the drive: tips of its middle rib, tube, receiver.
  void add_person() {
    const bool first = 2 * layout_.drive_pylon > d_.row.modules;
    const std::size_t module = first ? 0 : static_cast<std::size_t>(d_.row.modules - 1);
    const ModulePart& part = c_.modules[module];
    const double middle = (part.x_from + part.x_to) / 2;
    const auto nearest = [&](auto&& wanted) {
      int best = -1;
      for (int n = 0; n < static_cast<int>(c_.body.nodes.size()); ++n) {
        const fem::Node& node = c_.body.nodes[static_cast<std::size_t>(n)];
        if (wanted(node) &&
            (best < 0 || std::abs(node.at.x() - middle) <
                             std::abs(c_.body.nodes[static_cast<std::size_t>(best)].at.x() - middle)))
          best = n;
      }
      return best;
    };
    const auto place = [&](const char* where, int node) {
      if (node < 0) return;
      PersonPlace p{where, -1, -1};
      LoadCase y, z;
      y.nodes = {{node, Vec3::UnitY(), Vec3::Zero()}};
      z.nodes = {{node, Vec3::UnitZ(), Vec3::Zero()}};
      p.y = add(y);
      p.z = add(z);
      out_.person.push_back(p);
    };
    const auto tip = [](const fem::Node& n, bool plus) {
      return n.name.ends_with(", tip") && (n.at.y() > 0) == plus;
    };
    place("rib tip on the -Y side", nearest([&](const fem::Node& n) { return tip(n, false); }));
    place("rib tip on the +Y side", nearest([&](const fem::Node& n) { return tip(n, true); }));
    place("tube", nearest([](const fem::Node& n) { return n.name.starts_with("tube of"); }));
    place("receiver", nearest([](const fem::Node& n) {
            return n.name.starts_with("receiver post") && n.name.ends_with(", head");
          }));
  }

  const TroughDesign& d_;
  const Collector& c_;
  TroughLayout layout_;
  UnitCases out_;
};

}  // namespace

double profile_drag(const ProfileInput& profile) {
  return loads::drag_coefficient(profile.shape.starts_with("round") ? loads::BareShape::round
                                                                    : loads::BareShape::square);
}

UnitCases unit_cases(const TroughDesign& design, const Collector& collector) {
  return Maker(design, collector).run();
}

}  // namespace focalframe::models
