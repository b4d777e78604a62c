#pragma once

/// How a row swings and where it would buckle: the whole assembly in one pose, what turns and what stands
/// together.

#include <string>
#include <vector>

#include "loads/coefficients.h"
#include "models/design.h"

namespace focalframe::models {

struct RowMode {
  double frequency = not_given;  ///< [Hz]
  double residual = not_given;   ///< relative [-]
  std::string moves;             ///< the place that moves most, in the builder's words, and how
};

struct RowBuckling {
  double factor = not_given;  ///< on weight and wind together [-]
  double residual = not_given;
  std::string moves;
};

struct RowStability {
  double elevation = not_given;  ///< [rad]
  int freedoms = 0;
  std::vector<RowMode> modes;
  std::string load;  ///< what the buckling factors multiply, in words; empty = no wind was stated
  std::vector<RowBuckling> buckling;  ///< ascending; empty = none below 1000
};

/// Frequencies in one pose, and buckling factors under weight and the 3 s gust of the STOW wind (upper
/// coefficients, both winds, the worse), straight-line pattern. Ends of ribs, purlins and posts buckle
/// between their nodes only as finely as the ribs are divided.
RowStability row_stability(const TroughDesign& design, const loads::CoefficientTable& table, double elevation,
                           int count);

}  // namespace focalframe::models
