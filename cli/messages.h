#pragma once

/// What the tool says about an input: level, place, what stands there; what is allowed and why; a fix ready
/// to paste.

#include <string>
#include <vector>

namespace focalframe::cli {

enum class Level { stop, warn, note };

struct Message {
  Level level = Level::stop;
  std::string file;
  int line = 0;        ///< 0 = the file as a whole
  std::string head;    ///< place and found text: `torque-tube wall="4.0 m"`
  std::string rule;    ///< rule word in brackets; empty = none
  std::string text;    ///< one paragraph
  std::string likely;  ///< printed as "Likely meant: ..."; empty = nothing is suggested
};

}  // namespace focalframe::cli
