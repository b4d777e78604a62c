#pragma once

/// What a deformed trough looks like to the light: rigid motion, change of focus, and what is left.
///
/// Collector axes, rotations positive about +x. All means and rms values are weighted with the projected
/// aperture area; slope errors are 1-D angles of the mirror's normal, not of the reflected beam. First order
/// in the deformation throughout.

#include <limits>
#include <span>
#include <vector>

#include "models/parabola.h"

namespace focalframe::models {

/// Motion of a cross-section, a module or any other part of a trough, [station][row] with rows contiguous.
/// `y` and `weight` have one entry per row or one per sample; receiver spans one entry in all, one per
/// station, or one per sample; an empty one means 0.
struct TroughSamples {
  std::span<const double> y;                       ///< undeformed lateral position [m]
  std::span<const double> weight;                  ///< projected area, any unit
  std::span<const double> v, w;                    ///< displacement along y, z [m]
  std::span<const double> rotation;                ///< of the mirror's normal about +x [rad]
  std::span<const double> receiver_v, receiver_w;  ///< displacement of the receiver's centre [m]
  std::span<const double> longitudinal;            ///< turn of the normal along x [rad]; may be empty
};

/// Miss of every sample [m]; `aim`: rotation of the light about +x relative to the collector axes [rad].
std::vector<double> miss_distances(const Parabola& parabola, const TroughSamples& samples, double aim = 0);

struct TroughShape {
  static constexpr double none = std::numeric_limits<double>::quiet_NaN();

  /// The best-fit parabola. Its lateral shift is that of the rigid motion nearest to the displacements (v, w)
  /// (from heights alone a shift can hardly be told from a tilt); then vertex height, tilt about the vertex
  /// and focal length are the least squares fit to the heights at fixed y.
  double vertex_v = none, vertex_w = none;  ///< [m]
  double tilt = none;                       ///< [rad]
  double focal_change = none;               ///< [m]
  int rank = 0;                             ///< of the height fit, 3 when all three can be told apart
  double condition = none;                  ///< of the height fit, unknowns scaled to equal effect
  double height_rms = none;                 ///< along z, after the fit [m]

  /// Transverse slope error at fixed y: against the design parabola where it should be; against the design
  /// parabola moved rigidly; against the best-fit parabola [rad].
  double slope_rms = none, slope_rms_moved = none, slope_rms_after = none, slope_max_after = none;
  double longitudinal_slope_rms = none;  ///< [rad]; NaN when not given
  double focus_deviation = none;         ///< rms of 2 r x slope error against the design parabola (FDx) [m]

  /// Mean place of the receiver relative to the focus of the rigidly moved design parabola [m].
  double receiver_lateral = none, receiver_axial = none;

  /// Focal shift: where the receiver's centre would have to be for the least rms miss, from the design focus,
  /// in collector axes [m]. Least squares on the miss, area weighted.
  double focal_line_v = none, focal_line_w = none;

  /// The common rotation of mirror and receiver nearest to the misses (least squares): turning the collector
  /// back by this much is the best a tracker can do [rad].
  double aim_error = none;
  double miss_rms = none;  ///< receiver included [m]
};

/// Throws std::invalid_argument when the spans do not fit each other or the weights add up to nothing.
TroughShape fit_shape(const Parabola& parabola, const TroughSamples& samples);

/// The miss of every sample in parts that add up to it exactly.
struct TroughMissParts {
  std::vector<double> twist;     ///< mirror and receiver turned together, and the aim
  std::vector<double> tilt;      ///< mirror turned against what carries it, about the vertex
  std::vector<double> receiver;  ///< receiver out of the place the moved trough expects it at
  std::vector<double> focus;     ///< change of focal length
  std::vector<double> residual;  ///< everything else: the shape no parabola has
};

/// `twist`: rotation of what carries mirror and receiver [rad], one in all, one per station or per sample;
/// empty: the shape's own tilt, so that `tilt` becomes 0.
TroughMissParts split_miss(const Parabola& parabola, const TroughSamples& samples, const TroughShape& shape,
                           std::span<const double> twist = {}, double aim = 0);

}  // namespace focalframe::models
