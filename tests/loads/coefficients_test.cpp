#include "loads/coefficients.h"

#include <catch2/catch.hpp>
#include <cmath>

#include "fem/units.h"
#include "loads/pose.h"

using namespace focalframe;
using namespace focalframe::loads;

namespace {

CoefficientTable half_circle() {
  CoefficientTable t;
  for (int p = 0; p <= 180; p += 30) {
    const double a = p * deg;
    const Coefficients c{1.5 * std::cos(a), 0.3 * std::sin(a), -0.2 * std::sin(2 * a)};
    t.rows.push_back({a, c, {1.2 * c.Ca, 1.2 * c.Cs, 1.2 * c.Cm}});
  }
  return t;
}

CoefficientTable with_profiles() {
  CoefficientTable t = half_circle();
  t.collector_kind = "trough";
  t.stations = {-0.5, 0, 0.5};
  t.profiles = {{-90 * deg, {5, 6, 7}},
                {0, {1, 2, 1}},
                {60 * deg, {3, 1, 0}},
                {120 * deg, {1, 0, -2}},
                {180 * deg, {-1, -1, -1}}};
  return t;
}

}  // namespace

TEST_CASE("a table gives its own rows back and straight lines between", "[loads][coefficients]") {
  const CoefficientTable t = half_circle();
  for (const CoefficientRow& row : t.rows) {
    CHECK(coefficients_at(t, row.pitch)->Ca == Approx(row.best.Ca).margin(1e-12));
    CHECK(coefficients_at(t, row.pitch, true)->Cm == Approx(row.upper.Cm).margin(1e-12));
  }
  const double middle = (t.rows[1].best.Cs + t.rows[2].best.Cs) / 2;
  CHECK(coefficients_at(t, 45 * deg)->Cs == Approx(middle));
}

TEST_CASE("axial force is even, side force and moment are odd in the pitch", "[loads][coefficients]") {
  const CoefficientTable t = half_circle();
  for (int p = 1; p < 180; p += 7) {
    const Coefficients plus = *coefficients_at(t, p * deg), minus = *coefficients_at(t, -p * deg);
    CHECK(plus.Ca == Approx(minus.Ca));
    CHECK(plus.Cs == Approx(-minus.Cs));
    CHECK(plus.Cm == Approx(-minus.Cm));
  }
}

TEST_CASE("a pose in front wind has the mirrored load of the supplementary pose in rear wind",
          "[loads][coefficients]") {
  const CoefficientTable t = half_circle();
  for (int e = -90; e <= 270; e += 5) {
    const double front = pitch_seen_by_wind(e * deg, 0),
                 rear = pitch_seen_by_wind((180 - e) * deg, 180 * deg);
    const Coefficients a = *coefficients_at(t, front), b = *coefficients_at(t, rear);
    // Forces in world axes: downwind is -Y for front wind and +Y for rear wind, up is up, Mx changes sign.
    const auto world = [](const Coefficients& c, double p, double from) {
      const double down = c.Ca * std::cos(p) + c.Cs * std::sin(p),
                   up = -c.Ca * std::sin(p) + c.Cs * std::cos(p);
      return Eigen::Vector3d(-upwind_side(from) * down, up, upwind_side(from) * c.Cm);
    };
    const Eigen::Vector3d f = world(a, front, 0), r = world(b, rear, 180 * deg);
    CHECK(f.x() == Approx(-r.x()).margin(1e-12));
    CHECK(f.y() == Approx(r.y()).margin(1e-12));
    CHECK(f.z() == Approx(-r.z()).margin(1e-12));
  }
}

TEST_CASE("nothing is extrapolated", "[loads][coefficients]") {
  CoefficientTable t = half_circle();
  t.rows.pop_back();  // ends at 150 deg
  CHECK(coefficients_at(t, 150 * deg));
  CHECK_FALSE(coefficients_at(t, 151 * deg));
  CHECK_FALSE(coefficients_at(t, -151 * deg));
  CHECK(std::isnan(moment_slope(t, 148 * deg, 5 * deg)));
  CHECK_FALSE(coefficients_at(CoefficientTable{}, 0));
}

TEST_CASE("a table with rows on both sides is used as it stands", "[loads][coefficients]") {
  CoefficientTable t;
  t.rows = {{-10 * deg, {1, 0.1, 0.01}, {}}, {0, {2, 0, 0}, {}}, {180 * deg, {-1, 0, 0}, {}}};
  CHECK(coefficients_at(t, -10 * deg)->Ca == Approx(1));
  CHECK(coefficients_at(t, -10 * deg)->Cs == Approx(0.1));
  CHECK_FALSE(coefficients_at(t, -11 * deg));
  CHECK(coefficients_at(t, -180 * deg)->Ca == Approx(-1));
}

TEST_CASE("the moment slope is the secant of the table", "[loads][coefficients]") {
  const CoefficientTable t = half_circle();
  const double w = 7.5 * deg;
  const double secant = (coefficients_at(t, 97.5 * deg)->Cm - coefficients_at(t, 82.5 * deg)->Cm) / (2 * w);
  CHECK(moment_slope(t, 90 * deg, w) == Approx(secant));
  CHECK(secant > 0);
  // Odd moment: the slope is even.
  CHECK(moment_slope(t, -90 * deg, w) == Approx(secant));
  CHECK(moment_slope(t, 0, w) == Approx(coefficients_at(t, w)->Cm / w));
}

TEST_CASE("zones scale forces and moment and have no default", "[loads][coefficients]") {
  CHECK(zone_factors("isolated")->Ca == 1);
  CHECK(zone_factors("edge")->Cm == 1);
  CHECK(zone_factors("interior")->Ca == 0.5);
  CHECK(zone_factors("interior")->Cm == 0.7);
  CHECK(zone_factors("second-row")->Cm == 0.8);
  CHECK_FALSE(zone_factors(""));
  CHECK_FALSE(zone_factors("Interior"));
  for (const char* zone : {"isolated", "edge", "second-row", "interior"})
    CHECK(zone_factors(zone)->Cm >= zone_factors(zone)->Ca);
}

TEST_CASE("profiles are mirrored where a table gives none of its own below the horizon",
          "[loads][coefficients]") {
  const CoefficientTable t = with_profiles();
  CHECK(raw_profile_at(t, -60 * deg) == std::vector<double>{0, 1, 3});
  CHECK(raw_profile_at(t, -120 * deg) == std::vector<double>{-2, 0, 1});
  CHECK(raw_profile_at(t, -90 * deg) == std::vector<double>{5, 6, 7});
  CHECK(raw_profile_at(t, -180 * deg) == std::vector<double>{-1, -1, -1});
  const std::vector<double> between = raw_profile_at(t, 30 * deg);
  CHECK(between[0] == Approx(2));
  CHECK(between[1] == Approx(1.5));
  CHECK(raw_profile_at(half_circle(), 30 * deg).empty());
}

TEST_CASE("a profile is brought to the axial force of its table", "[loads][coefficients]") {
  const CoefficientTable t = with_profiles();
  for (const bool upper : {false, true})
    for (int p = -180; p <= 180; p += 5) {
      const std::vector<double> net = profile_at(t, p * deg, upper);
      REQUIRE(net.size() == 3);
      const double mean = 0.25 * net[0] + 0.5 * net[1] + 0.25 * net[2];
      CHECK(mean == Approx(coefficients_at(t, p * deg, upper)->Ca).margin(1e-12));
    }
}
