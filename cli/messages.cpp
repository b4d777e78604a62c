#include "cli/messages.h"

#include <algorithm>

namespace focalframe::cli {
namespace {

constexpr std::size_t shown_at_most = 12;

const char* word(Level level) {
  return level == Level::stop ? "STOP" : level == Level::warn ? "WARN" : "NOTE";
}

// A value cut for display: a damaged file can make it as long as the file.
std::string shortened(const std::string& text) {
  constexpr std::size_t longest = 160;
  std::string flat = text;
  for (char& c : flat)
    if (static_cast<unsigned char>(c) < 0x20 || c == 0x7f) c = ' ';
  if (flat.size() <= longest) return flat;
  std::size_t cut = longest;
  while (cut > 0 && (static_cast<unsigned char>(flat[cut]) & 0xC0) == 0x80) --cut;
  return flat.substr(0, cut) + "...";
}

std::string closing_line(const std::vector<Message>& messages) {
  const auto count = [&](Level level) {
    return std::count_if(messages.begin(), messages.end(),
                         [&](const Message& m) { return m.level == level; });
  };
  const auto stops = count(Level::stop), others = count(Level::warn) + count(Level::note);
  if (stops == 0) return std::to_string(others) + " to look at.\n";
  std::string line = std::to_string(stops) + " to mend";
  if (others > 0) line += ", " + std::to_string(others) + " to look at";
  return line + ". Nothing was computed, nothing was written.\n";
}

}  // namespace

void sort_by_line(std::vector<Message>& messages) {
  std::stable_sort(messages.begin(), messages.end(), [](const Message& a, const Message& b) {
    return a.line != b.line ? a.line < b.line : a.level < b.level;
  });
}

bool has_stop(const std::vector<Message>& messages) {
  return std::any_of(messages.begin(), messages.end(),
                     [](const Message& m) { return m.level == Level::stop; });
}

int exit_code(const std::vector<Message>& messages) {
  if (!has_stop(messages)) return 0;
  const bool bad_input = std::any_of(messages.begin(), messages.end(), [](const Message& m) {
    return m.level == Level::stop && !m.no_solution;
  });
  return bad_input ? 2 : 3;
}

std::string wrapped(const std::string& text, std::size_t indent, std::size_t width) {
  std::string result, line;
  const auto flush = [&] {
    if (!line.empty()) result += std::string(indent, ' ') + line + "\n";
    line.clear();
  };
  for (std::size_t at = 0; at < text.size();) {
    const std::size_t end = std::min(text.find_first_of(" \n", at), text.size());
    const std::string next = text.substr(at, end - at);
    if (!line.empty() && indent + line.size() + 1 + next.size() > width) flush();
    if (!next.empty()) line += (line.empty() ? "" : " ") + next;
    if (end < text.size() && text[end] == '\n') flush();
    at = end + 1;
  }
  flush();
  return result;
}

std::string to_text(const Message& message) {
  std::string head = std::string(word(message.level)) + " " + message.file;
  if (message.line > 0) head += ":" + std::to_string(message.line);
  if (!message.head.empty()) head += (message.line > 0 ? " " : ": ") + shortened(message.head);
  if (!message.rule.empty()) head += "   [" + message.rule + "]";
  std::string result = head + "\n" + wrapped(message.text);
  const bool pasteable = message.advice.find('"') != std::string::npos;
  if (pasteable)
    result += "     " + shortened(message.advice) + "\n";
  else if (!message.advice.empty())
    result += wrapped(message.advice);
  if (!message.likely.empty()) result += "     Likely meant: " + shortened(message.likely) + "\n";
  return result;
}

std::string to_text(const std::vector<Message>& messages, bool all) {
  if (messages.empty()) return "";
  std::string result;
  const std::size_t shown = all ? messages.size() : std::min(messages.size(), shown_at_most);
  for (std::size_t i = 0; i < shown; ++i) result += to_text(messages[i]);
  if (shown < messages.size())
    result += "and " + std::to_string(messages.size() - shown) + " more (--verbose)\n";
  return result + closing_line(messages);
}

}  // namespace focalframe::cli
