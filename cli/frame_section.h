#pragma once

#include "cli/frame_element.h"
#include "fem/section.h"

namespace focalframe::cli {

struct FrameSection {
  fem::Section section;  ///< principal axes
  double tilt = 0;       ///< of the principal axes against `up`, see fem/section_profiles.h [rad]
};

/// Section of a <section> element; what is wrong has been said when values are missing or impossible.
FrameSection frame_section(const FrameElementReader& element);

}  // namespace focalframe::cli
