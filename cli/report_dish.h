#pragma once

/// The assessment of a dish in words: one screen of 80 x 24, or everything.

#include <string>

#include "models/dish_assessment.h"

namespace focalframe::cli {

std::string dish_summary_text(const models::DishAssessment& assessment, const std::string& hash);
/// Greatest gusts at rest by pose and direction, and where to park.
std::string dish_parking_text(const models::DishAssessment& assessment);
std::string dish_detail_text(const models::DishAssessment& assessment);

}  // namespace focalframe::cli
