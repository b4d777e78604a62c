#pragma once

/// `focalframe check` and `modes` of a dish.

#include "cli/commands.h"
#include "cli/design_file.h"

namespace focalframe::cli {

/// The design is sound (no STOP). `warnings`: WARN messages already printed about it.
int run_dish_check(const DesignFile& design, const DesignCommand& command, int warnings);
/// Greatest gusts at rest, pose by pose, and where it parks best.
int run_dish_stow(const DesignFile& design, const DesignCommand& command);
int run_dish_modes(const DesignFile& design, const DesignCommand& command);

}  // namespace focalframe::cli
