#pragma once

/// From what was read and the rules across fields to messages with fixes that would pass.

#include <string>
#include <vector>

#include "cli/messages.h"
#include "cli/trough_reader.h"

namespace focalframe::cli {

/// Not sorted. Rules that look at a value already complained about are left out.
std::vector<Message> trough_messages(TroughText& text, const std::string& file);

/// Message of one broken rule in terms of the file: place, value as written, and a fix if one would pass.
/// For rules found later than reading (by the program that computes), too.
Message rule_message(const models::Violation& violation, const TroughText& text, const std::string& file);

}  // namespace focalframe::cli
