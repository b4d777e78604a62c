#pragma once

/// Size and dynamic factor of gathered loads by EN 1991-1-4:2005, 6.3 and Annex B.
///
///   cs cd = (1 + 2 kp Iv sqrt(B^2 + R^2)) / (1 + 7 Iv),  cs = (1 + 7 Iv B) / (1 + 7 Iv),  cd = cs cd / cs.

#include "loads/wind.h"

namespace focalframe::loads {

/// Non-dimensional spectral density S_L = 6.8 f / (1 + 10.2 f)^(5/3), f = n L / vm [-].
double spectral_density(double f);

/// Aerodynamic admittance R(eta) = 1/eta - (1 - exp(-2 eta)) / (2 eta^2); 1 at eta = 0 [-].
double aerodynamic_admittance(double eta);

/// delta_a = cf rho b vm / (2 n me): logarithmic decrement of the air [-].
struct AirDamping {
  double force_coefficient = 0;  ///< cf [-]
  double density = 0;            ///< [kg/m^3]
  double width = 0;              ///< b across the wind [m]
  double mean_speed = 0;         ///< vm [m/s]
  double frequency = 0;          ///< n [Hz]
  double mass_per_length = 0;    ///< me [kg/m]
};
double air_damping(const AirDamping& in);

struct DynamicInput {
  double width = 0, height = 0;      ///< b, h over which the load is gathered [m]
  double mean_speed = not_given;     ///< vm(zs), 10 min [m/s]
  double turbulence = not_given;     ///< Iv(zs) [-]
  double length_scale = not_given;   ///< L(zs) [m]
  double frequency = not_given;      ///< of the first mode that the load excites [Hz]
  double log_decrement = not_given;  ///< structure + air + special devices [-]
};

struct DynamicFactors {
  double background2 = not_given;  ///< B^2
  double resonance2 = not_given;   ///< R^2
  double crossing = not_given;     ///< nu, up-crossing frequency, at least 0.08 Hz
  double peak = not_given;         ///< kp, at least 3
  double size = not_given;         ///< cs
  double dynamic = not_given;      ///< cd
  std::vector<ChainStep> chain;

  double product() const { return size * dynamic; }
};

/// Throws std::invalid_argument when an input is missing or not positive.
DynamicFactors dynamic_factors(const DynamicInput& in);

}  // namespace focalframe::loads
