#pragma once

/// How much wind a dish takes before the first limit that holds it together or holds it still is reached,
/// pose by pose and direction by direction, and where it is parked best.

#include <string>
#include <vector>

#include "models/dish_strength.h"

namespace focalframe::models {

/// Greatest 3 s gust at the elevation axis in one pose and direction.
struct DishLimit {
  double elevation = not_given, wind_from = not_given;  ///< [rad]
  double gust = not_given;                              ///< [m/s]; infinity: beyond 100 m/s
  std::string governs;                                  ///< what gives first, in words
};

/// Share of the hardest used limit among those the design judges: stress, buckling, drives, footing.
struct DishShare {
  double used = 0;
  std::string what;
};
DishShare hardest_use(const DishStrengthResult& result, const DishDesign& design, bool moving);

class DishLimits {
 public:
  /// Design and table must outlive it.
  DishLimits(const DishDesign& design, const loads::CoefficientTable& table);

  /// Every used share is a convex function of the velocity pressure, so there is one crossing above q = 0; 0
  /// when the weight alone is too much.
  DishLimit at(StateKind kind, double elevation, double wind_from) const;

  /// All elevations of the turning range (every 15 deg, ends, stow pose) from eight directions, at rest.
  std::vector<DishLimit> map(StateKind kind) const;

 private:
  const DishDesign& design_;
  DishModel model_;
  DishWinds winds_;
  loads::WindAtHeight air_;  ///< density, turbulence and height of the axis
};

/// The best pose to park in: with the wind from anywhere, and with the azimuth turned so that the wind
/// strikes the face or the back within 45 deg.
struct DishStowPose {
  double elevation = not_given, gust = not_given;
  std::string governs, azimuth;  ///< azimuth: "any", "face to the wind", "back to the wind"
};
struct StowSearch {
  DishStowPose asked, any, turned;
};
StowSearch search_stow(const std::vector<DishLimit>& map, const DishDesign& design);

}  // namespace focalframe::models
