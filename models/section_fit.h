#pragma once

/// The shape of many like cross-sections at once: what models/shape_fit.h finds for one, as fixed linear
/// maps.

#include <Eigen/Core>
#include <vector>

#include "models/parabola.h"

namespace focalframe::models {

class SectionFit {
 public:
  /// Rows of a cross-section [m] and the projected width each stands for. Throws std::invalid_argument when
  /// they do not fit each other.
  SectionFit(const Parabola& parabola, std::vector<double> row_y, const std::vector<double>& row_weight);

  /// One entry per cross-section; meanings as in TroughShape.
  struct Shapes {
    Eigen::RowVectorXd vertex_v, vertex_w, tilt, focal_change, focal_line_v, focal_line_w;
    Eigen::MatrixXd slope_before, slope_after;  ///< rows x sections, slope error at fixed y [rad]
  };

  /// Displacements along y, z and rotation of the normal, rows x sections.
  Shapes fit(const Eigen::MatrixXd& v, const Eigen::MatrixXd& w, const Eigen::MatrixXd& turn) const;

  int rank() const { return rank_; }
  double condition() const { return condition_; }  ///< of the height fit, unknowns scaled to equal effect

 private:
  Eigen::VectorXd height_, half_slope_, inverse_2r_, t_over_r_, miss_v_, miss_w_, miss_turn_;  ///< per row
  Eigen::MatrixXd rigid_;    ///< 1 x (2 rows): vertex_v from (v, w)
  Eigen::MatrixXd heights_;  ///< 3 x rows: vertex_w, tilt, focal change from the height error
  Eigen::MatrixXd line_;     ///< 2 x rows: focal line from the mirror's miss
  int rank_ = 0;
  double condition_ = 0;
};

}  // namespace focalframe::models
