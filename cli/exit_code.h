#pragma once

namespace focalframe::cli {

/// What a run ends with.
enum ExitCode {
  all_met = 0,
  criterion_failed = 1,
  bad_input = 2,
  no_solution = 3,  ///< the frame can move freely, or no answer was reached
};

}  // namespace focalframe::cli
