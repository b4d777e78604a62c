#include "models/row_modes.h"

#include <cmath>
#include <numbers>

#include "fem/buckling.h"
#include "fem/modes.h"
#include "fem/units.h"
#include "loads/pose.h"
#include "models/full_frame.h"
#include "models/states.h"
#include "models/trough.h"
#include "models/wind_load.h"

namespace focalframe::models {
namespace {

// Buckling factors beyond this are of no interest: nothing is near its stability limit.
constexpr double greatest_factor = 1000;

// The node with the greatest displacement and its main direction, world axes.
std::string most_moved(const fem::Frame& frame, const Eigen::MatrixXd& shape) {
  int node = 0;
  for (int n = 1; n < shape.rows(); ++n)
    if (shape.row(n).head<3>().norm() > shape.row(node).head<3>().norm()) node = n;
  int axis = 0;
  for (int a = 1; a < 3; ++a)
    if (std::abs(shape(node, a)) > std::abs(shape(node, axis))) axis = a;
  const char* ways[] = {"along the row", "across the row", "up and down"};
  return frame.nodes[static_cast<std::size_t>(node)].name + ", " + ways[axis];
}

}  // namespace

RowStability row_stability(const TroughDesign& design, const loads::CoefficientTable& table, double elevation,
                           int count) {
  const RowModel row(build_trough(design), {});
  const FullFrame full = full_frame(row.collector(), elevation);
  RowStability out;
  out.elevation = elevation;
  out.freedoms = full.frame.freedoms();
  for (const fem::Mode& mode : fem::natural_modes(full.frame, count))
    out.modes.push_back({mode.frequency, mode.residual, most_moved(full.frame, mode.shape)});

  const StateWinds winds = winds_at_axis(design);
  if (!design.wind.stow.given) return out;
  const loads::ZoneFactors zone = loads::zone_factors(design.wind.zone).value_or(loads::ZoneFactors{});
  for (double from : {0.0, std::numbers::pi}) {
    const auto c = loads::coefficients_at(table, loads::pitch_seen_by_wind(elevation, from), true);
    if (!c) continue;
    WindOnRow wind;
    wind.wind_from = from;
    wind.coefficients = {c->Ca * zone.Ca, c->Cs * zone.Cs, c->Cm * zone.Cm};
    wind.pressure = winds.stow.gust_pressure;
    fem::LoadCase load;
    load.gravity = {0, 0, -standard_gravity};
    load.nodes =
        in_world(full, row.nodal_loads(wind.pressure * wind_amplitudes(row, elevation, wind)), elevation);
    std::vector<RowBuckling> found;
    for (const fem::BucklingMode& mode : fem::buckling_modes(full.frame, load, 3, {}, greatest_factor))
      found.push_back({mode.factor, mode.residual, most_moved(full.frame, mode.shape)});
    const bool worse = !found.empty() && (out.buckling.empty() || found[0].factor < out.buckling[0].factor);
    if (worse || out.load.empty()) {
      out.load = "weight and the STOW gust from the " + std::string(from == 0 ? "+Y" : "-Y") + " side";
      if (worse) out.buckling = found;
    }
  }
  return out;
}

}  // namespace focalframe::models
