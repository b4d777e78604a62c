#pragma once

/// Where wind inputs go wrong by factors: each guard looks at a few values and says what it thinks, or
/// nothing. Pure functions; words and levels are for the program's edge to print beside the place in the
/// file.

#include <optional>
#include <string>

#include "loads/coefficients.h"
#include "loads/wind.h"

namespace focalframe::loads {

enum class Severity { refused, warned, noted };

struct Verdict {
  Severity severity = Severity::noted;
  std::string rule;  ///< short word, e.g. "gust-twice"
  std::string text;  ///< what is wrong, with the numbers
  std::string fix;   ///< what to do instead
};
using Opinion = std::optional<Verdict>;

enum class PressureKind { mean, gust };
enum class Use { optics, strength };
/// Peak x gust counts the gusts twice: refused. Mean x mean for strength leaves them out: warned.
Opinion guard_gusts(CoefficientKind kind, PressureKind pressure, Use use, double turbulence);

/// An ultimate-level map already holds the wind factor: with a factor above 1 refused; a service-level map
/// with a factor below 1.3 in a strength combination warned.
struct MapFactor {
  bool ultimate_map = false;
  double wind_factor = 1;  ///< of the combination [-]
};
Opinion guard_load_factor(const MapFactor& in);

/// Density reduced for altitude in the air and again by a code's altitude factor: refused.
struct DensityUse {
  double density = not_given;          ///< used for the pressure [kg/m^3]
  double code_altitude_factor = 1;     ///< Ke or the like [-]
  bool map_includes_altitude = false;  ///< the map's speed or pressure is already for this altitude
};
Opinion guard_density(const DensityUse& in);

/// Speeds that look like another unit: operation above 35 m/s, survival above 90 m/s, survival over operation
/// outside 1.3 .. 6, or below it.
struct SpeedPair {
  double operate = not_given, survive = not_given;  ///< [m/s], any one may be missing
};
Opinion guard_speeds(const SpeedPair& in);

/// Heights: axis above 60 m or equal to the altitude; altitude above 5500 m refused.
struct Heights {
  double axis = not_given, altitude = not_given;  ///< [m]
};
Opinion guard_heights(const Heights& in);

/// A profile that makes the axis windier than 10 m above ground although it lies lower.
Opinion guard_profile(const WindAtHeight& at_axis, const WindAtHeight& at_10m);

/// Shelter claimed where there is none: second-row or interior factors for a row that faces the open.
struct ZoneUse {
  std::string zone{};        ///< of the design
  std::string table_zone{};  ///< the table was measured for; empty = isolated
  bool faces_open_ground = false;
};
Opinion guard_zone(const ZoneUse& in);

/// Design outside the box a table was made for: warned, far outside (a third beyond a bound) refused.
struct TableUse {
  double focal_ratio = not_given, height_ratio = not_given,
         yaw = not_given;  ///< f/W, axis height/W [-]; [rad]
};
Opinion guard_validity(const CoefficientTable& table, const TableUse& use);

/// Snow lies on a calm reflector: together with the return-period wind noted; on a face turned down noted.
struct SnowUse {
  double elevation = 0;  ///< [rad]
  bool extreme_wind = false;
};
Opinion guard_snow(const SnowUse& in);

/// Solid share of a mesh outside (0, 1], or so small that openness was probably meant.
Opinion guard_solidity(double solidity);

/// Hours of a year from an all-hours distribution for a machine that works by day.
Opinion guard_hours(bool daylight_only);

}  // namespace focalframe::loads
