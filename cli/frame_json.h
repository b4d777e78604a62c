#pragma once

#include <string>

#include "cli/frame_results.h"

namespace focalframe::cli {

/// Everything computed for a frame, SI. Schema "focalframe-frame", version 1: cases[{name,
/// nodes[{id,u[6]}], reactions[{id,r[6]}], members[{id,end_force[12]}], frequencies_hz[],
/// buckling_factors[], buckling{list[{factor_ratio,residual_ratio,moves}], counted, count_below_ratio,
/// second_order{}}}], and modes{} likewise: members are divided inside for both. u in m and rad (ux uy uz rx
/// ry rz), r in N and N m on the frame, end_force in N and N m on the member in member axes, from-end first.
/// Numbers that do not exist are null.
std::string frame_json(const std::string& name, const std::string& hash, const FrameFile& file,
                       const FrameResults& results);

}  // namespace focalframe::cli
