#include "models/dish_optics.h"

#include <Eigen/Geometry>
#include <algorithm>
#include <cassert>
#include <cmath>
#include <numbers>
#include <stdexcept>

namespace focalframe::models {

namespace {

using Eigen::Vector3d;

double normal_cumulative(double x) { return std::erfc(-x / std::numbers::sqrt2) / 2; }

/// Mean over a unit Gaussian, exact for polynomials of degree 9 (closed form).
struct Hermite {
  double point, weight;
};
constexpr Hermite hermite[] = {{0, 8.0 / 15},
                               {1.355626179974266, 0.2220759220056126},
                               {-1.355626179974266, 0.2220759220056126},
                               {2.856970013872806, 0.01125741132772069},
                               {-2.856970013872806, 0.01125741132772069}};

const Quadrature& chord_rule() {
  static const Quadrature rule = gauss_legendre(64, 0, 1);
  return rule;
}

}  // namespace

DishMiss dish_miss(const Parabola& parabola, double x, double y, const DishMotion& motion) {
  const double rho = std::hypot(x, y), slope = parabola.slope_angle(rho), psi = 2 * slope;
  // On the axis any meridian will do.
  const Vector3d outward = rho > 0 ? Vector3d(x / rho, y / rho, 0) : Vector3d::UnitX();
  const Vector3d up = Vector3d::UnitZ(), tangent = up.cross(outward);
  const Vector3d normal = std::cos(slope) * up - std::sin(slope) * outward;
  const Vector3d across = std::cos(psi) * outward + std::sin(psi) * up;
  const Vector3d light = -up;
  const Vector3d turned_normal = motion.rotation.cross(normal), turned_light = motion.aim.cross(light);
  const Vector3d turned_ray = turned_light - 2 * turned_light.dot(normal) * normal -
                              2 * (light.dot(turned_normal) * normal + light.dot(normal) * turned_normal);
  const Vector3d apart = motion.displacement - motion.receiver;
  const Vector3d miss = apart + parabola.local_focal_distance(rho) * turned_ray;
  return {miss.dot(across), miss.dot(tangent), -apart.z()};
}

double spot_inside_circle(double radius, double x, double y, double rms_x, double rms_y) {
  if (!(rms_x > 0 && rms_y > 0)) return std::hypot(x, y) < radius ? 1 : 0;
  // Across the narrow width the integrand is the smoother one.
  if (rms_y < rms_x) return spot_inside_circle(radius, y, x, rms_y, rms_x);
  // Chords at x = radius sin u; only those within reach of the spot.
  constexpr double reach = 7;
  const double low = std::max(-1.0, (x - reach * rms_x) / radius);
  const double high = std::min(1.0, (x + reach * rms_x) / radius);
  if (!(low < high)) return 0;
  const double from = std::asin(low), width = std::asin(high) - from;
  const Quadrature& rule = chord_rule();
  double sum = 0;
  for (std::size_t i = 0; i < rule.point.size(); ++i) {
    const double u = from + width * rule.point[i];
    const double half_chord = radius * std::cos(u), away = (radius * std::sin(u) - x) / rms_x;
    sum += rule.weight[i] * half_chord * std::exp(-away * away / 2) *
           (normal_cumulative((half_chord - y) / rms_y) - normal_cumulative((-half_chord - y) / rms_y));
  }
  return sum * width / (rms_x * std::sqrt(2 * std::numbers::pi));
}

DishIntercept::DishIntercept(const Parabola& parabola, double receiver_radius, const BeamError& error,
                             PointReceiver kind)
    : parabola_(parabola), radius_(receiver_radius), error_(error), kind_(kind) {
  if (!(parabola.width > 0 && parabola.focal_length > 0 && receiver_radius > 0))
    throw std::invalid_argument("diameter, focal length and receiver radius must be > 0");
  if (error.incidence != 0 || error.longitudinal_slope_rms != 0)
    throw std::invalid_argument("a dish has no incidence angle and no longitudinal slope error");
  // Tangential slope errors count least at the rim; what exceeds that is not round.
  const double least = 2 * error.slope_rms * std::cos(parabola.slope_angle(parabola.width / 2));
  round_rms_ = std::hypot(least, error.scatter_rms, error.tracking_rms);
  if (error.sun.angle.empty())
    round_rms_ = std::hypot(round_rms_, error.sun.gaussian_rms);
  else
    beam_.emplace(error.sun, round_rms_);
}

double DishIntercept::at(double rho, const DishMiss& miss) const {
  const double psi = parabola_.ray_angle(rho), p = parabola_.local_focal_distance(rho);
  const double steep = std::cos(psi);
  const bool flat = kind_ == PointReceiver::flat;
  if (flat && !(steep > 1e-6)) return 0;
  const double lean = flat ? steep : 1, far = p + (flat ? miss.rise / steep : miss.rise * steep);
  // The receiver as the mirror point sees it: an ellipse of angles.
  const double radial = miss.radial / far, tangential = miss.tangential / far;
  const double semi_radial = radius_ * lean / far, semi_tangential = radius_ / far;
  const double rim_cosine = std::cos(parabola_.slope_angle(parabola_.width / 2)), cosine = std::cos(psi / 2);
  const double slope = 4 * error_.slope_rms * error_.slope_rms;
  const double more_radial = std::max(0.0, slope * (1 - rim_cosine * rim_cosine));
  const double more_tangential = std::max(0.0, slope * (cosine * cosine - rim_cosine * rim_cosine));
  if (!beam_) {
    const double round = round_rms_ * round_rms_;
    return spot_inside_circle(radius_, miss.radial / lean, miss.tangential,
                              std::sqrt(round + more_radial) * far / lean,
                              std::sqrt(round + more_tangential) * far);
  }
  double sum = 0;
  for (const Hermite& a : hermite)
    for (const Hermite& b : hermite)
      sum += a.weight * b.weight *
             beam_->inside_ellipse(radial + a.point * std::sqrt(more_radial),
                                   tangential + b.point * std::sqrt(more_tangential), semi_radial,
                                   semi_tangential);
  return sum;
}

double DishIntercept::mean(std::span<const double> rho, std::span<const DishMiss> miss,
                           std::span<const double> weight) const {
  assert(rho.size() == miss.size() && rho.size() == weight.size());
  double sum = 0, total = 0;
  for (std::size_t i = 0; i < rho.size(); ++i) {
    sum += weight[i] * at(rho[i], miss[i]);
    total += weight[i];
  }
  return sum / total;
}

double DishIntercept::undeformed(double inner_radius) const {
  // Equal steps of rho^2 are equal areas.
  const double rim = parabola_.width / 2;
  const Quadrature rule = gauss_legendre(24, inner_radius * inner_radius, rim * rim);
  double sum = 0;
  for (std::size_t i = 0; i < rule.point.size(); ++i)
    sum += rule.weight[i] * at(std::sqrt(rule.point[i]), {});
  return sum / (rim * rim - inner_radius * inner_radius);
}

double sphere_intercept(const Parabola& parabola, double receiver_radius, double beam_rms) {
  // The distance p is uniform between f and its value at the rim over the aperture's area.
  const double b = receiver_radius / (std::numbers::sqrt2 * beam_rms);
  const auto integral = [b](double p) {
    return p * std::exp(-b * b / (p * p)) - b * std::sqrt(std::numbers::pi) * std::erfc(b / p);
  };
  const double near = parabola.focal_length, far = parabola.local_focal_distance(parabola.width / 2);
  return 1 - (integral(far) - integral(near)) / (far - near);
}

double paraxial_intercept(double focal_length, double receiver_radius, double beam_rms) {
  const double ratio = receiver_radius / (beam_rms * focal_length);
  return -std::expm1(-ratio * ratio / 2);
}

}  // namespace focalframe::models
