#pragma once

/// The assessment of a trough as JSON: schema "focalframe-trough-1", SI, units in the key names, everything
/// that is printed. Keys are listed in DEVELOPERS.md.

#include <string>

#include "models/assessment.h"
#include "models/trigger.h"

namespace focalframe::cli {

/// `trigger`: the stow trigger beside it, where it was looked for.
std::string trough_json(const models::Assessment& assessment, const std::string& hash,
                        const models::Trigger* trigger = nullptr);

}  // namespace focalframe::cli
