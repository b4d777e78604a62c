#pragma once

/// A dish in one pose as one frame: body, yoke, base, bearings and drives together, nothing condensed. For
/// modes, for buckling, and to prove the condensed way right.

#include <string>
#include <vector>

#include "loads/coefficients.h"
#include "models/dish_collector.h"
#include "models/dish_design.h"
#include "models/row_modes.h"

namespace focalframe::models {

struct DishFullFrame {
  fem::Frame frame;         ///< yoke axes with a vertical azimuth axis (world axes), origin at ground level
  int first_body_node = 0;  ///< body node n is frame node first_body_node + n
  int first_yoke_node = 0;  ///< likewise; the arms' tops are the body's bearings and not there
  int head = 0;
};

/// Azimuth 0. Bearings and slewing drive are ends of the yoke's arms, released in rotation; the actuator is a
/// hinged rod of its stiffness.
DishFullFrame dish_full_frame(const DishCollector& collector, double elevation);

/// Frequencies in one pose; buckling factors under weight and the 3 s gust of the STOW wind (upper
/// coefficients) from the direction among eight that has the lowest one.
RowStability dish_stability(const DishDesign& design, const loads::CoefficientTable& table, double elevation,
                            int count);

}  // namespace focalframe::models
