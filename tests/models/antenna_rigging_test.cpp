// Rigging of an antenna: gravity vanishes where the panels were set, and the best place is where closed forms
// say.

#include "models/antenna_rigging.h"

#include <catch2/catch.hpp>
#include <cmath>

#include "fem/units.h"

using namespace focalframe;
using namespace focalframe::models;

namespace {

// A dish of 10 m, f = 4 m; gravity along an axis bends it to a saddle of this height at the rim [m].
struct Saddle {
  Parabola dish{10, 4};
  std::vector<double> x, y, weight, zero, y_bend, z_bend;
  Saddle(double along_y, double along_z) {
    for (int i = -10; i <= 10; ++i)
      for (int j = -10; j <= 10; ++j) {
        const double px = 0.5 * i, py = 0.5 * j;
        if (px * px + py * py > 25) continue;
        const double shape = (px * px - py * py) / 25;
        x.push_back(px);
        y.push_back(py);
        weight.push_back(1);
        zero.push_back(0);
        y_bend.push_back(along_y * 2 * px * py / 25);
        z_bend.push_back(along_z * shape);
      }
  }
  AntennaGravity gravity() const {
    return {{x, y, weight, zero, zero, y_bend}, {x, y, weight, zero, zero, z_bend}};
  }
};

}  // namespace

TEST_CASE("an antenna has no gravity error where its panels were set, and a growing one away from it") {
  const Saddle saddle(1 * mm, 2 * mm);
  const auto rms = [&](double at) { return gravity_half_path(saddle.dish, saddle.gravity(), at, 45 * deg); };
  CHECK(rms(45 * deg) == Approx(0).margin(1e-15));
  CHECK(rms(60 * deg) > 0);
  CHECK(rms(80 * deg) > rms(60 * deg));
  CHECK(rms(20 * deg) > rms(30 * deg));
}

TEST_CASE("an antenna that bends under axial gravity only is best set where the sine is midway") {
  // Error proportional to |sin e - sin e0|: the worst of both ends is least at the mean of their sines.
  const Saddle saddle(0, 2 * mm);
  const double range[] = {20 * deg, 50 * deg, 90 * deg};
  const AntennaRigging best = best_rigging(saddle.dish, saddle.gravity(), range);
  const double sine = (std::sin(20 * deg) + 1) / 2;
  CHECK(best.elevation == Approx(std::asin(sine)).margin(0.1 * deg));
  CHECK(best.worst ==
        Approx(gravity_half_path(saddle.dish, saddle.gravity(), 90 * deg, std::asin(sine))).epsilon(0.01));
}

TEST_CASE("an antenna that bends alike along both axes is best set in the middle of its range") {
  // |g(e) - g(e0)| = 2 |sin((e - e0)/2)| for equal orthogonal shapes; on a grid they are nearly equal.
  const Saddle saddle(2 * mm, 2 * mm);
  const double range[] = {10 * deg, 45 * deg, 80 * deg};
  CHECK(best_rigging(saddle.dish, saddle.gravity(), range).elevation == Approx(45 * deg).margin(1 * deg));
  CHECK_THROWS_AS(best_rigging(saddle.dish, saddle.gravity(), {}), std::invalid_argument);
}
