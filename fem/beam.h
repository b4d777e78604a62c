#pragma once

/// One straight, prismatic, shear-flexible member between two nodes of a frame.
///
/// Vectors of 12: from-node ux..rz, to-node ux..rz. "Node freedoms" are in frame axes at the nodes (offsets
/// and releases are inside); "end forces" are in member axes at the member's own ends, forces acting *on* the
/// member.

#include "fem/frame.h"
#include "fem/load_case.h"

namespace focalframe::fem {

using Vec12 = Eigen::Matrix<double, 12, 1>;
using Mat12 = Eigen::Matrix<double, 12, 12>;
using Mat6x12 = Eigen::Matrix<double, 6, 12>;

double member_length(const Frame& frame, int member);
/// Rows = member x, y, z in frame axes.
Mat3 member_axes(const Frame& frame, int member);

/// Stiffness over node freedoms, releases and end springs condensed inside.
Mat12 stiffness(const Frame& frame, int member);
/// Consistent mass over node freedoms [kg, kg m, kg m^2].
Mat12 consistent_mass(const Frame& frame, int member);

/// end force = end_force_matrix * (node freedoms) + fixed_end_force(case).
Mat12 end_force_matrix(const Frame& frame, int member);
/// Forces on the member's ends when its nodes are held, for everything in `load` that acts on this member
/// (gravity included) [N, N m], member axes.
Vec12 fixed_end_force(const Frame& frame, int member, const LoadCase& load);

/// Motion of the member's axis at fraction xi (0..1), as a linear function of the node freedoms: rows
/// ux uy uz rx ry rz in frame axes. Displacements are the exact solution of the unloaded shear-flexible beam;
/// rotations are those of the axis (derivatives), `of_section` gives those of the cross-section instead.
/// For members with releases or end springs the condensed end motions are used.
Mat6x12 motion_at(const Frame& frame, int member, double xi, bool of_section = false);

}  // namespace focalframe::fem
