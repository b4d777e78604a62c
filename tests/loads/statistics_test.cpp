#include "loads/statistics.h"

#include <catch2/catch.hpp>
#include <cmath>

using namespace focalframe::loads;

TEST_CASE("return-period factors by the recommended values of EN 1991-1-4", "[loads][statistics]") {
  // Computed from 4.2 (2) note 4 with K = 0.2, n = 0.5.
  for (const auto& [years, factor] :
       {std::pair{10.0, 0.9025}, {25.0, 0.9597}, {50.0, 1.0}, {100.0, 1.0385}, {500.0, 1.1224}})
    CHECK(return_period_factor({.years = years}) == Approx(factor).margin(6e-5));
}

TEST_CASE("a 50-year wind comes with 64 per cent within 50 years", "[loads][statistics]") {
  CHECK(chance_in_life({.return_period = 50, .life = 50}) == Approx(0.636).margin(5e-4));
  CHECK(chance_in_life({.return_period = 50, .life = 1}) == Approx(0.02));
}

TEST_CASE("Weibull exceedance, mean and hours", "[loads][statistics]") {
  // Computed from exp(-(v/A)^k) and A Gamma(1 + 1/k).
  const Weibull a{.scale = 9.2, .shape = 2.1}, b{.scale = 8, .shape = 2};
  CHECK(exceedance(a, 12) == Approx(0.174273).margin(1e-6));
  CHECK(mean_speed(a) == Approx(8.148381).margin(1e-6));
  CHECK(exceedance(b, 9) == Approx(0.282063).margin(1e-6));
  CHECK(mean_speed(b) == Approx(7.089815).margin(1e-6));
  CHECK(exceedance(rayleigh(6), 14) == Approx(0.0138974).margin(1e-7));
  CHECK(hours_above(rayleigh(6), 14) == Approx(121.741).margin(1e-3));
}

TEST_CASE("exceedance falls from 1 at calm", "[loads][statistics]") {
  const Weibull w{.scale = 6, .shape = 1.9};
  CHECK(exceedance(w, 0) == 1);
  CHECK(exceedance(w, -1) == 1);
  CHECK(exceedance(w, 5) > exceedance(w, 6));
  CHECK(mean_speed(rayleigh(7.3)) == Approx(7.3));
}

TEST_CASE("a record's hours are its share above the speed", "[loads][statistics]") {
  CHECK(hours_above(std::vector<double>{1, 5, 9, 13}, 8) == Approx(4380));
  CHECK(hours_above(std::vector<double>{1, std::nan(""), 9}, 8, 100) == Approx(50));
  CHECK(std::isnan(hours_above(std::vector<double>{}, 8)));
}

TEST_CASE("statistics without scale, shape or a period are refused", "[loads][statistics]") {
  CHECK_THROWS_AS(exceedance(Weibull{}, 5), std::invalid_argument);
  CHECK_THROWS_AS(mean_speed({.scale = 5, .shape = 0}), std::invalid_argument);
  CHECK_THROWS_AS(return_period_factor({.years = 1}), std::invalid_argument);
}
