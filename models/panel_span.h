#pragma once

/// How a mirror panel bends between its supports: the sheet or glass itself, apart from the frame.
///
/// Local axes: s along the mirror across the trough, n along its normal towards the focus. Everything is
/// linear in the pressure, and pressure and deflection are taken along n.

#include <Eigen/Core>
#include <vector>

namespace focalframe::models {

/// Whether a span is held against turning at its ends (it runs on over the support) or not.
struct SpanEnds {
  bool from_held = true, to_held = true;
};

/// Deflected line of an evenly loaded span, w = q b^4 / EI times this, at g = x / b; `order` 0, 1, 2 for its
/// derivatives with respect to g. Closed forms: simply supported 5/384 in the middle, held at both ends
/// 1/384, at one end 0.00541 at 0.4215 b from the free one.
double span_line(SpanEnds ends, double g, int order = 0);

/// Mean, rms and rms slope over the span of the same line.
struct SpanMeans {
  double mean = 0, rms = 0, rms_slope = 0;
};
SpanMeans span_means(SpanEnds ends);

/// A strip of unit width across the trough on line supports. Lengths along s [m].
struct StripInput {
  double rigidity = 0;            ///< E t^3 / 12 (1 - nu^2) [N m]
  std::vector<double> row_s;      ///< sample rows, ascending
  std::vector<double> row_ds;     ///< length each row stands for
  std::vector<double> support_s;  ///< ascending
  std::vector<double> edge_s;     ///< edges of the panels, ascending: n + 1 for n panels side by side
  std::vector<double> node_s;     ///< where the strip is cut into elements at least, ascending
};

/// Answers of the strip, columns = pressure of 1 Pa at a row (or 1 m of settlement at a support).
struct StripAnswer {
  Eigen::MatrixXd deflection;                         ///< rows x rows [m/Pa]
  Eigen::MatrixXd slope;                              ///< rows x rows, dw/ds [rad/Pa]
  Eigen::MatrixXd reaction;                           ///< supports x rows: of the panel on it, along n [m]
  Eigen::MatrixXd settled_deflection, settled_slope;  ///< rows x supports [-], [rad/m]
};

/// Beam elements with exact nodal answers; the strip slides freely along s on its supports, so curvature does
/// not help it (an upper bound where rivets hold it). Throws std::invalid_argument when a panel has fewer
/// than two supports.
StripAnswer solve_strip(const StripInput& input);

}  // namespace focalframe::models
