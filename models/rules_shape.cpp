#include <cmath>

#include "fem/units.h"
#include "models/schema_rules.h"

namespace focalframe::models {
namespace {

std::string length(double value) { return quantity_text(value, Quantity::length); }
std::string degrees(double value) { return number_text(value / deg) + " deg"; }

void check_focus(RuleBook& book) {
  const ParabolaInput& p = book.d.parabola;
  const bool by_focus = !std::isnan(p.focal_length), by_depth = !std::isnan(p.depth);
  if (!by_focus && !by_depth) {
    if (is_given(*find_element("parabola"), book.d)) {
      book.missing("parabola", "focal-length",
                   "<parabola> needs \"focal-length\" or \"depth\"; with a tape, the depth is a straight "
                   "edge over both rims down to the vertex.");
    }
    return;
  }
  if (std::isnan(p.aperture) || book.reported("parabola", "aperture")) return;
  const std::string attribute = by_focus ? "focal-length" : "depth";
  if (book.reported("parabola", attribute)) return;
  const double f = focal_length(p);
  if (by_focus && by_depth) {
    const double focus_of_depth = p.aperture * p.aperture / (16 * p.depth);
    if (std::abs(focus_of_depth - p.focal_length) > 0.01 * p.focal_length) {
      Violation& v =
          book.stop("parabola", "focal-length depth",
                    "They disagree: " + length(p.aperture) + " wide and " + length(p.depth) +
                        " deep has its focus at " + length(focus_of_depth) + "; " + length(p.focal_length) +
                        " needs a depth of " + length(p.aperture * p.aperture / (16 * p.focal_length)) +
                        ". Allowed difference 1 %.");
      v.advice = "Keep the one you measured and delete the other";
      v.involves = {"parabola/aperture"};
      return;
    }
  }
  const double ratio = f / p.aperture, rim = rim_angle(p.aperture, f);
  if (!(ratio >= 0.15 && ratio <= 1.5 && rim >= 20 * deg && rim <= 150 * deg))
    book.stop(
            "parabola", attribute,
            "With an aperture of " + length(p.aperture) + " the focal length is " + number_text(ratio) +
                " of the width and the rim angle " + degrees(rim) +
                ". A trough has 0.15 to 1.5 of the width (rim angle 118 to 20 deg), here a focal length of " +
                length(0.15 * p.aperture) + " to " + length(1.4 * p.aperture) + ".")
        .involves = {"parabola/aperture"};
}

void check_row(RuleBook& book) {
  const RowInput& row = book.d.row;
  const double width = book.d.parabola.aperture;
  if (row.modules > 0 && row.drive_after_module > row.modules)
    book.stop("row", "drive-after-module",
              "The row has " + std::to_string(row.modules) +
                  " modules, so the drive stands after module 0 (first end) to " +
                  std::to_string(row.modules) + ".")
        .involves = {"row/modules"};
  const double area = width * row.module_length;
  if (area > 500 || area < 0.05)
    book.stop("row", "module-length",
              "One module would be " + number_text(area) + " m2; modules lie between 0.05 and 500 m2.")
        .involves = {"parabola/aperture"};
  if (!std::isnan(row.axis_to_vertex) && !row.axis_word.empty())
    book.stop("row", "axis-to-vertex", "Give a distance or the word balanced, not both.");
  if (std::abs(row.axis_to_vertex) > width)
    book.stop("row", "axis-to-vertex",
              "The axis would lie further from the mirror than the trough is wide (" + length(width) + ").")
        .involves = {"parabola/aperture"};
  if (row.end_gap >= row.module_length / 2)
    book.stop("row", "end-gap",
              "The first rib would stand beyond the middle of the module, which is " +
                  length(row.module_length) + " long.")
        .involves = {"row/module-length"};
  if (row.axis_height < width / 2 && !book.reported("parabola", "aperture"))
    book.warn("row", "axis-height",
              "With half the aperture of " + length(width / 2) +
                  " the rim would reach the ground when the trough faces the horizon.")
        .involves = {"parabola/aperture"};
  if (row.axis_height > 60)
    book.warn("row", "axis-height", "This is the height above the ground, not above the sea.");
  if (!std::isnan(row.axis_height) && row.axis_height == book.d.site.altitude)
    book.warn("row", "axis-height",
              "This equals the site's altitude; it is the height above the ground that is wanted here.")
        .involves = {"site/altitude"};
}

void check_tube(RuleBook& book) {
  const RowInput& row = book.d.row;
  const double width = book.d.parabola.aperture, size = largest_size(book.d.tube.profile);
  const std::string size_name = book.d.tube.profile.shape == "square-tube"        ? "side"
                                : book.d.tube.profile.shape == "rectangular-tube" ? "depth"
                                                                                  : "outside-diameter";
  const bool row_given = is_given(*find_element("row"), book.d);
  if (row_given && std::isnan(row.tube_to_vertex) && std::isnan(row.tube_to_mirror))
    book.missing("row", "tube-to-vertex",
                 "<row> needs \"tube-to-vertex\" (tube centre behind the vertex) or \"tube-to-mirror\" (gap "
                 "from tube skin to mirror).");
  if (!std::isnan(row.tube_to_vertex) && !std::isnan(row.tube_to_mirror) &&
      std::abs(row.tube_to_vertex - row.tube_to_mirror - size / 2) > 1 * mm)
    book.stop("row", "tube-to-mirror",
              "\"tube-to-vertex\" of " + length(row.tube_to_vertex) + " leaves a gap of " +
                  length(row.tube_to_vertex - size / 2) + " with this tube.")
        .advice = "Keep the one you measured and delete the other";
  if (std::isnan(size) || book.reported("torque-tube", size_name)) return;
  if (size > 0.3 * width)
    book.stop("torque-tube", size_name,
              "The tube would be " + number_text(size / width) + " of the aperture of " + length(width) +
                  "; more than 0.3 leaves no trough.")
        .involves = {"parabola/aperture"};
  else if (row.tube_to_vertex < size / 2)
    book.stop("row", "tube-to-vertex",
              "The tube's skin would stand in the mirror: its centre must lie at least half its size, " +
                  length(size / 2) + ", behind the vertex. Found " + length(row.tube_to_vertex) + ".")
        .involves = {"torque-tube/" + size_name};
}

void check_purlins(RuleBook& book) {
  const double width = book.d.parabola.aperture;
  const PurlinsInput& purlins = book.d.purlins;
  if (purlins.count % 2 != 0)
    book.stop("purlins", "count",
              "Both sides carry the same number, so the count must be even. Found " +
                  std::to_string(purlins.count) + ".")
        .likely = "count=\"" + std::to_string(purlins.count + 1) + "\"";
  const double size = largest_size(purlins.profile);
  if (purlins.count > 0 && size > 0.25 * width)
    book.stop("purlins", "shape",
              "The purlins would be " + length(size) + " deep, more than a quarter of the aperture.")
        .involves = {"parabola/aperture", "purlins/side", "purlins/outside-diameter", "purlins/depth"};
}

void check_mirror(RuleBook& book) {
  const MirrorInput& mirror = book.d.mirror;
  if (is_given(*find_element("mirror"), book.d) && std::isnan(mirror.mass)) {
    if (std::isnan(mirror.thickness))
      book.missing("mirror", "thickness",
                   "<mirror> needs \"thickness\" and \"material\", or \"mass\" per area.");
    if (mirror.material.empty())
      book.missing("mirror", "material",
                   "<mirror> needs \"material\" to turn its thickness into a mass, or \"mass\" per area.");
  }
  if (mirror.fixed_to == "purlins" && book.d.purlins.count < 2)
    book.stop("mirror", "fixed-to", "There are no purlins to fix the mirror to.").involves = {
        "purlins/count"};
  if (mirror.kind == "sheet" && (mirror.pad_height > 0 || mirror.pad_mass > 0))
    book.stop("mirror", "kind",
              "A sheet lies on its ribs or purlins without pads; pad-height and pad-mass belong to facets.")
        .involves = {"mirror/pad-height", "mirror/pad-mass"};
  if (mirror.kind == "facets" && mirror.sheet_braces_ribs)
    book.stop("mirror", "sheet-braces-ribs", "Facets on pads do not hold the ribs; only a riveted sheet may.")
        .involves = {"mirror/kind"};
}

void check_receiver(RuleBook& book) {
  const ReceiverInput& r = book.d.receiver;
  const double width = book.d.parabola.aperture, outside = r.outside_diameter;
  if (!std::isnan(r.wall) && r.wall >= outside / 2)
    book.stop("receiver", "wall",
              "A wall must be more than 0 and less than half the outside diameter, here " +
                  length(outside / 2) + ". Found " + length(r.wall) + ".")
        .involves = {"receiver/outside-diameter"};
  if (outside / width < 0.003 || outside / width > 0.15)
    book.warn("receiver", "outside-diameter",
              "The receiver is " + number_text(outside / width) +
                  " of the aperture; 0.003 to 0.15 is usual. Diameter, not radius, is wanted.")
        .involves = {"parabola/aperture"};
  if (outside / 2 >= focal_length(book.d.parabola) && !book.reported("parabola", "focal-length"))
    book.stop("receiver", "outside-diameter",
              "The receiver would reach the mirror: the focus lies " + length(focal_length(book.d.parabola)) +
                  " from it.")
        .involves = {"parabola/focal-length", "parabola/depth", "parabola/aperture"};
  const SleeveInput& s = r.sleeve;
  if (s.outside_diameter - 2 * s.wall <= outside)
    book.stop("receiver/sleeve", "outside-diameter",
              "The sleeve's inside of " + length(s.outside_diameter - 2 * s.wall) +
                  " does not clear the receiver of " + length(outside) + ".")
        .involves = {"receiver/outside-diameter", "receiver/sleeve/wall"};
  if (s.outside_diameter > 6 * outside)
    book.stop("receiver/sleeve", "outside-diameter",
              "The sleeve would be more than six times as wide as the receiver of " + length(outside) + ".")
        .involves = {"receiver/outside-diameter"};
  if (largest_size(r.posts.profile) > 0.2 * width)
    book.stop("receiver/posts", "shape",
              "The posts would be " + length(largest_size(r.posts.profile)) +
                  " thick, more than a fifth of the aperture.")
        .involves = {"parabola/aperture", "receiver/posts/side", "receiver/posts/outside-diameter",
                     "receiver/posts/depth"};
}

void check_plates(RuleBook& book) {
  const EndPlatesInput& plates = book.d.end_plates;
  if (is_given(*find_element("end-plates"), book.d) && std::isnan(plates.mass) &&
      (std::isnan(plates.diameter) || std::isnan(plates.thickness)))
    book.missing("end-plates", "mass",
                 "<end-plates> needs \"mass\", or \"diameter\" and \"thickness\" to reckon it from.");
  if (book.d.row.coupling == "torque-only" && !std::isnan(plates.bending_stiffness))
    book.note("end-plates", "bending-stiffness",
              "Not used: with coupling torque-only the joint between modules carries no bending.")
        .involves = {"row/coupling"};
}

}  // namespace

void check_shape(RuleBook& book) {
  check_focus(book);
  check_row(book);
  check_tube(book);
  check_purlins(book);
  check_mirror(book);
  check_receiver(book);
  check_plates(book);
}

}  // namespace focalframe::models
