#pragma once

/// Angles and channels: open thin-walled sections, weak in torsion. Their shear centre does not lie at the
/// centroid; member axes run through the centroid, so loads that should not twist the member must be given
/// the moment of that distance.

#include "fem/section.h"

namespace focalframe::fem {

struct Angle {
  double leg_z = 0;                        ///< outer length of the leg along z' [m]
  double leg_y = 0;                        ///< outer length of the leg along y' [m]
  double thickness = 0;                    ///< [m]
  double root_radius = 0, toe_radius = 0;  ///< [m]
};

/// Section in principal axes: y is the axis of the greatest second moment. Turning the member axes y, z by
/// -tilt about x gives y', z' along the legs (both legs point to positive y' and z' from the heel).
struct AngleSection {
  Section section;
  double tilt = 0;                        ///< from y' to y, positive about x [rad]
  double Iy_leg = 0, Iz_leg = 0;          ///< about the centroid, axes along the legs [m^4]
  double centroid_y = 0, centroid_z = 0;  ///< from the heel, along y' and z' [m]
};
/// A, second moments and tilt exact for the outline with root and toe radii. J = sum of b t^3 / 3 over both
/// legs, for legs of at least 5 t: it leaves the root fillet out, which puts it some 10 % below handbooks for
/// rolled angles, on the safe side for twist. Shear areas from the shear flow in thin walls, I^2 / int (Q^2 /
/// t) ds along the middle line (5/12 A for equal legs), for the same legs. Moduli from the sharp corners.
AngleSection angle(const Angle& size);

struct Channel {
  double depth_z = 0;          ///< outer depth along the web [m]
  double flange_y = 0;         ///< outer width of the flanges [m]
  double web = 0, flange = 0;  ///< thicknesses [m]
};
/// Web normal to y, flanges to positive y.
struct ChannelSection {
  Section section;
  double centroid_y = 0;      ///< from the back of the web [m]
  double shear_centre_y = 0;  ///< from the centroid, negative: behind the web [m]
};
/// Sharp corners; A and second moments exact. J = sum of b t^3 / 3, for parts of at least 5 t, some 10 %
/// below tables of rolled channels, whose fillets it leaves out. Shear areas from the shear flow in thin
/// walls as for the angle, shear centre of the middle line.
ChannelSection channel(const Channel& size);

}  // namespace focalframe::fem
