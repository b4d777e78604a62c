#pragma once

/// What is said when a value cannot be understood, and what was probably meant. Used by cli/quantity.cpp.

#include <optional>
#include <string>
#include <string_view>

#include "cli/quantity.h"
#include "cli/unit.h"

namespace focalframe::cli {

Dimension dimension_of(Quantity quantity);

/// White space, no-break spaces, true minus and vulgar fractions as plain characters; trimmed.
std::string plain_text(std::string_view raw);

/// Spellings that are refused before any number is read: empty, NaN, hex, decimal comma, digit groups, inch
/// marks, nominal pipe sizes, gauges. nullopt = none of them.
std::optional<ParsedQuantity> refuse_spelling(const std::string& text, Quantity quantity);

ParsedQuantity no_number(const std::string& text, Quantity quantity);
ParsedQuantity missing_unit(const std::string& text, Quantity quantity);
ParsedQuantity wrong_unit(const std::string& text, const std::string& unit, Quantity quantity);

}  // namespace focalframe::cli
