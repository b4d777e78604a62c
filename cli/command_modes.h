#pragma once

/// `modes` for kind="trough".

#include "cli/commands.h"
#include "cli/design_file.h"

namespace focalframe::cli {

/// Frequencies and buckling factors looking at the zenith and, when stated, in stow. The design is sound.
int run_trough_modes(const DesignFile& design, const DesignCommand& command);

}  // namespace focalframe::cli
