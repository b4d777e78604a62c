#include "cli/quantity_problem.h"

#include <algorithm>
#include <cctype>
#include <cmath>
#include <numbers>
#include <utility>

#include "cli/nearest.h"
#include "models/catalogue.h"

namespace focalframe::cli {
namespace {

bool is_digit(char c) { return c >= '0' && c <= '9'; }

std::string lower(std::string text) {
  for (char& c : text) c = static_cast<char>(std::tolower(static_cast<unsigned char>(c)));
  return text;
}

void replace_all(std::string& text, std::string_view from, std::string_view to) {
  for (std::size_t at = text.find(from); at != std::string::npos; at = text.find(from, at + to.size()))
    text.replace(at, from.size(), to);
}

ParsedQuantity problem(std::string text, std::vector<std::string> suggestions = {}) {
  ParsedQuantity result;
  result.problem = std::move(text);
  result.suggestions = std::move(suggestions);
  return result;
}

std::string wanted_units(Quantity quantity) {
  const std::string units = quantity_units(quantity);
  if (quantity == Quantity::ratio) return "A plain number or per cent is wanted here.";
  return units.empty() ? "A whole number is wanted here."
                       : quantity_name(quantity) + " is wanted here, in " + units + ".";
}

// "2,4 m", "2.400,5 m", "1,200 mm", "1.200.000 Pa", "2 400 mm".
std::optional<ParsedQuantity> refuse_grouping(const std::string& text) {
  const std::size_t start = text.starts_with('-') || text.starts_with('+') ? 1 : 0;
  std::size_t end = start;
  while (end < text.size() &&
         (is_digit(text[end]) || ((text[end] == ',' || text[end] == '.') && end > start &&
                                  end + 1 < text.size() && is_digit(text[end + 1]))))
    ++end;
  const std::string number = text.substr(start, end - start), sign = text.substr(0, start),
                    rest = text.substr(end);
  const auto commas = std::count(number.begin(), number.end(), ','),
             dots = std::count(number.begin(), number.end(), '.');
  const auto written = [&](std::string digits) { return sign + digits + rest; };
  const auto without = [&](char mark) {
    std::string digits = number;
    std::erase(digits, mark);
    return digits;
  };
  if (commas == 1 && dots == 0) {
    std::string point = number;
    std::replace(point.begin(), point.end(), ',', '.');
    std::vector<std::string> ways{written(point)};
    if (number.size() - number.find(',') == 4 && number.find(',') <= 3) ways.push_back(written(without(',')));
    return problem("The decimal mark is a point; a comma could also part thousands.", ways);
  }
  if (commas > 0 || dots > 1) {
    std::string plain = number;
    if (commas == 1 && dots > 0 && number.rfind(',') > number.rfind('.')) {
      plain = without('.');
      std::replace(plain.begin(), plain.end(), ',', '.');
    } else if (dots <= 1) {
      plain = without(',');
    } else {
      plain = without('.');
    }
    return problem("Digits are written without marks between them, and the decimal mark is a point.",
                   {written(plain)});
  }
  // Groups of three digits parted by a space.
  std::string joined_digits = number, after = rest;
  while (dots == 0 && !number.empty() && after.size() >= 4 && after[0] == ' ' && is_digit(after[1]) &&
         is_digit(after[2]) && is_digit(after[3]) &&
         (after.size() == 4 || (!is_digit(after[4]) && after[4] != '/'))) {
    joined_digits += after.substr(1, 3);
    after = after.substr(4);
  }
  if (joined_digits != number)
    return problem("Digits are written without spaces between them.", {sign + joined_digits + after});
  return std::nullopt;
}

std::optional<ParsedQuantity> refuse_marks(const std::string& text) {
  const bool marks = text.find_first_of("\"'") != std::string::npos || text.find("″") != std::string::npos ||
                     text.find("′") != std::string::npos || text.find("”") != std::string::npos ||
                     text.find("’") != std::string::npos;
  if (!marks) return std::nullopt;
  std::string written = text;
  for (const char* mark : {"″", "”", "\"", "''"}) replace_all(written, mark, " in ");
  for (const char* mark : {"′", "’", "'"}) replace_all(written, mark, " ft ");
  return problem("Marks for feet and inches are easily lost or taken for quotation marks; write ft and in.",
                 {plain_text(written)});
}

// "6 inch pipe", "NPS 6", "DN 150", "16 ga".
std::optional<ParsedQuantity> refuse_trade_size(const std::string& text) {
  const std::string words = lower(text);
  const auto has = [&](std::string_view word) {
    for (std::size_t at = words.find(word); at != std::string::npos; at = words.find(word, at + 1)) {
      const bool before = at == 0 || !std::isalpha(static_cast<unsigned char>(words[at - 1]));
      const std::size_t end = at + word.size();
      if (before && (end == words.size() || !std::isalpha(static_cast<unsigned char>(words[end]))))
        return true;
    }
    return false;
  };
  if (has("ga") || has("gauge") || has("gage") || has("swg") || has("awg"))
    return problem(
        "A gauge number is another thickness for each metal and country. Measure the sheet, or look the "
        "number "
        "up in the supplier's list, and write it in mm or in.");
  const bool dn = has("dn");
  if (!dn && !has("pipe") && !has("nps")) return std::nullopt;
  const std::size_t digit = text.find_first_of("0123456789");
  ParsedQuantity result = problem("A nominal pipe size is not the outside diameter.");
  if (digit == std::string::npos) return result;
  const ParsedQuantity size =
      parse_quantity(split_number(text.substr(digit)).first + " mm", Quantity::length);
  const double nominal = size.value / 1e-3;
  const double outside =
      dn ? models::pipe_outside_diameter_of_dn(nominal) : models::pipe_outside_diameter_of_inches(nominal);
  if (std::isfinite(outside)) {
    result.problem += " This one is " + number_text(outside / 1e-3) + " mm outside.";
    result.suggestions = {number_text(outside / 1e-3) + " mm"};
  }
  return result;
}

// The words of a unit text, for looking at each of them.
std::vector<std::string> words_in(const std::string& unit) {
  std::vector<std::string> words(1);
  for (const char c : unit) {
    const bool letter = std::isalpha(static_cast<unsigned char>(c)) || static_cast<unsigned char>(c) >= 0x80;
    if (letter)
      words.back() += c;
    else if (!words.back().empty())
      words.emplace_back();
  }
  return words;
}

std::string with_word(const std::string& text, const std::string& word, const std::string& instead) {
  std::string result = text;
  if (const std::size_t at = result.rfind(word); at != std::string::npos)
    result.replace(at, word.size(), instead);
  return result;
}

std::optional<ParsedQuantity> refuse_pound(const std::string& text, const std::string& unit,
                                           Quantity quantity) {
  for (const std::string& word : words_in(unit)) {
    const std::string plain = lower(word);
    if (plain != "lb" && plain != "lbs" && plain != "pound" && plain != "pounds") continue;
    const bool mass = dimension_of(quantity)[1] == 1 && dimension_of(quantity)[2] == 0;
    const std::string number = split_number(text).first;
    std::string say = "\"" + word + "\" can be a mass or a force";
    if (words_in(unit).size() == 1) {
      const double value = parse_quantity(number + " lbm", Quantity::mass).value;
      say += ": " + number + " lbm = " + quantity_text(value, Quantity::mass) + ", " + number +
             " lbf = " + quantity_text(value * 9.80665, Quantity::force);
    }
    std::string meant = with_word(text, word, mass ? "lbm" : "lbf");
    return problem(say + ". " + wanted_units(quantity), {meant});
  }
  return std::nullopt;
}

std::optional<ParsedQuantity> refuse_ton(const std::string& text, const std::string& unit,
                                         Quantity quantity) {
  const std::string plain = lower(unit);
  if (plain != "t" && plain != "ton" && plain != "tons" && plain != "tonne" && plain != "tonnes" &&
      plain != "to")
    return std::nullopt;
  const double number = parse_quantity(split_number(text).first + " kg", Quantity::mass).value;
  std::vector<std::string> ways;
  if (quantity == Quantity::mass)
    ways = {number_text(number * 1000) + " kg", number_text(std::round(number * 907.185)) + " kg"};
  if (quantity == Quantity::force) ways = {number_text(number * 9.80665) + " kN"};
  return problem(
      "\"" + unit +
          "\" can be 1000 kg (metric), 907 kg (short) or 1016 kg (long), or the weight of one of them. " +
          wanted_units(quantity),
      ways);
}

std::optional<ParsedQuantity> refuse_millinewton(const std::string& text, const std::string& unit) {
  for (const std::string& word : words_in(unit))
    if (word == "mN" || word == "mNm")
      return problem("\"" + word + "\" begins with a thousandth of a newton, which no part of a frame needs.",
                     {with_word(text, "mN", "MN"), with_word(text, "mN", "kN")});
  return std::nullopt;
}

// Units of the right kind that are spelt nearly like `unit`: case slips, typing slips, a forgotten "/rad".
std::vector<std::string> repaired(const std::string& unit, Quantity quantity) {
  const Dimension wanted = dimension_of(quantity);
  const auto fits = [&](const std::string& text) {
    const auto parsed = parse_unit(text);
    return parsed && parsed->dimension == wanted;
  };
  // A unit that exists was typed on purpose; only its letter case may be a slip (kn, kN).
  const bool known = parse_unit(unit).has_value();
  if (const std::string near = nearest_unit(unit, wanted);
      !near.empty() && (!known || lower(near) == lower(unit)))
    return {near};
  for (const std::string& common : common_units(quantity))
    if (common.starts_with(unit + "/") || common.starts_with(unit + " ")) return {common};
  if (fits(unit + "/rad")) return {unit + "/rad"};
  for (const std::string& word : words_in(unit))
    for (const char* part :
         {"kN", "MN", "N", "m", "mm", "rad", "deg", "lbf", "in", "ft", "kg", "s", "h", "km"})
      if (word != part && edit_distance(word, part) <= (parse_unit(word) ? 0.5 : 1.0) &&
          fits(with_word(unit, word, part)))
        return {with_word(unit, word, part)};
  for (std::size_t cut = unit.find_last_of(' '); cut != std::string::npos && cut > 0;
       cut = unit.find_last_of(' ', cut - 1))
    if (fits(unit.substr(0, cut))) return {unit.substr(0, cut)};
  return {};
}

// What a unit of another kind measures, for "kg is a mass".
std::string kind_of(const Dimension& dimension) {
  for (int i = static_cast<int>(Quantity::length); i <= static_cast<int>(Quantity::mass_moment); ++i)
    if (dimension_of(static_cast<Quantity>(i)) == dimension) {
      std::string name = quantity_name(static_cast<Quantity>(i));
      name[0] = static_cast<char>(std::tolower(static_cast<unsigned char>(name[0])));
      return name;
    }
  return "";
}

}  // namespace

std::string plain_text(std::string_view raw) {
  std::string text(raw);
  for (const char* space : {"\u00a0", "\u202f", "\u2009", "\u2007", "\t", "\n", "\r"})
    replace_all(text, space, " ");
  replace_all(text, "\u2212", "-");
  for (const auto& [mark, plain] : {std::pair("½", " 1/2"), std::pair("¼", " 1/4"), std::pair("¾", " 3/4")})
    replace_all(text, mark, plain);
  std::string single;
  for (const char c : text)
    if (c != ' ' || (!single.empty() && single.back() != ' ')) single += c;
  while (!single.empty() && single.back() == ' ') single.pop_back();
  return single;
}

std::optional<ParsedQuantity> refuse_spelling(const std::string& text, Quantity quantity) {
  if (text.empty()) return problem("The value is empty. " + wanted_units(quantity));
  const std::string words = lower(text);
  const std::string unsigned_words =
      words.starts_with('-') || words.starts_with('+') ? words.substr(1) : words;
  if (unsigned_words.starts_with("nan") || unsigned_words.starts_with("inf"))
    return problem("This is not a number to work with. " + wanted_units(quantity),
                   quantity == Quantity::stiffness || quantity == Quantity::twist_stiffness
                       ? std::vector<std::string>{"rigid"}
                       : std::vector<std::string>{});
  if (unsigned_words.starts_with("0x")) return problem("Numbers are written with decimal digits.");
  if (auto refused = refuse_marks(text)) return refused;
  if (quantity == Quantity::length)
    if (auto refused = refuse_trade_size(text)) return refused;
  return refuse_grouping(text);
}

ParsedQuantity no_number(const std::string& text, Quantity quantity) {
  const std::size_t digit = text.find_first_of("0123456789");
  ParsedQuantity result = problem("No number is found where one is needed. " + wanted_units(quantity));
  if (digit != std::string::npos && digit > 0 && parse_quantity(text.substr(digit), quantity).ok())
    result.suggestions = {text.substr(digit)};
  return result;
}

ParsedQuantity missing_unit(const std::string& text, Quantity quantity) {
  ParsedQuantity result =
      problem(quantity_name(quantity) + " needs its unit: " + quantity_units(quantity) + ".");
  result.bare = true;
  if (text.find(' ') == std::string::npos)
    for (const std::string& unit : common_units(quantity)) result.suggestions.push_back(text + " " + unit);
  return result;
}

ParsedQuantity wrong_unit(const std::string& text, const std::string& unit, Quantity quantity) {
  if (auto refused = refuse_pound(text, unit, quantity)) return *refused;
  if (auto refused = refuse_ton(text, unit, quantity)) return *refused;
  if (auto refused = refuse_millinewton(text, unit)) return *refused;
  const auto parsed = parse_unit(unit);
  const std::string kind = parsed ? kind_of(parsed->dimension) : "";
  std::string say = !parsed        ? "\"" + unit + "\" is not a unit known here. "
                    : kind.empty() ? "\"" + unit + "\" does not fit here. "
                                   : "\"" + unit + "\" is " + kind + ". ";
  ParsedQuantity result = problem(say + wanted_units(quantity));
  for (const std::string& meant : repaired(unit, quantity))
    result.suggestions.push_back(with_word(text, unit, meant));
  if (parsed && quantity == Quantity::force && kind == "a mass") {
    const ParsedQuantity mass = parse_quantity(text, Quantity::mass);
    if (mass.ok()) result.suggestions = {quantity_text(mass.value * 9.80665, Quantity::force)};
  }
  std::erase_if(result.suggestions,
                [&](const std::string& s) { return s == text || !parse_quantity(s, quantity).ok(); });
  return result;
}

}  // namespace focalframe::cli
