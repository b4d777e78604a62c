#pragma once

/// Where everything of a trough row stands, before any frame is made: stations along the row and across the
/// aperture, offsets and depths, all in collector axes (models/collector.h).

#include <vector>

#include "models/design.h"

namespace focalframe::models {

struct TroughLayout {
  double width = 0, focal_length = 0;        ///< aperture W and f [m]
  double module_length = 0, row_length = 0;  ///< [m]
  double tube_to_vertex = 0;                 ///< tube centre below the vertex [m]
  double axis_to_vertex = 0;                 ///< rotation axis below the vertex [m]; NaN until balanced
  double tube_half_width = 0;                ///< the rib's root starts here, on the tube's skin [m]
  double standoff = 0;  ///< mirror surface above the rib's upper edge, along the normal [m]
  double rib_line = 0;  ///< mirror surface above the line the rib's depth is measured from: its upper edge,
                        ///< a truss's upper chord, a bent bar's axis [m]
  int drive_pylon = 0;  ///< pylons are numbered 0 .. modules
  std::vector<double> rib_x;   ///< from the module's first pylon [m]
  std::vector<double> post_x;  ///< receiver posts, likewise [m]
  std::vector<double> arm_y;   ///< arm nodes from the root (on the tube's skin) to the rim, y > 0 [m]
  std::vector<int> purlin_at;  ///< indices into arm_y
  std::vector<int> panel_at;   ///< truss: indices into arm_y, root and rim included
  int stations_per_bay = 2;    ///< of the skin: Gauss stations between two ribs
};

/// `refine` multiplies the number of beam elements along an arm (and keeps every node of refine = 1).
TroughLayout lay_out(const TroughDesign& design, int refine = 1);

/// Depth of a plate or truss rib at distance y from the middle plane, along the mirror's normal [m]: straight
/// taper from the root to the rim, or down to a straight lower edge. May come out negative for a straight
/// edge that cuts the mirror. A bent bar: its own depth.
double rib_depth(const TroughDesign& design, const TroughLayout& layout, double y);

/// The rib's upper edge above its axis (plate: mid-depth; truss: upper chord; bar) [m].
double rib_seat(const TroughDesign& design, const TroughLayout& layout, double y);

/// Focal length from what was given: focal-length, or depth by f = W^2 / (16 depth).
double focal_length_of(const ParabolaInput& parabola);

}  // namespace focalframe::models
