#pragma once

/// A row ready to be asked about any pose and wind: the body condensed once onto its bearings, the pylons
/// condensed onto their heads, and every result the criteria need as a linear map of the load amplitudes.
///
/// Nothing in here depends on the pose but PoseModel, whose making is one small dense factorisation.

#include <Eigen/Core>
#include <array>
#include <vector>

#include "fem/condensed.h"
#include "loads/coefficients.h"
#include "models/collector.h"
#include "models/unit_cases.h"

namespace focalframe::models {

/// Basis patterns of the net pressure on one module, dcp = 1 on the real surface; y in collector axes.
enum class Pattern : int {
  uniform,     ///< 1
  linear,      ///< 2 y / W
  edge_plus,   ///< exp(-(W/2 - y) / (0.2 W)): peak at the +y rim
  edge_minus,  ///< exp(-(W/2 + y) / (0.2 W)): peak at the -y rim
  line,        ///< force W per length along +y at the vertex line
  half_plus,   ///< 1 for y > 0
};
inline constexpr int basis_count = 6;

/// Value of a pattern at y [-].
double basis_value(Pattern b, double y, double width);
/// Hat function of station i of a list of s/W at a position s/W: 1 on the station, 0 on its neighbours.
double hat_value(const std::vector<double>& stations, int i, double at);

/// Number of a load amplitude in every amplitude vector. Body columns come first, the stands' five last.
struct Columns {
  int modules = 0, hats = 0, units = 0;
  static constexpr int gravity_y = 0, gravity_z = 1;    ///< acceleration along collector y, z [m/s^2]
  static constexpr int receiver_y = 2, receiver_z = 3;  ///< line load on the receiver [N/m]
  int basis(int module, Pattern b) const { return 4 + basis_count * module + static_cast<int>(b); }  ///< [Pa]
  int hat(int i) const { return 4 + basis_count * modules + i; }  ///< whole row, profile station i [Pa]
  int unit(int number) const { return 4 + basis_count * modules + hats + number; }  ///< of UnitCases
  int body() const { return 4 + basis_count * modules + hats + units; }
  static constexpr int stand = 5;                  ///< columns of the stands, all alike
  int stand_gravity() const { return body(); }     ///< downwards [m/s^2]
  int stand_wind() const { return body() + 1; }    ///< line load along +Y on every post [N/m]
  int stand_wind_x() const { return body() + 2; }  ///< along +X [N/m]
  int stand_push_x() const { return body() + 3; }  ///< their masses pushed along +X [m/s^2]
  int stand_push_y() const { return body() + 4; }  ///< along +Y [m/s^2]
  int all() const { return body() + stand; }
};

/// What a pressure of 1 Pa does to a module as a whole: force along -z over area, along +y over area, moment
/// about the vertex line over area and width [-].
struct Integral {
  double axial = 0, side = 0, moment = 0;
};

/// y = held * (body amplitudes) + joint * (motion of the bearing freedoms).
struct LinearOutput {
  Eigen::MatrixXd held, joint;
};

/// A pose: how bearings and pylon heads move, and which forces pass, per unit of every amplitude.
struct PoseModel {
  double elevation = 0;
  Eigen::MatrixXd bearing_motion;  ///< #bearing freedoms x #columns [m, rad]
  Eigen::MatrixXd bearing_force;   ///< forces of the stands on the body, likewise [N, N m], collector axes
  Eigen::MatrixXd head_motion;     ///< (6 #stands) x #columns, world axes
  Eigen::MatrixXd
      twist_gain;  ///< #modules x #modules: rotation of a module per moment on another [rad/(N m)]
};

class RowModel {
 public:
  /// `stations`: s/W of a table's net-pressure profiles, empty for none. `units`: what else may act.
  RowModel(Collector collector, std::vector<double> stations, UnitCases units = {});

  const Collector& collector() const { return collector_; }
  const Columns& columns() const { return columns_; }
  const std::vector<double>& hat_stations() const { return stations_; }
  const UnitCases& units() const { return units_; }
  /// Column of a hat of snow or water; along z when `upright`, else along y.
  int heap(int station, bool upright) const {
    return columns_.unit(static_cast<int>(units_.cases.size()) + 2 * station + (upright ? 1 : 0));
  }
  PoseModel pose(double elevation) const;

  /// Integrals of a body pressure column over one module (hats: their share on it).
  Integral integral(int column, int module) const;
  double module_area(int module) const { return module_area_[static_cast<std::size_t>(module)]; }

  // Outputs; rows in brackets.
  LinearOutput mirror_v;      ///< [#samples] mirror displacement along y [m]
  LinearOutput mirror_w;      ///< [#samples] along z [m]
  LinearOutput mirror_turn;   ///< [#samples] rotation of the mirror's normal about x [rad]
  LinearOutput mirror_along;  ///< [#samples] rotation of the mirror about y [rad]
  LinearOutput receiver;      ///< [2 #stations] receiver displacement y, z at the stations [m]
  LinearOutput vertex;        ///< [2 #stations] vertex line displacement y, z [m]
  LinearOutput module_turn;   ///< [#modules] mean rotation of the tube at the rib roots about x [rad]
  LinearOutput sensor_turn;   ///< [1] rotation about x of the tube beside the drive [rad]
  LinearOutput end_force;     ///< [12 #members] member axes [N, N m]

  /// End forces of the post of stand k, 12 x #cases, member axes: x up, y along the row, z across it. The
  /// first six are what the ground puts on its foot.
  Eigen::MatrixXd evaluate_stand(int k, const PoseModel& pose, const Eigen::MatrixXd& amplitudes) const;

  Eigen::MatrixXd evaluate(const LinearOutput& output, const PoseModel& pose,
                           const Eigen::MatrixXd& amplitudes) const;

  /// End forces of many winds in one pose, cheaply: all modules see the same pattern but for their own linear
  /// part (twist feedback), so few sums of columns span every wind. Falls back on evaluate where that does
  /// not hold.
  Eigen::MatrixXd end_forces(const PoseModel& pose, const Eigen::MatrixXd& amplitudes) const;

  /// Nodal loads on the body for given amplitudes, (6 #nodes), collector axes [N, N m].
  Eigen::VectorXd nodal_loads(const Eigen::VectorXd& amplitudes) const {
    return loads_ * amplitudes.head(columns_.body());
  }

  /// Sum of the nodal loads of body columns: force y, z and moment about the rotation axis, 3 x #body
  /// columns.
  const Eigen::MatrixXd& load_totals() const { return load_totals_; }
  /// Index of bearing k's y freedom (z follows) and of the drive's x and rotation freedoms.
  static int bearing_y(int k) { return 2 * k; }
  int drive_x() const { return 2 * static_cast<int>(collector_.bearings.size()); }
  int drive_turn() const { return drive_x() + 1; }

  double residual = 0, pivot_ratio = 0, condition = 0;  ///< of the factorisation
  double body_mass = 0;
  fem::Vec3 body_centre = fem::Vec3::Zero();  ///< [m], collector axes

 private:
  Eigen::MatrixXd body_loads();
  void make_fold();
  void make_outputs(const Eigen::MatrixXd& fixed_ends);

  Collector collector_;
  UnitCases units_;
  Columns columns_;
  std::vector<double> stations_, module_area_;
  fem::Condensed body_;
  std::vector<fem::Condensed> stands_;
  std::vector<LinearOutput> stand_posts_;  ///< 12 end forces of the post; held: weight, wind; joint: its head
  std::vector<Integral> integrals_;        ///< (#body columns) x #modules
  Eigen::MatrixXd loads_, load_totals_;
  Eigen::MatrixXd fold_;          ///< #columns x #sums: which columns every sum adds up
  std::vector<int> fold_column_;  ///< the amplitude each sum is read from
  Eigen::MatrixXd folded_ends_;   ///< end_force.held of the sums
};

}  // namespace focalframe::models
