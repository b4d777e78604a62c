#pragma once

/// The words of the design file, as data: which elements and attributes exist, what they mean, which values
/// are allowed, where they live in the design. The reader, the starter designs, the XSD, the nearest-name
/// hints, the guess bands and parameter studies all work from this one table.

#include <functional>
#include <string>
#include <variant>
#include <vector>

#include "models/design.h"
#include "models/quantity.h"

namespace focalframe::models {

using Slot = std::variant<double*, int*, std::string*, bool*>;

struct Field {
  std::string name;  ///< attribute, e.g. "depth-at-tube"
  Quantity quantity = Quantity::none;
  std::function<Slot(TroughDesign&)> slot;
  std::vector<std::string> words;  ///< allowed words; with a quantity: words allowed instead of a number
  std::function<std::string*(TroughDesign&)> word_slot;  ///< where such a word goes; empty otherwise
  double least = 0, most = 0;  ///< allowed range, SI, both ends allowed unless open; least == most: no range
  bool above_least = false;    ///< true: value must be > least
  bool required = false;       ///< when its element is there
  std::string default_text;    ///< as a user would write it; empty = none
  std::string help;            ///< one line, plain words
};

struct Element {
  std::string path;  ///< "ribs", "receiver/posts"
  bool required = false;
  bool repeats = false;
  std::vector<Field> fields;
  std::string help;
  std::function<bool*(TroughDesign&)> presence;  ///< set to true by the reader; empty where nothing needs it
};

/// Elements of kind="trough" in the order a starter design shows them; `basis` is allowed on every element.
const std::vector<Element>& trough_schema();

/// nullptr when there is none.
const Element* find_element(const std::string& path);
const Field* find_field(const Element& element, const std::string& attribute);

/// Words a `basis` can have.
const std::vector<std::string>& basis_words();

/// False while the field holds what a default-constructed design holds.
bool is_given(const Field& field, const TroughDesign& design);
bool is_given(const Element& element, const TroughDesign& design);

/// f [m] from focal-length or depth; NaN when neither is given.
double focal_length(const ParabolaInput& parabola);
/// Angle between the optical axis and the ray from the rim to the focus [rad].
double rim_angle(double aperture, double focal_length);
/// Largest cross dimension of a profile [m]; NaN when its sizes are not given.
double largest_size(const ProfileInput& profile);

/// A rule that is broken, in terms of the file: element path and attribute (empty = the element as a whole).
struct Violation {
  enum class Level { stop, warn, note } level = Level::stop;
  std::string element, attribute;  ///< several attributes are parted by spaces
  std::string text;                ///< what was found, what is allowed and why
  std::string likely;              ///< ready-to-paste fix; empty = none known
  std::string rule;                ///< rule word where an exception can be accepted; else empty
  std::string head;                ///< what is wrong, where element and attribute do not say it; else empty
  std::string advice;              ///< what to do, where there is not one thing to paste; else empty
  std::vector<std::string> involves;  ///< "element/attribute" of other values this rule looked at
  bool missing = false;               ///< the attribute or element is not there
  bool no_solution = false;           ///< the frame could move freely
};

/// Everything that is wrong or doubtful across fields (ranges of single fields included), all at once.
std::vector<Violation> validate(const TroughDesign& design);

}  // namespace focalframe::models
