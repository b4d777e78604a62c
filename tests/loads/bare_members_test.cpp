#include "loads/bare_members.h"

#include <catch2/catch.hpp>

#include "fem/units.h"

using namespace focalframe;
using namespace focalframe::loads;

TEST_CASE("short round members have the listed drag", "[loads][bare]") {
  // Aeronautical Engineer's Data Book: 0.63, 0.68, 0.74, 0.82, 0.98, 1.20 at l/d 1, 2, 5, 10, 40, endless.
  for (const auto& [slenderness, cd] :
       {std::pair{1.0, 0.63}, {2.0, 0.68}, {5.0, 0.74}, {10.0, 0.82}, {40.0, 0.98}, {1e4, 1.20}})
    CHECK(drag_coefficient(BareShape::round) * end_factor(BareShape::round, slenderness) == Approx(cd));
}

TEST_CASE("end factors grow with slenderness up to 1", "[loads][bare]") {
  for (const BareShape shape : {BareShape::round, BareShape::flat}) {
    double last = 0;
    for (double s = 1; s < 2000; s *= 1.3) {
      const double share = end_factor(shape, s);
      CHECK(share >= last);
      CHECK(share <= 1);
      last = share;
    }
    CHECK(last == 1);
  }
  CHECK_THROWS_AS(end_factor(BareShape::round, 0), std::invalid_argument);
}

TEST_CASE("drag is q Cd w l across the wind, nothing along it, half at 45 deg", "[loads][bare]") {
  BareMember post{.shape = BareShape::square, .width = 0.1, .length = 2};
  CHECK(drag_force(post, 500) == Approx(500 * 2.2 * 0.2));
  post.inclination = 45 * deg;
  CHECK(drag_force(post, 500) == Approx(250 * 2.2 * 0.2));
  post.inclination = 90 * deg;
  CHECK(drag_force(post, 500) == Approx(0).margin(1e-9));
}

TEST_CASE("shielding and free ends take their share", "[loads][bare]") {
  BareMember tube{.shape = BareShape::round, .width = 0.2, .length = 2, .free_ends = true, .shielding = 0.5};
  CHECK(drag_force(tube, 100) == Approx(100 * 0.82 * 0.4 * 0.5));
}

TEST_CASE("every bare shape drags more than a round one", "[loads][bare]") {
  for (const BareShape s : {BareShape::square, BareShape::angle_open, BareShape::angle_back,
                            BareShape::i_beam, BareShape::tee_flange, BareShape::tee_stem, BareShape::flat})
    CHECK(drag_coefficient(s) > drag_coefficient(BareShape::round));
}

TEST_CASE("wind along the row rubs on both faces", "[loads][bare]") {
  CHECK(friction_force({.area = 100}, 500) == Approx(500 * 100 * 0.05));
  CHECK(friction_force({.area = 100, .front = Roughness::smooth, .back = Roughness::rough}, 500) ==
        Approx(500 * 100 * 0.03));
}
