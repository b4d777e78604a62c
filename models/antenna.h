#pragma once

/// What a deformed paraboloid costs an antenna: half path length, best-fit paraboloid, pointing, gain.
///
/// Collector axes: vertex at the origin, z along the optical axis; first order in the deformation. Losses are
/// positive decibels.

#include <limits>
#include <span>
#include <vector>

#include "models/parabola.h"

namespace focalframe::models {

/// Speed of light in vacuum [m/s], exact by definition of the metre.
inline constexpr double light_speed = 299'792'458.0;

double wavelength(double frequency);  ///< of a frequency [Hz], [m]

/// Displaced points of a dish; all spans of one length. `weight`: projected area, times illumination (power)
/// if any.
struct DishSamples {
  std::span<const double> x, y;     ///< undeformed place [m]
  std::span<const double> weight;   ///< any unit
  std::span<const double> u, v, w;  ///< displacement along x, y, z [m]
};

/// Half the change of the path feed - mirror - far plane that a mirror point's displacement makes [m]:
/// deviation dz along z at fixed x, y times cos^2 of the incidence angle; positive towards the focus.
double half_path_error(const Parabola& parabola, double x, double y, double u, double v, double w);

enum class DishFit {
  full,     ///< vertex shift in all three directions, two tilts, focal length
  no_shift  ///< vertex height, two tilts, focal length; better conditioned: lateral shifts look like tilts
};

/// Best-fit paraboloid, least squares on the half path error, weighted. Rank and condition as in
/// models/least_squares.h: a shallow dish can hardly tell a lateral shift from a tilt.
struct DishShape {
  static constexpr double none = std::numeric_limits<double>::quiet_NaN();
  double shift_x = none, shift_y = none, shift_z = none;  ///< of the vertex [m]; 0 when not fitted
  double tilt_x = none, tilt_y = none;                    ///< about x, y through the vertex [rad]
  double focal_change = none;                             ///< [m]
  double focus_x = none, focus_y = none, focus_z = none;  ///< displacement of its focus [m]
  int rank = 0;
  double condition = none;         ///< of the fit, unknowns scaled to equal effect
  double half_path_before = none;  ///< rms about the weighted mean (a common path does not matter) [m]
  double half_path_after = none;   ///< rms after the fit [m]
};

/// Throws std::invalid_argument when spans differ in length, are empty, or weights add up to nothing.
DishShape fit_paraboloid(const Parabola& parabola, const DishSamples& samples, DishFit fit = DishFit::full);

/// Loss of gain of a surface with this rms half path error [dB]: 10 log10 exp((4 pi eps / lambda)^2); for
/// errors random over the aperture (Ruze, Proc. IEEE 54, 1966, 633).
double ruze_loss_db(double half_path_rms, double wavelength);

/// Loss of gain on the axis from given half path errors, without Ruze's assumption: the phases summed,
/// `weight` being area times amplitude of illumination [dB].
double phase_loss_db(std::span<const double> half_path, std::span<const double> weight, double wavelength);

/// Loss of gain from a feed displaced along the axis, uniform illumination: phases summed over the aperture
/// [dB].
double defocus_loss_db(const Parabola& parabola, double axial_shift, double wavelength);

/// Ratio of the beam's turn to a lateral feed shift's angle at the vertex, (1 + k t) / (1 + t) with t =
/// (D/4f)^2 and k = 0.36 (after Lo 1960, from memory; 0.8 to 0.95 for common dishes).
double beam_deviation_factor(const Parabola& parabola);

/// Full width of the beam between half-power points [rad]: factor x wavelength / diameter; 1.02 for uniform
/// illumination, 1.22 (70 deg) for the usual taper (from memory).
double beamwidth(const Parabola& parabola, double wavelength, double factor = 1.22);

/// Loss off the middle of a Gaussian beam: 40 log10(2) (angle / beamwidth)^2 [dB].
double pointing_loss_db(double angle, double beamwidth);

/// The beam turns by these angles about +x and +y: the reflector's own turn, and a feed off the focus.
struct BeamTurn {
  double about_x = 0, about_y = 0;  ///< [rad]
  double size() const;
};

/// `feed_x`, `feed_y`: displacement of the feed [m].
BeamTurn beam_turn(const Parabola& parabola, const DishShape& shape, double feed_x, double feed_y);

struct GainLoss {
  double surface = std::numeric_limits<double>::quiet_NaN();   ///< Ruze, rms after the fit [dB]
  double defocus = std::numeric_limits<double>::quiet_NaN();   ///< feed off the best-fit focus axially [dB]
  double pointing = std::numeric_limits<double>::quiet_NaN();  ///< if the beam is not pointed anew [dB]
  double total() const { return surface + defocus + pointing; }
};

/// `feed`: displacement along x, y, z [m]; `pointed_anew`: the beam's turn is taken out by pointing.
GainLoss gain_loss(const Parabola& parabola, const DishShape& shape, std::span<const double, 3> feed,
                   double wavelength, bool pointed_anew = false);

}  // namespace focalframe::models
