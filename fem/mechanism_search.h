#pragma once

#include "fem/factor.h"
#include "fem/frame.h"

namespace focalframe::fem {

/// Smallest pivot over original diagonal. Throws Mechanism, naming the node that moves most, when the matrix
/// (frame stiffness over some kept freedoms: full = map * kept) lets the frame move freely.
double require_no_mechanism(const Frame& frame, const SparseMatrix& matrix, const SparseMatrix& map,
                            const Factor& factor, const std::vector<int>& group);

}  // namespace focalframe::fem
