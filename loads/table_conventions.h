#pragma once

/// Coefficients in the conventions of their author, and their way into those of loads/coefficients.h.
///
/// Angles p are pitches of the program. Wind to body: Ca = Cfx cos p - Cfz sin p, Cs = Cfx sin p + Cfz cos p.
/// Moment from the axis, at d behind the vertex (convex side), to the vertex: Cm_vertex = Cm_axis - (d / W)
/// Cs, because a force F_s at the vertex turns the collector about the axis with lever d towards larger p.

#include <string>
#include <vector>

#include "loads/coefficients.h"

namespace focalframe::loads {

/// Where an author's angle is zero, and which way it grows.
enum class AngleZero { face_on, zenith };
enum class AngleSense {
  upwards,    ///< from face-on: the face turns up
  downwards,  ///< from face-on: the face turns down
  leeward,    ///< from the zenith: the face turns away from the wind
  windward    ///< from the zenith: the face turns towards the wind
};

struct TableConventions {
  AngleZero zero = AngleZero::face_on;
  AngleSense sense = AngleSense::upwards;
  bool wind_axes = false;     ///< the two forces are downwind and up instead of axial and along s
  bool about_axis = false;    ///< moment about the rotation axis instead of the vertex
  double axis_behind = 0;     ///< distance of that axis behind the vertex over W [-], < 0 in front
  double first_sign = 1;      ///< +1, or -1 where the author's first force points the other way
  double second_sign = 1;     ///< the same for the second force
  double moment_sign = 1;     ///< -1 where the author's positive moment turns towards smaller p
  double area_ratio = 1;      ///< author's reference area over the aperture area [-]
  double length_ratio = 1;    ///< author's moment length over the aperture width or diameter [-]
  double pressure_ratio = 1;  ///< author's reference velocity pressure over that at axis height [-]
};

/// An author's row: angle [rad], first and second force, moment.
struct AuthorRow {
  double angle = 0;
  double first = 0, second = 0, moment = 0;
};

/// Pitch in (-pi, pi] of an author's angle [rad].
double to_pitch(double angle, const TableConventions& conventions);

/// One row in the program's conventions.
Coefficients to_coefficients(const AuthorRow& row, const TableConventions& conventions);

/// The way back, for printing a table in its author's conventions and for tests.
AuthorRow to_author(double pitch, const Coefficients& c, const TableConventions& conventions);

/// What was understood, in lines of plain words with a small drawing of the angle, ASCII.
std::vector<std::string> describe(const TableConventions& conventions);

}  // namespace focalframe::loads
