#include "fem/inside.h"

#include <numbers>

#include "fem/shape_parts.h"
#include "fem/statics.h"
#include "tests/fem/random_frame.h"

using namespace focalframe::test;
using Catch::Matchers::Contains;

namespace {

constexpr double pi = std::numbers::pi;
const std::array<std::string, 3> xyz{"along x", "along y", "along z"};

/// Tube of 6 m in one member, clamped at both ends.
Builder clamped_tube() {
  Builder b;
  b.material(210e9, 81e9, 7850);
  b.section(5.30552e-3, 2.95963e-5, 2.95963e-5, 5.91927e-5);
  b.line(Vec3::Zero(), Vec3(6, 0, 0), 1);
  b.support(0, all_fixed);
  b.support(1, all_fixed);
  return b;
}

}  // namespace

TEST_CASE("a frame of divided members answers every load as the frame of whole members") {
  const unsigned seed = GENERATE(1u, 2u, 3u, 4u);
  const Frame frame = random_frame(seed);
  const LoadCase load = random_load(frame, seed + 100);
  std::vector<int> count;
  for (std::size_t m = 0; m < frame.members.size(); ++m) count.push_back(1 + static_cast<int>(m % 4));
  const Divided divided = divide(frame, count);
  CHECK(find_faults(divided.frame).empty());
  const Response whole = StaticSolver(frame).solve(load),
                 pieces = StaticSolver(divided.frame).solve(divide(divided, load));
  const Eigen::Index n = whole.displacement.rows();
  CHECK(difference(whole.displacement, pieces.displacement.topRows(n)) < 1e-9);
  CHECK(difference(whole.reaction, pieces.reaction.topRows(n)) < 1e-8);
  Eigen::MatrixXd ends(whole.end_force.rows(), 12);
  for (Eigen::Index m = 0; m < ends.rows(); ++m) {
    const std::vector<int>& own = divided.pieces[static_cast<std::size_t>(m)];
    REQUIRE(own.size() == static_cast<std::size_t>(count[static_cast<std::size_t>(m)]));
    ends.row(m) << pieces.end_force.row(own.front()).head<6>(), pieces.end_force.row(own.back()).tail<6>();
  }
  CHECK(difference(whole.end_force, ends) < 1e-8);
}

TEST_CASE("inner nodes of crossing members that are not connected do not meet") {
  Builder b = straight_beam(2, 1);
  b.node(0, 2, 0);
  b.node(2, 2, 0);
  b.member(0, 3);
  b.member(1, 2);
  b.member(0, 2);
  b.support(0, all_fixed);
  const Divided divided = divide(b.frame, {2, 2, 2, 2});
  CHECK(find_faults(divided.frame).empty());
}

TEST_CASE("a clamped beam typed as one member has the frequencies of the beam equation") {
  // beta L of a clamped-clamped beam (any vibration text; here to 9 digits), rotary inertia is left out
  // there: its effect is 0.5 % at the third value.
  const Frame frame = clamped_tube().frame;
  const InsideModes inside = modes_inside(frame, 6);
  REQUIRE(inside.modes.size() == 6);
  const double unit = std::sqrt(210e9 * 2.95963e-5 / (7850 * 5.30552e-3)) / (2 * pi * 36);
  const double beta[] = {4.730040745, 4.730040745, 7.853204624, 7.853204624};
  for (int i = 0; i < 4; ++i)
    CHECK(inside.modes[static_cast<std::size_t>(i)].frequency == near(beta[i] * beta[i] * unit, 8e-3));
  CHECK(inside.error < 2e-3);
  CHECK(inside.most_pieces >= 4);
  CHECK(inside.modes.front().counted >= 6);
  CHECK(inside.modes.front().count_at > inside.modes.back().frequency);
}

TEST_CASE("columns typed as one member buckle at Euler's loads") {
  // Clamped at both ends 4 pi^2, clamped and pinned 20.1907, pinned at both 9.8696 (Timoshenko and Gere).
  struct Column {
    const char *foot, *head;
    double factor;
  };
  const Column column = GENERATE(Column{"xyzXYZ", "yzXYZ", 39.4784176}, Column{"xyzXYZ", "yzX", 20.1907286},
                                 Column{"xyzX", "yz", 9.8696044});
  Builder b = straight_beam(4, 1);
  b.support(0, fix(column.foot));
  b.support(1, fix(column.head));
  const double load = 210e9 * 8e-6 / 16;
  const InsideBuckling inside = buckling_inside(b.frame, node_force(1, {-load, 0, 0}), 2, 1e6);
  REQUIRE(inside.modes.size() == 2);
  CHECK(inside.modes[0].factor == near(column.factor, 1.5e-3));
  CHECK(inside.modes[0].factor > column.factor * (1 - 1e-6));  // pieces only ever stiffen
  CHECK(inside.error < 1.5e-3);
  CHECK(inside.modes[0].counted >= 2);
}

TEST_CASE("a strip typed as one member buckles sideways under end moments") {
  // Narrow strip 100 x 10 mm, 1 m, aluminium: Mcr = pi / L sqrt(E Iz G It) (Timoshenko and Gere).
  Builder b;
  b.material(70e9, 26.923e9);
  b.section(1e-3, 8.33333e-7, 8.33333e-9, 3.12333e-8);
  b.line(Vec3::Zero(), Vec3(1, 0, 0), 1);
  b.support(0, fix("xyzX"));
  b.support(1, fix("yzX"));
  LoadCase load = node_force(0, Vec3::Zero(), {0, 1000, 0});
  load.nodes.push_back({1, Vec3::Zero(), Vec3(0, -1000, 0)});
  const InsideBuckling inside = buckling_inside(b.frame, load, 1, 1e6);
  REQUIRE(inside.modes.size() == 1);
  CHECK(inside.modes[0].factor == near(2.20029, 3e-3));  // twist between nodes is linear: from above
}

TEST_CASE("pieces are spent where members bow and not beyond the limits") {
  Builder b = clamped_tube();
  b.section(2e-4, 1e-9, 1e-9, 2e-9);
  const int tip = b.node(6, 0.2, 0);
  b.member(1, tip, 1);  // a short thin stub beside the long tube
  const InsideModes inside = modes_inside(b.frame, 2);
  CHECK(inside.divided.pieces[0].size() > inside.divided.pieces[1].size());
  const InsideModes few = modes_inside(b.frame, 2, {.most_members = 4});
  CHECK(few.divided.frame.members.size() <= 4);
  CHECK(few.error > inside.error);
}

TEST_CASE("a shape is told by what bends, twists or stretches, and by what sways") {
  Builder b = clamped_tube();
  SECTION("bending between the ends") {
    const InsideModes inside = modes_inside(b.frame, 1);
    const ShapeParts parts = shape_parts(inside.divided.frame, inside.modes[0].shape);
    CHECK(parts.parts.front().how == Strain::bending);
    CHECK(parts.parts.front().share > 0.99);
    CHECK_THAT(shape_words(inside.divided.frame, parts, xyz), Contains("bending of b0 100 %; most at b0 at"));
  }
  SECTION("twist of a held shaft") {
    b.frame.supports[1].fix = fix("xyzYZ");
    b.mass(1, 1, Vec3(500, 0, 0).asDiagonal());
    const ShapeParts parts = shape_parts(b.frame, natural_modes(b.frame, 1).front().shape);
    CHECK(parts.parts.front().how == Strain::twist);
    CHECK(parts.dof == rx);
  }
  SECTION("sway on springs") {
    b.frame.supports.clear();
    Vec6 k;
    k << 1e3, 1e5, 1e5, 1e6, 1e6, 1e6;
    for (const int node : {0, 1}) b.frame.springs.push_back({node, -1, k, Mat3::Identity(), "soil"});
    const ShapeParts parts = shape_parts(b.frame, natural_modes(b.frame, 1).front().shape);
    CHECK(parts.sway.x() > 0.99);
    CHECK(parts.parts.front().how == Strain::give);
    CHECK_THAT(shape_words(b.frame, parts, xyz), Contains("sways along x; give of soil 100 %"));
  }
  SECTION("free motion strains nothing") {
    b.frame.supports.clear();
    for (const Mode& mode : natural_modes(b.frame, 6))
      CHECK_THAT(shape_words(b.frame, shape_parts(b.frame, mode.shape), xyz), Contains("moves freely"));
  }
}
