#pragma once

/// The assessment of a trough in words: one screen of 80 x 24, or everything.

#include <string>

#include "models/assessment.h"

namespace focalframe::cli {

/// Sentence first, then the four questions, what would help, how the wind was made, proof, caution. ASCII
/// only.
std::string summary_text(const models::Assessment& assessment, const std::string& hash);

/// The four questions with their criteria; `after_focus` follows the first one's.
std::string questions_text(const models::Assessment& assessment, const std::string& after_focus);

/// Mean and gust at the axis in the OPERATE wind.
std::string wind_line(const models::Assessment& assessment);

/// Only the verdict line.
std::string verdict_line(const models::Assessment& assessment);

}  // namespace focalframe::cli
