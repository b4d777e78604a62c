#pragma once

/// From the words of a profile to a cross-section.

#include "fem/section.h"
#include "models/design.h"

namespace focalframe::models {

/// Section of a profile; its z axis is the `depth` direction. Throws std::invalid_argument for an unknown
/// shape or impossible sizes (the design's validation reports those with their place first).
fem::Section section_of(const ProfileInput& profile);

/// Overall size of the profile along its depth direction [m].
double profile_depth(const ProfileInput& profile);

/// Sizes only: "139.7 x 4.0 mm"
std::string sizes_text(const ProfileInput& profile);

}  // namespace focalframe::models
