#pragma once

/// Wind coefficients of a reflector against pitch, with everything a number needs to be used rightly.
///
/// Conventions inside the program (tables in others are converted when read): pitch p as in loads/pose.h.
/// Forces per velocity pressure and area: Ca along the optical axis, > 0 pushes from the concave to the
/// convex side; Cs in the aperture plane, > 0 along the wind's in-plane part; Cm about the vertex per area
/// and width (diameter), > 0 turns towards larger p. Ca is even, Cs and Cm are odd in p. Wind axes: Cfx = Ca
/// cos p + Cs sin p (downwind), Cfz = -Ca sin p + Cs cos p (up).

#include <optional>
#include <string>
#include <vector>

namespace focalframe::loads {

enum class CoefficientKind { mean, peak };

struct Coefficients {
  double Ca = 0, Cs = 0, Cm = 0;  ///< [-]
};

struct CoefficientRow {
  double pitch = 0;    ///< [rad], 0 .. pi
  Coefficients best;   ///< best estimate
  Coefficients upper;  ///< upper bound for strength (equal to best where the table gives none)
};

/// Net pressure coefficient (front minus back) across the aperture at one pitch; stations s/W from the upwind
/// rim
/// (-0.5, for p > 0) to the downwind rim (+0.5).
struct ProfileRow {
  double pitch = 0;         ///< [rad], -pi .. pi
  std::vector<double> net;  ///< one value per station [-]
};

struct CoefficientTable {
  std::string name, title, source, confidence;  ///< confidence in words ("low", "medium-low", ...)
  std::string collector_kind;                   ///< "trough" | "dish"
  CoefficientKind kind = CoefficientKind::mean;
  std::string reference;             ///< speed, height, area, length, moment centre in words
  bool includes_frame = false;       ///< true: drag of bare members is already inside
  double uncertainty = 0;            ///< relative, about two sigma, 0 = not stated
  std::vector<CoefficientRow> rows;  ///< ascending pitch
  std::vector<double> stations;      ///< s/W, ascending; empty = no profiles
  std::vector<ProfileRow> profiles;  ///< ascending pitch
  // Validity box; a bound that is NaN is not stated.
  double focal_ratio_min, focal_ratio_max;    ///< f/W [-]
  double height_ratio_min, height_ratio_max;  ///< axis height / W [-]
  double pitch_min, pitch_max;                ///< covered pitches, the symmetric ones counted [rad]
  double yaw_max;                             ///< [rad]
  std::vector<std::string> cautions;          ///< printed beside the numbers
};

/// Linear interpolation in the table, symmetry applied; nullopt outside the covered pitches (never
/// extrapolated).
std::optional<Coefficients> coefficients_at(const CoefficientTable& table, double pitch, bool upper = false);

/// Slope dCm/dp [1/rad]: secant over pitch +- half_width.
double moment_slope(const CoefficientTable& table, double pitch, double half_width);

/// Net pressure at the stations, interpolated in pitch, scaled so that its axial force is exactly Ca(pitch);
/// empty when the table has no profiles or the pitch is outside them. Negative pitches mirror positive ones
/// when not given.
std::vector<double> profile_at(const CoefficientTable& table, double pitch, bool upper = false);

/// Factors of a field position on (Ca, Cs, Cm). Known zones: "isolated", "edge", "second-row", "interior".
struct ZoneFactors {
  double Ca = 1, Cs = 1, Cm = 1;
};
std::optional<ZoneFactors> zone_factors(const std::string& zone);

/// Cross-section of a parabola for load distribution: width W and focal length f [m].
struct Aperture {
  double width = 0, focal_length = 0;
  bool dish = false;
};

/// First pattern: dcp(s) = Ca + slope * 2 s / W, s downwind in [-W/2, W/2], on the real surface, so that Ca
/// and the vertex moment are met; the in-plane force left over acts as a line force along the vertex line
/// (dish: at the hub).
struct LinearPattern {
  double uniform = 0, slope = 0;              ///< [-]
  double residual_side = 0;                   ///< Cs minus what the pressures already give [-]
  double edge_upwind = 0, edge_downwind = 0;  ///< dcp at the rims [-]
  bool looks_like_thin_shell = true;          ///< |residual_side| <= 0.15
};
LinearPattern linear_pattern(const Coefficients& c, const Aperture& aperture);

/// Second pattern: dcp(s) = uniform + peak * exp(-(s + W/2) / (0.2 W)), the same Ca and vertex moment.
struct EdgePattern {
  double uniform = 0, peak = 0;  ///< [-]
  double residual_side = 0;      ///< [-]
};
inline constexpr double edge_decay = 0.2;  ///< of W
EdgePattern edge_pattern(const Coefficients& c, const Aperture& aperture);

/// Coefficients that a net-pressure distribution dcp(s/W) gives on the real surface (per unit length, about
/// the vertex), by Gauss quadrature over the aperture.
struct PressureStation {
  double s_over_w = 0, dcp = 0;
};
Coefficients integrate(const std::vector<PressureStation>& distribution, const Aperture& aperture);

}  // namespace focalframe::loads
