#include "models/round_beam.h"

#include <algorithm>
#include <array>
#include <cmath>
#include <numbers>
#include <stdexcept>

namespace focalframe::models {

namespace {

/// exp(-z) I0(z).
double scaled_bessel(double z) {
  if (z < 30) return std::exp(-z) * std::cyl_bessel_i(0.0, z);
  // Asymptotic series; the first term left out is below 2e-7 here.
  const double w = 1 / (8 * z);
  return (1 + w * (1 + w * 4.5 * (1 + w * 25.0 / 3))) / std::sqrt(2 * std::numbers::pi * z);
}

/// Weights of four neighbouring knots for the cubic through them; s counts from the second.
std::array<double, 4> cubic_weights(double s) {
  return {-s * (s - 1) * (s - 2) / 6, (s + 1) * (s - 1) * (s - 2) / 2, -(s + 1) * s * (s - 2) / 2,
          (s + 1) * s * (s - 1) / 6};
}

/// The second of the four knots around t >= 0, with room for the other three.
std::size_t second_knot(double t, std::size_t knots) {
  return std::clamp<std::size_t>(static_cast<std::size_t>(t), 1, knots - 3);
}

double convolved(const SunShape& sun, double sigma, double rho) {
  const auto value = [&](std::size_t k) {
    const double theta = sun.angle[k], away = (rho - theta) / sigma;
    if (std::abs(away) > 9) return 0.0;
    return sun.radiance[k] * theta * std::exp(-away * away / 2) *
           scaled_bessel(rho * theta / (sigma * sigma));
  };
  double sum = 0, before = value(0);
  for (std::size_t k = 1; k < sun.angle.size(); ++k) {
    const double after = value(k);
    sum += (sun.angle[k] - sun.angle[k - 1]) * (before + after) / 2;
    before = after;
  }
  return sum / (sigma * sigma);
}

}  // namespace

RoundBeam::RoundBeam(const SunShape& sun, double error_rms) : rule_(gauss_legendre(40, 0, 1)) {
  if (sun.angle.empty() || !(error_rms > 0))
    throw std::invalid_argument("a tabulated beam needs a sun that is not Gaussian and an error > 0");
  disc_ = std::min(sun.angle.back(), solar_disc_half_angle) + 4 * error_rms;
  reach_ = sun.angle.back() + 7 * error_rms;
  step_ = std::max(0.1 * error_rms, reach_ / 800);
  fine_ = step_ / 2;
  side_ = static_cast<std::size_t>(reach_ / step_) + 4;
  // The corner of the square table lies sqrt 2 out.
  const auto knots = static_cast<std::size_t>(1.42 * static_cast<double>(side_) * step_ / fine_) + 4;
  for (std::size_t k = 0; k < knots; ++k) {
    const double rho = static_cast<double>(k) * fine_;
    density_.push_back(rho < reach_ + 2 * error_rms ? convolved(sun, error_rms, rho) : 0);
  }
  strip_.resize(side_ * side_);
  for (std::size_t i = 0; i < side_; ++i) {
    const double x = static_cast<double>(i) * step_;
    double sum = 0, before = density(x);
    for (std::size_t j = 1; j < side_; ++j) {
      const double y = static_cast<double>(j) * step_, after = density(std::hypot(x, y));
      sum += step_ / 6 * (before + 4 * density(std::hypot(x, y - step_ / 2)) + after);
      strip_[i * side_ + j] = sum;
      before = after;
    }
  }
}

double RoundBeam::density(double angle) const {
  const double t = std::abs(angle) / fine_;
  if (!(t < static_cast<double>(density_.size() - 2))) return 0;
  const std::size_t k = second_knot(t, density_.size());
  const auto weight = cubic_weights(t - static_cast<double>(k));
  double sum = 0;
  for (std::size_t i = 0; i < 4; ++i) sum += weight[i] * density_[k - 1 + i];
  return sum;
}

double RoundBeam::strip(double x, double y) const {
  const double last = static_cast<double>(side_ - 2);
  const double across = std::abs(x) / step_, along = std::min(std::abs(y) / step_, last);
  if (!(across < last)) return 0;
  const std::size_t i = second_knot(across, side_), j = second_knot(along, side_);
  const auto wx = cubic_weights(across - static_cast<double>(i));
  const auto wy = cubic_weights(along - static_cast<double>(j));
  double sum = 0;
  for (std::size_t a = 0; a < 4; ++a)
    for (std::size_t b = 0; b < 4; ++b) sum += wx[a] * wy[b] * strip_[(i - 1 + a) * side_ + j - 1 + b];
  return std::copysign(sum, y);
}

double RoundBeam::inside_ellipse(double centre_x, double centre_y, double semi_x, double semi_y) const {
  // Chords at x = centre + semi sin u; the disc gets its own panel, being much narrower than the aureole.
  const std::array<double, 4> breaks{-reach_, -std::min(disc_, reach_), std::min(disc_, reach_), reach_};
  double sum = 0;
  for (std::size_t panel = 0; panel < 3; ++panel) {
    const double low = std::clamp((breaks[panel] - centre_x) / semi_x, -1.0, 1.0);
    const double high = std::clamp((breaks[panel + 1] - centre_x) / semi_x, -1.0, 1.0);
    if (!(low < high)) continue;
    const double from = std::asin(low), width = std::asin(high) - from;
    for (std::size_t i = 0; i < rule_.point.size(); ++i) {
      const double u = from + width * rule_.point[i];
      const double x = centre_x + semi_x * std::sin(u), half = semi_y * std::cos(u);
      sum += rule_.weight[i] * width * semi_x * std::cos(u) *
             (strip(x, centre_y + half) - strip(x, centre_y - half));
    }
  }
  return sum;
}

}  // namespace focalframe::models
