#pragma once

/// The folder of a report: put in place whole, so that two runs never mix.

#include <map>
#include <string>

namespace focalframe::cli {

/// Why a report must not go to this folder: it is a file, or a folder that holds something else. Empty = it
/// may.
std::string refuse_report_folder(const std::string& folder);

/// Writes all files (name within the folder -> text) into a folder beside it and swaps them; an earlier
/// report there is replaced. Empty when it stands; else one sentence saying why not, and nothing has changed.
std::string write_report_folder(const std::string& folder, const std::map<std::string, std::string>& files);

}  // namespace focalframe::cli
