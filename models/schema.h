#pragma once

/// The words of the design file, as data: which elements and attributes exist, what they mean, which values
/// are allowed, where they live in the design. The reader, the starter designs, the XSD, the nearest-name
/// hints, the guess bands and parameter studies all work from this one table.

#include <functional>
#include <string>
#include <variant>
#include <vector>

#include "models/design.h"

namespace focalframe::models {

enum class Quantity {
  none,  ///< words, text, yes/no
  count,
  ratio,  ///< bare number or per cent
  length,
  angle,
  mass,
  area_density,  ///< kg/m2
  density,
  force,
  torque,
  pressure,         ///< and stress
  stiffness,        ///< N/m
  twist_stiffness,  ///< N m/rad
  speed,
  turning_rate,  ///< rad/s
  time,
  temperature,  ///< absolute, K inside
};

using Slot = std::variant<double*, int*, std::string*, bool*>;

struct Field {
  std::string name;  ///< attribute, e.g. "depth-at-tube"
  Quantity quantity = Quantity::none;
  std::function<Slot(TroughDesign&)> slot;
  std::vector<std::string> words;  ///< allowed words; with a quantity: words allowed instead of a number
  std::function<std::string*(TroughDesign&)> word_slot;  ///< where such a word goes; empty otherwise
  double least = 0, most = 0;  ///< allowed range, SI, both ends allowed unless open; least == most: no range
  bool above_least = false;    ///< true: value must be > least
  bool required = false;
  std::string default_text;  ///< as a user would write it; empty = none
  std::string help;          ///< one line, plain words
};

struct Element {
  std::string path;  ///< "ribs", "receiver/posts"
  bool required = false;
  bool repeats = false;
  std::vector<Field> fields;
  std::string help;
};

/// Elements of kind="trough" in the order a starter design shows them; `basis` is allowed on every element.
const std::vector<Element>& trough_schema();

/// A rule that is broken, in terms of the file: element path and attribute (empty = the element as a whole).
struct Violation {
  enum class Level { stop, warn, note } level = Level::stop;
  std::string element, attribute;
  std::string text;    ///< what was found, what is allowed and why
  std::string likely;  ///< ready-to-paste fix; empty = none known
  std::string rule;    ///< rule word where an exception can be accepted; else empty
};

/// Everything that is wrong or doubtful across fields (ranges of single fields included), all at once.
std::vector<Violation> validate(const TroughDesign& design);

}  // namespace focalframe::models
