#include <algorithm>
#include <cmath>

#include "fem/units.h"
#include "models/dish_rules.h"
#include "models/dish_states.h"
#include "models/schema_dish.h"

namespace focalframe::models {
namespace {

std::string leaf(const std::string& path) { return path.substr(path.rfind('/') + 1); }

std::string listed(const std::vector<std::string>& words) {
  std::string text;
  for (std::size_t i = 0; i < words.size(); ++i)
    text += (i == 0 ? "" : i + 1 == words.size() ? " or " : ", ") + words[i];
  return text;
}

void check_number(RuleBook& book, const std::string& place, const Field& f, double value) {
  if (std::isnan(value) || f.least == f.most || std::isinf(value)) return;
  const bool low = f.above_least ? value <= f.least : value < f.least * (1 - 1e-12) - 1e-15;
  if (!low && value <= f.most * (1 + 1e-12)) return;
  const auto text = [&](double x) { return quantity_text(x, f.quantity); };
  book.stop(place, f.name,
            "Allowed is " +
                (f.above_least ? "more than " + text(f.least) + " and at most " : text(f.least) + " to ") +
                text(f.most) + ". Found " + text(value) + ". This is: " + f.help + ".");
}

// Looks at the fields of one element, or of the last entry of a repeated one.
void check_element(RuleBook& book, const Element& element, const DishDesign& d, const std::string& place) {
  for (const Field& f : element.fields) {
    if (f.required && !is_given_in_dish(f, d)) {
      Violation& v = book.missing(place, f.name,
                                  "<" + leaf(element.path) + "> needs \"" + f.name + "\": " + f.help + ".");
      if (!f.words.empty() && f.quantity == Quantity::none) v.text += " One of: " + listed(f.words) + ".";
      continue;
    }
    const Slot slot = f.slot(const_cast<DishDesign&>(d));  // only read here
    if (const auto* number = std::get_if<double*>(&slot)) check_number(book, place, f, **number);
    if (const auto* count = std::get_if<int*>(&slot); count && is_given_in_dish(f, d))
      check_number(book, place, f, **count);
    if (const auto* text = std::get_if<std::string*>(&slot);
        text && !(*text)->empty() && !f.words.empty() &&
        std::find(f.words.begin(), f.words.end(), **text) == f.words.end())
      book.stop(place, f.name, "Allowed is " + listed(f.words) + ". This is: " + f.help + ".");
  }
}

void check_fields(RuleBook& book, const DishDesign& d) {
  for (const Element& element : dish_schema()) {
    if (element.repeats) {
      for (std::size_t i = 0; i < entries(element.path, d); ++i) {
        DishDesign up_to_here = d;
        keep_entries(element.path, up_to_here, i + 1);
        check_element(book, element, up_to_here,
                      i == 0 ? element.path : element.path + "#" + std::to_string(i + 1));
      }
      continue;
    }
    // Two words for one part: an antenna has a feed, a solar dish a receiver.
    if (element.path.starts_with(d.dish.radio.given ? "receiver" : "feed")) continue;
    const bool given = std::any_of(element.fields.begin(), element.fields.end(),
                                   [&](const Field& f) { return is_given_in_dish(f, d); });
    if (given)
      check_element(book, element, d, element.path);
    else if (element.required && element.path.find('/') == std::string::npos)
      book.missing(element.path, "", "The design needs <" + element.path + ">: " + element.help + ".");
  }
}

void check_range(RuleBook& book) {
  const OperationInput& run = book.d.operation;
  const DriveInput& range = book.d.drive;
  const auto degrees = [](double value) { return number_text(value / deg) + " deg"; };
  if (run.track_from >= run.track_to)
    book.stop("operation", "track-to",
              "Tracking goes from the smaller to the greater elevation; track-from is " +
                  degrees(run.track_from) + ".");
  const std::string text =
      "The drive turns from " + degrees(range.turns_from) + " to " + degrees(range.turns_to) + " only.";
  if (run.track_from < range.turns_from - 1e-9) book.stop("operation", "track-from", text);
  if (run.track_to > range.turns_to + 1e-9) book.stop("operation", "track-to", text);
  const double within = std::isnan(run.stow_within) ? 0 : run.stow_within;
  if (run.stow_at - within < range.turns_from - 1e-9 || run.stow_at + within > range.turns_to + 1e-9)
    book.stop("operation", "stow-at", text);
}

}  // namespace

std::vector<Violation> validate_dish(const DishDesign& design) {
  RuleBook book(design);
  check_fields(book, design);
  check_dish_shape(book);
  check_dish_mount(book);
  check_range(book);
  check_weather(book);
  return std::move(book.violations);
}

std::vector<Violation> dish_wind_rules(const DishDesign& design, const loads::CoefficientTable& table) {
  if (table.collector_kind == "dish") return dish_table_gaps(design, table);
  Violation v;
  v.element = "wind";
  v.attribute = "table";
  v.text =
      "Table \"" + table.name +
      "\" is for troughs: its coefficients are per width and length. A dish needs a table of its own kind.";
  v.advice = "Name a dish table, for example table=\"dish-open\"";
  return {v};
}

}  // namespace focalframe::models
