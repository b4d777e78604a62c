#pragma once

/// Coefficient tables that come with the program, kept inside it so that it can be moved about, and users'
/// own.

#include <optional>
#include <string>
#include <vector>

#include "cli/table_file.h"

namespace focalframe::cli {

/// The table a design names: a shipped one by its name, else a file, looked for beside the design. What is
/// wrong is appended to `messages`. `place`: message to copy file, line and head from when the table cannot
/// be found.
std::optional<ReadTable> find_table(const std::string& name, const std::string& design_path,
                                    const Message& place, std::vector<Message>& messages);

}  // namespace focalframe::cli
