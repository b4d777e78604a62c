#pragma once

/// Screening for wind that feeds on motion, EN 1991-1-4 Annex E and closed forms of torsional divergence.
/// Screening only: about a factor of 1.5, never a substitute for a wind-tunnel study.

namespace focalframe::loads {

/// A bluff body vibrating across the wind.
struct BluffBody {
  double width = 0;            ///< b across the wind [m]
  double mass_per_length = 0;  ///< [kg/m]
  double frequency = 0;        ///< [Hz]
  double log_decrement = 0;    ///< structural [-]
  double density = 1.25;       ///< of air [kg/m^3]
};

/// Sc = 2 delta m / (rho b^2) [-].
double scruton_number(const BluffBody& body);

/// Speed at which vortices are shed at the body's own frequency: b n / St [m/s]. St: round 0.18, square 0.12
/// (EN, from memory), inclined plates about 0.15 on their projected height (from memory).
double vortex_speed(const BluffBody& body, double strouhal);

/// Largest amplitude from vortex shedding by EN 1991-1-4 E.1.5.2: b K Kw clat / (St^2 Sc) [m].
struct VortexFactors {
  double mode_shape = 0.13;    ///< K: 0.13 cantilever, 0.10 simple span, 0.11 both ends fixed (0.13 read)
  double correlation = 0.95;   ///< Kw, at most 0.95
  double lateral_force = 1.1;  ///< clat [-]
  double strouhal = 0.18;      ///< [-]
};
double vortex_amplitude(const BluffBody& body, const VortexFactors& factors);

/// Kw of a cantilever's first mode with the force correlated over `correlated` widths from the top.
struct CorrelationLength {
  double slenderness = 0;  ///< height over width [-]
  double correlated = 6;   ///< L_j / b [-]
};
double cantilever_correlation(const CorrelationLength& in);

/// Onset of galloping 2 Sc n b / aG [m/s]; aG = 10 if nothing is known. Wanted: more than 1.25 times the
/// mean.
double galloping_speed(const BluffBody& body, double galloping_factor);

/// Torsional divergence of a section on its own spring: V = sqrt(2 k / (rho W^2 dCm/dp)) [m/s]; infinite
/// where the slope is not positive.
struct TwistingSection {
  double width = 0;         ///< W [m]
  double moment_slope = 0;  ///< dCm/dp [1/rad]
  double density = 1.25;    ///< [kg/m^3]
};
double divergence_speed(const TwistingSection& section, double stiffness_per_length);

/// The same for a tube held at the drive and free at the row's end: V = pi / (2 L) sqrt(2 GJ / (rho W^2
/// dCm/dp)).
struct TorqueTube {
  double torsional_stiffness = 0;  ///< GJ [N m^2]
  double length = 0;               ///< drive to end [m]
};
double divergence_speed(const TwistingSection& section, const TorqueTube& tube);

/// End twist [rad] of that tube under a torque per length m [N m/m] with the wind's feedback at a velocity
/// pressure: (m / K)(sec(L sqrt(K / GJ)) - 1), K = q W^2 dCm/dp; m L^2 / (2 GJ) without feedback. NaN from
/// divergence on.
struct TwistLoad {
  double torque_per_length = 0;  ///< m [N m/m]
  double pressure = 0;           ///< q [Pa]
};
double end_twist(const TwistingSection& section, const TorqueTube& tube, const TwistLoad& load);

}  // namespace focalframe::loads
