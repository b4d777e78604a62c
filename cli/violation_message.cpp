#include "cli/violation_message.h"

namespace focalframe::cli {

Message message_of(const models::Violation& v, const Lines& lines, const std::string& file) {
  Message m;
  m.level = v.level == models::Violation::Level::stop   ? Level::stop
            : v.level == models::Violation::Level::warn ? Level::warn
                                                        : Level::note;
  m.file = file;
  for (const std::string& key : {v.element + "/" + v.attribute, v.element})
    if (const auto at = lines.find(key); m.line == 0 && at != lines.end()) m.line = at->second;
  m.head = !v.head.empty() ? v.head : v.element + (v.attribute.empty() ? "" : " " + v.attribute);
  m.rule = v.rule;
  m.text = v.text;
  m.likely = v.likely;
  m.advice = v.advice;
  return m;
}

}  // namespace focalframe::cli
