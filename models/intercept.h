#pragma once

/// From the miss distance of the mirror's rays to the share of light a trough's receiver catches.
///
/// Axes: y across the aperture, z along the optical axis, rotations positive about +x (y towards z). The miss
/// is where the central reflected ray passes the receiver's centre, measured along (cos phi, sin phi) in (y,
/// z) [m]. Deformation stays deterministic in the miss; sun and workshop errors are the spread about it.

#include <cstddef>
#include <span>
#include <vector>

#include "models/parabola.h"
#include "models/sun.h"

namespace focalframe::models {

/// Coefficients of the miss of a mirror point on how mirror, receiver and aim have moved; first order in the
/// motion (error about 0.4 % of the miss at 5 mrad). Derived from reflection at a displaced parabola.
struct MissTerms {
  double mirror_v = 0, mirror_w = 0;      ///< per displacement of the mirror point along y, z [-]
  double rotation = 0;                    ///< per rotation of the mirror's normal about +x [m/rad]
  double receiver_v = 0, receiver_w = 0;  ///< per displacement of the receiver along y, z [-]
  double aim = 0;  ///< per rotation of the incoming light about +x relative to the collector [m/rad]
};

/// Terms at the mirror point whose undeformed lateral position is y. A rotation of mirror and receiver
/// together is an aim of the opposite sign: aim = -rotation.
MissTerms miss_terms(const Parabola& parabola, double y);

/// Slope error at a fixed y, from the rotation of the material point's normal and its displacement v along y:
/// the point now stands where the ideal mirror has another slope [rad].
double slope_error_at_fixed_y(const Parabola& parabola, double y, double rotation, double v);

/// What blurs the beam. All rms values are 1-D; slope errors count twice in the reflected ray [rad].
struct BeamError {
  SunShape sun;
  double slope_rms = 0;               ///< workshop error of the mirror's normal, transverse
  double longitudinal_slope_rms = 0;  ///< the same along the row; acts only at an incidence angle
  double scatter_rms = 0;             ///< of the reflected ray (not of the normal), round
  double tracking_rms = 0;            ///< of the collector's aim; excludes modelled play, friction and twist
  double incidence = 0;               ///< angle of the sun from the plane across the row
};

/// Rms of everything but the sun, in the transverse plane, at ray angle phi [rad]. At an incidence angle the
/// round scatter (as the sun) widens by 1/cos; a longitudinal normal error e turns the ray by
/// 2 e tan(incidence) sin(phi/2).
double error_rms(const BeamError& error, double ray_angle = 0);

/// Rms of sun and errors together [rad]; the whole truth only for a Gaussian sun.
double total_rms(const BeamError& error, double ray_angle = 0);

enum class LineReceiver {
  tube,   ///< round, `receiver_radius` its radius
  strip,  ///< flat, facing the vertex, `receiver_radius` half its width; nothing arrives from behind
};

/// Intercept as a function of the miss at given rows of mirror points, tabulated once: error below 1e-7 per
/// sample while the Gaussian errors exceed 0.5 mrad.
class TroughIntercept {
 public:
  /// rows_y: lateral positions of the sample rows [m]; receiver_radius [m].
  TroughIntercept(const Parabola& parabola, double receiver_radius, const BeamError& error,
                  std::vector<double> rows_y, LineReceiver kind = LineReceiver::tube);

  int rows() const { return static_cast<int>(rows_.size()); }

  /// Share of the light of row `row` that is caught at this miss [m]; even in the miss.
  double at(int row, double miss) const;

  /// Mean over samples [station][row], rows contiguous. `weight`: one per sample, or one per row for all
  /// stations (projected aperture area).
  double mean(std::span<const double> miss, std::span<const double> weight) const;

  /// Intercept of the perfect trough, over the whole aperture and not only at the rows.
  double undeformed() const { return undeformed_; }

 private:
  struct Row {
    double from = 0, per_step = 0;  ///< first knot's miss [m], knots per metre
    std::size_t knots = 0, first = 0;
  };
  struct Knot {
    double value, slope;  ///< slope times the step
  };
  double value(const Row& row, double miss) const;

  std::vector<Row> rows_;
  std::vector<Knot> knots_;
  double undeformed_ = 0;
};

/// Share of the light of a perfect trough caught from a point sun off the axis by `angle` [-]: the acceptance
/// function (after Bendt, Rabl, Gaul, Reed 1979, SERI/TR-34-092; formula derived here).
double acceptance(const Parabola& parabola, double receiver_radius, double angle);

/// Share of a row's light that leaves past its end at an incidence angle [-]; `overhang` [m]: receiver beyond
/// the mirror's end. Mean over the aperture of (r tan(incidence) - overhang)+ / length.
double end_loss(const Parabola& parabola, double row_length, double incidence, double overhang = 0);

}  // namespace focalframe::models
