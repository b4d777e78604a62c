#include "models/quadrature.h"

#include <cmath>
#include <numbers>

namespace focalframe::models {

namespace {

struct Legendre {
  double value, derivative;
};

Legendre legendre(int n, double x) {
  double previous = 1, value = x;
  for (int k = 2; k <= n; ++k) {
    const double next = ((2 * k - 1) * x * value - (k - 1) * previous) / k;
    previous = value;
    value = next;
  }
  return {value, n * (x * value - previous) / (x * x - 1)};
}

}  // namespace

Quadrature gauss_legendre(int n, double from, double to) {
  Quadrature rule;
  const double middle = (from + to) / 2, half = (to - from) / 2;
  for (int i = n; i >= 1; --i) {
    double x = std::cos(std::numbers::pi * (i - 0.25) / (n + 0.5));
    for (int pass = 0; pass < 8; ++pass) {
      const Legendre p = legendre(n, x);
      x -= p.value / p.derivative;
    }
    const double derivative = legendre(n, x).derivative;
    rule.point.push_back(middle + half * x);
    rule.weight.push_back(2 * half / ((1 - x * x) * derivative * derivative));
  }
  return rule;
}

Quadrature gauss_legendre(int n, int panels, double from, double to) {
  Quadrature rule;
  const Quadrature unit = gauss_legendre(n, 0, 1);
  const double step = (to - from) / panels;
  for (int k = 0; k < panels; ++k)
    for (std::size_t i = 0; i < unit.point.size(); ++i) {
      rule.point.push_back(from + step * (k + unit.point[i]));
      rule.weight.push_back(step * unit.weight[i]);
    }
  return rule;
}

}  // namespace focalframe::models
