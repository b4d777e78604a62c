#pragma once

#include "fem/element.h"
#include "fem/statics.h"

namespace focalframe::fem {

/// Geometric stiffness between a member's outer ends, member axes, arms not included.
Mat12 inner_geometric_stiffness(const Frame& frame, const LoadCase& load, const Response& response,
                                int member, const Element& element);

}  // namespace focalframe::fem
