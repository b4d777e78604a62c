#include "fem/section_profiles.h"

#include <algorithm>
#include <array>
#include <cmath>
#include <numbers>
#include <utility>

#include "fem/text.h"

namespace focalframe::fem {
namespace {

using std::numbers::pi;

/// Area moments about the heel, summed over simple shapes.
struct Moments {
  double A = 0, Sy = 0, Sz = 0;      // area, integral of y, integral of z
  double Iyy = 0, Izz = 0, Iyz = 0;  // integrals of y^2, z^2, y z

  void rectangle(double y0, double y1, double z0, double z1) {
    add((y1 - y0) * (z1 - z0), (y0 + y1) / 2, (z0 + z1) / 2, (z1 - z0) * std::pow(y1 - y0, 3) / 12,
        (y1 - y0) * std::pow(z1 - z0, 3) / 12, 0);
  }
  /// Square of side r less the quarter circle about its far corner; its own corner lies at (y, z) and the
  /// square extends along (sy, sz). Constants as in EN 10219-2 Annex B, the product moment computed here.
  void spandrel(double y, double z, double sy, double sz, double r, double sign) {
    const double a = (1 - pi / 4) * r * r, c = (10 - 3 * pi) / (12 - 3 * pi) * r;
    const double own = (1.0 / 3 - pi / 16 - 1 / (3 * (12 - 3 * pi))) * std::pow(r, 4);
    const double product = (19.0 / 24 - pi / 4) * std::pow(r, 4) - a * c * c;
    add(sign * a, y + sy * c, z + sz * c, sign * own, sign * own, sign * sy * sz * product);
  }

 private:
  void add(double area, double y, double z, double own_yy, double own_zz, double own_yz) {
    A += area;
    Sy += area * y;
    Sz += area * z;
    Iyy += own_yy + area * y * y;
    Izz += own_zz + area * z * z;
    Iyz += own_yz + area * y * z;
  }
};

struct Point {
  double y = 0, z = 0;
};

/// Shear area over area of a thin open section of one stroke: I^2 / int (Q^2 / t) ds over int t ds, Q the
/// first moment of what lies before (shear-flow theory). Exact: Q is quadratic in s along a straight part.
template <std::size_t parts>
double shear_flow_ratio(const std::array<Point, parts + 1>& corner, const std::array<double, parts>& wall,
                        const Point& across) {
  std::array<double, parts> length{}, start{}, slope{};  // of the distance along `across`, per part
  double area = 0, first = 0, second = 0;
  for (std::size_t i = 0; i < parts; ++i) {
    const Point &a = corner[i], &b = corner[i + 1];
    length[i] = std::hypot(b.y - a.y, b.z - a.z);
    start[i] = a.y * across.y + a.z * across.z;
    slope[i] = ((b.y - a.y) * across.y + (b.z - a.z) * across.z) / length[i];
    const double middle = start[i] + slope[i] * length[i] / 2, own = wall[i] * length[i];
    area += own;
    first += own * middle;
    second += own * (middle * middle + std::pow(slope[i] * length[i], 2) / 12);
  }
  const double centre = first / area, I = second - area * centre * centre;
  double before = 0, energy = 0;
  for (std::size_t i = 0; i < parts; ++i) {
    const auto Q = [&](double s) { return before + wall[i] * s * (start[i] - centre + slope[i] * s / 2); };
    // Gauss, three points: exact for the quartic Q^2.
    const double reach = std::sqrt(0.6) / 2, L = length[i];
    energy += L / wall[i] *
              (5 * std::pow(Q(L * (0.5 - reach)), 2) + 8 * std::pow(Q(L / 2), 2) +
               5 * std::pow(Q(L * (0.5 + reach)), 2)) /
              18;
    before = Q(L);
  }
  return I * I / energy / area;
}

void require_positive(double value, const char* what) {
  require(std::isfinite(value) && value > 0, std::string(what) + " " + number(value) + " m must be > 0");
}

std::string mm_text(double value) { return number(value * 1e3); }

}  // namespace

AngleSection angle(const Angle& size) {
  const double a = size.leg_z, b = size.leg_y, t = size.thickness, r1 = size.root_radius,
               r2 = size.toe_radius;
  require_positive(a, "leg of the angle");
  require_positive(b, "leg of the angle");
  require_positive(t, "thickness of the angle");
  require(t < std::min(a, b),
          "thickness " + mm_text(t) + " mm must be < the shorter leg, " + mm_text(std::min(a, b)) + " mm");
  require(r1 >= 0 && r2 >= 0 && r2 <= t && r1 + r2 <= std::min(a, b) - t,
          "radii " + mm_text(r1) + " and " + mm_text(r2) +
              " mm must be >= 0, the toe's <= the thickness and both together <= the free leg");
  Moments m;
  m.rectangle(0, t, 0, a);
  m.rectangle(t, b, 0, t);
  m.spandrel(t, t, 1, 1, r1, 1);
  m.spandrel(t, a, -1, -1, r2, -1);
  m.spandrel(b, t, -1, -1, r2, -1);
  AngleSection s;
  s.centroid_y = m.Sy / m.A;
  s.centroid_z = m.Sz / m.A;
  s.Iy_leg = m.Izz - m.A * s.centroid_z * s.centroid_z;
  s.Iz_leg = m.Iyy - m.A * s.centroid_y * s.centroid_y;
  const double product = m.Iyz - m.A * s.centroid_y * s.centroid_z;
  const double mean = (s.Iy_leg + s.Iz_leg) / 2, radius = std::hypot((s.Iy_leg - s.Iz_leg) / 2, product);
  // I about an axis turned by tilt is mean + (Iy - Iz)/2 cos 2 tilt - product sin 2 tilt: greatest here.
  s.tilt = std::atan2(-product, (s.Iy_leg - s.Iz_leg) / 2) / 2;
  Section& p = s.section;
  p.name = "angle " + mm_text(a) + " x " + mm_text(b) + " x " + mm_text(t);
  p.A = m.A;
  p.Iy = mean + radius;
  p.Iz = mean - radius;
  p.J = (a + b - t) * t * t * t / 3;
  p.Wt = p.J / t;
  const std::array<Point, 3> legs{{{0, a - t / 2}, {0, 0}, {b - t / 2, 0}}};
  const double along = std::cos(s.tilt), aside = std::sin(s.tilt);
  p.shear_area_y = p.A * shear_flow_ratio<2>(legs, {t, t}, {along, aside});
  p.shear_area_z = p.A * shear_flow_ratio<2>(legs, {t, t}, {-aside, along});
  double reach_y = 0, reach_z = 0, low_y = 0, high_y = 0, low_z = 0, high_z = 0;
  const std::array<std::pair<double, double>, 5> corners{{{0, 0}, {0, a}, {t, a}, {b, 0}, {b, t}}};
  for (const auto& [y, z] : corners) {
    const double dy = y - s.centroid_y, dz = z - s.centroid_z;
    const double u = dy * std::cos(s.tilt) + dz * std::sin(s.tilt),
                 v = dz * std::cos(s.tilt) - dy * std::sin(s.tilt);
    reach_y = std::max(reach_y, std::abs(u));
    reach_z = std::max(reach_z, std::abs(v));
    low_y = std::min(low_y, u), high_y = std::max(high_y, u);
    low_z = std::min(low_z, v), high_z = std::max(high_z, v);
  }
  p.Wy = p.Iy / reach_z;
  p.Wz = p.Iz / reach_y;
  p.depth_y = high_y - low_y;
  p.depth_z = high_z - low_z;
  p.perimeter = 2 * (a + b) - (2 - pi / 2) * (r1 + 2 * r2);
  p.closed = false;
  return s;
}

ChannelSection channel(const Channel& size) {
  const double h = size.depth_z, b = size.flange_y, tw = size.web, tf = size.flange;
  require_positive(h, "depth of the channel");
  require_positive(b, "flange width of the channel");
  require_positive(tw, "web thickness of the channel");
  require_positive(tf, "flange thickness of the channel");
  require(2 * tf < h,
          "flange thickness " + mm_text(tf) + " mm must be < half the depth, " + mm_text(h / 2) + " mm");
  require(tw < b, "web thickness " + mm_text(tw) + " mm must be < the flange width, " + mm_text(b) + " mm");
  Moments m;
  m.rectangle(0, tw, -h / 2, h / 2);
  m.rectangle(tw, b, h / 2 - tf, h / 2);
  m.rectangle(tw, b, -h / 2, tf - h / 2);
  ChannelSection c;
  c.centroid_y = m.Sy / m.A;
  Section& s = c.section;
  s.name = "channel " + mm_text(h) + " x " + mm_text(b) + " x " + mm_text(tw) + " x " + mm_text(tf);
  s.A = m.A;
  s.Iy = m.Izz;
  s.Iz = m.Iyy - m.A * c.centroid_y * c.centroid_y;
  s.J = ((h - 2 * tf) * tw * tw * tw + 2 * b * tf * tf * tf) / 3;
  s.Wt = s.J / std::max(tw, tf);
  const double half = (h - tf) / 2, reach = b - tw / 2;
  const std::array<Point, 4> line{{{reach, -half}, {0, -half}, {0, half}, {reach, half}}};
  s.shear_area_y = s.A * shear_flow_ratio<3>(line, {tf, tw, tf}, {1, 0});
  s.shear_area_z = s.A * shear_flow_ratio<3>(line, {tf, tw, tf}, {0, 1});
  s.Wy = s.Iy / (h / 2);
  s.Wz = s.Iz / std::max(c.centroid_y, b - c.centroid_y);
  s.depth_y = b;
  s.depth_z = h;
  s.perimeter = 2 * h + 4 * b - 2 * tw;
  s.closed = false;
  // Thin-walled: e = 3 b'^2 tf / (h' tw + 6 b' tf) behind the web's middle line (Timoshenko; from memory).
  const double b1 = b - tw / 2, h1 = h - tf;
  const double behind = 3 * b1 * b1 * tf / (h1 * tw + 6 * b1 * tf);
  c.shear_centre_y = tw / 2 - behind - c.centroid_y;
  return c;
}

}  // namespace focalframe::fem
