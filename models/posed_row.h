#pragma once

/// A row in one pose as a frame with load cases: for a checking engineer to run or compare, and for what
/// needs the whole assembly (modes, stability).

#include <optional>
#include <vector>

#include "fem/load_case.h"
#include "loads/coefficients.h"
#include "models/design.h"
#include "models/full_frame.h"
#include "models/row_model.h"

namespace focalframe::models {

/// Wind alone, as node loads on what turns (straight-line pattern) and line loads on the posts, world axes.
/// `pressure` [Pa], `from` [rad] as psi in loads/pose.h; nullopt where the table does not reach.
std::optional<fem::LoadCase> wind_case(const RowModel& row, const FullFrame& full,
                                       const loads::CoefficientTable& table, const TroughDesign& design,
                                       double elevation, double from, bool upper, double pressure);

struct PosedRow {
  FullFrame full;
  /// "weight", then for every wind the design states one case from each side, wind alone: OPERATE with its
  /// mean and the table's mean coefficients, the others with their gust and the upper ones.
  std::vector<fem::LoadCase> cases;
};

/// `elevation` [rad]; the design is valid.
PosedRow posed_row(const TroughDesign& design, const loads::CoefficientTable& table, double elevation);

}  // namespace focalframe::models
