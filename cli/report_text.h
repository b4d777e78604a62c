#pragma once

/// The assessment of a trough in words: one screen of 80 x 24, or everything.

#include <string>

#include "models/assessment.h"

namespace focalframe::cli {

/// Sentence first, then the four questions, what would help, how the wind was made, proof, caution. ASCII
/// only.
std::string summary_text(const models::Assessment& assessment, const std::string& hash);

/// Only the verdict line.
std::string verdict_line(const models::Assessment& assessment);

}  // namespace focalframe::cli
