#include "models/rib_arms.h"

#include <Eigen/Geometry>
#include <algorithm>
#include <cmath>

#include "models/profile.h"

namespace focalframe::models {
namespace {

using fem::Vec3;

// A plate between two purlins may turn freely at both; beside the tube one end is clamped.
constexpr double clamped_end = 0.7;

}  // namespace

RibArms::RibArms(const TroughDesign& design, const TroughLayout& layout, BodyMaker& make)
    : d_(design), at_(layout), make_(make) {
  const RibsInput& ribs = d_.ribs;
  const std::size_t elements = at_.arm_y.size() - 1;
  if (ribs.kind == "plate") {
    material_ = make_.material(ribs.material, ribs.thickness);
    for (std::size_t e = 0; e < elements; ++e) {
      const double depth = rib_depth(d_, at_, (at_.arm_y[e] + at_.arm_y[e + 1]) / 2);
      sections_.push_back(make_.section(fem::flat({.depth_z = depth, .thickness_y = ribs.thickness})));
    }
    return;
  }
  const ProfileInput& along = ribs.kind == "truss" ? ribs.chords : ribs.bar;
  material_ = make_.material(along);
  chord_ = make_.section(section_of(along));
  sections_.assign(elements, chord_);
  if (ribs.kind != "truss") return;
  web_material_ = make_.material(ribs.webs);
  web_ = make_.section(section_of(ribs.webs));
}

Vec3 RibArms::below_mirror(double x, double y, double below) const {
  return surface_point(x, y, at_.focal_length) - area_normal(y, at_.focal_length).normalized() * below;
}

Vec3 RibArms::axis_point(double x, double y) const {
  return below_mirror(x, y, at_.standoff + rib_seat(d_, at_, y));
}

RibPart RibArms::add(int module, int number, double x, int tube_node) {
  RibPart rib;
  rib.module = module;
  rib.x = x;
  rib.tube_node = tube_node;
  for (std::size_t side = 0; side < 2; ++side) {
    const std::string name = place_name("rib", number, module) + (side == 0 ? ", -Y side" : ", +Y side");
    add_arm(rib, side, name);
    if (d_.ribs.kind == "truss") add_web_plane(rib, side, name);
  }
  make_.point_mass(tube_node, d_.ribs.hub_mass, Vec3::Zero(), place_name("rib", number, module) + ", hub",
                   "rib hub");
  return rib;
}

// Length over which the upper edge is not held sideways.
double RibArms::held_sideways() const {
  const double arm = at_.width / 2 - at_.tube_half_width;
  return at_.purlin_at.empty() ? arm : arm / static_cast<double>(at_.purlin_at.size());
}

// A plate element: between purlins for lateral buckling, as a cantilever in its own plane.
void RibArms::hold_plate(int element) {
  const double arm = at_.width / 2 - at_.tube_half_width;
  const bool first_bay = at_.purlin_at.empty() || element < at_.purlin_at.front();
  const double length = held_sideways() * (first_bay && !at_.purlin_at.empty() ? clamped_end : 1.0);
  make_.out.buckling.push_back(
      {make_.last_member(), 2 * arm, length, d_.mirror.sheet_braces_ribs ? 0.0 : length, "flat"});
}

void RibArms::add_arm(RibPart& rib, std::size_t side, const std::string& name) {
  const double sign = side == 0 ? -1 : 1, arm_length = at_.width / 2 - at_.tube_half_width;
  const std::string& kind = d_.ribs.kind;
  const ProfileInput& along = kind == "truss" ? d_.ribs.chords : d_.ribs.bar;
  int last = rib.tube_node;
  Vec3 arm = axis_point(rib.x, sign * at_.arm_y[0]) - make_.at(last), from = make_.at(last) + arm;
  for (std::size_t e = 0; e + 1 < at_.arm_y.size(); ++e) {
    const double y0 = sign * at_.arm_y[e], y1 = sign * at_.arm_y[e + 1];
    const bool tip = e + 2 == at_.arm_y.size();
    const Vec3 to = axis_point(rib.x, y1);
    const int next = make_.node(to, name + (tip ? ", tip" : ", part " + std::to_string(e + 1)));
    Vec3 up = area_normal((y0 + y1) / 2, at_.focal_length);
    if (kind != "plate") up = rolled_up(along, to - from, up);
    const std::string group = kind == "truss" ? "rib chord" : e == 0 ? "rib root" : "rib";
    const std::string part =
        name + (kind == "truss" ? ", upper chord" : "") + ", part " + std::to_string(e + 1);
    make_.member(last, next, sections_[e], material_, up, part, group).offset_from = arm;
    arm = Vec3::Zero();
    rib.members[side].push_back(make_.last_member());
    rib.nodes[side].push_back(next);
    if (kind == "plate") hold_plate(static_cast<int>(e));
    if (kind == "bent")
      make_.out.buckling.push_back({make_.last_member(), 2 * arm_length, held_sideways(), 0, along.shape});
    if (kind == "truss") {
      const double panel = arm_length / d_.ribs.panels;
      make_.out.buckling.push_back({make_.last_member(), panel,
                                    d_.mirror.sheet_braces_ribs ? panel : held_sideways(), 0, along.shape});
    }
    last = next;
    from = to;
  }
}

void RibArms::add_web_plane(const RibPart& rib, std::size_t side, const std::string& name) {
  const double sign = side == 0 ? -1 : 1, arm_length = at_.width / 2 - at_.tube_half_width;
  const RibsInput& ribs = d_.ribs;
  const double seat = at_.standoff + rib_seat(d_, at_, 0);
  const auto lower_point = [&](std::size_t p) {
    const double y = at_.arm_y[static_cast<std::size_t>(at_.panel_at[p])];
    return below_mirror(rib.x, sign * y, seat + rib_depth(d_, at_, y));
  };
  const auto bar = [&](int from, const Vec3& arm, int to, bool web, const std::string& what) {
    const ProfileInput& profile = web ? ribs.webs : ribs.chords;
    const Vec3 along = make_.at(to) - make_.at(from) - arm;
    const Vec3 up = rolled_up(profile, along, Vec3::UnitX().cross(along));
    make_
        .member(from, to, web ? web_ : chord_, web ? web_material_ : material_, up, name + ", " + what,
                web ? "rib web" : "rib chord")
        .offset_from = arm;
    // A web is taken as hinged at both ends; the lower chord is held sideways at the tube and the tip only.
    make_.out.buckling.push_back(
        {make_.last_member(), along.norm(), web ? along.norm() : arm_length, 0, profile.shape});
  };
  int inner = rib.tube_node;
  Vec3 arm = lower_point(0) - make_.at(inner);
  for (std::size_t p = 1; p < at_.panel_at.size(); ++p) {
    const std::string number = std::to_string(p);
    const int upper = rib.nodes[side][static_cast<std::size_t>(at_.panel_at[p]) - 1];
    const int lower = make_.node(lower_point(p), name + ", lower chord at panel point " + number);
    bar(inner, arm, lower, false, "lower chord, panel " + number);
    bar(inner, arm, upper, true, "diagonal " + number);
    bar(lower, Vec3::Zero(), upper, true, "post " + number);
    inner = lower;
    arm = Vec3::Zero();
  }
}

}  // namespace focalframe::models
