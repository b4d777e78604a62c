#include "models/error_budget.h"

#include <algorithm>
#include <cmath>
#include <numbers>
#include <stdexcept>
#include <utility>

namespace focalframe::models {

double beam_rms(const BudgetLine& line) {
  const double line_rms_of = line.measure == ErrorMeasure::radial ? line.rms / std::numbers::sqrt2 : line.rms;
  return line.of == ErrorOf::normal ? 2 * line_rms_of : line_rms_of;
}

ErrorBudget add_up(std::vector<BudgetLine> lines) {
  double random = 0, systematic = 0;
  for (const BudgetLine& line : lines)
    (line.nature == ErrorNature::random ? random : systematic) += std::pow(beam_rms(line), 2);
  return {std::move(lines), std::sqrt(random), std::sqrt(systematic)};
}

std::vector<BudgetLine> budget_lines(const BeamError& error) {
  return {{"sun", line_rms(error.sun), ErrorOf::beam, ErrorMeasure::line, ErrorNature::random},
          {"workshop slope", error.slope_rms, ErrorOf::normal, ErrorMeasure::line, ErrorNature::random},
          {"scatter", error.scatter_rms, ErrorOf::beam, ErrorMeasure::line, ErrorNature::random},
          {"tracking", error.tracking_rms, ErrorOf::beam, ErrorMeasure::line, ErrorNature::random}};
}

double aim_tolerance(const TroughIntercept& intercept, std::span<const double> miss,
                     std::span<const double> aim_lever, std::span<const double> weight, double least) {
  if (miss.empty() || aim_lever.empty() || miss.size() % aim_lever.size() != 0)
    throw std::invalid_argument("misses and aim levers do not fit each other");
  std::vector<double> aimed(miss.size());
  const auto worse = [&](double aim) {
    double least_caught = 1;
    for (const double sign : {1.0, -1.0}) {
      for (std::size_t i = 0; i < miss.size(); ++i)
        aimed[i] = miss[i] + sign * aim * aim_lever[i % aim_lever.size()];
      least_caught = std::min(least_caught, intercept.mean(aimed, weight));
    }
    return least_caught;
  };
  if (!(worse(0) >= least)) return 0;
  // First crossing: short steps before halving, for the intercept need not fall steadily.
  constexpr double step = 0.25e-3, far = 0.5;
  double low = 0;
  while (low < far && worse(low + step) >= least) low += step;
  if (low >= far) return far;
  double high = low + step;
  for (int pass = 0; pass < 40; ++pass) {
    const double middle = (low + high) / 2;
    (worse(middle) >= least ? low : high) = middle;
  }
  return low;
}

}  // namespace focalframe::models
