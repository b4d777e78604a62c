#pragma once

/// What is computed for a kind="frame" design; printed by cli/frame_text.h, written by cli/frame_json.h.

#include <limits>
#include <string>
#include <vector>

#include "cli/frame_file.h"
#include "fem/buckling.h"
#include "fem/modes.h"
#include "fem/statics.h"

namespace focalframe::cli {

struct MemberStress {
  double stress = std::numeric_limits<double>::quiet_NaN();  ///< greatest von Mises bound along it [Pa]
  double at = 0;                                             ///< fraction of the length
};

struct FrameCase {
  std::string name;
  fem::Response response;
  double balance =
      std::numeric_limits<double>::quiet_NaN();  ///< |loads + reactions| / |loads|, forces and moments [-]
  std::vector<MemberStress> stresses;            ///< one per member; NaN where moduli are not given
  std::vector<fem::BucklingMode> buckling;       ///< ascending
};

struct FrameResults {
  double mass = 0;  ///< [kg]
  double condition_estimate = std::numeric_limits<double>::quiet_NaN();
  std::vector<FrameCase> cases;
  std::vector<fem::Mode> modes;      ///< ascending; empty without mass
  std::vector<std::string> remarks;  ///< what was left out and why
};

/// `mode_count` frequencies and `buckling_count` factors per case at most; 0 leaves them out. A file without
/// loads gives one case without load. Throws fem::Mechanism.
FrameResults compute_frame(const FrameFile& file, int mode_count, int buckling_count);

}  // namespace focalframe::cli
