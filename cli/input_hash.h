#pragma once

#include <string>

namespace focalframe::cli {

/// 64-bit FNV-1a of all texts, as 16 hex digits: tells two inputs apart, protects against nothing.
std::string input_hash(const std::string& design, const std::string& table);

}  // namespace focalframe::cli
