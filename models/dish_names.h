#pragma once

/// Small readings of a dish's words that rules and builder share.

#include <string>

#include "models/dish_design.h"

namespace focalframe::models {

/// Index of "ring 2" in the list of rings (1 here); -1 when there is no such ring.
int ring_of(const DishInput& dish, const std::string& word);

/// Size of a profile along its depth, 0 while that is not given [m].
double profile_depth_or_zero(const ProfileInput& profile);

/// Profile with the material of the part it belongs to where it names none.
ProfileInput with_material(ProfileInput profile, const std::string& material);

}  // namespace focalframe::models
