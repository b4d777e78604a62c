#include "cli/draft_xml.h"

#include <algorithm>
#include <array>
#include <cmath>
#include <cstdio>

#include "cli/escaped.h"
#include "cli/quantity.h"
#include "fem/units.h"

namespace focalframe::cli {
namespace {

// Enough digits that reading gives the same design, none that only show round-off.
std::string plain(double value) {
  std::array<char, 64> buffer{};
  std::snprintf(buffer.data(), buffer.size(), "%.8g", value == 0 ? 0.0 : value);
  return buffer.data();
}

}  // namespace

std::string value_text(double value, const models::Field& field) {
  if (std::isinf(value)) return "rigid";
  switch (field.quantity) {
    case Quantity::ratio:
      return plain(value);
    case Quantity::length:
      return std::abs(value) < 0.5 ? plain(value / mm) + " mm" : plain(value) + " m";
    case Quantity::angle:
      return field.most > 0.3 ? plain(value / deg) + " deg" : plain(value / mrad) + " mrad";
    case Quantity::turning_rate:
      return plain(value / deg) + " deg/s";
    case Quantity::time:
      return value >= 3600 ? plain(value / 3600) + " h"
             : value >= 60 ? plain(value / 60) + " min"
                           : plain(value) + " s";
    case Quantity::temperature:
      if (field.most <= 200) return plain(value) + " K";  // a difference
      return plain(value - 273.15) + " degC";
    case Quantity::area:
      return plain(value / (mm * mm)) + " mm2";
    case Quantity::section_modulus:
      return plain(value / (mm * mm * mm)) + " mm3";
    case Quantity::area_moment:
      return plain(value / (mm * mm * mm * mm)) + " mm4";
    case Quantity::torque:
      return std::abs(value) >= 1e3 ? plain(value / kN) + " kN m" : plain(value) + " N m";
    case Quantity::force:
      return std::abs(value) >= 1e3 ? plain(value / kN) + " kN" : plain(value) + " N";
    case Quantity::stiffness:
      return std::abs(value) >= 1e6 ? plain(value / MN) + " MN/m" : plain(value / kN) + " kN/m";
    case Quantity::twist_stiffness:
      return std::abs(value) >= 1e6 ? plain(value / MN) + " MN m/rad" : plain(value / kN) + " kN m/rad";
    default: {
      const auto units = common_units(field.quantity);
      return units.empty() ? plain(value) : plain(value) + " " + units.front();
    }
  }
}

std::string field_text(const models::Field& field, const models::TroughDesign& design) {
  models::TroughDesign copy = design;
  if (field.word_slot && !field.word_slot(copy)->empty()) return *field.word_slot(copy);
  const models::Slot slot = field.slot(copy);
  if (const auto* number = std::get_if<double*>(&slot))
    return std::isnan(**number) ? "" : value_text(**number, field);
  if (const auto* count = std::get_if<int*>(&slot)) return std::to_string(**count);
  if (const auto* yes = std::get_if<bool*>(&slot)) return **yes ? "yes" : "no";
  return *std::get<std::string*>(slot);
}

std::string attributes_text(const std::string& path, const models::TroughDesign& design,
                            const std::vector<std::string>& attributes) {
  const models::Element& element = *models::find_element(path);
  std::string result;
  for (const models::Field& field : element.fields) {
    const bool named = std::find(attributes.begin(), attributes.end(), field.name) != attributes.end();
    if (!named && !(attributes.empty() && models::is_given(field, design))) continue;
    const std::string value = field_text(field, design);
    if (!value.empty()) result += " " + field.name + "=\"" + escaped(value) + "\"";
  }
  if (const auto basis = design.basis.find(path); basis != design.basis.end())
    result += " basis=\"" + basis->second + "\"";
  return result;
}

}  // namespace focalframe::cli
