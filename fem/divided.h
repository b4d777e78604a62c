#pragma once

/// A frame with its members divided inside, for modes and buckling that bow between the nodes.

#include <vector>

#include "fem/frame.h"
#include "fem/load_case.h"

namespace focalframe::fem {

struct Divided {
  /// The first nodes are those of the whole frame; the inner ones follow. A piece carries the name and group
  /// of its member, an inner node its place ("rib 3 at 0.25 (near root)").
  Frame frame;
  std::vector<std::vector<int>> pieces;     ///< per member of the whole: its pieces, from start to end
  std::vector<std::vector<double>> places;  ///< per member: fractions where pieces meet, with 0 and 1
};

/// `count[m]` pieces (at least 1) for member m. Offsets, releases and end springs stay at the member's own
/// ends. Pieces are equal but for 1 % that differs from member to member, so that inner nodes of crossing
/// members never lie in one place. Statics are the same as those of the whole to round-off.
Divided divide(const Frame& frame, const std::vector<int>& count);

/// The same loads on the pieces.
LoadCase divide(const Divided& divided, const LoadCase& load);

}  // namespace focalframe::fem
