#include "cli/frame_writer.h"

#include "cli/frame_file.h"
#include "fem/statics.h"
#include "models/posed_row.h"
#include "tests/fem/random_frame.h"
#include "tests/support/trough_design.h"

using namespace focalframe;
using namespace focalframe::test;
using Catch::Contains;

namespace {

cli::FrameFile read_back(const std::string& text) {
  const cli::DesignFile design = cli::read_design_text(text, "written.xml");
  INFO(cli::to_text(design.messages, true));
  REQUIRE(design.sound());
  cli::FrameFile file = cli::read_frame(design);
  INFO(cli::to_text(file.messages, true));
  REQUIRE_FALSE(cli::has_stop(file.messages));
  return file;
}

}  // namespace

TEST_CASE("a written frame reads back as the same frame, whatever it holds", "[frame]") {
  const unsigned seed = GENERATE(11u, 12u, 13u, 14u, 15u);
  const fem::Frame frame = random_frame(seed);
  fem::LoadCase load = random_load(frame, seed);
  load.name = "all & \"everything\"";
  const cli::FrameFile file =
      read_back(cli::frame_design_text("any <frame>", {"a remark -- with dashes"}, frame, {load}));
  REQUIRE(file.frame.nodes.size() == frame.nodes.size());
  REQUIRE(file.frame.members.size() == frame.members.size());
  CHECK(file.cases.at(0).name == load.name);
  const fem::Response before = fem::StaticSolver(frame).solve(load),
                      after = fem::StaticSolver(file.frame).solve(file.cases.at(0));
  CHECK(difference(before.displacement, after.displacement) < 1e-9);
  CHECK(difference(before.reaction, after.reaction) < 1e-9);
  CHECK(difference(before.end_force, after.end_force) < 1e-9);
  CHECK(difference(before.spring_force, after.spring_force) < 1e-9);
  CHECK(difference(before.joint_force, after.joint_force) < 1e-9);
  CHECK(fem::total_mass(file.frame).mass == Approx(fem::total_mass(frame).mass).epsilon(1e-12));
}

TEST_CASE("a trough written out as a frame has the solution of the whole assembly", "[frame]") {
  const double elevation = GENERATE(0.4, 1.5707963267948966, 3.0);
  const models::PosedRow row = models::posed_row(support::small_row(), support::test_table(), elevation);
  REQUIRE(row.cases.size() > 3);
  const cli::FrameFile file = read_back(cli::frame_design_text("row", {}, row.full.frame, row.cases));
  REQUIRE(file.cases.size() == row.cases.size());
  const auto before = fem::StaticSolver(row.full.frame).solve(row.cases),
             after = fem::StaticSolver(file.frame).solve(file.cases);
  for (std::size_t i = 0; i < row.cases.size(); ++i) {
    INFO(row.cases[i].name);
    CHECK(file.cases[i].name == row.cases[i].name);
    CHECK(before[i].displacement.cwiseAbs().maxCoeff() > 1e-6);
    CHECK(difference(before[i].displacement, after[i].displacement) < 1e-8);
    CHECK(difference(before[i].end_force, after[i].end_force) < 1e-8);
    CHECK(difference(before[i].reaction, after[i].reaction) < 1e-8);
  }
}

TEST_CASE("a written row stands on its weight", "[frame]") {
  const models::PosedRow row = models::posed_row(support::small_row(), support::test_table(), 0.7);
  const cli::FrameFile file = read_back(cli::frame_design_text("row", {}, row.full.frame, row.cases));
  const fem::Response weight = fem::StaticSolver(file.frame).solve(file.cases.at(0));
  CHECK(weight.reaction.col(2).sum() == Approx(9.80665 * fem::total_mass(row.full.frame).mass).epsilon(1e-9));
}
