#include "loads/coefficients.h"

#include <algorithm>
#include <cmath>
#include <limits>
#include <numbers>

#include "loads/pose.h"

namespace focalframe::loads {

namespace {

constexpr double pi = std::numbers::pi;
// Angles are converted from degrees: 180 deg of a pose and of a table may differ in the last digits.
constexpr double same_angle = 1e-9;

bool is_symmetric(const CoefficientTable& table) {
  return !table.rows.empty() && table.rows.front().pitch >= -same_angle;
}

// Neighbours of a value in ascending rows and the weight of the upper one; nullopt outside.
struct Between {
  std::size_t below, above;
  double weight;
};
template <class Row>
std::optional<Between> between(const std::vector<Row>& rows, double pitch) {
  if (rows.empty() || pitch < rows.front().pitch - same_angle || pitch > rows.back().pitch + same_angle)
    return std::nullopt;
  std::size_t above = 0;
  while (above + 1 < rows.size() && rows[above].pitch < pitch) ++above;
  if (above == 0) return Between{0, 0, 0};
  const double a = rows[above - 1].pitch, b = rows[above].pitch;
  return Between{above - 1, above, b > a ? std::clamp((pitch - a) / (b - a), 0.0, 1.0) : 1.0};
}

Coefficients mix(const Coefficients& a, const Coefficients& b, double t) {
  return {a.Ca + t * (b.Ca - a.Ca), a.Cs + t * (b.Cs - a.Cs), a.Cm + t * (b.Cm - a.Cm)};
}

// dcp at s/W: straight lines between stations, constant beyond the outermost ones.
double value_at(const std::vector<double>& stations, const std::vector<double>& net, double s) {
  if (s <= stations.front()) return net.front();
  for (std::size_t i = 1; i < stations.size(); ++i)
    if (s <= stations[i])
      return net[i - 1] + (s - stations[i - 1]) / (stations[i] - stations[i - 1]) * (net[i] - net[i - 1]);
  return net.back();
}

// The profiles of a table with mirrored ones for the negative pitches it does not give itself.
std::vector<ProfileRow> with_mirrored(const CoefficientTable& table) {
  double first = std::numeric_limits<double>::infinity(), last = -first;
  for (const ProfileRow& row : table.profiles) {
    if (row.pitch >= 0) continue;
    first = std::min(first, row.pitch);
    last = std::max(last, row.pitch);
  }
  std::vector<ProfileRow> all = table.profiles;
  for (const ProfileRow& row : table.profiles) {
    const double mirrored = -row.pitch;
    if (row.pitch <= 0 || (mirrored >= first - same_angle && mirrored <= last + same_angle)) continue;
    ProfileRow added{mirrored, {}};
    for (const double s : table.stations) added.net.push_back(value_at(table.stations, row.net, -s));
    all.push_back(std::move(added));
  }
  std::sort(all.begin(), all.end(),
            [](const ProfileRow& a, const ProfileRow& b) { return a.pitch < b.pitch; });
  return all;
}

}  // namespace

std::optional<Coefficients> coefficients_at(const CoefficientTable& table, double pitch, bool upper) {
  const double wrapped = wrap_angle(pitch);
  const bool symmetric = is_symmetric(table);
  std::optional<Between> at = between(table.rows, symmetric ? std::abs(wrapped) : wrapped);
  if (!at && !symmetric && wrapped > pi - same_angle) at = between(table.rows, -pi);
  if (!at) return std::nullopt;
  const CoefficientRow &below = table.rows[at->below], &above = table.rows[at->above];
  Coefficients c =
      upper ? mix(below.upper, above.upper, at->weight) : mix(below.best, above.best, at->weight);
  if (symmetric && wrapped < 0) {
    c.Cs = -c.Cs;
    c.Cm = -c.Cm;
  }
  return c;
}

double moment_slope(const CoefficientTable& table, double pitch, double half_width) {
  const auto below = coefficients_at(table, pitch - half_width),
             above = coefficients_at(table, pitch + half_width);
  if (!below || !above) return unstated;
  return (above->Cm - below->Cm) / (2 * half_width);
}

std::vector<double> raw_profile_at(const CoefficientTable& table, double pitch) {
  if (table.stations.empty() || table.profiles.empty()) return {};
  const std::vector<ProfileRow> rows = with_mirrored(table);
  const double wrapped = wrap_angle(pitch);
  std::optional<Between> at = between(rows, wrapped);
  if (!at && wrapped > pi - same_angle) at = between(rows, -pi);
  if (!at) return {};
  std::vector<double> net = rows[at->below].net;
  for (std::size_t i = 0; i < net.size(); ++i) net[i] += at->weight * (rows[at->above].net[i] - net[i]);
  return net;
}

std::optional<ZoneFactors> zone_factors(const std::string& zone) {
  if (zone == "isolated" || zone == "edge") return ZoneFactors{1.0, 1.0, 1.0};
  if (zone == "second-row") return ZoneFactors{0.7, 0.7, 0.8};
  if (zone == "interior") return ZoneFactors{0.5, 0.5, 0.7};
  return std::nullopt;
}

}  // namespace focalframe::loads
