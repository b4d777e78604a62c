#pragma once

/// From a bent row to light caught: everything the optical criteria need for one state.

#include <Eigen/Core>
#include <vector>

#include "models/attribution.h"
#include "models/design.h"
#include "models/intercept.h"
#include "models/panel_model.h"
#include "models/row_model.h"
#include "models/section_fit.h"

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
  double slope_panel = not_given;   ///< transverse slope rms of the panels' own bending, over the row [rad]
  double focal_change = not_given;  ///< of the best-fit parabola, cross-section with the greatest one [m]
  double focal_shift = not_given;   ///< along the axis, least squares on the miss, likewise [m]
  double receiver_shift =
      not_given;  ///< greatest distance of the receiver from the moved focus, any station [m]
  double receiver_lateral = not_given, receiver_axial = not_given;  ///< there, collector axes [m]
  double rim_deflection =
      not_given;            ///< greatest of the mirror at the rims, along its normal, against the tube [m]
  int worst_module = 0;     ///< the one that catches least
  Attribution attribution;  ///< tilt, twist, receiver, focus, ribs, panel
};

/// How much of an OpticalResult is filled.
enum class OpticsDetail {
  all,
  limits,  ///< intercept, module twist, slope and receiver shift: what a limit can be set on
};

/// How everything the light meets has moved in one state, against the set-true pose; [row][station] matrices,
/// stations of all modules. The mirror's own bending (panel) is not set out at the set-true pose: pads move a
/// panel, they do not unbend it.
struct OpticalMotion {
  Eigen::MatrixXd v, w, turn, along;                          ///< of the frame's skin [m], [rad]
  Eigen::MatrixXd panel_v, panel_w, panel_turn, panel_along;  ///< of the panels on it [m], [rad]
  Eigen::Matrix2Xd receiver, vertex;                          ///< along y, z at the stations [m]
  Eigen::VectorXd module_turn;                                ///< mean rotation at the rib roots [rad]
  double beside_drive = not_given;                            ///< rotation of the tube there [rad]
  double encoder = not_given;  ///< rotation of what turns against what stands, at the drive [rad]
};

/// What each kind of sensor would read in one state [rad].
struct SensorReadings {
  double encoder = not_given, inclinometer = not_given, sun = not_given;
  double row_mean = not_given;  ///< of the modules' rotations
};

class OpticsCheck {
 public:
  OpticsCheck(const RowModel& row, const TroughDesign& design);

  double undeformed() const { return intercept_.undeformed(); }
  const BeamError& beam() const { return beam_; }
  const Parabola& parabola() const { return parabola_; }
  const RowModel& row() const { return row_; }
  const PanelModel& panel() const { return panel_; }
  const TroughIntercept& intercept() const { return intercept_; }
  const SectionFit& sections() const { return sections_; }
  const std::vector<double>& weight() const { return weight_; }  ///< per sample [m^2]
  double target_half_width() const { return half_width_; }       ///< of tube or strip [m]
  LineReceiver target() const { return target_; }

  /// One result per column of `amplitudes` (weight, wind and feedback of one state each), all at `pose`.
  std::vector<OpticalResult> look(const PoseModel& pose, const Eigen::MatrixXd& amplitudes,
                                  OpticsDetail detail = OpticsDetail::all) const;

  /// The steps of `look`, for reports that go deeper. `set_true` false: not against the set-true pose.
  std::vector<OpticalMotion> motions(const PoseModel& pose, const Eigen::MatrixXd& amplitudes,
                                     bool set_true = true) const;
  SensorReadings readings(const OpticalMotion& motion) const;
  /// What the tracker of this design turns back [rad].
  double correction(const SensorReadings& readings) const;
  double correction(const SensorReadings& readings, const std::string& kind, const std::string& rule) const;
  /// Miss of every sample [m] with the collector turned back by `back` [rad]; rows contiguous.
  Eigen::MatrixXd miss(const OpticalMotion& motion, double back) const;
  /// The same in parts that add up to it: tilt (the row's mean rotation less `back`), twist (of every
  /// cross-section against that), receiver, focus, ribs (all other shape of the frame), panel.
  std::vector<MissPart> parts(const OpticalMotion& motion, double back) const;
  /// Share of the light caught, all samples or one module's [-].
  double caught(const Eigen::MatrixXd& miss) const;
  double caught(const Eigen::MatrixXd& miss, int module) const;
  /// Area mean over the samples of one row's weights.
  Eigen::VectorXd aim_lever() const { return aim_; }  ///< per row [m/rad]

 private:
  OpticalResult look_at(const OpticalMotion& motion, OpticsDetail detail) const;
  void look_at_shape(const OpticalMotion& motion, OpticalResult& out) const;
  void look_at_receiver(const OpticalMotion& motion, OpticalResult& out) const;
  Eigen::MatrixXd frame_miss(const OpticalMotion& motion) const;
  Eigen::MatrixXd panel_miss(const OpticalMotion& motion) const;

  const RowModel& row_;
  Parabola parabola_;
  BeamError beam_;
  double half_width_ = 0;
  LineReceiver target_ = LineReceiver::tube;
  TroughIntercept intercept_;
  PanelModel panel_;
  SectionFit sections_;
  SensorInput sensor_;
  std::vector<double> weight_;                                    ///< per sample [m^2]
  Eigen::VectorXd mirror_v_, mirror_w_, rotation_, along_, aim_;  ///< per row, of the miss
  Eigen::VectorXd row_weight_, station_weight_;                   ///< [m]
  std::vector<OpticalMotion> set_;  ///< weight at the set-true pose; empty when set unloaded
};

/// The beam's spread as the design states it.
BeamError beam_error(const OpticsInput& optics);

/// Half the width of what the light must meet, and its kind.
double target_half_width(const ReceiverInput& receiver);
LineReceiver target_kind(const ReceiverInput& receiver);

}  // namespace focalframe::models
