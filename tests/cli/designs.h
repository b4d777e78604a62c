#pragma once

/// The row of tests/cli/row.xml with pieces of its text replaced, read as `check` reads it.

#include <catch2/catch.hpp>
#include <fstream>
#include <initializer_list>
#include <iterator>
#include <string>
#include <utility>

#include "cli/design_file.h"

namespace focalframe::cli {

inline std::string file_text(const std::string& path) {
  std::ifstream stream(path, std::ios::binary);
  REQUIRE(stream);
  return {std::istreambuf_iterator<char>(stream), std::istreambuf_iterator<char>()};
}

inline std::string row_text(std::initializer_list<std::pair<std::string, std::string>> changes) {
  std::string text = file_text(FOCALFRAME_SOURCE_DIR "/tests/cli/row.xml");
  for (const auto& [from, to] : changes) {
    const std::size_t at = text.find(from);
    INFO("looking for " << from);
    REQUIRE(at != std::string::npos);
    text.replace(at, from.size(), to);
  }
  return text;
}

inline DesignFile changed_row(std::initializer_list<std::pair<std::string, std::string>> changes) {
  return read_design_text(row_text(changes), "row.xml");
}

}  // namespace focalframe::cli
