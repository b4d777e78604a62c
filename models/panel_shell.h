#pragma once

/// A sheet bent to the parabola and laid over ribs: it spans along the row, and its curvature carries most of
/// the load to the ribs, all but near the free rims.

#include <Eigen/Core>
#include <vector>

#include "models/panel_span.h"
#include "models/parabola.h"

namespace focalframe::models {

struct ShellInput {
  Parabola parabola;
  double rigidity = 0;         ///< bending, E t^3 / 12 (1 - nu^2) [N m]
  double membrane = 0;         ///< E t / (1 - nu^2) [N/m]; 0 = not known: a flat strip, an upper bound
  double poisson = 0.3;        ///< [-]
  double pitch = 0;            ///< rib to rib [m]
  SpanEnds ends;               ///< does the sheet run on beyond the two ribs
  std::vector<double> node_y;  ///< element ends across the trough, ascending, rim to rim [m]
  std::vector<double> row_y;   ///< sample rows [m]
  std::vector<double> row_ds;  ///< length along the mirror each row stands for [m]
};

/// Answers per pressure of 1 Pa at a row: multiply with span_line(ends, g) (and its derivatives over pitch
/// for slopes along the row). Columns: first along n at every row, then along s at every row.
struct ShellAnswer {
  Eigen::MatrixXd normal;      ///< rows x (2 rows): displacement along n [m/Pa]
  Eigen::MatrixXd tangential;  ///< along s [m/Pa]
  Eigen::MatrixXd slope;       ///< rotation of the normal about +x, dw/ds + v/R [rad/Pa]
};

/// Ritz: along the row the line of an evenly loaded beam, across the trough cubic elements for u, v, w of a
/// thin cylindrical shell (strains of Donnell, with the turn v/R kept in the bending). Held along the ribs,
/// free at the rims. With a flat sheet this is the plate strip's own closed form.
ShellAnswer solve_shell(const ShellInput& input);

}  // namespace focalframe::models
