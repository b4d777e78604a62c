#include "models/light_limits.h"

#include <algorithm>
#include <cmath>
#include <functional>

#include "models/first_crossing.h"

namespace focalframe::models {
namespace {

// Speeds at which the light is looked at [m/s of mean], and how many at once. The first block is always
// looked at, for the curve.
constexpr double mean_step = 1.5;
constexpr int first_block = 13, further_block = 6, slope_steps = 5;

struct Asked {
  LimitKey key;
  std::function<double(const OpticalResult&)> margin;
};

std::vector<Asked> asked_limits(const LimitsInput& limits, double undeformed) {
  std::vector<Asked> asked;
  const auto ask = [&](LimitKey key, double given, std::function<double(const OpticalResult&)> margin) {
    if (!std::isnan(given)) asked.push_back({key, std::move(margin)});
  };
  ask(LimitKey::intercept, limits.intercept,
      [=](const OpticalResult& r) { return r.intercept - limits.intercept; });
  ask(LimitKey::lost_to_frame, limits.lost_to_frame,
      [=](const OpticalResult& r) { return limits.lost_to_frame - (undeformed - r.intercept); });
  ask(LimitKey::slope, limits.slope, [=](const OpticalResult& r) { return limits.slope - r.slope; });
  ask(LimitKey::twist, limits.twist, [=](const OpticalResult& r) { return limits.twist - r.worst_twist; });
  ask(LimitKey::receiver_shift, limits.receiver_shift,
      [=](const OpticalResult& r) { return limits.receiver_shift - r.receiver_shift; });
  return asked;
}

class Follower {
 public:
  explicit Follower(const LightQuestion& q)
      : q_(q),
        asked_(asked_limits(q.limits, q.optics.undeformed())),
        samples_(q.patterns.size(), std::vector<Samples>(asked_.size())) {}

  LightAnswer run() {
    for (double from = 0; from <= q_.cap && !done();) from = next_block(from);
    for (std::size_t a = 0; a < asked_.size(); ++a) out_.criteria.push_back(limit(a));
    return std::move(out_);
  }

 private:
  std::vector<OpticalResult> look(int wind, const std::vector<double>& speeds) const {
    Eigen::MatrixXd amplitudes(q_.row.columns().all(), static_cast<int>(speeds.size()));
    for (std::size_t i = 0; i < speeds.size(); ++i)
      amplitudes.col(static_cast<int>(i)) = q_.winds.amplitudes(wind, q_.axis.pressure(speeds[i]));
    return q_.optics.look(q_.pose, amplitudes, OpticsDetail::limits);
  }

  bool done() const {
    if (out_.speed.empty()) return false;
    for (std::size_t a = 0; a < asked_.size(); ++a) {
      bool crossed = asked_[a].key == LimitKey::slope;  // followed on its own
      for (const std::vector<Samples>& pattern : samples_)
        crossed = crossed || *std::min_element(pattern[a].margin.begin(), pattern[a].margin.end()) < 0;
      if (!crossed) return false;
    }
    return true;
  }

  // Returns where the next block begins.
  double next_block(double from) {
    std::vector<double> speeds;
    for (int i = 0; i < (from == 0 ? first_block : further_block) && from <= q_.cap; ++i, from += mean_step)
      speeds.push_back(from);
    if (from > q_.cap && speeds.back() < q_.cap) speeds.push_back(q_.cap);
    std::vector<double> worst(speeds.size(), 1.0);
    for (std::size_t w = 0; w < q_.patterns.size(); ++w) {
      const std::vector<OpticalResult> results = look(q_.patterns[w], speeds);
      for (std::size_t i = 0; i < speeds.size(); ++i) {
        worst[i] = std::min(worst[i], results[i].intercept);
        for (std::size_t a = 0; a < asked_.size(); ++a) {
          if (asked_[a].key == LimitKey::slope) continue;
          samples_[w][a].at.push_back(speeds[i]);
          samples_[w][a].margin.push_back(asked_[a].margin(results[i]));
        }
      }
    }
    out_.speed.insert(out_.speed.end(), speeds.begin(), speeds.end());
    out_.intercept.insert(out_.intercept.end(), worst.begin(), worst.end());
    return from;
  }

  CriterionLimit limit(std::size_t a) const {
    CriterionLimit best;
    best.key = asked_[a].key;
    best.averaging = 600;
    for (std::size_t w = 0; w < q_.patterns.size(); ++w) {
      const int wind = q_.patterns[w];
      const Margin margin = [&](double speed) { return asked_[a].margin(look(wind, {speed})[0]); };
      // An rms of slopes is a norm of something affine in the pressure, so its steps may be wide.
      const double speed = asked_[a].key == LimitKey::slope ? first_crossing(margin, q_.cap, slope_steps)
                                                            : first_crossing(samples_[w][a], margin);
      if (speed >= best.speed) continue;
      best.speed = speed;
      best.gust = speed * q_.axis.gust_over_mean;
      best.spread = q_.winds.wind(wind).spread;
    }
    return best;
  }

  const LightQuestion& q_;
  std::vector<Asked> asked_;
  std::vector<std::vector<Samples>> samples_;  // per pattern and limit
  LightAnswer out_;
};

}  // namespace

LightAnswer light_limits(const LightQuestion& question) { return Follower(question).run(); }

}  // namespace focalframe::models
