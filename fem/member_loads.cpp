#include "fem/member_loads.h"

#include <algorithm>
#include <cmath>

#include "fem/quadrature.h"
#include "fem/text.h"

namespace focalframe::fem {
namespace {

/// One member or the part of it from fraction a to b, as an unreleased span.
struct Part {
  const Section& section;
  const Material& material;
  Mat3 axes;
  double a = 0, b = 1;
  Span span;

  double fraction(double at) const { return (at - a) / (b - a); }
  double width() const { return span.length / (b - a); }  ///< length of the whole member
};

Part make_part(const Frame& frame, int member, const Mat3& axes, double a, double b) {
  const Member& m = frame.members[static_cast<std::size_t>(member)];
  const Section& s = frame.sections[static_cast<std::size_t>(m.section)];
  const Material& t = frame.materials[static_cast<std::size_t>(m.material)];
  return {s, t, axes, a, b, make_span(s, t, (b - a) * member_length(frame, member))};
}

// Work of the load on the motion of the unloaded span is the force that the held ends feel (Betti).

template <typename EndForces>
void add_line(const Part& part, const LineLoad& load, EndForces&& held) {
  const double from = std::max(load.from, part.a), to = std::min(load.to, part.b);
  if (!(to > from)) return;
  for (const GaussPoint& g : gauss_points) {
    const double at = from + g.at * (to - from), share = (at - load.from) / (load.to - load.from);
    const Vec3 q = (1 - share) * load.at_from + share * load.at_to;
    const Vec3 force = (load.member_axes ? q : Vec3(part.axes * q)) * (g.weight * (to - from) * part.width());
    held -= span_motion(part.span, part.fraction(at), true).topRows<3>().transpose() * force;
  }
}

template <typename EndForces>
void add_point(const Part& part, const MemberPointLoad& load, EndForces&& held) {
  const bool inside = load.at >= part.a && (load.at < part.b || (part.b >= 1 && load.at <= part.b));
  if (!inside) return;
  Vec6 force;
  force << load.force, load.moment;
  if (!load.member_axes) force << part.axes * load.force, part.axes * load.moment;
  held -= span_motion(part.span, part.fraction(load.at), true).transpose() * force;
}

template <typename EndForces>
void add_temperature(const Part& part, const MemberTemperature& t, EndForces&& held) {
  const double stretch = part.material.E * part.material.expansion;
  const double N = stretch * part.section.A * t.uniform;
  // Free curvatures: fibres at +z lengthen by turning about +y, fibres at +y by turning about -z.
  const double My = stretch * part.section.Iy * t.gradient_z, Mz = stretch * part.section.Iz * t.gradient_y;
  held(0) += N;
  held(6) -= N;
  held(4) += My;
  held(10) -= My;
  held(5) -= Mz;
  held(11) += Mz;
}

template <typename EndForces>
void add_gravity(const Part& part, const Vec3& gravity, EndForces&& held) {
  const double per_length = part.section.A * part.material.density;
  if (per_length == 0 || gravity.isZero(0)) return;
  const LineLoad weight{
      .from = part.a, .to = part.b, .at_from = per_length * gravity, .at_to = per_length * gravity};
  add_line(part, weight, held);
}

}  // namespace

void require_sound_loads(const Frame& frame, const LoadCase& load) {
  // Words are put together only when something is wrong: cases are long.
  const auto fail = [&](const std::string& what) {
    require(false, "load case '" + load.name + "': " + what);
  };
  const auto node = [&](int i) {
    if (i < 0 || i >= static_cast<int>(frame.nodes.size()))
      fail("node index " + std::to_string(i) + " does not exist");
  };
  const auto member = [&](int i) {
    if (i < 0 || i >= static_cast<int>(frame.members.size()))
      fail("member index " + std::to_string(i) + " does not exist");
  };
  for (const NodeLoad& l : load.nodes) node(l.node);
  for (const LineLoad& l : load.lines) {
    member(l.member);
    if (!(l.from >= 0 && l.from < l.to && l.to <= 1))
      fail("line load on " + member_words(frame, l.member) + " from " + number(l.from) + " to " +
           number(l.to) + " must satisfy 0 <= from < to <= 1");
  }
  for (const MemberPointLoad& l : load.points) {
    member(l.member);
    if (!(l.at >= 0 && l.at <= 1))
      fail("point load on " + member_words(frame, l.member) + " at " + number(l.at) + " must lie in 0..1");
  }
  for (const MemberTemperature& l : load.temperatures) member(l.member);
}

std::vector<LoadCase> loads_by_member(const Frame& frame, const LoadCase& load) {
  require_sound_loads(frame, load);
  std::vector<LoadCase> own(frame.members.size());
  for (LoadCase& l : own) l.gravity = load.gravity;
  for (const LineLoad& l : load.lines) own[static_cast<std::size_t>(l.member)].lines.push_back(l);
  for (const MemberPointLoad& l : load.points) own[static_cast<std::size_t>(l.member)].points.push_back(l);
  for (const MemberTemperature& l : load.temperatures)
    own[static_cast<std::size_t>(l.member)].temperatures.push_back(l);
  return own;
}

Eigen::MatrixXd held_end_forces(const Frame& frame, const std::vector<Element>& elements,
                                const LoadCase& load) {
  require_sound_loads(frame, load);
  Eigen::MatrixXd held = Eigen::MatrixXd::Zero(12, static_cast<Eigen::Index>(elements.size()));
  const auto part = [&](int m) {
    return make_part(frame, m, elements[static_cast<std::size_t>(m)].axes, 0, 1);
  };
  if (!load.gravity.isZero(0))
    for (int m = 0; m < static_cast<int>(elements.size()); ++m)
      add_gravity(part(m), load.gravity, held.col(m));
  for (const LineLoad& l : load.lines) add_line(part(l.member), l, held.col(l.member));
  for (const MemberPointLoad& l : load.points) add_point(part(l.member), l, held.col(l.member));
  for (const MemberTemperature& l : load.temperatures) add_temperature(part(l.member), l, held.col(l.member));
  return held;
}

Vec12 held_part_forces(const Frame& frame, int member, const Mat3& axes, const LoadCase& load, double a,
                       double b) {
  const Part part = make_part(frame, member, axes, a, b);
  Vec12 held = Vec12::Zero();
  add_gravity(part, load.gravity, held);
  for (const LineLoad& l : load.lines)
    if (l.member == member) add_line(part, l, held);
  for (const MemberPointLoad& l : load.points)
    if (l.member == member) add_point(part, l, held);
  for (const MemberTemperature& l : load.temperatures)
    if (l.member == member) add_temperature(part, l, held);
  return held;
}

}  // namespace focalframe::fem
