#pragma once

#include <string>

namespace focalframe::cli {

/// Text for XML and HTML: & < > " replaced, control characters other than line breaks and tabs made blanks.
std::string escaped(const std::string& text);

}  // namespace focalframe::cli
