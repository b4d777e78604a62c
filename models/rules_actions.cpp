#include <cmath>

#include "fem/units.h"
#include "loads/guards.h"
#include "models/action_loads.h"
#include "models/schema_rules.h"

namespace focalframe::models {
namespace {

std::string degrees(double value) { return number_text(value / deg) + " deg"; }

void check_temperature(RuleBook& book) {
  const TemperatureInput& t = book.d.temperature;
  if (t.least > t.most)
    book.stop("temperature", "most",
              "The hottest frame is colder than the coldest one, " + number_text(t.least - 273.15) + " degC.")
        .involves = {"temperature/least"};
  if (t.set_at < t.least || t.set_at > t.most)
    book.warn("temperature", "set-at",
              "Mirrors and joints were set at a temperature outside the range the frame will see.")
        .involves = {"temperature/least", "temperature/most"};
}

void check_earthquake(RuleBook& book) {
  const EarthquakeInput& q = book.d.earthquake;
  if (!is_given(*find_element("earthquake"), book.d)) return;
  if (q.code == "EN 1998" && std::isnan(q.ground_acceleration))
    book.missing(
        "earthquake", "ground-acceleration",
        "EN 1998 starts from the acceleration of the ground, a_g, with the importance factor in it.");
  if (q.code == "ASCE 7" && std::isnan(q.s_ds))
    book.missing("earthquake", "s-ds", "ASCE 7 starts from the design acceleration at 0.2 s over g, S_DS.");
  if (q.code == "ASCE 7" && std::isnan(q.s_d1))
    book.note("earthquake", "", "No s-d1 is given: the acceleration at 0.2 s is used at every period.");
}

// A pose of its own must lie where the drive can turn.
void check_pose(RuleBook& book, const char* element, double at) {
  const DriveInput& drive = book.d.drive;
  if (at < drive.turns_from - 1e-9 || at > drive.turns_to + 1e-9)
    book.stop(
            element, "at",
            "The drive turns from " + degrees(drive.turns_from) + " to " + degrees(drive.turns_to) + " only.")
        .involves = {"drive/turns-from", "drive/turns-to"};
}

void check_erection(RuleBook& book) {
  const bool wind = book.d.wind.unfinished.given || is_given(*find_element("wind/unfinished"), book.d),
             pose = is_given(*find_element("erection"), book.d);
  if (wind && !pose)
    book.missing(
            "erection", "",
            "<wind><unfinished> says how hard the wind may blow while the row is being built; <erection> "
            "must say in which pose and with which mirrors it is left.")
        .advice = "Add <erection at=\"90 deg\" mirrors=\"none\"/>";
  if (pose && !wind)
    book.missing("wind/unfinished", "",
                 "<erection> needs the wind the row is left in while it is being built.")
        .advice = "Add <unfinished speed=\"... m/s\" averaging=\"10 min\" height=\"10 m\"/> inside <wind>";
  check_pose(book, "erection", book.d.erection.at);
}

// Which pairs of snow and wind are run, and why not others.
void check_snow(RuleBook& book) {
  const TroughDesign& d = book.d;
  if (std::isnan(d.snow.on_ground) || std::isnan(d.operation.stow_at)) return;
  const auto note = [&](const loads::Opinion& opinion) {
    if (opinion) book.note("snow", "", opinion->text + " " + opinion->fix);
  };
  const bool sheds = d.snow.back == "sheds";
  if (sheds) note(loads::guard_snow({.elevation = d.operation.stow_at, .extreme_wind = d.wind.stow.given}));
  if (!sheds && d.wind.stow.given) note(loads::guard_snow({.elevation = 90 * deg, .extreme_wind = true}));
}

void check_dynamics(RuleBook& book) {
  if (book.d.wind.dynamic_word.empty() && is_given(*find_field(*find_element("wind"), "damping"), book.d))
    book.warn("wind", "damping", "Not used: it belongs to dynamic-factor=\"EN Annex B\".");
}

}  // namespace

void check_actions(RuleBook& book) {
  check_temperature(book);
  check_earthquake(book);
  check_erection(book);
  check_pose(book, "maintenance", book.d.maintenance.at);
  check_snow(book);
  check_dynamics(book);
  check_averaging(book, "optics", book.d.optics.wind_averaging, "wind-averaging");
}

}  // namespace focalframe::models
