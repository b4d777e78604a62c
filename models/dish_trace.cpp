#include "models/dish_trace.h"

#include <Eigen/Geometry>
#include <algorithm>
#include <cmath>
#include <numbers>
#include <stdexcept>
#include <vector>

namespace focalframe::models {

namespace {

using Eigen::Vector3d;

/// Draws a point of a round sun.
class RoundSun {
 public:
  explicit RoundSun(const SunShape& sun) : sun_(sun), share_(sun.angle.size(), 0.0) {
    for (std::size_t k = 1; k < share_.size(); ++k)
      share_[k] = share_[k - 1] + (sun.angle[k] - sun.angle[k - 1]) * (light(k) + light(k - 1)) / 2;
  }

  Eigen::Vector2d draw(Chance& chance) const {
    if (share_.empty()) return sun_.gaussian_rms * Eigen::Vector2d(chance.normal(), chance.normal());
    const double wanted = chance.uniform() * share_.back();
    const auto after = std::upper_bound(share_.begin() + 1, share_.end() - 1, wanted) - share_.begin();
    const auto k = static_cast<std::size_t>(after);
    const double width = sun_.angle[k] - sun_.angle[k - 1], p = light(k - 1), rest = wanted - share_[k - 1];
    const double grade = (light(k) - p) / width;
    const double s = 2 * rest / (p + std::sqrt(std::max(0.0, p * p + 2 * grade * rest)));
    const double theta = sun_.angle[k - 1] + std::min(s, width);
    const double around = 2 * std::numbers::pi * chance.uniform();
    return theta * Eigen::Vector2d(std::cos(around), std::sin(around));
  }

 private:
  /// Light per angle from the centre; linear between knots as an approximation finer than the knots' own.
  double light(std::size_t k) const { return sun_.angle[k] * sun_.radiance[k]; }

  const SunShape& sun_;
  std::vector<double> share_;
};

bool meets_receiver(const TracedDish& dish, const Vector3d& from, const Vector3d& ray) {
  const Vector3d to = Vector3d(0, 0, dish.parabola.focal_length) + dish.receiver - from;
  if (dish.kind == PointReceiver::sphere)
    return to.dot(ray) > 0 && to.cross(ray).norm() < dish.receiver_radius;
  if (!(ray.z() > 0) || !(to.z() > 0)) return false;
  return (to - ray * (to.z() / ray.z())).head<2>().norm() < dish.receiver_radius;
}

bool caught(const TracedDish& dish, const RoundSun& sun, Chance& chance) {
  const double rim = dish.parabola.width / 2, inner = dish.inner_radius;
  const double rho = std::sqrt(inner * inner + (rim * rim - inner * inner) * chance.uniform());
  const double azimuth = 2 * std::numbers::pi * chance.uniform();
  const Vector3d outward(std::cos(azimuth), std::sin(azimuth), 0), around(-outward.y(), outward.x(), 0);
  const double slope = dish.parabola.slope_angle(rho);
  const Vector3d point = rho * outward + Vector3d(0, 0, dish.parabola.height(rho));
  const SkinMotion motion = dish.skin ? dish.skin(point.x(), point.y()) : SkinMotion{};

  const Vector3d uphill = std::cos(slope) * outward + std::sin(slope) * Vector3d::UnitZ();
  const Vector3d ideal = std::cos(slope) * Vector3d::UnitZ() - std::sin(slope) * outward;
  const Vector3d workshop = dish.error.slope_rms * (chance.normal() * around + chance.normal() * uphill);
  const Vector3d normal = turned(turned(ideal, workshop), motion.rotation);

  const Eigen::Vector2d offset = sun.draw(chance);
  const Vector3d tracking = dish.error.tracking_rms * Vector3d(chance.normal(), chance.normal(), 0);
  const Vector3d light = turned(Vector3d(offset.x(), offset.y(), -1).normalized(), dish.aim + tracking);
  const Vector3d ray = scattered(reflected(light, normal), dish.error.scatter_rms, chance);
  return meets_receiver(dish, point + motion.displacement, ray);
}

}  // namespace

TracedIntercept trace_rays(const TracedDish& dish, std::int64_t rays, std::uint64_t seed) {
  if (rays < 1) throw std::invalid_argument("a ray trace needs at least one ray");
  Chance chance(seed);
  const RoundSun sun(dish.error.sun);
  std::int64_t hits = 0;
  for (std::int64_t k = 0; k < rays; ++k) hits += caught(dish, sun, chance) ? 1 : 0;
  return estimate(hits, rays);
}

}  // namespace focalframe::models
