#pragma once

/// How the trigger moves when what is known least is a tenth more or less, each one run again.

#include <functional>
#include <string>
#include <vector>

#include "models/trigger.h"

namespace focalframe::models {

struct TriggerShift {
  std::string what;              ///< "wind coefficients", "tube's torsional stiffness" ...
  double change = 0.1;           ///< relative
  double axis_gust = not_given;  ///< [m/s]
  double speed = not_given;      ///< the trigger, not rounded [m/s]
  double shift = not_given;      ///< against the unchanged design [m/s]
  LimitKey governing = LimitKey::member;
  bool governing_changed = false;
};

/// Coefficients, torsional stiffness of the tube, foundation stiffness, drive stiffness, mass, moving torque;
/// each up and down by a tenth. Empty without a trigger.
std::vector<TriggerShift> trigger_sensitivity(const TroughDesign& design,
                                              const loads::CoefficientTable& table, const RowModel& row,
                                              const Trigger& trigger,
                                              const std::function<void(int done, int all)>& progress = {});

}  // namespace focalframe::models
