#include "cli/unit.h"

#include <cctype>
#include <cmath>
#include <numbers>
#include <utility>
#include <vector>

#include "cli/nearest.h"
#include "fem/units.h"

namespace focalframe::cli {
namespace {

constexpr Dimension length{1, 0, 0, 0, 0}, mass{0, 1, 0, 0, 0}, time{0, 0, 1, 0, 0}, kelvin{0, 0, 0, 1, 0},
    angle{0, 0, 0, 0, 1}, force{1, 1, -2, 0, 0}, pressure{-1, 1, -2, 0, 0}, speed{1, 0, -1, 0, 0},
    frequency{0, 0, -1, 0, 0}, area{2, 0, 0, 0, 0}, none{};

// Pound (avoirdupois), inch and standard gravity are exact by definition; the others follow from them.
constexpr double inch = 0.0254, foot = 0.3048, pound = 0.45359237, pound_force = pound * standard_gravity;

struct Known {
  const char* text;
  Unit unit;
};

const std::vector<Known>& known_units() {
  static const std::vector<Known> all{
      {"m", {1, 0, length}},
      {"mm", {1e-3, 0, length}},
      {"cm", {1e-2, 0, length}},
      {"dm", {1e-1, 0, length}},
      {"km", {1e3, 0, length}},
      {"um", {1e-6, 0, length}},
      {"µm", {1e-6, 0, length}},
      {"in", {inch, 0, length}},
      {"inch", {inch, 0, length}},
      {"inches", {inch, 0, length}},
      {"ft", {foot, 0, length}},
      {"feet", {foot, 0, length}},
      {"foot", {foot, 0, length}},
      {"yd", {3 * foot, 0, length}},
      {"mile", {1609.344, 0, length}},
      {"miles", {1609.344, 0, length}},
      {"ha", {1e4, 0, area}},
      {"kg", {1, 0, mass}},
      {"g", {1e-3, 0, mass}},
      {"lbm", {pound, 0, mass}},
      {"oz", {pound / 16, 0, mass}},
      {"slug", {pound_force / foot, 0, mass}},
      {"s", {1, 0, time}},
      {"sec", {1, 0, time}},
      {"ms", {1e-3, 0, time}},
      {"min", {60, 0, time}},
      {"h", {3600, 0, time}},
      {"hr", {3600, 0, time}},
      {"hour", {3600, 0, time}},
      {"hours", {3600, 0, time}},
      {"K", {1, 0, kelvin}},
      {"degC", {1, 273.15, kelvin}},
      {"°C", {1, 273.15, kelvin}},
      {"degF", {5.0 / 9, 459.67 * 5 / 9, kelvin}},
      {"°F", {5.0 / 9, 459.67 * 5 / 9, kelvin}},
      {"rad", {1, 0, angle}},
      {"mrad", {1e-3, 0, angle}},
      {"deg", {deg, 0, angle}},
      {"degree", {deg, 0, angle}},
      {"degrees", {deg, 0, angle}},
      {"°", {deg, 0, angle}},
      {"arcmin", {deg / 60, 0, angle}},
      {"arcsec", {deg / 3600, 0, angle}},
      {"rev", {2 * std::numbers::pi, 0, angle}},
      {"N", {1, 0, force}},
      {"daN", {10, 0, force}},
      {"kN", {1e3, 0, force}},
      {"MN", {1e6, 0, force}},
      {"lbf", {pound_force, 0, force}},
      {"kip", {1000 * pound_force, 0, force}},
      {"kips", {1000 * pound_force, 0, force}},
      {"kgf", {standard_gravity, 0, force}},
      {"kp", {standard_gravity, 0, force}},
      {"Pa", {1, 0, pressure}},
      {"hPa", {100, 0, pressure}},
      {"kPa", {1e3, 0, pressure}},
      {"MPa", {1e6, 0, pressure}},
      {"GPa", {1e9, 0, pressure}},
      {"bar", {1e5, 0, pressure}},
      {"mbar", {100, 0, pressure}},
      {"psi", {pound_force / (inch * inch), 0, pressure}},
      {"ksi", {1000 * pound_force / (inch * inch), 0, pressure}},
      {"psf", {pound_force / (foot * foot), 0, pressure}},
      {"mph", {1609.344 / 3600, 0, speed}},
      {"kph", {1 / 3.6, 0, speed}},
      {"kn", {1852.0 / 3600, 0, speed}},
      {"kt", {1852.0 / 3600, 0, speed}},
      {"knot", {1852.0 / 3600, 0, speed}},
      {"knots", {1852.0 / 3600, 0, speed}},
      {"fps", {foot, 0, speed}},
      {"Hz", {1, 0, frequency}},
      {"rpm", {2 * std::numbers::pi / 60, 0, {0, 0, -1, 0, 1}}},
      {"%", {1e-2, 0, none}},
  };
  return all;
}

std::optional<Unit> single(std::string_view text) {
  for (const Known& known : known_units())
    if (text == known.text) return known.unit;
  return std::nullopt;
}

// "kNm" = kN m, "lbfin" = lbf in: a force and a length written together, nothing else.
std::optional<std::pair<Unit, Unit>> force_and_length(std::string_view text) {
  for (std::size_t cut = 1; cut < text.size(); ++cut) {
    const auto first = single(text.substr(0, cut)), second = single(text.substr(cut));
    if (first && second && first->dimension == force && second->dimension == length)
      return std::pair(*first, *second);
  }
  return std::nullopt;
}

void multiply(Unit& product, const Unit& factor, int power) {
  product.factor *= std::pow(factor.factor, power);
  for (std::size_t i = 0; i < product.dimension.size(); ++i)
    product.dimension[i] += power * factor.dimension[i];
}

bool is_letter(char c) {
  return std::isalpha(static_cast<unsigned char>(c)) || static_cast<unsigned char>(c) >= 0x80 || c == '%';
}

// Reads "2", "^2", "**2", "²" at `at`; 1 when there is none.
int read_power(std::string_view text, std::size_t& at) {
  constexpr std::pair<std::string_view, int> superscripts[] = {{"²", 2}, {"³", 3}, {"⁴", 4}};
  for (const auto& [mark, power] : superscripts)
    if (text.substr(at, mark.size()) == mark) {
      at += mark.size();
      return power;
    }
  std::size_t digit = at;
  if (text.substr(digit, 1) == "^") ++digit;
  if (digit < text.size() && text[digit] >= '1' && text[digit] <= '9') {
    at = digit + 1;
    return text[digit] - '0';
  }
  return 1;
}

std::string_view read_word(std::string_view text, std::size_t& at) {
  const std::size_t start = at;
  while (at < text.size() && is_letter(text[at])) {
    const std::string_view rest = text.substr(at);
    if (rest.starts_with("²") || rest.starts_with("³") || rest.starts_with("⁴") || rest.starts_with("·"))
      break;
    ++at;
  }
  return text.substr(start, at - start);
}

}  // namespace

std::optional<Unit> parse_unit(std::string_view text) {
  if (text.size() > 40) return std::nullopt;
  if (const auto alone = single(text)) return alone;
  Unit product;
  bool divide = false, any = false, operand_due = true;
  for (std::size_t at = 0; at < text.size();) {
    const char c = text[at];
    if (c == ' ' || ((c == '*' || c == '-') && !operand_due)) {
      operand_due = operand_due || c != ' ';
      ++at;
    } else if (text.substr(at).starts_with("·") && !operand_due) {
      at += std::string_view("·").size();
      operand_due = true;
    } else if (c == '/' && !operand_due) {
      divide = operand_due = true;
      ++at;
    } else if (c == '1' && !any && text.substr(at + 1, 1) == "/") {
      any = true;
      operand_due = false;
      ++at;
    } else if (is_letter(c)) {
      const std::string_view word = read_word(text, at);
      if (word.empty()) return std::nullopt;
      if (const auto unit = single(word); unit && unit->offset == 0) {
        multiply(product, *unit, (divide ? -1 : 1) * read_power(text, at));
      } else if (const auto pair = force_and_length(word)) {
        multiply(product, pair->first, divide ? -1 : 1);
        multiply(product, pair->second, (divide ? -1 : 1) * read_power(text, at));
      } else {
        return std::nullopt;
      }
      any = true;
      operand_due = false;
    } else {
      return std::nullopt;
    }
  }
  if (!any || operand_due) return std::nullopt;
  return product;
}

std::string nearest_unit(std::string_view text, const Dimension& wanted) {
  std::vector<std::string> names;
  for (const Known& known : known_units())
    if (known.unit.dimension == wanted) names.push_back(known.text);
  return nearest_name(text, names);
}

}  // namespace focalframe::cli
