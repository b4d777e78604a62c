#pragma once

/// Parts that the JSON of troughs and dishes share.

#include <nlohmann/json_fwd.hpp>

#include "models/assessment.h"

namespace focalframe::cli {

nlohmann::ordered_json number_json(double value);  ///< null when not computed
nlohmann::ordered_json criterion_json(const models::Criterion& criterion);
nlohmann::ordered_json winds_json(const models::Assessment& assessment);

}  // namespace focalframe::cli
