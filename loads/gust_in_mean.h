#pragma once

/// The largest 3 s gust within a period over the period's mean speed, as an anemometer on site sees it, and
/// Beaufort's scale for those who have none.
///
/// Gust factors: WMO/TD-1555 (Harper, Kepert, Ginger 2010), classes in-land, off-land and off-sea, near 10 m;
/// from memory. Extratropical winds; thunderstorms gust harder and without warning.

#include <string>

#include "loads/wind.h"

namespace focalframe::loads {

enum class Exposure3s { in_land, off_land, off_sea };
std::string exposure_name(Exposure3s exposure);

/// Which class stands for a terrain (judgement): EN 0 and ASCE D off-sea, EN I off-land, all others in-land;
/// a power law by its exponent, below 0.12 off-sea, below 0.15 off-land.
Exposure3s exposure_of(const Site& site);

/// G(3 s, period) [-] for period = 3, 60, 600 or 3600 s (1 for 3 s); straight in ln(period) between.
double gust_in_mean(Exposure3s exposure, double period);

/// Beaufort number of a 10 min mean at 10 m [m/s], 0 .. 12, and what it looks like on land (the WMO scale in
/// short, from memory).
int beaufort(double mean_speed);
/// Lower end of a force [m/s].
double beaufort_from(int force);
std::string beaufort_signs(int force);

}  // namespace focalframe::loads
