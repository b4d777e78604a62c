#include "cli/report/trough_report.h"

#include "cli/report/csv.h"
#include "cli/report/figures.h"
#include "cli/report/trough_page.h"
#include "cli/report_json.h"
#include "cli/report_text.h"

namespace focalframe::cli {

std::map<std::string, std::string> trough_report_files(const ReportInput& input) {
  const models::Assessment& a = input.assessment;
  const std::vector<Figure> figures = figures_of(a);
  std::string verdict = verdict_line(a);
  verdict.erase(verdict.find_last_not_of('\n') + 1);

  std::map<std::string, std::string> files;
  files["report.html"] =
      to_html(trough_page({a, figures, input.messages, verdict, input.hash, input.design_text, "", ""}));
  files["result.json"] = trough_json(a, input.hash);
  files["design.xml"] = input.design_text;
  for (const auto& [name, text] : csv_tables(a)) files["tables/" + name] = text;
  for (const Figure& figure : figures) files["figures/" + figure.key + ".svg"] = figure.drawing.file();
  return files;
}

}  // namespace focalframe::cli
