#pragma once

#include "models/optics_check.h"

namespace focalframe::models {

/// `m` less the motion in which the mirror was set true; the panels' own motions stay as they are.
OpticalMotion against(OpticalMotion m, const OpticalMotion& set);

}  // namespace focalframe::models
