// What a report draws is the frame that was checked.

#include <catch2/catch.hpp>

#include "fem/units.h"
#include "models/portrait_states.h"
#include "models/trough.h"
#include "models/wind_load.h"
#include "tests/support/trough_design.h"

using namespace focalframe;
using namespace focalframe::models;

TEST_CASE("a portrait's motions and forces are those of the condensed row", "[portrait]") {
  const auto design = support::small_row();
  const auto table = support::test_table();
  const RowModel row(build_trough(design), table.stations);
  const auto requests = looked_at(design, table, row);
  REQUIRE(requests.size() > 3);
  const Portrait p = portrait(row, requests);
  CHECK(p.disagreement < 1e-7);
  CHECK(p.mirror.size() == static_cast<std::size_t>(row.collector().skin.samples()));
  for (std::size_t i = 0; i < requests.size(); ++i) {
    const PoseModel pose = row.pose(requests[i].state.elevation);
    const Eigen::VectorXd w = row.evaluate(row.mirror_w, pose, requests[i].amplitudes);
    const Eigen::VectorXd turn = row.evaluate(row.mirror_turn, pose, requests[i].amplitudes);
    const double scale = w.cwiseAbs().maxCoeff() + 1e-12;
    double worst = 0;
    for (int s = 0; s < w.size(); ++s) {
      worst = std::max(worst, std::abs(p.states[i].mirror[static_cast<std::size_t>(s)].z() - w[s]) / scale);
      worst = std::max(worst, std::abs(p.states[i].turned_across[static_cast<std::size_t>(s)] - turn[s]) /
                                  (turn.cwiseAbs().maxCoeff() + 1e-12));
    }
    CHECK(worst < 1e-6);
  }
}

TEST_CASE("weight alone moves nothing sideways when the trough looks at the zenith", "[portrait]") {
  const auto design = support::small_row();
  const auto table = support::test_table();
  const RowModel row(build_trough(design), table.stations);
  const Portrait p =
      portrait(row, {{{StateKind::operate, 90 * deg, 0}, true, weight_amplitudes(row, 90 * deg)}});
  double down = 0, mean_side = 0;
  for (const fem::Vec3& v : p.states[0].mirror) {
    down = std::max(down, -v.z());
    mean_side += v.y() / static_cast<double>(p.mirror.size());
  }
  CHECK(down > 1e-5);
  CHECK(std::abs(mean_side) < 1e-6 * down);
}
