#pragma once

/// What the user typed: sub-commands and options, and what is said when they cannot be understood.

#include <string>
#include <vector>

namespace focalframe::cli {

/// Runs the program; `arguments` without the program's name. Returns the exit code. Never throws.
int run_command_line(const std::vector<std::string>& arguments);

}  // namespace focalframe::cli
