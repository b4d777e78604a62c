#include "models/shape_fit.h"

#include <Eigen/Core>
#include <algorithm>
#include <cmath>
#include <stdexcept>

#include "models/intercept.h"
#include "models/least_squares.h"

namespace focalframe::models {

namespace {

double by_row(std::span<const double> values, std::size_t i) { return values[i % values.size()]; }

/// Entry of a span with one value in all, per station or per sample.
double by_block(std::span<const double> values, std::size_t i, std::size_t samples) {
  return values.empty() ? 0 : values[i / (samples / values.size())];
}

bool divides(std::span<const double> values, std::size_t samples) {
  return !values.empty() && samples % values.size() == 0;
}

void require_fitting_spans(const TroughSamples& s) {
  const std::size_t n = s.v.size();
  const bool same = n > 0 && s.w.size() == n && s.rotation.size() == n &&
                    (s.longitudinal.empty() || s.longitudinal.size() == n);
  const bool shared = divides(s.y, n) && divides(s.weight, n) &&
                      (s.receiver_v.empty() || divides(s.receiver_v, n)) &&
                      (s.receiver_w.empty() || divides(s.receiver_w, n));
  if (!same || !shared) throw std::invalid_argument("sample arrays of a trough do not fit each other");
}

/// The samples with their geometry looked up and their weights made to add up to 1.
class Fit {
 public:
  Fit(const Parabola& parabola, const TroughSamples& samples)
      : parabola_(parabola), samples_(samples), n_(samples.v.size()), weight_(n_) {
    double total = 0;
    for (std::size_t i = 0; i < n_; ++i) total += weight_[i] = by_row(samples.weight, i);
    if (!(total > 0)) throw std::invalid_argument("sample weights must add up to more than 0");
    for (double& weight : weight_) weight /= total;
  }

  void rigid_motion(TroughShape& shape) {
    const auto rows = static_cast<Eigen::Index>(2 * n_);
    Eigen::MatrixXd a(rows, 3);
    Eigen::VectorXd b(rows);
    for (std::size_t i = 0; i < n_; ++i) {
      const double root = std::sqrt(weight_[i]);
      const auto k = static_cast<Eigen::Index>(2 * i);
      a.row(k) << root, 0, -root * parabola_.height(y(i));
      a.row(k + 1) << 0, root, root * y(i);
      b(k) = root * samples_.v[i];
      b(k + 1) = root * samples_.w[i];
    }
    shape.vertex_v = least_squares(a, b).answer(0);
  }

  void best_parabola(TroughShape& shape) {
    const double f = parabola_.focal_length;
    const auto rows = static_cast<Eigen::Index>(n_);
    Eigen::MatrixXd a(rows, 3);
    Eigen::VectorXd b(rows);
    for (std::size_t i = 0; i < n_; ++i) {
      const double root = std::sqrt(weight_[i]), t = y(i) / (2 * f);
      a.row(static_cast<Eigen::Index>(i)) << root, root * y(i) * (1 + t * t / 2), -root * t * t;
      b(static_cast<Eigen::Index>(i)) = root * (height_error(i) + t * shape.vertex_v);
    }
    const LeastSquares fit = least_squares(a, b);
    shape.vertex_w = fit.answer(0);
    shape.tilt = fit.answer(1);
    shape.focal_change = fit.answer(2);
    shape.rank = fit.rank;
    shape.condition = fit.condition;
    shape.height_rms = (b - a * fit.answer).norm();
  }

  void slopes(TroughShape& shape) const {
    double before = 0, moved = 0, after = 0, deviation = 0, along = 0, worst = 0;
    for (std::size_t i = 0; i < n_; ++i) {
      const double r = parabola_.local_focal_distance(y(i)), t = y(i) / (2 * parabola_.focal_length);
      const double error = slope_error_at_fixed_y(parabola_, y(i), samples_.rotation[i], samples_.v[i]);
      const double left = error - slope_error_at_fixed_y(parabola_, y(i), shape.tilt, rigid_v(shape, i));
      const double rest = left + shape.focal_change * t / r;
      before += weight_[i] * error * error;
      moved += weight_[i] * left * left;
      after += weight_[i] * rest * rest;
      deviation += weight_[i] * 4 * r * r * error * error;
      worst = std::max(worst, std::abs(rest));
      if (!samples_.longitudinal.empty()) along += weight_[i] * std::pow(samples_.longitudinal[i], 2);
    }
    shape.slope_rms = std::sqrt(before);
    shape.slope_rms_moved = std::sqrt(moved);
    shape.slope_rms_after = std::sqrt(after);
    shape.slope_max_after = worst;
    shape.focus_deviation = std::sqrt(deviation);
    if (!samples_.longitudinal.empty()) shape.longitudinal_slope_rms = std::sqrt(along);
  }

  void focus_and_receiver(TroughShape& shape) const {
    const auto rows = static_cast<Eigen::Index>(n_);
    Eigen::MatrixXd a(rows, 2);
    Eigen::VectorXd b(rows);
    double lateral = 0, axial = 0, moment = 0, inertia = 0, square = 0;
    for (std::size_t i = 0; i < n_; ++i) {
      const MissTerms terms = miss_terms(parabola_, y(i));
      const double root = std::sqrt(weight_[i]);
      const double vr = by_block(samples_.receiver_v, i, n_), wr = by_block(samples_.receiver_w, i, n_);
      const double mirror = terms.mirror_v * samples_.v[i] + terms.mirror_w * samples_.w[i] +
                            terms.rotation * samples_.rotation[i];
      const double miss = mirror + terms.receiver_v * vr + terms.receiver_w * wr;
      a.row(static_cast<Eigen::Index>(i)) << root * terms.mirror_v, root * terms.mirror_w;
      b(static_cast<Eigen::Index>(i)) = root * mirror;
      lateral += weight_[i] * vr;
      axial += weight_[i] * wr;
      moment += weight_[i] * terms.aim * miss;
      inertia += weight_[i] * terms.aim * terms.aim;
      square += weight_[i] * miss * miss;
    }
    const LeastSquares line = least_squares(a, b);
    shape.focal_line_v = line.answer(0);
    shape.focal_line_w = line.answer(1);
    shape.receiver_lateral = lateral - (shape.vertex_v - shape.tilt * parabola_.focal_length);
    shape.receiver_axial = axial - shape.vertex_w;
    shape.aim_error = -moment / inertia;
    shape.miss_rms = std::sqrt(square);
  }

 private:
  double y(std::size_t i) const { return by_row(samples_.y, i); }
  double height_error(std::size_t i) const {
    return samples_.w[i] - samples_.v[i] * y(i) / (2 * parabola_.focal_length);
  }
  double rigid_v(const TroughShape& shape, std::size_t i) const {
    return shape.vertex_v - shape.tilt * parabola_.height(y(i));
  }

  const Parabola& parabola_;
  const TroughSamples& samples_;
  std::size_t n_;
  std::vector<double> weight_;
};

}  // namespace

std::vector<double> miss_distances(const Parabola& parabola, const TroughSamples& samples, double aim) {
  require_fitting_spans(samples);
  const std::size_t n = samples.v.size();
  std::vector<double> miss(n);
  for (std::size_t i = 0; i < n; ++i) {
    const MissTerms terms = miss_terms(parabola, by_row(samples.y, i));
    miss[i] = terms.mirror_v * samples.v[i] + terms.mirror_w * samples.w[i] +
              terms.rotation * samples.rotation[i] + terms.receiver_v * by_block(samples.receiver_v, i, n) +
              terms.receiver_w * by_block(samples.receiver_w, i, n) + terms.aim * aim;
  }
  return miss;
}

TroughShape fit_shape(const Parabola& parabola, const TroughSamples& samples) {
  require_fitting_spans(samples);
  TroughShape shape;
  Fit fit(parabola, samples);
  fit.rigid_motion(shape);
  fit.best_parabola(shape);
  fit.slopes(shape);
  fit.focus_and_receiver(shape);
  return shape;
}

TroughMissParts split_miss(const Parabola& parabola, const TroughSamples& samples, const TroughShape& shape,
                           std::span<const double> twist, double aim) {
  const std::vector<double> miss = miss_distances(parabola, samples, aim);
  const std::size_t n = miss.size();
  if (!twist.empty() && !divides(twist, n))
    throw std::invalid_argument("sample arrays of a trough do not fit each other");
  TroughMissParts parts;
  const double f = parabola.focal_length;
  for (std::size_t i = 0; i < n; ++i) {
    const MissTerms terms = miss_terms(parabola, by_row(samples.y, i));
    const double turned = twist.empty() ? shape.tilt : by_block(twist, i, n), more = shape.tilt - turned;
    const double lateral = by_block(samples.receiver_v, i, n) - (shape.vertex_v - turned * f);
    const double axial = by_block(samples.receiver_w, i, n) - shape.vertex_w;
    parts.twist.push_back(terms.aim * (aim - turned));
    parts.tilt.push_back(-more * (terms.aim + f * terms.mirror_v));
    parts.receiver.push_back(terms.receiver_v * lateral + terms.receiver_w * axial);
    parts.focus.push_back(terms.mirror_w * shape.focal_change);
    parts.residual.push_back(miss[i] - parts.twist[i] - parts.tilt[i] - parts.receiver[i] - parts.focus[i]);
  }
  return parts;
}

}  // namespace focalframe::models
