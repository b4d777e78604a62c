#pragma once

/// The builder of a trough row: torque tube, plate ribs, purlins, mirror, receiver on hinged posts, end
/// plates, pylons.

#include "models/collector.h"
#include "models/trough_layout.h"

namespace focalframe::models {

/// Builds the row of a valid design (see validate in models/schema.h). `refine` multiplies the beam elements
/// along every rib arm; everything else stays.
///
/// - Modules are separate between pylons. At a pylon the two tube ends share their displacement;
/// `twist-stiffness` acts
///   between their rotations about x, except at the drive, whose flange takes both ends rigidly. Bending is
///   released with coupling "torque-only".
/// - Bearings hold y and z; the drive pylon also holds x and, through the drive, the rotation about x.
/// - Posts are hinged about y at both ends; the receiver is held along x by one bracket at the post next to
/// the drive.
/// - Mirror, receiver content and glass are masses only; a mirror carries no frame load.
Collector build_trough(const TroughDesign& design, int refine = 1);

}  // namespace focalframe::models
