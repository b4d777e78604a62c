#pragma once

/// Frames without any symmetry, from a fixed seed: offsets, releases, end springs, springs with turned axes,
/// joints, offset masses, shear-flexible sections.

#include "tests/fem/frames.h"

namespace focalframe::test {

class Random {
 public:
  explicit Random(unsigned seed) : engine_(seed) {}
  double between(double a, double b) {
    return a + (b - a) * static_cast<double>(engine_()) / static_cast<double>(std::mt19937::max());
  }
  int below(int n) { return static_cast<int>(engine_() % static_cast<unsigned>(n)); }
  Vec3 vector(double size) { return {between(-size, size), between(-size, size), between(-size, size)}; }
  Mat3 axes() { return turned(between(0, 3), vector(1) + Vec3(0.1, 0, 0)); }

 private:
  std::mt19937 engine_;
};

/// Two nodes are fully held unless `supported` is false.
inline Frame random_frame(unsigned seed, int nodes = 9, bool supported = true) {
  Random random(seed);
  Builder b;
  for (int k = 0; k < 3; ++k) {
    b.material(random.between(70e9, 210e9), random.between(27e9, 81e9), random.between(2700, 7850), 12e-6);
    b.section(random.between(1e-3, 4e-3), random.between(1e-6, 8e-6), random.between(1e-6, 8e-6),
              random.between(1e-6, 8e-6), k == 0 ? 0 : random.between(5e-4, 2e-3),
              k == 1 ? 0 : random.between(5e-4, 2e-3));
  }
  for (int n = 0; n < nodes; ++n) {
    const Vec3 at = random.vector(3) + Vec3(1.5 * n, 0, 0);
    b.node(at.x(), at.y(), at.z());
  }
  const auto connect = [&](int from, int to) {
    b.member(from, to, random.below(3), random.below(3), random.vector(1));
    Member& m = b.last();
    if (random.below(3) == 0) m.offset_from = random.vector(0.2);
    if (random.below(3) == 0) m.offset_to = random.vector(0.2);
    return &m;
  };
  for (int n = 1; n < nodes; ++n) connect(n - 1, n);
  for (int n = 2; n < nodes; ++n) {
    Member& m = *connect(n - 2, n);
    const int kind = random.below(4);
    if (kind == 0) m.release_from = fix("YZ");
    if (kind == 1) m.release_to = fix("xY");
    if (kind == 2) m.spring_from = {0, 3e6, 0, 2e4, 5e5, 0};
  }
  const Vec3 seat = b.frame.nodes.back().at;
  const int hinged = b.node(seat.x(), seat.y(), seat.z());
  connect(0, hinged);
  b.frame.joints.push_back({hinged, nodes - 1, fix("xyzXZ"), random.axes(), "hinge"});
  Vec6 k;
  k << 1e6, 2e6, 3e5, 1e4, 2e4, 3e4;
  b.frame.springs.push_back({1, 3, k, random.axes(), "link"});
  b.mass(2, 150, Vec3(3, 4, 5).asDiagonal(), random.vector(0.3));
  if (supported) {
    b.support(0, all_fixed);
    b.support(nodes / 2, fix("xyz"));
    b.frame.springs.push_back({nodes - 2, -1, k, random.axes(), "ground"});
  }
  return b.frame;
}

/// Every kind of load, some in member axes.
inline LoadCase random_load(const Frame& frame, unsigned seed) {
  Random random(seed);
  LoadCase load;
  load.name = "random";
  load.gravity = random.vector(9.81);
  for (int k = 0; k < 4; ++k) {
    const int member = random.below(static_cast<int>(frame.members.size()));
    load.nodes.push_back(
        {random.below(static_cast<int>(frame.nodes.size())), random.vector(1000), random.vector(500)});
    const double from = random.between(0, 0.4);
    load.lines.push_back(
        {member, from, from + random.between(0.1, 0.6), random.vector(300), random.vector(300), k % 2 == 0});
    load.points.push_back({member, random.between(0, 1), random.vector(400), random.vector(100), k % 2 == 1});
    load.temperatures.push_back(
        {member, random.between(-20, 20), random.between(-50, 50), random.between(-50, 50)});
  }
  return load;
}

}  // namespace focalframe::test
