#include "loads/profile.h"

#include <catch2/catch.hpp>
#include <cmath>

using namespace focalframe::loads;

namespace {

constexpr Terrain en_terrains[] = {Terrain::en_0, Terrain::en_1, Terrain::en_2, Terrain::en_3, Terrain::en_4};

}  // namespace

TEST_CASE("exposure factor and turbulence of EN terrains 0 to IV", "[loads][profile]") {
  // Computed from the formulas of EN 1991-1-4:2005+A1:2010, 4.3 to 4.5, with its Table 4.1.
  struct Line {
    double z, ce[5], iv[5];
  };
  const Line table[] = {{2, {2.1376, 1.8777, 1.4234, 1.2809, 1.1762}, {.1538, .1887, .2711, .3554, .4343}},
                        {3, {2.3391, 2.0881, 1.6398, 1.2809, 1.1762}, {.1448, .1753, .2442, .3554, .4343}},
                        {4, {2.4869, 2.2431, 1.8005, 1.2809, 1.1762}, {.1390, .1669, .2282, .3554, .4343}},
                        {5, {2.6043, 2.3666, 1.9293, 1.2809, 1.1762}, {.1348, .1609, .2171, .3554, .4343}},
                        {6, {2.7020, 2.4696, 2.0372, 1.3892, 1.1762}, {.1316, .1563, .2089, .3338, .4343}},
                        {8, {2.8596, 2.6361, 2.2123, 1.5664, 1.1762}, {.1268, .1496, .1970, .3046, .4343}},
                        {10, {2.9845, 2.7685, 2.3523, 1.7092, 1.1762}, {.1233, .1448, .1887, .2852, .4343}},
                        {20, {3.3882, 3.1981, 2.8099, 2.1821, 1.6443}, {.1136, .1316, .1669, .2381, .3338}}};
  for (const Line& line : table)
    for (std::size_t i = 0; i < 5; ++i) {
      const EnTerrain t = en_terrain(en_terrains[i]);
      CHECK(en_exposure(t, line.z) == Approx(line.ce[i]).margin(6e-5));
      CHECK(en_turbulence(t, {.height = line.z}) == Approx(line.iv[i]).margin(6e-5));
    }
}

TEST_CASE("terrain factors of EN terrains 0 to IV", "[loads][profile]") {
  const double kr[] = {0.15604, 0.16976, 0.19000, 0.21539, 0.23433};  // computed, 0.19 (z0 / 0.05)^0.07
  for (std::size_t i = 0; i < 5; ++i) CHECK(en_terrain(en_terrains[i]).kr == Approx(kr[i]).margin(6e-6));
}

TEST_CASE("below zmin an EN profile does not change", "[loads][profile]") {
  for (const Terrain terrain : en_terrains) {
    const EnTerrain t = en_terrain(terrain);
    CHECK(en_roughness(t, 0.1 * t.zmin) == en_roughness(t, t.zmin));
    CHECK(en_turbulence(t, {.height = 0.1 * t.zmin}) == en_turbulence(t, {.height = t.zmin}));
    CHECK(en_roughness(t, 1.01 * t.zmin) > en_roughness(t, t.zmin));
  }
}

TEST_CASE("Kz of exposures B, C and D by the constants of ASCE 7-10 and 7-16", "[loads][profile]") {
  // Computed from 2.01 (z / zg)^(2 / alpha).
  const double table[][4] = {{4.572, .5747, .8489, 1.0302},   {6.096, .6240, .9019, 1.0831},
                             {9.144, .7006, .9823, 1.1622},   {10, .7187, 1.0009, 1.1804},
                             {12.192, .7606, 1.0436, 1.2218}, {15.24, .8107, 1.0938, 1.2702},
                             {20, .8761, 1.1582, 1.3317}};
  for (const auto& [z, b, c, d] : table)
    for (const int edition : {10, 16}) {
      CHECK(asce_kz(Terrain::asce_b, z, edition) == Approx(b).margin(6e-5));
      CHECK(asce_kz(Terrain::asce_c, z, edition) == Approx(c).margin(6e-5));
      CHECK(asce_kz(Terrain::asce_d, z, edition) == Approx(d).margin(6e-5));
    }
}

TEST_CASE("Kz at 30 ft in exposure D is 1.16, not the 1.11 some pages print", "[loads][profile]") {
  CHECK(asce_kz(Terrain::asce_d, 9.144, 16) == Approx(1.162).margin(1e-3));
}

TEST_CASE("below 15 ft Kz does not change", "[loads][profile]") {
  CHECK(asce_kz(Terrain::asce_c, 1, 16) == asce_kz(Terrain::asce_c, 4.572, 16));
}

TEST_CASE("the 2022 profile agrees with the older one at 10 m within 2 per cent", "[loads][profile]") {
  for (const Terrain t : {Terrain::asce_b, Terrain::asce_c, Terrain::asce_d})
    CHECK(asce_kz(t, 10, 22) == Approx(asce_kz(t, 10, 16)).epsilon(0.02));
  CHECK(asce_kz(Terrain::asce_c, 10, 22) == Approx(1).margin(2e-3));
}

TEST_CASE("the length scale of Annex B over suburban ground at 21 m is 75.9 m", "[loads][profile]") {
  // Multi-Storey Steel Buildings part 3, appendix A, p. 3-32: L = 75.9 m; that z is 21 m is inferred.
  CHECK(length_scale(en_terrain(Terrain::en_3), 21) == Approx(75.8999).margin(1e-3));
}

TEST_CASE("a power law has the length scale of the logarithmic profile with the same exponent",
          "[loads][profile]") {
  Site site;
  site.terrain = Terrain::power_law;
  site.power_exponent = 1 / std::log(10 / 0.05);  // terrain II at 10 m
  CHECK(equivalent_en_terrain(site, 10).z0 == Approx(0.05));
}

TEST_CASE("heights and editions without a profile are refused", "[loads][profile]") {
  CHECK_THROWS_AS(en_roughness(en_terrain(Terrain::en_2), 250), std::invalid_argument);
  CHECK_THROWS_AS(en_roughness(en_terrain(Terrain::en_2), 0), std::invalid_argument);
  CHECK_THROWS_AS(asce_kz(Terrain::asce_b, 10, 2016), std::invalid_argument);
  CHECK_THROWS_AS(en_terrain(Terrain::asce_c), std::invalid_argument);
}
