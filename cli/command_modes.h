#pragma once

/// `modes` for kind="trough".

#include <string>
#include <vector>

#include "cli/commands.h"
#include "cli/design_file.h"
#include "models/row_modes.h"

namespace focalframe::cli {

/// Frequencies and buckling factors looking at the zenith and, when stated, in stow. The design is sound.
int run_trough_modes(const DesignFile& design, const DesignCommand& command);

/// The same of any collector, pose by pose, in words and as JSON (schema focalframe-modes-1).
std::string stability_text(const std::string& name, const std::vector<models::RowStability>& poses);
std::string stability_json(const std::string& name, const std::vector<models::RowStability>& poses);

}  // namespace focalframe::cli
