#pragma once

/// Tables of a trough's check as CSV: a header of names with units (SI), then one record per line; RFC 4180.

#include <map>
#include <string>

#include "models/assessment.h"

namespace focalframe::cli {

/// File name -> text: limits.csv, light.csv, stress.csv, drive.csv, ground.csv, changes.csv.
std::map<std::string, std::string> csv_tables(const models::Assessment& a);

}  // namespace focalframe::cli
