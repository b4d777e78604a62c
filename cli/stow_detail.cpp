#include <algorithm>
#include <cmath>
#include <numbers>

#include "cli/messages.h"
#include "cli/report_units.h"
#include "cli/stow_text.h"
#include "cli/stow_words.h"
#include "fem/units.h"
#include "models/quantity.h"

namespace focalframe::cli {
namespace {

using models::StateKind;
using models::StowReport;

std::string gust_text(double gust) { return std::isinf(gust) ? "-" : text_of("%.1f", gust); }

// Every pose and side: the least gust of each kind of state, with its letter.
std::string map_table(const StowReport& r) {
  std::string out =
      "\nGreatest gust at the axis, m/s, pose by pose (letter: what gives first)\n"
      "  deg   wind from +Y                       wind from -Y\n"
      "        OPERATE TURNING STOW    STUCK      OPERATE TURNING STOW    STUCK\n";
  for (const double e : r.limits.elevations) {
    out += text_of("  %4.0f  ", e / deg);
    for (const double from : {0.0, std::numbers::pi}) {
      for (const StateKind kind :
           {StateKind::operate, StateKind::turning, StateKind::stow, StateKind::stuck}) {
        const models::PoseLimit* p = models::find_pose(r.limits.map, kind, e, from);
        const models::CriterionLimit* c = p ? p->governing() : nullptr;
        const std::string cell = !p            ? ""
                                 : !p->covered ? "no data"
                                 : !c || std::isinf(c->gust)
                                     ? "-"
                                     : text_of("%.1f%c", c->gust, limit_letter(c->key));
        out += text_of("%-8s", cell.c_str());
      }
      out += "   ";
    }
    out.erase(out.find_last_not_of(' ') + 1);
    out += "\n";
  }
  return out +
         "  Wind at 15 deg steps of direction: at an angle y to the plane across the row these gusts are "
         "divided\n"
         "  by cos y up to 60 deg and doubled beyond (15 deg: / 0.966, 30: / 0.866, 45: / 0.707, 60 to 90: x "
         "2).\n"
         "  Wind along the row itself loads what this does not cover.\n";
}

std::string letters(const StowReport& r) {
  std::string out = "  letters:";
  bool seen[32] = {};
  for (const models::PoseLimit& p : r.limits.map)
    for (const models::CriterionLimit& c : p.criteria) {
      const auto i = static_cast<std::size_t>(c.key);
      if (!seen[i]) out += text_of(" %c %s,", limit_letter(c.key), letter_meaning(c.key).c_str());
      seen[i] = true;
    }
  out.back() = '\n';
  return out;
}

// The least of every criterion over the poses of each kind of state, in its own averaging.
std::string criteria_table(const StowReport& r, const models::TroughDesign& d) {
  std::string out =
      "\nEvery criterion on its own, at the axis\n"
      "  state    criterion                       own averaging  as a 3 s gust  where\n";
  for (const StateKind kind : {StateKind::operate, StateKind::turning, StateKind::stow, StateKind::stuck})
    for (int key = 0; key <= static_cast<int>(models::LimitKey::wind_up); ++key) {
      const models::CriterionLimit* least = nullptr;
      models::State at;
      for (const models::PoseLimit& p : r.limits.map)
        for (const models::CriterionLimit& c : p.criteria)
          if (p.kind == kind && static_cast<int>(c.key) == key && (!least || c.gust < least->gust)) {
            least = &c;
            at = {kind, p.elevation, p.wind_from};
          }
      if (!least) continue;
      out += text_of("  %-8s %-30.30s %8s %-6s %9s m/s  %s\n", models::state_text(kind).c_str(),
                     limit_phrase(*least, d).c_str(), gust_text(least->speed).c_str(),
                     least->averaging > 100 ? "10 min" : "3 s", gust_text(least->gust).c_str(),
                     std::isinf(least->gust) ? "not up to 100 m/s" : pose_words(at).c_str());
    }
  return out + "  STOW and STUCK here over every pose of the map.\n";
}

std::string ways(const StowReport& r) {
  std::string out = "\nWays to stow\n";
  for (const models::Way& w : r.limits.ways) {
    out += text_of(
        "  %4.0f to %4.0f deg  %8s  holds to %s m/s, weakest at %s\n", w.from / deg, w.to / deg,
        std::isfinite(w.time) ? models::quantity_text(w.time, models::Quantity::time).c_str() : "no rate",
        gust_text(w.limit.gust).c_str(), pose_words(w.limit.at).c_str());
  }
  if (r.limits.ways.size() <= 2) out += "  round the other way: beyond the drive's range\n";
  const models::StowPose &chosen = r.limits.chosen, &best = r.limits.best;
  out += text_of("  parked at %.0f deg it holds to %s m/s", chosen.elevation / deg,
                 gust_text(chosen.parked.gust).c_str());
  if (best.elevation != chosen.elevation)
    out += text_of("; best found: %.0f deg, %s m/s, way there %s m/s\n", best.elevation / deg,
                   gust_text(best.parked.gust).c_str(), gust_text(best.way.limit.gust).c_str());
  else
    out += ", and no pose found bears more\n";
  return out;
}

std::string price_table(const StowReport& r) {
  const models::Price& p = r.price;
  if (!p.known) return "\nPrice of caution: not computed, no <year> in <wind>\n";
  std::string out = text_of("\nPrice of caution: %s, %.0f %s hours%s%s\n", p.source.c_str(), p.hours,
                            p.daylight ? "daylight" : "year's", p.weighted ? ", weighted with the beam" : "",
                            p.directions ? ", each hour from its own side" : "");
  const bool waits = std::isfinite(p.rows.front().hours_stowed);
  out +=
      text_of("  trigger  above it   %s stowed    lost below  together\n", waits ? "with wait" : "         ");
  double most = 1e-12;
  for (const models::PriceRow& row : p.rows) most = std::max(most, row.share());
  for (std::size_t i = 0; i < p.rows.size(); ++i) {
    const models::PriceRow& row = p.rows[i];
    const std::string wait = waits ? text_of("%7.0f h", row.hours_stowed) : "";
    out += text_of("%s %5.1f  %8.1f h  %9s  %6.2f %%   %6.2f %%   %6.2f %%  %s",
                   static_cast<int>(i) == p.at ? " >" : "  ", row.trigger, row.hours_above, wait.c_str(),
                   100 * row.share_stowed, 100 * row.share_lost, 100 * row.share(),
                   std::string(static_cast<std::size_t>(std::lround(16 * row.share() / most)), '#').c_str());
    out.erase(out.find_last_not_of(' ') + 1);
    out += "\n";
  }
  if (p.at > 0 && p.at + 1 < static_cast<int>(p.rows.size())) {
    const auto at = [&](int i) { return p.rows[static_cast<std::size_t>(i)].share(); };
    out +=
        text_of("  one m/s of caution costs %.2f %% of the year's light, one m/s of daring gains %.2f %%\n",
                100 * (at(p.at - 1) - at(p.at)), 100 * (at(p.at) - at(p.at + 1)));
  }
  out += wrapped(
      p.how + ". Shares are of the light without wind; every tracking pose counts the same (judgement)." +
          (waits ? "" : " The wait for the resume speed is not in: a distribution has no order."),
      2);
  if (p.gaps > 0) out += text_of("  %d hours without a speed left out\n", p.gaps);
  return out;
}

std::string shift_table(const StowReport& r) {
  if (r.shifts.empty()) return {};
  std::string out = "\nWhat moves the trigger, each one run again\n";
  for (std::size_t i = 0; i + 1 < r.shifts.size(); i += 2) {
    const models::TriggerShift &up = r.shifts[i], &down = r.shifts[i + 1];
    out += text_of("  %-26s +10 %% %+5.2f m/s   -10 %% %+5.2f m/s", up.what.c_str(), up.shift, down.shift);
    for (const models::TriggerShift* s : {&up, &down})
      if (s->governing_changed)
        out += text_of("; at %+.0f %%: %s", 100 * s->change, limit_short(s->governing).c_str());
    out += "\n";
  }
  return out;
}

}  // namespace

std::string stow_detail(const StowReport& r, const models::TroughDesign& d) {
  std::string out = map_table(r) + letters(r) + criteria_table(r, d) + ways(r);
  out += text_of(
      "\nAt the axis: %s = %.3f;\n  air %.3f kg/m3; size and dynamic factor %.3f on drive and its pylon\n",
      r.limits.axis.how.c_str(), r.limits.axis.gust_over_mean, r.limits.axis.density,
      r.limits.axis.size_factor);
  out += wrapped("Light, twist, slope and receiver: 10 min mean, unfactored. Members: 3 s gust, " + r.rule +
                     ". Drive, joints and feet: 3 s gust. Row winding itself up: 10 min mean.",
                 0);
  out += price_table(r) + shift_table(r);
  out += "\nStow also\n";
  for (const std::string& reminder : r.trigger.reminders) out += wrapped("- " + reminder, 2);
  if (!r.remarks.empty()) {
    out += "\nKept fixed, and to look at\n";
    for (const std::string& remark : r.remarks) out += wrapped("- " + remark, 2);
  }
  out += "\nNot covered\n";
  for (const std::string& item : r.not_covered) out += wrapped("- " + item, 2);
  return out;
}

}  // namespace focalframe::cli
