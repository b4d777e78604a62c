#include "loads/bare_members.h"

#include <cmath>
#include <span>
#include <stdexcept>

namespace focalframe::loads {

namespace {

struct Point {
  double slenderness, share;
};
constexpr Point round_ends[] = {
    {1, 0.63 / 1.2}, {2, 0.68 / 1.2}, {5, 0.74 / 1.2}, {10, 0.82 / 1.2}, {40, 0.98 / 1.2}};
constexpr Point plate_ends[] = {{1, 1.18 / 2}, {5, 1.2 / 2}, {10, 1.3 / 2}, {20, 1.5 / 2}};
// Neither table says where "endless" begins: 1 is reached at ten times its last slenderness.
constexpr double endless_beyond = 10;

double between(std::span<const Point> table, double slenderness) {
  if (slenderness <= table.front().slenderness) return table.front().share;
  Point a = table.front();
  for (const Point b : table.subspan(1)) {
    if (slenderness <= b.slenderness)
      return a.share + std::log(slenderness / a.slenderness) / std::log(b.slenderness / a.slenderness) *
                           (b.share - a.share);
    a = b;
  }
  const double beyond = std::log(slenderness / a.slenderness) / std::log(endless_beyond);
  return beyond >= 1 ? 1.0 : a.share + beyond * (1 - a.share);
}

}  // namespace

double drag_coefficient(BareShape shape) {
  switch (shape) {
    case BareShape::round:
      return 1.20;
    case BareShape::square:
      return 2.2;
    case BareShape::angle_open:
      return 1.98;
    case BareShape::angle_back:
      return 1.82;
    case BareShape::i_beam:
      return 2.05;
    case BareShape::tee_flange:
      return 1.80;
    case BareShape::tee_stem:
      return 1.65;
    case BareShape::flat:
      return 1.98;
  }
  throw std::invalid_argument("unknown shape of a bare member");
}

double end_factor(BareShape shape, double length_over_width) {
  if (!(length_over_width > 0)) throw std::invalid_argument("length over width of a member must be > 0");
  return between(
      shape == BareShape::round ? std::span<const Point>(round_ends) : std::span<const Point>(plate_ends),
      length_over_width);
}

double drag_force(const BareMember& m, double pressure) {
  const double ends = m.free_ends ? end_factor(m.shape, m.length / m.width) : 1.0;
  const double across = std::cos(m.inclination);
  return pressure * drag_coefficient(m.shape) * m.width * m.length * across * across * ends * m.shielding;
}

double friction_coefficient(Roughness roughness) {
  switch (roughness) {
    case Roughness::smooth:
      return 0.01;
    case Roughness::rough:
      return 0.02;
    case Roughness::very_rough:
      return 0.04;
  }
  throw std::invalid_argument("unknown roughness");
}

double friction_force(const AlongWind& surface, double pressure) {
  return pressure * surface.area * (friction_coefficient(surface.front) + friction_coefficient(surface.back));
}

}  // namespace focalframe::loads
