#pragma once

/// From velocity pressure and coefficients to newtons, number by number, for one pose and wind: what a report
/// prints so that a pocket calculator can follow.

#include "models/row_winds.h"

namespace focalframe::models {

struct WindChainRow {
  State state;
  bool gust = false;            ///< 3 s gust and upper coefficients; else the mean wind and the best ones
  double pressure = not_given;  ///< velocity pressure [Pa]
  double pitch = not_given;     ///< seen by the wind [rad]
  loads::Coefficients table;    ///< as the table has them at this pitch
  loads::ZoneFactors zone;
  double yaw_factor = 1;                       ///< on the load across the row
  double area = not_given, width = not_given;  ///< [m^2], [m]
  // What acts on the whole row, collector axes of the table: axial hollow to back, side along s.
  double axial = not_given, side = not_given;                 ///< [N]
  double moment_vertex = not_given, moment_axis = not_given;  ///< towards larger pitch [N m]
  PatternNumbers straight;                                    ///< of the first pattern
  Spread spread = Spread::linear;                             ///< of the first pattern
  bool thin_shell = true;  ///< |residual| <= 0.15: the table may be that of a bare thin shell
  double receiver = 0, frame = 0,
         pylons = 0;               ///< drag across the row on receiver, tube + ribs, all pylons [N]
  double along = 0;                ///< on what turns, along the row [N]
  double total_error = not_given;  ///< nodal loads against q A C: forces over q A, moment over q A W [-]
};

WindChainRow wind_chain_row(const RowModel& row, const RowWinds& winds, const State& state, bool gust,
                            double pressure);

}  // namespace focalframe::models
