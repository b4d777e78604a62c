#pragma once

/// All of `focalframe stow`: limits, trigger, price, sensitivity. Plain values, SI.

#include <functional>
#include <string>
#include <vector>

#include "models/trigger_sensitivity.h"
#include "models/wind_price.h"

namespace focalframe::models {

struct StowReport {
  std::string name, table, table_confidence, zone, rule;
  WindLimits limits;
  Trigger trigger;
  Trigger hand_held;  ///< the same for a hand-held meter at 2 m; not known when the trigger itself is for one
  Price price;
  std::vector<TriggerShift> shifts;
  bool by_hand = false;                  ///< turned by a person
  double moving_capacity = not_given;    ///< [N m]
  std::vector<std::string> remarks;      ///< what was frozen, what the reader should look at
  std::vector<std::string> not_covered;  ///< in words
  int states_missed = 0;                 ///< asked states that do not hold
};

struct StowOptions {
  bool sensitivity = true;
  const WindRecord* record = nullptr;
  std::function<void(int done, int all)> progress = {};
};

/// The design must be free of STOP violations. Throws fem::Mechanism when the row can move freely.
StowReport stow_report(const TroughDesign& design, const loads::CoefficientTable& table, const RowModel& row,
                       const StowOptions& options = {});

/// Only what a check shows in two lines: TURNING and OPERATE without the light, and the trigger.
Trigger quick_trigger(const TroughDesign& design, const loads::CoefficientTable& table, const RowModel& row);

}  // namespace focalframe::models
