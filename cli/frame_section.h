#pragma once

#include "cli/frame_element.h"
#include "fem/section.h"

namespace focalframe::cli {

/// Section of a <section> element; what is wrong has been said when values are missing or impossible.
fem::Section frame_section(const FrameElementReader& element);

}  // namespace focalframe::cli
