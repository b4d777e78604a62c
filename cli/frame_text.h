#pragma once

/// Results of a frame for a terminal: 80 columns, ASCII.

#include <string>

#include "cli/frame_results.h"

namespace focalframe::cli {

/// `all`: every node with a reaction, however many.
std::string frame_text(const std::string& name, const std::string& hash, const FrameFile& file,
                       const FrameResults& results, bool all);

/// Frequencies and buckling factors only.
std::string modes_text(const std::string& name, const std::string& hash, const FrameFile& file,
                       const FrameResults& results);

}  // namespace focalframe::cli
