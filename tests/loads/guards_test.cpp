#include "loads/guards.h"

#include <catch2/catch.hpp>

#include "fem/units.h"

using namespace focalframe;
using namespace focalframe::loads;

namespace {

bool is(const Opinion& opinion, Severity severity, const std::string& rule) {
  if (!opinion) return false;
  CHECK_FALSE(opinion->text.empty());
  CHECK_FALSE(opinion->fix.empty());
  return opinion->severity == severity && opinion->rule == rule;
}

}  // namespace

TEST_CASE("peak coefficients on a gust are refused whatever they are used for", "[loads][guards]") {
  for (const Use use : {Use::optics, Use::strength})
    CHECK(is(guard_gusts(CoefficientKind::peak, PressureKind::gust, use, 0.27), Severity::refused,
             "gust-twice"));
  CHECK_THAT(guard_gusts(CoefficientKind::peak, PressureKind::gust, Use::strength, 0.271)->text,
             Catch::Contains("2.9 x"));
}

TEST_CASE("mean on mean is right for optics and warned for strength", "[loads][guards]") {
  CHECK_FALSE(guard_gusts(CoefficientKind::mean, PressureKind::mean, Use::optics, 0.2));
  CHECK(is(guard_gusts(CoefficientKind::mean, PressureKind::mean, Use::strength, 0.2), Severity::warned,
           "gust-left-out"));
  CHECK_FALSE(guard_gusts(CoefficientKind::mean, PressureKind::gust, Use::strength, 0.2));
  CHECK_FALSE(guard_gusts(CoefficientKind::peak, PressureKind::mean, Use::strength, 0.2));
  CHECK(is(guard_gusts(CoefficientKind::peak, PressureKind::mean, Use::optics, 0.2), Severity::warned,
           "peak-for-optics"));
}

TEST_CASE("an ultimate map's speed takes no further wind factor", "[loads][guards]") {
  CHECK(is(guard_load_factor({.ultimate_map = true, .wind_factor = 1.6}), Severity::refused, "factor-twice"));
  CHECK(is(guard_load_factor({.ultimate_map = true, .wind_factor = 1.5}), Severity::refused, "factor-twice"));
  CHECK_FALSE(guard_load_factor({.ultimate_map = true, .wind_factor = 1.0}));
  CHECK_FALSE(guard_load_factor({.ultimate_map = false, .wind_factor = 1.6}));
  CHECK(
      is(guard_load_factor({.ultimate_map = false, .wind_factor = 1.0}), Severity::warned, "factor-missing"));
  CHECK_FALSE(guard_load_factor({.ultimate_map = false, .wind_factor = 0.6}));
}

TEST_CASE("thin air is taken once", "[loads][guards]") {
  CHECK(
      is(guard_density({.density = 0.95, .code_altitude_factor = 0.79}), Severity::refused, "density-twice"));
  CHECK(is(guard_density({.density = 0.95, .map_includes_altitude = true}), Severity::refused,
           "density-twice"));
  CHECK_FALSE(guard_density({.density = 1.225, .code_altitude_factor = 0.79}));
  CHECK_FALSE(guard_density({.density = 0.95}));
  CHECK_FALSE(guard_density({}));
  CHECK(is(guard_density({.density = 1.6}), Severity::refused, "density"));
}

TEST_CASE("speeds in the wrong unit or order are noticed", "[loads][guards]") {
  CHECK_FALSE(guard_speeds({.operate = 12, .survive = 33}));
  CHECK_FALSE(guard_speeds({.operate = 12}));
  CHECK(is(guard_speeds({.operate = 45}), Severity::warned, "speed-unit"));
  CHECK_THAT(guard_speeds({.operate = 45})->fix, Catch::Contains("45 km/h = 12.5 m/s"));
  CHECK(is(guard_speeds({.survive = 120}), Severity::warned, "speed-unit"));
  CHECK(is(guard_speeds({.operate = 20, .survive = 15}), Severity::warned, "speed-order"));
  CHECK(is(guard_speeds({.operate = 12, .survive = 13}), Severity::warned, "speed-ratio"));
}

TEST_CASE("heights and altitudes that were mixed up are noticed", "[loads][guards]") {
  CHECK_FALSE(guard_heights({.axis = 1.7, .altitude = 450}));
  CHECK(is(guard_heights({.axis = 450, .altitude = 450}), Severity::warned, "height-altitude"));
  CHECK(is(guard_heights({.axis = 80}), Severity::warned, "height"));
  CHECK(is(guard_heights({.altitude = 8000}), Severity::refused, "altitude"));
}

TEST_CASE("an axis windier than 10 m above it is noticed", "[loads][guards]") {
  Site site;
  StatedWind wind{.speed = 10, .averaging = 600};
  CHECK_FALSE(guard_profile(wind_at(2, wind, site), wind_at(10, wind, site)));
  WindAtHeight odd = wind_at(2, wind, site);
  odd.mean_speed = 12;
  CHECK(is(guard_profile(odd, wind_at(10, wind, site)), Severity::warned, "profile"));
}

TEST_CASE("shelter is not given to a row that faces the open, nor twice", "[loads][guards]") {
  CHECK(is(guard_zone({.zone = "interior", .faces_open_ground = true}), Severity::refused, "zone"));
  CHECK_FALSE(guard_zone({.zone = "interior"}));
  CHECK_FALSE(guard_zone({.zone = "edge", .table_zone = "isolated", .faces_open_ground = true}));
  CHECK(is(guard_zone({.zone = "interior", .table_zone = "interior"}), Severity::refused, "zone-twice"));
  CHECK(is(guard_zone({.zone = "edge", .table_zone = "interior"}), Severity::warned, "zone-table"));
}

TEST_CASE("a table outside its shapes is warned of, far outside refused", "[loads][guards]") {
  CoefficientTable t;
  t.name = "t";
  t.focal_ratio_min = 0.25;
  t.focal_ratio_max = 0.35;
  t.yaw_max = 30 * deg;
  CHECK_FALSE(guard_validity(t, {.focal_ratio = 0.3, .height_ratio = 5, .yaw = 20 * deg}));
  CHECK(is(guard_validity(t, {.focal_ratio = 0.37}), Severity::warned, "table-range"));
  CHECK(is(guard_validity(t, {.focal_ratio = 0.6}), Severity::refused, "table-range"));
  CHECK(is(guard_validity(t, {.focal_ratio = 0.15}), Severity::refused, "table-range"));
  CHECK(is(guard_validity(t, {.yaw = 80 * deg}), Severity::warned, "table-range"));
  CHECK_THAT(guard_validity(t, {.focal_ratio = 0.37})->text, Catch::Contains("0.37, made for 0.25 to 0.35"));
}

TEST_CASE("snow is noted where it cannot lie or comes with a storm", "[loads][guards]") {
  CHECK(is(guard_snow({.elevation = -90 * deg}), Severity::noted, "snow-face-down"));
  CHECK(is(guard_snow({.elevation = 80 * deg, .extreme_wind = true}), Severity::noted, "snow-with-storm"));
  CHECK_FALSE(guard_snow({.elevation = 80 * deg}));
}

TEST_CASE("solidity is the solid share", "[loads][guards]") {
  CHECK_FALSE(guard_solidity(0.65));
  CHECK_FALSE(guard_solidity(1));
  CHECK(is(guard_solidity(1.2), Severity::refused, "solidity"));
  CHECK(is(guard_solidity(0), Severity::refused, "solidity"));
  CHECK(is(guard_solidity(0.1), Severity::warned, "solidity"));
}

TEST_CASE("all-hours statistics are warned of", "[loads][guards]") {
  CHECK_FALSE(guard_hours(true));
  CHECK(is(guard_hours(false), Severity::warned, "hours-all"));
}
