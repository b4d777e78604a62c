#pragma once

/// EN 1991-1-4 Annex B for a row: dynamic factor of drive torque and foundation from the first mode in which
/// the row twists.

#include <vector>

#include "loads/wind.h"
#include "models/design.h"

namespace focalframe::models {

struct RowDynamics {
  double frequency = not_given;  ///< of the first torsional mode, in the set-true pose or at 90 deg [Hz]
  double factor = not_given;     ///< cd, greatest over the stated winds, at least 1 [-]
  std::vector<loads::ChainStep> chain;
};

/// Throws fem::Mechanism when the row can move freely.
RowDynamics row_dynamics(const TroughDesign& design);

/// The design with dynamic-factor "EN Annex B" replaced by its number; unchanged when it does not ask.
TroughDesign with_dynamic_factor(const TroughDesign& design, RowDynamics* found = nullptr);

}  // namespace focalframe::models
