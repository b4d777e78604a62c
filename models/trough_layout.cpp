#include "models/trough_layout.h"

#include <algorithm>
#include <cmath>

#include "models/profile.h"

namespace focalframe::models {
namespace {

// Arm nodes: the purlin stations and the ends are kept, each bay between them is cut into equal parts so that
// the whole arm has at least `elements` elements.
void cut_arm(const TroughDesign& design, TroughLayout& layout, int refine) {
  const double root = layout.tube_half_width, rim = layout.width / 2;
  const int purlins = design.purlins.count / 2;
  const int bays = std::max(1, purlins);
  const int parts = std::max(1, (design.ribs.elements + bays - 1) / bays) * refine;
  layout.arm_y = {root};
  for (int bay = 0; bay < bays; ++bay) {
    for (int part = 1; part <= parts; ++part)
      layout.arm_y.push_back(root + (rim - root) * (bay + static_cast<double>(part) / parts) / bays);
    if (purlins > 0) layout.purlin_at.push_back(static_cast<int>(layout.arm_y.size()) - 1);
  }
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
  layout.tube_half_width =
      (design.tube.profile.shape == "rectangular-tube" ? design.tube.profile.width : tube_depth) / 2;
  const double mirror = std::isnan(design.mirror.thickness) ? 0.0 : design.mirror.thickness;
  layout.tube_to_vertex =
      !std::isnan(row.tube_to_vertex) ? row.tube_to_vertex : row.tube_to_mirror + tube_depth / 2 + mirror;
  layout.axis_to_vertex = row.axis_to_vertex;
  const bool on_purlins = design.mirror.fixed_to == "purlins" && design.purlins.count > 0;
  layout.standoff =
      mirror + design.mirror.pad_height + (on_purlins ? profile_depth(design.purlins.profile) : 0.0);

  const double gap = std::isnan(row.end_gap) ? row.module_length / 50 : row.end_gap;
  const int ribs = design.ribs.per_module;
  for (int i = 0; i < ribs; ++i)
    layout.rib_x.push_back(gap + (row.module_length - 2 * gap) * i / std::max(1, ribs - 1));
  const int posts = design.receiver.posts.per_module;
  for (int i = 0; i < posts; ++i) layout.post_x.push_back(row.module_length * (i + 0.5) / posts);
  cut_arm(design, layout, refine);
  return layout;
}

double rib_depth(const TroughDesign& design, const TroughLayout& layout, double y) {
  const double root = layout.tube_half_width, rim = layout.width / 2;
  const double t = std::clamp((std::abs(y) - root) / (rim - root), 0.0, 1.0);
  return design.ribs.depth_at_tube + t * (design.ribs.depth_at_tip - design.ribs.depth_at_tube);
}

}  // namespace focalframe::models
