#pragma once

#include <string>

#include "cli/design_file.h"
#include "models/schema.h"

namespace focalframe::cli {

/// A rule found broken after reading, in terms of the file: with the line of its attribute or element.
Message message_of(const models::Violation& violation, const Lines& lines, const std::string& file);

}  // namespace focalframe::cli
