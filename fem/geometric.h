#pragma once

/// Geometric stiffness: how forces already in the frame help or hinder small further motions.
///
/// From the second-order energy of the shear-flexible spatial beam with rotation-vector freedoms,
///   n . (-theta x u' + theta x (theta x e_x) / 2) - m . (theta x theta') / 2,  n = (N, Vy, Vz), m = (T, My,
///   Mz),
/// so that axial force, both moments, torsion and shear all take part and moments of members that meet at an
/// angle stay consistent. The part of N is written N (v'^2 + w'^2) / 2 (Engesser's choice for the shear
/// angle) with N (Iy + Iz) / (2 A) theta_x'^2 added for the fibres off the axis. Applied moments are
/// semitangential.
///
/// What passes through a joint, spring, release or end spring turns with it: a held or sprung rotation is a
/// component of the relative rotation theta_B - theta_A - theta_A x theta_B / 2 of the two sides A and B in
/// their own axes (exact to second order), a held displacement one of u_B - u_A in axes that turn with the
/// mean of both sides.

#include "fem/beam.h"
#include "fem/statics.h"

namespace focalframe::fem {

/// Over node freedoms of one member, the arms of its offsets included [N/m, N, N m].
Mat12 geometric_stiffness(const Frame& frame, const LoadCase& load, const Response& response, int member);

/// Sum over members, offset point masses under `load.gravity` and spring arms, 6 #nodes square.
SparseMatrix assemble_geometric_stiffness(const Frame& frame, const LoadCase& load, const Response& response);

}  // namespace focalframe::fem
