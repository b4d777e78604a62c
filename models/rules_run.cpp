#include <cmath>

#include "fem/units.h"
#include "loads/guards.h"
#include "models/schema_rules.h"

namespace focalframe::models {
namespace {

void check_year(RuleBook& book) {
  const YearInput& year = book.d.wind.year;
  if (!year.given && !is_given(*find_element("wind/year"), book.d)) return;
  const bool scale = !std::isnan(year.weibull_scale), shape = !std::isnan(year.weibull_shape);
  if (!year.record.empty()) {
    if (scale || shape)
      book.stop("wind/year", "record",
                "The year comes from a record or from a Weibull distribution, not both.")
          .involves = {"wind/year/weibull-scale", "wind/year/weibull-shape"};
  } else if (!scale || !shape) {
    book.missing("wind/year", scale ? "weibull-shape" : "weibull-scale",
                 "The year needs weibull-scale and weibull-shape, or an hourly \"record\".")
        .advice = "Write weibull-scale=\"... m/s\" weibull-shape=\"2\", or record=\"my-hours.csv\"";
  }
  if (year.record.empty())
    if (const loads::Opinion o = loads::guard_hours(year.hours != "all"))
      book.warn("wind/year", "hours", o->text).advice = o->fix;
}

void check_hand(RuleBook& book) {
  const OperationInput& run = book.d.operation;
  if (run.turned_by != "hand") {
    for (const auto& [name, value] :
         {std::pair{"notice", run.notice}, {"push", run.push}, {"crank", run.crank}})
      if (!std::isnan(value))
        book.warn("operation", name,
                  "Not used: it is turned by its drive. For a crank add turned-by=\"hand\".");
    return;
  }
  if (std::isnan(run.notice))
    book.missing(
            "operation", "notice",
            "Turned by hand, it stands in the rising wind until somebody has noticed and is there: say how "
            "long that takes.")
        .advice = "Add for example: notice=\"15 min\"";
  if (std::isnan(run.push) != std::isnan(run.crank))
    book.missing("operation", std::isnan(run.push) ? "push" : "crank",
                 "A torque needs both: the force pushed with and the length of the crank.");
}

}  // namespace

void check_run(RuleBook& book) {
  check_year(book);
  check_hand(book);
  const TriggerInput& trigger = book.d.operation.trigger;
  const bool meter = std::isfinite(book.d.operation.anemometer.height);
  if (is_given(*find_element("operation/trigger"), book.d) && !meter)
    book.note(
        "operation/trigger", "",
        "There is no <anemometer>: the steps are applied to a hand-held meter and to Beaufort's scale.");
  if (trigger.from == "light" && std::isnan(book.d.limits.intercept) &&
      std::isnan(book.d.limits.lost_to_frame))
    book.stop("operation/trigger", "from", "Stowing when the light falls short needs a limit on the light.")
        .advice = "Add intercept=\"...\" to <limits>, or write from=\"safety\"";
}

}  // namespace focalframe::models
