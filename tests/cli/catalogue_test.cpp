#include "models/catalogue.h"

#include <catch2/catch.hpp>
#include <cmath>
#include <set>

#include "fem/units.h"

using namespace focalframe;
using namespace focalframe::models;

TEST_CASE("yield falls with thickness as EN 1993-1-1 and EN 10025-2 say", "[catalogue]") {
  // S275 and S355 steps as printed in resistance tables of steelwork handbooks (read); S235 from memory.
  CHECK(material_of("S355", 16 * mm).yield == Approx(355 * MPa));
  CHECK(material_of("S355", 16.1 * mm).yield == Approx(345 * MPa));
  CHECK(material_of("S275", 40 * mm).yield == Approx(265 * MPa));
  CHECK(material_of("S275", 100 * mm).yield == Approx(235 * MPa));
  CHECK(material_of("S235", 3 * mm).yield == Approx(235 * MPa));
  CHECK(material_of("S235", 200 * mm).yield == 0);  // beyond the table: not known
  CHECK(material_of("EN AW-6082 T6", 4 * mm).yield == Approx(250 * MPa));
  CHECK(material_of("EN AW-6082 T6", 6 * mm).yield == Approx(260 * MPa));
}

TEST_CASE("every material can be computed with and says where it comes from", "[catalogue]") {
  std::set<std::string> names;
  for (const CatalogueMaterial& m : materials()) {
    INFO(m.name);
    CHECK(m.E > m.G);
    CHECK(m.G > m.E / 3);  // Poisson's ratio below 0.5
    CHECK(m.density > 1000);
    CHECK_FALSE(m.source.empty());
    CHECK((m.confidence == "read" || m.confidence == "from memory"));
    CHECK(names.insert(m.name).second);
    for (std::size_t i = 1; i < m.yield_steps.size(); ++i)
      CHECK(m.yield_steps[i - 1].up_to < m.yield_steps[i].up_to);
  }
  CHECK_THROWS_AS(material_of("unobtainium", 1 * mm), std::invalid_argument);
}

TEST_CASE("next tubes are bigger ones of the series, least effort first", "[catalogue]") {
  const auto round = next_round_tubes(139.7 * mm, 4 * mm);
  REQUIRE(round.size() >= 4);
  CHECK(round[0].outside_diameter == Approx(139.7 * mm));
  CHECK(round[0].wall == Approx(4.5 * mm));
  CHECK(round[2].outside_diameter == Approx(168.3 * mm));
  CHECK(round[2].wall == Approx(4 * mm));
  for (const RoundTubeSize& size : round) {
    CHECK(size.outside_diameter >= 139.7 * mm - 1e-9);
    CHECK(size.wall >= 4 * mm - 1e-9);
  }
  const auto square = next_square_tubes(120 * mm, 5 * mm, 1);
  REQUIRE(square.size() == 4);
  CHECK(square[0].wall == Approx(6 * mm));
  CHECK(square[2].side == Approx(140 * mm));
  CHECK(next_round_tubes(1016 * mm, 30 * mm).empty());
}

TEST_CASE("nominal pipe sizes are not outside diameters", "[catalogue]") {
  // ASME B36.10 and EN 10220 (from memory).
  CHECK(pipe_outside_diameter_of_inches(6) == Approx(168.3 * mm));
  CHECK(pipe_outside_diameter_of_dn(100) == Approx(114.3 * mm));
  CHECK(std::isnan(pipe_outside_diameter_of_inches(7)));
}
