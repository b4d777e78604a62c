#include <cmath>

#include "fem/units.h"
#include "models/schema_rules.h"

namespace focalframe::models {
namespace {

void check_budget(RuleBook& book) {
  const OpticsInput& optics = book.d.optics;
  if (!std::isnan(optics.set_true) && !optics.set_true_word.empty())
    book.stop("optics", "set-true", "Give an elevation or the word unloaded, not both.");
  if (optics.sun_shape == "buie" && std::isnan(optics.circumsolar_ratio))
    book.missing("optics", "circumsolar-ratio",
                 "Sun shape buie needs the \"circumsolar-ratio\"; 0.05 is a clear sky (from memory).")
        .involves = {"optics/sun-shape"};
  if (optics.sun_shape != "buie" && !std::isnan(optics.circumsolar_ratio))
    book.warn("optics", "circumsolar-ratio", "Not used: only sun-shape buie has one.").involves = {
        "optics/sun-shape"};
  if (optics.workshop_slope > 15 * mrad)
    book.warn("optics", "workshop-slope",
              "Good mirrors have 1.5 to 3 mrad, home-made shells about 5. Rms of the mirror's normal is "
              "wanted, not of the ray and not in degrees.");
  if (optics.workshop_slope == 0)
    book.warn("optics", "workshop-slope", "No mirror is perfect; 3 mrad is a usual guess.");
}

void check_limits(RuleBook& book) {
  const LimitsInput& limits = book.d.limits;
  if (!is_given(*find_element("limits"), book.d))
    book.warn("limits", "", "No limit is given, so nothing is judged: results are reported only.").missing =
        true;
  if (!limits.strength.empty() && !std::isnan(limits.strength_factor))
    book.stop("limits", "strength-factor",
              "Strength is judged with the load factors of a standard or with one plain factor, not both.")
        .involves = {"limits/strength"};
}

void check_accepted(RuleBook& book) {
  for (const AcceptInput& accept : book.d.accepted) {
    if (accept.rule.empty())
      book.missing("accept", "rule",
                   "<accept> needs \"rule\": the word in brackets of the message that is accepted.");
    if (accept.because.empty())
      book.missing("accept", "because",
                   "<accept> needs \"because\": the reason is printed beside the number it concerns.");
  }
}

}  // namespace

void check_optics(RuleBook& book) {
  check_budget(book);
  check_limits(book);
  check_accepted(book);
}

}  // namespace focalframe::models
