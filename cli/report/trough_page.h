#pragma once

/// The report of a trough's check as one page.

#include <string>

#include "cli/messages.h"
#include "cli/report/page.h"
#include "models/assessment.h"

namespace focalframe::cli {

struct TroughReport {
  const models::Assessment& assessment;
  const std::vector<Figure>& figures;
  const std::vector<Message>& messages;  ///< raised about this design
  std::string verdict;                   ///< the verdict line in words
  std::string hash;                      ///< of the input
  std::string design_text;               ///< echoed at the end
  std::string view;                      ///< HTML of the 3D view; empty = none
  std::string script;
};
Page trough_page(const TroughReport& report);

}  // namespace focalframe::cli
