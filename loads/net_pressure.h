#pragma once

/// Net-pressure patterns beyond the two of loads/coefficients.h: the profiles a table brings with it, and one
/// half of the aperture loaded alone.
///
/// On the real surface z = s^2 / (4 f) a net pressure p (front minus back) pushes along -n: a strip ds of the
/// aperture carries axial force p ds (concave to convex) and side force p (s / 2f) ds, and turns towards
/// larger pitch with p (s + z s / 2f) ds = p s (1 + s^2 / 8f^2) ds about the vertex. For p = b 2 s / W this
/// gives
///   trough: axial 0, side b (W/f) / 12, moment b (1/6 + (W/f)^2 / 320);
///   dish (average over the disc, z = r^2 / 4f): side b (D/f) / 16, moment b (1/8 + (D/f)^2 / 384),
/// so that uniform + linear meets any axial force and vertex moment. The side force that is still missing has
/// no moment about the vertex when it acts along the vertex line.

#include <vector>

#include "loads/coefficients.h"

namespace focalframe::loads {

/// Coefficients that p = 2 s / W gives: axial 0, side and vertex moment as above.
Coefficients linear_unit(const Aperture& aperture);

/// A table's profile brought to given coefficients: multiplied (or shifted, where its axial force is within a
/// factor of two of nothing) to the axial force, then a linear term is added for the vertex moment.
struct ProfilePattern {
  std::vector<PressureStation> distribution;  ///< empty: the table has no profile at this pitch
  double factor = 1, shift = 0;               ///< on the table's own shape [-]
  double slope = 0;                           ///< added linear term slope * 2 s / W [-]
  double residual_side = 0;                   ///< Cs minus what the pressures already give [-]
  bool own_shape = true;  ///< false: shift and slope together exceed half the largest |dcp| of the result
};
ProfilePattern profile_pattern(const CoefficientTable& table, double pitch, const Coefficients& target,
                               const Aperture& aperture);

/// Ca on one half of the aperture, nothing on the other (a partial load no table describes; its force is
/// Ca/2).
enum class Half { minus_s, plus_s };
std::vector<PressureStation> half_pattern(const Coefficients& c, Half half);

/// A measured or computed distribution on the table's stations: dcp at s/W, straight lines between.
double net_pressure(const std::vector<PressureStation>& distribution, double s_over_w);

}  // namespace focalframe::loads
