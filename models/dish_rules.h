#pragma once

/// Rules of a dish across fields; the design of the book is a DishDesign.

#include "models/schema_rules.h"

namespace focalframe::models {

void check_dish_shape(RuleBook& book);  ///< parabola, hub, ribs, rings, bracing, surface, feed
void check_dish_mount(RuleBook& book);  ///< axis, actuator, yoke, azimuth, pedestal, limits

}  // namespace focalframe::models
