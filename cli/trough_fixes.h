#pragma once

/// Tries out what a wrong value may have been meant to be. Only fixes that would pass are ever suggested.

#include <string>
#include <vector>

#include "cli/trough_reader.h"

namespace focalframe::cli {

/// Those of `values` that can be read into the field and then break no rule about it and no rule that was
/// kept before.
std::vector<std::string> passing_values(const std::string& element, const std::string& attribute,
                                        const std::vector<std::string>& values,
                                        const models::TroughDesign& design);

/// Ready-to-paste fixes of a broken rule (`wall="4.0 mm"`), all of one attribute, most likely first: another
/// unit, no minus sign, a nearer word, or what the rule itself proposes; empty when none passes.
std::vector<std::string> passing_fixes(const models::Violation& violation, const TroughText& text);

}  // namespace focalframe::cli
