#pragma once

/// Gauss-Legendre quadrature.

#include <vector>

namespace focalframe::models {

struct Quadrature {
  std::vector<double> point, weight;
};

/// n points on [from, to]; weights add up to `to - from`. Nodes by Newton's method, to round-off.
Quadrature gauss_legendre(int n, double from, double to);

/// `panels` equal panels of n points each.
Quadrature gauss_legendre(int n, int panels, double from, double to);

}  // namespace focalframe::models
