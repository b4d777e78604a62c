#pragma once

/// Styles and scripts of the report, built into the program.

#include <string>

namespace focalframe::cli {

/// Text of a file of cli/report/assets, or of three.min.js from Debian's libjs-three. Throws std::logic_error
/// for another name.
const std::string& asset(const std::string& name);

}  // namespace focalframe::cli
