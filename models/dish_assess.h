#pragma once

/// The whole check of a dish, design in, results out.

#include "models/dish_assessment.h"
#include "models/dish_design.h"

namespace focalframe::models {

struct DishAssessOptions {
  int refine = 1;              ///< multiplies the pieces along every rib
  bool discretisation = true;  ///< repeat the governing optics with pieces of half the size
  bool frequency = true;       ///< lowest frequency at the stow pose
  bool parking = false;        ///< search the greatest gusts at rest, which takes a few seconds
};

/// The design must be valid; the table must cover every asked pose (dish_table_gaps). Throws fem::Mechanism
/// when the dish cannot stand.
DishAssessment assess_dish(const DishDesign& design, const loads::CoefficientTable& table,
                           const DishAssessOptions& options = {});

/// Fills criteria, answers, verdict, remarks, cautions and what was not checked.
void judge_dish(const DishDesign& design, DishAssessment& assessment);

}  // namespace focalframe::models
