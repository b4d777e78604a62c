#include "loads/wind.h"

#include <catch2/catch.hpp>
#include <cmath>

#include "loads/air.h"
#include "loads/averaging.h"
#include "loads/profile.h"

using namespace focalframe::loads;

namespace {

constexpr Terrain terrains[] = {Terrain::en_0,   Terrain::en_1,   Terrain::en_2,
                                Terrain::en_3,   Terrain::en_4,   Terrain::asce_b,
                                Terrain::asce_c, Terrain::asce_d, Terrain::power_law};

Site site_of(Terrain terrain) {
  Site site;
  site.density = eurocode_density;
  site.terrain = terrain;
  return site;
}

StatedWind stated(double speed, double averaging) {
  StatedWind wind;
  wind.speed = speed;
  wind.averaging = averaging;
  return wind;
}

}  // namespace

TEST_CASE("pressures grow with the square of the speed in every terrain", "[loads][wind]") {
  for (const Terrain terrain : terrains)
    for (const double averaging : {3.0, 60.0, 600.0, 3600.0}) {
      const WindAtHeight once = wind_at(3, stated(12, averaging), site_of(terrain));
      const WindAtHeight twice = wind_at(3, stated(24, averaging), site_of(terrain));
      CHECK(twice.mean_pressure == Approx(4 * once.mean_pressure));
      CHECK(twice.gust_pressure == Approx(4 * once.gust_pressure));
      CHECK(twice.turbulence == once.turbulence);
    }
}

TEST_CASE("speeds and pressures of mean and gust belong together", "[loads][wind]") {
  for (const Terrain terrain : terrains) {
    const WindAtHeight w = wind_at(4, stated(20, 600), site_of(terrain));
    CHECK(w.mean_pressure == Approx(0.5 * w.density * w.mean_speed * w.mean_speed));
    CHECK(w.gust_pressure == Approx(0.5 * w.density * w.gust_speed * w.gust_speed));
    CHECK(w.gust_speed > w.mean_speed);
  }
}

TEST_CASE("the wind is the same whether its mean or its gust was stated", "[loads][wind]") {
  for (const Terrain terrain : terrains) {
    StatedWind mean = stated(20, 600);
    mean.over = StatedOver::site;
    const WindAtHeight at10 = wind_at(10, mean, site_of(terrain));
    StatedWind gust = stated(at10.gust_speed, 3);
    gust.over = StatedOver::site;
    const WindAtHeight a = wind_at(3, mean, site_of(terrain)), b = wind_at(3, gust, site_of(terrain));
    CHECK(b.mean_speed == Approx(a.mean_speed));
    CHECK(b.gust_pressure == Approx(a.gust_pressure));
  }
}

TEST_CASE("a speed measured on the site at axis height is the speed at the axis", "[loads][wind]") {
  for (const Terrain terrain : terrains) {
    Site site = site_of(terrain);
    site.orography = 1.2;
    StatedWind wind = stated(17, 600);
    wind.height = 6;
    wind.over = StatedOver::site;
    CHECK(wind_at(6, wind, site).mean_speed == Approx(17));
    wind.averaging = 3;
    CHECK(wind_at(6, wind, site).gust_speed == Approx(17));
  }
}

TEST_CASE("over open country the stated 10 min mean at 10 m is EN's basic wind whatever the site's terrain",
          "[loads][wind]") {
  for (const Terrain terrain : {Terrain::en_0, Terrain::en_2, Terrain::en_4}) {
    const EnTerrain t = en_terrain(terrain);
    CHECK(wind_at(12, stated(25, 600), site_of(terrain)).mean_speed == Approx(25 * en_roughness(t, 12)));
  }
}

TEST_CASE("nothing jumps where the stated height passes 10 m", "[loads][wind]") {
  for (const Terrain terrain : terrains) {
    StatedWind at = stated(25, 3), near = at;
    near.height = 10.0001;
    CHECK(wind_at(3, near, site_of(terrain)).mean_speed ==
          Approx(wind_at(3, at, site_of(terrain)).mean_speed).epsilon(1e-5));
  }
}

TEST_CASE("orography multiplies the mean speed and leaves EN's gust excess alone", "[loads][wind]") {
  Site hill = site_of(Terrain::en_2);
  hill.orography = 1.3;
  const WindAtHeight flat = wind_at(5, stated(25, 600), site_of(Terrain::en_2)),
                     w = wind_at(5, stated(25, 600), hill);
  CHECK(w.mean_speed == Approx(1.3 * flat.mean_speed));
  // sigma_v = kr v_b kI does not know the hill: Iv falls by co.
  CHECK(w.turbulence * w.mean_speed == Approx(flat.turbulence * flat.mean_speed));
}

TEST_CASE("a velocity pressure at the axis is kept for its own averaging", "[loads][wind]") {
  for (const Terrain terrain : terrains) {
    StatedWind wind;
    wind.pressure = 500;
    wind.averaging = 3;
    const WindAtHeight gust = wind_at(2.5, wind, site_of(terrain));
    CHECK(gust.gust_pressure == Approx(500));
    wind.averaging = 600;
    const WindAtHeight mean = wind_at(2.5, wind, site_of(terrain));
    CHECK(mean.mean_pressure == Approx(500));
    CHECK(mean.gust_pressure / mean.mean_pressure == Approx(gust.gust_pressure / gust.mean_pressure));
  }
}

TEST_CASE("an ASCE gust becomes a mean by Durst's factors", "[loads][wind]") {
  const WindAtHeight w = wind_at(10, stated(40, 3), site_of(Terrain::asce_c));
  CHECK(w.mean_speed == Approx(w.gust_speed * durst_factor(600) / durst_factor(3)));
}

TEST_CASE("a power law grows by its exponent and takes it for its turbulence when none is given",
          "[loads][wind]") {
  Site site = site_of(Terrain::power_law);
  site.power_exponent = 0.2;
  const WindAtHeight low = wind_at(2.5, stated(20, 600), site);
  CHECK(low.mean_speed == Approx(20 * std::pow(0.25, 0.2)));
  CHECK(low.turbulence == 0.2);
  site.turbulence = 0.3;
  CHECK(wind_at(2.5, stated(20, 600), site).gust_speed == Approx(low.mean_speed * std::sqrt(1 + 7 * 0.3)));
}

TEST_CASE("the printed chain ends in the values that are used, and every step says how", "[loads][wind]") {
  for (const Terrain terrain : terrains)
    for (const double averaging : {3.0, 60.0, 600.0}) {
      const WindAtHeight w = wind_at(3, stated(20, averaging), site_of(terrain));
      REQUIRE(w.chain.size() >= 6);
      bool has_mean = false, has_gust = false, has_stated = false;
      for (const ChainStep& step : w.chain) {
        CHECK_FALSE(step.how.empty());
        CHECK(std::isfinite(step.value));
        has_stated = has_stated || (step.what == "stated speed" && step.value == 20);
        has_mean = has_mean || (step.what == "mean velocity pressure" && step.value == w.mean_pressure);
        has_gust = has_gust || (step.what == "gust velocity pressure" && step.value == w.gust_pressure);
      }
      CHECK(has_stated);
      CHECK(has_mean);
      CHECK(has_gust);
    }
}

TEST_CASE("the size factor is 1 for a point and falls with the length gathered", "[loads][wind]") {
  const Site site = site_of(Terrain::en_2);
  CHECK(size_factor(0, 0, 5, 0.22, site) == Approx(1));
  double last = 1;
  for (const double b : {1.0, 10.0, 50.0, 150.0}) {
    const double cs = size_factor(b, 5, 5, 0.22, site);
    CHECK(cs < last);
    CHECK(cs > 1 / (1 + 7 * 0.22));
    last = cs;
  }
}

TEST_CASE("a wind that says too little or too much is refused with the bound that does not hold",
          "[loads][wind]") {
  const Site site = site_of(Terrain::en_2);
  CHECK_THROWS_WITH(wind_at(3, StatedWind{}, site),
                    Catch::Contains("either a wind speed or a velocity pressure"));
  StatedWind both = stated(20, 600);
  both.pressure = 200;
  CHECK_THROWS_AS(wind_at(3, both, site), std::invalid_argument);
  CHECK_THROWS_WITH(wind_at(3, stated(20, not_given), site), Catch::Contains("averaging time must be given"));
  CHECK_THROWS_AS(wind_at(0, stated(20, 600), site), std::invalid_argument);
  CHECK_THROWS_AS(wind_at(3, stated(-1, 600), site), std::invalid_argument);
  Site kzt = site;
  kzt.orography = 3;
  CHECK_THROWS_AS(wind_at(3, stated(20, 600), kzt), std::invalid_argument);
}
