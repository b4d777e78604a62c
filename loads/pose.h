#pragma once

/// Where a reflector looks and where the wind comes from. Angles in radians.
///
/// World axes: Z up, X horizontal along the rotation axis, Y = Z x X. Elevation: angle of the optical axis
/// above the horizon, 0 faces +Y, 90 deg the zenith, above 90 deg it leans to -Y, below 0 it faces down.
/// Collector axes in world axes: x = X, z = (0, cos e, sin e), y = (0, sin e, -cos e); at 90 deg both
/// coincide. Wind from psi: clockwise seen from above, 0 blows from +Y, pi from -Y.

#include <Eigen/Geometry>

namespace focalframe::loads {

/// Rows = collector axes x, y, z in world axes: v_collector = rotation * v_world.
Eigen::Matrix3d world_to_collector(double elevation);

/// Pitch seen by the wind, wrapped into (-pi, pi]: 0 = concave face to the wind, pi/2 = zenith, pi = convex
/// back to the wind. Equals the elevation for wind from +Y and pi - elevation for wind from -Y.
double pitch_seen_by_wind(double elevation, double wind_from);

/// +1 when the wind comes from the +Y side (|psi| <= 90 deg), -1 from the -Y side.
int upwind_side(double wind_from);

/// Direction of the side coefficient's axis s (loads/coefficients.h) along collector y: -1 for wind from +Y,
/// +1 for wind from -Y, in every pose. Growing pitch is a positive rotation about +x for wind from +Y and a
/// negative one for wind from -Y, so Mx = upwind_side * Cm * q * W^2 * L.
int side_axis_along_y(double wind_from);

/// The angle brought into (-pi, pi].
double wrap_angle(double angle);

/// Angle between a dish's optical axis and the direction the wind comes from (unit vectors), 0 .. pi.
double dish_pitch(const Eigen::Vector3d& optical_axis, const Eigen::Vector3d& upwind);

/// Angle between the wind and the plane normal to the rotation axis, 0 .. pi/2.
double yaw(double wind_from);

/// Share of the cross-plane load left at a yaw angle: cos^2 up to 60 deg, 0.25 beyond (independence
/// principle, from memory, a standard approximation).
double yaw_factor(double yaw);

}  // namespace focalframe::loads
