#pragma once

/// The shape of the sun as a linear concentrator sees it, and its convolution with Gaussian errors.
///
/// A trough sees the sun projected on a line: B(s) is the share of the light per angle s across the trough,
/// even in s, with integral 1. All angles in rad, all rms values are 1-D (along one line), never radial:
/// radial rms = sqrt(2) times the 1-D value for a round source.

#include <span>
#include <vector>

namespace focalframe::models {

/// Half angle of the solar disc used for pillbox and Buie shapes [rad], and where the aureole ends [rad]
/// (Buie, Monger, Dey 2003, Solar Energy 74, 113-122, as restated by authors who cite it).
inline constexpr double solar_disc_half_angle = 4.65e-3, aureole_half_angle = 43.6e-3;

/// A sun. Gaussian when `angle` is empty; otherwise its line profile, linear between the angles given.
struct SunShape {
  double gaussian_rms = 0;       ///< 1-D [rad]; 0 = a point
  std::vector<double> angle;     ///< ascending from 0 [rad]
  std::vector<double> density;   ///< B at these angles [1/rad]; twice its integral is 1
  std::vector<double> radiance;  ///< of the round sun at these angles from its centre, linear between
};

SunShape gaussian_sun(double rms);

/// Uniform disc.
SunShape pillbox_sun(double half_angle = solar_disc_half_angle);

/// Buie's shape whose circumsolar ratio, got by integrating it, is the one asked for (the formula's own
/// parameter is not: 0.02 gives 0.0058). Throws std::invalid_argument unless 1e-4 <= ratio <= 0.7.
SunShape buie_sun(double circumsolar_ratio);

/// Buie's shape with the formula's own parameter chi, uncalibrated.
SunShape buie_sun_of_parameter(double chi);

/// Circumsolar ratio of Buie's shape with parameter chi: aureole energy over all [-].
double buie_circumsolar_ratio(double chi);

/// The parameter chi whose circumsolar ratio is the one asked for.
double buie_parameter(double circumsolar_ratio);

/// A measured sun: radiance (any unit) at angles from the sun's centre, ascending from 0 [rad]; linear
/// between, nothing beyond the last. Throws std::invalid_argument on a table that is not one.
SunShape table_sun(std::span<const double> angle, std::span<const double> radiance);

/// 1-D rms [rad].
double line_rms(const SunShape& sun);

/// Sun, widened by a factor, convolved with a Gaussian: distribution of the reflected light's angle.
/// The convolution of the piecewise linear profile is exact; it is kept as a cubic table (error < 1e-8 while
/// the Gaussian is wider than 0.5 mrad, < 1e-6 below).
class BeamSpread {
 public:
  BeamSpread(const SunShape& sun, double widening, double error_rms);

  double cumulative(double angle) const;     ///< share of the light below this angle [-]
  double density(double angle) const;        ///< its derivative [1/rad]
  double reach() const { return reach_; }    ///< beyond +-reach there is less than 1e-12 of the light [rad]
  double detail() const { return detail_; }  ///< angle over which the density changes smoothly [rad]

 private:
  struct Knot {
    double value, density;
  };
  double gaussian_rms_ = 0, reach_ = 0, detail_ = 0, step_ = 0;
  std::vector<Knot> table_;  ///< at k * step_, k = 0 ...; empty: Gaussian
};

}  // namespace focalframe::models
