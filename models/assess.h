#pragma once

/// The main job: a trough design in, an assessment out.

#include <cstdint>
#include <memory>

#include "models/assessment.h"

namespace focalframe::models {

/// A row already built and condensed, for further designs with the same frame and a table with the same
/// stations.
struct BuiltRow {
  TroughDesign design;
  std::shared_ptr<const RowModel> row;
};
BuiltRow build_row(const TroughDesign& design, const loads::CoefficientTable& table);

struct AssessOptions {
  bool discretisation = true;       ///< solve once more with halved elements
  int refine = 1;                   ///< multiplies the elements along a rib
  std::int64_t trace_rays = 0;      ///< rays traced in every optical state; 0 = none
  bool maps = false;                ///< maps of the state with the least light
  bool rigging = false;             ///< look for the best elevation to set the panels true at
  const BuiltRow* built = nullptr;  ///< used when its frame is the design's own; else the row is built anew
};

/// The design must be free of STOP violations (validate, table_gaps). Throws fem::Mechanism when the row can
/// move freely. Deterministic: the same design gives the same bits.
Assessment assess(const TroughDesign& design, const loads::CoefficientTable& table,
                  const AssessOptions& options = {});

}  // namespace focalframe::models
