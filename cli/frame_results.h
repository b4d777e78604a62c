#pragma once

/// What is computed for a kind="frame" design; printed by cli/frame_text.h, written by cli/frame_json.h.

#include <limits>
#include <string>
#include <vector>

#include "cli/frame_file.h"
#include "fem/diagram.h"
#include "fem/inside.h"
#include "fem/statics.h"

namespace focalframe::cli {

struct MemberStress {
  double stress = std::numeric_limits<double>::quiet_NaN();  ///< greatest von Mises bound along it [Pa]
  double at = 0;                                             ///< fraction of the length
};

/// Equilibrium in the bent shape, where the buckling factor is below 10.
struct FrameSecondOrder {
  bool asked = false, stable = false;
  /// Greatest displacement of any node, first and second order [m].
  double first = std::numeric_limits<double>::quiet_NaN(), second = std::numeric_limits<double>::quiet_NaN();
  double stress = std::numeric_limits<double>::quiet_NaN();  ///< greatest von Mises bound [Pa]
  double used = std::numeric_limits<double>::quiet_NaN();    ///< greatest share of yield [-]
  int member = -1;                                           ///< where the stress is greatest
};

struct FrameCase {
  std::string name;
  fem::Response response;
  double balance =
      std::numeric_limits<double>::quiet_NaN();  ///< |loads + reactions| / |loads|, forces and moments [-]
  std::vector<MemberStress> stresses;            ///< one per member; NaN where moduli are not given
  std::vector<fem::Extremes> extremes;           ///< one per member: moments and deflections between its ends
  fem::InsideBuckling buckling;                  ///< modes ascending
  FrameSecondOrder second_order;
};

struct FrameResults {
  double mass = 0;  ///< [kg]
  double condition_estimate = std::numeric_limits<double>::quiet_NaN();
  std::vector<FrameCase> cases;
  double smallest_pivot_ratio = std::numeric_limits<double>::quiet_NaN();
  fem::InsideModes modes;            ///< ascending; empty without mass
  std::vector<std::string> remarks;  ///< what was left out and why
};

/// `mode_count` frequencies and `buckling_count` factors per case at most; 0 leaves them out. A file without
/// loads gives one case without load. Throws fem::Mechanism.
FrameResults compute_frame(const FrameFile& file, int mode_count, int buckling_count);

}  // namespace focalframe::cli
