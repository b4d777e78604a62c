#include <iostream>

#include "cli/commands.h"
#include "cli/exit_code.h"
#include "cli/explanations.h"
#include "cli/messages.h"
#include "cli/nearest.h"

namespace focalframe::cli {

int run_why(const std::vector<std::string>& words) {
  if (words.empty()) {
    std::vector<std::string> names;
    for (const Explanation& e : explanations()) names.push_back(e.name);
    std::cout
        << "`focalframe why WHAT` explains one of these, or any element or attribute of a design file:\n"
        << wrapped(joined(names, "; "), 2);
    return all_met;
  }
  const std::string what = joined(words);
  const std::string text = explain(what);
  if (!text.empty()) {
    std::cout << text;
    return all_met;
  }
  Message m;
  m.file = "command line";
  m.head = "focalframe why " + what;
  m.text = "Nothing has this name: neither a topic nor a word of the design file. Topics: focalframe why.";
  if (const std::string near = nearest_name(what, explained_names()); !near.empty())
    m.likely = "focalframe why " + near;
  std::cerr << to_text({m}, true);
  return bad_input;
}

}  // namespace focalframe::cli
