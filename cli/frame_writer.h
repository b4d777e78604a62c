#pragma once

/// A frame and its load cases as a kind="frame" design, with every digit: read back, it is the same frame.

#include <string>
#include <vector>

#include "fem/load_case.h"

namespace focalframe::cli {

/// `remarks` become comments at the top. Sections are written as properties (member axes are principal);
/// names that are not unique get a number. Imposed support displacements move in every case.
std::string frame_design_text(const std::string& name, const std::vector<std::string>& remarks,
                              const fem::Frame& frame, const std::vector<fem::LoadCase>& cases);

}  // namespace focalframe::cli
