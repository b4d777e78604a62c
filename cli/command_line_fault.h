#pragma once

/// What is said when the words on the command line do not fit together.

#include <string>
#include <vector>

#include "cli/messages.h"

namespace focalframe::cli {

/// `arguments` without the program's name; `reason` is the argument library's own text, used only when
/// nothing better is known.
Message command_line_fault(const std::vector<std::string>& arguments, const std::string& reason);

}  // namespace focalframe::cli
