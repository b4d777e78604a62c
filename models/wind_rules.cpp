#include "models/wind_rules.h"

#include <cmath>

#include "loads/guards.h"
#include "models/states.h"
#include "models/trough_layout.h"

namespace focalframe::models {
namespace {

Violation violation_of(const loads::Verdict& verdict, const char* element, const char* attribute) {
  Violation v;
  v.level = verdict.severity == loads::Severity::refused  ? Violation::Level::stop
            : verdict.severity == loads::Severity::warned ? Violation::Level::warn
                                                          : Violation::Level::note;
  v.element = element;
  v.attribute = attribute;
  v.text = verdict.text;
  v.advice = verdict.fix;
  v.rule = verdict.rule;
  return v;
}

// A rule the design accepts with a reason is no longer in the way, but stays in sight.
void accept(const TroughDesign& design, Violation& v) {
  for (const AcceptInput& exception : design.accepted)
    if (!v.rule.empty() && exception.rule == v.rule) {
      v.level = Violation::Level::note;
      v.text += " Accepted because: " + exception.because + ".";
      v.advice.clear();
    }
}

}  // namespace

std::vector<Violation> wind_rules(const TroughDesign& design, const loads::CoefficientTable& table) {
  std::vector<Violation> found;
  if (table.collector_kind == "dish") {
    Violation v;
    v.element = "wind";
    v.attribute = "table";
    v.text = "Table \"" + table.name +
             "\" is for dishes: its coefficients are on the area of a disc and its moment on a diameter. A "
             "trough needs a "
             "table of its own kind.";
    v.advice = "Name a trough table, for example table=\"trough-computed\"";
    return {v};
  }
  const std::pair<const char*, const WindStateInput*> winds[] = {{"wind/operate", &design.wind.operate},
                                                                 {"wind/turning", &design.wind.turning},
                                                                 {"wind/stow", &design.wind.stow},
                                                                 {"wind/stuck", &design.wind.stuck}};
  for (const auto& [element, wind] : winds) {
    if (!wind->given) continue;
    const auto pressure = wind->averaging <= 3.5 ? loads::PressureKind::gust : loads::PressureKind::mean;
    // Only the peak table is at stake here: a mean table gets its gusts from the wind chain.
    if (table.kind != loads::CoefficientKind::peak) continue;
    if (const auto v = loads::guard_gusts(table.kind, pressure, loads::Use::strength, 0.2))
      found.push_back(violation_of(*v, element, "averaging"));
  }
  const double width = design.parabola.aperture;
  loads::TableUse use;
  use.focal_ratio = focal_length_of(design.parabola) / width;
  use.height_ratio = design.row.axis_height / width;
  use.yaw = 0;
  if (const auto v = loads::guard_validity(table, use)) found.push_back(violation_of(*v, "wind", "table"));
  for (Violation& v : found) accept(design, v);
  for (const Violation& gap : table_gaps(design, table)) found.push_back(gap);
  return found;
}

}  // namespace focalframe::models
