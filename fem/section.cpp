#include "fem/section.h"

#include <algorithm>
#include <cmath>
#include <limits>
#include <numbers>

#include "fem/text.h"

namespace focalframe::fem {
namespace {

using std::numbers::pi;

void require_size(double value, const char* what) {
  require(std::isfinite(value) && value > 0, std::string(what) + " " + number(value) + " m must be > 0");
}

std::string mm_text(double value) { return number(value * 1e3); }

struct Torsion {
  double J = 0, Wt = 0;
};

/// St-Venant torsion of a solid rectangle, series in odd n (Timoshenko and Goodier, Theory of Elasticity,
/// art. 109; from memory). The greatest stress is at the middle of the longer side.
Torsion rectangle_torsion(double side_1, double side_2) {
  const double a = std::max(side_1, side_2), b = std::min(side_1, side_2);
  double twist = 0, stress = 0;
  for (int n = 1; n < 60; n += 2) {
    const double argument = n * pi * a / (2 * b);
    twist += std::tanh(argument) / std::pow(n, 5);
    stress += 1 / (static_cast<double>(n) * n * std::cosh(std::min(argument, 700.0)));
  }
  const double J = a * std::pow(b, 3) / 3 * (1 - 192 / std::pow(pi, 5) * b / a * twist);
  return {J, J / (b * (1 - 8 / (pi * pi) * stress))};
}

Section annulus(double outside, double inside) {
  const double D2 = outside * outside, d2 = inside * inside, m = inside / outside;
  const double nu = 0.3;
  Section s;
  s.A = pi / 4 * (D2 - d2);
  s.Iy = s.Iz = s.A * (D2 + d2) / 16;
  s.J = 2 * s.Iy;
  const double q = (1 + m * m) * (1 + m * m);
  const double kappa = 6 * (1 + nu) * q / ((7 + 6 * nu) * q + (20 + 12 * nu) * m * m);  // Cowper 1966
  s.shear_area_y = s.shear_area_z = kappa * s.A;
  s.peak_shear_y = s.peak_shear_z = s.A * 0.75 * (1 + m * m) / (1 + m + m * m);  // V S / (I b) at the axis
  s.Wy = s.Wz = 2 * s.Iy / outside;
  s.Wt = 2 * s.J / outside;
  s.depth_y = s.depth_z = outside;
  s.perimeter = pi * outside;
  s.round = true;
  return s;
}

/// Second moment of a rounded hollow rectangle about the axis normal to `h` (EN 10219-2 Annex B; from
/// memory).
double hollow_inertia(double b, double h, double t, double ro, double ri) {
  const double corner = 12 - 3 * pi;
  const double k = 1.0 / 3 - pi / 16 - 1 / (3 * corner);
  const double c = (10 - 3 * pi) / corner;
  const double Ag = (1 - pi / 4) * ro * ro, Ax = (1 - pi / 4) * ri * ri;
  const double hg = h / 2 - c * ro, hx = (h - 2 * t) / 2 - c * ri;
  return b * h * h * h / 12 - (b - 2 * t) * std::pow(h - 2 * t, 3) / 12 -
         4 * (k * std::pow(ro, 4) + Ag * hg * hg) + 4 * (k * std::pow(ri, 4) + Ax * hx * hx);
}

/// Greatest V S / (I 2t) of a rounded hollow rectangle, as the area V is divided by: S of the half above the
/// axis, corners as in Annex B.
double hollow_peak_area(double b, double h, double t, double ro, double ri, double inertia) {
  const double c = (10 - 3 * pi) / (12 - 3 * pi);
  const double Ag = (1 - pi / 4) * ro * ro, Ax = (1 - pi / 4) * ri * ri;
  const double hg = h / 2 - c * ro, hx = (h - 2 * t) / 2 - c * ri;
  const double half = b * h * h / 8 - (b - 2 * t) * std::pow(h - 2 * t, 2) / 8 - 2 * Ag * hg + 2 * Ax * hx;
  return inertia * 2 * t / half;
}

void require_tube(const RectangularTube& s, double ro, double ri) {
  require_size(s.depth_z, "depth of the rectangular tube");
  require_size(s.width_y, "width of the rectangular tube");
  require_size(s.wall, "wall of the rectangular tube");
  const double least = std::min(s.depth_z, s.width_y);
  require(2 * s.wall < least,
          "wall " + mm_text(s.wall) + " mm must be < half the smaller side, " + mm_text(least / 2) + " mm");
  require(2 * ro <= least, "outer corner radius " + mm_text(ro) + " mm must be <= half the smaller side, " +
                               mm_text(least / 2) + " mm");
  const double opening = least - 2 * s.wall;
  require(2 * ri <= opening, "inner corner radius " + mm_text(ri) +
                                 " mm must be <= half the smaller opening, " + mm_text(opening / 2) + " mm");
  const double metal = std::numbers::sqrt2 * s.wall + (std::numbers::sqrt2 - 1) * (ri - ro);
  require(metal > 0, "corner radii " + mm_text(ro) + " and " + mm_text(ri) +
                         " mm leave no metal in the corners of wall " + mm_text(s.wall) + " mm");
}

}  // namespace

Section round_tube(const RoundTube& size) {
  require_size(size.outside_diameter, "outside diameter of the round tube");
  require_size(size.wall, "wall of the round tube");
  require(size.wall <= size.outside_diameter / 2, "wall " + mm_text(size.wall) + " mm must be <= half of " +
                                                      mm_text(size.outside_diameter) + " mm, the diameter");
  Section s = annulus(size.outside_diameter, size.outside_diameter - 2 * size.wall);
  s.name = "round tube " + mm_text(size.outside_diameter) + " x " + mm_text(size.wall);
  return s;
}

Section round_bar(const RoundBar& size) {
  require_size(size.diameter, "diameter of the round bar");
  Section s = annulus(size.diameter, 0);
  s.name = "round bar " + mm_text(size.diameter);
  return s;
}

Section rectangular_tube(const RectangularTube& size) {
  const double t = size.wall, H = size.depth_z, B = size.width_y;
  const double outer_rule = t <= 6.0e-3 ? 2.0 : t <= 10.0e-3 ? 2.5 : 3.0;  // EN 10219-2 Annex B
  const double ro = size.outer_radius < 0 ? outer_rule * t : size.outer_radius;
  const double ri = size.inner_radius < 0 ? (outer_rule - 1) * t : size.inner_radius;
  require_tube(size, ro, ri);
  Section s;
  s.name = "rectangular tube " + mm_text(H) + " x " + mm_text(B) + " x " + mm_text(t);
  s.A = 2 * t * (B + H - 2 * t) - (4 - pi) * (ro * ro - ri * ri);
  s.Iy = hollow_inertia(B, H, t, ro, ri);
  s.Iz = hollow_inertia(H, B, t, ro, ri);
  s.Wy = 2 * s.Iy / H;
  s.Wz = 2 * s.Iz / B;
  const double Rc = (ro + ri) / 2;
  const double middle_line = 2 * ((B - t) + (H - t)) - 2 * Rc * (4 - pi);
  const double enclosed = (B - t) * (H - t) - Rc * Rc * (4 - pi);
  const double K = 2 * enclosed * t / middle_line;
  s.J = t * t * t * middle_line / 3 + 2 * K * enclosed;
  s.Wt = s.J / (t + K / t);
  s.shear_area_z = s.A * H / (B + H);
  s.shear_area_y = s.A * B / (B + H);
  s.peak_shear_z = hollow_peak_area(B, H, t, ro, ri, s.Iy);
  s.peak_shear_y = hollow_peak_area(H, B, t, ro, ri, s.Iz);
  s.depth_z = H;
  s.depth_y = B;
  s.perimeter = 2 * (B + H) - (8 - 2 * pi) * ro;
  return s;
}

Section flat(const Flat& size) {
  const double h = size.depth_z, t = size.thickness_y;
  require_size(h, "depth of the flat");
  require_size(t, "thickness of the flat");
  const Torsion torsion = rectangle_torsion(h, t);
  Section s;
  s.name = "flat " + mm_text(h) + " x " + mm_text(t);
  s.A = h * t;
  s.Iy = t * h * h * h / 12;
  s.Iz = h * t * t * t / 12;
  s.Wy = t * h * h / 6;
  s.Wz = h * t * t / 6;
  s.J = torsion.J;
  s.Wt = torsion.Wt;
  s.shear_area_y = s.shear_area_z = s.A * 5 / 6;
  s.peak_shear_y = s.peak_shear_z = s.A * 2 / 3;
  s.depth_z = h;
  s.depth_y = t;
  s.perimeter = 2 * (h + t);
  s.closed = std::max(h, t) <= 5 * std::min(h, t);
  return s;
}

namespace {

/// |force| over its area or modulus; NaN when the modulus is not known.
double share(double force, double modulus) {
  if (force == 0) return 0;
  return modulus > 0 ? std::abs(force) / modulus : std::numeric_limits<double>::quiet_NaN();
}

double peak_area(double peak, double shear_area, double area) {
  if (peak > 0) return peak;
  return shear_area > 0 ? 0.8 * shear_area : 0.4 * area;
}

}  // namespace

double von_mises_bound(const Section& section, const Resultants& r) {
  const double bending = section.round ? share(std::sqrt(r.My * r.My + r.Mz * r.Mz), section.Wy)
                                       : share(r.My, section.Wy) + share(r.Mz, section.Wz);
  const double normal = share(r.N, section.A) + bending;
  const double ty = share(r.Vy, peak_area(section.peak_shear_y, section.shear_area_y, section.A));
  const double tz = share(r.Vz, peak_area(section.peak_shear_z, section.shear_area_z, section.A));
  // In solids and closed tubes the two act at right angles or in different walls; in an open wall they add.
  const double transverse = section.closed ? std::sqrt(ty * ty + tz * tz) : ty + tz;
  const double shear = share(r.T, section.Wt) + transverse;
  return std::sqrt(normal * normal + 3 * shear * shear);
}

}  // namespace focalframe::fem
