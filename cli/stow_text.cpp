#include "cli/stow_text.h"

#include <algorithm>
#include <cmath>
#include <set>

#include "cli/messages.h"
#include "cli/report_units.h"
#include "cli/stow_words.h"
#include "fem/units.h"
#include "loads/gust_in_mean.h"

namespace focalframe::cli {
namespace {

using models::LimitKey;
using models::StateKind;
using models::StateLimit;
using models::StowReport;
using models::Trigger;

std::string speed_words(const Trigger& t) {
  return text_of("%.1f m/s = %.0f km/h = %.0f mph = Beaufort %d", t.speed, t.speed * 3.6, t.speed / 0.44704,
                 t.beaufort);
}

std::string range_text(const StateLimit& s, const models::TroughDesign& d) {
  if (s.kind == StateKind::stow)
    return text_of("%.0f +- %.0f deg", d.operation.stow_at / deg,
                   std::isnan(d.operation.stow_within) ? 0.0 : d.operation.stow_within / deg);
  if (s.kind == StateKind::stuck) return "any pose";
  if (s.kind == StateKind::turning)
    return text_of("%.0f to %.0f deg", (s.to == d.operation.stow_at ? s.from : s.to) / deg,
                   d.operation.stow_at / deg);
  return text_of("%.0f to %.0f deg", s.from / deg, s.to / deg);
}

std::string state_line(const StateLimit& s, const models::TroughDesign& d) {
  const std::string asked = std::isnan(s.asked) ? "-" : text_of("%.1f", s.asked);
  const std::string head =
      text_of("  %-9s%-17s", models::state_text(s.kind).c_str(), range_text(s, d).c_str());
  if (!s.judged) return head + text_of("%8s  %8s  nothing to judge it by\n", "-", asked.c_str());
  const std::string place = pose_words(s.at);
  std::string why = s.gust >= models::greatest_gust ? "nothing up to 100 m/s"
                    : s.gust == 0                   ? limit_phrase(s.governing, d) + " in calm air, " + place
                                                    : limit_phrase(s.governing, d) + ", " + place;
  if (why.size() > 32 && why.size() > place.size() + 2)
    why = why.substr(0, 32 - place.size() - 2) + ", " + place;
  return head + text_of("%8.1f  %8s  %s\n", s.gust, asked.c_str(), why.c_str()) +
         (s.covered ? "" : "             (the table lacks some of these poses)\n");
}

std::string chain_lines(const Trigger& t) {
  std::string out =
      text_of("%-58s%6.1f m/s  %s\n",
              t.meter.hand_held ? "From the row to a meter in your hand" : "From the row to your anemometer",
              t.axis_gust, models::state_text(t.basis.kind).c_str());
  for (const models::TriggerStep& s : t.steps) {
    // The last line is the trigger itself, rounded down.
    const double after = &s == &t.steps.back() ? t.speed : s.after;
    const std::string by =
        s.sign == '-' ? text_of("- %.3g", s.by) : text_of("%c %.3f", s.sign == '*' ? 'x' : '/', s.by);
    out += text_of("  %-9s%-30.30s %-16.16s%6.1f\n", by.c_str(), s.what.c_str(), s.source.c_str(), after);
  }
  return out;
}

// The tracking poses in multiples of 15 deg, or 20 or 30 where those are too many for a line.
std::vector<double> shown_poses(const StowReport& r) {
  std::vector<double> out;
  for (const double step : {15.0, 20.0, 30.0}) {
    out.clear();
    for (const double e : r.limits.elevations)
      if (e >= r.limits.operate.from - 1e-9 && e <= r.limits.operate.to + 1e-9 &&
          std::abs(std::remainder(e / deg, step)) < 1e-6)
        out.push_back(e);
    if (out.size() <= 9) break;
  }
  if (out.size() > 9) out.resize(9);
  return out;
}

std::string trimmed(std::string line) {
  line.erase(line.find_last_not_of(' ') + 1);
  return line + "\n";
}

std::string map_lines(const StowReport& r) {
  const std::vector<double> poses = shown_poses(r);
  if (poses.empty()) return {};
  std::string head = "First to give, deg", rows;
  std::set<LimitKey> used;
  for (const double e : poses) head += text_of("%6.0f ", e / deg);
  for (const double from : {0.0, 3.14159265358979323846}) {
    std::string row = from == 0 ? "  wind from +Y    " : "  wind from -Y    ";
    for (const double e : poses) {
      const models::CriterionLimit* least = nullptr;
      for (const StateKind kind : {StateKind::operate, StateKind::turning})
        if (const models::PoseLimit* p = models::find_pose(r.limits.map, kind, e, from))
          if (const auto* c = p->governing(); c && (!least || c->gust < least->gust)) least = c;
      if (!least || std::isinf(least->gust))
        row += "     - ";
      else {
        row += text_of("%6.1f%c", least->gust, limit_letter(least->key));
        used.insert(least->key);
      }
    }
    rows += trimmed(row);
  }
  std::string legend;
  for (const LimitKey key : used) legend += text_of(" %c %s", limit_letter(key), letter_meaning(key).c_str());
  return trimmed(head) + rows + "  (0 deg faces +Y;" + legend + ")\n";
}

std::string price_line(const StowReport& r) {
  const models::Price& p = r.price;
  if (!p.known || p.at < 0) return {};
  std::string out = p.daylight ? "A year, daylight: " : "A year, all hours: ";
  const auto hours = [&](int row) {
    return row >= 0 && row < static_cast<int>(p.rows.size())
               ? p.rows[static_cast<std::size_t>(row)].hours_above
               : models::not_given;
  };
  const models::PriceRow& at = p.rows[static_cast<std::size_t>(p.at)];
  out += text_of("%.0f h above %.1f; %.0f h above %.1f; %.0f h above %.1f m/s\n", hours(p.at), at.trigger,
                 hours(p.at - 1), at.trigger - 1, hours(p.at + 1), at.trigger + 1);
  out += text_of("  costs %.2f %% of the light stowed, %.2f %% below it (%.24s)\n", 100 * at.share_stowed,
                 100 * at.share_lost, p.source.c_str());
  return out;
}

std::string moves_line(const StowReport& r) {
  std::vector<models::TriggerShift> up;
  for (const models::TriggerShift& s : r.shifts)
    if (s.change > 0) up.push_back(s);
  std::stable_sort(up.begin(), up.end(),
                   [](const auto& a, const auto& b) { return std::abs(a.shift) > std::abs(b.shift); });
  std::string out;
  for (std::size_t i = 0; i < std::min<std::size_t>(3, up.size()); ++i)
    out += text_of("%s%s +10 %% %+.1f", i ? ", " : "Moves it: ", up[i].what.c_str(), up[i].shift);
  if (r.trigger.known && std::isfinite(r.trigger.basis.next.gust))
    out += text_of("%snext: %s at %.1f", out.empty() ? "" : "; ",
                   limit_short(r.trigger.basis.next.key).c_str(), r.trigger.basis.next.gust);
  return out.empty() ? out : wrapped(out + ".", 0);
}

std::string beaufort_line(const Trigger& t) {
  return wrapped(
      text_of("Without a meter: Beaufort %d (%s) is %s.", t.beaufort,
              loads::beaufort_signs(t.beaufort).c_str(), "already the trigger; stow one force earlier"),
      0);
}

}  // namespace

std::string trigger_line(const Trigger& t) {
  if (!t.known)
    return "NO TRIGGER: nothing that could break is judged (give torques, capacities, strength)\n";
  if (t.speed <= 0) return "NO TRIGGER: the row bears too little wind to be left facing the sun at all\n";
  const char* what = t.meter.averaging <= 3.5   ? "3 s gust"
                     : t.meter.averaging < 100  ? "1 min mean"
                     : t.meter.averaging < 3000 ? "10 min mean"
                                                : "1 h mean";
  std::string out = text_of("STOW when the %s at %.3g m reaches %.1f m/s", what, t.meter.height, t.speed);
  if (t.meter.averaging > 3.5) out += text_of(", or one 3 s gust %.1f m/s", t.second);
  return out + "\n";
}

std::string stow_headline(const Trigger& t, const models::TroughDesign& d) {
  if (!t.known || t.speed <= 0) return trigger_line(t);
  return text_of("Stow at %.1f m/s (%s, %.3g m; %s): see focalframe stow\n", t.speed,
                 t.meter.averaging <= 3.5   ? "gust"
                 : t.meter.averaging < 100  ? "1 min"
                 : t.meter.averaging < 3000 ? "10 min"
                                            : "1 h",
                 t.meter.height,
                 (limit_phrase(t.basis.governing, d) + ", " + pose_words(t.basis.at)).substr(0, 34).c_str());
}

std::string stow_text(const StowReport& r, const models::TroughDesign& d, const std::string& hash) {
  const Trigger& t = r.trigger;
  std::string out =
      text_of("%-65s input %.8s\n", text_of("%.40s: how much wind?", r.name.c_str()).c_str(), hash.c_str());
  out += trigger_line(t);
  if (t.known && t.speed > 0)
    out += text_of("Resume after %.0f min below %.1f m/s.  %s\n", t.dwell / 60, t.resume,
                   speed_words(t).c_str());
  out += text_of("\nGusts at the axis (3 s, %.1f m) holds to     asked  what gives first\n",
                 r.limits.axis.height);
  for (const StateLimit* s : {&r.limits.operate, &r.limits.turning, &r.limits.stuck, &r.limits.stow})
    out += state_line(*s, d);
  const models::StowPose& best = r.limits.best;
  if (r.limits.stow.judged && best.parked.gust > 1.02 * r.limits.stow.gust)
    out += text_of("  best stow pose found: %.0f deg, holds to %.1f m/s\n", best.elevation / deg,
                   best.parked.gust);
  if (t.known) {
    out += "\n" + chain_lines(t);
    if (std::isfinite(t.light_speed))
      out +=
          t.light_speed > 0
              ? text_of("Light falls short from %.1f m/s (10 min mean at %.3g m): that costs light only.\n",
                        t.light_speed, t.meter.height)
              : std::string("Light falls short in calm air at some pose: that costs light only.\n");
    if (r.hand_held.known && r.hand_held.speed > 0)
      out += text_of("By a meter in the hand (2 m, one minute): %.1f m/s.\n", r.hand_held.speed);
    if (t.meter.hand_held && t.speed > 0) out += beaufort_line(t);
    if (r.by_hand)
      out += text_of("By hand: %s until someone is there and it is turned; the crank brings %s.\n",
                     models::quantity_text(t.travel, models::Quantity::time).c_str(),
                     shown(r.moving_capacity, models::Quantity::torque).c_str());
  }
  out += "\n" + map_lines(r) + price_line(r) + moves_line(r);
  for (const std::string& remark : r.limits.order) out += wrapped("ORDER " + remark, 0);
  out += text_of("CAUTION holds only if the row reaches stow: plan for no power and no operator.\n");
  return out;
}

}  // namespace focalframe::cli
