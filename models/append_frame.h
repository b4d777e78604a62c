#pragma once

#include "fem/frame.h"

namespace focalframe::models {

/// Appends `part` with its indices shifted and its vectors turned by `turn` (part axes to the whole's) about
/// `pivot`, which comes to lie at `at`.
void append_frame(fem::Frame& whole, const fem::Frame& part, const fem::Mat3& turn, const fem::Vec3& pivot,
                  const fem::Vec3& at);

}  // namespace focalframe::models
