#include "cli/table_reader.h"

#include <algorithm>
#include <charconv>
#include <cmath>
#include <sstream>

#include "cli/nearest.h"
#include "cli/quantity.h"

namespace focalframe::cli {

Message& TableReader::say(Level level, int line, const std::string& head, const std::string& text,
                          const std::string& likely) {
  Message message;
  message.level = level;
  message.file = file_;
  message.line = line;
  message.head = head;
  message.text = text;
  message.likely = likely;
  messages_.push_back(std::move(message));
  if (level == Level::stop) stopped_ = true;
  return messages_.back();
}

const SourceText* TableReader::find(const std::string& key) const {
  const auto it = source_.keys.find(key);
  return it == source_.keys.end() || it->second.text.empty() ? nullptr : &it->second;
}

std::string TableReader::text(const std::string& key) const {
  const SourceText* found = find(key);
  return found ? found->text : "";
}

std::string TableReader::word(const std::string& key, const std::vector<std::string>& allowed, Need need,
                              const std::string& why) {
  const SourceText* found = find(key);
  if (!found) {
    if (need == Need::optional) return allowed.front();
    say(Level::stop, 0, key + " is missing", why).advice = "Write one of: " + joined_or(allowed);
    return "";
  }
  if (std::find(allowed.begin(), allowed.end(), found->text) != allowed.end()) return found->text;
  say(Level::stop, found->line, key + "=\"" + found->text + "\"", "Known: " + joined_or(allowed) + ". " + why,
      nearest_name(found->text, allowed));
  return "";
}

std::optional<double> TableReader::number(const std::string& written, int line, const std::string& head) {
  double value = 0;
  const bool plus = written.size() > 1 && written[0] == '+' && written[1] != '-';
  const char* begin = written.data() + (plus ? 1 : 0);
  const char* end = written.data() + written.size();
  const auto [stop, error] = std::from_chars(begin, end, value);
  if (error == std::errc() && stop == end && std::isfinite(value)) return value;
  std::string likely;
  if (std::count(written.begin(), written.end(), ',') == 1) {
    likely = written;
    std::replace(likely.begin(), likely.end(), ',', '.');
  }
  say(Level::stop, line, head + " \"" + written + "\"",
      written.empty() ? "A blank is not a zero: write the number."
                      : "A plain number with a decimal point is wanted.",
      likely);
  return std::nullopt;
}

std::vector<double> TableReader::numbers(const std::string& list, int line, const std::string& head) {
  std::vector<double> values;
  std::istringstream stream(list);
  for (std::string item; stream >> item;)
    if (const auto value = number(item, line, head)) values.push_back(*value);
  return values;
}

double TableReader::ratio(const std::string& key, double otherwise) {
  const SourceText* found = find(key);
  return found ? number(found->text, found->line, key).value_or(otherwise) : otherwise;
}

TableReader::Range TableReader::range(const std::string& key) {
  const SourceText* found = find(key);
  if (!found) return {};
  const std::string between = " to ";
  const auto at = found->text.find(between);
  if (at == std::string::npos) {
    say(Level::stop, found->line, key + "=\"" + found->text + "\"",
        "Two numbers with \"to\" between them are wanted, as in 0.25 to 0.35.");
    return {};
  }
  const auto from = number(found->text.substr(0, at), found->line, key);
  const auto to = number(found->text.substr(at + between.size()), found->line, key);
  if (!from || !to) return {};
  if (*from < *to) return {*from, *to};
  say(Level::stop, found->line, key + "=\"" + found->text + "\"", "The smaller number comes first.");
  return {};
}

std::optional<double> TableReader::angle(const SourceText& written, const std::string& head) {
  const ParsedQuantity parsed = parse_quantity(written.text, Quantity::angle);
  if (parsed.ok() && std::isfinite(parsed.value)) return parsed.value;
  say(Level::stop, written.line, head + " \"" + written.text + "\"",
      parsed.problem.empty() ? "An angle is wanted." : parsed.problem,
      parsed.suggestions.empty() ? "" : parsed.suggestions.front());
  return std::nullopt;
}

}  // namespace focalframe::cli
