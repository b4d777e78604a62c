#pragma once

/// The screen of `focalframe stow`, and its details.

#include <string>

#include "models/design.h"
#include "models/stow_report.h"

namespace focalframe::cli {

/// "drive cannot move", "light below 97 %", "tube bay 3 of module 6 yields" ...
std::string limit_phrase(const models::CriterionLimit& limit, const models::TroughDesign& design);

/// First line of the verdict: "STOW when the 1 min mean at 6 m reaches 8.7 m/s, or one 3 s gust 14.0 m/s".
std::string trigger_line(const models::Trigger& trigger);

/// One line for the end of a check: trigger, what governs it, and the command that says more.
std::string stow_headline(const models::Trigger& trigger, const models::TroughDesign& design);

/// 80 columns, about 30 lines.
std::string stow_text(const models::StowReport& report, const models::TroughDesign& design,
                      const std::string& hash);

/// --verbose: the whole map, every criterion's own limit, ways, price curve, sensitivity, reminders.
std::string stow_detail(const models::StowReport& report, const models::TroughDesign& design);

}  // namespace focalframe::cli
