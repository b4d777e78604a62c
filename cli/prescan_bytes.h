#pragma once

/// Bytes, encodings and character references: the lowest part of the pre-scan.

#include <string>
#include <string_view>

namespace focalframe::cli {

struct BadByte {
  int line = 0;
  std::string head, problem, advice;  ///< problem empty = all bytes are fit
};

/// The first byte that is not valid UTF-8, or a control character other than tab and line ends.
BadByte find_bad_byte(std::string_view text);

/// What is wrong with the encoding an XML declaration names for this text; empty = nothing.
std::string encoding_problem(std::string_view declaration, std::string_view text);

/// True when `text` begins with one of the five entities or a character reference above U+001F.
bool is_entity(std::string_view text);

}  // namespace focalframe::cli
