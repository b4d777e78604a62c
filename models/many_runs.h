#pragma once

/// Several designs assessed on the machine's cores. Every design is assessed by one thread and nothing is
/// shared, so the results do not depend on how many there are.

#include <functional>
#include <vector>

#include "models/assess.h"

namespace focalframe::models {

/// Without the discretisation check; `built` as in AssessOptions. A design that has no solution leaves an
/// assessment that is "not computed".
std::vector<Assessment> assess_many(const std::vector<TroughDesign>& designs,
                                    const loads::CoefficientTable& table,
                                    const std::function<void(int done, int all)>& progress = {},
                                    const BuiltRow* built = nullptr);

}  // namespace focalframe::models
