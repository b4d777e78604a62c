#pragma once

/// The main job: a trough design in, an assessment out.

#include "models/assessment.h"

namespace focalframe::models {

struct AssessOptions {
  bool discretisation = true;  ///< solve once more with halved elements
  int refine = 1;              ///< multiplies the elements along a rib
};

/// The design must be free of STOP violations (validate, table_gaps). Throws fem::Mechanism when the row can
/// move freely. Deterministic: the same design gives the same bits.
Assessment assess(const TroughDesign& design, const loads::CoefficientTable& table,
                  const AssessOptions& options = {});

}  // namespace focalframe::models
