#include "cli/report/trough_report.h"

#include "cli/report/csv.h"
#include "cli/report/figures.h"
#include "cli/report/frame_figure.h"
#include "cli/report/trough_page.h"
#include "cli/report/view.h"
#include "cli/report/vtu.h"
#include "cli/report_json.h"
#include "cli/report_text.h"
#include "models/portrait_states.h"

namespace focalframe::cli {

std::map<std::string, std::string> trough_report_files(const ReportInput& input) {
  const models::Assessment& a = input.assessment;
  std::map<std::string, std::string> files;
  const auto requests = models::looked_at(input.design, input.table, input.row);
  const models::Portrait portrait = models::portrait(input.row, requests);
  std::vector<Figure> figures = figures_of(a);
  std::string view, script;
  if (!portrait.states.empty()) {
    std::size_t first = 0;
    if (a.worst_light >= 0) {
      const models::OpticalRow& worst = a.optics[static_cast<std::size_t>(a.worst_light)];
      first = models::index_of(requests, worst.state, worst.calm);
    }
    figures.push_back(frame_figure(portrait, first, drawn_scale(portrait, first)));
    // The state the drawings show, the same pose in calm air, and the stow poses.
    for (std::size_t i = 0; i < portrait.states.size(); ++i) {
      const models::PortraitState& state = portrait.states[i];
      const bool calm_there = state.calm && state.state.elevation == portrait.states[first].state.elevation;
      if (i != first && !calm_there && state.state.kind != models::StateKind::stow) continue;
      files["vtu/frame " + state.words + ".vtu"] = frame_vtu(portrait, i);
      files["vtu/mirror " + state.words + ".vtu"] = mirror_vtu(portrait, i);
    }
    view = view_html(portrait, first);
    script = view_script();
  }
  std::string verdict = verdict_line(a);
  verdict.erase(verdict.find_last_not_of('\n') + 1);

  files["report.html"] = to_html(
      trough_page({a, figures, input.messages, verdict, input.hash, input.design_text, view, script}));
  files["result.json"] = trough_json(a, input.hash);
  files["design.xml"] = input.design_text;
  for (const auto& [name, text] : csv_tables(a)) files["tables/" + name] = text;
  for (const Figure& figure : figures) files["figures/" + figure.key + ".svg"] = figure.drawing.file();
  return files;
}

}  // namespace focalframe::cli
