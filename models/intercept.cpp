#include "models/intercept.h"

#include <algorithm>
#include <cassert>
#include <cmath>
#include <numbers>
#include <stdexcept>

#include "models/quadrature.h"

namespace focalframe::models {

namespace {

// A cubic Hermite step of 0.05 of the Gaussian keeps the table's error near 1e-8.
constexpr double fine_step = 0.05;
constexpr std::size_t most_knots = 4096;

double half_width_seen(const Parabola& parabola, double y, double half_width, LineReceiver kind) {
  if (kind == LineReceiver::tube) return half_width;
  return half_width * std::max(0.0, std::cos(parabola.ray_angle(y)));
}

/// The share caught and its slope over the miss.
struct Caught {
  double value = 0, slope = 0;
};

Caught caught(const BeamSpread& spread, double half_width, double distance, double miss) {
  const double right = (half_width - miss) / distance, left = (half_width + miss) / distance;
  return {spread.cumulative(right) - spread.cumulative(-left),
          (spread.density(left) - spread.density(right)) / distance};
}

/// One spread for all rows unless longitudinal errors make it depend on the ray angle; then spreads at
/// Chebyshev points of the variance, between which it is interpolated (it is a smooth function of the
/// variance).
class Spreads {
 public:
  Spreads(const BeamError& error, double rim_angle) : error_(error) {
    const double least = variance(0), most = variance(rim_angle);
    const int nodes = most > least ? 9 : 1;
    for (int k = 0; k < nodes; ++k) {
      const double t = nodes > 1 ? std::cos(std::numbers::pi * k / (nodes - 1)) : 0;
      variances_.push_back((least + most) / 2 + t * (most - least) / 2);
      spreads_.emplace_back(error.sun, 1 / std::cos(error.incidence), std::sqrt(variances_.back()));
      reach_ = std::max(reach_, spreads_.back().reach());
      detail_ = k == 0 ? spreads_.back().detail() : std::min(detail_, spreads_.back().detail());
    }
  }

  double reach() const { return reach_; }
  double detail() const { return detail_; }

  Caught at(double ray_angle, double half_width, double distance, double miss) const {
    if (half_width <= 0) return {};
    Caught sum;
    for (std::size_t k = 0; k < spreads_.size(); ++k) {
      const double share = weight(k, variance(ray_angle));
      if (share == 0) continue;
      const Caught one = caught(spreads_[k], half_width, distance, miss);
      sum.value += share * one.value;
      sum.slope += share * one.slope;
    }
    return sum;
  }

 private:
  double variance(double ray_angle) const { return std::pow(error_rms(error_, ray_angle), 2); }
  double weight(std::size_t k, double variance) const {
    double product = 1;
    for (std::size_t i = 0; i < variances_.size(); ++i)
      if (i != k) product *= (variance - variances_[i]) / (variances_[k] - variances_[i]);
    return product;
  }

  const BeamError& error_;
  std::vector<double> variances_;
  std::vector<BeamSpread> spreads_;
  double reach_ = 0, detail_ = 0;
};

double perfect(const Parabola& parabola, double half_width, const Spreads& spreads, LineReceiver kind) {
  const Quadrature rule = gauss_legendre(16, 16, 0, parabola.width / 2);
  double sum = 0;
  for (std::size_t i = 0; i < rule.point.size(); ++i) {
    const double y = rule.point[i];
    sum += rule.weight[i] * spreads
                                .at(parabola.ray_angle(y), half_width_seen(parabola, y, half_width, kind),
                                    parabola.local_focal_distance(y), 0)
                                .value;
  }
  return 2 * sum / parabola.width;
}

}  // namespace

MissTerms miss_terms(const Parabola& parabola, double y) {
  const double phi = parabola.ray_angle(y), r = parabola.local_focal_distance(y);
  return {std::cos(phi), std::sin(phi), -2 * r, -std::cos(phi), -std::sin(phi), r};
}

double slope_error_at_fixed_y(const Parabola& parabola, double y, double rotation, double v) {
  return rotation - v / (2 * parabola.local_focal_distance(y));
}

double error_rms(const BeamError& error, double ray_angle) {
  const double along = 2 * error.longitudinal_slope_rms * std::tan(error.incidence) * std::sin(ray_angle / 2);
  return std::hypot(std::hypot(2 * error.slope_rms, error.scatter_rms / std::cos(error.incidence)),
                    std::hypot(error.tracking_rms, along));
}

double total_rms(const BeamError& error, double ray_angle) {
  return std::hypot(line_rms(error.sun) / std::cos(error.incidence), error_rms(error, ray_angle));
}

TroughIntercept::TroughIntercept(const Parabola& parabola, double receiver_radius, const BeamError& error,
                                 std::vector<double> rows_y, LineReceiver kind) {
  if (!(parabola.width > 0 && parabola.focal_length > 0 && receiver_radius > 0))
    throw std::invalid_argument("aperture, focal length and receiver radius must be > 0");
  if (!(std::abs(error.incidence) < 1.57)) throw std::invalid_argument("incidence must be below 90 deg");
  double rim_angle = parabola.rim_angle();
  for (const double y : rows_y) rim_angle = std::max(rim_angle, std::abs(parabola.ray_angle(y)));
  const Spreads spreads(error, rim_angle);
  for (const double y : rows_y) {
    const double phi = parabola.ray_angle(y), distance = parabola.local_focal_distance(y);
    const double half_width = half_width_seen(parabola, y, receiver_radius, kind);
    // Below `from` all light is caught, above `to` none; a point beam keeps a band of no practical width.
    const double band = std::max(spreads.reach() * distance, 1e-12);
    const double from = std::max(0.0, half_width - band), to = half_width + band;
    const double wanted = spreads.detail() > 0 ? (to - from) / (fine_step * spreads.detail() * distance) : 1;
    Row row;
    row.knots = 2 + static_cast<std::size_t>(std::min(wanted, static_cast<double>(most_knots)));
    const double step = (to - from) / static_cast<double>(row.knots - 1);
    row.from = from;
    row.per_step = 1 / step;
    row.first = knots_.size();
    for (std::size_t k = 0; k < row.knots; ++k) {
      const Caught here = spreads.at(phi, half_width, distance, from + step * static_cast<double>(k));
      knots_.push_back({here.value, step * here.slope});
    }
    knots_.back() = {0, 0};
    rows_.push_back(row);
  }
  undeformed_ = perfect(parabola, receiver_radius, spreads, kind);
}

double TroughIntercept::value(const Row& row, double miss) const {
  const double last = static_cast<double>(row.knots - 1);
  // std::max keeps its first argument when that is NaN: a NaN miss does not become a plausible number.
  const double t = std::max((std::abs(miss) - row.from) * row.per_step, 0.0);
  if (!(t < last)) return std::isnan(miss) ? miss : 0;
  const auto i = static_cast<std::size_t>(t);
  const Knot *a = &knots_[row.first + i], *b = a + 1;
  const double s = t - static_cast<double>(i);
  const double rise = b->value - a->value;
  return a->value +
         s * (a->slope + s * (3 * rise - 2 * a->slope - b->slope + s * (a->slope + b->slope - 2 * rise)));
}

double TroughIntercept::at(int row, double miss) const {
  return value(rows_[static_cast<std::size_t>(row)], miss);
}

double TroughIntercept::mean(std::span<const double> miss, std::span<const double> weight) const {
  const std::size_t count = rows_.size();
  assert(count > 0 && miss.size() % count == 0);
  assert(weight.size() == miss.size() || weight.size() == count);
  const bool per_sample = weight.size() == miss.size();
  double sum = 0, total = 0;
  // Row by row, so that one row's table stays at hand for all its samples.
  for (std::size_t j = 0; j < count; ++j)
    for (std::size_t i = j; i < miss.size(); i += count) {
      const double share = weight[per_sample ? i : j];
      sum += share * value(rows_[j], miss[i]);
      total += share;
    }
  return sum / total;
}

double acceptance(const Parabola& parabola, double receiver_radius, double angle) {
  // |angle| r(y) <= R holds on |y| up to 2f sqrt(R/(f |angle|) - 1).
  const double ratio = receiver_radius / (parabola.focal_length * std::abs(angle));
  if (!(ratio > 1)) return 0;
  return std::min(1.0, 4 * parabola.focal_length / parabola.width * std::sqrt(ratio - 1));
}

double end_loss(const Parabola& parabola, double row_length, double incidence, double overhang) {
  const Quadrature rule = gauss_legendre(8, 64, 0, parabola.width / 2);
  double sum = 0;
  for (std::size_t i = 0; i < rule.point.size(); ++i) {
    const double run = parabola.local_focal_distance(rule.point[i]) * std::tan(std::abs(incidence));
    sum += rule.weight[i] * std::clamp(run - overhang, 0.0, row_length);
  }
  return 2 * sum / (parabola.width * row_length);
}

}  // namespace focalframe::models
