#include "loads/pose.h"

#include <catch2/catch.hpp>
#include <cmath>
#include <numbers>

#include "fem/units.h"

using namespace focalframe;
using namespace focalframe::loads;

namespace {

constexpr double pi = std::numbers::pi;

Eigen::Vector3d upwind_direction(double wind_from) { return {std::sin(wind_from), std::cos(wind_from), 0}; }

}  // namespace

TEST_CASE("collector and world axes coincide when the face looks at the zenith", "[loads][pose]") {
  CHECK(world_to_collector(90 * deg).isApprox(Eigen::Matrix3d::Identity(), 1e-15));
}

TEST_CASE("the collector axes are a right-handed set in every pose and their z looks along the elevation",
          "[loads][pose]") {
  for (int e = -90; e <= 270; e += 15) {
    const Eigen::Matrix3d r = world_to_collector(e * deg);
    CHECK((r * r.transpose()).isApprox(Eigen::Matrix3d::Identity(), 1e-14));
    CHECK(r.determinant() == Approx(1));
    const Eigen::Vector3d z = r.row(2);
    CHECK(z.isApprox(Eigen::Vector3d(0, std::cos(e * deg), std::sin(e * deg)), 1e-14));
  }
}

TEST_CASE("growing elevation is a positive rotation about +x", "[loads][pose]") {
  const Eigen::Vector3d before = world_to_collector(30 * deg).row(2),
                        after = world_to_collector(31 * deg).row(2);
  CHECK(before.cross(after).x() > 0);
}

TEST_CASE("front wind sees the elevation as pitch, rear wind its supplement", "[loads][pose]") {
  for (int e = -90; e <= 270; e += 10) {
    const Eigen::Vector3d axis(0, std::cos(e * deg), std::sin(e * deg));
    for (const double from : {0.0, 180 * deg}) {
      const double p = pitch_seen_by_wind(e * deg, from);
      // p = atan2(z . Z, z . u): the same direction, whatever the wrapping.
      CHECK(std::cos(p) == Approx(axis.dot(upwind_direction(from))).margin(1e-12));
      CHECK(std::sin(p) == Approx(axis.z()).margin(1e-12));
      CHECK(p > -pi);
      CHECK(p <= pi);
    }
  }
}

TEST_CASE("a pose in front wind mirrors the supplementary pose in rear wind", "[loads][pose]") {
  for (int e = -90; e <= 270; e += 5)
    CHECK(std::abs(std::remainder(
              pitch_seen_by_wind(e * deg, 0) - pitch_seen_by_wind((180 - e) * deg, 180 * deg), 2 * pi)) <
          1e-12);
}

TEST_CASE("the side axis is downwind on the collector when the face looks up", "[loads][pose]") {
  for (const double from : {0.0, 30 * deg, 150 * deg, 180 * deg, 290 * deg}) {
    const Eigen::Vector3d y = world_to_collector(90 * deg).row(1);
    CHECK((side_axis_along_y(from) * y).dot(-upwind_direction(from)) > 0);
  }
}

TEST_CASE("the side axis is sin p downwind plus cos p up in every pose and both winds", "[loads][pose]") {
  for (int e = -90; e <= 270; e += 10)
    for (const double from : {0.0, 180 * deg}) {
      const double p = pitch_seen_by_wind(e * deg, from);
      const Eigen::Vector3d y = world_to_collector(e * deg).row(1);
      const Eigen::Vector3d s =
          -std::sin(p) * upwind_direction(from) + std::cos(p) * Eigen::Vector3d::UnitZ();
      CHECK((side_axis_along_y(from) * y - s).norm() < 1e-12);
    }
}

TEST_CASE("yaw runs from 0 across the row to 90 deg along it", "[loads][pose]") {
  CHECK(yaw(0) == Approx(0).margin(1e-7));
  CHECK(yaw(180 * deg) == Approx(0).margin(1e-7));
  CHECK(yaw(90 * deg) == Approx(90 * deg));
  CHECK(yaw(210 * deg) == Approx(30 * deg));
  CHECK(yaw(-30 * deg) == Approx(30 * deg));
}

TEST_CASE("yawed wind keeps cos^2 of the cross-plane load up to 60 deg and a quarter beyond",
          "[loads][pose]") {
  CHECK(yaw_factor(0) == 1);
  CHECK(yaw_factor(45 * deg) == Approx(0.5));
  CHECK(yaw_factor(60 * deg) == Approx(0.25));
  CHECK(yaw_factor(90 * deg) == Approx(0.25));
}

TEST_CASE("a dish's pitch depends only on the angle between its axis and the wind", "[loads][pose]") {
  const Eigen::Vector3d upwind = Eigen::Vector3d(1, 2, 0).normalized();
  const Eigen::Vector3d off = upwind.cross(Eigen::Vector3d::UnitZ()).normalized();
  for (int a = 0; a <= 180; a += 20)
    for (int round = 0; round < 360; round += 45) {
      const Eigen::Vector3d side = Eigen::AngleAxisd(round * deg, upwind) * off;
      const Eigen::Vector3d axis = std::cos(a * deg) * upwind + std::sin(a * deg) * side;
      CHECK(dish_pitch(axis, upwind) == Approx(a * deg).margin(1e-12));
    }
}
