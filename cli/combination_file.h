#pragma once

/// Sets of load combinations from files: shipped ones and users' own. The format is described in
/// models/tables/README.md.

#include <optional>
#include <string>
#include <vector>

#include "cli/messages.h"
#include "loads/combination.h"
#include "models/design.h"

namespace focalframe::cli {

/// Reads a set from the text of a file. Everything wrong is appended to `messages`; nullopt when one is a
/// STOP.
std::optional<loads::CombinationSet> read_combinations_text(const std::string& text,
                                                            const std::string& file_name,
                                                            std::vector<Message>& messages);

/// The shipped set's name a design means: "EN 1990" by the site's altitude, "ASCE 7" by its edition, others
/// as written.
std::string set_name(const models::TroughDesign& design);

/// Fills design.combinations with the set that limits strength names: shipped, else a file beside the design.
/// `line`: of the attribute.
void resolve_combinations(models::TroughDesign& design, const std::string& design_path, int line,
                          std::vector<Message>& messages);

}  // namespace focalframe::cli
