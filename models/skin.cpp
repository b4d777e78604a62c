#include "models/skin.h"

namespace focalframe::models {

fem::Vec3 surface_point(double x, double y, double focal_length) {
  return {x, y, y * y / (4 * focal_length)};
}

fem::Vec3 area_normal(double y, double focal_length) { return {0, -y / (2 * focal_length), 1}; }

}  // namespace focalframe::models
