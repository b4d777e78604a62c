#include "loads/combination.h"

#include <algorithm>
#include <catch2/catch.hpp>
#include <set>

using namespace focalframe::loads;

namespace {

const Combination& named(const CombinationSet& set, const std::string& name) {
  const auto it = std::find_if(set.combinations.begin(), set.combinations.end(),
                               [&](const Combination& c) { return c.name == name; });
  REQUIRE(it != set.combinations.end());
  return *it;
}

}  // namespace

TEST_CASE("every known set can be found, has an edition and combinations with names of their own",
          "[loads][combination]") {
  for (const std::string& name : combination_names()) {
    const auto set = find_combinations(name, 0);
    REQUIRE(set);
    CHECK_FALSE(set->edition.empty());
    std::set<std::string> names;
    for (const Combination& c : set->combinations) {
      CHECK(names.insert(c.name).second);
      CHECK(c.permanent > 0);
      CHECK_FALSE(formula(c).empty());
    }
  }
  CHECK_FALSE(find_combinations("EN 1991", 0));
}

TEST_CASE("every set has wind with the weight against it", "[loads][combination]") {
  for (const std::string& name : combination_names()) {
    const auto set = find_combinations(name, 0);
    CHECK(std::any_of(set->combinations.begin(), set->combinations.end(),
                      [](const Combination& c) { return c.wind > 0 && c.permanent <= 1.0 && c.snow == 0; }));
  }
}

TEST_CASE("EN 1990 combinations as remembered", "[loads][combination]") {
  const CombinationSet low = en_1990(400), high = en_1990(1200);
  CHECK(formula(named(low, "wind leading, no snow")) == "1.35 G + 1.5 W + 0.9 T");
  CHECK(named(low, "wind leading, weight unfavourable").snow == Approx(0.75));
  CHECK(named(high, "wind leading, weight unfavourable").snow == Approx(1.05));
  CHECK(named(low, "snow leading").wind == Approx(0.9));
  CHECK(formula(named(low, "equilibrium, weight favourable")) == "0.9 G + 1.5 W");
  CHECK(formula(named(low, "frequent")) == "1 G + 0.2 W");
  CHECK(named(low, "stuck").states == StateGroup::stuck);
}

TEST_CASE("ASCE 7 editions differ in wind and snow as remembered", "[loads][combination]") {
  CHECK(named(asce_7_strength(5), "wind leading").wind == 1.6);
  CHECK(named(asce_7_strength(16), "wind leading").wind == 1.0);
  CHECK(formula(named(asce_7_strength(16), "wind, weight favourable")) == "0.9 G + 1 W");
  CHECK(named(asce_7_strength(16), "snow leading").snow == 1.6);
  CHECK(named(asce_7_strength(22), "snow leading").snow == 1.0);
  CHECK(named(asce_7_strength(22), "wind leading").snow == 0.3);
  CHECK(formula(named(asce_7_allowable(16), "wind, weight favourable")) == "0.6 G + 0.6 W");
  CHECK(named(asce_7_allowable(16), "wind and snow").wind == Approx(0.45));
  CHECK_THROWS_AS(asce_7_strength(2016), std::invalid_argument);
}

TEST_CASE("the wind factor goes with the map: never both ultimate and above 1", "[loads][combination]") {
  for (const std::string& name : combination_names()) {
    const auto set = find_combinations(name, 0);
    REQUIRE(set);
    for (const Combination& c : set->combinations)
      if (set->ultimate_wind_map) CHECK(c.wind <= 1.0);
  }
}

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
