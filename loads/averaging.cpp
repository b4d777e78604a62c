#include "loads/averaging.h"

#include <array>
#include <cmath>
#include <stdexcept>

#include "loads/number_text.h"

namespace focalframe::loads {

namespace {

struct Point {
  double averaging, factor;
};
constexpr std::array<Point, 6> durst_curve{
    {{1, 1.57}, {3, 1.53}, {45, 1.28}, {60, 1.24}, {600, 1.06}, {3600, 1.0}}};

void require_range(double averaging) {
  if (!(averaging >= 1 && averaging <= 3600))
    throw std::invalid_argument("averaging time " + number_text(averaging) +
                                " s must lie between 1 s and 3600 s");
}

}  // namespace

double durst_factor(double averaging) {
  require_range(averaging);
  std::size_t i = 1;
  while (averaging > durst_curve[i].averaging) ++i;
  const Point a = durst_curve[i - 1], b = durst_curve[i];
  const double t = std::log(averaging / a.averaging) / std::log(b.averaging / a.averaging);
  return a.factor + t * (b.factor - a.factor);
}

double wieringa_factor(const GustQuestion& question) {
  require_range(question.averaging);
  return 1 + 0.42 * question.turbulence * std::log(3600 / question.averaging);
}

double en_gust_ratio(double turbulence) { return std::sqrt(1 + 7 * turbulence); }

double fastest_mile_averaging(double speed) {
  if (!(speed > 0)) throw std::invalid_argument("a fastest-mile speed must be > 0");
  return 1609.344 / speed;
}

ChainStep averaging_factor(const AveragingChange& change, GustMethod method, double turbulence) {
  const bool durst = method == GustMethod::durst;
  const double from = durst ? durst_factor(change.from)
                            : wieringa_factor({.turbulence = turbulence, .averaging = change.from});
  const double to =
      durst ? durst_factor(change.to) : wieringa_factor({.turbulence = turbulence, .averaging = change.to});
  const std::string ratio = "G(" + number_text(change.to) + " s) / G(" + number_text(change.from) +
                            " s) = " + number_text(to) + " / " + number_text(from);
  return {
      "averaging factor", to / from, "-",
      ratio + (durst ? " (Durst, open country)"
                     : ", G = 1 + 0.42 Iu ln(3600 s / t), Iu = " + number_text(turbulence) + " (Wieringa)")};
}

}  // namespace focalframe::loads
