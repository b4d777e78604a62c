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

// The first limit that is met in one and missed in the other; nullptr when the answers agree.
const Criterion* turned(const Assessment& base, const Assessment& moved) {
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

GuessFinding narrow(const TroughDesign& design, const loads::CoefficientTable& table, const Guess& guess,
                    double moved, const Criterion& criterion) {
  double same = guess.value, other = moved;
  for (int i = 0; i < 5; ++i) {
    const double middle = (same + other) / 2;
    const Assessment a = assess(with(design, guess, middle), table, {.discretisation = false});
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
                 quantity_text(other, finding.quantity, guess.value) + " " + criterion.name +
                 (criterion.met() ? " would no longer meet its limit" : " would meet its limit");
  return finding;
}

}  // namespace

GuessBand guess_band(Quantity quantity) {
  if (quantity == Quantity::stiffness || quantity == Quantity::twist_stiffness) return {0.5, 2.0};
  return {};
}

std::vector<GuessFinding> deciding_guesses(const TroughDesign& design, const loads::CoefficientTable& table,
                                           const Assessment& assessment, const Progress& progress) {
  const std::vector<Guess> guesses = guesses_in(design);
  std::vector<TroughDesign> moved;
  std::vector<double> values;
  for (const Guess& guess : guesses) {
    const GuessBand band = guess_band(guess.field->quantity);
    for (double factor : {band.low, band.high}) {
      values.push_back(guess.value * factor);
      moved.push_back(with(design, guess, values.back()));
    }
  }
  const std::vector<Assessment> results = assess_many(moved, table, progress);
  std::vector<GuessFinding> findings;
  for (std::size_t i = 0; i < results.size(); ++i) {
    if (std::isnan(results[i].mass)) continue;
    const Criterion* criterion = turned(assessment, results[i]);
    if (criterion) findings.push_back(narrow(design, table, guesses[i / 2], values[i], *criterion));
  }
  return findings;
}

}  // namespace focalframe::models
