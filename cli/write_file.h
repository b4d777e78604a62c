#pragma once

/// Files are written whole or not at all: into a temporary file beside the target, then renamed.

#include <string>

namespace focalframe::cli {

/// Empty when the file stands; else one sentence saying why it does not.
std::string write_file(const std::string& path, const std::string& text);

/// As write_file, but an existing file is left as it is and reported.
std::string write_new_file(const std::string& path, const std::string& text);

/// Why results must not be written to this path: it is the design itself or looks like one, or it is a
/// folder. Empty = they may.
std::string refuse_result_path(const std::string& path, const std::string& design_path);

}  // namespace focalframe::cli
