#pragma once

/// How finely a whole collector is divided inside its members for modes and buckling, and what is said of it.

#include "fem/inside.h"
#include "models/row_modes.h"

namespace focalframe::models {

/// A collector has thousands of members, most of them short: more pieces would cost time and change nothing.
inline constexpr fem::InsideLimits collector_limits{
    .error = 5e-3, .first_pieces = 1, .most_pieces = 8, .most_members = 20000};

/// `Inside`: fem::InsideModes or fem::InsideBuckling.
template <class Inside>
StabilityProof proof_of(const Inside& inside) {
  StabilityProof proof;
  if (inside.modes.empty()) return proof;
  proof.most_pieces = inside.most_pieces;
  proof.error = inside.error;
  proof.counted = inside.modes.front().counted;
  proof.count_at = inside.modes.front().count_at;
  return proof;
}

}  // namespace focalframe::models
