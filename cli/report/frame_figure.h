#pragma once

/// Drawings of the frame itself: three views and an oblique one, at rest and moved.

#include "cli/report/figures.h"
#include "models/portrait.h"

namespace focalframe::cli {

/// One state, motions drawn `scale` times larger.
Figure frame_figure(const models::Portrait& portrait, std::size_t state, double scale);

}  // namespace focalframe::cli
