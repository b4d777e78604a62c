#pragma once

/// What a pose and a wind cost a dish: light for a solar one, gain for an antenna, and where the beam points.
///
/// All motion counts from the set-true pose. The hub's own rigid motion is taken out first; a paraboloid is
/// then fitted to what is left (height, two tilts, focal length), weighted with the projected area.

#include <optional>
#include <vector>

#include "models/antenna.h"
#include "models/dish_design.h"
#include "models/dish_model.h"
#include "models/dish_optics.h"

namespace focalframe::models {

/// The beam's turn about collector x and y, and the parts of it [rad].
struct DishPointing {
  Eigen::Vector2d base = Eigen::Vector2d::Zero();     ///< ground and pedestal
  Eigen::Vector2d bearing = Eigen::Vector2d::Zero();  ///< azimuth bearing and drive
  Eigen::Vector2d drive = Eigen::Vector2d::Zero();    ///< yoke, elevation drive and cradle, up to the hub
  Eigen::Vector2d dish = Eigen::Vector2d::Zero();     ///< reflector and feed against the hub
  Eigen::Vector2d total() const { return base + bearing + drive + dish; }
};

struct DishOptical {
  double slope = not_given;  ///< rms of the mirror's normal, 1-D mean of both directions, after the fit
  double slope_before = not_given;  ///< the same without taking the fit out, hub motion out [rad]
  double focal_change = not_given;  ///< of the best-fit paraboloid [m]
  double focus_along = not_given;   ///< receiver or feed from the best-fit focus along the axis [m]
  double focus_across = not_given;  ///< and across it [m]
  double skin_move = not_given;     ///< greatest of the skin along z, against the hub [m]
  DishPointing pointing;            ///< everything, learned or not
  double aim_error = not_given;     ///< size of what the drive does not take out, play included [rad]
  // Solar.
  double intercept = not_given;  ///< [-]
  // Antenna.
  double half_path = not_given;  ///< rms of the frame after the fit [m]
  double surface_db = not_given, defocus_db = not_given, pointing_db = not_given;
  double gain_loss = not_given;       ///< their sum, surface as built included [dB]
  double pointing_beams = not_given;  ///< aim_error in beamwidths [-]
};

/// Residual field of one pose, for maps: gradients or half path errors after the fit, weighted so that their
/// norm is the rms.
using ResidualField = Eigen::VectorXd;

class DishOpticsCheck {
 public:
  DishOpticsCheck(const DishModel& model, const DishDesign& design);

  bool radio() const { return radio_; }
  double undeformed() const;  ///< light caught by the perfect dish [-]; NaN for an antenna
  double beam_rms() const;    ///< [rad]; NaN for an antenna
  double beamwidth() const { return beamwidth_; }  ///< [rad]; NaN for a solar dish
  double built_db() const { return built_db_; }    ///< loss of the surface as built [dB]
  const Parabola& parabola() const { return parabola_; }

  /// `weight` and `wind`: amplitudes in this pose; with an empty wind the air is calm.
  DishOptical look(const DishPose& pose, const Eigen::VectorXd& weight, const Eigen::VectorXd& wind) const;

  /// What the weight of this pose leaves after the fit, not counted from the set-true pose.
  ResidualField gravity_residual(const DishPose& pose) const;
  /// Beam turn by weight alone, not counted from the set-true pose [rad].
  DishPointing gravity_pointing(const DishPose& pose) const;

  /// Half of the play of both drives at this pose, about x and y [rad].
  Eigen::Vector2d play(const DishPose& pose) const;

 private:
  struct Motion {
    Eigen::MatrixXd move, turn;  ///< 3 x samples
    Eigen::Matrix<double, 6, 1> focus = Eigen::Matrix<double, 6, 1>::Zero();
    DishPointing pointing;  ///< dish part still empty
  };
  Motion motion(const DishPose& pose, const Eigen::VectorXd& amplitudes) const;
  Motion less(const Motion& a, const Motion& b) const;
  DishShape fit(const Motion& m) const;
  DishPointing point(const Motion& m, const DishShape& shape) const;
  Eigen::Vector2d best_aim(const Motion& m) const;
  void look_at_light(const Motion& all, const Eigen::Vector2d& aim, DishOptical& out) const;
  void look_at_gain(const Motion& all, const DishShape& shape, DishOptical& out) const;
  Eigen::VectorXd gradients(const Motion& m, bool fitted) const;

  const DishModel& model_;
  Parabola parabola_;
  bool radio_ = false, learned_ = true;
  double rod_play_ = 0, slew_play_ = 0, azimuth_play_ = 0;
  double wavelength_ = not_given, beamwidth_ = not_given, built_ = 0, built_db_ = not_given;
  double hole_ = 0;
  BeamError beam_;
  std::optional<DishIntercept> intercept_;
  std::vector<double> x_, y_, rho_, weight_, illumination_;
  Motion set_;  ///< weight at the set-true pose; zero when set unloaded
};

}  // namespace focalframe::models
