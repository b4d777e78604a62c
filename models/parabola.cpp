#include "models/parabola.h"

#include <cmath>
#include <numbers>

namespace focalframe::models {

double Parabola::height(double y) const { return y * y / (4 * focal_length); }

double Parabola::slope_angle(double y) const { return std::atan(y / (2 * focal_length)); }

double Parabola::ray_angle(double y) const { return 2 * slope_angle(y); }

double Parabola::local_focal_distance(double y) const { return focal_length + height(y); }

double Parabola::rim_angle() const { return ray_angle(width / 2); }

double Parabola::depth() const { return height(width / 2); }

double Parabola::arc_length() const {
  const double t = width / (4 * focal_length);
  return 2 * focal_length * (t * std::sqrt(1 + t * t) + std::asinh(t));
}

double Parabola::mean_local_focal_distance() const {
  return focal_length + width * width / (48 * focal_length);
}

double focal_length_from_depth(double width, double depth) { return width * width / (16 * depth); }

double concentration(const Parabola& parabola, double receiver_diameter) {
  return parabola.width / (std::numbers::pi * receiver_diameter);
}

double aperture_ratio(const Parabola& parabola, double receiver_diameter) {
  return parabola.width / receiver_diameter;
}

double least_receiver_diameter(const Parabola& parabola, double half_angle) {
  return 2 * parabola.local_focal_distance(parabola.width / 2) * std::sin(half_angle);
}

}  // namespace focalframe::models
