#include "loads/seismic.h"

#include <catch2/catch.hpp>

#include "fem/units.h"

using namespace focalframe;
using namespace focalframe::loads;

TEST_CASE("the EN spectrum starts at 2/3 S ag, stands at 2.5 S ag / q and never jumps", "[loads][seismic]") {
  const SeismicEn base{.ground_acceleration = 2, .ground = GroundType::c, .behaviour = 1.5};
  const auto at = [&](double period) {
    SeismicEn in = base;
    in.period = period;
    return seismic_acceleration(in);
  };
  CHECK(at(0) == Approx(2 * 1.15 * 2 / 3));
  CHECK(at(0.4) == Approx(2 * 1.15 * 2.5 / 1.5));
  CHECK(at(1.2) == Approx(at(0.4) / 2));
  CHECK(at(10) == Approx(0.2 * 2));
  for (const double corner : {0.2, 0.6, 2.0})
    CHECK(at(corner - 1e-6) == Approx(at(corner + 1e-6)).epsilon(1e-4));
}

TEST_CASE("the ASCE coefficient is S_DS / R for stiff, falls with 1/T for soft and has a floor",
          "[loads][seismic]") {
  SeismicAsce in{.s_ds = 1.0, .s_d1 = 0.6, .response = 2, .importance = 1};
  CHECK(seismic_acceleration(in) == Approx(0.5 * standard_gravity));
  in.period = 1;
  CHECK(seismic_acceleration(in) == Approx(0.3 * standard_gravity));
  in.period = 50;
  CHECK(seismic_acceleration(in) == Approx(0.044 * standard_gravity));
  in.importance = 1.5;
  in.period = 0.1;
  CHECK(seismic_acceleration(in) == Approx(0.75 * standard_gravity));
}

TEST_CASE("an earthquake with a negative period or q below 1 is refused", "[loads][seismic]") {
  CHECK_THROWS_AS(seismic_acceleration(SeismicEn{.period = -1}), std::invalid_argument);
  CHECK_THROWS_AS(seismic_acceleration(SeismicEn{.behaviour = 0.5}), std::invalid_argument);
  CHECK_THROWS_AS(seismic_acceleration(SeismicAsce{.response = 0}), std::invalid_argument);
}
