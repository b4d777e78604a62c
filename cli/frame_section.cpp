#include "cli/frame_section.h"

#include <algorithm>
#include <map>
#include <stdexcept>

#include "cli/nearest.h"
#include "cli/quantity.h"
#include "fem/section_profiles.h"

namespace focalframe::cli {
namespace {

using Values = std::map<std::string, double>;

bool listed(const std::vector<std::string>& words, const std::string& word) {
  return std::find(words.begin(), words.end(), word) != words.end();
}

const ShapeWords* shape_of(const FrameElementReader& element) {
  const std::string shape = element.text("shape");
  std::vector<std::string> names;
  for (const ShapeWords& s : section_shapes()) {
    if (s.shape == shape) return &s;
    names.push_back(s.shape);
  }
  if (!element.has("shape")) return nullptr;
  const std::string near = nearest_name(shape, names);
  element.say("shape", "The shapes are: " + joined(names) + ".").likely =
      near.empty() ? "" : "shape=\"" + near + "\"";
  return nullptr;
}

// Sizes the shape needs or may have; false when one is missing or unreadable.
bool read_sizes(const FrameElementReader& element, const ShapeWords& shape, Values& values) {
  bool good = true;
  for (const FrameWord& word : find_frame_element("section")->attributes) {
    if (word.quantity == Quantity::none) continue;
    const bool needed = listed(shape.needs, word.name), wanted = needed || listed(shape.may, word.name);
    if (element.has(word.name) && !wanted) {
      element.say(word.name, "A section of shape " + shape.shape + " has no \"" + word.name +
                                 "\". It needs: " + joined(shape.needs) + ".");
      good = false;
    } else if (needed && !element.has(word.name)) {
      element.say("", "A section of shape " + shape.shape + " needs: " + joined(shape.needs) + "; \"" +
                          word.name + "\" is missing.");
      good = false;
    } else if (element.has(word.name)) {
      const auto value = element.number(word.name);
      good = good && value.has_value();
      const bool radius = word.name.ends_with("radius");  // 0 is a sharp corner
      if (value && (*value < 0 || (*value == 0 && !radius))) {
        element.say(word.name, radius ? "This must be 0 or more." : "This must be more than 0.");
        good = false;
      }
      values[word.name] = value.value_or(0);
    }
  }
  return good;
}

// A wall that does not fit, with the unit slip that would.
bool wall_fits(const FrameElementReader& element, Values& v) {
  if (!v.count("wall")) return true;
  double outside = v.count("outside-diameter") ? v["outside-diameter"]
                   : v.count("side")           ? v["side"]
                                               : std::min(v["depth"], v["width"]);
  if (v["wall"] < outside / 2) return true;
  Message& m = element.say("wall", "A wall must be more than 0 and less than half the outer size, here " +
                                       quantity_text(outside / 2, Quantity::length) + ". Found " +
                                       quantity_text(v["wall"], Quantity::length, outside / 2) + ".");
  const std::string number = split_number(element.text("wall")).first;
  for (const std::string& unit : common_units(Quantity::length)) {
    const ParsedQuantity parsed = parse_quantity(number + " " + unit, Quantity::length);
    if (m.likely.empty() && parsed.ok() && parsed.value < outside / 4 && parsed.value > outside / 400)
      m.likely = "wall=\"" + number + " " + unit + "\"";
  }
  return false;
}

// `tilt`: from the legs of an angle to its principal axes.
fem::Section made(const std::string& shape, Values& v, double& tilt) {
  const auto radius = [&](const char* word) { return v.count(word) ? v[word] : -1.0; };
  if (shape == "round-tube") return fem::round_tube({v["outside-diameter"], v["wall"]});
  if (shape == "square-tube")
    return fem::rectangular_tube(
        {v["side"], v["side"], v["wall"], radius("outer-radius"), radius("inner-radius")});
  if (shape == "rectangular-tube")
    return fem::rectangular_tube(
        {v["depth"], v["width"], v["wall"], radius("outer-radius"), radius("inner-radius")});
  if (shape == "round-bar") return fem::round_bar({v["outside-diameter"]});
  if (shape == "flat") return fem::flat({v["depth"], v["thickness"]});
  if (shape == "angle") {
    const fem::AngleSection angle =
        fem::angle({v["depth"], v["width"], v["thickness"], v["root-radius"], v["toe-radius"]});
    tilt = angle.tilt;
    return angle.section;
  }
  if (shape == "channel") return fem::channel({v["depth"], v["width"], v["web"], v["flange"]}).section;
  fem::Section section;
  section.A = v["area"];
  section.Iy = v["Iy"];
  section.Iz = v["Iz"];
  section.J = v["J"];
  section.shear_area_y = v["shear-area-y"];
  section.shear_area_z = v["shear-area-z"];
  section.Wy = v["Wy"];
  section.Wz = v["Wz"];
  section.Wt = v["Wt"];
  section.peak_shear_y = v["peak-shear-y"];
  section.peak_shear_z = v["peak-shear-z"];
  return section;
}

}  // namespace

FrameSection frame_section(const FrameElementReader& element) {
  FrameSection result;
  fem::Section& section = result.section;
  Values values;
  const ShapeWords* shape = shape_of(element);
  if (shape && read_sizes(element, *shape, values) && wall_fits(element, values)) {
    try {
      section = made(shape->shape, values, result.tilt);
    } catch (const std::invalid_argument& error) {
      element.say("", std::string("These sizes do not make a section: ") + error.what() + ".");
    }
    const bool properties = shape->shape == "properties";
    if (element.has("round") && !properties)
      element.say("round", "Only a section of shape properties says whether it is round.");
    else if (element.has("round"))
      section.round = element.word("round", {"yes", "no"}) == "yes";
    if (shape->shape == "angle" || shape->shape == "channel")
      element.say("",
                  "An open section: weak in torsion, and its shear centre does not lie on the member's "
                  "axis through the centroid. Warping is left out, which is on the safe side for twist.",
                  Level::note);
  }
  section.name = element.text("id");
  return result;
}

}  // namespace focalframe::cli
