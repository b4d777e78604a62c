#include "cli/input_hash.h"

#include <cstdint>
#include <cstdio>

namespace focalframe::cli {

std::string input_hash(const std::string& design, const std::string& table) {
  std::uint64_t hash = 14695981039346656037ull;
  for (const std::string* text : {&design, &table}) {
    for (const char c : *text) {
      hash ^= static_cast<unsigned char>(c);
      hash *= 1099511628211ull;
    }
    hash ^= 0x1full;  // a mark between the two
    hash *= 1099511628211ull;
  }
  char out[17];
  std::snprintf(out, sizeof out, "%016llx", static_cast<unsigned long long>(hash));
  return out;
}

}  // namespace focalframe::cli
