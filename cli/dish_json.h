#pragma once

#include <string>

#include "models/dish_assessment.h"

namespace focalframe::cli {

/// Schema focalframe-dish-1: SI, unit in the key, null = not computed.
std::string dish_json(const models::DishAssessment& assessment, const std::string& hash);

}  // namespace focalframe::cli
