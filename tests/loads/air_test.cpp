#include "loads/air.h"

#include <catch2/catch.hpp>
#include <cmath>

#include "loads/wind.h"

using namespace focalframe::loads;

TEST_CASE("standard density falls with altitude as in the standard atmosphere", "[loads][air]") {
  // Table of the standard atmosphere, four digits (computed from its constants; ISO 2533 gives the same).
  const double table[][2] = {{0, 1.2250},    {250, 1.1959},  {500, 1.1673},  {750, 1.1392},
                             {1000, 1.1116}, {1500, 1.0581}, {2000, 1.0065}, {2500, 0.9569},
                             {3000, 0.9091}, {4000, 0.8191}, {5000, 0.7361}};
  for (const auto& [altitude, density] : table)
    CHECK(standard_density(altitude) == Approx(density).margin(0.00016));
}

TEST_CASE("standard density is that of dry air at the standard pressure and temperature", "[loads][air]") {
  for (const double h : {0.0, 500.0, 2000.0, 4000.0}) {
    const double dry = dry_air_density(
        {.pressure = standard_pressure(h), .temperature = sea_level_temperature - lapse_rate * h});
    CHECK(dry == Approx(standard_density(h)).epsilon(1e-4));
  }
}

TEST_CASE("a site's density follows what is known of it", "[loads][air]") {
  Site site;
  CHECK(air_density(site).value == sea_level_density);
  site.altitude = 1000;
  CHECK(air_density(site).value == Approx(standard_density(1000)));
  SECTION("warmer air at the same pressure is lighter in proportion") {
    Site warm = site;
    warm.temperature = 308.15;
    const double standard = sea_level_temperature - lapse_rate * 1000;
    CHECK(air_density(warm).value == Approx(standard_density(1000) * standard / 308.15).epsilon(1e-4));
  }
  SECTION("a station pressure replaces the altitude") {
    Site measured = site;
    measured.pressure = 95000;
    measured.temperature = 293.15;
    CHECK(air_density(measured).value == Approx(95000 / (287.05 * 293.15)));
  }
  SECTION("a density given overrides everything") {
    site.temperature = 250;
    site.density = eurocode_density;
    CHECK(air_density(site).value == eurocode_density);
  }
}

TEST_CASE("an air density outside 0.6 to 1.5 kg/m3 is refused", "[loads][air]") {
  Site site;
  site.density = 1.7;
  CHECK_THROWS_WITH(air_density(site), Catch::Contains("1.7 kg/m3 must lie between 0.6 and 1.5"));
  site.density = 0.5;
  CHECK_THROWS_AS(air_density(site), std::invalid_argument);
  site.density = not_given;
  site.pressure = 1013.25;  // hPa taken for Pa
  CHECK_THROWS_AS(air_density(site), std::invalid_argument);
  site = {};
  site.altitude = 20000;
  CHECK_THROWS_AS(air_density(site), std::invalid_argument);
}
