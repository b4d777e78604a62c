#pragma once

#include "models/design.h"

namespace focalframe::models {

/// Whether two designs build the same frame, stands and skin: everything that decides how the row moves under
/// given loads. They may differ in site, wind, operation, optics, sensor, limits and the drive's ratings.
bool same_frame(const TroughDesign& a, const TroughDesign& b);

}  // namespace focalframe::models
