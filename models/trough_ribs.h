#pragma once

/// One pair of arms of a plate rib, and how the skin rides on it.

#include <array>
#include <vector>

#include "models/skin.h"
#include "models/trough_layout.h"

namespace focalframe::models {

struct RibPart {
  int module = 0;
  double x = 0;                             ///< along the row [m]
  int tube_node = 0;                        ///< carries the root and the mirror over the tube
  std::array<std::vector<int>, 2> members;  ///< [0] the -y arm, [1] the +y arm, from root to rim
  std::array<std::vector<int>, 2> nodes;  ///< likewise, without the root (which is rigid with the tube node)
};

/// The skin over all ribs: TroughLayout::stations_per_bay Gauss stations in every bay between neighbouring
/// ribs of a module, two Gauss rows in every arm element and four over the tube. Between ribs the surface is
/// ruled straight.
Skin make_skin(const fem::Frame& frame, const TroughLayout& layout, const std::vector<RibPart>& ribs,
               int modules);

}  // namespace focalframe::models
