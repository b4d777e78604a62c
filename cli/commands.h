#pragma once

/// What each sub-command does once its words are understood. All return an exit code.

#include <cstdint>
#include <string>
#include <vector>

namespace focalframe::cli {

struct DesignCommand {
  std::string design;      ///< path
  std::string json_path;   ///< empty = none
  std::string out_folder;  ///< `check` only: folder of the report; empty = none
  bool quiet = false, verbose = false, strict = false;
  int count = 6;                ///< `modes` only: how many
  std::int64_t trace_rays = 0;  ///< `check` only: rays in every state; 0 = no trace
  bool maps = false;            ///< `check` only: maps into the JSON
};

struct DraftCommand {
  std::string kind, file;  ///< kind: trough | frame | xsd
  bool every_field = false;
  /// Sizes as typed, by option name ("aperture"); only those given.
  std::vector<std::pair<std::string, std::string>> sizes;
};

struct FrameCommand {
  std::string design, file;          ///< paths; `file` must not exist
  std::string elevation = "90 deg";  ///< as typed
};

int run_check(const DesignCommand& command);
int run_stow(const DesignCommand& command);
int run_modes(const DesignCommand& command);
/// Writes the built frame of a row in one pose, with its load cases, as a kind="frame" design.
int run_frame(const FrameCommand& command);
int run_draft(const DraftCommand& command);
/// Lists the shipped coefficient tables and sets of combinations, or shows one (name or path). `svg_path`:
/// file for a drawing of a coefficient table; empty = none.
int run_tables(const std::string& name, const std::string& svg_path = {});

/// Says what a word of the report or of the design file means; lists the topics when no word is given.
int run_why(const std::vector<std::string>& words);

/// Options of `draft trough` that take a size.
const std::vector<std::string>& draft_size_options();

}  // namespace focalframe::cli
