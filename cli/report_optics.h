#pragma once

/// The closer look at the light: what costs it, the error budget, the bounds, the trace.

#include <string>

#include "models/assessment.h"

namespace focalframe::cli {

/// Sections of the long report about the state with the least light; empty when no light was judged.
std::string optics_study_text(const models::Assessment& a);

/// The ray trace, state by state; empty when none was asked for.
std::string trace_text(const models::Assessment& a);

/// The same as JSON members, as text of objects: "study", "maps", "rigging" (null when not made).
std::string optics_study_json(const models::Assessment& a);

}  // namespace focalframe::cli
