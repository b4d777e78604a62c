#include "models/antenna_rigging.h"

#include <algorithm>
#include <cmath>
#include <stdexcept>

#include "fem/units.h"

namespace focalframe::models {

double gravity_half_path(const Parabola& parabola, const AntennaGravity& gravity, double elevation,
                         double rigged, DishFit fit) {
  const double y = std::cos(elevation) - std::cos(rigged), z = std::sin(rigged) - std::sin(elevation);
  const DishSamples &a = gravity.along_y, &b = gravity.along_z;
  const auto mixed = [&](std::span<const double> p, std::span<const double> q) {
    if (p.size() != q.size()) throw std::invalid_argument("gravity along y and z must move the same points");
    std::vector<double> sum;
    for (std::size_t i = 0; i < p.size(); ++i) sum.push_back(y * p[i] + z * q[i]);
    return sum;
  };
  const std::vector<double> u = mixed(a.u, b.u), v = mixed(a.v, b.v), w = mixed(a.w, b.w);
  return fit_paraboloid(parabola, {a.x, a.y, a.weight, u, v, w}, fit).half_path_after;
}

AntennaRigging best_rigging(const Parabola& parabola, const AntennaGravity& gravity,
                            std::span<const double> elevations, DishFit fit) {
  if (elevations.empty()) throw std::invalid_argument("rigging needs at least one elevation");
  const auto [low, high] = std::minmax_element(elevations.begin(), elevations.end());
  AntennaRigging best;
  const auto try_at = [&](double rigged) {
    double worst = 0;
    for (const double elevation : elevations)
      worst = std::max(worst, gravity_half_path(parabola, gravity, elevation, rigged, fit));
    if (!(worst >= best.worst)) best = {rigged, worst};
  };
  try_at(*low);
  for (double step = 10 * deg; step > 0.09 * deg; step /= 10) {
    const double from = step > 9 * deg ? *low : best.elevation - 10 * step;
    const int count = step > 9 * deg ? static_cast<int>(std::ceil((*high - *low) / step)) : 20;
    for (int i = 0; i <= count; ++i) try_at(std::clamp(from + i * step, *low, *high));
  }
  return best;
}

}  // namespace focalframe::models
