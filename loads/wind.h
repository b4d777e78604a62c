#pragma once

/// From the wind somebody stated to the wind at the axis: speed, averaging time, height, terrain, density,
/// pressure. Every step taken is kept as a line a reader can follow with a pocket calculator.

#include <limits>
#include <string>
#include <vector>

namespace focalframe::loads {

inline constexpr double not_given = std::numeric_limits<double>::quiet_NaN();

enum class Terrain { en_0, en_1, en_2, en_3, en_4, asce_b, asce_c, asce_d, power_law };

/// Where it stands. NaN = not given.
struct Site {
  double altitude = not_given;     ///< above sea level [m]
  double temperature = not_given;  ///< [K]
  double pressure = not_given;     ///< [Pa]
  double density = not_given;      ///< [kg/m^3]; overrides the three above
  Terrain terrain = Terrain::en_2;
  double orography = 1.0;         ///< c_o (EN) or sqrt(Kzt) (ASCE), on the speed [-]
  double power_exponent = 0.14;   ///< only for Terrain::power_law [-]
  double turbulence = not_given;  ///< only for Terrain::power_law: Iv at the axis [-]
  int asce_edition = 16;          ///< 10, 16 or 22
};

/// Whose ground a speed was stated over. Maps, codes and weather stations state it for open country (EN
/// terrain II, ASCE exposure C) whatever the site is like; an anemometer on the site sees the site's own
/// terrain and orography. Mixing the two up is worth a factor of 1.8 on the speed in EN terrain IV.
enum class StatedOver { open_country, site };

/// How a mean over one period becomes a mean over another.
enum class GustMethod { durst, wieringa };

/// The wind as stated: a speed with its averaging time and height, or a velocity pressure at the axis.
struct StatedWind {
  double speed = not_given;      ///< [m/s]
  double averaging = not_given;  ///< [s]: 3, 60, 600, 3600
  double height = 10.0;          ///< [m above ground]
  double pressure = not_given;   ///< velocity pressure at the axis [Pa] with `averaging`; instead of speed
  StatedOver over = StatedOver::open_country;
  GustMethod method = GustMethod::durst;  ///< for averaging times other than those of the profile
};

/// One line of the chain: "what = value unit", and how it was made (formula, source).
struct ChainStep {
  std::string what;
  double value = 0;  ///< SI
  std::string unit;
  std::string how;
};

/// The same wind at a height, in the two averagings the criteria use.
struct WindAtHeight {
  double height = not_given;         ///< [m]
  double density = not_given;        ///< [kg/m^3]
  double turbulence = not_given;     ///< Iv(z) [-]
  double mean_speed = not_given;     ///< 10 min mean [m/s]
  double gust_speed = not_given;     ///< 3 s gust [m/s]
  double mean_pressure = not_given;  ///< 0.5 rho V^2 of the mean [Pa]
  double gust_pressure = not_given;  ///< of the gust [Pa]
  std::vector<ChainStep> chain;
};

/// The wind at a height above ground [m].
/// EN terrain: v_b = the 10 min mean 10 m above open country, mean = c_r(z) c_o v_b, gust pressure = (1 + 7
/// Iv) mean pressure (EN 1991-1-4, 4.3 to 4.5). A stated 3 s gust becomes a mean by / sqrt(1 + 7 Iv) at the
/// stated height. ASCE: gust = 3 s gust 10 m above open country x sqrt(Kz) sqrt(Kzt); mean by Durst's
/// factors. Directionality factors (c_dir, Kd) are 1. Power law: on the 10 min mean; Iv not given = the
/// exponent. Throws std::invalid_argument naming the bound that does not hold.
WindAtHeight wind_at(double height, const StatedWind& wind, const Site& site);

/// B [-] of EN 1991-1-4, Annex B.2: B^2 = 1 / (1 + 0.9 ((b + h) / L)^0.63); 1 for a point.
struct GatheredArea {
  double width = 0, height = 0;  ///< the load is gathered over this width and height [m]
  double above_ground = 10;      ///< where the length scale L is taken [m]
};
double background_factor(const GatheredArea& area, const Site& site);

/// EN 1991-1-4 size factor cs = (1 + 7 Iv B) / (1 + 7 Iv) for loads gathered over a width b and height h [m],
/// B by Annex B.2 with the turbulence length scale at `height`.
double size_factor(double b, double h, double height, double turbulence, const Site& site);

/// Air density [kg/m^3] of a site and how it was made.
ChainStep air_density(const Site& site);

}  // namespace focalframe::loads
