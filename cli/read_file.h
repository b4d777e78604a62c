#pragma once

/// Bytes of a file, or the reason why there are none.

#include <string>

#include "cli/messages.h"

namespace focalframe::cli {

struct FileText {
  std::string text;  ///< line ends as \n only, no byte order mark
  bool ok = false;
  Message message;  ///< set when not ok
};

/// `what` names the kind of file in messages: "design", "table".
FileText read_file(const std::string& path, const std::string& what);

/// Line ends \r\n and \r become \n, a UTF-8 byte order mark is dropped.
std::string with_plain_line_ends(const std::string& bytes);

}  // namespace focalframe::cli
