#include "models/rays.h"

#include <Eigen/Geometry>
#include <cmath>
#include <numbers>

namespace focalframe::models {

using Eigen::Vector3d;

double Chance::uniform() { return (static_cast<double>(engine_() >> 11) + 0.5) * 0x1p-53; }

double Chance::normal() {
  const double radius = std::sqrt(-2 * std::log(uniform()));
  return radius * std::cos(2 * std::numbers::pi * uniform());
}

Vector3d turned(const Vector3d& vector, const Vector3d& rotation) {
  const double angle = rotation.norm();
  if (angle == 0) return vector;
  return Eigen::AngleAxisd(angle, rotation / angle) * vector;
}

Vector3d reflected(const Vector3d& ray, const Vector3d& normal) { return ray - 2 * ray.dot(normal) * normal; }

Vector3d scattered(const Vector3d& ray, double rms, Chance& chance) {
  if (rms == 0) return ray;
  const Vector3d a = ray.unitOrthogonal(), b = ray.cross(a);
  return (ray + rms * (chance.normal() * a + chance.normal() * b)).normalized();
}

TracedIntercept estimate(std::int64_t hits, std::int64_t rays) {
  TracedIntercept result;
  const auto n = static_cast<double>(rays);
  const double p = static_cast<double>(hits) / n;
  result.rays = rays;
  result.intercept = p;
  result.standard_error = std::sqrt(p * (1 - p) / n);
  // Wilson's score interval stays inside 0..1 even when all rays hit; z for 95 %, two-sided.
  const double z = 1.959964, middle = (p + z * z / (2 * n)) / (1 + z * z / n);
  const double half = z / (1 + z * z / n) * std::sqrt(p * (1 - p) / n + z * z / (4 * n * n));
  result.low = middle - half;
  result.high = middle + half;
  return result;
}

}  // namespace focalframe::models
