#include "models/wind_chain.h"

#include <algorithm>
#include <cmath>

#include "loads/pose.h"

namespace focalframe::models {
namespace {

// Sum of what one unit case puts on the row along y or z per unit of it.
double force_of(const RowModel& row, int column, int axis) {
  double sum = 0;
  Eigen::VectorXd one = Eigen::VectorXd::Zero(row.columns().all());
  one[column] = 1;
  const Eigen::VectorXd nodal = row.nodal_loads(one);
  for (int n = 0; 6 * n < nodal.size(); ++n) sum += nodal[6 * n + axis];
  return sum;
}

void add_drag(const RowModel& row, const Eigen::VectorXd& a, WindChainRow& out) {
  const Columns& at = row.columns();
  const Collector& c = row.collector();
  const Eigen::Matrix3Xd& totals = row.load_totals();
  out.receiver = out.pressure * std::hypot(a[Columns::receiver_y] * totals(0, Columns::receiver_y),
                                           a[Columns::receiver_z] * totals(1, Columns::receiver_z));
  const UnitNumbers& units = row.units().at;
  if (units.bare_y >= 0)
    out.frame = out.pressure * std::hypot(a[at.unit(units.bare_y)] * totals(0, at.unit(units.bare_y)),
                                          a[at.unit(units.bare_z)] * totals(1, at.unit(units.bare_z)));
  for (const Stand& stand : c.stands)
    out.pylons += out.pressure * std::abs(a[at.stand_wind()]) * stand.height;
  if (units.along >= 0 && a[at.unit(units.along)] != 0)
    out.along = out.pressure * a[at.unit(units.along)] * force_of(row, at.unit(units.along), 0);
}

}  // namespace

WindChainRow wind_chain_row(const RowModel& row, const RowWinds& winds, const State& state, bool gust,
                            double pressure) {
  WindChainRow out;
  out.state = state;
  out.gust = gust;
  out.pressure = pressure;
  out.pitch = loads::pitch_seen_by_wind(state.elevation, state.wind_from);
  out.table = loads::coefficients_at(winds.table(), out.pitch, gust).value();
  out.zone = winds.zone();
  out.yaw_factor = loads::yaw_factor(loads::yaw(state.wind_from));
  out.area = row.collector().mirror_area;
  out.width = row.collector().width;
  out.spread = winds.spreads(out.pitch).front();
  const WindOnRow wind = winds.at(state.elevation, state.wind_from, out.spread, 0, gust, pressure);
  const loads::Coefficients& c = wind.coefficients;
  out.axial = pressure * out.area * c.Ca;
  out.side = pressure * out.area * c.Cs;
  out.moment_vertex = pressure * out.area * out.width * c.Cm;
  // A side force at the vertex turns the row about the axis behind it towards larger pitch.
  out.moment_axis = out.moment_vertex + row.collector().axis_to_vertex * out.side;
  out.straight = pattern_numbers(row, state.elevation, wind);
  out.thin_shell = std::abs(out.straight.residual_side) <= 0.15;

  const Eigen::VectorXd a = wind_amplitudes(row, state.elevation, wind);
  const int first = 4, count = row.columns().unit(0) - first;
  const Eigen::Vector3d have = row.load_totals().middleCols(first, count) * a.segment(first, count);
  const double side = loads::upwind_side(state.wind_from), w = out.width;
  out.total_error =
      std::max({std::abs(-side * have[0] - out.side / pressure), std::abs(-have[1] - out.axial / pressure),
                std::abs(side * have[2] - out.moment_axis / pressure) / w}) /
      out.area;
  add_drag(row, a, out);
  return out;
}

}  // namespace focalframe::models
