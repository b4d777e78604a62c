#pragma once

/// A torque member built from four chords and laced faces.

#include <vector>

#include "models/body_maker.h"
#include "models/trough_layout.h"

namespace focalframe::models {

/// Torsional stiffness [N m^2] of a long lattice box with hinged lacing, by virtual work with the closed
/// shear flow q = T / (2 b h): a diagonal of length d carries q d (two crossed ones half of it each), chords
/// and frames nothing, so GJ = 4 b^2 h^2 E a n / sum over the four faces of (d^3 / A); n = 1 or 2 diagonals
/// per panel. The diagonal term of the equivalent wall of Kollbrunner and Basler, Torsion in Structures (from
/// memory).
double lattice_box_torsion(double depth, double width, double panel, double web_area, double E, bool crossed);

/// The same for the design's box, panels between ribs; NaN when the torque tube is no lattice box.
double lattice_box_torsion(const TroughDesign& design, const TroughLayout& layout);

/// Adds one module's box between its two end nodes on the rotation axis and returns the centre nodes at the
/// ribs, in order. `to_tube`: from an end node to the box's axis.
/// - Chords run through; lacing and the frames' four sides are welded to them. End frames are rigid plates.
/// - At every rib a hub ties the four chords: in the frame's plane as stiff as its sides, along the row only
///   as stiff as their bending, so that the section may warp.
std::vector<int> add_torque_box(const TroughDesign& design, const TroughLayout& layout, BodyMaker& make,
                                int module, int start, int end, const fem::Vec3& to_tube);

}  // namespace focalframe::models
