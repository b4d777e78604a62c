#include "loads/averaging.h"

#include <catch2/catch.hpp>
#include <cmath>

using namespace focalframe::loads;

namespace {
constexpr double mph = 0.44704;
}

TEST_CASE("an hourly mean of 80 mph carries gusts of 125.6 mph in 1 s and 122.4 mph in 3 s",
          "[loads][averaging]") {
  // Conversion example read on an engineering forum, by Durst's curve as printed in the ASCE 7 commentary.
  CHECK(80 * durst_factor(1) == Approx(125.6));
  CHECK(80 * durst_factor(3) == Approx(122.4));
}

TEST_CASE("a fastest mile of 80 mph passes in 45 s and becomes a 3 s gust of 95.6 mph",
          "[loads][averaging]") {
  // Same source: 45 s, 1.28, hourly 62.5 mph, times 1.53.
  CHECK(fastest_mile_averaging(80 * mph) == Approx(45).margin(1e-3));
  CHECK(80 / durst_factor(45) == Approx(62.5));
  const ChainStep step = averaging_factor({.from = 45, .to = 3}, GustMethod::durst, 0);
  CHECK(80 * step.value == Approx(95.6).margin(0.05));
}

TEST_CASE("Wieringa's gust factors grow with turbulence and shorter gusts", "[loads][averaging]") {
  // Computed from G = 1 + 0.42 Iu ln(3600 / t), Burton et al., Wind Energy Handbook, eq. 2.40.
  const double table[][3] = {{0.10, 3, 1.2978}, {0.15, 3, 1.4467}, {0.18, 3, 1.5360},
                             {0.20, 3, 1.5956}, {0.25, 3, 1.7445}, {0.18, 600, 1.1355}};
  for (const auto& [iu, t, factor] : table)
    CHECK(wieringa_factor({.turbulence = iu, .averaging = t}) == Approx(factor).margin(5e-5));
}

TEST_CASE("a longer average is never the larger one", "[loads][averaging]") {
  double last = 10;
  for (double t = 1; t <= 3600; t *= 1.1) {
    const double factor = durst_factor(t);
    CHECK(factor < last);
    last = factor;
  }
  CHECK(durst_factor(3600) == 1);
  CHECK(wieringa_factor({.turbulence = 0.2, .averaging = 3600}) == 1);
}

TEST_CASE("there and back again is no change of averaging", "[loads][averaging]") {
  for (const GustMethod method : {GustMethod::durst, GustMethod::wieringa}) {
    const double there = averaging_factor({.from = 60, .to = 600}, method, 0.2).value;
    const double back = averaging_factor({.from = 600, .to = 60}, method, 0.2).value;
    CHECK(there * back == Approx(1));
    CHECK(there < 1);
  }
}

TEST_CASE("gust ratios of EN terrain at 10 m", "[loads][averaging]") {
  // sqrt(1 + 7 Iv) for terrain 0 .. IV, computed from EN 1991-1-4, 4.4 and 4.5.
  const double iv[] = {0.1233, 0.1448, 0.1887, 0.2852, 0.4343}, ratio[] = {1.365, 1.419, 1.524, 1.731, 2.010};
  for (int i = 0; i < 5; ++i) CHECK(en_gust_ratio(iv[i]) == Approx(ratio[i]).margin(6e-4));
}

TEST_CASE("averaging times outside 1 s to 1 h are refused", "[loads][averaging]") {
  CHECK_THROWS_AS(durst_factor(0.5), std::invalid_argument);
  CHECK_THROWS_AS(durst_factor(7200), std::invalid_argument);
  CHECK_THROWS_AS(durst_factor(not_given), std::invalid_argument);
}
