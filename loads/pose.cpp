#include "loads/pose.h"

#include <cmath>
#include <numbers>

#include "fem/units.h"

namespace focalframe::loads {

namespace {

constexpr double pi = std::numbers::pi;

// Bearings such as 90 deg are given in floating point: a cosine this small counts as wind along the axis.
constexpr double along_axis = 1e-12;

}  // namespace

Eigen::Matrix3d world_to_collector(double elevation) {
  const double c = std::cos(elevation), s = std::sin(elevation);
  Eigen::Matrix3d rotation;
  rotation << 1, 0, 0,  //
      0, s, -c,         //
      0, c, s;
  return rotation;
}

double wrap_angle(double angle) {
  const double turned = std::remainder(angle, 2 * pi);
  return turned <= -pi ? pi : turned;
}

double pitch_seen_by_wind(double elevation, double wind_from) {
  return wrap_angle(upwind_side(wind_from) > 0 ? elevation : pi - elevation);
}

int upwind_side(double wind_from) { return std::cos(wind_from) >= -along_axis ? 1 : -1; }

int side_axis_along_y(double wind_from) { return -upwind_side(wind_from); }

double dish_pitch(const Eigen::Vector3d& optical_axis, const Eigen::Vector3d& upwind) {
  return std::atan2(optical_axis.cross(upwind).norm(), optical_axis.dot(upwind));
}

double yaw(double wind_from) { return std::acos(std::min(1.0, std::abs(std::cos(wind_from)))); }

double yaw_factor(double yaw) {
  const double c = std::cos(std::min(std::abs(yaw), 60 * deg));
  return c * c;
}

}  // namespace focalframe::loads
