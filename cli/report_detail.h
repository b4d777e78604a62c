#pragma once

/// Everything behind the summary, for --verbose.

#include <string>

#include "models/assessment.h"

namespace focalframe::cli {

/// Axes in words, mass and balance, the wind chain step by step, optics of every pose, stresses, drive torque
/// over elevation, ground loads, every cure, guesses, what was not checked, all cautions. ASCII, 80 columns.
std::string detail_text(const models::Assessment& assessment);

/// The wind, step by step, and the coefficient table.
std::string wind_chain_text(const models::Assessment& assessment);
/// What was not judged and not checked, and the cautions.
std::string closing_text(const models::Assessment& assessment);

}  // namespace focalframe::cli
