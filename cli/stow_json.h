#pragma once

#include <string>

#include "models/stow_report.h"

namespace focalframe::cli {

/// Schema "focalframe-stow-1": SI, units in the keys, null = not computed or no limit up to 100 m/s of gust.
std::string stow_json(const models::StowReport& report, const std::string& hash);

}  // namespace focalframe::cli
