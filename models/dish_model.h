#pragma once

/// A dish ready to be asked about any pose and wind: body, yoke and base condensed once, each pose a small
/// dense solve, every result a linear map of the load amplitudes.

#include <Eigen/Core>
#include <vector>

#include "fem/condensed.h"
#include "models/dish_collector.h"
#include "models/row_model.h"

namespace focalframe::models {

/// Numbers of the load amplitudes. Pressures act on the concave side against the normal that points to the
/// focus; forces and accelerations in collector axes up to `body`, then the yoke's and the base's own.
struct DishColumns {
  static constexpr int gravity = 0;       ///< x, y, z [m/s^2]
  static constexpr int vertex_force = 3;  ///< x, y, z at the vertex, on the hub [N]
  static constexpr int front_drag = 6;    ///< x, y, z: 1 Pa on the outline of legs and feed, coefficient 1
  static constexpr int uniform = 9;       ///< 1 Pa
  static constexpr int linear = 10;       ///< 2x/D, 2y/D [Pa]
  /// exp((s - R)/(0.2 D)) for any direction s is a sum over m of cosines and sines around the dish: cosines
  /// m = 0 .. edge_terms - 1, then sines m = 1 .. edge_terms - 1.
  static constexpr int edge = 12, edge_terms = 10;
  static constexpr int area_force = edge + 2 * edge_terms - 1;  ///< x, y, z per projected area [N/m^2]
  static constexpr int bowl = area_force + 3;                   ///< 4 r^2 / D^2 [Pa]
  static constexpr int body = bowl + 1;
  static constexpr int yoke_gravity = body;      ///< X, Y, Z, yoke axes [m/s^2]
  static constexpr int base_gravity = body + 3;  ///< downwards [m/s^2]
  static constexpr int base_wind = body + 4;     ///< X, Y world: 1 N/m on every member of the base
  static constexpr int all = body + 6;

  static constexpr int edge_cos(int m) { return edge + m; }
  static constexpr int edge_sin(int m) { return edge + edge_terms + m - 1; }
};
inline constexpr double dish_edge_decay = 0.2;  ///< of D, as for troughs

/// One pose: what the columns do to joints and drive. Columns = load amplitudes.
struct DishPose {
  double elevation = 0;  ///< [rad]
  Eigen::Matrix3d yoke_from_world = Eigen::Matrix3d::Identity();
  Eigen::MatrixXd held_motion;  ///< held nodes of the body, collector axes
  Eigen::MatrixXd yoke_motion;  ///< kept freedoms of the yoke, yoke axes
  Eigen::MatrixXd head_motion;  ///< 6 rows, world axes
  Eigen::MatrixXd left, right;  ///< 3 rows each: force of the bearing on the body, yoke axes [N]
  Eigen::RowVectorXd drive;     ///< push of the actuator on the dish [N], or torque on it [N m]
  Eigen::MatrixXd azimuth;      ///< 6 rows: forces of the azimuth bearing on the yoke, yoke axes
  double arm = 0;               ///< torque about the elevation axis per push [m]; 1 with a slewing drive

  /// Rotation from yoke to collector axes.
  Eigen::Matrix3d collector_from_yoke() const;
};

class DishModel {
 public:
  explicit DishModel(DishCollector collector);

  const DishCollector& collector() const { return collector_; }
  DishPose pose(double elevation, const Eigen::Matrix3d& yoke_from_world = Eigen::Matrix3d::Identity()) const;

  /// One column per column of `amplitudes`.
  Eigen::MatrixXd evaluate(const LinearOutput& output, const DishPose& pose,
                           const Eigen::MatrixXd& amplitudes) const;
  /// End forces (12 per member), member axes.
  Eigen::MatrixXd yoke_end_forces(const DishPose& pose, const Eigen::MatrixXd& amplitudes) const;
  Eigen::MatrixXd base_end_forces(const DishPose& pose, const Eigen::MatrixXd& amplitudes) const;
  /// Reaction of the ground on each foot, world axes, six rows per foot.
  Eigen::MatrixXd foot_reactions(const DishPose& pose, const Eigen::MatrixXd& amplitudes) const;

  /// (6 #body nodes) x body: nodal loads of every column, collector axes.
  const Eigen::MatrixXd& nodal_loads() const { return loads_; }
  /// 6 x body: force and moment about the vertex of the nodal loads of every column, collector axes.
  const Eigen::MatrixXd& totals() const { return totals_; }

  LinearOutput skin_move, skin_turn;  ///< three rows per sample, collector axes
  LinearOutput focus, hub;            ///< six rows each
  LinearOutput end_force;             ///< twelve rows per member of the body
  double body_mass = 0;
  fem::Vec3 body_centre = fem::Vec3::Zero();
  double yoke_mass = 0, base_mass = 0;
  double residual = 0, condition = 0;

 private:
  Eigen::MatrixXd body_loads(std::vector<fem::LoadCase>& cases) const;
  void condense_stand();
  void make_outputs(const Eigen::MatrixXd& fixed_ends);

  DishCollector collector_;
  fem::Condensed body_, yoke_, base_;
  Eigen::MatrixXd loads_, totals_;
  LinearOutput yoke_ends_, base_ends_;
  std::vector<int> yoke_nodes_;
};

}  // namespace focalframe::models
