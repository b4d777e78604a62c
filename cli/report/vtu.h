#pragma once

/// Frames and mirrors as VTK XML unstructured grids (.vtu, an open standard), ASCII, for any viewer that
/// reads them.

#include <string>

#include "models/portrait.h"

namespace focalframe::cli {

/// Members as lines in world axes in the state's pose, at rest; point data: displacement [m]; cell data:
/// axial [N], shear [N], torsion [N m], bending [N m], stress [Pa], group (number in order of appearance).
std::string frame_vtu(const models::Portrait& portrait, std::size_t state);

/// The mirror as quadrangles; point data: displacement [m], rotation about the row and about y [rad].
std::string mirror_vtu(const models::Portrait& portrait, std::size_t state);

}  // namespace focalframe::cli
