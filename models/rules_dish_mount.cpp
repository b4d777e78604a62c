#include <algorithm>
#include <cmath>
#include <stdexcept>

#include "fem/units.h"
#include "models/actuator.h"
#include "models/dish_rules.h"
#include "models/profile.h"
#include "models/schema_dish.h"

namespace focalframe::models {
namespace {

const DishInput& of(const RuleBook& book) { return static_cast<const DishDesign&>(book.d).dish; }

std::string length(double value) { return quantity_text(value, Quantity::length); }
bool given(const RuleBook& book, const char* path) {
  const Element& element = *find_dish_element(path);
  return std::any_of(element.fields.begin(), element.fields.end(), [&](const Field& f) {
    return is_given_in_dish(f, static_cast<const DishDesign&>(book.d));
  });
}

void check_profile(RuleBook& book, const std::string& path, const ProfileInput& profile) {
  if (profile.shape.empty()) return;
  try {
    section_of(profile);
  } catch (const std::invalid_argument& error) {
    book.stop(path, "shape", std::string("These sizes do not make a section: ") + error.what() + ".");
  }
}

std::string degrees(double value) { return number_text(std::round(value / deg * 10) / 10) + " deg"; }

void check_axis(RuleBook& book) {
  const DriveInput& range = book.d.drive;
  if (range.turns_from >= range.turns_to)
    book.stop("elevation-axis", "turns-to",
              "The range must grow: turns-from is " + degrees(range.turns_from) + ".")
        .involves = {"elevation-axis/turns-from"};
  const double rim = book.d.parabola.aperture / 2;
  if (book.d.row.axis_height < rim)
    book.warn("elevation-axis", "height",
              "With a radius of " + length(rim) +
                  " the rim reaches the ground when the dish faces the horizon.")
        .involves = {"parabola/diameter"};
  if (book.d.row.axis_height == book.d.site.altitude)
    book.warn("elevation-axis", "height",
              "This equals the site's altitude; it is the height above the ground that is wanted here.")
        .involves = {"site/altitude"};
  if (!of(book).axis.cradle.shape.empty()) check_profile(book, "elevation-axis/cradle", of(book).axis.cradle);
}

void check_pins(RuleBook& book) {
  const ActuatorInput& rod = of(book).actuator;
  const double from = book.d.drive.turns_from, to = book.d.drive.turns_to;
  if (!(from < to)) return;
  for (const double x : {rod.dish_pin.below, rod.dish_pin.front, rod.stand_pin.below, rod.stand_pin.front})
    if (std::isnan(x)) return;
  const ActuatorRange r = actuator_range(rod, from, to);
  const std::vector<std::string> involved{"actuator/dish-pin/below", "actuator/dish-pin/front",
                                          "actuator/stand-pin/below", "actuator/stand-pin/front"};
  if (r.turns_back || r.least_arm < least_arm_share * r.greatest_arm) {
    Violation& v = book.stop(
        "actuator", "",
        std::string(r.turns_back ? "The rod stops growing and turns back" : "The rod has almost no lever") +
            " at " + degrees(r.least_arm_at) + ": its arm is " + length(r.least_arm) + " there and " +
            length(r.greatest_arm) + " at best; at least 15 % of that is needed from " + degrees(from) +
            " to " + degrees(to) + ".");
    v.head = "actuator with pins that line up with the axis";
    v.advice = "Move the pins, or narrow turns-from and turns-to";
    v.involves = involved;
    return;
  }
  if (rod.shortest >= rod.longest)
    book.stop("actuator", "longest", "The longest length must exceed the shortest.").involves = {
        "actuator/shortest"};
  if (r.shortest < rod.shortest * (1 - 1e-3))
    book.stop("actuator", "shortest",
              "The pins come as near as " + length(r.shortest) + ", at " + degrees(r.shortest_at) +
                  "; the rod cannot be shorter than this value. It would be driven onto its stop.")
        .involves = involved;
  if (r.longest > rod.longest * (1 + 1e-3))
    book.stop("actuator", "longest",
              "The pins come as far apart as " + length(r.longest) + ", at " + degrees(r.longest_at) +
                  "; the rod cannot be longer than this value. It would be pulled onto its stop.")
        .involves = involved;
  if (rod.hold < rod.push)
    book.warn("actuator", "hold",
              "An actuator at rest holds at least what it can move. Are the two exchanged?")
        .involves = {"actuator/push"};
}

void check_drive(RuleBook& book) {
  const DishInput& dish = of(book);
  const bool rod = !std::isnan(dish.actuator.stiffness) || given(book, "actuator");
  const bool slew = given(book, "slewing-drive");
  if (!rod && !slew) {
    Violation& v = book.missing("actuator", "",
                                "Nothing holds the dish up: there is no <actuator> and no <slewing-drive>. "
                                "First to move: the dish, about the elevation axis.");
    v.head = "the dish can turn freely about its elevation axis";
    v.advice = "Add <actuator ...> with its two pins, or <slewing-drive stiffness=\"... N m/rad\" .../>";
    v.no_solution = true;
  }
  if (rod && slew)
    book.stop("slewing-drive", "", "The dish is turned by an actuator or by a slewing drive, not by both.");
  if (std::isinf(dish.actuator.stiffness))
    book.stop("actuator", "stiffness", "No rod is rigid: its stiffness decides the pointing. Give a number.");
  if (std::isinf(dish.slewing.stiffness))
    book.stop("slewing-drive", "stiffness",
              "No gear is rigid: its stiffness decides the pointing. Give a number.");
  if (rod) check_pins(book);
}

void check_stand(RuleBook& book) {
  const DishInput& dish = of(book);
  check_profile(book, "yoke", dish.yoke.profile);
  check_profile(book, "pedestal", dish.pedestal.profile);
  const double post = book.d.row.axis_height - dish.yoke.height;
  if (post <= 0)
    book.stop(
            "yoke", "height",
            "The yoke would reach below the ground: the axis is " + length(book.d.row.axis_height) + " high.")
        .involves = {"elevation-axis/height"};
  if (dish.pedestal.kind == "legs" && std::isnan(dish.pedestal.foot_radius))
    book.missing("pedestal", "foot-radius",
                 "A base of legs needs the radius of the circle its feet stand on.");
  for (const auto& [attribute, value] : {std::pair("twist-stiffness", dish.azimuth.twist_stiffness),
                                         std::pair("tilt-stiffness", dish.azimuth.tilt_stiffness)})
    if (std::isinf(value))
      book.stop("azimuth", attribute,
                "No bearing is rigid: give a number; 1 MN m/rad is a guess for a 3 m dish.");
}

void check_asked(RuleBook& book) {
  const bool solar = given(book, "optics"), radio = of(book).radio.given;
  if (solar && radio)
    book.stop("radio", "",
              "<optics> makes it a solar dish, <radio> an antenna; only one of them can be meant.");
  if (!solar && !radio)
    book.missing("optics", "", "The design needs <optics> (a solar dish) or <radio> (an antenna).");
  const RadioInput& r = of(book).radio;
  if (radio && std::isnan(r.frequency))
    book.missing(
        "radio", "frequency",
        "<radio> needs its \"frequency\", for example 5.76 GHz: it decides what a bent surface costs.");
  if (!std::isnan(r.set_true) && !r.set_true_word.empty())
    book.stop("radio", "set-true", "Give an elevation or the word unloaded, not both.");
  const DishLimitsInput& limits = of(book).limits;
  if (!radio && (!std::isnan(limits.gain_loss) || !std::isnan(limits.pointing)))
    book.stop("limits", std::isnan(limits.gain_loss) ? "pointing" : "gain-loss",
              "This is asked of an antenna; a solar dish is judged by \"intercept\" and \"aim\".");
  if (radio && !std::isnan(book.d.limits.intercept))
    book.stop("limits", "intercept",
              "This is asked of a solar dish; an antenna is judged by \"gain-loss\" and \"pointing\".");
}

}  // namespace

void check_dish_mount(RuleBook& book) {
  check_axis(book);
  check_drive(book);
  check_stand(book);
  check_asked(book);
}

}  // namespace focalframe::models
