#include <cmath>
#include <stdexcept>

#include "fem/units.h"
#include "models/dish_names.h"
#include "models/dish_rules.h"
#include "models/profile.h"
#include "models/schema_dish.h"

namespace focalframe::models {
namespace {

const DishInput& of(const RuleBook& book) { return static_cast<const DishDesign&>(book.d).dish; }

std::string length(double value) { return quantity_text(value, Quantity::length); }
void check_profile(RuleBook& book, const std::string& path, const ProfileInput& profile) {
  if (profile.shape.empty()) return;
  try {
    section_of(profile);
  } catch (const std::invalid_argument& error) {
    book.stop(path, "shape", std::string("These sizes do not make a section: ") + error.what() + ".");
  }
}

std::string entry(const char* path, std::size_t i) {
  return i == 0 ? path : std::string(path) + "#" + std::to_string(i + 1);
}

void check_focus(RuleBook& book) {
  const ParabolaInput& p = book.d.parabola;
  const bool by_focus = !std::isnan(p.focal_length), by_depth = !std::isnan(p.depth);
  if (!by_focus && !by_depth) {
    book.missing("parabola", "focal-length",
                 "<parabola> needs \"focal-length\" or \"depth\"; with a tape, the depth is a straight edge "
                 "over the rim down to the vertex.");
    return;
  }
  if (std::isnan(p.aperture) || book.reported("parabola", "diameter")) return;
  const double f = focal_length(p), ratio = f / p.aperture;
  if (by_focus && by_depth) {
    const double of_depth = p.aperture * p.aperture / (16 * p.depth);
    if (std::abs(of_depth - p.focal_length) > 0.01 * p.focal_length) {
      book.stop("parabola", "focal-length depth",
                "They disagree: " + length(p.aperture) + " across and " + length(p.depth) +
                    " deep has its focus at " + length(of_depth) + "; " + length(p.focal_length) +
                    " needs a depth of " + length(p.aperture * p.aperture / (16 * p.focal_length)) +
                    ". Allowed difference 1 %.")
          .advice = "Keep the one you measured and delete the other";
      return;
    }
  }
  if (!(ratio >= 0.2 && ratio <= 2))
    book.stop("parabola", by_focus ? "focal-length" : "depth",
              "With a diameter of " + length(p.aperture) + " the focal length of " + length(f) + " is " +
                  number_text(ratio) + " of it. A dish has 0.2 to 2, here a focal length of " +
                  length(0.2 * p.aperture) + " to " + length(2 * p.aperture) + ".")
        .involves = {"parabola/diameter"};
}

void check_hub(RuleBook& book) {
  const HubInput& hub = of(book).hub;
  const double diameter = book.d.parabola.aperture;
  if (hub.diameter >= 0.8 * diameter)
    book.stop("hub", "diameter",
              "The ribs begin on the hub and end on the rim of " + length(diameter) +
                  "; the hub may be up to " + length(0.8 * diameter) + " wide.")
        .involves = {"parabola/diameter"};
  if (hub.profile.material.empty()) book.missing("hub", "material", "<hub> needs \"material\".");
  if (hub.kind == "ring") {
    if (hub.profile.shape.empty())
      book.missing("hub", "shape", "A hub of kind ring needs the \"shape\" and sizes of its section.");
    else
      check_profile(book, "hub", hub.profile);
    if (of(book).axis.cradle.shape.empty())
      book.missing("elevation-axis/cradle", "",
                   "A ring is held by the arms of the cradle: give <cradle shape=\"...\" material=\"...\"/> "
                   "inside <elevation-axis>.");
  } else if (std::isnan(hub.profile.thickness)) {
    book.missing("hub", "thickness", "A hub of kind plate needs its \"thickness\".");
  }
}

void check_ribs(RuleBook& book) {
  const DishRibsInput& r = of(book).ribs;
  if (r.profile.material.empty() && (r.kind != "truss" || r.chords.material.empty()))
    book.missing("ribs", "material", "<ribs> needs \"material\".");
  if (r.kind == "tube") {
    if (r.profile.shape.empty())
      book.missing("ribs", "shape", "Ribs of kind tube need the \"shape\" and sizes of their section.");
    else
      check_profile(book, "ribs", r.profile);
    return;
  }
  if (std::isnan(r.depth_at_hub))
    book.missing("ribs", "depth-at-hub", "Ribs of kind " + r.kind + " need it.");
  if (std::isnan(r.depth_at_rim))
    book.missing("ribs", "depth-at-rim", "Ribs of kind " + r.kind + " need it.");
  const double arm = (book.d.parabola.aperture - of(book).hub.diameter) / 2;
  if (r.depth_at_hub > arm)
    book.stop("ribs", "depth-at-hub", "The rib would be deeper than it is long, " + length(arm) + ".")
        .involves = {"parabola/diameter", "hub/diameter"};
  if (r.depth_at_rim > r.depth_at_hub)
    book.warn("ribs", "depth-at-rim", "Ribs taper from hub to rim; here the rim is the deeper end.")
        .involves = {"ribs/depth-at-hub"};
  if (r.kind == "plate" && std::isnan(r.profile.thickness))
    book.missing("ribs", "thickness", "Ribs of kind plate need the \"thickness\" of the plate.");
  if (r.kind != "truss") return;
  if (r.panels == 0) book.missing("ribs", "panels", "Ribs of kind truss need the number of \"panels\".");
  for (const auto& [path, profile] : {std::pair("ribs/chords", &r.chords), std::pair("ribs/webs", &r.webs)})
    if (profile->shape.empty())
      book.missing(path, "", std::string("Ribs of kind truss need <") + (path + 5) + " shape=\"...\" .../>.");
    else
      check_profile(book, path, *profile);
  if (r.depth_at_rim < 1.2 * profile_depth_or_zero(r.chords))
    book.stop("ribs", "depth-at-rim",
              "Depth counts from chord axis to chord axis; at the rim the chords of " +
                  length(profile_depth_or_zero(r.chords)) + " would run into each other.")
        .involves = {"ribs/chords/side", "ribs/chords/outside-diameter", "ribs/chords/depth"};
}

void check_rings(RuleBook& book) {
  const DishInput& dish = of(book);
  const double rim = book.d.parabola.aperture / 2, hub = dish.hub.diameter / 2;
  for (std::size_t i = 0; i < dish.rings.size(); ++i) {
    const RingInput& ring = dish.rings[i];
    const std::string path = entry("ring", i);
    check_profile(book, path, ring.profile);
    if (ring.radius <= hub || ring.radius > rim * (1 + 1e-9))
      book.stop(path, "radius",
                "A ring lies between the hub's radius of " + length(hub) + " and the rim's of " +
                    length(rim) + ".")
          .involves = {"parabola/diameter", "hub/diameter"};
  }
  for (std::size_t i = 0; i < dish.bracing.size(); ++i) {
    const BracingInput& b = dish.bracing[i];
    const std::string path = entry("bracing", i);
    check_profile(book, path, b.profile);
    for (const auto& [attribute, word] : {std::pair("from", &b.from), std::pair("to", &b.to)})
      if (!word->empty() &&
          !(ring_of(dish, *word) >= 0 || (*word == "hub" && attribute == std::string("from"))))
        book.stop(path, attribute,
                  "Allowed is " + std::string(attribute == std::string("from") ? "hub or " : "") +
                      "ring 1 to ring " + std::to_string(dish.rings.size()) +
                      ", counted in the order they are written.");
    if (!b.from.empty() && b.from == b.to)
      book.stop(path, "to", "Diagonals run between two different rings.").involves = {path + "/from"};
  }
}

void check_surface(RuleBook& book) {
  const SurfaceInput& s = of(book).surface;
  const bool by_thickness = !std::isnan(s.thickness) && !s.material.empty();
  if (std::isnan(s.mass) && !by_thickness)
    book.missing("surface", "mass",
                 "<surface> needs its \"mass\" per area, or \"thickness\" and \"material\".");
  if (!std::isnan(s.mass) && by_thickness)
    book.stop("surface", "mass", "Give the mass, or thickness and material, not both.");
  if (s.kind != "mesh" && s.solidity < 1)
    book.stop("surface", "solidity", "Only a mesh is open; a " + s.kind + " has a solid share of 1.");
  if (s.solidity < 0.2)
    book.warn("surface", "solidity", "This is the solid share, not the open one; meshes have 0.3 to 0.8.");
  if (s.hole >= book.d.parabola.aperture)
    book.stop("surface", "hole", "The opening would be wider than the dish.").involves = {
        "parabola/diameter"};
}

void check_feed(RuleBook& book) {
  const DishInput& dish = of(book);
  const FeedInput& feed = dish.feed;
  const char* word = dish.radio.given ? "feed" : "receiver";
  const bool legs = feed.legs.count > 0, boom = !feed.boom.shape.empty();
  if (std::isnan(feed.mass)) {
    book.missing(word, "", std::string("The design needs <") + word + ">: what stands in the focus.");
    return;
  }
  if (legs == boom)
    book.missing(word, "",
                 std::string("<") + word + "> stands on <legs .../> or on a <boom .../>, one of them.");
  if (legs) check_profile(book, std::string(word) + "/legs", feed.legs.profile);
  if (boom) check_profile(book, std::string(word) + "/boom", feed.boom);
  if (legs && feed.legs.stand_on != "hub" && ring_of(dish, feed.legs.stand_on) < 0)
    book.stop(std::string(word) + "/legs", "stand-on",
              "Allowed is hub, or ring 1 to ring " + std::to_string(dish.rings.size()) + ".");
  if (legs && feed.legs.count < 3)
    book.note(std::string(word) + "/legs", "count",
              "One or two legs hold the focus by their own bending only, like a mast.");
  if (!dish.radio.given && std::isnan(feed.aperture))
    book.missing("receiver", "aperture", "A solar dish needs the \"aperture\" of its receiver.");
}

}  // namespace

void check_dish_shape(RuleBook& book) {
  check_focus(book);
  check_hub(book);
  check_ribs(book);
  check_rings(book);
  check_surface(book);
  check_feed(book);
}

}  // namespace focalframe::models
