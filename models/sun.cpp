#include "models/sun.h"

#include <algorithm>
#include <cmath>
#include <functional>
#include <numbers>
#include <stdexcept>

#include "models/quadrature.h"

namespace focalframe::models {

namespace {

constexpr double two_pi = 2 * std::numbers::pi;

double normal_density(double x) { return std::exp(-x * x / 2) / std::sqrt(two_pi); }

double normal_cumulative(double x) { return std::erfc(-x / std::numbers::sqrt2) / 2; }

// This many linear pieces leave an error of 2e-6 in the cumulative of the disc.
constexpr int disc_pieces = 400;

using Radiance = std::function<double(double)>;

/// Abel transform of a round source whose radiance is smooth between `breaks` (ascending, first 0).
double projected(const Radiance& radiance, const std::vector<double>& breaks, double s,
                 const Quadrature& unit) {
  double sum = 0;
  for (std::size_t k = 1; k < breaks.size(); ++k) {
    if (breaks[k] <= s) continue;
    // With t^2 = theta^2 - s^2 the integrand is smooth even where theta = s.
    const double inner = std::max(breaks[k - 1], s);
    const double from = std::sqrt(inner * inner - s * s);
    const double width = std::sqrt(breaks[k] * breaks[k] - s * s) - from;
    for (std::size_t i = 0; i < unit.point.size(); ++i)
      sum += width * unit.weight[i] * radiance(std::hypot(s, from + width * unit.point[i]));
  }
  return 2 * sum;
}

/// Knots crowded quadratically at both ends of every interval: the profile has square-root ends there.
std::vector<double> crowded(const std::vector<double>& breaks, const std::vector<int>& pieces) {
  std::vector<double> angle{breaks.front()};
  for (std::size_t k = 1; k < breaks.size(); ++k) {
    for (int i = 1; i <= pieces[k - 1]; ++i) {
      const double t = (1 - std::cos(std::numbers::pi * i / pieces[k - 1])) / 2;
      angle.push_back(breaks[k - 1] + t * (breaks[k] - breaks[k - 1]));
    }
  }
  return angle;
}

double one_side(const SunShape& sun) {
  double sum = 0;
  for (std::size_t k = 1; k < sun.angle.size(); ++k)
    sum += (sun.angle[k] - sun.angle[k - 1]) * (sun.density[k] + sun.density[k - 1]) / 2;
  return sum;
}

SunShape round_sun(const Radiance& radiance, const std::vector<double>& breaks,
                   const std::vector<int>& pieces) {
  SunShape sun;
  sun.angle = crowded(breaks, pieces);
  const Quadrature unit = gauss_legendre(24, 0, 1);
  for (const double s : sun.angle) sun.density.push_back(projected(radiance, breaks, s, unit));
  const double scale = 1 / (2 * one_side(sun));
  for (double& value : sun.density) value *= scale;
  for (const double theta : sun.angle) sun.radiance.push_back(radiance(theta));
  double light = 0;
  for (std::size_t k = 1; k < sun.angle.size(); ++k)
    light += std::numbers::pi * (sun.angle[k] - sun.angle[k - 1]) *
             (sun.angle[k] * sun.radiance[k] + sun.angle[k - 1] * sun.radiance[k - 1]);
  for (double& value : sun.radiance) value /= light;
  return sun;
}

// Buie's shape in mrad, as published.
struct Buie {
  double kappa, gamma;
  explicit Buie(double chi)
      : kappa(0.9 * std::log(13.5 * chi) * std::pow(chi, -0.3)),
        gamma(2.2 * std::log(0.52 * chi) * std::pow(chi, 0.43) - 0.1) {}
  double operator()(double theta) const {
    if (theta <= solar_disc_half_angle * 1e3) return std::cos(0.326 * theta) / std::cos(0.308 * theta);
    return std::exp(kappa) * std::pow(theta, gamma);
  }
};

/// Third antiderivative of the normal density: E[((x - Z)+)^2] / 2.
double ramp_square(double x) { return ((x * x + 1) * normal_cumulative(x) + x * normal_density(x)) / 2; }

/// Second antiderivative: E[(x - Z)+].
double ramp(double x) { return x * normal_cumulative(x) + normal_density(x); }

/// The piecewise linear profile as a sum of ramps c (s - s_k)+, both sides of the axis.
struct Ramps {
  std::vector<double> start, change;
  double wide = 0;

  Ramps(const SunShape& sun, double widening) {
    const std::size_t n = sun.angle.size();
    wide = sun.angle.back() * widening;
    std::vector<double> s, b;
    for (std::size_t k = n; k-- > 1;) add(s, b, -sun.angle[k] * widening, sun.density[k] / widening);
    for (std::size_t k = 0; k < n; ++k) add(s, b, sun.angle[k] * widening, sun.density[k] / widening);
    double slope = 0;
    for (std::size_t k = 0; k + 1 < s.size(); ++k) {
      const double next = (b[k + 1] - b[k]) / (s[k + 1] - s[k]);
      start.push_back(s[k]);
      change.push_back(next - slope);
      slope = next;
    }
    start.push_back(s.back());
    change.push_back(-slope);
  }

  double cumulative(double u, double sigma) const {
    double sum = 0;
    for (std::size_t k = 0; k < start.size(); ++k) sum += change[k] * second(u - start[k], sigma);
    return sum;
  }
  double density(double u, double sigma) const {
    double sum = 0;
    for (std::size_t k = 0; k < start.size(); ++k) sum += change[k] * first(u - start[k], sigma);
    return sum;
  }

 private:
  static void add(std::vector<double>& s, std::vector<double>& b, double angle, double value) {
    s.push_back(angle);
    b.push_back(value);
  }
  // Beyond 9 sigma the Gaussian has no say left and the bare ramp is exact.
  static double first(double x, double sigma) {
    return std::abs(x) < 9 * sigma ? sigma * ramp(x / sigma) : std::max(x, 0.0);
  }
  static double second(double x, double sigma) {
    if (std::abs(x) < 9 * sigma) return sigma * sigma * ramp_square(x / sigma);
    return x > 0 ? (x * x + sigma * sigma) / 2 : 0;
  }
};

}  // namespace

SunShape gaussian_sun(double rms) { return {rms, {}, {}, {}}; }

SunShape pillbox_sun(double half_angle) {
  return round_sun([](double) { return 1.0; }, {0, half_angle}, {disc_pieces});
}

SunShape buie_sun_of_parameter(double chi) {
  const Buie buie(chi);
  // The aureole falls like a power of the angle: intervals growing by a constant factor follow it.
  // A sliver after the disc's edge holds the drop of the radiance there.
  const double edge = solar_disc_half_angle * (1 + 1e-7);
  std::vector<double> breaks{0, solar_disc_half_angle, edge};
  std::vector<int> pieces{disc_pieces, 1};
  for (int k = 1; k <= 4; ++k) {
    breaks.push_back(k == 4 ? aureole_half_angle : edge * std::pow(aureole_half_angle / edge, k / 4.0));
    pieces.push_back(80);
  }
  return round_sun([&buie](double theta) { return buie(theta * 1e3); }, breaks, pieces);
}

double buie_circumsolar_ratio(double chi) {
  const Buie buie(chi);
  const double disc_edge = solar_disc_half_angle * 1e3, outer = aureole_half_angle * 1e3;
  const Quadrature rule = gauss_legendre(32, 0, disc_edge);
  double disc = 0;
  for (std::size_t i = 0; i < rule.point.size(); ++i)
    disc += rule.weight[i] * rule.point[i] * buie(rule.point[i]);
  const double power = buie.gamma + 2;
  // (outer^p - edge^p) / p stays finite as p passes through 0.
  const double span = std::log(outer / disc_edge);
  const double integral =
      std::abs(power) < 1e-9 ? span : std::pow(disc_edge, power) * std::expm1(power * span) / power;
  const double aureole = std::exp(buie.kappa) * integral;
  return aureole / (aureole + disc);
}

double buie_parameter(double circumsolar_ratio) {
  if (!(circumsolar_ratio >= 1e-4 && circumsolar_ratio <= 0.7))
    throw std::invalid_argument("circumsolar ratio must be within 0.0001 and 0.7");
  double low = 1e-3, high = 0.9;
  for (int pass = 0; pass < 60; ++pass) {
    const double middle = (low + high) / 2;
    (buie_circumsolar_ratio(middle) < circumsolar_ratio ? low : high) = middle;
  }
  return (low + high) / 2;
}

SunShape buie_sun(double circumsolar_ratio) {
  return buie_sun_of_parameter(buie_parameter(circumsolar_ratio));
}

SunShape table_sun(std::span<const double> angle, std::span<const double> radiance) {
  if (angle.size() != radiance.size() || angle.size() < 2 || angle[0] != 0)
    throw std::invalid_argument("a sun table needs two equal columns and starts at angle 0");
  double sum = 0;
  for (std::size_t k = 0; k < angle.size(); ++k) {
    if (k > 0 && !(angle[k] > angle[k - 1])) throw std::invalid_argument("sun table angles must ascend");
    if (!(radiance[k] >= 0)) throw std::invalid_argument("sun table radiance must be >= 0");
    sum += radiance[k];
  }
  if (!(sum > 0)) throw std::invalid_argument("sun table must hold some light");
  const auto linear = [&](double theta) {
    const auto after = std::upper_bound(angle.begin() + 1, angle.end() - 1, theta) - angle.begin();
    const auto k = static_cast<std::size_t>(after);
    const double t = (theta - angle[k - 1]) / (angle[k] - angle[k - 1]);
    return radiance[k - 1] + t * (radiance[k] - radiance[k - 1]);
  };
  const int per_interval = std::max(8, static_cast<int>(600 / (angle.size() - 1)));
  return round_sun(linear, {angle.begin(), angle.end()}, std::vector<int>(angle.size() - 1, per_interval));
}

double line_rms(const SunShape& sun) {
  if (sun.angle.empty()) return sun.gaussian_rms;
  double sum = 0;
  for (std::size_t k = 1; k < sun.angle.size(); ++k) {
    const double a = sun.angle[k - 1], b = sun.angle[k], p = sun.density[k - 1], q = sun.density[k];
    // Exact integral of s^2 over a linear piece.
    sum += (b - a) / 12 * (p * (3 * a * a + 2 * a * b + b * b) + q * (a * a + 2 * a * b + 3 * b * b));
  }
  return std::sqrt(2 * sum);
}

BeamSpread::BeamSpread(const SunShape& sun, double widening, double error_rms) {
  constexpr double far = 7.2;  // normal_cumulative(-7.2) = 3e-13
  if (sun.angle.empty()) {
    gaussian_rms_ = detail_ = std::hypot(sun.gaussian_rms * widening, error_rms);
    reach_ = far * gaussian_rms_;
    return;
  }
  const Ramps ramps(sun, widening);
  reach_ = ramps.wide + far * error_rms;
  detail_ = std::max(error_rms, 1e-3 * ramps.wide);
  const int steps = static_cast<int>(std::ceil(std::min(reach_ / (0.05 * detail_), 6000.0)));
  step_ = reach_ / steps;
  for (int k = 0; k <= steps; ++k)
    table_.push_back({ramps.cumulative(k * step_, error_rms), ramps.density(k * step_, error_rms)});
  table_.back() = {1, 0};
}

double BeamSpread::cumulative(double angle) const {
  if (table_.empty()) {
    if (gaussian_rms_ > 0) return normal_cumulative(angle / gaussian_rms_);
    return angle > 0 ? 1 : angle < 0 ? 0 : 0.5;
  }
  if (angle < 0) return 1 - cumulative(-angle);
  if (angle >= reach_) return 1;
  const double t = angle / step_;
  const std::size_t i = std::min(static_cast<std::size_t>(t), table_.size() - 2);
  const double s = t - static_cast<double>(i);
  const double p = table_[i].value, q = table_[i + 1].value, rise = q - p;
  const double a = step_ * table_[i].density, b = step_ * table_[i + 1].density;
  return p + s * (a + s * (3 * rise - 2 * a - b + s * (a + b - 2 * rise)));
}

double BeamSpread::density(double angle) const {
  if (table_.empty()) return gaussian_rms_ > 0 ? normal_density(angle / gaussian_rms_) / gaussian_rms_ : 0;
  if (std::abs(angle) >= reach_) return 0;
  const double t = std::abs(angle) / step_;
  const std::size_t i = std::min(static_cast<std::size_t>(t), table_.size() - 2);
  const double s = t - static_cast<double>(i);
  const double rise = table_[i + 1].value - table_[i].value;
  const double a = step_ * table_[i].density, b = step_ * table_[i + 1].density;
  return (a + s * (2 * (3 * rise - 2 * a - b) + 3 * s * (a + b - 2 * rise))) / step_;
}

}  // namespace focalframe::models
