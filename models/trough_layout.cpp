#include "models/trough_layout.h"

#include <Eigen/Core>
#include <algorithm>
#include <cmath>
#include <string>
#include <utility>

#include "models/profile.h"
#include "models/skin.h"

namespace focalframe::models {
namespace {

// Arm nodes: purlin stations, the panel points of a truss and the ends are kept; what lies between is cut so
// that the whole arm has at least `elements` elements.
void cut_arm(const TroughDesign& design, TroughLayout& layout, int refine) {
  const double root = layout.tube_half_width, rim = layout.width / 2;
  const int purlins = design.purlins.count / 2, panels = design.ribs.kind == "truss" ? design.ribs.panels : 0;
  std::vector<double> stops{0, 1};
  for (int i = 1; i <= purlins; ++i) stops.push_back(static_cast<double>(i) / purlins);
  for (int i = 1; i <= panels; ++i) stops.push_back(static_cast<double>(i) / panels);
  std::sort(stops.begin(), stops.end());
  const auto same = [](double a, double b) { return std::abs(a - b) < 1e-9; };
  stops.erase(std::unique(stops.begin(), stops.end(), same), stops.end());

  const int elements = design.ribs.elements;
  layout.arm_y = {root};
  std::vector<std::pair<double, int>> stop_at{{0.0, 0}};
  for (std::size_t s = 0; s + 1 < stops.size(); ++s) {
    const double from = stops[s], to = stops[s + 1];
    // A bent chord is pushed out between panel points: it takes some pieces there to show that.
    const int least = panels > 0 ? 3 : 1, wanted = static_cast<int>(std::ceil(elements * (to - from) - 1e-9));
    const int parts = std::max(least, wanted) * refine;
    for (int part = 1; part <= parts; ++part)
      layout.arm_y.push_back(root + (rim - root) * (from + (to - from) * part / parts));
    stop_at.emplace_back(to, static_cast<int>(layout.arm_y.size()) - 1);
  }
  const auto index_of = [&](double stop) {
    return std::find_if(stop_at.begin(), stop_at.end(), [&](const auto& s) { return same(s.first, stop); })
        ->second;
  };
  for (int i = 1; i <= purlins; ++i) layout.purlin_at.push_back(index_of(static_cast<double>(i) / purlins));
  for (int i = 0; i <= panels && panels > 0; ++i)
    layout.panel_at.push_back(index_of(static_cast<double>(i) / panels));
}

// Across the trough: a point `below` under the mirror along its normal.
Eigen::Vector2d under_mirror(const TroughLayout& layout, double y, double below) {
  const fem::Vec3 normal = area_normal(y, layout.focal_length).normalized();
  const fem::Vec3 at = surface_point(0, y, layout.focal_length) - normal * below;
  return {at.y(), at.z()};
}

}  // namespace

double focal_length_of(const ParabolaInput& parabola) {
  if (!std::isnan(parabola.focal_length)) return parabola.focal_length;
  return parabola.aperture * parabola.aperture / (16.0 * parabola.depth);
}

TroughLayout lay_out(const TroughDesign& design, int refine) {
  TroughLayout layout;
  const RowInput& row = design.row;
  layout.width = design.parabola.aperture;
  layout.focal_length = focal_length_of(design.parabola);
  layout.module_length = row.module_length;
  layout.row_length = row.modules * row.module_length;
  layout.drive_pylon = row.drive_after_module >= 0 ? row.drive_after_module : row.modules / 2;

  const double tube_depth = profile_depth(design.tube.profile);
  const std::string& tube = design.tube.profile.shape;
  layout.tube_half_width =
      (tube == "rectangular-tube" || tube == "lattice-box" ? design.tube.profile.width : tube_depth) / 2;
  const double mirror = std::isnan(design.mirror.thickness) ? 0.0 : design.mirror.thickness;
  layout.tube_to_vertex =
      !std::isnan(row.tube_to_vertex) ? row.tube_to_vertex : row.tube_to_mirror + tube_depth / 2 + mirror;
  layout.axis_to_vertex = row.axis_to_vertex;
  const bool on_purlins = design.mirror.fixed_to == "purlins" && design.purlins.count > 0;
  layout.standoff =
      mirror + design.mirror.pad_height + (on_purlins ? profile_depth(design.purlins.profile) : 0.0);

  layout.rib_line = layout.standoff;
  if (design.ribs.kind != "plate") layout.rib_line += rib_seat(design, layout, 0);

  const double gap = std::isnan(row.end_gap) ? row.module_length / 50 : row.end_gap;
  const int ribs = design.ribs.per_module;
  for (int i = 0; i < ribs; ++i)
    layout.rib_x.push_back(gap + (row.module_length - 2 * gap) * i / std::max(1, ribs - 1));
  const int posts = design.receiver.posts.per_module;
  for (int i = 0; i < posts; ++i) layout.post_x.push_back(row.module_length * (i + 0.5) / posts);
  // A lattice box carries posts at its ribs only: every post moves to the nearest one.
  if (tube == "lattice-box")
    for (double& x : layout.post_x)
      x = *std::min_element(layout.rib_x.begin(), layout.rib_x.end(),
                            [x](double a, double b) { return std::abs(a - x) < std::abs(b - x); });
  // A sheet that sags from rib to rib needs more stations than one that is straight between them.
  layout.stations_per_bay = on_purlins ? 2 : 4;
  cut_arm(design, layout, refine);
  return layout;
}

double rib_depth(const TroughDesign& design, const TroughLayout& layout, double y) {
  const RibsInput& ribs = design.ribs;
  if (ribs.kind == "bent") return profile_depth(ribs.bar);
  const double root = layout.tube_half_width, rim = layout.width / 2;
  const double t = std::clamp((std::abs(y) - root) / (rim - root), 0.0, 1.0);
  if (ribs.lower_edge != "straight") return ribs.depth_at_tube + t * (ribs.depth_at_tip - ribs.depth_at_tube);
  // Along the normal at y down to the line through the lower ends of root and rim.
  const Eigen::Vector2d from = under_mirror(layout, root, layout.rib_line + ribs.depth_at_tube),
                        to = under_mirror(layout, rim, layout.rib_line + ribs.depth_at_tip);
  const double at = std::clamp(std::abs(y), root, rim);
  const Eigen::Vector2d upper = under_mirror(layout, at, layout.rib_line),
                        down = under_mirror(layout, at, layout.rib_line + 1) - upper, line = to - from;
  const auto cross = [](const Eigen::Vector2d& a, const Eigen::Vector2d& b) {
    return a.x() * b.y() - a.y() * b.x();
  };
  return cross(from - upper, line) / cross(down, line);
}

double rib_seat(const TroughDesign& design, const TroughLayout& layout, double y) {
  if (design.ribs.kind == "plate") return rib_depth(design, layout, y) / 2;
  const ProfileInput& p = design.ribs.kind == "truss" ? design.ribs.chords : design.ribs.bar;
  return profile_depth(p) - profile_seat(p);
}

}  // namespace focalframe::models
