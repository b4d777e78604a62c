#pragma once

/// Numbers as they stand in the printed chain: enough digits to redo the step on a pocket calculator.

#include <cstdio>
#include <string>

namespace focalframe::loads {

inline std::string number_text(double value, int digits = 5) {
  char buffer[40];
  std::snprintf(buffer, sizeof buffer, "%.*g", digits, value);
  return buffer;
}

}  // namespace focalframe::loads
