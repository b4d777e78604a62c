#pragma once

/// `frame` for kind="trough".

#include "cli/commands.h"
#include "cli/design_file.h"

namespace focalframe::cli {

/// The design is sound. Returns the exit code.
int write_trough_frame(const DesignFile& design, const FrameCommand& command);

}  // namespace focalframe::cli
