#include "fem/diagram.h"

#include <Eigen/Dense>
#include <algorithm>
#include <cmath>
#include <functional>

#include "fem/element.h"
#include "fem/member_loads.h"
#include "fem/quadrature.h"
#include "fem/text.h"

namespace focalframe::fem {
namespace {

using Index = Eigen::Index;

void require_member(const Frame& frame, const Response& response, int member) {
  require(member >= 0 && member < static_cast<int>(frame.members.size()),
          "member index " + std::to_string(member) + " does not exist");
  require(response.end_force.rows() == static_cast<Index>(frame.members.size()),
          "the response does not belong to this frame: it has " + std::to_string(response.end_force.rows()) +
              " members, the frame " + std::to_string(frame.members.size()));
}

/// Forces and moments about the place x that act on the piece between the start and x.
class Piece {
 public:
  explicit Piece(double x) : x_(x) {}
  void add(double s, const Vec3& force, const Vec3& moment = Vec3::Zero()) {
    force_ += force;
    moment_ += moment + Vec3(s - x_, 0, 0).cross(force);
  }
  Resultants resultants() const {
    return {.N = -force_.x(),
            .Vy = -force_.y(),
            .Vz = -force_.z(),
            .T = -moment_.x(),
            .My = -moment_.y(),
            .Mz = -moment_.z()};
  }

 private:
  double x_;
  Vec3 force_ = Vec3::Zero(), moment_ = Vec3::Zero();
};

/// Everything about one member under one load that its diagrams need.
struct Inside {
  const Frame& frame;
  const LoadCase& load;
  int member;
  Element element;
  Vec12 ends;        ///< inner end motions, member axes
  Vec6 start_force;  ///< end force at the start, member axes

  const Section& section() const {
    return frame.sections[static_cast<std::size_t>(frame.members[static_cast<std::size_t>(member)].section)];
  }
  const Material& material() const {
    return frame
        .materials[static_cast<std::size_t>(frame.members[static_cast<std::size_t>(member)].material)];
  }
};

Inside look_inside(const Frame& frame, const LoadCase& load, const Response& response, int member) {
  require_member(frame, response, member);
  require_sound_loads(frame, load);
  const Member& m = frame.members[static_cast<std::size_t>(member)];
  Inside in{frame, load, member, make_element(frame, member), {}, response.end_force.row(member).head<6>()};
  Vec12 nodes;
  nodes << response.displacement.row(m.from).transpose(), response.displacement.row(m.to).transpose();
  const Element& e = in.element;
  in.ends = e.carry * nodes;
  if (e.soft)
    in.ends = (e.inner() * in.ends - e.give * held_part_forces(frame, member, e.axes, load, 0, 1)).eval();
  return in;
}

Resultants resultants(const Inside& in, double xi) {
  const double L = in.element.span.length;
  const Mat3& axes = in.element.axes;
  Piece piece(xi * L);
  piece.add(0, in.start_force.head<3>(), in.start_force.tail<3>());
  piece.add(xi * L / 2, axes * in.load.gravity * (in.section().A * in.material().density * xi * L));
  for (const LineLoad& l : in.load.lines) {
    const double to = std::min(l.to, xi);
    if (l.member != in.member || !(to > l.from)) continue;
    for (const GaussPoint& g : gauss_points) {
      const double at = l.from + g.at * (to - l.from), share = (at - l.from) / (l.to - l.from);
      const Vec3 q = (1 - share) * l.at_from + share * l.at_to;
      piece.add(at * L, (l.member_axes ? q : Vec3(axes * q)) * (g.weight * (to - l.from) * L));
    }
  }
  for (const MemberPointLoad& p : in.load.points) {
    if (p.member != in.member || p.at > xi || p.at >= 1) continue;
    if (p.member_axes)
      piece.add(p.at * L, p.force, p.moment);
    else
      piece.add(p.at * L, axes * p.force, axes * p.moment);
  }
  return piece.resultants();
}

/// Motion of the section at xi, member axes: the member is cut there in two spans and the cut solved for.
Vec6 section_motion(const Inside& in, double xi) {
  if (xi < 1e-9) return in.ends.head<6>();
  if (xi > 1 - 1e-9) return in.ends.tail<6>();
  const double L = in.element.span.length;
  const Mat12 a = span_stiffness(in.section(), in.material(), make_span(in.section(), in.material(), xi * L));
  const Mat12 b =
      span_stiffness(in.section(), in.material(), make_span(in.section(), in.material(), (1 - xi) * L));
  const Vec12 held_a = held_part_forces(in.frame, in.member, in.element.axes, in.load, 0, xi);
  const Vec12 held_b = held_part_forces(in.frame, in.member, in.element.axes, in.load, xi, 1);
  const Vec6 force = a.bottomLeftCorner<6, 6>() * in.ends.head<6>() +
                     b.topRightCorner<6, 6>() * in.ends.tail<6>() + held_a.tail<6>() + held_b.head<6>();
  const Eigen::Matrix<double, 6, 6> K = a.bottomRightCorner<6, 6>() + b.topLeftCorner<6, 6>();
  return -K.ldlt().solve(force);
}

/// Adds the shear angle that turns the axis more than the section.
void turn_to_axis(const Inside& in, double xi, Vec6& motion) {
  const Resultants r = resultants(in, xi);
  const Section& s = in.section();
  if (s.shear_area_y > 0) motion(rz) += r.Vy / (in.material().G * s.shear_area_y);
  if (s.shear_area_z > 0) motion(ry) -= r.Vz / (in.material().G * s.shear_area_z);
}

void take(Extreme& most, Extreme& least, double at, double value) {
  if (!(value <= most.value)) most = {at, value};
  if (!(value >= least.value)) least = {at, value};
}

/// Roots inside (a, b) of the parabola through three equidistant values; shear under linear loads is one.
std::vector<double> parabola_roots(double a, double b, double at_a, double middle, double at_b) {
  const double c2 = 2 * (at_a - 2 * middle + at_b), c1 = -3 * at_a + 4 * middle - at_b, c0 = at_a;
  const double scale = std::max({std::abs(at_a), std::abs(middle), std::abs(at_b)});
  std::vector<double> roots;
  const auto keep = [&](double t) {
    if (t > 0 && t < 1) roots.push_back(a + t * (b - a));
  };
  if (std::abs(c2) < 1e-9 * scale) {
    if (std::abs(c1) > 1e-12 * scale) keep(-c0 / c1);
    return roots;
  }
  const double disc = c1 * c1 - 4 * c2 * c0;
  if (disc < 0) return roots;
  const double q = -(c1 + std::copysign(std::sqrt(disc), c1)) / 2;
  keep(q / c2);
  if (q != 0) keep(c0 / q);
  return roots;
}

void add_moments(const Inside& in, double a, double b, Extremes& e) {
  // Just inside the interval, so that a point load at its border counts on the right side.
  const double hair = 1e-12;
  const double low = a + hair, high = b - hair, middle = (a + b) / 2;
  const Resultants at_a = resultants(in, low), mid = resultants(in, middle), at_b = resultants(in, high);
  std::vector<double> places = parabola_roots(low, high, at_a.Vz, mid.Vz, at_b.Vz);
  for (const double x : parabola_roots(low, high, at_a.Vy, mid.Vy, at_b.Vy)) places.push_back(x);
  take(e.most_My, e.least_My, a, at_a.My);
  take(e.most_Mz, e.least_Mz, a, at_a.Mz);
  take(e.most_My, e.least_My, b, at_b.My);
  take(e.most_Mz, e.least_Mz, b, at_b.Mz);
  for (const double x : places) {
    const Resultants r = resultants(in, x);
    take(e.most_My, e.least_My, x, r.My);
    take(e.most_Mz, e.least_Mz, x, r.Mz);
  }
}

/// Root of f between a and b, where it changes sign.
double root_between(const std::function<double(double)>& f, double a, double b) {
  const bool rises = f(b) > 0;
  for (int step = 0; step < 50; ++step) {
    const double middle = (a + b) / 2;
    ((f(middle) > 0) == rises ? b : a) = middle;
  }
  return (a + b) / 2;
}

void add_deflections(const Inside& in, double a, double b, Extremes& e) {
  const int pieces = 12;  // the slope is a polynomial of degree four at most
  const double L = in.element.span.length, hair = 1e-12;
  for (const int axis : {1, 2}) {
    Extreme& most = axis == 1 ? e.most_y : e.most_z;
    Extreme& least = axis == 1 ? e.least_y : e.least_z;
    const auto off_chord = [&](double xi) {
      return section_motion(in, xi)(axis) - (1 - xi) * in.ends(axis) - xi * in.ends(6 + axis);
    };
    const auto slope = [&](double xi) {
      Vec6 motion = section_motion(in, xi);
      turn_to_axis(in, xi, motion);
      return (axis == 1 ? motion(rz) : -motion(ry)) - (in.ends(6 + axis) - in.ends(axis)) / L;
    };
    take(most, least, a, off_chord(a));
    take(most, least, b, off_chord(b));
    double before = a + hair, slope_before = slope(before);
    for (int i = 1; i <= pieces; ++i) {
      const double x = i == pieces ? b - hair : a + (b - a) * i / pieces, slope_here = slope(x);
      if (slope_before * slope_here < 0) {
        const double flat = root_between(slope, before, x);
        take(most, least, flat, off_chord(flat));
      }
      before = x;
      slope_before = slope_here;
    }
  }
}

}  // namespace

std::vector<double> load_breaks(const LoadCase& load, int member) {
  std::vector<double> breaks{0, 1};
  for (const LineLoad& l : load.lines)
    if (l.member == member) breaks.insert(breaks.end(), {l.from, l.to});
  for (const MemberPointLoad& p : load.points)
    if (p.member == member) breaks.push_back(p.at);
  std::sort(breaks.begin(), breaks.end());
  breaks.erase(std::unique(breaks.begin(), breaks.end(), [](double a, double b) { return b - a < 1e-9; }),
               breaks.end());
  return breaks;
}

Resultants resultants_at(const Frame& frame, const LoadCase& load, const Response& response, int member,
                         double xi) {
  return resultants(look_inside(frame, load, response, member), xi);
}

Vec6 deflection_at(const Frame& frame, const LoadCase& load, const Response& response, int member, double xi,
                   bool of_section) {
  const Inside in = look_inside(frame, load, response, member);
  Vec6 motion = section_motion(in, xi);
  if (!of_section) turn_to_axis(in, xi, motion);
  Vec6 turned;
  turned << in.element.axes.transpose() * motion.head<3>(), in.element.axes.transpose() * motion.tail<3>();
  return turned;
}

Extremes extremes(const Frame& frame, const LoadCase& load, const Response& response, int member) {
  const Inside in = look_inside(frame, load, response, member);
  const std::vector<double> breaks = load_breaks(load, member);
  Extremes e;
  for (std::size_t i = 1; i < breaks.size(); ++i) {
    add_moments(in, breaks[i - 1], breaks[i], e);
    add_deflections(in, breaks[i - 1], breaks[i], e);
  }
  return e;
}

}  // namespace focalframe::fem
