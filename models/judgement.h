#pragma once

/// From results to criteria, answers, verdict, plausibility remarks and cautions.

#include "models/assessment.h"

namespace focalframe::models {

/// Fills criteria, answers, verdict, remarks, cautions and what was not checked.
void judge(const TroughDesign& design, Assessment& assessment);

}  // namespace focalframe::models
