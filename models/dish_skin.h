#pragma once

/// The sampled skin of a dish on its ribs; used by models/dish.cpp.

#include "models/dish_collector.h"
#include "models/dish_ribs.h"

namespace focalframe::models {

/// Samples from `inner_radius` to the rim: Gauss points along the radius, evenly spaced ones around.
DishSkin make_dish_skin(const fem::Frame& body, const DishRibs& ribs, double inner_radius);

/// Hangs the skin's mass on the nodes of the ribs that carry it, with the mass and its centre exact.
/// `area_mass` [kg/m^2] of the real, curved surface.
void hang_skin(fem::Frame& body, const DishRibs& ribs, const DishSkin& skin, double area_mass);

}  // namespace focalframe::models
