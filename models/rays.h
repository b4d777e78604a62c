#pragma once

/// What the Monte-Carlo traces of troughs and dishes share: chance, mirrors, and what a count of hits is
/// worth.

#include <Eigen/Core>
#include <cstdint>
#include <limits>
#include <random>

namespace focalframe::models {

/// Random numbers that are the same with every compiler (standard distributions differ, the engine does not).
class Chance {
 public:
  explicit Chance(std::uint64_t seed) : engine_(seed) {}
  double uniform();  ///< inside (0, 1)
  double normal();   ///< mean 0, rms 1

 private:
  std::mt19937_64 engine_;
};

/// A vector turned by a finite rotation vector [rad].
Eigen::Vector3d turned(const Eigen::Vector3d& vector, const Eigen::Vector3d& rotation);

/// A ray mirrored at a unit normal.
Eigen::Vector3d reflected(const Eigen::Vector3d& ray, const Eigen::Vector3d& normal);

/// A unit ray scattered with this rms in each of two directions across it [rad].
Eigen::Vector3d scattered(const Eigen::Vector3d& ray, double rms, Chance& chance);

struct TracedIntercept {
  std::int64_t rays = 0;
  double intercept = std::numeric_limits<double>::quiet_NaN();
  double standard_error = std::numeric_limits<double>::quiet_NaN();
  double low = std::numeric_limits<double>::quiet_NaN();  ///< 95 % confidence interval (Wilson's)
  double high = std::numeric_limits<double>::quiet_NaN();
};

TracedIntercept estimate(std::int64_t hits, std::int64_t rays);

}  // namespace focalframe::models
