#pragma once

/// Forces and moments of a whole reflector (or module) from its coefficients: what the nodal loads must add
/// up to.

#include <Eigen/Core>

#include "loads/coefficients.h"

namespace focalframe::loads {

/// Along the optical axis (> 0: hollow to back), along the axis s of loads/coefficients.h, about the vertex
/// (> 0: towards larger pitch). Area: aperture width x length, or pi D^2 / 4; length: width or diameter.
struct ReflectorLoad {
  double axial = 0, side = 0;  ///< [N]
  double moment = 0;           ///< [N m]
};
struct Reference {
  double area = 0, length = 0;  ///< [m^2], [m]
};
ReflectorLoad reflector_load(const Coefficients& c, double pressure, const Reference& reference);

/// The same in world axes, cross-plane wind.
struct WorldLoad {
  Eigen::Vector3d force = Eigen::Vector3d::Zero();  ///< X, Y, Z [N]
  double moment_vertex = 0;                         ///< about +X through the vertex [N m]
  double moment_axis = 0;                           ///< about the rotation axis, parallel to X [N m]
};
struct Attitude {
  double elevation = 0, wind_from = 0;  ///< [rad]
  double axis_behind = 0;               ///< rotation axis behind the vertex, along the optical axis [m]
};
WorldLoad world_load(const ReflectorLoad& load, const Attitude& attitude);

}  // namespace focalframe::loads
