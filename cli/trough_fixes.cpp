#include "cli/trough_fixes.h"

#include <algorithm>
#include <set>
#include <utility>

#include "cli/nearest.h"

namespace focalframe::cli {
namespace {

using models::Element;
using models::Field;
using models::Violation;

using Place = std::pair<std::string, std::string>;  // element, attribute

std::set<Place> broken_places(const models::TroughDesign& design, Violation::Level worst) {
  std::set<Place> places;
  for (const Violation& v : models::validate(design))
    if (v.level == Violation::Level::stop || v.level == worst) places.insert({v.element, v.attribute});
  return places;
}

bool customary(const std::string& unit) {
  for (const char* part : {"in", "ft", "lbf", "lbm", "psi", "ksi", "degF"})
    if (unit.starts_with(part)) return true;
  return false;
}

// Whether one unit is written where the other is meant: people slip by thousands within their own units, and
// with speeds and heights also between them.
bool plausible(const Field& field, const std::string& unit, const std::string& other) {
  if (field.quantity == Quantity::speed) return true;
  if (field.quantity == Quantity::angle)
    return field.most <= 0.3 || other == "deg";  // elevations are in degrees
  if (field.quantity == Quantity::length && field.most >= 200) return other == "m" || other == "ft";
  return other != "cm" && customary(unit) == customary(other);
}

// The same number with other units, and without its sign.
std::vector<std::string> other_readings(const Field& field, const std::string& raw) {
  std::vector<std::string> values;
  const auto [number, unit] = split_number(raw);
  if (field.quantity == Quantity::none || field.quantity == Quantity::count || number.empty()) {
    if (field.quantity == Quantity::count && number.starts_with('-')) values.push_back(number.substr(1));
    return values;
  }
  for (const std::string& other : common_units(field.quantity))
    if (other != unit && plausible(field, unit, other)) values.push_back(number + " " + other);
  if (number.starts_with('-') && field.least >= 0)
    values.push_back(number.substr(1) + (unit.empty() ? "" : " " + unit));
  return values;
}

// `attribute="value"` -> {attribute, value}.
std::pair<std::string, std::string> parted(const std::string& assignment) {
  const std::size_t equals = assignment.find("=\"");
  if (equals == std::string::npos) return {};
  return {assignment.substr(0, equals), assignment.substr(equals + 2, assignment.size() - equals - 3)};
}

bool passes(const Element& element, const Field& field, const std::string& value, const Violation& v,
            const models::TroughDesign& design) {
  models::TroughDesign trial = design;
  if (!set_field(element, field, value, trial).problem.empty()) return false;
  const std::set<Place> before = broken_places(design, v.level), after = broken_places(trial, v.level);
  if (after.count({v.element, v.attribute})) return false;
  return std::includes(before.begin(), before.end(), after.begin(), after.end());
}

}  // namespace

std::vector<std::string> passing_values(const std::string& element_path, const std::string& attribute,
                                        const std::vector<std::string>& values,
                                        const models::TroughDesign& design) {
  std::vector<std::string> passing;
  const Element* element = models::find_element(element_path);
  const Field* field = element ? models::find_field(*element, attribute) : nullptr;
  if (!field || values.empty()) return passing;
  Violation here;
  here.element = element_path;
  here.attribute = attribute;
  for (const std::string& value : values)
    if (passes(*element, *field, value, here, design)) passing.push_back(value);
  return passing;
}

std::vector<std::string> passing_fixes(const Violation& v, const TroughText& text) {
  if (v.missing || !v.advice.empty()) return {};
  if (const auto [attribute, value] = parted(v.likely); !attribute.empty()) {
    const auto ways = passing_values(v.element, attribute, {value}, text.design);
    return ways.empty() ? std::vector<std::string>{} : std::vector<std::string>{v.likely};
  }
  std::vector<std::string> keys{v.element + "/" + v.attribute};
  keys.insert(keys.end(), v.involves.begin(), v.involves.end());
  for (const std::string& key : keys) {
    const auto raw = text.raw.find(key);
    const std::size_t slash = key.rfind('/');
    const Element* element =
        slash == std::string::npos ? nullptr : models::find_element(key.substr(0, slash));
    const Field* field = element ? models::find_field(*element, key.substr(slash + 1)) : nullptr;
    if (raw == text.raw.end() || !field) continue;
    std::vector<std::string> values = other_readings(*field, raw->second);
    if (field->quantity == Quantity::none)
      if (const std::string near = nearest_name(with_roman_digit(raw->second), field->words); !near.empty())
        values.push_back(near);
    std::vector<std::string> fixes;
    for (const std::string& value : values)
      if (passes(*element, *field, value, v, text.design))
        fixes.push_back((element->path == v.element ? "" : leaf(element->path) + " ") + field->name + "=\"" +
                        value + "\"");
    if (!fixes.empty()) return fixes;
  }
  return {};
}

}  // namespace focalframe::cli
