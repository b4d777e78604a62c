#pragma once

#include <optional>

#include "fem/frame.h"
#include "fem/mechanism.h"

namespace focalframe::fem {

/// The softest motion of a frame that has a solution although its smallest pivot lies below 1e-7 of its
/// diagonal: a slip in the model more often than meant, but also true of very long and slender frames. None
/// when every pivot is above. The frame is sound and no mechanism.
std::optional<Mechanism> near_mechanism(const Frame& frame);

}  // namespace focalframe::fem
