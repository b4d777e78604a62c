#include "models/row_modes.h"

#include <catch2/catch.hpp>

#include "tests/support/trough_design.h"

using namespace focalframe;
using namespace focalframe::models;

TEST_CASE("a row's frequencies and factors come with what moves and with their proof", "[modes]") {
  const RowStability s = row_stability(support::small_row(), support::test_table(), -90 * deg, 4, 2);
  REQUIRE(s.modes.size() == 4);
  for (const RowMode& m : s.modes) {
    INFO(m.moves);
    CHECK(m.residual < 1e-6);
    CHECK(m.frequency > 0.5);
    CHECK((m.moves.find("bending of") != std::string::npos || m.moves.find("twist of") != std::string::npos ||
           m.moves.find("give of") != std::string::npos));
  }
  CHECK(s.modes_proof.counted >= 4);
  CHECK(s.modes_proof.count_at > s.modes.back().frequency);
  CHECK(s.modes_proof.error < 1e-2);
  REQUIRE_FALSE(s.buckling.empty());
  CHECK(s.buckling_proof.counted >= static_cast<int>(s.buckling.size()));
}

TEST_CASE("a row is warned about only when it buckles below ten times its load", "[modes]") {
  TroughDesign d = support::small_row();
  const auto table = support::test_table();
  const double factor = row_stability(d, table, d.operation.stow_at, 0, 1, false).buckling.at(0).factor;
  CHECK(frame_remarks(d, table).empty() == (factor >= 10));
  d.ribs.thickness /= 4;  // a plate a quarter as thick bends aside 64 times as easily
  const double thin = row_stability(d, table, d.operation.stow_at, 0, 1, false).buckling.at(0).factor;
  CHECK(thin < factor / 10);
  const auto remarks = frame_remarks(d, table);
  REQUIRE(remarks.size() == 1);
  CHECK(remarks[0].text.find("buckling") != std::string::npos);
  CHECK(remarks[0].text.find("rib") != std::string::npos);
}
