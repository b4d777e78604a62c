#include "loads/snow.h"

#include <cmath>
#include <numbers>
#include <stdexcept>

#include "fem/units.h"

namespace focalframe::loads {

namespace {

constexpr double pi = std::numbers::pi;

void validate(const Aperture& a) {
  if (!(a.width > 0 && a.focal_length > 0))
    throw std::invalid_argument("aperture width and focal length must be > 0");
}

// Seen along the optical axis, the water's surface covers a strip (trough) or a disc (dish) around the lowest
// place, y0 = 2 f cot e, that just touches the lower rim.
struct Pool {
  double centre = 0, half_width = 0;
};
Pool pool(const Aperture& a, double elevation) {
  const double c = std::cos(elevation), s = std::sin(elevation);
  if (s <= 0) return {};
  const double y0 = 2 * a.focal_length * c / s;
  return {y0, std::max(0.0, a.width / 2 - std::abs(y0))};
}

}  // namespace

HeldWater held_water(const Aperture& aperture, double elevation) {
  validate(aperture);
  const Pool p = pool(aperture, elevation);
  if (p.half_width == 0) return {};
  const double f = aperture.focal_length, r = p.half_width, depth = r * r / (4 * f);
  const double surface =
      p.centre * p.centre / (4 * f) + depth;  // z of the water's surface above the lowest place
  if (aperture.dish) return {pi * r * r * r * r / (8 * f), p.centre, surface - depth / 3};
  return {r * r * r / (3 * f), p.centre, surface - 2 * depth / 5};
}

double snow_shape_coefficient(double slope) {
  const double angle = std::abs(slope) / deg;
  if (angle <= 30) return 0.8;
  return angle < 60 ? 0.8 * (60 - angle) / 30 : 0.0;
}

double water_pressure(const Aperture& aperture, double elevation, double y) {
  const Pool p = pool(aperture, elevation);
  const double away = y - p.centre;
  if (std::abs(away) >= p.half_width) return 0;
  // Across the axis of sight the water is (r^2 - away^2) / 4f deep; the upright depth is sin(e) of it.
  const double depth = (p.half_width * p.half_width - away * away) / (4 * aperture.focal_length);
  return water_density * standard_gravity * depth * std::sin(elevation);
}

double snow_cover(const Aperture& aperture, double elevation, double y, SnowOnBack back, double x) {
  const Pool p = pool(aperture, elevation);
  const double f = aperture.focal_length;
  // Level area per area of the aperture, < 0: the back faces up.
  const double level = std::sin(elevation) + std::cos(elevation) * y / (2 * f);
  if (level < 0 && back == SnowOnBack::sheds) return 0;
  const double normal = std::sqrt(1 + (x * x + y * y) / (4 * f * f));
  const bool in_pool = level > 0 && std::hypot(x, y - p.centre) < p.half_width;
  const double mu =
      in_pool ? 0.8 : snow_shape_coefficient(std::acos(std::min(1.0, std::abs(level) / normal)));
  return mu * std::abs(level);
}

SnowArea snow_area(const Aperture& aperture, double elevation, SnowOnBack back) {
  validate(aperture);
  const double w = aperture.width;
  // Midpoint rule: the integrand has kinks at 30 and 60 deg, where higher rules gain nothing.
  const int n = 400, m = aperture.dish ? 400 : 1;
  double sum = 0, first = 0;
  for (int i = 0; i < n; ++i) {
    const double y = w * (-0.5 + (i + 0.5) / n);
    for (int j = 0; j < m; ++j) {
      const double x = aperture.dish ? w * (-0.5 + (j + 0.5) / m) : 0;
      if (aperture.dish && x * x + y * y > w * w / 4) continue;
      const double part = snow_cover(aperture, elevation, y, back, x) * (w / n) * (aperture.dish ? w / m : 1);
      sum += part;
      first += part * y;
    }
  }
  return sum > 0 ? SnowArea{sum, first / sum} : SnowArea{};
}

double ice_on_sheet(double thickness) { return 2 * ice_density * thickness; }

double ice_on_tube(const IcedTube& tube) {
  return ice_density * pi * tube.thickness * (tube.outside_diameter + tube.thickness);
}

}  // namespace focalframe::loads
