#pragma once

/// Files built into the program by cli/embed.cmake.

#include <string>
#include <vector>

namespace focalframe::cli {

struct EmbeddedText {
  std::string name, text;
};

/// models/tables, by name without ending.
const std::vector<EmbeddedText>& shipped_tables();
/// models/tables/combinations, likewise.
const std::vector<EmbeddedText>& shipped_combinations();
/// cli/report/assets and three.min.js, by file name.
const std::vector<EmbeddedText>& report_assets();

/// cli/why.txt alone.
const std::vector<EmbeddedText>& explanation_texts();

}  // namespace focalframe::cli
