#include "fem/modes.h"

#include "fem/assembly.h"
#include "fem/mechanism.h"
#include "fem/units.h"
#include "tests/fem/random_frame.h"

using namespace focalframe::test;
using Catch::Matchers::Contains;

namespace {

Eigen::VectorXd flat_of(const Eigen::MatrixXd& by_node) {
  const Eigen::MatrixXd t = by_node.transpose();
  return Eigen::Map<const Eigen::VectorXd>(t.data(), t.size());
}

/// A rib-and-tube grid large enough for the iterative search.
Frame grid(bool supported) {
  Builder b;
  b.material(210e9, 81e9, 7850);
  b.section(3e-3, 5e-6, 4e-6, 8e-6, 1.5e-3, 1.5e-3);
  b.section(6e-4, 2e-7, 1e-7, 2e-7);
  const auto tube = b.line(Vec3::Zero(), Vec3(8, 0, 0), 8);
  for (const int root : tube)
    for (const double side : {-1.0, 1.0}) {
      int before = root;
      for (int i = 1; i <= 4; ++i) {
        const Vec3 foot = b.frame.nodes[static_cast<std::size_t>(root)].at;
        const int next = b.node(foot.x(), side * 0.6 * i, 0.05 * i * i);
        b.member(before, next, 1);
        before = next;
      }
    }
  if (supported) {
    b.support(tube.front(), all_fixed);
    b.support(tube.back(), fix("yz"));
  }
  return b.frame;
}

}  // namespace

TEST_CASE("modes solve their equation, are orthogonal and ascend") {
  const Frame frame = GENERATE(true, false) ? grid(true) : random_frame(5);
  const auto modes = natural_modes(frame, 12);
  REQUIRE(modes.size() == 12);
  const SparseMatrix M = assemble_mass(frame);
  for (std::size_t i = 0; i < modes.size(); ++i) {
    CHECK(modes[i].residual < 1e-6);
    CHECK(modes[i].frequency > 0);
    if (i > 0) CHECK(modes[i].frequency >= modes[i - 1].frequency);
    const Eigen::VectorXd x = flat_of(modes[i].shape), Mx = M * x;
    CHECK(x.dot(Mx) == near(modes[i].modal_mass, 1e-10));
    for (std::size_t j = 0; j < i; ++j)
      CHECK(std::abs(flat_of(modes[j].shape).dot(Mx)) <
            1e-6 * std::sqrt(modes[i].modal_mass * modes[j].modal_mass));
  }
}

TEST_CASE("a free frame has six motions of frequency zero that carry all its mass") {
  const Frame frame = grid(false);
  const auto modes = natural_modes(frame, 8);
  REQUIRE(modes.size() == 8);
  Vec3 carried = Vec3::Zero();
  for (std::size_t k = 0; k < 6; ++k) {
    CHECK(modes[k].frequency < 1e-3);
    carried += modes[k].effective_mass;
  }
  CHECK(modes[6].frequency > 0.1);
  for (int d = 0; d < 3; ++d) CHECK(carried(d) == near(total_mass(frame).mass, 1e-6));
}

TEST_CASE("sixteen equal arms give sixteen equal frequencies and none is lost") {
  Builder b;
  b.material(70e9, 27e9, 2700);
  b.section(1e-3, 1e-7, 1e-7, 2e-7);
  for (int arm = 0; arm < 8; ++arm) {
    const double t = arm * std::numbers::pi / 4;
    const auto nodes = b.line(Vec3(0, 0, arm), Vec3(std::cos(t), std::sin(t), arm), 4);
    b.support(nodes.front(), all_fixed);
  }
  const auto modes = natural_modes(b.frame, 20);
  REQUIRE(modes.size() == 20);
  for (std::size_t k = 0; k < 16; ++k) CHECK(modes[k].frequency == near(modes[0].frequency, 1e-9));
  CHECK(modes[16].frequency > 5 * modes[0].frequency);
}

TEST_CASE("all modes together carry the mass that can move") {
  Builder b;
  b.material(210e9, 81e9);
  b.section(3e-3, 5e-6, 4e-6, 8e-6);
  b.line(Vec3::Zero(), Vec3(3, 0, 0), 3);
  b.support(0, all_fixed);
  for (int n = 1; n < 4; ++n) b.mass(n, 10.0 * n);
  const auto modes = natural_modes(b.frame, 20);
  REQUIRE(modes.size() == 9);  // three masses in three directions
  Vec3 carried = Vec3::Zero();
  for (const Mode& m : modes) carried += m.effective_mass;
  for (int d = 0; d < 3; ++d) CHECK(carried(d) == near(60, 1e-9));
}

TEST_CASE("a mass on a spring has the frequency sqrt(k / m) / 2 pi, beside its hub too") {
  Builder b;
  b.node(0, 0, 0);
  Vec6 k;
  k << 1e5, 1e12, 1e12, 1e12, 1e12, 1e12;
  b.frame.springs.push_back({0, -1, k, Mat3::Identity(), "s"});
  b.mass(0, 40);
  CHECK(natural_modes(b.frame, 1).at(0).frequency ==
        near(std::sqrt(1e5 / 40) / (2 * std::numbers::pi), 1e-10));
  Builder pendulum;
  pendulum.node(0, 0, 0);
  k << 1e12, 1e12, 1e12, 1e12, 3e4, 1e12;
  pendulum.frame.springs.push_back({0, -1, k, Mat3::Identity(), "s"});
  pendulum.mass(0, 40, Vec3(0, 7, 0).asDiagonal(), Vec3(0.5, 0, 0));
  const double inertia = 7 + 40 * 0.25;
  CHECK(natural_modes(pendulum.frame, 1).at(0).frequency ==
        near(std::sqrt(3e4 / inertia) / (2 * std::numbers::pi), 1e-6));
}

TEST_CASE("a frame without mass and a loose part without mass are refused") {
  Builder b = straight_beam(3, 2);
  b.support(0, all_fixed);
  CHECK_THROWS_WITH(natural_modes(b.frame, 1), Contains("no mass"));
  Builder loose = straight_beam(3, 2);
  loose.mass(2, 10);
  CHECK_THROWS_AS(natural_modes(loose.frame, 1), Mechanism);
}
