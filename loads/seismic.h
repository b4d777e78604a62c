#pragma once

/// Equivalent static earthquake: an acceleration to be put on the masses horizontally.

namespace focalframe::loads {

/// EN 1998-1, 3.2.2.5, spectrum type 1. Ground types' constants from memory.
enum class GroundType { a, b, c, d, e };
struct SeismicEn {
  double ground_acceleration = 0;  ///< a_g including importance [m/s^2]
  GroundType ground = GroundType::b;
  double behaviour = 1.5;  ///< q [-]; 1.5 for structures without ductile detailing
  double period = 0;       ///< T of the first mode [s]
};
/// Design acceleration S_d(T) [m/s^2].
double seismic_acceleration(const SeismicEn& in);

/// ASCE 7, 12.8.1.1 with the lower bounds of 15.4.1 for nonbuilding structures (from memory).
struct SeismicAsce {
  double s_ds = 0, s_d1 = 0;  ///< design spectral accelerations at 0.2 s and 1 s over g [-]
  double response = 1.25;     ///< R [-]
  double importance = 1;      ///< I_e [-]
  double period = 0;          ///< T of the first mode [s]
};
/// C_s g [m/s^2].
double seismic_acceleration(const SeismicAsce& in);

}  // namespace focalframe::loads
