#pragma once

/// A coefficient table as a picture: on the terminal with letters, or as an SVG drawing.

#include <string>

#include "cli/table_file.h"

namespace focalframe::cli {

/// Best coefficients over pitch in 61 columns: a = Ca, s = Cs, m = Cm (times 4, to be seen), a line at zero,
/// and below how the mirror stands to the wind.
std::string table_sketch(const loads::CoefficientTable& table);

/// Best coefficients over pitch, an SVG file of its own.
std::string table_svg(const loads::CoefficientTable& table);

}  // namespace focalframe::cli
