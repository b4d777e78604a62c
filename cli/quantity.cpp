#include "cli/quantity.h"

#include <algorithm>
#include <array>
#include <charconv>
#include <cmath>
#include <optional>

#include "cli/nearest.h"
#include "cli/quantity_problem.h"
#include "cli/unit.h"

namespace focalframe::cli {
namespace {

bool is_digit(char c) { return c >= '0' && c <= '9'; }
bool is_letter(char c) {
  return (c >= 'a' && c <= 'z') || (c >= 'A' && c <= 'Z') || static_cast<unsigned char>(c) >= 0x80;
}

// No quantity of a frame needs more in any unit; beyond it sums and squares stop being numbers.
constexpr double greatest_number = 1e15;

// Reads a plain number at `at`; from_chars alone would also take "inf" and "nan".
std::optional<double> read_number(std::string_view text, std::size_t& at) {
  if (at >= text.size() ||
      !(is_digit(text[at]) || (text[at] == '.' && at + 1 < text.size() && is_digit(text[at + 1]))))
    return std::nullopt;
  double value = 0;
  const auto [end, error] = std::from_chars(text.data() + at, text.data() + text.size(), value);
  if (error != std::errc() || value > greatest_number) return std::nullopt;
  at = static_cast<std::size_t>(end - text.data());
  return value;
}

std::optional<double> read_whole(std::string_view text, std::size_t& at) {
  int value = 0;
  const auto [end, error] = std::from_chars(text.data() + at, text.data() + text.size(), value);
  if (error != std::errc() || end == text.data() + at || !is_digit(text[at])) return std::nullopt;
  at = static_cast<std::size_t>(end - text.data());
  return value;
}

// "3/8", "1 1/2", "1-1/2" after the whole number already read (`whole` starts at `start`).
std::optional<double> read_fraction(std::string_view text, std::size_t start, std::size_t& at, double whole) {
  const std::string_view digits = text.substr(start, at - start);
  if (!std::all_of(digits.begin(), digits.end(), is_digit)) return std::nullopt;
  std::size_t after = at;
  double top = whole, base = 0;
  if (after < text.size() && (text[after] == ' ' || text[after] == '-')) {
    ++after;
    const auto numerator = read_whole(text, after);
    if (!numerator) return std::nullopt;
    base = whole;
    top = *numerator;
  }
  if (after >= text.size() || text[after] != '/') return std::nullopt;
  ++after;
  const auto bottom = after < text.size() ? read_whole(text, after) : std::nullopt;
  if (!bottom || *bottom == 0) return std::nullopt;
  at = after;
  return base + top / *bottom;
}

// A digit that begins the next number of a sum ("7 ft 10 in") and not a power or the 1 of "1/rad".
bool begins_number(std::string_view text, std::size_t at) {
  if (!is_digit(text[at]) || at == 0 || text[at - 1] != ' ') return false;
  std::size_t before = at;
  while (before > 0 && text[before - 1] == ' ') --before;
  if (before > 0 && (text[before - 1] == '/' || text[before - 1] == '^' || text[before - 1] == '*'))
    return false;
  std::size_t end = at;
  while (end < text.size() && is_digit(text[end])) ++end;
  return !(end + 1 < text.size() && text[end] == '/' && is_letter(text[end + 1]));
}

struct Term {
  double number = 0;
  std::string unit;
};

struct Sum {
  bool negative = false;
  std::vector<Term> terms;
};

std::string trimmed(std::string_view text) {
  while (!text.empty() && text.front() == ' ') text.remove_prefix(1);
  while (!text.empty() && text.back() == ' ') text.remove_suffix(1);
  return std::string(text);
}

std::optional<Sum> read_sum(std::string_view text) {
  Sum sum;
  std::size_t at = 0;
  if (!text.empty() && (text[0] == '-' || text[0] == '+')) {
    sum.negative = text[0] == '-';
    ++at;
    while (at < text.size() && text[at] == ' ') ++at;
  }
  while (at < text.size()) {
    const std::size_t start = at;
    const auto number = read_number(text, at);
    if (!number) return std::nullopt;
    Term term{*number, {}};
    if (const auto fraction = read_fraction(text, start, at, *number)) term.number = *fraction;
    const std::size_t unit_start = at;
    while (at < text.size() && (at == unit_start || !begins_number(text, at))) ++at;
    term.unit = trimmed(text.substr(unit_start, at - unit_start));
    if (term.unit.starts_with('/')) term.unit.insert(0, "1");
    sum.terms.push_back(std::move(term));
  }
  if (sum.terms.empty()) return std::nullopt;
  return sum;
}

ParsedQuantity parse_count(const std::string& text) {
  ParsedQuantity result;
  const std::size_t skip = text.starts_with('+') ? 1 : 0;
  int value = 0;
  const auto [end, error] = std::from_chars(text.data() + skip, text.data() + text.size(), value);
  if (error == std::errc() && end == text.data() + text.size() && text.size() > skip) {
    result.value = value;
    return result;
  }
  result.problem = "A count is a whole number without a unit.";
  std::size_t at = 0;
  if (const auto number = read_number(text, at); number && *number < 1e6)
    result.suggestions = {number_text(std::round(*number))};
  return result;
}

ParsedQuantity value_of(const Sum& sum, const std::string& text, Quantity quantity) {
  const Dimension wanted = dimension_of(quantity);
  ParsedQuantity result;
  double total = 0, last_factor = 0;
  for (const Term& term : sum.terms) {
    if (term.unit.empty() && (wanted != Dimension{} || sum.terms.size() > 1))
      return missing_unit(text, quantity);
    const auto unit = term.unit.empty() ? std::optional<Unit>(Unit{}) : parse_unit(term.unit);
    if (!unit || unit->dimension != wanted) return wrong_unit(text, term.unit, quantity);
    if (quantity == Quantity::temperature_change && unit->offset != 0) {
      result.problem = "This is a difference of two temperatures, which is given in K.";
      const double kelvin = (sum.negative ? -1 : 1) * term.number * unit->factor;
      result.suggestions = {number_text(kelvin) + " K"};
      return result;
    }
    const bool summand = sum.terms.size() > 1;
    if (summand && (unit->offset != 0 || (last_factor > 0 && unit->factor >= last_factor))) {
      result.problem =
          "Several numbers in one value are added, so each unit must be smaller than the one before.";
      return result;
    }
    last_factor = unit->factor;
    total += term.number * unit->factor;
    if (unit->offset != 0) total = (sum.negative ? -1 : 1) * term.number * unit->factor + unit->offset;
    if (unit->offset != 0 && sum.negative) total = -total;
  }
  result.value = sum.negative ? -total : total;
  if (!std::isfinite(result.value)) {
    result.value = std::numeric_limits<double>::quiet_NaN();
    result.problem = "The number is too large to work with.";
  }
  return result;
}

}  // namespace

ParsedQuantity parse_quantity(std::string_view raw, Quantity quantity) {
  const std::string text = plain_text(raw);
  if ((quantity == Quantity::stiffness || quantity == Quantity::twist_stiffness) && text == "rigid")
    return {.value = std::numeric_limits<double>::infinity(), .problem = {}, .suggestions = {}};
  if (auto refused = refuse_spelling(text, quantity)) return *refused;
  if (quantity == Quantity::count) return parse_count(text);
  const auto sum = read_sum(text);
  if (!sum) return no_number(text, quantity);
  return value_of(*sum, text, quantity);
}

std::pair<std::string, std::string> split_number(std::string_view raw) {
  const std::string text = plain_text(raw);
  std::size_t at = text.starts_with('-') || text.starts_with('+') ? 1 : 0;
  const std::size_t start = at;
  const auto number = read_number(text, at);
  if (!number) return {"", text};
  read_fraction(text, start, at, *number);
  return {text.substr(0, at), trimmed(std::string_view(text).substr(at))};
}

}  // namespace focalframe::cli
