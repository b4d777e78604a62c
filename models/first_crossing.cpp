#include "models/first_crossing.h"

#include <algorithm>
#include <cmath>
#include <limits>

namespace focalframe::models {
namespace {

constexpr double precision = 1e-9;

// Sign change in [from, to], f(from) >= 0 > f(to): the false-position rule that halves the value of an end
// that stays (Illinois), with bisection whenever it gains too little.
double sign_change(const Margin& f, double from, double to, double f_from, double f_to) {
  double stayed = 0;
  for (int i = 0; i < 200 && to - from > precision * std::max(1.0, to); ++i) {
    double x = (from * f_to - to * f_from) / (f_to - f_from);
    if (i % 4 == 3 || !(x > from && x < to)) x = 0.5 * (from + to);
    const double value = f(x);
    if (value >= 0) {
      from = x;
      f_from = value;
      if (stayed > 0) f_to /= 2;
      stayed = 1;
    } else {
      to = x;
      f_to = value;
      if (stayed < 0) f_from /= 2;
      stayed = -1;
    }
  }
  return from;
}

// Least margin in [from, to] by golden section; stops early where it is found negative.
std::pair<double, double> least(const Margin& f, double from, double to) {
  const double golden = 0.5 * (std::sqrt(5.0) - 1);
  double a = to - golden * (to - from), b = from + golden * (to - from), fa = f(a), fb = f(b);
  for (int i = 0; i < 40 && fa >= 0 && fb >= 0; ++i) {
    if (fa < fb) {
      to = b;
      b = a;
      fb = fa;
      a = to - golden * (to - from);
      fa = f(a);
    } else {
      from = a;
      a = b;
      fa = fb;
      b = from + golden * (to - from);
      fb = f(b);
    }
  }
  return fa < fb ? std::pair{a, fa} : std::pair{b, fb};
}

// A parabola through three samples, the middle one least, reaches at most so far below it; twice that is
// allowed for before the search is spared.
bool may_dip(double before, double middle, double after) {
  const double left = before - middle, right = after - middle;
  if (left < 0 || right < 0) return false;
  return middle <= left + right;
}

struct Search {
  const Margin& f;
  std::vector<double> x, y;

  // Called with every further sample; finite when the crossing is found.
  double add(double at, double margin) {
    constexpr double none = std::numeric_limits<double>::infinity();
    x.push_back(at);
    y.push_back(margin);
    const std::size_t n = x.size() - 1;
    if (n == 0) return margin < 0 ? 0 : none;
    if (n >= 2 && may_dip(y[n - 2], y[n - 1], y[n])) {
      const auto [place, low] = least(f, x[n - 2], x[n]);
      if (low < 0) {
        const std::size_t from = place > x[n - 1] ? n - 1 : n - 2;
        return sign_change(f, x[from], place, y[from], low);
      }
    }
    return margin < 0 ? sign_change(f, x[n - 1], at, y[n - 1], margin) : none;
  }
};

}  // namespace

double first_crossing(const Samples& samples, const Margin& margin) {
  Search search{margin, {}, {}};
  for (std::size_t i = 0; i < samples.at.size(); ++i)
    if (const double found = search.add(samples.at[i], samples.margin[i]); std::isfinite(found)) return found;
  return std::numeric_limits<double>::infinity();
}

double first_crossing(const Margin& margin, double most, int steps) {
  Search search{margin, {}, {}};
  for (int i = 0; i <= steps; ++i) {
    const double at = most * i / steps;
    if (const double found = search.add(at, margin(at)); std::isfinite(found)) return found;
  }
  return std::numeric_limits<double>::infinity();
}

}  // namespace focalframe::models
