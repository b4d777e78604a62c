#pragma once

/// The first place where a margin becomes negative, for functions that need not be monotone: weight and wind
/// may cancel before they add, and a gust sweeps every speed below its own.

#include <functional>
#include <vector>

namespace focalframe::models {

/// Margin as a function of speed; >= 0 means the limit is met. Must be continuous.
using Margin = std::function<double(double)>;

/// Margins already known at ascending places, the first one 0.
struct Samples {
  std::vector<double> at, margin;
};

/// The greatest x such that the margin is not negative anywhere from 0 to x, to a relative 1e-9 (absolute
/// 1e-9 below 1): 0 when it is negative at 0, infinity when it is never negative up to the last sample.
/// Between samples the sign is followed where they differ; where a sample is a local least, the dip around it
/// is searched too. What is narrower than two steps and shows in no sample is not seen: choose steps that the
/// function cannot turn within.
double first_crossing(const Samples& samples, const Margin& margin);

/// The same, sampling at `steps` equal steps up to `most`, lowest first and no further than needed.
double first_crossing(const Margin& margin, double most, int steps);

}  // namespace focalframe::models
