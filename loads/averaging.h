#pragma once

/// From a speed averaged over one period to the largest one averaged over another.
///
/// A gust factor G(t) is the largest t-second mean within an hour over the hourly mean. Two sources:
/// - Durst's curve for open country (C. S. Durst, 1960, as printed in the ASCE 7 commentary): 1 s 1.57, 3 s
///   1.53, 45 s 1.28 (read second hand), 60 s 1.24, 600 s 1.06 (from memory), 3600 s 1; straight lines in
///   ln t between. Extratropical storms only: tropical cyclones gust 10 to 15 % harder (Harper et al. 2010
///   and later work, read as abstracts), thunderstorms not at all like this.
/// - Wieringa: G(t) = 1 + 0.42 Iu ln(3600 / t) (Burton et al., Wind Energy Handbook, eq. 2.40).

#include <string>

#include "loads/wind.h"

namespace focalframe::loads {

/// G(t) by Durst, averaging [s], 1 .. 3600.
double durst_factor(double averaging);

/// G(t) by Wieringa.
struct GustQuestion {
  double turbulence = 0;   ///< Iu [-]
  double averaging = 600;  ///< [s], 1 .. 3600
};
double wieringa_factor(const GustQuestion& question);

/// Gust speed over the 10 min mean by EN 1991-1-4, 4.5: sqrt(1 + 7 Iv).
double en_gust_ratio(double turbulence);

/// Time a mile of wind takes to pass [s]: the averaging time of a "fastest mile" speed [m/s].
double fastest_mile_averaging(double speed);

/// Factor from a speed averaged over `from` to one averaged over `to`, and how it came about. Turbulence is
/// used by Wieringa only.
struct AveragingChange {
  double from = 600, to = 600;  ///< [s]
};
ChainStep averaging_factor(const AveragingChange& change, GustMethod method, double turbulence);

}  // namespace focalframe::loads
