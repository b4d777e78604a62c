#pragma once

/// The words of kind="frame": elements under <frame> and their attributes, as data for the reader, the
/// messages and the XSD.

#include <string>
#include <vector>

#include "models/quantity.h"

namespace focalframe::cli {

struct FrameWord {
  std::string name;
  models::Quantity quantity = models::Quantity::none;  ///< none: text, a list of freedoms, or three numbers
  bool required = false;
  std::string help;
};

struct FrameElement {
  std::string name;
  std::vector<FrameWord> attributes;
  std::string help;
};

const std::vector<FrameElement>& frame_elements();
/// nullptr when there is none.
const FrameElement* find_frame_element(const std::string& name);
/// The six freedoms in the order of the library: ux uy uz rx ry rz.
const std::vector<std::string>& freedom_words();
/// Shapes a section can have, and the sizes each needs.
struct ShapeWords {
  std::string shape;
  std::vector<std::string> needs, may;
};
const std::vector<ShapeWords>& section_shapes();

}  // namespace focalframe::cli
