#include "models/wind_load.h"

#include <Eigen/Eigenvalues>
#include <Eigen/LU>
#include <cmath>
#include <limits>

#include "fem/units.h"
#include "loads/net_pressure.h"
#include "loads/pose.h"

namespace focalframe::models {
namespace {

using Eigen::VectorXd;

// Integral of all pressure columns in `a` over one module.
Integral sum_of(const RowModel& row, const VectorXd& a, int module) {
  Integral sum;
  for (int c = 4; c < row.columns().unit(0); ++c) {
    if (a[c] == 0) continue;
    const Integral part = row.integral(c, module);
    sum.axial += a[c] * part.axial;
    sum.side += a[c] * part.side;
    sum.moment += a[c] * part.moment;
  }
  return sum;
}

// A profile's value at s/W: straight lines between stations, constant beyond the outermost ones.
double profile_value(const std::vector<double>& stations, const std::vector<double>& values, double at) {
  std::vector<loads::PressureStation> distribution;
  for (std::size_t i = 0; i < stations.size(); ++i) distribution.push_back({stations[i], values[i]});
  return loads::net_pressure(distribution, at);
}

// Raises uniform, `shaped` and line columns of a module until its three integrals are the wanted ones.
void meet(const RowModel& row, VectorXd& a, int module, Pattern shaped, const Integral& wanted) {
  const Columns& at = row.columns();
  const Integral have = sum_of(row, a, module);
  Eigen::Matrix3d basis;
  const Pattern parts[3] = {Pattern::uniform, shaped, Pattern::line};
  for (int i = 0; i < 3; ++i) {
    const Integral one = row.integral(at.basis(module, parts[i]), module);
    basis.col(i) << one.axial, one.side, one.moment;
  }
  const Eigen::Vector3d add = basis.partialPivLu().solve(
      Eigen::Vector3d(wanted.axial - have.axial, wanted.side - have.side, wanted.moment - have.moment));
  for (int i = 0; i < 3; ++i) a[at.basis(module, parts[i])] += add[i];
}

}  // namespace

std::string spread_text(Spread spread) {
  switch (spread) {
    case Spread::linear:
      return "linear";
    case Spread::edge:
      return "edge peak";
    case Spread::profile:
      return "own profile";
    case Spread::half_minus:
      return "-Y half";
    case Spread::half_plus:
      return "+Y half";
  }
  return {};
}

double bare_share(const std::string& shielding, double pitch) {
  if (shielding == "none") return 1;
  return shielding == "all" ? 0 : std::sin(pitch) * std::sin(pitch);
}

namespace {

// Drag of what the coefficients leave out. Across the row the wind's part counts like the mirror's load (the
// same yaw factor); along it with the square of its own part of the speed.
void add_bare_members(const RowModel& row, double elevation, const WindOnRow& wind, VectorXd& a) {
  const Columns& at = row.columns();
  const Collector& c = row.collector();
  const UnitCases& units = row.units();
  const double side = loads::upwind_side(wind.wind_from), yaw = loads::yaw(wind.wind_from);
  const double across = loads::yaw_factor(yaw);
  // Downwind is -Y for wind from +Y.
  const Eigen::Vector3d downwind =
      across * (loads::world_to_collector(elevation) * Eigen::Vector3d(0, -side, 0));
  a[Columns::receiver_y] = units.receiver_drag * c.receiver_drag_width * downwind.y();
  a[Columns::receiver_z] = units.receiver_drag * c.receiver_drag_width * downwind.z();
  const double post = units.pylon_drag * c.stands.front().post_width;
  a[at.stand_wind()] = -side * across * post;
  if (units.at.bare_y >= 0) {
    const double share =
        wind.mirrors ? bare_share(units.shielding, loads::pitch_seen_by_wind(elevation, wind.wind_from)) : 1;
    a[at.unit(units.at.bare_y)] = share * downwind.y();
    a[at.unit(units.at.bare_z)] = share * downwind.z();
  }
  const double along = std::sin(yaw) * std::sin(yaw);
  if (units.at.along >= 0 && along > 1e-9) {
    // Wind from psi = 90 deg blows from -X (clockwise from +Y, seen from above), so towards +X.
    const double way = std::sin(wind.wind_from) >= 0 ? 1 : -1;
    a[at.unit(units.at.along)] = way * along;
    a[at.stand_wind_x()] = way * along * post;
  }
}

}  // namespace

VectorXd wind_amplitudes(const RowModel& row, double elevation, const WindOnRow& wind) {
  const Columns& at = row.columns();
  VectorXd a = VectorXd::Zero(at.all());
  if (wind.mirrors) {
    // The in-plane axis that Cs and the profiles refer to is -y for wind from +Y and +y for wind from -Y; Cm
    // turns towards a larger pitch, which is a larger elevation for wind from +Y and a smaller one for wind
    // from -Y.
    const double side = loads::upwind_side(wind.wind_from);
    if (wind.spread == Spread::profile)
      for (int i = 0; i < at.hats; ++i)  // hat i lies at y/W; s = -side y
        a[at.hat(i)] = profile_value(row.hat_stations(), wind.profile,
                                     -side * row.hat_stations()[static_cast<std::size_t>(i)]);
    const bool rim_at_minus_s = loads::pitch_seen_by_wind(elevation, wind.wind_from) >= 0;
    const bool plus_rim_upwind = rim_at_minus_s == (side > 0);
    const Pattern shaped = wind.spread != Spread::edge ? Pattern::linear
                           : plus_rim_upwind           ? Pattern::edge_plus
                                                       : Pattern::edge_minus;
    const Integral wanted{wind.coefficients.Ca, -side * wind.coefficients.Cs, side * wind.coefficients.Cm};
    for (int m = 0; m < at.modules; ++m) meet(row, a, m, shaped, wanted);
    if (wind.spread == Spread::half_minus || wind.spread == Spread::half_plus) {
      // One module only: a gust that loads half of every module at once is not to be met.
      const int one = std::max(0, std::min(at.modules - 1, row.collector().drive_bearing - 1));
      const bool minus = wind.spread == Spread::half_minus;
      for (int m = 0; m < at.modules; ++m) {
        if (m != one && !wind.half_everywhere) continue;
        const double even = a[at.basis(m, Pattern::uniform)];
        a[at.basis(m, Pattern::linear)] = 0;
        a[at.basis(m, Pattern::uniform)] = minus ? even : 0;
        a[at.basis(m, Pattern::half_plus)] = minus ? -even : even;
      }
    }
  }
  if (wind.bare_members) add_bare_members(row, elevation, wind, a);
  return a;
}

PatternNumbers pattern_numbers(const RowModel& row, double elevation, const WindOnRow& wind) {
  PatternNumbers out;
  if (!wind.mirrors) return out;
  const Columns& at = row.columns();
  const VectorXd a = wind_amplitudes(row, elevation, wind);
  const double side = loads::upwind_side(wind.wind_from), decay = loads::edge_decay;
  const auto basis = [&](Pattern b) { return a[at.basis(0, b)]; };
  const auto edge = [&](double y_over_w) {
    double net = basis(Pattern::uniform) + basis(Pattern::linear) * 2 * y_over_w +
                 basis(Pattern::edge_plus) * std::exp(-(0.5 - y_over_w) / decay) +
                 basis(Pattern::edge_minus) * std::exp(-(0.5 + y_over_w) / decay);
    if (at.hats > 0) net += a[at.hat(y_over_w > 0 ? at.hats - 1 : 0)];
    return net;
  };
  out.slope = -side * basis(Pattern::linear);  // s = -y for wind from +Y
  out.edge_upwind = edge(0.5 * side);
  out.edge_downwind = edge(-0.5 * side);
  out.residual_side = -side * basis(Pattern::line);
  return out;
}

VectorXd add_twist_feedback(const RowModel& row, const PoseModel& pose, const WindOnRow& wind,
                            VectorXd& amplitudes) {
  const int modules = row.columns().modules;
  const VectorXd start = row.evaluate(row.module_turn, pose, amplitudes);
  if (wind.pressure == 0 || wind.moment_slope == 0) return start;
  const double width = row.collector().width;
  VectorXd gain(modules);
  for (int m = 0; m < modules; ++m) gain[m] = row.module_area(m) * width * wind.moment_slope;
  const Eigen::MatrixXd loop =
      Eigen::MatrixXd::Identity(modules, modules) - wind.pressure * pose.twist_gain * gain.asDiagonal();
  const VectorXd turn = loop.partialPivLu().solve(start);
  for (int m = 0; m < modules; ++m) {
    const int column = row.columns().basis(m, Pattern::linear);
    amplitudes[column] += wind.pressure * wind.moment_slope * turn[m] / row.integral(column, m).moment;
  }
  return turn;
}

double divergence_pressure(const RowModel& row, const PoseModel& pose, double moment_slope) {
  if (moment_slope <= 0) return std::numeric_limits<double>::infinity();
  VectorXd gain(row.columns().modules);
  for (int m = 0; m < gain.size(); ++m) gain[m] = row.module_area(m) * row.collector().width * moment_slope;
  const Eigen::MatrixXd loop = pose.twist_gain * gain.asDiagonal();
  const double greatest = Eigen::EigenSolver<Eigen::MatrixXd>(loop, false).eigenvalues().real().maxCoeff();
  return greatest > 0 ? 1 / greatest : std::numeric_limits<double>::infinity();
}

VectorXd weight_amplitudes(const RowModel& row, double elevation) {
  VectorXd a = VectorXd::Zero(row.columns().all());
  const Eigen::Vector3d g = loads::world_to_collector(elevation) * Eigen::Vector3d(0, 0, -standard_gravity);
  a[Columns::gravity_y] = g.y();
  a[Columns::gravity_z] = g.z();
  a[row.columns().stand_gravity()] = standard_gravity;
  return a;
}

}  // namespace focalframe::models
