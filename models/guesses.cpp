#include "models/guesses.h"

#include <algorithm>
#include <cmath>

#include "models/many_runs.h"
#include "models/quantity.h"

namespace focalframe::models {
namespace {

struct Guess {
  const Element* element;
  const Field* field;
  double value;
};

double* number_at(const Field& field, TroughDesign& design) {
  const Slot slot = field.slot(design);
  double* const* number = std::get_if<double*>(&slot);
  return number ? *number : nullptr;
}

std::vector<Guess> guesses_in(const TroughDesign& design) {
  TroughDesign copy = design;
  std::vector<Guess> guesses;
  for (const Element& element : trough_schema()) {
    const auto basis = design.basis.find(element.path);
    if (basis == design.basis.end() || basis->second != "guess") continue;
    for (const Field& field : element.fields) {
      if (field.quantity == Quantity::none || field.quantity == Quantity::count ||
          field.quantity == Quantity::time)
        continue;
      const double* number = number_at(field, copy);
      // An angle beyond a few milliradians is a pose somebody chose, not a guess.
      const bool chosen = field.quantity == Quantity::angle && number && *number > 50e-3;
      if (number && std::isfinite(*number) && *number > 0 && !chosen)
        guesses.push_back({&element, &field, *number});
    }
  }
  return guesses;
}

TroughDesign with(const TroughDesign& design, const Guess& guess, double value) {
  TroughDesign changed = design;
  *number_at(*guess.field, changed) = value;
  return changed;
}

// The first limit that is met in one and missed in the other; nullptr when the verdicts agree.
const Criterion* turned(const Assessment& base, const Assessment& moved) {
  if ((base.limits_missed == 0) == (moved.limits_missed == 0)) return nullptr;
  for (const Criterion& a : base.criteria)
    for (const Criterion& b : moved.criteria)
      if (a.key == b.key && a.judged() && b.judged() && a.met() != b.met()) return &a;
  return nullptr;
}

bool met(const Assessment& a, const std::string& key) {
  for (const Criterion& c : a.criteria)
    if (c.key == key) return c.met();
  return true;
}

GuessFinding narrow(const TroughDesign& design, const loads::CoefficientTable& table, const BuiltRow& built,
                    const Guess& guess, double moved, const Criterion& criterion) {
  double same = guess.value, other = moved;
  for (int i = 0; i < 5; ++i) {
    const double middle = (same + other) / 2;
    const Assessment a =
        assess(with(design, guess, middle), table, {.discretisation = false, .built = &built});
    (met(a, criterion.key) == criterion.met() ? same : other) = middle;
  }
  GuessFinding finding;
  finding.element = guess.element->path;
  finding.attribute = guess.field->name;
  finding.quantity = guess.field->quantity;
  finding.value = guess.value;
  finding.flips_at = other;
  finding.text = guess.element->path + " " + guess.field->name + " " +
                 quantity_text(guess.value, finding.quantity) + "; at " +
                 quantity_text(other, finding.quantity, guess.value) + " \"" + criterion.name + "\"" +
                 (criterion.met() ? " would no longer meet its limit" : " would meet its limit");
  return finding;
}

double end_of(const Guess& guess, bool high) {
  const GuessBand band = guess_band(guess.field->quantity);
  return guess.value * (high ? band.high : band.low);
}

// Whether a limit could turn at the band's lower end: the change seen upwards, carried on downwards in
// proportion and taken three times as large, reaches a limit. Unknown results are always worth the try.
bool may_turn_below(const Assessment& base, const Assessment& up, const Guess& guess) {
  if (std::isnan(up.mass)) return true;
  const double ratio = (guess.value - end_of(guess, false)) / (end_of(guess, true) - guess.value);
  for (const Criterion& a : base.criteria)
    for (const Criterion& b : up.criteria)
      if (a.key == b.key && a.judged() && b.judged() &&
          !(std::abs(1 - a.used()) > 3 * ratio * std::abs(b.used() - a.used())))
        return true;
  return false;
}

}  // namespace

GuessBand guess_band(Quantity quantity) {
  if (quantity == Quantity::stiffness || quantity == Quantity::twist_stiffness) return {0.5, 2.0};
  return {};
}

std::vector<GuessFinding> deciding_guesses(const TroughDesign& design, const loads::CoefficientTable& table,
                                           const Assessment& assessment, const Progress& progress) {
  const std::vector<Guess> guesses = guesses_in(design);
  if (guesses.empty()) return {};
  const BuiltRow built = build_row(design, table);
  const auto try_at = [&](const std::vector<std::size_t>& which, bool high) {
    std::vector<TroughDesign> moved;
    for (std::size_t i : which) moved.push_back(with(design, guesses[i], end_of(guesses[i], high)));
    return assess_many(moved, table, progress, &built);
  };
  std::vector<GuessFinding> findings;
  const auto look = [&](std::size_t i, bool high, const Assessment& result) {
    if (std::isnan(result.mass)) return;
    if (const Criterion* c = turned(assessment, result))
      findings.push_back(narrow(design, table, built, guesses[i], end_of(guesses[i], high), *c));
  };

  std::vector<std::size_t> all, low;
  for (std::size_t i = 0; i < guesses.size(); ++i) all.push_back(i);
  const std::vector<Assessment> up = try_at(all, true);
  for (std::size_t i = 0; i < guesses.size(); ++i) {
    look(i, true, up[i]);
    if (may_turn_below(assessment, up[i], guesses[i])) low.push_back(i);
  }
  const std::vector<Assessment> down = try_at(low, false);
  for (std::size_t k = 0; k < low.size(); ++k) look(low[k], false, down[k]);
  return findings;
}

}  // namespace focalframe::models
