#include "models/posed_row.h"

#include <numbers>

#include "fem/units.h"
#include "loads/pose.h"
#include "models/states.h"
#include "models/trough.h"
#include "models/wind_load.h"

namespace focalframe::models {

std::optional<fem::LoadCase> wind_case(const RowModel& row, const FullFrame& full,
                                       const loads::CoefficientTable& table, const TroughDesign& design,
                                       double elevation, double from, bool upper, double pressure) {
  const auto c = loads::coefficients_at(table, loads::pitch_seen_by_wind(elevation, from), upper);
  if (!c) return std::nullopt;
  const loads::ZoneFactors zone = loads::zone_factors(design.wind.zone).value_or(loads::ZoneFactors{});
  WindOnRow wind;
  wind.wind_from = from;
  wind.coefficients = {c->Ca * zone.Ca, c->Cs * zone.Cs, c->Cm * zone.Cm};
  wind.pressure = pressure;
  const Eigen::VectorXd amplitudes = pressure * wind_amplitudes(row, elevation, wind);
  fem::LoadCase load;
  load.nodes = in_world(full, row.nodal_loads(amplitudes), elevation);
  const fem::Vec3 on_posts(0, amplitudes(row.columns().stand_wind()), 0);
  for (int m = 0; m < full.first_body_member; ++m)
    load.lines.push_back({.member = m, .at_from = on_posts, .at_to = on_posts});
  return load;
}

PosedRow posed_row(const TroughDesign& design, const loads::CoefficientTable& table, double elevation) {
  const RowModel row(build_trough(design), {});
  PosedRow out{full_frame(row.collector(), elevation), {}};
  fem::LoadCase& weight = out.cases.emplace_back();
  weight.name = "weight";
  weight.gravity = {0, 0, -standard_gravity};
  const StateWinds winds = winds_at_axis(design);
  struct Stated {
    StateKind kind;
    bool given;
  };
  for (const Stated stated :
       {Stated{StateKind::operate, design.wind.operate.given},
        Stated{StateKind::stow, design.wind.stow.given}, Stated{StateKind::stuck, design.wind.stuck.given}}) {
    if (!stated.given) continue;
    const bool mean = stated.kind == StateKind::operate;
    const loads::WindAtHeight& at = winds.of(stated.kind);
    for (const double from : {0.0, std::numbers::pi}) {
      auto load = wind_case(row, out.full, table, design, elevation, from, !mean,
                            mean ? at.mean_pressure : at.gust_pressure);
      if (!load) continue;
      load->name =
          state_text(stated.kind) + (mean ? " mean wind" : " gust") + " from " + (from == 0 ? "+Y" : "-Y");
      out.cases.push_back(*load);
    }
  }
  return out;
}

}  // namespace focalframe::models
