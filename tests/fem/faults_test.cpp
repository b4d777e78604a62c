#include "fem/frame.h"
#include "fem/near_mechanism.h"
#include "fem/statics.h"
#include "tests/fem/frames.h"

using namespace focalframe::test;
using Catch::Matchers::Contains;

namespace {

Builder sound() {
  Builder b = straight_beam(3, 2);
  b.support(0, all_fixed);
  return b;
}

std::string first_fault(const Frame& frame) {
  const auto faults = find_faults(frame);
  return faults.empty() ? "" : faults.front().what;
}

}  // namespace

TEST_CASE("a sound frame has no faults") { CHECK(find_faults(sound().frame).empty()); }

TEST_CASE("each fault of a frame is told in words that name the part") {
  Builder b = sound();
  SECTION("up along the member") {
    b.frame.members[1].up = Vec3(2, 0, 0);
    CHECK_THAT(first_fault(b.frame), Contains("'b1'") && Contains("up is parallel"));
    CHECK(find_faults(b.frame).front().member == 1);
    CHECK_THROWS_WITH(StaticSolver(b.frame), Contains("up is parallel"));
  }
  SECTION("no length") {
    b.frame.members[1].offset_to = Vec3(-1.5, 0, 0);
    CHECK_THAT(first_fault(b.frame), Contains("'b1'") && Contains("length"));
  }
  SECTION("node index") {
    b.frame.members[1].to = 17;
    CHECK_THAT(first_fault(b.frame), Contains("'b1'") && Contains("node index"));
  }
  SECTION("section index") {
    b.frame.members[0].section = 2;
    CHECK_THAT(first_fault(b.frame), Contains("section index"));
  }
  SECTION("section value") {
    b.frame.sections[0].Iz = 0;
    CHECK_THAT(first_fault(b.frame), Contains("Iz 0 must be > 0"));
  }
  SECTION("material value") {
    b.frame.materials[0].E = -1;
    CHECK_THAT(first_fault(b.frame), Contains("E -1 must be > 0"));
  }
  SECTION("duplicate member") {
    b.member(2, 1);
    CHECK_THAT(first_fault(b.frame), Contains("'b2'") && Contains("lies on member 'b1'"));
  }
  SECTION("joint between separated nodes") {
    b.frame.joints.push_back({0, 1, all_fixed, Mat3::Identity(), "pin"});
    CHECK_THAT(first_fault(b.frame), Contains("'pin'") && Contains("1.5 m apart"));
  }
  SECTION("joint axes") {
    b.node(3, 0, 0);
    b.frame.joints.push_back({2, 3, all_fixed, 2 * Mat3::Identity(), "pin"});
    CHECK_THAT(first_fault(b.frame), Contains("'pin'") && Contains("axes"));
  }
  SECTION("coincident nodes") {
    b.node(3, 0, 0), b.node(3, 0, 1);
    b.member(3, 4, 0, 0, Vec3::UnitX());
    b.member(4, 0);
    CHECK_THAT(first_fault(b.frame), Contains("'n2'") && Contains("'n3'") && Contains("one place"));
  }
  SECTION("loose part") {
    b.node(0, 5, 0), b.node(1, 5, 0);
    b.member(3, 4);
    CHECK_THAT(first_fault(b.frame), Contains("'n3' and 1 more nodes are not connected"));
    CHECK(find_faults(b.frame, {4}).empty());
  }
  SECTION("two parts that are both held are sound") {
    b.node(0, 5, 0), b.node(1, 5, 0);
    b.member(3, 4);
    b.support(3, all_fixed);
    CHECK(find_faults(b.frame).empty());
  }
  SECTION("spring") {
    b.frame.springs.push_back({1, 1, Vec6::Ones(), Mat3::Identity(), "stay"});
    CHECK_THAT(first_fault(b.frame), Contains("'stay'"));
  }
  SECTION("negative spring") {
    b.frame.springs.push_back({1, -1, -Vec6::Ones(), Mat3::Identity(), "stay"});
    CHECK_THAT(first_fault(b.frame), Contains("'stay'") && Contains("-1 must be >= 0"));
  }
  SECTION("place") {
    b.frame.nodes[1].at.x() = std::nan("");
    CHECK_THAT(first_fault(b.frame), Contains("'n1'") && Contains("not finite"));
  }
}

TEST_CASE("a load that names no part of the frame is refused") {
  Builder b = sound();
  const StaticSolver solver(b.frame);
  CHECK_THROWS_WITH(solver.solve(node_force(9, Vec3::UnitX())), Contains("node index 9"));
  LoadCase load = uniform_load(b.frame, Vec3::UnitY());
  load.lines[1].to = 1.5;
  CHECK_THROWS_WITH(solver.solve(load), Contains("'b1'") && Contains("0 <= from < to <= 1"));
}

TEST_CASE("contradicting supports and joints are refused in words") {
  Builder b = sound();
  b.node(3, 0, 0);
  b.frame.joints.push_back({2, 3, all_fixed, Mat3::Identity(), "weld"});
  Vec6 up = Vec6::Zero(), down = Vec6::Zero();
  up(uy) = 1e-3;
  down(uy) = -1e-3;
  b.support(2, fix("y"), up);
  b.support(3, fix("y"), down);
  CHECK_THROWS_WITH(StaticSolver(b.frame), Contains("'weld'") && Contains("contradicts"));
}

TEST_CASE("a frame that is nearly a mechanism is told by node, direction and what is soft") {
  Builder b = straight_beam(3, 3);
  SECTION("a soft spring instead of a support") {
    Vec6 k;
    k << 1e7, 1e7, 1e7, 1e-3, 1e7, 1e7;
    b.frame.springs.push_back({0, -1, k, Mat3::Identity(), "foot"});
    b.support(3, fix("yz"));
    CHECK(StaticSolver(b.frame).smallest_pivot_ratio() < 1e-7);
    const auto near = near_mechanism(b.frame);
    REQUIRE(near);
    CHECK(near->dof == rx);
    CHECK_THAT(near->what(), Contains("hardly any resistance") && Contains("turns about x") &&
                                 Contains("the stiffness of 'foot'"));
  }
  SECTION("a soft end spring") {
    b.support(0, all_fixed);
    b.frame.members[1].spring_to = {0, 0, 0, 0, 1e-3, 0};
    CHECK(StaticSolver(b.frame).smallest_pivot_ratio() < 1e-7);
    const auto near = near_mechanism(b.frame);
    REQUIRE(near);
    CHECK(near->node == 2);
    CHECK_THAT(near->what(), Contains("turns about y") && Contains("the end springs of member 'b1'"));
  }
  SECTION("a sound frame is none") {
    b.support(0, all_fixed);
    CHECK_FALSE(near_mechanism(b.frame));
  }
}
