#pragma once

/// Wind coefficients of a reflector against pitch, with everything a number needs to be used rightly.
///
/// Conventions inside the program (tables in others are converted when read): pitch p as in loads/pose.h.
/// Forces per velocity pressure and area: Ca along the optical axis, > 0 pushes from the concave to the
/// convex side; Cs in the aperture plane along the axis s; Cm about the vertex per area and width (diameter),
/// > 0 turns towards larger p. Ca is even, Cs and Cm are odd in p. Wind axes: Cfx = Ca cos p + Cs sin p
/// (downwind), Cfz = -Ca sin p + Cs cos p (up).
///
/// The axis s is fixed to the collector: s = sin p downwind + cos p up, so it points downwind for 0 < p < pi
/// (upwind rim at s = -W/2) and upwind for p < 0 (upwind rim at s = +W/2). In collector axes s = -y for wind
/// from +Y and +y for wind from -Y in every pose (side_axis_along_y in loads/pose.h).

#include <limits>
#include <optional>
#include <string>
#include <vector>

namespace focalframe::loads {

inline constexpr double unstated = std::numeric_limits<double>::quiet_NaN();

enum class CoefficientKind { mean, peak };

struct Coefficients {
  double Ca = 0, Cs = 0, Cm = 0;  ///< [-]
};

struct CoefficientRow {
  double pitch = 0;    ///< [rad], 0 .. pi; see `rows` for negative ones
  Coefficients best;   ///< best estimate
  Coefficients upper;  ///< upper bound for strength (equal to best where the table gives none)
};

/// Net pressure coefficient (front minus back) across the aperture at one pitch; stations s/W along the axis
/// s above, from -0.5 to +0.5.
struct ProfileRow {
  double pitch = 0;         ///< [rad], -pi .. pi
  std::vector<double> net;  ///< one value per station [-]
};

struct CoefficientTable {
  std::string name, title, source, confidence;  ///< confidence in words ("low", "medium-low", ...)
  std::string collector_kind;                   ///< "trough" | "dish"
  CoefficientKind kind = CoefficientKind::mean;
  std::string reference;        ///< speed, height, area, length, moment centre in words
  bool includes_frame = false;  ///< true: drag of bare members is already inside
  double uncertainty = 0;       ///< relative, about two sigma, 0 = not stated
  /// Ascending pitch. Rows from 0 to pi are used for negative pitches by symmetry. A table with a row below 0
  /// (measured over the ground, say) is used as it stands, -pi .. pi, without symmetry.
  std::vector<CoefficientRow> rows;
  std::vector<double> stations;      ///< s/W, ascending; empty = no profiles
  std::vector<ProfileRow> profiles;  ///< ascending pitch
  // Validity box; a bound that is NaN is not stated.
  double focal_ratio_min = unstated, focal_ratio_max = unstated;    ///< f/W [-]
  double height_ratio_min = unstated, height_ratio_max = unstated;  ///< axis height / W [-]
  double pitch_min = unstated, pitch_max = unstated;  ///< covered pitches, the symmetric ones counted [rad]
  double yaw_max = unstated;                          ///< [rad]
  std::vector<std::string> cautions;                  ///< printed beside the numbers
};

/// Linear interpolation in the table, symmetry applied; nullopt outside the covered pitches (never
/// extrapolated).
std::optional<Coefficients> coefficients_at(const CoefficientTable& table, double pitch, bool upper = false);

/// Slope dCm/dp [1/rad]: secant over pitch +- half_width; NaN outside the covered pitches.
double moment_slope(const CoefficientTable& table, double pitch, double half_width);

/// Factors of a field position on (Ca, Cs, Cm): an engineering proposal made for this program, not measured;
/// forces shelter more than moments do. Known zones: "isolated", "edge" (also the first row), "second-row",
/// "interior" (fourth row and deeper). Others: nullopt. There is no default.
struct ZoneFactors {
  double Ca = 1, Cs = 1, Cm = 1;
};
std::optional<ZoneFactors> zone_factors(const std::string& zone);

/// The profile of a pitch as the table gives it, interpolated: one value per station. Negative pitches use
/// their own rows where the table has some and mirror the positive ones (dcp(-p, s) = dcp(p, -s)) elsewhere.
/// Empty when the table has no profiles or the pitch lies outside them.
std::vector<double> raw_profile_at(const CoefficientTable& table, double pitch);

/// That profile brought to the axial force Ca(pitch) of the table (profile_pattern in loads/net_pressure.h
/// also meets the vertex moment). Both ways: the table's own shape is multiplied while the factor lies within
/// 0.5 .. 2; where the force passes through zero a uniform pressure is added instead.
std::vector<double> profile_at(const CoefficientTable& table, double pitch, bool upper = false);

/// Cross-section of a parabola for load distribution: width (dish: diameter) W and focal length f [m].
struct Aperture {
  double width = 0, focal_length = 0;
  bool dish = false;
};

/// First pattern: dcp(s) = Ca + slope * 2 s / W on the real surface, so that Ca and the vertex moment are
/// met; the in-plane force left over acts as a line force along the vertex line (dish: at the hub).
struct LinearPattern {
  double uniform = 0, slope = 0;              ///< [-]
  double residual_side = 0;                   ///< Cs minus what the pressures already give [-]
  double edge_upwind = 0, edge_downwind = 0;  ///< dcp at s = -W/2 and +W/2 (upwind, downwind for 0 < p < pi)
  bool looks_like_thin_shell = true;          ///< |residual_side| <= 0.15
};
LinearPattern linear_pattern(const Coefficients& c, const Aperture& aperture);

/// Second pattern: dcp(s) = uniform + peak * exp(-|s - rim| / (0.2 W)), the same Ca and vertex moment. The
/// peak sits at the upwind rim: s/W = -0.5 for p >= 0, +0.5 for p < 0.
struct EdgePattern {
  double uniform = 0, peak = 0;  ///< [-]
  double residual_side = 0;      ///< [-]
  double upwind_rim = -0.5;      ///< s/W [-]
};
inline constexpr double edge_decay = 0.2;  ///< of W
EdgePattern edge_pattern(const Coefficients& c, const Aperture& aperture, double upwind_rim = -0.5);

/// dcp of a pattern at s/W.
double net_pressure(const LinearPattern& pattern, double s_over_w);
double net_pressure(const EdgePattern& pattern, double s_over_w);

/// Coefficients that a net-pressure distribution dcp(s/W) gives on the real surface (per unit length, about
/// the vertex), by Gauss quadrature over the aperture. Straight lines between ascending stations, constant
/// beyond the outermost ones; two stations at the same place make a step.
struct PressureStation {
  double s_over_w = 0, dcp = 0;
};
Coefficients integrate(const std::vector<PressureStation>& distribution, const Aperture& aperture);

}  // namespace focalframe::loads
