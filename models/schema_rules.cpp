#include "models/schema_rules.h"

#include <algorithm>
#include <cmath>
#include <stdexcept>

#include "models/profile.h"

namespace focalframe::models {
namespace {

std::string list(const std::vector<std::string>& words) {
  std::string text;
  for (std::size_t i = 0; i < words.size(); ++i)
    text += (i == 0 ? "" : i + 1 == words.size() ? " or " : ", ") + words[i];
  return text;
}

std::string range_text(const Field& field) {
  const auto value = [&](double x) { return quantity_text(x, field.quantity); };
  return field.above_least ? "more than " + value(field.least) + " and at most " + value(field.most)
                           : value(field.least) + " to " + value(field.most);
}

void check_number(RuleBook& book, const Element& element, const Field& field, double value) {
  if (std::isnan(value) || field.least == field.most) return;
  const bool rigid = std::isinf(value) && value > 0 &&
                     (field.quantity == Quantity::stiffness || field.quantity == Quantity::twist_stiffness);
  const bool low = field.above_least ? value <= field.least : value < field.least * (1 - 1e-12) - 1e-15;
  const bool high = value > field.most * (1 + 1e-12) && !rigid;
  if (low || high)
    book.stop(element.path, field.name,
              "Allowed is " + range_text(field) + ". Found " + quantity_text(value, field.quantity) +
                  ". This is: " + field.help + ".");
}

void check_words(RuleBook& book, const Element& element, const Field& field, const std::string& value) {
  if (value.empty() || field.words.empty() ||
      std::find(field.words.begin(), field.words.end(), value) != field.words.end())
    return;
  book.stop(element.path, field.name, "Allowed is " + list(field.words) + ". This is: " + field.help + ".");
}

void check_required(RuleBook& book, const Element& element, const Field& field) {
  if (!field.required || is_given(field, book.d)) return;
  Violation& v = book.missing(element.path, field.name,
                              "<" + element.path.substr(element.path.rfind('/') + 1) + "> needs \"" +
                                  field.name + "\": " + field.help + ".");
  if (!field.words.empty() && field.quantity == Quantity::none)
    v.text += " One of: " + list(field.words) + ".";
}

void check_element(RuleBook& book, const Element& element) {
  TroughDesign& writable = const_cast<TroughDesign&>(book.d);  // slots only read here
  for (const Field& field : element.fields) {
    check_required(book, element, field);
    const Slot slot = field.slot(writable);
    if (const auto* number = std::get_if<double*>(&slot)) check_number(book, element, field, **number);
    if (const auto* count = std::get_if<int*>(&slot); count && is_given(field, book.d))
      check_number(book, element, field, **count);
    if (const auto* text = std::get_if<std::string*>(&slot)) check_words(book, element, field, **text);
  }
}

bool parent_given(const Element& element, const TroughDesign& design) {
  const std::size_t slash = element.path.find('/');
  if (slash == std::string::npos) return true;
  const Element* parent = find_element(element.path.substr(0, slash));
  if (is_given(*parent, design)) return true;
  return std::any_of(trough_schema().begin(), trough_schema().end(), [&](const Element& e) {
    return e.path.starts_with(parent->path + "/") && is_given(e, design);
  });
}

struct Size {
  const char* name;
  double ProfileInput::*value;
};
constexpr Size sizes[] = {{"outside-diameter", &ProfileInput::outside_diameter},
                          {"side", &ProfileInput::side},
                          {"depth", &ProfileInput::depth},
                          {"width", &ProfileInput::width},
                          {"wall", &ProfileInput::wall},
                          {"thickness", &ProfileInput::thickness},
                          {"web", &ProfileInput::web},
                          {"flange", &ProfileInput::flange},
                          {"root-radius", &ProfileInput::root_radius},
                          {"toe-radius", &ProfileInput::toe_radius},
                          {"outer-radius", &ProfileInput::outer_radius},
                          {"inner-radius", &ProfileInput::inner_radius},
                          {"area", &ProfileInput::area},
                          {"Iy", &ProfileInput::Iy},
                          {"Iz", &ProfileInput::Iz},
                          {"J", &ProfileInput::J},
                          {"Wy", &ProfileInput::Wy},
                          {"Wz", &ProfileInput::Wz},
                          {"Wt", &ProfileInput::Wt},
                          {"shear-area-y", &ProfileInput::shear_area_y},
                          {"shear-area-z", &ProfileInput::shear_area_z}};

using Words = std::vector<std::string>;
struct ShapeSizes {
  const char* shape;
  Words needs, may;
};
const ShapeSizes* sizes_of(const std::string& shape) {
  static const std::vector<ShapeSizes> all{
      {"round-tube", {"outside-diameter", "wall"}, {}},
      {"square-tube", {"side", "wall"}, {"outer-radius", "inner-radius"}},
      {"rectangular-tube", {"depth", "width", "wall"}, {"outer-radius", "inner-radius"}},
      {"round-bar", {"outside-diameter"}, {}},
      {"flat", {"depth", "thickness"}, {}},
      {"angle", {"depth", "width", "thickness"}, {"root-radius", "toe-radius"}},
      {"channel", {"depth", "width", "web", "flange"}, {}},
      {"properties",
       {"depth", "area", "Iy", "Iz", "J", "Wy", "Wz", "Wt"},
       {"thickness", "shear-area-y", "shear-area-z"}},
      {"lattice-box", {"depth", "width"}, {}}};
  const auto at = std::find_if(all.begin(), all.end(), [&](const ShapeSizes& s) { return s.shape == shape; });
  return at == all.end() ? nullptr : &*at;
}

bool listed(const Words& words, const std::string& word) {
  return std::find(words.begin(), words.end(), word) != words.end();
}

void check_wall(RuleBook& book, const std::string& path, const ProfileInput& p) {
  const bool round = p.shape == "round-tube";
  const double outside = round                      ? p.outside_diameter
                         : p.shape == "square-tube" ? p.side
                                                    : std::fmin(p.depth, p.width);
  const char* outside_name = round ? "outside-diameter" : p.shape == "square-tube" ? "side" : "depth";
  const char* outside_words = round ? "outside diameter" : p.shape == "square-tube" ? "side" : "smaller side";
  if (std::isnan(p.wall) || std::isnan(outside) || outside <= 0) return;
  if (book.reported(path, outside_name)) return;
  const std::vector<std::string> involved{path + "/" + outside_name};
  const std::string half = quantity_text(outside / 2, Quantity::length);
  const std::string found = quantity_text(p.wall, Quantity::length, outside / 2);
  if (p.wall <= 0 || p.wall >= outside / 2) {
    std::erase_if(book.violations,
                  [&](const Violation& v) { return v.element == path && v.attribute == "wall"; });
    book.stop(path, "wall",
              std::string("A wall must be more than 0 and less than half the ") + outside_words + ", here " +
                  half + ". Found " + found + ".")
        .involves = involved;
    return;
  }
  const double ratio = outside / p.wall;
  if (ratio < 4 || ratio > 400)
    book.stop(path, "wall",
              std::string("The ") + outside_words + " is " + number_text(ratio) +
                  " times the wall; tubes lie between 4 and 400, here a wall of " +
                  quantity_text(outside / 400, Quantity::length) + " to " +
                  quantity_text(outside / 4, Quantity::length) + ".")
        .involves = involved;
}

bool book_has_stop(const RuleBook& book, const std::string& path) {
  return std::any_of(book.violations.begin(), book.violations.end(), [&](const Violation& v) {
    return v.level == Violation::Level::stop && v.element == path;
  });
}

void check_profile(RuleBook& book, const std::string& path, const ProfileInput& p) {
  const ShapeSizes* wanted = sizes_of(p.shape);
  if (!wanted) return;
  bool complete = true;
  for (const Size& size : sizes) {
    const bool needed = listed(wanted->needs, size.name), may = needed || listed(wanted->may, size.name);
    const bool given = !std::isnan(p.*size.value);
    complete = complete && (!needed || given) && (!given || may);
    if (needed && !given)
      book.missing(path, size.name,
                   "A " + p.shape + " needs " + list(wanted->needs) + "; \"" + size.name + "\" is missing.")
          .involves = {path + "/shape"};
    if (!may && given)
      book.stop(path, size.name,
                "A " + p.shape + " has no \"" + size.name + "\". It needs " + list(wanted->needs) + ".")
          .involves = {path + "/shape"};
  }
  if (p.shape.ends_with("tube")) check_wall(book, path, p);
  if (p.shape == "flat" && p.thickness > p.depth)
    book.stop(path, "thickness",
              "A flat is thinner than it is deep, here " + quantity_text(p.depth, Quantity::length) + ".")
        .involves = {path + "/depth"};
  if (p.shape == "lattice-box" || !complete || book_has_stop(book, path)) return;
  try {
    section_of(p);
  } catch (const std::invalid_argument& error) {
    book.stop(path, "shape", std::string("These sizes do not make a section: ") + error.what() + ".");
  }
}

}  // namespace

bool RuleBook::reported(const std::string& element, const std::string& attribute) const {
  return std::any_of(violations.begin(), violations.end(), [&](const Violation& v) {
    return v.level == Violation::Level::stop && v.element == element && v.attribute == attribute;
  });
}

Violation& RuleBook::add(Violation::Level level, std::string element, std::string attribute,
                         std::string text) {
  Violation v;
  v.level = level;
  v.element = std::move(element);
  v.attribute = std::move(attribute);
  v.text = std::move(text);
  violations.push_back(std::move(v));
  return violations.back();
}

void check_fields(RuleBook& book) {
  for (const Element& element : trough_schema()) {
    if (element.repeats) continue;
    const bool given = is_given(element, book.d);
    if (given) {
      check_element(book, element);
    } else if (element.required && parent_given(element, book.d) && element.path != "drive" &&
               element.path != "pylons") {
      const std::string name = element.path.substr(element.path.rfind('/') + 1);
      book.missing(element.path, "", "The design needs <" + name + ">: " + element.help + ".");
    }
  }
}

void check_profiles(RuleBook& book) {
  check_profile(book, "torque-tube", book.d.tube.profile);
  check_profile(book, "torque-tube/chords", book.d.tube.chords);
  check_profile(book, "torque-tube/webs", book.d.tube.webs);
  check_profile(book, "ribs/bar", book.d.ribs.bar);
  check_profile(book, "ribs/chords", book.d.ribs.chords);
  check_profile(book, "ribs/webs", book.d.ribs.webs);
  if (book.d.purlins.count > 0) check_profile(book, "purlins", book.d.purlins.profile);
  check_profile(book, "receiver/posts", book.d.receiver.posts.profile);
  check_profile(book, "pylons", book.d.pylons.profile);
}

std::vector<Violation> validate(const TroughDesign& design) {
  RuleBook book(design);
  check_fields(book);
  check_profiles(book);
  check_shape(book);
  check_ground(book);
  check_weather(book);
  check_actions(book);
  check_optics(book);
  check_parts(book);
  return std::move(book.violations);
}

}  // namespace focalframe::models
