#include <algorithm>
#include <cmath>
#include <stdexcept>

#include "fem/units.h"
#include "models/schema_rules.h"
#include "models/sun_table.h"
#include "models/trough_layout.h"

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

// Facets on purlins need two lines of supports each: purlins and the tube's two shoulders.
void check_facet_supports(RuleBook& book) {
  const TroughDesign& d = book.d;
  if (d.mirror.kind != "facets" || d.mirror.fixed_to != "purlins" || d.purlins.count < 2 ||
      d.mirror.facets_across % 2 != 0 || !(d.parabola.aperture > 0) ||
      std::any_of(book.violations.begin(), book.violations.end(),
                  [](const Violation& v) { return v.level == Violation::Level::stop; }))
    return;
  const int across = d.mirror.facets_across > 0 ? d.mirror.facets_across : 2;
  const double width = d.parabola.aperture, shoulder = lay_out(d).tube_half_width;
  for (int k = across / 2; k < across; ++k) {
    const double from = width * (static_cast<double>(k) / across - 0.5);
    const double to = from + width / across;
    int lines = 0;
    for (int p = 0; p <= d.purlins.count / 2; ++p) {
      const double y = shoulder + (width / 2 - shoulder) * 2 * p / d.purlins.count;
      if (y > from - 1e-9 && y < to + 1e-9) ++lines;
    }
    if (lines >= 2) continue;
    book.stop(
            "mirror", "facets-across",
            "A facet would lie on fewer than two lines of supports (purlins and the tube's shoulders): give "
            "more purlins or fewer facets.")
        .involves = {"purlins/count"};
    return;
  }
}

void check_panels(RuleBook& book) {
  const MirrorInput& mirror = book.d.mirror;
  if (mirror.kind == "sheet" && (mirror.facets_across > 0 || !std::isnan(mirror.pad_pitch)))
    book.stop("mirror", "kind",
              "A sheet is one piece from rim to rim; facets-across and pad-pitch belong to facets.")
        .involves = {"mirror/facets-across", "mirror/pad-pitch"};
  if (mirror.facets_across % 2 != 0)
    book.stop("mirror", "facets-across",
              "Facets lie alike on both sides of the vertex: their number is even.");
  check_facet_supports(book);
}

void check_target(RuleBook& book) {
  const ReceiverInput& r = book.d.receiver;
  if (r.catches == "strip" && std::isnan(r.strip_width))
    book.missing("receiver", "strip-width", "A flat target needs its full width, \"strip-width\".")
        .involves = {"receiver/catches"};
  if (r.catches != "strip" && !std::isnan(r.strip_width))
    book.stop("receiver", "strip-width", "Only a flat target has a width: write catches=\"strip\".")
        .involves = {"receiver/catches"};
}

void check_sensor(RuleBook& book) {
  const SensorInput& sensor = book.d.sensor;
  if (sensor.module > book.d.row.modules && book.d.row.modules > 0)
    book.stop("sensor", "module", "The row has " + std::to_string(book.d.row.modules) + " modules.")
        .involves = {"row/modules"};
  if (sensor.module > 0 && sensor.kind == "encoder")
    book.stop("sensor", "module",
              "An encoder sits on the drive; only an inclinometer or a sun sensor may sit on a module.")
        .involves = {"sensor/kind"};
}

void check_sun_table(RuleBook& book) {
  const OpticsInput& optics = book.d.optics;
  if (optics.sun_shape != "table") {
    if (!optics.sun_table.empty())
      book.warn("optics", "sun-table", "Not used: only sun-shape table reads it.").involves = {
          "optics/sun-shape"};
    return;
  }
  if (optics.sun_table.empty()) {
    book.missing(
            "optics", "sun-table",
            "Sun shape table needs \"sun-table\", such as \"0 mrad 1, 4 mrad 0.9, 4.65 mrad 0.4, 10 mrad "
            "0.01\": angle from the sun's centre and radiance in any unit.")
        .involves = {"optics/sun-shape"};
    return;
  }
  try {
    sun_of_table(optics.sun_table);
  } catch (const std::invalid_argument& problem) {
    book.stop(
        "optics", "sun-table",
        std::string(problem.what()) +
            ". Write pairs of angle and radiance with commas between, angles ascending from 0: \"0 mrad 1, 4 "
            "mrad 0.9, 10 mrad 0.01\".");
  }
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
  check_panels(book);
  check_target(book);
  check_sensor(book);
  check_sun_table(book);
  check_limits(book);
  check_accepted(book);
}

}  // namespace focalframe::models
