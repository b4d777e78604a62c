#include "models/ray_trace.h"

#include <algorithm>
#include <cmath>
#include <memory>
#include <stdexcept>

namespace focalframe::models {

namespace {

using Eigen::Vector3d;

/// Draws the sun's offset across the trough from its line profile.
class SunOffset {
 public:
  explicit SunOffset(const SunShape& sun) : sun_(sun), share_(sun.angle.size(), 0.0) {
    for (std::size_t k = 1; k < share_.size(); ++k)
      share_[k] =
          share_[k - 1] + (sun.angle[k] - sun.angle[k - 1]) * (sun.density[k] + sun.density[k - 1]) / 2;
  }

  double draw(Chance& chance) const {
    if (share_.empty()) return sun_.gaussian_rms > 0 ? sun_.gaussian_rms * chance.normal() : 0;
    const double pick = 2 * chance.uniform() - 1, wanted = std::abs(pick) * share_.back();
    const auto after = std::upper_bound(share_.begin() + 1, share_.end() - 1, wanted) - share_.begin();
    const auto k = static_cast<std::size_t>(after);
    const double width = sun_.angle[k] - sun_.angle[k - 1], p = sun_.density[k - 1];
    const double grade = (sun_.density[k] - p) / width, rest = wanted - share_[k - 1];
    // Root of p s + grade s^2 / 2 = rest in the form that survives grade = 0.
    const double s = 2 * rest / (p + std::sqrt(std::max(0.0, p * p + 2 * grade * rest)));
    return std::copysign(sun_.angle[k - 1] + std::min(s, width), pick);
  }

 private:
  const SunShape& sun_;
  std::vector<double> share_;
};

/// Direction of the light: incidence along the row, then the sun's own width, then aim and tracking.
Vector3d incoming(const TracedTrough& trough, const SunOffset& sun, Chance& chance) {
  const double theta = trough.error.incidence;
  Vector3d light(std::sin(theta), std::tan(sun.draw(chance)), -std::cos(theta));
  const double turn = trough.aim + trough.error.tracking_rms * chance.normal();
  return turned(light.normalized(), {turn, 0, 0});
}

Vector3d mirror_normal(const TracedTrough& trough, double y, const SkinMotion& motion, Chance& chance) {
  const double slope = trough.parabola.slope_angle(y);
  const Vector3d across(0, std::cos(slope), std::sin(slope)), ideal(0, -std::sin(slope), std::cos(slope));
  const Vector3d workshop = trough.error.slope_rms * chance.normal() * Vector3d::UnitX() +
                            trough.error.longitudinal_slope_rms * chance.normal() * across;
  return turned(turned(ideal, workshop), motion.rotation);
}

bool meets_receiver(const TracedTrough& trough, const Vector3d& from, const Vector3d& ray,
                    const Vector3d& receiver) {
  const Eigen::Vector2d to = (receiver - from).tail<2>(), along = ray.tail<2>().normalized();
  if (trough.kind == LineReceiver::tube)
    return to.dot(along) > 0 && std::abs(to.x() * along.y() - to.y() * along.x()) < trough.receiver_radius;
  if (!(along.y() > 0) || !(to.y() > 0)) return false;
  return std::abs(to.x() - along.x() * to.y() / along.y()) < trough.receiver_radius;
}

bool caught(const TracedTrough& trough, const SunOffset& sun, Chance& chance) {
  const double x = trough.x_from + (trough.x_to - trough.x_from) * chance.uniform();
  const double y = trough.parabola.width * (chance.uniform() - 0.5);
  const SkinMotion motion = trough.skin ? trough.skin(x, y) : SkinMotion{};
  const Vector3d point = Vector3d(x, y, trough.parabola.height(y)) + motion.displacement;
  const Vector3d light = incoming(trough, sun, chance);
  const Vector3d normal = mirror_normal(trough, y, motion, chance);
  const Vector3d ray = scattered(reflected(light, normal), trough.error.scatter_rms, chance);
  Vector3d receiver(x, 0, trough.parabola.focal_length);
  if (trough.receiver) receiver += trough.receiver(x);
  return meets_receiver(trough, point, ray, receiver);
}

/// Interval of a table that holds a value, and the share of the way through it (outside: below 0 or above 1).
struct Place {
  std::size_t index = 0;
  double share = 0;
};

Place place(const std::vector<double>& table, double value) {
  if (table.size() == 1) return {};
  const auto after = std::upper_bound(table.begin() + 1, table.end() - 1, value) - table.begin();
  const auto k = static_cast<std::size_t>(after);
  return {k - 1, (value - table[k - 1]) / (table[k] - table[k - 1])};
}

struct Samples {
  std::vector<double> x, y;
  std::vector<SkinMotion> motion;

  SkinMotion at(double along, double across) const {
    const Place i = place(x, along), j = place(y, across);
    SkinMotion sum;
    for (std::size_t di = 0; di < std::min<std::size_t>(2, x.size()); ++di)
      for (std::size_t dj = 0; dj < std::min<std::size_t>(2, y.size()); ++dj) {
        const double share = (di ? i.share : 1 - i.share) * (dj ? j.share : 1 - j.share);
        const SkinMotion& corner = motion[(i.index + di) * y.size() + j.index + dj];
        sum.displacement += share * corner.displacement;
        sum.rotation += share * corner.rotation;
      }
    return sum;
  }
};

}  // namespace

SkinMotionAt sampled_motion(std::vector<double> station_x, std::vector<double> row_y,
                            std::vector<SkinMotion> samples) {
  if (samples.empty() || samples.size() != station_x.size() * row_y.size())
    throw std::invalid_argument("a sampled skin needs one motion per station and row");
  const auto ascend = [](const std::vector<double>& values) {
    return std::adjacent_find(values.begin(), values.end(), std::greater_equal<>()) == values.end();
  };
  if (!ascend(station_x) || !ascend(row_y))
    throw std::invalid_argument("stations and rows of a sampled skin must ascend");
  const auto held =
      std::make_shared<const Samples>(Samples{std::move(station_x), std::move(row_y), std::move(samples)});
  return [held](double x, double y) { return held->at(x, y); };
}

TracedIntercept trace_rays(const TracedTrough& trough, std::int64_t rays, std::uint64_t seed) {
  if (rays < 1) throw std::invalid_argument("a ray trace needs at least one ray");
  Chance chance(seed);
  const SunOffset sun(trough.error.sun);
  std::int64_t hits = 0;
  for (std::int64_t k = 0; k < rays; ++k) hits += caught(trough, sun, chance) ? 1 : 0;
  return estimate(hits, rays);
}

}  // namespace focalframe::models
