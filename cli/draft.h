#pragma once

/// Designs to start from, and the XSD for editors.

#include <string>
#include <utility>
#include <vector>

#include "models/design.h"

namespace focalframe::cli {

/// Sizes a user can give; NaN or 0 = chosen here by the rules in draft_sizes.cpp.
struct DraftSizes {
  double aperture = models::not_given, length = models::not_given;       ///< [m]
  double module_length = models::not_given;                              ///< [m]
  double focal_length = models::not_given, depth = models::not_given;    ///< [m]
  double axis_height = models::not_given, altitude = models::not_given;  ///< [m]
  int modules = 0;
};

/// A design with every size in it, by rules of thumb from the sizes given; see draft_sizes.cpp.
models::TroughDesign starter_trough(const DraftSizes& sizes);

/// The seven numbered blocks of a design, with remarks; guesses carry basis="guess".
std::string trough_text(const models::TroughDesign& design, const std::string& name);

/// The same design with every attribute and its meaning, from the schema.
std::string every_field_text(const models::TroughDesign& design, const std::string& name);

/// A small bracket in kind="frame" with remarks.
std::string frame_starter_text(const std::string& name);

/// XML schema (XSD 1.0) of all designs the reader takes. What the reader accepts, the schema accepts.
std::string xsd_text();

}  // namespace focalframe::cli
