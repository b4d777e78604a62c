#include "models/trough.h"

#include <algorithm>
#include <cmath>
#include <numbers>
#include <stdexcept>

#include "models/body_maker.h"
#include "models/catalogue.h"
#include "models/profile.h"
#include "models/rib_arms.h"
#include "models/torque_box.h"
#include "models/trough_ribs.h"

namespace focalframe::models {
namespace {

using fem::Vec3;

// Stiffness of the one bracket that holds the receiver along x [N/m]: a judgement; no result of a check hangs
// on it, because posts swing freely and gravity has no part along x.
constexpr double receiver_bracket = 1e6;

// Length of the parabola from the vertex to y, odd in y: f (t sqrt(1 + t^2) + asinh t), t = y / 2f.
double arc_to(double y, double focal_length) {
  const double t = y / (2 * focal_length);
  return focal_length * (t * std::sqrt(1 + t * t) + std::asinh(t));
}

class TroughBuilder {
 public:
  TroughBuilder(const TroughDesign& design, TroughLayout layout)
      : d_(design), at_(std::move(layout)), rib_arms_(d_, at_, make_) {}

  Collector build() {
    out_.width = at_.width;
    out_.focal_length = at_.focal_length;
    out_.axis_to_vertex = at_.axis_to_vertex;
    add_sections();
    for (int m = 0; m < d_.row.modules; ++m) add_module(m);
    join_modules();
    if (!at_.post_x.empty()) add_receiver();
    for (int k = 0; k <= d_.row.modules; ++k) out_.stands.push_back(make_stand(k));
    out_.drive_bearing = at_.drive_pylon;
    out_.drive_stiffness = d_.drive.stiffness;
    out_.skin = make_skin(out_.body, at_, ribs_, d_.row.modules);
    double length = 0;
    for (double w : out_.skin.station_weight) length += w;
    out_.mirror_area = length * at_.width;
    return std::move(make_.out);
  }

 private:
  void add_sections() {
    if (d_.tube.profile.shape != "lattice-box") {
      tube_section_ = make_.section(section_of(d_.tube.profile));
      tube_material_ = make_.material(d_.tube.profile);
    }
    if (d_.purlins.count > 0) {
      purlin_section_ = make_.section(section_of(d_.purlins.profile));
      purlin_material_ = make_.material(d_.purlins.profile);
    }
  }

  // Torque tube with its rib stations and post stations; its ends lie on the rotation axis.
  void add_module(int m) {
    ModulePart part;
    part.x_from = m * at_.module_length;
    part.x_to = part.x_from + at_.module_length;
    const std::string number = std::to_string(m + 1);
    const int start = make_.node({part.x_from, 0, -at_.axis_to_vertex}, "start of module " + number);
    starts_.push_back(start);
    const Vec3 to_tube(0, 0, at_.axis_to_vertex - at_.tube_to_vertex);
    if (d_.tube.profile.shape == "lattice-box") {
      ends_.push_back(make_.node({part.x_to, 0, -at_.axis_to_vertex}, "end of module " + number));
      part.tube_nodes = add_torque_box(d_, at_, make_, m, start, ends_.back(), to_tube);
    } else {
      ends_.push_back(add_tube(part, m, start, to_tube));
    }
    for (double x : at_.rib_x) part.rib_roots.push_back(tube_node_at(part, part.x_from + x));
    out_.modules.push_back(part);
    for (std::size_t r = 0; r < at_.rib_x.size(); ++r)
      ribs_.push_back(rib_arms_.add(m, static_cast<int>(r), part.x_from + at_.rib_x[r], part.rib_roots[r]));
    if (d_.purlins.count > 0) add_purlins(m);
    add_module_masses(m);
  }

  // Returns the tube's last node, on the rotation axis at the module's end.
  int add_tube(ModulePart& part, int m, int start, const Vec3& to_tube) {
    std::vector<double> stops = at_.rib_x;
    stops.insert(stops.end(), at_.post_x.begin(), at_.post_x.end());
    std::sort(stops.begin(), stops.end());
    const auto same = [](double a, double b) { return std::abs(a - b) < 1e-6; };
    stops.erase(std::unique(stops.begin(), stops.end(), same), stops.end());

    const double z = -at_.tube_to_vertex;
    const ProfileInput& profile = d_.tube.profile;
    const std::string number = std::to_string(m + 1);
    int last = start;
    Vec3 arm = to_tube;
    for (std::size_t i = 0; i <= stops.size(); ++i) {
      const bool end = i == stops.size();
      const int next = end ? make_.node({part.x_to, 0, -at_.axis_to_vertex}, "end of module " + number)
                           : make_.node({part.x_from + stops[i], 0, z},
                                        "tube of module " + number + " at " +
                                            std::to_string(std::lround(stops[i] * 1000)) + " mm");
      fem::Member& tube = make_.member(last, next, tube_section_, tube_material_,
                                       rolled_up(profile, Vec3::UnitX(), Vec3::UnitZ()),
                                       place_name("tube bay", static_cast<int>(i), m), "torque tube");
      tube.offset_from = arm;
      if (end) tube.offset_to = to_tube;
      arm = Vec3::Zero();
      if (!end) part.tube_nodes.push_back(next);
      last = next;
    }
    return last;
  }

  int tube_node_at(const ModulePart& part, double x) const {
    for (int n : part.tube_nodes)
      if (std::abs(out_.body.nodes[static_cast<std::size_t>(n)].at.x() - x) < 1e-6) return n;
    throw std::logic_error("no tube node where a rib or post stands");
  }

  void add_purlins(int m) {
    const bool carries_mirror = d_.mirror.fixed_to == "purlins";
    const std::size_t per_module = at_.rib_x.size(), first = ribs_.size() - per_module;
    for (std::size_t r = first; r + 1 < ribs_.size(); ++r)
      for (std::size_t side = 0; side < 2; ++side)
        for (std::size_t k = 0; k < at_.purlin_at.size(); ++k) {
          const std::size_t at = static_cast<std::size_t>(at_.purlin_at[k]);
          const double y = (side == 0 ? -1 : 1) * at_.arm_y[at];
          const Vec3 normal = area_normal(y, at_.focal_length).normalized();
          const int from = ribs_[r].nodes[side][at - 1], to = ribs_[r + 1].nodes[side][at - 1];
          fem::Member& purlin = make_.member(
              from, to, purlin_section_, purlin_material_,
              rolled_up(d_.purlins.profile, make_.at(to) - make_.at(from), normal),
              place_name("purlin", static_cast<int>(k), m) + (side == 0 ? ", -Y side" : ", +Y side"),
              "purlin");
          // On top of the ribs when it carries the mirror, else let into them at mid-depth.
          if (carries_mirror)
            purlin.offset_from = purlin.offset_to =
                normal * (rib_seat(d_, at_, y) + profile_seat(d_.purlins.profile));
        }
  }

  double mirror_mass_per_area() const {
    const double pads = d_.mirror.pad_mass;
    if (!std::isnan(d_.mirror.mass)) return d_.mirror.mass + pads;
    return d_.mirror.thickness * material_of(d_.mirror.material, d_.mirror.thickness).density + pads;
  }

  // Mirror strips (true arc length) hang on the nearest arm node; the strip over the tube hangs on the tube.
  void add_module_masses(int m) {
    const double per_area = mirror_mass_per_area();
    const std::size_t per_module = at_.rib_x.size(), first = ribs_.size() - per_module;
    for (std::size_t r = first; r < ribs_.size(); ++r) {
      const RibPart& rib = ribs_[r];
      const double left = r == first ? 0 : (rib.x - ribs_[r - 1].x) / 2;
      const double right = r + 1 == ribs_.size() ? 0 : (ribs_[r + 1].x - rib.x) / 2;
      const auto hang = [&](int at, double y_a, double y_b) {
        const double arc = arc_to(y_b, at_.focal_length) - arc_to(y_a, at_.focal_length);
        const Vec3 spot = surface_point(rib.x + (right - left) / 2, (y_a + y_b) / 2, at_.focal_length);
        make_.point_mass(at, per_area * arc * (left + right),
                         spot - out_.body.nodes[static_cast<std::size_t>(at)].at, "mirror", "mirror");
      };
      const double inner = (at_.arm_y[0] + at_.arm_y[1]) / 2;
      hang(rib.tube_node, -inner, inner);
      for (std::size_t side = 0; side < 2; ++side)
        for (std::size_t j = 1; j < at_.arm_y.size(); ++j) {
          const double a = (at_.arm_y[j - 1] + at_.arm_y[j]) / 2;
          const double b = j + 1 == at_.arm_y.size() ? at_.arm_y[j] : (at_.arm_y[j] + at_.arm_y[j + 1]) / 2;
          hang(rib.nodes[side][j - 1], side == 0 ? -b : a, side == 0 ? -a : b);
        }
    }
    for (int i = 0; i < d_.counterweights.per_module; ++i) {
      const std::size_t rib = static_cast<std::size_t>((2 * i + 1) * static_cast<int>(per_module) /
                                                       (2 * d_.counterweights.per_module));
      make_.point_mass(out_.modules.back().rib_roots[std::min(rib, per_module - 1)], d_.counterweights.mass,
                       {0, 0, -d_.counterweights.behind_tube}, place_name("counterweight", i, m),
                       "counterweight");
    }
    const double plate = end_plate_mass();
    const Vec3 half(0, 0, (at_.axis_to_vertex - at_.tube_to_vertex) / 2);
    make_.point_mass(starts_.back(), plate, half, "end plate", "end plate");
    make_.point_mass(ends_.back(), plate, half, "end plate", "end plate");
  }

  double end_plate_mass() const {
    if (!std::isnan(d_.end_plates.mass)) return d_.end_plates.mass;
    if (std::isnan(d_.end_plates.diameter) || std::isnan(d_.end_plates.thickness)) return 0;
    const double pi = std::numbers::pi;
    return pi / 4 * d_.end_plates.diameter * d_.end_plates.diameter * d_.end_plates.thickness * 7850;
  }

  void join_modules() {
    const bool continuous = d_.row.coupling == "continuous";
    const double twist = d_.end_plates.twist_stiffness, bend = d_.end_plates.bending_stiffness;
    for (int k = 0; k <= d_.row.modules; ++k) {
      const std::size_t i = static_cast<std::size_t>(k);
      out_.bearings.push_back({k == 0 ? starts_[0] : ends_[i - 1], k});
      if (k == 0 || k == d_.row.modules) continue;
      const bool rigid_twist = std::isnan(twist) || std::isinf(twist) || k == at_.drive_pylon;
      const bool rigid_bend = continuous && (std::isnan(bend) || std::isinf(bend));
      fem::Joint joint;
      joint.node = starts_[i];
      joint.other = ends_[i - 1];
      joint.held = {true, true, true, rigid_twist, rigid_bend, rigid_bend};
      joint.name = "coupling at pylon " + std::to_string(k + 1);
      out_.body.joints.push_back(joint);
      fem::Spring spring;
      spring.node = starts_[i];
      spring.other = ends_[i - 1];
      spring.name = joint.name;
      if (!rigid_twist) spring.stiffness[fem::rx] = twist;
      if (continuous && !rigid_bend) spring.stiffness[fem::ry] = spring.stiffness[fem::rz] = bend;
      if (spring.stiffness.any()) out_.body.springs.push_back(spring);
    }
  }

  double fill_density() const {
    if (!std::isnan(d_.receiver.fill_density)) return d_.receiver.fill_density;
    for (const CatalogueFluid& fluid : fluids())
      if (fluid.name == d_.receiver.filled_with) return fluid.density;
    return 0;
  }

  // Tube, content and glass as one bar whose density gives their mass; only the tube carries.
  int receiver_material(const fem::Section& tube) {
    const ReceiverInput& r = d_.receiver;
    const double pi = std::numbers::pi;
    const double bore = r.outside_diameter - 2 * r.wall;
    double per_length = fill_density() * pi / 4 * bore * bore;
    if (!std::isnan(r.sleeve.outside_diameter)) {
      const double inner = r.sleeve.outside_diameter - 2 * r.sleeve.wall;
      const double area = pi / 4 * (r.sleeve.outside_diameter * r.sleeve.outside_diameter - inner * inner);
      per_length += area * material_of(r.sleeve.material, r.sleeve.wall).density;
    }
    const int steel = make_.material(r.material, r.wall);
    fem::Material filled = out_.body.materials[static_cast<std::size_t>(steel)];
    filled.density += per_length / tube.A;
    return make_.add_material(filled, "receiver with content");
  }

  void add_receiver() {
    const ReceiverInput& r = d_.receiver;
    const fem::Section tube = fem::round_tube({.outside_diameter = r.outside_diameter, .wall = r.wall});
    const int mat = receiver_material(tube), sec = make_.section(tube);
    const int post_sec = make_.section(section_of(r.posts.profile));
    const int post_mat = make_.material(r.posts.profile);
    out_.receiver_radius = r.outside_diameter / 2;
    out_.receiver_drag_width =
        std::isnan(r.sleeve.outside_diameter) ? r.outside_diameter : r.sleeve.outside_diameter;

    const double drive_x = at_.drive_pylon * at_.module_length;
    double nearest = 1e300;
    std::pair<int, int> bracket{-1, -1};
    int last = make_.node({0, 0, at_.focal_length}, "receiver, first end");
    out_.receiver_nodes.push_back(last);
    const auto run_to = [&](int next) {
      make_.member(last, next, sec, mat, Vec3::UnitZ(), "receiver", "receiver");
      out_.receiver_members.push_back(static_cast<int>(out_.body.members.size()) - 1);
      out_.receiver_nodes.push_back(next);
      last = next;
    };
    for (int m = 0; m < d_.row.modules; ++m)
      for (std::size_t p = 0; p < at_.post_x.size(); ++p) {
        const double x = m * at_.module_length + at_.post_x[p];
        const std::string name = place_name("receiver post", static_cast<int>(p), m);
        const int top = make_.node({x, 0, at_.focal_length}, name + ", head");
        run_to(top);
        const int foot = tube_node_at(out_.modules[static_cast<std::size_t>(m)], x);
        fem::Member& post = make_.member(foot, top, post_sec, post_mat, Vec3::UnitY(), name, "receiver post");
        post.offset_from = Vec3(0, 0, profile_depth(d_.tube.profile) / 2);
        // Hinged about the collector's y, which is the post's own z (its x runs along +z, its z along +y).
        post.release_from[fem::rz] = post.release_to[fem::rz] = true;
        // Across the row a cantilever that carries the receiver, along it hinged at both ends.
        const double height = at_.focal_length + at_.tube_to_vertex - profile_depth(d_.tube.profile) / 2;
        out_.buckling.push_back({make_.last_member(), 2 * height, height, 0, r.posts.profile.shape});
        if (std::abs(x - drive_x) < nearest) {
          nearest = std::abs(x - drive_x);
          bracket = {top, foot};
        }
      }
    run_to(make_.node({at_.row_length, 0, at_.focal_length}, "receiver, last end"));
    fem::Spring hold;
    hold.node = bracket.first;
    hold.other = bracket.second;
    hold.stiffness[fem::ux] = receiver_bracket;
    hold.name = "receiver bracket beside the drive";
    out_.body.springs.push_back(hold);
  }

  Stand make_stand(int k) const {
    const PylonsInput& p = d_.pylons;
    Stand stand;
    stand.height = d_.row.axis_height;
    stand.x = k * at_.module_length;
    stand.driven = k == at_.drive_pylon;
    stand.post_width = profile_depth(p.profile);
    fem::Frame& f = stand.frame;
    const std::string name = "pylon " + std::to_string(k + 1);
    f.nodes = {{Vec3::Zero(), name + ", foot"}, {Vec3(0, 0, stand.height), name + ", head"}};
    stand.foot = 0;
    stand.head = 1;
    f.sections = {section_of(p.profile)};
    f.materials = {material_of(p.profile.material, profile_thickness(p.profile))};
    fem::Member post;
    post.from = 0;
    post.to = 1;
    post.up = rolled_up(p.profile, Vec3::UnitZ(), Vec3::UnitY());  // the depth stands across the row
    stand.roll = profile_roll(p.profile);
    stand.buckling = {{0, 2 * stand.height, 2 * stand.height, 0, p.profile.shape}};
    post.name = name;
    post.group = "pylon";
    f.members = {post};
    const double twisting = std::isnan(p.footing.twisting) ? p.footing.rocking : p.footing.twisting;
    const double k6[6] = {p.footing.along_row, p.footing.sideways, p.footing.upright,
                          p.footing.rocking,   p.footing.rocking,  twisting};
    fem::Support held;
    fem::Spring spring;
    spring.name = name + ", footing";
    for (std::size_t i = 0; i < 6; ++i) {
      if (std::isinf(k6[i]))
        held.fix[i] = true;
      else
        spring.stiffness[static_cast<int>(i)] = k6[i];
    }
    f.supports = {held};
    if (spring.stiffness.any()) f.springs = {spring};
    const double head = p.head_mass + (stand.driven ? d_.drive.mass : 0);
    if (head > 0) {
      fem::PointMass mass;
      mass.node = 1;
      mass.mass = head;
      mass.name = name + ", head";
      mass.group = "pylon head";
      f.masses = {mass};
    }
    return stand;
  }

  const TroughDesign& d_;
  TroughLayout at_;
  BodyMaker make_;
  Collector& out_ = make_.out;
  RibArms rib_arms_;
  std::vector<RibPart> ribs_;
  std::vector<int> starts_, ends_;  // tube end nodes on the rotation axis, per module
  int tube_section_ = 0, tube_material_ = 0, purlin_section_ = 0, purlin_material_ = 0;
};

}  // namespace

Collector build_trough(const TroughDesign& design, int refine) {
  TroughLayout layout = lay_out(design, refine);
  if (design.row.axis_word == "balanced") {
    // End plates reach from the tube to the axis, so their share of the centre of gravity moves with it.
    layout.axis_to_vertex = layout.tube_to_vertex;
    for (int pass = 0; pass < 20; ++pass) {
      const double centre = fem::total_mass(TroughBuilder(design, layout).build().body).centre.z();
      const double change = std::abs(-centre - layout.axis_to_vertex);
      layout.axis_to_vertex = -centre;
      if (change < 1e-5) break;
    }
  }
  return TroughBuilder(design, layout).build();
}

}  // namespace focalframe::models
