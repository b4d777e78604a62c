#pragma once

/// The mirror's own bending between what carries it, on top of the frame's motion: rib pitch, purlins, sheet
/// thickness and facets reach the light here.
///
/// A sheet or facets on ribs span along the row as a curved sheet (models/panel_shell.h). A sheet or facets
/// on purlins span across as a strip over the purlins and the tube's two shoulders (models/panel_span.h); the
/// purlins themselves sag from rib to rib. Facets end at their edges, a sheet runs on inside its module.

#include <Eigen/Core>
#include <string>
#include <vector>

#include "fem/units.h"
#include "models/design.h"
#include "models/panel_span.h"
#include "models/row_model.h"

namespace focalframe::models {

/// Motion of the samples, collector axes, against the straight-ruled skin; (#samples) x (#states).
struct PanelMotion {
  Eigen::MatrixXd v, w;   ///< [m]
  Eigen::MatrixXd turn;   ///< of the normal about x [rad]
  Eigen::MatrixXd along;  ///< of the normal about y [rad]
};

class PanelModel {
 public:
  /// Not known when the mirror's stiffness is not given; then nothing moves.
  PanelModel(const TroughDesign& design, const RowModel& row);

  bool known() const { return known_; }
  /// What is taken to carry the mirror, in a sentence; or what is missing.
  const std::string& method() const { return method_; }
  double rigidity() const { return rigidity_; }               ///< bending, per width [N m]
  double weight() const { return mass_ * standard_gravity; }  ///< of the skin alone [Pa]

  PanelMotion motion(const Eigen::MatrixXd& amplitudes) const;

 private:
  /// Answers of a bay to (pressure along n, along s at every row; pull of weight along n at every support):
  /// fixed + line(g) * lined.
  struct Bay {
    SpanEnds ends;
    Eigen::MatrixXd normal, turn;  ///< the same everywhere along the bay
    Eigen::MatrixXd lined_normal, lined_tangential, lined_turn;
  };
  void span_across(const TroughDesign& design);
  void span_along(const TroughDesign& design);
  std::vector<SpanEnds> bay_ends(bool runs_on) const;
  bool known_kind(SpanEnds ends);
  Eigen::MatrixXd inputs(const Eigen::MatrixXd& amplitudes, int module) const;

  const RowModel& row_;
  bool known_ = false;
  std::string method_;
  double rigidity_ = 0, membrane_ = 0, poisson_ = 0.3, mass_ = 0;
  std::vector<double> row_ds_, support_y_, support_mass_;  ///< length along the mirror [m]; [m]; [kg/m]
  std::vector<fem::Vec3> normal_;                          ///< unit, per row
  Eigen::MatrixXd pressure_;                               ///< rows x (patterns + hats): net pressure [-]
  std::vector<Bay> kinds_;                                 ///< few, shared by like bays
  std::vector<int> kind_of_bay_;
};

}  // namespace focalframe::models
