#pragma once

/// Everything `check --out` writes about a trough.

#include <map>
#include <string>
#include <vector>

#include "cli/messages.h"
#include "models/assess.h"
#include "models/portrait.h"

namespace focalframe::cli {

struct ReportInput {
  const models::TroughDesign& design;
  const loads::CoefficientTable& table;
  const models::RowModel& row;
  const models::Assessment& assessment;
  std::vector<Message> messages;
  std::string hash, design_text;
};

/// File name -> text: report.html, result.json, design.xml, tables/*.csv, figures/*.svg, vtu/*.vtu.
std::map<std::string, std::string> trough_report_files(const ReportInput& input);

}  // namespace focalframe::cli
