#pragma once

/// `check` and `modes` for kind="frame".

#include "cli/commands.h"
#include "cli/design_file.h"

namespace focalframe::cli {

/// `design` has no STOP. Prints a short table per case, writes JSON, returns the exit code.
int run_frame_check(const DesignFile& design, const DesignCommand& command);
int run_frame_modes(const DesignFile& design, const DesignCommand& command);

}  // namespace focalframe::cli
