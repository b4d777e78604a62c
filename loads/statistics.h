#pragma once

/// How often the wind blows: return periods and a year's hours.

#include <vector>

namespace focalframe::loads {

/// EN 1991-1-4, 4.2: factor from the 50-year speed to another return period,
/// c_prob = ((1 - K ln(-ln(1 - p))) / (1 - K ln(-ln 0.98)))^n, p = 1 / return period.
struct ReturnPeriod {
  double years = 50;      ///< > 1
  double shape = 0.2;     ///< K [-], recommended value
  double exponent = 0.5;  ///< n [-], recommended value
};
double return_period_factor(const ReturnPeriod& period);

/// Probability that a speed of that return period is exceeded at least once in so many years.
struct Exposure {
  double return_period = 50;  ///< [years]
  double life = 25;           ///< [years]
};
double chance_in_life(const Exposure& exposure);

/// Weibull distribution of a year's speeds. Not for extremes: the tail of the parent distribution says
/// nothing about the 50-year wind (Burton et al., Wind Energy Handbook, p. 30).
struct Weibull {
  double scale = 0;  ///< A [m/s]
  double shape = 2;  ///< k [-]; 2 is Rayleigh
};
double exceedance(const Weibull& wind, double speed);  ///< P(V > v) = exp(-(v / A)^k)
double mean_speed(const Weibull& wind);                ///< A Gamma(1 + 1/k) [m/s]
Weibull rayleigh(double mean_speed);                   ///< k = 2 with that mean [m/s]

inline constexpr double hours_per_year = 8760;

/// Hours above a speed in a year, of the hours the distribution stands for (daylight only: about 4380).
double hours_above(const Weibull& wind, double speed, double hours = hours_per_year);

/// The same from a record at equal steps; the share of the record times `hours`. NaN for an empty record;
/// values that are not numbers are left out of record and count.
double hours_above(const std::vector<double>& record, double speed, double hours = hours_per_year);

}  // namespace focalframe::loads
