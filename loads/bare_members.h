#pragma once

/// Drag of members the wind meets outside the reflector, and friction of wind along the row.

#include <string>
#include <vector>

namespace focalframe::loads {

/// Endless members across the wind; sharp-edged ones do not depend on the Reynolds number.
enum class BareShape {
  round,       ///< 1.20 below the critical Reynolds number (aeronautical data book); kept above it as well
  square,      ///< 2.2, sharp edges
  angle_open,  ///< 1.98, equal angle, the larger of its two listed positions
  angle_back,  ///< 1.82, the other one
  i_beam,      ///< 2.05
  tee_flange,  ///< 1.80, the larger of its two listed positions
  tee_stem,    ///< 1.65, the other one
  flat         ///< 1.98, plate broadside to the wind
};
/// Source of all but the round member and the plate: Munson et al., Fundamentals of Fluid Mechanics,
/// Fig. 9.19.
double drag_coefficient(BareShape shape);

/// Share left by flow around free ends: round members 0.525 at length/width 1 to 1 when endless (aeronautical
/// data book: 0.63, 0.68, 0.74, 0.82, 0.98, 1.20 at 1, 2, 5, 10, 40, endless), straight lines in the
/// logarithm. Plates: 1.18, 1.2, 1.3, 1.5, 2.0 at 1, 5, 10, 20, endless (White, Table 7.3, from memory).
/// Others as plates.
double end_factor(BareShape shape, double length_over_width);

struct BareMember {
  BareShape shape = BareShape::round;
  double width = 0, length = 0;  ///< across the wind, along the member [m]
  bool free_ends = false;        ///< false: both ends run into other members, no end factor
  double shielding = 1;          ///< share of the wind that reaches it [-]
  double inclination = 0;        ///< angle between wind and the plane across the member [rad]
};
/// q Cd w l cos^2(inclination) x end factor x shielding [N], across the member in the plane of member and
/// wind.
double drag_force(const BareMember& member, double pressure);

/// EN 1991-1-4, 7.5, Table 7.10: 0.01 smooth (steel, glass), 0.02 rough, 0.04 very rough (ribs, folds).
enum class Roughness { smooth, rough, very_rough };
double friction_coefficient(Roughness roughness);

/// Wind along the row: friction on both faces of the reflector [N]. All of the area is taken; the code lets
/// the stretch behind the first edge be left out.
struct AlongWind {
  double area = 0;  ///< of one face, along the curve [m^2]
  Roughness front = Roughness::smooth, back = Roughness::very_rough;
};
double friction_force(const AlongWind& surface, double pressure);

}  // namespace focalframe::loads
