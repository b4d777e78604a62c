#include "loads/net_pressure.h"

#include <algorithm>
#include <array>
#include <cmath>
#include <numbers>
#include <stdexcept>

namespace focalframe::loads {

namespace {

constexpr double thin_shell_residual = 0.15;
constexpr double least_factor = 0.5, greatest_factor = 2.0;

double width_over_focus(const Aperture& aperture) {
  if (!(aperture.width > 0 && aperture.focal_length > 0))
    throw std::invalid_argument("aperture width and focal length must be > 0");
  return aperture.width / aperture.focal_length;
}

// What a strip at s/W contributes per unit of net pressure, see the head of net_pressure.h. A dish's strip is
// a chord of half-length h: the mean of t^2 over it is h^2 / 3.
Coefficients strip(double s, double ratio, bool dish) {
  if (!dish) return {1, s * ratio / 2, s * (1 + s * s * ratio * ratio / 8)};
  const double h2 = std::max(0.0, 0.25 - s * s);
  const double weight = 8 * std::sqrt(h2) / std::numbers::pi;
  return {weight, weight * s * ratio / 2, weight * s * (1 + (s * s + h2 / 3) * ratio * ratio / 8)};
}

constexpr std::array<double, 3> node{0.2386191860831969, 0.6612093864662645, 0.9324695142031521};
constexpr std::array<double, 3> weight{0.4679139345726910, 0.3607615730481386, 0.1713244923791704};

Coefficients plus(const Coefficients& a, const Coefficients& b) {
  return {a.Ca + b.Ca, a.Cs + b.Cs, a.Cm + b.Cm};
}

// Six-point Gauss over x in [a, b], where s = x for a trough and s = sin(x) / 2 for a dish, which smooths the
// square root by which a dish's strips shrink towards the rim.
template <class Pressure>
Coefficients gauss_panel(double a, double b, double ratio, bool dish, const Pressure& pressure) {
  Coefficients sum;
  for (std::size_t i = 0; i < node.size(); ++i) {
    for (const double side : {-1.0, 1.0}) {
      const double x = 0.5 * (a + b) + side * node[i] * 0.5 * (b - a);
      const double s = dish ? 0.5 * std::sin(x) : x;
      const double ds = 0.5 * (b - a) * weight[i] * (dish ? 0.5 * std::cos(x) : 1.0);
      const Coefficients c = strip(s, ratio, dish);
      const double p = pressure(s) * ds;
      sum = plus(sum, {c.Ca * p, c.Cs * p, c.Cm * p});
    }
  }
  return sum;
}

// Over s/W in [from, to]. A trough's integrand is a polynomial of degree 4 at most, a dish's is not.
template <class Pressure>
Coefficients gauss(double from, double to, double ratio, bool dish, const Pressure& pressure) {
  if (!dish) return gauss_panel(from, to, ratio, dish, pressure);
  const double a = std::asin(std::clamp(2 * from, -1.0, 1.0)), b = std::asin(std::clamp(2 * to, -1.0, 1.0));
  const int panels = 1 + int((b - a) / 0.25);
  Coefficients sum;
  for (int i = 0; i < panels; ++i)
    sum = plus(sum,
               gauss_panel(a + (b - a) * i / panels, a + (b - a) * (i + 1) / panels, ratio, dish, pressure));
  return sum;
}

std::vector<PressureStation> on_stations(const CoefficientTable& table, const std::vector<double>& net) {
  std::vector<PressureStation> distribution;
  for (std::size_t i = 0; i < net.size(); ++i) distribution.push_back({table.stations[i], net[i]});
  return distribution;
}

// Brings the axial force of a distribution to a target and says how.
struct AxialChange {
  double factor = 1, shift = 0;
};
AxialChange to_axial_force(double has, double wants) {
  if (has != 0) {
    const double factor = wants / has;
    if (factor >= least_factor && factor <= greatest_factor) return {factor, 0};
  }
  return {1, wants - has};
}

}  // namespace

Coefficients linear_unit(const Aperture& aperture) {
  const double r = width_over_focus(aperture);
  if (aperture.dish) return {0, r / 16, 1.0 / 8 + r * r / 384};
  return {0, r / 12, 1.0 / 6 + r * r / 320};
}

LinearPattern linear_pattern(const Coefficients& c, const Aperture& aperture) {
  const Coefficients unit = linear_unit(aperture);
  LinearPattern pattern;
  pattern.uniform = c.Ca;
  pattern.slope = c.Cm / unit.Cm;
  pattern.residual_side = c.Cs - pattern.slope * unit.Cs;
  pattern.edge_upwind = pattern.uniform - pattern.slope;
  pattern.edge_downwind = pattern.uniform + pattern.slope;
  pattern.looks_like_thin_shell = std::abs(pattern.residual_side) <= thin_shell_residual;
  return pattern;
}

EdgePattern edge_pattern(const Coefficients& c, const Aperture& aperture, double upwind_rim) {
  const double r = width_over_focus(aperture);
  const EdgePattern unit{.uniform = 0, .peak = 1, .residual_side = 0, .upwind_rim = upwind_rim};
  Coefficients peak;
  constexpr int panels = 20;
  for (int i = 0; i < panels; ++i)
    peak = plus(peak, gauss(-0.5 + double(i) / panels, -0.5 + double(i + 1) / panels, r, aperture.dish,
                            [&](double s) { return net_pressure(unit, s); }));
  EdgePattern pattern = unit;
  pattern.peak = c.Cm / peak.Cm;
  pattern.uniform = c.Ca - pattern.peak * peak.Ca;
  pattern.residual_side = c.Cs - pattern.peak * peak.Cs;
  return pattern;
}

double net_pressure(const LinearPattern& pattern, double s_over_w) {
  return pattern.uniform + pattern.slope * 2 * s_over_w;
}

double net_pressure(const EdgePattern& pattern, double s_over_w) {
  return pattern.uniform + pattern.peak * std::exp(-std::abs(s_over_w - pattern.upwind_rim) / edge_decay);
}

double net_pressure(const std::vector<PressureStation>& distribution, double s_over_w) {
  if (distribution.empty()) return unstated;
  if (s_over_w <= distribution.front().s_over_w) return distribution.front().dcp;
  for (std::size_t i = 1; i < distribution.size(); ++i) {
    const PressureStation a = distribution[i - 1], b = distribution[i];
    if (s_over_w <= b.s_over_w && b.s_over_w > a.s_over_w)
      return a.dcp + (s_over_w - a.s_over_w) / (b.s_over_w - a.s_over_w) * (b.dcp - a.dcp);
  }
  return distribution.back().dcp;
}

Coefficients integrate(const std::vector<PressureStation>& distribution, const Aperture& aperture) {
  const double r = width_over_focus(aperture);
  Coefficients sum;
  if (distribution.empty()) return sum;
  std::vector<PressureStation> all = distribution;
  all.insert(all.begin(), {-0.5, distribution.front().dcp});
  all.push_back({0.5, distribution.back().dcp});
  for (std::size_t i = 1; i < all.size(); ++i) {
    const PressureStation a = all[i - 1], b = all[i];
    if (b.s_over_w <= a.s_over_w) continue;
    sum = plus(sum, gauss(a.s_over_w, b.s_over_w, r, aperture.dish, [&](double s) {
                 return a.dcp + (s - a.s_over_w) / (b.s_over_w - a.s_over_w) * (b.dcp - a.dcp);
               }));
  }
  return sum;
}

std::vector<double> profile_at(const CoefficientTable& table, double pitch, bool upper) {
  std::vector<double> net = raw_profile_at(table, pitch);
  const std::optional<Coefficients> target = coefficients_at(table, pitch, upper);
  if (net.empty() || !target) return {};
  // The axial force does not depend on the depth of a trough; a dish's strips are weighted by their chords.
  const Aperture any{.width = 1, .focal_length = 1, .dish = table.collector_kind == "dish"};
  const AxialChange change = to_axial_force(integrate(on_stations(table, net), any).Ca, target->Ca);
  for (double& value : net) value = value * change.factor + change.shift;
  return net;
}

ProfilePattern profile_pattern(const CoefficientTable& table, double pitch, const Coefficients& target,
                               const Aperture& aperture) {
  ProfilePattern pattern;
  pattern.distribution = on_stations(table, raw_profile_at(table, pitch));
  if (pattern.distribution.empty()) return pattern;
  const AxialChange change = to_axial_force(integrate(pattern.distribution, aperture).Ca, target.Ca);
  pattern.factor = change.factor;
  pattern.shift = change.shift;
  for (PressureStation& station : pattern.distribution)
    station.dcp = station.dcp * change.factor + change.shift;

  // The linear term must reach the rims as it does in linear_unit, so the outermost stations are put there.
  if (pattern.distribution.front().s_over_w > -0.5)
    pattern.distribution.insert(pattern.distribution.begin(), {-0.5, pattern.distribution.front().dcp});
  if (pattern.distribution.back().s_over_w < 0.5)
    pattern.distribution.push_back({0.5, pattern.distribution.back().dcp});
  const Coefficients unit = linear_unit(aperture);
  pattern.slope = (target.Cm - integrate(pattern.distribution, aperture).Cm) / unit.Cm;
  double greatest = 0;
  for (PressureStation& station : pattern.distribution) {
    station.dcp += pattern.slope * 2 * station.s_over_w;
    greatest = std::max(greatest, std::abs(station.dcp));
  }
  pattern.residual_side = target.Cs - integrate(pattern.distribution, aperture).Cs;
  pattern.own_shape = std::abs(pattern.shift) + std::abs(pattern.slope) <= 0.5 * greatest;
  return pattern;
}

std::vector<PressureStation> half_pattern(const Coefficients& c, Half half) {
  if (half == Half::minus_s) return {{-0.5, c.Ca}, {0, c.Ca}, {0, 0}, {0.5, 0}};
  return {{-0.5, 0}, {0, 0}, {0, c.Ca}, {0.5, c.Ca}};
}

}  // namespace focalframe::loads
