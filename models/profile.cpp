#include "models/profile.h"

#include <cmath>
#include <cstdio>
#include <stdexcept>

#include "fem/units.h"

namespace focalframe::models {

fem::Section section_of(const ProfileInput& p) {
  if (p.shape == "round-tube")
    return fem::round_tube({.outside_diameter = p.outside_diameter, .wall = p.wall});
  if (p.shape == "square-tube")
    return fem::rectangular_tube({.depth_z = p.side, .width_y = p.side, .wall = p.wall});
  if (p.shape == "rectangular-tube")
    return fem::rectangular_tube({.depth_z = p.depth, .width_y = p.width, .wall = p.wall});
  if (p.shape == "round-bar") return fem::round_bar({.diameter = p.outside_diameter});
  if (p.shape == "flat") return fem::flat({.depth_z = p.depth, .thickness_y = p.thickness});
  throw std::invalid_argument("no profile shape is called '" + p.shape + "'");
}

double profile_depth(const ProfileInput& p) {
  if (p.shape == "round-tube" || p.shape == "round-bar") return p.outside_diameter;
  if (p.shape == "square-tube") return p.side;
  return p.depth;
}

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
  else
    std::snprintf(text, sizeof text, "%.0f x %.1f mm", p.depth / mm, p.thickness / mm);
  return text;
}

}  // namespace focalframe::models
