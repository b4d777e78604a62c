#pragma once

/// What the words of the report and of the design file mean.

#include <string>
#include <vector>

namespace focalframe::cli {

struct Explanation {
  std::string name;
  std::vector<std::string> also;                           ///< other words for it
  std::vector<std::pair<std::string, std::string>> parts;  ///< "means", "worked out", "source", "to change"
};

/// Read from cli/why.txt, built into the program. Lines: "= name | also, also", then "part: text", a blank
/// line.
const std::vector<Explanation>& explanations();

/// Wrapped to 80 columns. `what` is a topic or a word of the design file: an element ("ribs"), an attribute
/// ("depth-at-tube") or both ("ribs depth-at-tube"); case does not matter. Empty when nothing has this name.
std::string explain(const std::string& what);

/// All names that explain() knows, topics first.
std::vector<std::string> explained_names();

}  // namespace focalframe::cli
