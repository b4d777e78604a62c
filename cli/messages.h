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
  std::string advice;  ///< last line in its own words where there is not one thing to paste; empty = none
  bool no_solution = false;  ///< the frame cannot stand as described: exit 3 instead of 2
};

/// Sorted by line, levels kept together within a line.
void sort_by_line(std::vector<Message>& messages);

bool has_stop(const std::vector<Message>& messages);

/// 0 without a STOP; 3 when every STOP says that no solution exists; else 2.
int exit_code(const std::vector<Message>& messages);

/// One message, wrapped to 80 columns; lines to paste are never wrapped.
std::string to_text(const Message& message);

/// All messages, at most 12 unless `all`, and the closing line that counts them. Empty when there are none.
std::string to_text(const std::vector<Message>& messages, bool all);

/// Words of `text` in lines of at most `width`, each after `indent` spaces, ending in a line break.
std::string wrapped(const std::string& text, std::size_t indent = 5, std::size_t width = 80);

}  // namespace focalframe::cli
