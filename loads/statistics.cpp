#include "loads/statistics.h"

#include <cmath>
#include <limits>
#include <numbers>
#include <stdexcept>

#include "loads/number_text.h"

namespace focalframe::loads {

namespace {

void require(bool holds, const std::string& message) {
  if (!holds) throw std::invalid_argument(message);
}

void validate(const Weibull& wind) {
  require(wind.scale > 0, "Weibull scale must be > 0, found " + number_text(wind.scale));
  require(wind.shape > 0, "Weibull shape must be > 0, found " + number_text(wind.shape));
}

}  // namespace

double return_period_factor(const ReturnPeriod& period) {
  require(period.years > 1,
          "a return period must be longer than one year, found " + number_text(period.years));
  const auto variate = [&](double p) { return 1 - period.shape * std::log(-std::log(1 - p)); };
  return std::pow(variate(1 / period.years) / variate(0.02), period.exponent);
}

double chance_in_life(const Exposure& exposure) {
  require(exposure.return_period > 1, "a return period must be longer than one year");
  return 1 - std::pow(1 - 1 / exposure.return_period, exposure.life);
}

double exceedance(const Weibull& wind, double speed) {
  validate(wind);
  return speed <= 0 ? 1 : std::exp(-std::pow(speed / wind.scale, wind.shape));
}

double mean_speed(const Weibull& wind) {
  validate(wind);
  return wind.scale * std::tgamma(1 + 1 / wind.shape);
}

Weibull rayleigh(double mean_speed) {
  return {.scale = mean_speed * 2 / std::sqrt(std::numbers::pi), .shape = 2};
}

double hours_above(const Weibull& wind, double speed, double hours) {
  return hours * exceedance(wind, speed);
}

double hours_above(const std::vector<double>& record, double speed, double hours) {
  double above = 0, counted = 0;
  for (const double v : record) {
    if (std::isnan(v)) continue;
    counted += 1;
    if (v > speed) above += 1;
  }
  return counted > 0 ? hours * above / counted : std::numeric_limits<double>::quiet_NaN();
}

}  // namespace focalframe::loads
