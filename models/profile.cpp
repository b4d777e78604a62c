#include "models/profile.h"

#include <Eigen/Geometry>
#include <algorithm>
#include <cmath>
#include <cstdio>
#include <stdexcept>

#include "fem/section_profiles.h"
#include "fem/units.h"

namespace focalframe::models {
namespace {

double or_else(double value, double other) { return std::isnan(value) ? other : value; }

fem::Section tube_of(const ProfileInput& p, double depth, double width) {
  return fem::rectangular_tube({.depth_z = depth,
                                .width_y = width,
                                .wall = p.wall,
                                .outer_radius = or_else(p.outer_radius, -1),
                                .inner_radius = or_else(p.inner_radius, -1)});
}

fem::AngleSection angle_of(const ProfileInput& p) {
  return fem::angle({.leg_z = p.depth,
                     .leg_y = p.width,
                     .thickness = p.thickness,
                     .root_radius = or_else(p.root_radius, 0),
                     .toe_radius = or_else(p.toe_radius, 0)});
}

fem::Section properties_of(const ProfileInput& p) {
  fem::Section s;
  s.name = "properties";
  s.A = p.area;
  s.Iy = p.Iy;
  s.Iz = p.Iz;
  s.J = p.J;
  s.shear_area_y = or_else(p.shear_area_y, 0);
  s.shear_area_z = or_else(p.shear_area_z, 0);
  s.Wy = p.Wy;
  s.Wz = p.Wz;
  s.Wt = p.Wt;
  s.depth_y = s.depth_z = p.depth;
  return s;
}

}  // namespace

fem::Section section_of(const ProfileInput& p) {
  if (p.shape == "round-tube")
    return fem::round_tube({.outside_diameter = p.outside_diameter, .wall = p.wall});
  if (p.shape == "square-tube") return tube_of(p, p.side, p.side);
  if (p.shape == "rectangular-tube") return tube_of(p, p.depth, p.width);
  if (p.shape == "round-bar") return fem::round_bar({.diameter = p.outside_diameter});
  if (p.shape == "flat") return fem::flat({.depth_z = p.depth, .thickness_y = p.thickness});
  if (p.shape == "angle") return angle_of(p).section;
  if (p.shape == "channel")
    return fem::channel({.depth_z = p.depth, .flange_y = p.width, .web = p.web, .flange = p.flange}).section;
  if (p.shape == "properties") return properties_of(p);
  throw std::invalid_argument("no profile shape is called '" + p.shape + "'");
}

double profile_roll(const ProfileInput& p) {
  return p.turned + (p.shape == "angle" ? angle_of(p).tilt : 0.0);
}

fem::Vec3 rolled_up(const ProfileInput& p, const fem::Vec3& axis, const fem::Vec3& up) {
  const double roll = profile_roll(p);
  if (roll == 0) return up;
  const fem::Vec3 x = axis.normalized(), z = (up - x * x.dot(up)).normalized(), y = z.cross(x);
  return std::cos(roll) * z - std::sin(roll) * y;
}

double profile_depth(const ProfileInput& p) {
  if (p.shape == "round-tube" || p.shape == "round-bar") return p.outside_diameter;
  if (p.shape == "square-tube") return p.side;
  return p.depth;
}

double profile_seat(const ProfileInput& p) {
  return p.shape == "angle" ? angle_of(p).centroid_z : profile_depth(p) / 2;
}

double profile_thickness(const ProfileInput& p) {
  if (p.shape == "channel") return std::max(p.web, p.flange);
  if (p.shape == "round-bar") return p.outside_diameter;
  return or_else(p.wall, p.thickness);
}

bool is_lopsided(const ProfileInput& p) { return p.shape == "angle" || p.shape == "channel"; }

std::string sizes_text(const ProfileInput& p) {
  char text[96];
  if (p.shape == "round-tube")
    std::snprintf(text, sizeof text, "%.1f x %.1f mm", p.outside_diameter / mm, p.wall / mm);
  else if (p.shape == "square-tube")
    std::snprintf(text, sizeof text, "%.0f x %.1f mm", p.side / mm, p.wall / mm);
  else if (p.shape == "rectangular-tube")
    std::snprintf(text, sizeof text, "%.0f x %.0f x %.1f mm", p.depth / mm, p.width / mm, p.wall / mm);
  else if (p.shape == "round-bar")
    std::snprintf(text, sizeof text, "%.1f mm", p.outside_diameter / mm);
  else if (p.shape == "angle")
    std::snprintf(text, sizeof text, "%.0f x %.0f x %.1f mm", p.depth / mm, p.width / mm, p.thickness / mm);
  else if (p.shape == "channel")
    std::snprintf(text, sizeof text, "%.0f x %.0f x %.1f/%.1f mm", p.depth / mm, p.width / mm, p.web / mm,
                  p.flange / mm);
  else if (p.shape == "properties")
    std::snprintf(text, sizeof text, "A %.4g cm2", p.area / (mm * mm) / 100);
  else if (p.shape == "lattice-box")
    std::snprintf(text, sizeof text, "box %.0f x %.0f mm", p.depth / mm, p.width / mm);
  else
    std::snprintf(text, sizeof text, "%.0f x %.1f mm", p.depth / mm, p.thickness / mm);
  return text;
}

}  // namespace focalframe::models
