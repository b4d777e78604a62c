#pragma once

/// From a bent row to light caught: everything the optical criteria need for one state.

#include <Eigen/Core>
#include <vector>

#include "models/attribution.h"
#include "models/design.h"
#include "models/intercept.h"
#include "models/row_model.h"
#include "models/shape_fit.h"

namespace focalframe::models {

/// All angles against the set-true pose, rotations positive about +x. Row means are area means over all
/// samples.
struct OpticalResult {
  double intercept = not_given;  ///< row mean of the local intercepts, after the correction asked for [-]
  double intercept_at_drive =
      not_given;  ///< the same with the angle right at the drive's own sensor position [-]
  double intercept_row_mean = not_given;  ///< the same with the row's mean twist taken out [-]
  std::vector<double> module_intercept;   ///< [-]
  std::vector<double> module_twist;       ///< rotation of a module less the sensor's reading [rad]
  double sensor_reading = not_given;      ///< what the tracker turns back [rad]
  double worst_twist = not_given;         ///< greatest |module twist| [rad]
  /// Residual transverse slope rms of the worst module: every cross-section's own tilt (twist) and focus out
  /// [rad].
  double slope = not_given;
  double slope_before = not_given;  ///< rms of the worst module before that [rad]
  double slope_along = not_given;   ///< longitudinal slope rms over the row [rad]
  double focal_change = not_given;  ///< of the best-fit parabola, cross-section with the greatest one [m]
  double focal_shift = not_given;   ///< along the axis, least squares on the miss, likewise [m]
  double receiver_shift =
      not_given;  ///< greatest distance of the receiver from the moved focus, any station [m]
  double receiver_lateral = not_given, receiver_axial = not_given;  ///< there, collector axes [m]
  double rim_deflection =
      not_given;            ///< greatest of the mirror at the rims, along its normal, against the tube [m]
  int worst_module = 0;     ///< the one that catches least
  Attribution attribution;  ///< twist, receiver, focus, ribs
};

class OpticsCheck {
 public:
  OpticsCheck(const RowModel& row, const TroughDesign& design);

  double undeformed() const { return intercept_.undeformed(); }
  const BeamError& beam() const { return beam_; }

  /// One result per column of `amplitudes` (weight, wind and feedback of one state each), all at `pose`.
  std::vector<OpticalResult> look(const PoseModel& pose, const Eigen::MatrixXd& amplitudes) const;

 private:
  /// Columns = states.
  struct Motion {
    Eigen::MatrixXd v, w, turn, along, receiver, vertex, module_turn, sensor, encoder;
  };
  Motion motion(const PoseModel& pose, const Eigen::MatrixXd& amplitudes) const;
  OpticalResult look_at(const Motion& all, int column) const;
  void look_at_receiver(const Eigen::Vector2d& receiver, const Eigen::Vector2d& vertex, double twist,
                        OpticalResult& out) const;

  const RowModel& row_;
  Parabola parabola_;
  BeamError beam_;
  TroughIntercept intercept_;
  std::string sensor_kind_, correction_;
  std::vector<MissTerms> terms_;  ///< per row
  std::vector<double> weight_;    ///< per sample [m^2]
  Motion set_;                    ///< weight at the set-true pose; zero when set unloaded
};

/// The beam's spread as the design states it.
BeamError beam_error(const OpticsInput& optics);

}  // namespace focalframe::models
