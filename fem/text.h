#pragma once

/// Words for messages.

#include <string>

namespace focalframe::fem {

struct Frame;

/// Six significant digits, no trailing zeros.
std::string number(double value);
/// The node's or member's own name in quotes, or its index when it has none.
std::string node_words(const Frame& frame, int node);
std::string member_words(const Frame& frame, int member);
/// "ux" ... "rz".
const char* dof_name(int dof);
/// "moves along x" ... "turns about z".
const char* dof_words(int dof);
/// Throws std::invalid_argument with `message` unless `condition` holds.
void require(bool condition, const std::string& message);

}  // namespace focalframe::fem
