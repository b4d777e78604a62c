#include "fem/diagram.h"

#include "fem/beam.h"
#include "tests/fem/random_frame.h"

using namespace focalframe::test;

namespace {

struct Case {
  Frame frame;
  LoadCase load;
  Response response;
};

Case random_case(unsigned seed) {
  Case c;
  c.frame = random_frame(seed);
  c.load = random_load(c.frame, seed + 50);
  c.response = StaticSolver(c.frame).solve(c.load);
  return c;
}

Vec6 as_vector(const Resultants& r) {
  Vec6 v;
  v << r.N, r.Vy, r.Vz, r.T, r.My, r.Mz;
  return v;
}

}  // namespace

TEST_CASE("resultants at both ends are the end forces") {
  const Case c = random_case(GENERATE(1u, 2u, 3u));
  for (int m = 0; m < static_cast<int>(c.frame.members.size()); ++m) {
    const double scale = c.response.end_force.row(m).cwiseAbs().maxCoeff();
    const Vec6 start = as_vector(resultants_at(c.frame, c.load, c.response, m, 0));
    const Vec6 end = as_vector(resultants_at(c.frame, c.load, c.response, m, 1));
    CHECK((start + c.response.end_force.row(m).head(6).transpose()).norm() < 1e-9 * scale);
    CHECK((end - c.response.end_force.row(m).tail(6).transpose()).norm() < 1e-8 * scale);
  }
}

TEST_CASE("bending moments change as the shear forces say") {
  const Case c = random_case(4);
  const int m = c.load.lines[0].member;
  const double L = member_length(c.frame, m), h = 1e-6;
  const auto breaks = load_breaks(c.load, m);
  for (std::size_t i = 1; i < breaks.size(); ++i) {
    const double xi = (breaks[i - 1] + breaks[i]) / 2;
    const auto at = [&](double x) { return resultants_at(c.frame, c.load, c.response, m, x); };
    CHECK((at(xi + h).My - at(xi - h).My) / (2 * h * L) == Approx(at(xi).Vz).epsilon(1e-6).margin(1e-3));
    CHECK((at(xi + h).Mz - at(xi - h).Mz) / (2 * h * L) == Approx(-at(xi).Vy).epsilon(1e-6).margin(1e-3));
  }
}

TEST_CASE("resultants and deflections inside a member are those of the divided member") {
  const unsigned seed = GENERATE(11u, 12u, 13u, 14u);
  const Case c = random_case(seed);
  const double cut = 0.37;
  const int index = c.load.lines[1].member;
  Case d = c;
  const Member& m = c.frame.members[static_cast<std::size_t>(index)];
  const Vec3 a = c.frame.nodes[static_cast<std::size_t>(m.from)].at + m.offset_from;
  const Vec3 b = c.frame.nodes[static_cast<std::size_t>(m.to)].at + m.offset_to;
  d.frame.nodes.push_back({a + cut * (b - a), "cut"});
  const int middle = static_cast<int>(d.frame.nodes.size()) - 1,
            second = static_cast<int>(d.frame.members.size());
  d.frame.members.push_back(m);
  Member& first_part = d.frame.members[static_cast<std::size_t>(index)];
  Member& second_part = d.frame.members.back();
  first_part.to = second_part.from = middle;
  first_part.offset_to = second_part.offset_from = Vec3::Zero();
  first_part.release_to = second_part.release_from = {};
  first_part.spring_to = second_part.spring_from = {};
  d.load.lines.clear();
  d.load.points.clear();
  d.load.temperatures.clear();
  const auto place = [&](int member, double at) {
    if (member != index) return std::pair<int, double>{member, at};
    return at < cut ? std::pair<int, double>{index, at / cut}
                    : std::pair<int, double>{second, (at - cut) / (1 - cut)};
  };
  for (const MemberPointLoad& p : c.load.points) {
    const auto [member, at] = place(p.member, p.at);
    d.load.points.push_back({member, at, p.force, p.moment, p.member_axes});
  }
  for (const MemberTemperature& t : c.load.temperatures) {
    d.load.temperatures.push_back(t);
    if (t.member == index) {
      d.load.temperatures.push_back(t);
      d.load.temperatures.back().member = second;
    }
  }
  for (const LineLoad& l : c.load.lines) {
    if (l.member != index) {
      d.load.lines.push_back(l);
      continue;
    }
    const auto value = [&](double at) -> Vec3 {
      return l.at_from + (l.at_to - l.at_from) * ((at - l.from) / (l.to - l.from));
    };
    if (l.from < cut)
      d.load.lines.push_back({index, l.from / cut, std::min(l.to, cut) / cut, l.at_from,
                              value(std::min(l.to, cut)), l.member_axes});
    if (l.to > cut) {
      const double from = std::max(l.from, cut);
      d.load.lines.push_back(
          {second, (from - cut) / (1 - cut), (l.to - cut) / (1 - cut), value(from), l.at_to, l.member_axes});
    }
  }
  d.response = StaticSolver(d.frame).solve(d.load);
  const double move = c.response.displacement.cwiseAbs().maxCoeff();
  const Vec6 inside = deflection_at(c.frame, c.load, c.response, index, cut, true);
  CHECK((inside - d.response.displacement.row(middle).transpose()).norm() < 1e-8 * move);
  const double scale = c.response.end_force.row(index).cwiseAbs().maxCoeff();
  for (const double xi : {0.2, 0.6, 0.9}) {
    const auto [member, at] = place(index, xi);
    const Vec6 whole = as_vector(resultants_at(c.frame, c.load, c.response, index, xi));
    CHECK((whole - as_vector(resultants_at(d.frame, d.load, d.response, member, at))).norm() < 1e-7 * scale);
    for (const bool of_section : {false, true})
      CHECK((deflection_at(c.frame, c.load, c.response, index, xi, of_section) -
             deflection_at(d.frame, d.load, d.response, member, at, of_section))
                .norm() < 1e-8 * move);
  }
}

TEST_CASE("an unloaded member deflects as its node motions say") {
  const Frame frame = random_frame(21);
  const LoadCase load = node_force(3, {100, 200, 300}, {40, 50, 60});
  const Response r = StaticSolver(frame).solve(load);
  for (int m = 0; m < static_cast<int>(frame.members.size()); ++m) {
    const Member& member = frame.members[static_cast<std::size_t>(m)];
    Vec12 u;
    u << r.displacement.row(member.from).transpose(), r.displacement.row(member.to).transpose();
    for (const bool of_section : {false, true}) {
      const Vec6 expected = motion_at(frame, m, 0.42, of_section) * u;
      CHECK((deflection_at(frame, load, r, m, 0.42, of_section) - expected).norm() < 1e-9 * u.norm());
    }
  }
}

TEST_CASE("extremes are nowhere exceeded and are reached where they say") {
  const Case c = random_case(GENERATE(31u, 32u, 33u));
  for (const int m : {c.load.lines[0].member, c.load.points[1].member}) {
    const Extremes e = extremes(c.frame, c.load, c.response, m);
    const double span = std::max({std::abs(e.most_My.value), std::abs(e.least_My.value),
                                  std::abs(e.most_Mz.value), std::abs(e.least_Mz.value)});
    const Mat3 axes = member_axes(c.frame, m);
    const Vec6 start = deflection_at(c.frame, c.load, c.response, m, 0),
               end = deflection_at(c.frame, c.load, c.response, m, 1);
    const auto off_chord = [&](double xi) -> Vec3 {
      const Vec6 at = deflection_at(c.frame, c.load, c.response, m, xi);
      return axes * (at.head<3>() - (1 - xi) * start.head<3>() - xi * end.head<3>());
    };
    for (int i = 0; i <= 500; ++i) {
      const double xi = i / 500.0;
      const Resultants r = resultants_at(c.frame, c.load, c.response, m, xi);
      CHECK(r.My <= e.most_My.value + 1e-6 * span);
      CHECK(r.My >= e.least_My.value - 1e-6 * span);
      CHECK(r.Mz <= e.most_Mz.value + 1e-6 * span);
      CHECK(r.Mz >= e.least_Mz.value - 1e-6 * span);
      const Vec3 d = off_chord(xi);
      CHECK(d.y() <= e.most_y.value + 1e-10);
      CHECK(d.y() >= e.least_y.value - 1e-10);
      CHECK(d.z() <= e.most_z.value + 1e-10);
      CHECK(d.z() >= e.least_z.value - 1e-10);
    }
    CHECK(off_chord(e.most_y.at).y() == Approx(e.most_y.value).epsilon(1e-6).margin(1e-10));
    CHECK(off_chord(e.least_z.at).z() == Approx(e.least_z.value).epsilon(1e-6).margin(1e-10));
  }
}
