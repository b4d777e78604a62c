#pragma once

/// Coefficient tables from files, shipped ones and users' own, XML or CSV. The format is described in
/// models/tables/README.md; conventions are declared in the file and converted on reading.

#include <optional>
#include <string>
#include <vector>

#include "cli/messages.h"
#include "loads/coefficients.h"
#include "loads/table_conventions.h"

namespace focalframe::cli {

struct ReadTable {
  loads::CoefficientTable table;        ///< in the program's conventions
  loads::TableConventions conventions;  ///< as the author declared them
  std::string zone;                     ///< field position the table was made for; empty = not stated
  std::vector<std::string> understood;  ///< the conventions in words with a small drawing, ASCII
};

/// Reads a table from the text of a file; XML when it begins with `<`, CSV otherwise. Everything that is
/// wrong is appended to `messages`; nullopt when one of them is a STOP.
std::optional<ReadTable> read_table_text(const std::string& text, const std::string& file_name,
                                         std::vector<Message>& messages);

}  // namespace focalframe::cli
