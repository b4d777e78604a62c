#pragma once

/// The states of a trough that are worth looking at.

#include "loads/coefficients.h"
#include "models/design.h"
#include "models/portrait.h"

namespace focalframe::models {

/// Every asked OPERATE pose (calm, and both winds at the 10 min mean) and every asked STOW pose (both winds
/// at the 3 s gust, upper coefficients); the first pressure pattern of each. A frame of more than `many`
/// nodes shows three poses of OPERATE and one of STOW.
std::vector<PortraitRequest> looked_at(const TroughDesign& design, const loads::CoefficientTable& table,
                                       const RowModel& row, std::size_t many = 4000);

/// The state shown first: the one with the index whose kind, pose and wind are those of `state`, else 0.
std::size_t index_of(const std::vector<PortraitRequest>& requests, const State& state, bool calm);

}  // namespace focalframe::models
