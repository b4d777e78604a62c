#pragma once

/// `focalframe check`: the main job.

#include <cstdint>
#include <string>

#include "cli/design_file.h"
#include "models/design.h"

namespace focalframe::cli {

struct CheckOptions {
  std::string design_path;  ///< as given on the command line
  std::string design_text;  ///< the file's text, to make a hash from
  std::string json_path;    ///< empty = no JSON
  std::string out_folder;   ///< empty = no report
  bool quiet = false;       ///< verdict line only
  bool verbose = false;
  bool strict = false;          ///< what was not judged and what was warned about counts as missed
  std::int64_t trace_rays = 0;  ///< 0 = no trace
  bool maps = false;            ///< maps of the state with the least light into the JSON
  int warnings = 0;             ///< WARN messages already printed about the design
};

/// The design is sound (no STOP). Prints the report on standard output, writes JSON, returns the exit code.
int run_trough_check(const models::TroughDesign& design, const Lines& lines, const CheckOptions& options);

}  // namespace focalframe::cli
