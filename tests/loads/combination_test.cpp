#include "loads/combination.h"

#include <catch2/catch.hpp>

using namespace focalframe::loads;

// The sets themselves are files; tests/cli/combination_file_test.cpp looks at them.

TEST_CASE("a combined effect is linear in every action", "[loads][combination]") {
  const Combination c{.name = "all",
                      .permanent = 1,
                      .wind = 2,
                      .snow = 3,
                      .temperature = 4,
                      .imposed = 5,
                      .ice = 6,
                      .wind_on_ice = 7,
                      .seismic = 8};
  CHECK(combined(c, {1, 10, 100, 1e3, 1e4, 1e5, 1e6, 1e7}) == Approx(87654321.0));
}

TEST_CASE("a combination is written as a formula without the actions it leaves out", "[loads][combination]") {
  CHECK(formula({.name = "c", .permanent = 1.35, .wind = 1.5, .temperature = 0.9}) ==
        "1.35 G + 1.5 W + 0.9 T");
  CHECK(formula({.name = "c", .permanent = 0.9, .ice = 1, .wind_on_ice = 1}) == "0.9 G + 1 D_ice + 1 W_ice");
}

TEST_CASE("every action has a word and its own factor", "[loads][combination]") {
  const Combination c{.name = "c",
                      .wind = 1,
                      .snow = 2,
                      .temperature = 3,
                      .imposed = 4,
                      .ice = 5,
                      .wind_on_ice = 6,
                      .seismic = 7};
  for (int i = 0; i < action_count; ++i) {
    CHECK(factor_of(c, static_cast<Action>(i)) == i + 1);
    CHECK_FALSE(action_word(static_cast<Action>(i)).empty());
  }
}

TEST_CASE("the greatest wind factor counts strength only", "[loads][combination]") {
  CombinationSet set;
  CHECK(greatest_wind_factor(set) == 0);
  set.combinations = {{.name = "a", .wind = 1.5},
                      {.name = "b", .purpose = Purpose::equilibrium, .wind = 1.6}};
  CHECK(greatest_wind_factor(set) == 1.5);
}
