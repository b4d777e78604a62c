#pragma once

/// What the weight does to a dish over its elevations, and what setting and learning can do about it.

#include "models/dish_assessment.h"

namespace focalframe::models {

/// Every 5 deg of the tracking range and its ends.
GravityMap gravity_map(const DishModel& model, const DishOpticsCheck& optics, const DishDesign& design);

/// Rain held face up with blocked drains, at the stow pose; empty when that looks too low to hold any.
DishBowl bowl_check(const DishModel& model, const DishDesign& design);

}  // namespace focalframe::models
