#pragma once

/// Ribs of a dish with hub, rings and diagonals; used by models/dish.cpp.

#include <vector>

#include "models/dish_collector.h"
#include "models/dish_design.h"
#include "models/frame_maker.h"

namespace focalframe::models {

/// One rib: nodes along the chord that carries the skin, from the hub outwards, and the members between them.
struct DishRib {
  double angle = 0;          ///< about z from +x [rad]
  std::vector<int> nodes;    ///< front chord
  std::vector<int> members;  ///< nodes[i] to nodes[i + 1]
  std::vector<int> back;     ///< truss: back chord's node at the same place, -1 between panel points
  int inner = -1;            ///< spoke under the skin inside the hub, from the middle to nodes[0]; -1 = none
};

struct DishRibs {
  double hub_radius = 0, rim = 0, focal_length = 0;
  double standoff = 0;        ///< skin above the axis of the chord that carries it, along z [m]
  std::vector<double> radii;  ///< of the nodes along every rib [m]
  std::vector<DishRib> ribs;
  int hub = -1;  ///< node in the middle of the hub

  /// Place along a rib: `piece` counts the members, `xi` is the fraction; inside the hub piece = -1.
  struct Along {
    int piece = 0;
    double xi = 0;
  };
  Along along(double radius) const;
  int index_of(double radius) const;  ///< nearest entry of `radii`
};

DishRibs build_ribs(const DishDesign& design, int refine, FrameMaker& make);

}  // namespace focalframe::models
