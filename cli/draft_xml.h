#pragma once

/// Design values back to the words of the file; used by the starter designs.

#include <string>
#include <vector>

#include "models/schema.h"

namespace focalframe::cli {

/// A number as a user would write it into this field, with its unit.
std::string value_text(double value, const models::Field& field);

/// What the field holds, likewise; empty when it holds nothing.
std::string field_text(const models::Field& field, const models::TroughDesign& design);

/// ` name="value"` for those of `attributes` that are given, then basis; all given ones when empty.
std::string attributes_text(const std::string& path, const models::TroughDesign& design,
                            const std::vector<std::string>& attributes = {});

}  // namespace focalframe::cli
