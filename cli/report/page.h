#pragma once

/// One self-contained HTML page: no network, light and dark, A4 in print. Knows nothing of troughs.

#include <set>
#include <string>
#include <vector>

#include "cli/report/figures.h"

namespace focalframe::cli {

struct Section {
  std::string id, title, body;  ///< body: HTML
};

struct Page {
  std::string title, subtitle;  ///< the design's name; one line about it
  std::string verdict;          ///< in words
  bool holds = false;
  std::string foot;  ///< version, hash
  std::vector<Section> sections;
  std::string script;  ///< of the 3D view; empty = none
};
std::string to_html(const Page& page);

/// Cells are text and are escaped; a column named with a leading '>' is set flush right. `flagged`: rows that
/// stand out, by index.
std::string html_table(const std::vector<std::string>& columns,
                       const std::vector<std::vector<std::string>>& rows,
                       const std::set<std::size_t>& flagged = {});
std::string html_paragraph(const std::string& text);
std::string html_list(const std::vector<std::string>& items);
std::string html_figure(const Figure& figure);
/// Shut until asked for; printed open.
std::string html_folded(const std::string& summary, const std::string& body);

}  // namespace focalframe::cli
