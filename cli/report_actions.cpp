#include "cli/report_actions.h"

#include <algorithm>
#include <cmath>

#include "cli/messages.h"
#include "cli/report_units.h"
#include "fem/units.h"

namespace focalframe::cli {
namespace {

using models::Assessment;
using models::WindChainRow;

// "45 face", "90 from +Y", "-90 back 45 off", "-90 along".
std::string place_of(const WindChainRow& row) {
  const std::string place = models::place_text(row.state);
  const std::string words = place.substr(place.find(", ") + 2);
  const std::size_t oblique = words.find(',');
  std::string wind = words.substr(0, oblique);
  if (wind == "along the row") wind = "along";
  if (oblique != std::string::npos) wind += " oblique";
  return text_of("%4.0f %s", row.state.elevation / deg + 0.0, wind.c_str());
}

constexpr const char* heading =
    "   deg wind            pitch   q Pa     Ca     Cs      Cm  axial N  side N  axis N m drag N   left\n";

std::string line_of(const WindChainRow& row) {
  const auto& c = row.table;
  return text_of("  %-20.20s %5.0f %6.1f %6.2f %6.2f %7.3f %8.0f %7.0f %9.0f %6.0f %6.2f\n",
                 place_of(row).c_str(), row.pitch / deg, row.pressure, c.Ca, c.Cs, c.Cm, row.axial + 0.0,
                 row.side + 0.0, row.moment_axis + 0.0, row.receiver + row.frame,
                 row.straight.residual_side + 0.0);
}

// The row of the working wind that presses hardest: the one most readers will want to follow.
const WindChainRow* example(const Assessment& a) {
  const WindChainRow* best = nullptr;
  for (const WindChainRow& row : a.wind_loads)
    if (!row.gust && (!best || std::abs(row.moment_axis) > std::abs(best->moment_axis))) best = &row;
  if (!best && !a.wind_loads.empty()) best = &a.wind_loads.front();
  return best;
}

}  // namespace

std::string wind_loads_text(const Assessment& a) {
  if (a.wind_loads.empty()) return {};
  std::string out = "\nFrom velocity pressure to newtons, whole row\n";
  out += wrapped(
      text_of(
          "area A = %.3f m2, width W = %.3f m; zone factors %.2f on Ca, %.2f on Cs, %.2f on Cm. Force along "
          "the axis of sight = q A Ca (+ pushes hollow to back), in the aperture plane q A Cs (+ downwind "
          "when the mirror looks up), moment about the rotation axis = q A W Cm + q A Cs x %.3f m (vertex to "
          "axis; + towards larger pitch), each times its zone factor and cos^2 of the yaw (0.25 beyond 60 "
          "deg). drag: receiver, tube and ribs together. left: side force no pressure on a thin shell gives, "
          "over q A; it acts along the vertex line. STOW and the like: strength takes the worst of pitch "
          "and pitch +- gust angle, in each pattern.",
          a.wind_loads[0].area, a.wind_loads[0].width, a.wind_loads[0].zone.Ca, a.wind_loads[0].zone.Cs,
          a.wind_loads[0].zone.Cm, a.axis_to_vertex),
      2);
  for (models::StateKind kind : models::all_state_kinds)
    for (bool gust : {false, true}) {
      std::string rows;
      for (const WindChainRow& row : a.wind_loads)
        if (row.state.kind == kind && row.gust == gust) rows += line_of(row);
      if (rows.empty()) continue;
      out +=
          "  " + models::state_text(kind) +
          (gust ? ": 3 s gust, upper coefficients\n" : ": " + a.optics_averaging + ", best coefficients\n");
      out += heading;
      out += rows;
    }
  const bool odd = std::any_of(a.wind_loads.begin(), a.wind_loads.end(),
                               [](const WindChainRow& row) { return !row.thin_shell; });
  if (odd)
    out += wrapped(
        "Where \"left\" exceeds 0.15 the table is not that of a bare thin shell: part of its side force "
        "cannot come "
        "from pressure on the mirror.",
        2);
  double error = 0;
  for (const WindChainRow& row : a.wind_loads) error = std::max(error, row.total_error);
  out += text_of("  totals check: nodal forces and moments of all %zu rows equal q A C to %.0e\n",
                 a.wind_loads.size(), error);
  return out;
}

std::string worked_wind_text(const Assessment& a) {
  const WindChainRow* row = example(a);
  if (!row) return {};
  const WindChainRow& r = *row;
  std::string out =
      "  worked: " + models::place_text(r.state) + (r.gust ? ", gust\n" : ", " + a.optics_averaging + "\n");
  const auto line = [&](const char* what, double c, double zone, double value, const char* unit) {
    out += text_of("    %-14s %.4g Pa x %.4g m2 x %.4g x %.3g (zone) x %.3g (yaw) = %.4g %s\n", what,
                   r.pressure, r.area, c, zone, r.yaw_factor, value, unit);
  };
  line("axial", r.table.Ca, r.zone.Ca, r.axial, "N");
  line("side", r.table.Cs, r.zone.Cs, r.side, "N");
  out += text_of("    %-14s %.4g Pa x %.4g m2 x %.4g m x %.4g x %.3g (zone) x %.3g (yaw) = %.4g N m\n",
                 "vertex moment", r.pressure, r.area, r.width, r.table.Cm, r.zone.Cm, r.yaw_factor,
                 r.moment_vertex);
  out += text_of("    %-14s %.4g N m + %.4g N x %.4g m = %.4g N m\n", "axis moment", r.moment_vertex, r.side,
                 a.axis_to_vertex, r.moment_axis);
  const char* pattern =
      r.spread == models::Spread::profile ? "added to the table's profile" : "straight pattern";
  out += text_of("    %-14s b = %.3f (%s), rims %.2f upwind and %.2f downwind, left %.3f\n", "pressures",
                 r.straight.slope, pattern, r.straight.edge_upwind, r.straight.edge_downwind,
                 r.straight.residual_side);
  out += text_of("    %-14s receiver %.4g N, tube and ribs %.4g N, pylons %.4g N\n", "drag besides",
                 r.receiver, r.frame, r.pylons);
  return out;
}

std::string other_actions_text(const Assessment& a) {
  std::string out;
  if (!a.actions.empty()) {
    out += "\nOther actions by pose\n  deg   snow N/m  centre m  water N/m\n";
    for (const models::ActionRow& row : a.actions) {
      const auto number = [](double value, const char* format) {
        return std::isnan(value) ? std::string("-") : text_of(format, value + 0.0);
      };
      out += text_of("  %4.0f %9s %9s %10s\n", row.elevation / deg,
                     number(row.amounts.snow_per_length, "%.1f").c_str(),
                     number(row.amounts.snow_lever, "%.3f").c_str(),
                     number(row.amounts.water_per_length, "%.1f").c_str());
    }
    const models::ActionAmounts& first = a.actions.front().amounts;
    if (std::isfinite(first.ice_mass)) out += text_of("  ice on what turns: %.0f kg\n", first.ice_mass);
    if (std::isfinite(first.earthquake))
      out += text_of("  earthquake: %.3f m/s2 level, each way\n", first.earthquake);
  }
  if (std::isfinite(a.receiver_expansion))
    out += wrapped(
        text_of("Receiver: its far end moves %.1f mm along the row when hot; a post there swings and its "
                "head drops by d^2 / 2h = %.2f mm (not in the receiver shift above).",
                a.receiver_expansion / mm, a.receiver_drop / mm),
        2);
  if (!a.dynamics.chain.empty()) {
    out += "\nDynamic factor\n";
    for (const loads::ChainStep& step : a.dynamics.chain)
      out += text_of("    %-34.34s %10.4g %s\n", step.what.c_str(), step.value, step.unit.c_str()) +
             wrapped(step.how, 8);
  }
  return out;
}

}  // namespace focalframe::cli
