#include "cli/report_text.h"

#include <algorithm>
#include <cmath>

#include "cli/messages.h"
#include "cli/report_units.h"
#include "fem/units.h"

namespace focalframe::cli {
namespace {

using models::Answer;
using models::Assessment;
using models::Criterion;
using models::Question;

std::string answer_text(Answer answer) {
  switch (answer) {
    case Answer::yes:
      return "yes";
    case Answer::no:
      return "NO";
    case Answer::not_judged:
      return "not judged";
  }
  return {};
}

// "1.0 points short", "55 % used", "5 % over", "reported".
std::string share(const Criterion& c) {
  if (!c.judged()) return "not judged";
  if (c.quantity == models::Quantity::ratio && c.question == Question::focus) {
    const double points = std::abs(c.value - c.limit) * 100;
    const int digits = points < 0.1 ? 2 : 1;
    if (c.at_least) return text_of(c.met() ? "%.*f points spare" : "%.*f points short", digits, points);
    return text_of(c.met() ? "%.*f points spare" : "%.*f points over", digits, points);
  }
  const double used = 100 * c.used();
  if (c.met()) return text_of("%.0f %% used", std::min(used, 100.0));
  return used > 1000 ? text_of("%.0f times that", used / 100)
                     : text_of("%.*f %% over", used < 101 ? 1 : 0, used - 100);
}

std::string criterion_line(const Criterion& c) {
  const ShownPair pair = shown_pair(c);
  return text_of("  %-16.16s%11s %7s  %-16s %s\n", c.name.c_str(), pair.value.c_str(), pair.limit.c_str(),
                 share(c).c_str(), c.decided_in.c_str());
}

// At most `most` lines of one question: misses and judged ones first, most used first.
std::string question_lines(const Assessment& a, Question question, int most) {
  std::vector<const Criterion*> lines;
  for (const Criterion& c : a.criteria)
    if (c.question == question && (c.judged() || question == Question::together)) lines.push_back(&c);
  if (question != Question::focus)
    std::stable_sort(lines.begin(), lines.end(), [](const Criterion* x, const Criterion* y) {
      const double ux = x->judged() ? x->used() : 0, uy = y->judged() ? y->used() : 0;
      return ux > uy;
    });
  std::string out;
  int missed = 0;
  for (const Criterion* c : lines) missed += c->met() ? 0 : 1;
  for (std::size_t i = 0; i < lines.size() && static_cast<int>(i) < std::max(most, missed); ++i)
    out += criterion_line(*lines[i]);
  return out;
}

std::string losses(const Assessment& a) {
  if (a.worst_light < 0) return {};
  const auto& at = a.optics[static_cast<std::size_t>(a.worst_light)].result.attribution;
  std::string out = text_of("  lost %.2f points: ", 100 * at.loss);
  std::vector<models::PartLoss> parts = at.parts;
  std::sort(parts.begin(), parts.end(), [](const auto& x, const auto& y) { return x.alone > y.alone; });
  const std::size_t most = at.loss > 0.0995 ? 2 : 3;  // the line keeps to 80 columns
  for (std::size_t i = 0; i < std::min(most, parts.size()); ++i)
    out += text_of("%s%s %.2f", i ? ", " : "", parts[i].name.c_str(), 100 * parts[i].alone);
  out += at.interaction <= 0 ? text_of(", less %.2f that cancel\n", -100 * at.interaction)
                             : text_of(", and %.2f together\n", 100 * at.interaction);
  return out;
}

std::string cure_text(const models::Cure& cure) {
  std::string changes;
  for (const std::string& c : cure.changes) changes += (changes.empty() ? "" : " + ") + c;
  return changes;
}

std::string cure_lines(const Assessment& a, std::size_t most) {
  if (a.cures.empty()) return {};
  std::string out = "What would help, each one re-run                      light    moving     mass\n";
  std::size_t shown_lines = 0;
  const bool any = std::any_of(a.cures.begin(), a.cures.end(), [](const auto& c) { return c.meets_all; });
  for (const models::Cure& cure : a.cures) {
    if (shown_lines == most || (any && !cure.meets_all)) break;
    std::string changes = cure_text(cure);
    std::string rest;
    while (changes.size() > 51) {  // break at a plus sign, or at a blank
      std::size_t cut = changes.rfind(" + ", 48);
      cut = cut == std::string::npos || cut == 0 ? changes.rfind(' ', 50) : cut + 2;
      if (cut == std::string::npos) break;
      rest += "  " + changes.substr(0, cut) + "\n";
      changes = "  " + changes.substr(cut + 1);
    }
    out += rest + text_of("  %-51s %6s %9s %+5.0f kg\n", changes.c_str(),
                          shown(cure.intercept, models::Quantity::ratio).c_str(),
                          shown(cure.moving_torque, models::Quantity::torque).c_str(), cure.mass_change);
    ++shown_lines;
  }
  if (any)
    for (const models::Cure& cure : a.cures)
      if (!cure.meets_all && cure.changes.size() == 1 && !cure.still_missed.empty()) {
        const Criterion& c = cure.still_missed.front();
        const ShownPair pair = shown_pair(c);
        out += text_of("  not enough alone: %.30s (%.14s %s of %s)\n", cure.changes[0].c_str(),
                       c.name.c_str(), pair.value.c_str(), pair.limit.c_str());
        break;
      }
  if (!any)
    out += text_of("  none of the %zu changes tried meets all limits; these come nearest\n", a.cures.size());
  return out;
}

}  // namespace

std::string wind_line(const Assessment& a) {
  for (const models::WindUse& use : a.winds) {
    if (use.kind != models::StateKind::operate) continue;
    const auto& w = use.at_axis;
    return text_of("Wind at the axis (%.1f m), OPERATE: mean %.1f m/s, %.0f Pa; gust %.1f m/s, %.0f Pa\n",
                   w.height, w.mean_speed, w.mean_pressure, w.gust_speed, w.gust_pressure);
  }
  return {};
}

std::string verdict_line(const Assessment& a) {
  std::string tail;
  if (!a.not_judged.empty()) tail += text_of(", %zu not judged", a.not_judged.size());
  if (a.guesses > 0) tail += text_of(", %d guess%s", a.guesses, a.guesses == 1 ? "" : "es");
  switch (a.verdict) {
    case models::Verdict::holds:
      return text_of("HOLDS: all %d limits met", a.limits_judged) + tail + "\n";
    case models::Verdict::does_not_hold:
      return text_of("DOES NOT HOLD: %d of %d limits missed", a.limits_missed, a.limits_judged) + tail + "\n";
    case models::Verdict::holds_as_far_as_judged:
      return text_of("HOLDS AS FAR AS JUDGED: all %d limits met", a.limits_judged) + tail + "\n";
  }
  return {};
}

std::string questions_text(const Assessment& a, const std::string& after_focus) {
  std::string out;
  const auto ask = [&](const char* question, int i, const char* columns) {
    std::string line = text_of("%-22s %-9s %s", question,
                               answer_text(a.answers[static_cast<std::size_t>(i)]).c_str(), columns);
    line.erase(line.find_last_not_of(' ') + 1);
    out += line + "\n";
  };
  ask("Keeps the focus?", 0, "limit                   decided in");
  out += question_lines(a, Question::focus, 4) + after_focus;
  ask("Keeps together?", 1, "");
  out += question_lines(a, Question::together, 2);
  ask("Turns and stays put?", 2, "");
  out += question_lines(a, Question::drive, 2);
  if (a.answers[3] == Answer::not_judged)
    return out + "Stands?                not judged: no footing capacity given (loads: --verbose)\n";
  ask("Stands?", 3, "");
  return out + question_lines(a, Question::ground, 2);
}

std::string summary_text(const Assessment& a, const std::string& hash) {
  const std::string head = text_of("%.24s: trough %.3g x %.4g m, turning %.0f kg, %.1f kg/m2", a.name.c_str(),
                                   a.aperture, a.length, a.mass, a.mass_per_area);
  std::string out = text_of("%-65s input %.8s\n", head.c_str(), hash.c_str()) + verdict_line(a);
  std::string after_focus = losses(a);
  for (std::size_t i = 0; i < std::min<std::size_t>(1, a.deciding_guesses.size()); ++i)
    after_focus += wrapped("decided by a guess: " + a.deciding_guesses[i].text, 2);
  out += questions_text(a, after_focus);
  out += cure_lines(a, 2);
  out += wind_line(a);
  out += text_of("Proof %s = q A C to %.0e, balance %.0e; half-size elements: slope %.2g %%\n",
                 shown(a.proof.wind_force, models::Quantity::force).c_str(), a.proof.load_error,
                 a.proof.balance, std::abs(100 * a.proof.slope_change));
  out += text_of("CAUTION %s: %s confidence. A licensed engineer signs.\n", a.table.c_str(),
                 a.table_confidence.c_str());
  return out;
}

}  // namespace focalframe::cli
