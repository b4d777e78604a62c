#include "cli/report_units.h"

#include <cmath>
#include <cstdarg>
#include <cstdio>

#include "fem/units.h"

namespace focalframe::cli {
namespace {

using models::Quantity;

struct Scale {
  double unit;
  const char* name;
  int digits;
};

Scale scale_of(double value, Quantity quantity) {
  switch (quantity) {
    case Quantity::ratio:
      return {0.01, "%", 1};
    case Quantity::angle:
      return {mrad, "mrad", 2};
    case Quantity::length:
      return {mm, "mm", 1};
    case Quantity::pressure:
      return {MPa, "MPa", 0};
    case Quantity::torque:
      return std::abs(value) < 1000 ? Scale{1, "N m", 0} : Scale{kN, "kN m", 2};
    case Quantity::force:
      return std::abs(value) < 1000 ? Scale{1, "N", 0} : Scale{kN, "kN", 2};
    case Quantity::speed:
      return {1, "m/s", 1};
    default:
      return {1, "", 3};
  }
}

}  // namespace

std::string text_of(const char* format, ...) {
  char out[512];
  va_list args;
  va_start(args, format);
  std::vsnprintf(out, sizeof out, format, args);
  va_end(args);
  return out;
}

std::string shown(double value, Quantity quantity, int extra) {
  if (std::isnan(value)) return "-";
  const Scale s = scale_of(value, quantity);
  const int digits = s.digits + extra;
  const double step = std::pow(10.0, -digits);
  const double rounded = std::round(value / s.unit / step) * step;
  return text_of("%.*f %s", digits, rounded == 0 ? 0.0 : rounded, s.name);  // never "-0"
}

ShownPair shown_pair(const models::Criterion& c) {
  ShownPair pair;
  const Scale s = scale_of(c.value, c.quantity);
  for (int extra = 0; extra < 5; ++extra) {
    pair.value = shown(c.value, c.quantity, extra);
    // The limit in the value's unit, without repeating its name.
    pair.limit = c.judged() ? text_of("%.*f", s.digits + extra, c.limit / s.unit) : "-";
    if (!c.judged() || c.value == c.limit || pair.value != pair.limit + " " + s.name) break;
  }
  return pair;
}

}  // namespace focalframe::cli
