#include "loads/seismic.h"

#include <algorithm>
#include <stdexcept>

#include "fem/units.h"

namespace focalframe::loads {

namespace {

struct Ground {
  double soil, tb, tc, td;
};
Ground ground(GroundType type) {
  switch (type) {
    case GroundType::a:
      return {1.0, 0.15, 0.4, 2.0};
    case GroundType::b:
      return {1.2, 0.15, 0.5, 2.0};
    case GroundType::c:
      return {1.15, 0.20, 0.6, 2.0};
    case GroundType::d:
      return {1.35, 0.20, 0.8, 2.0};
    case GroundType::e:
      return {1.4, 0.15, 0.5, 2.0};
  }
  throw std::invalid_argument("unknown ground type");
}

constexpr double least_share = 0.2;  // beta

}  // namespace

double seismic_acceleration(const SeismicEn& in) {
  if (!(in.period >= 0 && in.behaviour >= 1 && in.ground_acceleration >= 0))
    throw std::invalid_argument("period and ground acceleration must be >= 0 and the behaviour factor >= 1");
  const Ground g = ground(in.ground);
  const double T = in.period, base = in.ground_acceleration * g.soil, plateau = 2.5 / in.behaviour;
  if (T < g.tb) return base * (2.0 / 3 + T / g.tb * (plateau - 2.0 / 3));
  if (T <= g.tc) return base * plateau;
  const double falling = T <= g.td ? g.tc / T : g.tc * g.td / (T * T);
  return std::max(base * plateau * falling, least_share * in.ground_acceleration);
}

double seismic_acceleration(const SeismicAsce& in) {
  if (!(in.period >= 0 && in.response > 0 && in.importance > 0 && in.s_ds >= 0 && in.s_d1 >= 0))
    throw std::invalid_argument("period and spectral accelerations must be >= 0, R and importance > 0");
  const double reduction = in.response / in.importance;
  double share = in.s_ds / reduction;
  if (in.period > 0) share = std::min(share, in.s_d1 / (in.period * reduction));
  share = std::max({share, 0.044 * in.s_ds * in.importance, 0.03});
  return share * standard_gravity;
}

}  // namespace focalframe::loads
