#pragma once

/// Which guessed inputs decide the verdict: each is moved over a stated band and the whole check is run
/// again.

#include "models/cures.h"

namespace focalframe::models {

/// Band a guessed value is moved over, as factors on it (judgement): stiffnesses halved and doubled, because
/// soil and joints are rarely known better; everything else 20 % down and 25 % up.
struct GuessBand {
  double low = 0.8, high = 1.25;
};
GuessBand guess_band(Quantity quantity);

/// Guesses that turn the verdict somewhere in their band, with the value where it turns (to a thirty-second
/// of the way). The upper end is always tried; the lower one where three times the change seen upwards could
/// reach a limit.
std::vector<GuessFinding> deciding_guesses(const TroughDesign& design, const loads::CoefficientTable& table,
                                           const Assessment& assessment, const Progress& progress = {});

}  // namespace focalframe::models
