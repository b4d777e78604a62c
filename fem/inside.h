#pragma once

/// Modes and buckling with members divided inside as finely as their own bowing needs.
///
/// A first solve with coarse pieces bounds the highest value wanted from above. Pieces then follow from how
/// far a wave of that value turns within one: beta L for vibration, beta^4 = omega^2 m / E I, and k L for
/// buckling, k^2 = factor N / E I, and factor M / sqrt(E I G J) sideways; the relative error of one piece is
/// close to (beta L)^4 / 880 and (k L)^4 / 720 (computed here from one piece between pins), for twist (k L)^2
/// / 24.

#include "fem/buckling.h"
#include "fem/divided.h"
#include "fem/modes.h"

namespace focalframe::fem {

struct InsideLimits {
  double error = 1e-3;      ///< wanted, relative
  int first_pieces = 2;     ///< of every member in the coarse solve
  int most_pieces = 16;     ///< of one member
  int most_members = 6000;  ///< pieces of the whole frame; when they do not suffice, the error grows
};

struct InsideModes {
  Divided divided;          ///< shapes are over its nodes; the first ones are those of the frame
  std::vector<Mode> modes;  ///< as natural_modes
  int most_pieces = 1;      ///< of any member
  double error = 0;         ///< estimate of what finer pieces would lower the highest frequency by [-]
};
InsideModes modes_inside(const Frame& frame, int count, const InsideLimits& limits = {});

struct InsideBuckling {
  Divided divided;
  LoadCase load;                    ///< on the pieces
  std::vector<BucklingMode> modes;  ///< as buckling_modes
  int most_pieces = 1;
  double error = 0;  ///< estimate of what finer pieces would lower the highest factor by [-]
};
InsideBuckling buckling_inside(const Frame& frame, const LoadCase& load, int count, double greatest_factor,
                               const InsideLimits& limits = {});

}  // namespace focalframe::fem
