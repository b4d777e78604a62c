#include <algorithm>
#include <cmath>
#include <stdexcept>

#include "fem/units.h"
#include "loads/guards.h"
#include "models/schema_rules.h"
#include "models/states.h"

namespace focalframe::models {
namespace {

std::string length(double value) { return quantity_text(value, Quantity::length); }
std::string degrees(double value) { return number_text(value / deg) + " deg"; }
std::string speed(double value) { return number_text(value) + " m/s"; }

void check_mechanism(RuleBook& book) {
  const bool drive = is_given(*find_element("drive"), book.d),
             pylons = is_given(*find_element("pylons"), book.d) ||
                      is_given(*find_element("pylons/footing"), book.d);
  if (!pylons) {
    Violation& v = book.missing(
        "pylons", "",
        "Nothing carries the row: there are no <pylons>. First to move: the whole row, downwards.");
    v.head = "the row stands on nothing";
    v.advice = "Add <pylons shape=\"...\" material=\"...\"><footing .../></pylons>";
    v.no_solution = true;
  }
  if (!drive) {
    const std::string bearings =
        book.d.row.modules > 0 ? "all " + std::to_string(book.d.row.modules + 1) + " pylons are bearings"
                               : "the pylons are bearings";
    Violation& v = book.missing(
        "drive", "",
        "Nothing holds the twist: " + bearings +
            " and there is no <drive>. First to move: tube at module 1, turning about the row's direction.");
    v.head = "the row can turn freely about its tube";
    v.advice = "Add <drive stiffness=\"... N m/rad\" .../>";
    v.no_solution = true;
  }
}

void check_drive(RuleBook& book) {
  const DriveInput& drive = book.d.drive;
  if (std::isnan(drive.turns_from) != std::isnan(drive.turns_to))
    book.missing("drive", std::isnan(drive.turns_from) ? "turns-from" : "turns-to",
                 "The turning range needs both its ends, turns-from and turns-to.");
  if (drive.turns_from >= drive.turns_to)
    book.stop("drive", "turns-to", "The range must grow: turns-from is " + degrees(drive.turns_from) + ".")
        .involves = {"drive/turns-from"};
  if (drive.holding_torque < drive.moving_torque)
    book.warn("drive", "holding-torque",
              "A drive at rest holds at least what it can move, here " +
                  quantity_text(drive.moving_torque, Quantity::torque) + ". Are the two exchanged?")
        .involves = {"drive/moving-torque"};
  if (drive.play > 2 * deg)
    book.warn("drive", "play", "More than 2 deg of backlash is a worn-out drive; was a smaller unit meant?");
}

void check_poses(RuleBook& book) {
  const OperationInput& run = book.d.operation;
  const DriveInput& drive = book.d.drive;
  if (run.track_from >= run.track_to)
    book.stop("operation", "track-to",
              "Tracking goes from the smaller to the greater elevation; track-from is " +
                  degrees(run.track_from) + ".")
        .involves = {"operation/track-from"};
  const std::string range = degrees(drive.turns_from) + " to " + degrees(drive.turns_to);
  const std::vector<std::string> involved{"drive/turns-from", "drive/turns-to"};
  if (drive.turns_from >= drive.turns_to) return;
  if (run.track_from < drive.turns_from - 1e-9)
    book.stop("operation", "track-from", "The drive turns from " + range + " only.").involves = involved;
  if (run.track_to > drive.turns_to + 1e-9)
    book.stop("operation", "track-to", "The drive turns from " + range + " only.").involves = involved;
  const double within = std::isnan(run.stow_within) ? 0 : run.stow_within;
  if (run.stow_at - within < drive.turns_from - 1e-9 || run.stow_at + within > drive.turns_to + 1e-9) {
    Violation& v = book.stop("operation", "stow-at",
                             "The drive turns from " + range + " only; this pose needs " +
                                 degrees(run.stow_at - within) + " to " + degrees(run.stow_at + within) +
                                 " (stow-within " + degrees(within) + ").");
    v.involves = involved;
    v.involves.push_back("operation/stow-within");
  }
  if (run.turning_rate < 0.02 * deg || run.turning_rate > 10 * deg)
    book.warn("operation", "turning-rate",
              "0.02 to 10 deg/s is usual. Found " + quantity_text(run.turning_rate, Quantity::turning_rate) +
                  ", a quarter turn in " + quantity_text(90 * deg / run.turning_rate, Quantity::time) + ".");
}

// The gust pressure at the axis that the design's own chain makes of a speed with an averaging; NaN where the
// site is not fit for it yet.
double gust_pressure(const TroughDesign& d, const WindStateInput& wind, double averaging) {
  loads::StatedWind stated;
  stated.speed = wind.speed;
  stated.averaging = averaging;
  if (!std::isnan(wind.height)) stated.height = wind.height;
  stated.over = wind.over == "site" ? loads::StatedOver::site : loads::StatedOver::open_country;
  try {
    return loads::wind_at(d.row.axis_height, stated, site_of(d.site)).gust_pressure;
  } catch (const std::invalid_argument&) {
    return not_given;
  }
}

void check_state(RuleBook& book, const char* path, const WindStateInput& wind) {
  const bool by_speed = !std::isnan(wind.speed), by_pressure = !std::isnan(wind.pressure);
  if (!wind.given && !is_given(*find_element(path), book.d)) return;
  if (by_speed && by_pressure)
    book.stop(path, "pressure",
              "A wind is given by its speed or by its velocity pressure at the axis, not both.")
        .involves = {std::string(path) + "/speed"};
  if (!by_speed && !by_pressure)
    book.missing(path, "speed",
                 "This wind needs its \"speed\" (with averaging and height), or the velocity \"pressure\" at "
                 "the axis (with averaging).");
  if (std::isnan(wind.averaging)) {
    const double gust = gust_pressure(book.d, wind, 3), mean = gust_pressure(book.d, wind, 600);
    const auto pascals = [](double q) { return quantity_text(std::round(q), Quantity::pressure); };
    std::string text =
        "A velocity pressure of a gust and of a mean differ by more than twice. Write which one this is.";
    if (by_speed) text = "A gust and a mean of the same speed differ by more than twice in load.";
    if (by_speed && !std::isnan(gust))
      text = "The same " + speed(wind.speed) + " gives gusts of " + pascals(gust) +
             " at the axis if it is a 3 s gust, of " + pascals(mean) + " if it is a 10-minute mean.";
    if (by_speed) text += " Write what your record or your client means.";
    Violation& v = book.missing(path, "averaging", text);
    v.advice = "Add one of: averaging=\"3 s\" | \"1 min\" | \"10 min\" | \"1 h\"";
    v.involves = {std::string(path) + "/speed", std::string(path) + "/pressure"};
  }
  check_averaging(book, path, wind.averaging);
  if (by_speed && std::isnan(wind.height)) {
    Violation& v = book.missing(path, "height",
                                "A speed holds at one height: weather records at 10 m, a meter on a mast at "
                                "the mast's. Wind grows with height.");
    v.advice = "Add for example: height=\"10 m\"";
    v.involves = {std::string(path) + "/speed"};
  }
}

void check_speeds(RuleBook& book) {
  const double operate = book.d.wind.operate.speed, stow = book.d.wind.stow.speed,
               stuck = book.d.wind.stuck.speed;
  const bool comparable = book.d.wind.operate.averaging == book.d.wind.stow.averaging;
  if (operate > 35)
    book.warn("wind/operate", "speed",
              "Troughs work in winds up to about 20 m/s. " + speed(operate) + " is " +
                  number_text(operate * 2.23694) + " mph; if the number was in mph, it is " +
                  speed(operate * 0.44704) + ".");
  if (stow > 90)
    book.warn("wind/stow", "speed",
              "No design wind on land reaches this. If the number was in mph, it is " +
                  speed(stow * 0.44704) + "; in km/h, " + speed(stow / 3.6) + ".");
  if (comparable && stow < operate)
    book.warn("wind/stow", "speed",
              "It is parked because the wind is stronger than the operate wind of " + speed(operate) +
                  ", yet this one is weaker.")
        .involves = {"wind/operate/speed"};
  else if (comparable && (stow / operate < 1.3 || stow / operate > 6))
    book.warn("wind/stow", "speed",
              "This is " + number_text(stow / operate) + " times the operate wind of " + speed(operate) +
                  "; 1.3 to 6 is usual. Is one of them in mph, km/h or knots?")
        .involves = {"wind/operate/speed"};
  if (stuck < operate && book.d.wind.stuck.averaging == book.d.wind.operate.averaging)
    book.warn("wind/stuck", "speed",
              "Caught in a pose by a wind weaker than the operate wind of " + speed(operate) +
                  ": that is operation.")
        .involves = {"wind/operate/speed"};
}

void check_site(RuleBook& book) {
  const SiteInput& site = book.d.site;
  if (site.terrain == "power law" && std::isnan(site.power_exponent))
    book.missing("site", "power-exponent",
                 "Terrain \"power law\" needs its \"power-exponent\"; 0.14 is usual for open country (from "
                 "memory).")
        .involves = {"site/terrain"};
  if (site.terrain == "power law" && std::isnan(site.turbulence))
    book.missing(
            "site", "turbulence",
            "Terrain \"power law\" needs the \"turbulence\" intensity at the axis, to turn means into gusts.")
        .involves = {"site/terrain"};
  if (!site.terrain.empty() && site.terrain != "power law" &&
      (!std::isnan(site.power_exponent) || !std::isnan(site.turbulence)))
    book.warn("site", std::isnan(site.power_exponent) ? "turbulence" : "power-exponent",
              "Not used: terrain \"" + site.terrain + "\" has its own profile.")
        .involves = {"site/terrain"};
  const bool weather =
      !std::isnan(site.altitude) || !std::isnan(site.temperature) || !std::isnan(site.pressure);
  if (!std::isnan(site.air_density) && weather)
    book.note("site", "air-density",
              "The density is given, so altitude, temperature and pressure are not used for it.");
  if (is_given(*find_element("site"), book.d) && std::isnan(site.air_density) && !weather)
    book.note(
        "site", "",
        "No altitude and no air-density is given: the air of sea level is used, which is on the safe side.");
  if (site.asce_edition != 10 && site.asce_edition != 16 && site.asce_edition != 22)
    book.stop("site", "asce-edition", "The editions known here are 10, 16 and 22.");
}

}  // namespace

void check_averaging(RuleBook& book, const std::string& path, double averaging, const char* attribute) {
  for (const double known : {3.0, 60.0, 600.0, 3600.0})
    if (std::abs(averaging - known) < 1e-6 * known) return;
  if (std::isnan(averaging) || book.reported(path, attribute)) return;
  book.stop(path, attribute, "Winds are known here as the mean of 3 s (gust), 1 min, 10 min or 1 h.").advice =
      std::string("Write one of: ") + attribute + "=\"3 s\" | \"1 min\" | \"10 min\" | \"1 h\"";
}

void check_ground(RuleBook& book) {
  check_mechanism(book);
  check_drive(book);
  check_poses(book);
  const CounterweightsInput& weights = book.d.counterweights;
  if (weights.behind_tube > 2 * book.d.parabola.aperture)
    book.stop("counterweights", "behind-tube",
              "The weights would hang further behind the tube than twice the aperture of " +
                  length(book.d.parabola.aperture) + ".")
        .involves = {"parabola/aperture"};
  if (weights.behind_tube > book.d.row.axis_height)
    book.warn("counterweights", "behind-tube",
              "The weights would reach the ground with the trough facing the sky: the axis is " +
                  length(book.d.row.axis_height) + " high.")
        .involves = {"row/axis-height"};
}

void check_weather(RuleBook& book) {
  check_site(book);
  check_state(book, "wind/operate", book.d.wind.operate);
  check_state(book, "wind/turning", book.d.wind.turning);
  check_state(book, "wind/stow", book.d.wind.stow);
  check_state(book, "wind/stuck", book.d.wind.stuck);
  check_speeds(book);
  check_averaging(book, "operation/anemometer", book.d.operation.anemometer.averaging);
  check_averaging(book, "wind/year", book.d.wind.year.averaging);
  check_run(book);
  check_state(book, "wind/unfinished", book.d.wind.unfinished);
  if (const loads::Opinion o =
          loads::guard_heights({.axis = book.d.row.axis_height, .altitude = book.d.site.altitude}))
    if (o->severity == loads::Severity::warned) book.warn("row", "axis-height", o->text).advice = o->fix;
}

}  // namespace focalframe::models
