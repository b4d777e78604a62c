#pragma once

/// The builder of a dish: hub, ribs, rings, diagonals, skin, receiver or feed, cradle, yoke and base.
///
/// - A hub of discs is a wheel of massless spokes of width 2 pi a / (N (1 - nu)): exact for rotationally even
///   membrane force and bending, softer than a real disc elsewhere. Its greatest stress is that of the disc
///   when the yield stress is taken (1 - nu) times.
/// - Truss ribs: chords run through, posts and diagonals are hinged; the front chord follows the paraboloid.
/// - Rings and diagonals join the ribs at the ring's radius; diagonals are hinged.
/// - The skin carries no frame load. Without a cradle the hub is tied rigidly to bearings and actuator pin.
/// - The left elevation bearing holds x, y, z, the right one y and z.

#include "models/dish_collector.h"
#include "models/dish_design.h"

namespace focalframe::models {

/// `refine` multiplies the pieces along every rib. The design must be valid.
DishCollector build_dish(const DishDesign& design, int refine = 1);

}  // namespace focalframe::models
