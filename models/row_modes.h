#pragma once

/// How a row swings and where it would buckle: the whole assembly in one pose, what turns and what stands
/// together.

#include <string>
#include <vector>

#include "loads/coefficients.h"
#include "models/design.h"
#include "models/schema.h"

namespace focalframe::models {

struct RowMode {
  double frequency = not_given;  ///< [Hz]
  double residual = not_given;   ///< relative [-]
  std::string moves;             ///< what bends or twists, and what moves most, in the builder's words
};

struct RowBuckling {
  double factor = not_given;  ///< on weight and wind together [-]
  double residual = not_given;
  std::string moves;
};

/// How the values are known to be right: see fem/inside.h and fem/modes.h.
struct StabilityProof {
  int most_pieces = 0;          ///< of any member; 0 = nothing was found
  double error = not_given;     ///< estimate for the last value [-]
  int counted = 0;              ///< values below count_at, by a count of negative pivots
  double count_at = not_given;  ///< [Hz] or factor
};

struct RowStability {
  double elevation = not_given;  ///< [rad]
  int freedoms = 0;
  std::vector<RowMode> modes;
  StabilityProof modes_proof, buckling_proof;
  std::string load;  ///< what the buckling factors multiply, in words; empty = no wind was stated
  std::vector<RowBuckling> buckling;  ///< ascending; empty = none below 1000
};

/// `count` frequencies in one pose (0: none), and buckling factors under weight and the 3 s gust of the STOW
/// wind (upper coefficients, both winds, the worse), straight-line pattern. Members are divided inside where
/// they bow between their nodes, unless `divide` is false: quicker, and some per cent too high.
RowStability row_stability(const TroughDesign& design, const loads::CoefficientTable& table, double elevation,
                           int count, int factors = 3, bool divide = true);

/// What to say about the frame beside a check: that it is nearly a mechanism, and the buckling factor in the
/// stow pose when it lies below 10, because second-order effects are in no criterion.
std::vector<Violation> frame_remarks(const TroughDesign& design, const loads::CoefficientTable& table);

}  // namespace focalframe::models
