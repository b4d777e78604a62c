#include "models/wind_load.h"

#include <Eigen/Eigenvalues>
#include <Eigen/LU>
#include <cmath>
#include <limits>

#include "fem/units.h"
#include "loads/pose.h"

namespace focalframe::models {
namespace {

using Eigen::VectorXd;

// Integral of all pressure columns in `a` over one module.
Integral sum_of(const RowModel& row, const VectorXd& a, int module) {
  Integral sum;
  for (int c = 4; c < row.columns().body(); ++c) {
    if (a[c] == 0) continue;
    const Integral part = row.integral(c, module);
    sum.axial += a[c] * part.axial;
    sum.side += a[c] * part.side;
    sum.moment += a[c] * part.moment;
  }
  return sum;
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
  }
  return {};
}

VectorXd wind_amplitudes(const RowModel& row, double elevation, const WindOnRow& wind) {
  const Columns& at = row.columns();
  const Collector& c = row.collector();
  VectorXd a = VectorXd::Zero(at.all());
  // The in-plane axis that Cs and the profiles refer to is -y for wind from +Y and +y for wind from -Y; Cm
  // turns towards a larger pitch, which is a larger elevation for wind from +Y and a smaller one for wind
  // from -Y.
  const double side = loads::upwind_side(wind.wind_from);
  if (wind.spread == Spread::profile)
    for (int i = 0; i < at.hats; ++i) {
      // Station i lies at s/W; y/W = -side * s/W. Stations are symmetric about the middle.
      const int mirrored = side > 0 ? at.hats - 1 - i : i;
      a[at.hat(i)] = wind.profile[static_cast<std::size_t>(mirrored)];
    }
  const bool rim_at_minus_s = loads::pitch_seen_by_wind(elevation, wind.wind_from) >= 0;
  const bool plus_rim_upwind = rim_at_minus_s == (side > 0);
  const Pattern shaped = wind.spread != Spread::edge ? Pattern::linear
                         : plus_rim_upwind           ? Pattern::edge_plus
                                                     : Pattern::edge_minus;
  const Integral wanted{wind.coefficients.Ca, -side * wind.coefficients.Cs, side * wind.coefficients.Cm};
  for (int m = 0; m < at.modules; ++m) meet(row, a, m, shaped, wanted);

  // Drag of receiver and posts blows downwind: -Y for wind from +Y.
  const double across = std::sqrt(loads::yaw_factor(loads::yaw(wind.wind_from)));
  const Eigen::Vector3d downwind =
      loads::world_to_collector(elevation) * Eigen::Vector3d(0, -side, 0) * across * across;
  a[Columns::receiver_y] = receiver_drag * c.receiver_drag_width * downwind.y();
  a[Columns::receiver_z] = receiver_drag * c.receiver_drag_width * downwind.z();
  a[at.stand_wind()] = -side * across * across * post_drag * c.stands.front().post_width;
  return a;
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
