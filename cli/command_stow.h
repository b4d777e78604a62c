#pragma once

/// `focalframe stow`: wind limits, the stow trigger and its price.

#include "cli/commands.h"
#include "cli/design_file.h"

namespace focalframe::cli {

/// The design is sound (no STOP). Exit 0 when every asked state holds and a trigger exists, else 1.
int run_trough_stow(const DesignFile& design, const DesignCommand& command);

}  // namespace focalframe::cli
