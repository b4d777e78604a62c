#include "models/intercept.h"

#include <algorithm>
#include <cassert>
#include <cmath>
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

double caught(const BeamSpread& spread, double half_width, double distance, double miss) {
  if (half_width <= 0) return 0;
  return spread.cumulative((half_width - miss) / distance) -
         spread.cumulative(-(half_width + miss) / distance);
}

double caught_slope(const BeamSpread& spread, double half_width, double distance, double miss) {
  if (half_width <= 0) return 0;
  return (spread.density((half_width + miss) / distance) - spread.density((half_width - miss) / distance)) /
         distance;
}

/// One spread for all rows unless longitudinal errors make it depend on the ray angle.
class Spreads {
 public:
  explicit Spreads(const BeamError& error)
      : error_(error), varies_(error.longitudinal_slope_rms > 0 && error.incidence != 0), same_(make(0)) {}

  bool varies() const { return varies_; }
  BeamSpread at(double ray_angle) const { return varies_ ? make(ray_angle) : same_; }

 private:
  BeamSpread make(double ray_angle) const {
    return {error_.sun, 1 / std::cos(error_.incidence), error_rms(error_, ray_angle)};
  }
  const BeamError& error_;
  bool varies_;
  BeamSpread same_;
};

double perfect(const Parabola& parabola, double half_width, const Spreads& spreads, LineReceiver kind) {
  // A spread that varies costs a convolution per point, and is smooth enough for few.
  const Quadrature rule = gauss_legendre(16, spreads.varies() ? 2 : 16, 0, parabola.width / 2);
  const BeamSpread axial = spreads.at(0);
  double sum = 0;
  for (std::size_t i = 0; i < rule.point.size(); ++i) {
    const double y = rule.point[i];
    sum += rule.weight[i] * caught(spreads.varies() ? spreads.at(parabola.ray_angle(y)) : axial,
                                   half_width_seen(parabola, y, half_width, kind),
                                   parabola.local_focal_distance(y), 0);
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
  const Spreads spreads(error);
  for (const double y : rows_y)
    add_row(half_width_seen(parabola, y, receiver_radius, kind), parabola.local_focal_distance(y),
            spreads.at(parabola.ray_angle(y)));
  undeformed_ = perfect(parabola, receiver_radius, spreads, kind);
}

void TroughIntercept::add_row(double half_width, double distance, const BeamSpread& spread) {
  // Below `from` all light is caught, above `to` none; a point beam keeps a band of no practical width.
  const double band = std::max(spread.reach() * distance, 1e-12);
  const double from = std::max(0.0, half_width - band), to = half_width + band;
  const double wanted = spread.detail() > 0 ? (to - from) / (fine_step * spread.detail() * distance) : 1;
  Row row;
  row.knots = 2 + static_cast<std::size_t>(std::min(wanted, static_cast<double>(most_knots)));
  const double step = (to - from) / static_cast<double>(row.knots - 1);
  row.from = from;
  row.per_step = 1 / step;
  row.first = knots_.size();
  for (std::size_t k = 0; k < row.knots; ++k) {
    const double miss = from + step * static_cast<double>(k);
    knots_.push_back({caught(spread, half_width, distance, miss),
                      step * caught_slope(spread, half_width, distance, miss)});
  }
  knots_.back() = {0, 0};
  rows_.push_back(row);
}

double TroughIntercept::at(int row_index, double miss) const {
  const Row& row = rows_[static_cast<std::size_t>(row_index)];
  const double last = static_cast<double>(row.knots - 1);
  // Written so that a NaN miss stays NaN and is not clamped into a plausible number.
  const double t = std::clamp((std::abs(miss) - row.from) * row.per_step, 0.0, last);
  if (!(t < last)) return std::isnan(t) ? t : 0;
  const std::size_t i = std::min(static_cast<std::size_t>(t), row.knots - 2);
  const Knot *a = &knots_[row.first + i], *b = a + 1;
  const double s = t - static_cast<double>(i);
  const double rise = b->value - a->value;
  return a->value +
         s * (a->slope + s * (3 * rise - 2 * a->slope - b->slope + s * (a->slope + b->slope - 2 * rise)));
}

double TroughIntercept::mean(std::span<const double> miss, std::span<const double> weight) const {
  const std::size_t count = rows_.size();
  assert(count > 0 && miss.size() % count == 0);
  assert(weight.size() == miss.size() || weight.size() == count);
  const bool per_sample = weight.size() == miss.size();
  double sum = 0, total = 0;
  for (std::size_t i = 0; i < miss.size(); i += count)
    for (std::size_t j = 0; j < count; ++j) {
      const double share = weight[per_sample ? i + j : j];
      sum += share * at(static_cast<int>(j), miss[i + j]);
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
