#pragma once

#include <array>

namespace focalframe::fem {

/// Gauss-Legendre points on 0..1, exact up to degree 9 (Abramowitz and Stegun 1964, table 25.4, n = 5; from
/// memory, checked by the tests on polynomials).
struct GaussPoint {
  double at = 0, weight = 0;
};
inline constexpr std::array<GaussPoint, 5> gauss_points{{{0.046910077030668004, 0.11846344252809454},
                                                         {0.23076534494715845, 0.23931433524968324},
                                                         {0.5, 0.28444444444444444},
                                                         {0.76923465505284155, 0.23931433524968324},
                                                         {0.95308992296933200, 0.11846344252809454}}};

}  // namespace focalframe::fem
