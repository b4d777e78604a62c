#include <algorithm>
#include <cmath>

#include "fem/units.h"
#include "models/profile.h"
#include "models/schema_rules.h"
#include "models/trough_layout.h"

namespace focalframe::models {
namespace {

std::string length(double value) { return quantity_text(value, Quantity::length); }

// What one kind of part is described by: words that belong to it, of all words that any kind has.
struct Kind {
  std::string element, kind;            // "ribs", "truss"
  std::vector<std::string> attributes;  // it needs
  std::vector<std::string> children;    // it needs
};

void check_kind(RuleBook& book, const Kind& kind, const std::vector<std::string>& all_attributes,
                const std::vector<std::string>& all_children) {
  const Element& element = *find_element(kind.element);
  const auto has = [](const std::vector<std::string>& words, const std::string& word) {
    return std::find(words.begin(), words.end(), word) != words.end();
  };
  const std::string subject =
      kind.element == "ribs" ? "A rib of kind " + kind.kind : "A torque tube of shape " + kind.kind;
  for (const std::string& name : all_attributes) {
    const bool given = is_given(*find_field(element, name), book.d), needed = has(kind.attributes, name);
    if (needed && !given)
      book.missing(kind.element, name,
                   subject + " needs \"" + name + "\": " + find_field(element, name)->help + ".");
    if (!needed && given)
      book.stop(kind.element, name, subject + " has no \"" + name + "\".").advice = "Delete it";
  }
  for (const std::string& name : all_children) {
    const Element& child = *find_element(kind.element + "/" + name);
    const bool given = is_given(child, book.d), needed = has(kind.children, name);
    if (needed && !given)
      book.missing(kind.element, "",
                   subject + " needs <" + name + "> inside <" + kind.element + ">: " + child.help + ".");
    if (!needed && given) book.stop(child.path, "", subject + " has no <" + name + ">.").advice = "Delete it";
  }
}

void check_rib_kind(RuleBook& book) {
  if (!is_given(*find_element("ribs"), book.d)) return;
  const std::string& kind = book.d.ribs.kind;
  const std::vector<Kind> kinds{
      {"ribs", "plate", {"thickness", "depth-at-tube", "depth-at-tip", "material"}, {}},
      {"ribs", "bent", {}, {"bar"}},
      {"ribs", "truss", {"depth-at-tube", "depth-at-tip", "panels"}, {"chords", "webs"}}};
  for (const Kind& k : kinds)
    if (k.kind == kind)
      check_kind(book, k, {"thickness", "depth-at-tube", "depth-at-tip", "material", "panels"},
                 {"bar", "chords", "webs"});
}

void check_rib_sizes(RuleBook& book) {
  const RibsInput& ribs = book.d.ribs;
  const double width = book.d.parabola.aperture;
  if (ribs.thickness >= ribs.depth_at_tip)
    book.stop("ribs", "thickness",
              "A rib is a plate on edge: its thickness must be less than its depth at the tip, here " +
                  length(ribs.depth_at_tip) + ". Found " + length(ribs.thickness) + ".")
        .involves = {"ribs/depth-at-tip"};
  if (ribs.depth_at_tip > ribs.depth_at_tube)
    book.warn("ribs", "depth-at-tip",
              "The rib would be deeper at the tip than at the tube (" + length(ribs.depth_at_tube) + ").")
        .involves = {"ribs/depth-at-tube"};
  if (ribs.depth_at_tube > 0.5 * width)
    book.stop("ribs", "depth-at-tube",
              "The rib would be deeper than half the aperture of " + length(width) + ".")
        .involves = {"parabola/aperture"};
  const double chord = largest_size(ribs.chords);
  if (ribs.kind == "truss" && ribs.depth_at_tip < chord)
    book.stop("ribs", "depth-at-tip",
              "The chords' centre lines must be at least one chord apart, here " + length(chord) +
                  ", or the chords lie in each other. Found " + length(ribs.depth_at_tip) + ".")
        .involves = {"ribs/chords/side", "ribs/chords/depth", "ribs/chords/outside-diameter"};
  const int per_side = book.d.purlins.count / 2;
  if (ribs.kind == "truss" && ribs.panels > 0 && per_side > 0 && ribs.panels % per_side != 0)
    book.note("ribs", "panels",
              "Purlins meet the upper chord between its panel points and bend it there; a multiple of " +
                  std::to_string(per_side) + " panels puts each purlin on a panel point.")
        .involves = {"purlins/count"};
}

bool stopped(const RuleBook& book) {
  return std::any_of(book.violations.begin(), book.violations.end(),
                     [](const Violation& v) { return v.level == Violation::Level::stop; });
}

// A straight lower edge comes nearest to the mirror somewhere between tube and rim.
void check_lower_edge(RuleBook& book) {
  const RibsInput& ribs = book.d.ribs;
  if (ribs.lower_edge != "straight" || ribs.kind == "bent" || stopped(book)) return;
  const TroughLayout at = lay_out(book.d);
  const double root = at.tube_half_width, rim = at.width / 2;
  double least = rib_depth(book.d, at, root), where = root;
  for (int i = 1; i <= 40; ++i) {
    const double y = root + (rim - root) * i / 40, depth = rib_depth(book.d, at, y);
    if (depth < least) least = depth, where = y;
  }
  const double needed = ribs.kind == "truss" ? largest_size(ribs.chords) : 0.5 * ribs.depth_at_tip;
  if (least >= needed) return;
  const double more = std::ceil((needed - least) / (5 * mm)) * 5 * mm;
  book.stop("ribs", "lower-edge",
            "A straight edge between root and tip lies above the curve in between: the rib would be " +
                length(std::round(least / mm) * mm) + " deep at " + length(std::round(where / mm) * mm) +
                " from the middle; at least " + length(needed) + " is needed. About " + length(more) +
                " more at both ends would do, or an edge that follows the mirror.")
      .involves = {"ribs/depth-at-tube", "ribs/depth-at-tip", "parabola/focal-length", "parabola/depth"};
}

void check_box(RuleBook& book) {
  const TubeInput& tube = book.d.tube;
  if (tube.profile.shape.empty()) return;
  const bool box = tube.profile.shape == "lattice-box";
  if (box)
    check_kind(book, {"torque-tube", "lattice-box", {}, {"chords", "webs"}}, {"material"},
               {"chords", "webs"});
  else
    check_kind(book, {"torque-tube", tube.profile.shape, {"material"}, {}}, {"material"}, {"chords", "webs"});
  if (!box) {
    for (const char* word : {"panels-per-bay", "bracing"})
      if (is_given(*find_field(*find_element("torque-tube"), word), book.d))
        book.stop("torque-tube", word, "Only a lattice-box has panels and bracing.").involves = {
            "torque-tube/shape"};
    return;
  }
  const double least = 2 * largest_size(tube.chords);
  for (const auto& [name, size] : {std::pair{"depth", tube.profile.depth}, {"width", tube.profile.width}})
    if (size < least)
      book.stop("torque-tube", name,
                "The chords' centre lines must be at least two chords apart, here " + length(least) +
                    ". Found " + length(size) + ".")
          .involves = {"torque-tube/chords/side", "torque-tube/chords/depth",
                       "torque-tube/chords/outside-diameter"};
  if (stopped(book)) return;
  const std::vector<double> posts = lay_out(book.d).post_x;
  if (std::adjacent_find(posts.begin(), posts.end()) != posts.end())
    book.stop("receiver/posts", "per-module",
              "A lattice box carries posts at its ribs, one each: with " +
                  std::to_string(book.d.ribs.per_module) + " ribs two of these " +
                  std::to_string(book.d.receiver.posts.per_module) + " posts would fall on one.")
        .involves = {"ribs/per-module"};
}

}  // namespace

void check_parts(RuleBook& book) {
  check_rib_kind(book);
  check_rib_sizes(book);
  check_box(book);
  check_lower_edge(book);
}

}  // namespace focalframe::models
