#pragma once

/// Snow, ice and standing water by attitude.
///
/// In collector axes the zenith is (y, z) = (-cos e, sin e) at elevation e; the hollow side z = (x^2 + y^2) /
/// 4f faces up where its normal does. Water stands up to the lower rim. Snow lies on surfaces up to 30 deg
/// steep, thins out to 60 deg (EN 1991-1-3, 5.3, mu_1) and cannot slide out of the part that would hold
/// water.

#include "loads/coefficients.h"

namespace focalframe::loads {

inline constexpr double water_density = 1000, ice_density = 900;  ///< [kg/m^3]

/// Water held in the hollow side, drains blocked.
struct HeldWater {
  double amount = 0;                  ///< trough: per length [m^2]; dish: volume [m^3]
  double centre_y = 0, centre_z = 0;  ///< its centre of gravity, collector axes [m]; 0 when there is none
};
/// Hydrostatic pressure of that water on a trough's mirror at y [Pa]; 0 where it is dry.
double water_pressure(const Aperture& aperture, double elevation, double y);
HeldWater held_water(const Aperture& aperture, double elevation);

/// mu_1 of EN 1991-1-3 for a slope [rad]: 0.8 up to 30 deg, straight to 0 at 60 deg.
double snow_shape_coefficient(double slope);

/// Horizontal area times shape coefficient, trough per length [m], dish [m^2], and where its load acts across
/// the axis. Load = this times the ground snow load. The back sheds unless told otherwise: turned face down,
/// a reflector then carries no snow.
struct SnowArea {
  double area = 0;
  double centre_y = 0;  ///< collector axes [m]; 0 when there is none
};
enum class SnowOnBack { sheds, holds };
/// Shape coefficient times level area per area of the aperture at y (and x, for a dish): what SnowArea sums.
double snow_cover(const Aperture& aperture, double elevation, double y, SnowOnBack back = SnowOnBack::sheds,
                  double x = 0);
SnowArea snow_area(const Aperture& aperture, double elevation, SnowOnBack back = SnowOnBack::sheds);

/// Ice of uniform thickness: on both faces of a sheet [kg/m^2], around a round member [kg/m].
double ice_on_sheet(double thickness);
struct IcedTube {
  double outside_diameter = 0, thickness = 0;  ///< of the tube, of the ice [m]
};
double ice_on_tube(const IcedTube& tube);

}  // namespace focalframe::loads
