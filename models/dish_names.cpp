#include "models/dish_names.h"

#include <cmath>

#include "models/profile.h"

namespace focalframe::models {

int ring_of(const DishInput& dish, const std::string& word) {
  for (std::size_t i = 0; i < dish.rings.size(); ++i)
    if (word == "ring " + std::to_string(i + 1)) return static_cast<int>(i);
  return -1;
}

double profile_depth_or_zero(const ProfileInput& profile) {
  if (profile.shape.empty()) return 0;
  const double depth = profile_depth(profile);
  return std::isnan(depth) ? 0 : depth;
}

ProfileInput with_material(ProfileInput profile, const std::string& material) {
  if (profile.material.empty()) profile.material = material;
  return profile;
}

}  // namespace focalframe::models
