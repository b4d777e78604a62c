#pragma once

/// Changes that would make a failing row hold, each one tried by running the whole check again.

#include <functional>

#include "models/assess.h"

namespace focalframe::models {

/// Told after every run: how many of how many are done.
using Progress = std::function<void(int done, int all)>;

/// Tries single changes (next tube sizes and walls, counterweights, drive, ribs, pylons, posts, aiming at the
/// row's mean, a shorter row), then pairs, then one change per missed limit. First come those that meet all
/// limits, lightest first; then the best of the rest. Empty when nothing is missed.
std::vector<Cure> find_cures(const TroughDesign& design, const loads::CoefficientTable& table,
                             const Assessment& assessment, const Progress& progress = {});

}  // namespace focalframe::models
