#pragma once

/// The words of a dish's design file, as data like models/schema.h. Its slots may only be used on a
/// DishDesign.

#include "loads/coefficients.h"
#include "models/dish_design.h"
#include "models/schema.h"

namespace focalframe::models {

/// Elements that mean the same are those of the trough's table.
const std::vector<Element>& dish_schema();
const Element* find_dish_element(const std::string& path);  ///< nullptr when there is none

/// Repeated elements (ring, bracing, accept): fields point into the last entry.
std::size_t entries(const std::string& path, const DishDesign& design);
void keep_entries(const std::string& path, DishDesign& design, std::size_t count);

/// False while the field holds what a default-constructed design holds.
bool is_given_in_dish(const Field& field, const DishDesign& design);

/// Everything that is wrong or doubtful, all at once. The element of the second ring is "ring#2".
std::vector<Violation> validate_dish(const DishDesign& design);

/// A table of the wrong kind, or one that does not cover every asked pose.
std::vector<Violation> dish_wind_rules(const DishDesign& design, const loads::CoefficientTable& table);

}  // namespace focalframe::models
