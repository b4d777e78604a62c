#include "cli/report/trough_page.h"

#include <algorithm>
#include <cmath>

#include "cli/escaped.h"
#include "cli/report_units.h"
#include "fem/units.h"

namespace focalframe::cli {
namespace {

using models::Assessment;
using models::Criterion;
using models::Quantity;
using models::Question;

// The figure of this key, or nothing.
std::string figure(const TroughReport& r, const char* key) {
  for (const Figure& f : r.figures)
    if (f.key == key) return html_figure(f);
  return {};
}

std::string heading(const char* words) { return std::string("<h3>") + words + "</h3>\n"; }

std::string criteria_table(const Assessment& a) {
  const char* questions[] = {"Keeps the focus?", "Keeps together?", "Turns and stays put?", "Stands?"};
  std::vector<std::vector<std::string>> rows;
  std::set<std::size_t> missed;
  std::string asked;
  for (const Criterion& c : a.criteria) {
    const ShownPair pair = shown_pair(c);
    const std::string question = questions[static_cast<int>(c.question)];
    if (!c.met()) missed.insert(rows.size());
    const std::string limit =
        c.judged() ? std::string(c.at_least ? "at least " : "at most ") + pair.limit : "no limit given";
    rows.push_back({question == asked ? "" : question, c.name, pair.value, limit,
                    !c.judged() ? "not judged"
                    : c.met()   ? "met"
                                : "MISSED",
                    c.decided_in, c.note});
    asked = question;
  }
  return html_table({"question", "what", ">value", ">limit", "result", "decided in", "how"}, rows, missed);
}

std::string verdict_body(const TroughReport& r) {
  const Assessment& a = r.assessment;
  std::string out = figure(r, "limits") + criteria_table(a);
  if (!a.cures.empty()) {
    std::vector<std::vector<std::string>> rows;
    for (const models::Cure& cure : a.cures) {
      std::string changes, rest;
      for (const std::string& c : cure.changes) changes += (changes.empty() ? "" : " + ") + c;
      for (const Criterion& c : cure.still_missed) rest += (rest.empty() ? "" : ", ") + c.name;
      rows.push_back({changes, shown(cure.intercept, Quantity::ratio, 1),
                      shown(cure.moving_torque, Quantity::torque), text_of("%+.0f kg", cure.mass_change),
                      cure.meets_all ? "all limits met" : "still missed: " + rest});
    }
    out += heading("What would help: every change was run through the whole check again") +
           html_table({"change", ">light", ">drive, moving", ">mass", "result"}, rows);
  }
  if (!a.deciding_guesses.empty()) {
    std::vector<std::string> items;
    for (const auto& g : a.deciding_guesses) items.push_back(g.text);
    out += heading("Guessed inputs that decide the verdict") + html_list(items);
  }
  return out;
}

std::string light_body(const TroughReport& r) {
  const Assessment& a = r.assessment;
  std::vector<std::vector<std::string>> rows;
  for (const models::OpticalRow& row : a.optics) {
    const auto& o = row.result;
    rows.push_back({row.calm ? text_of("OPERATE %.0f deg, calm", row.state.elevation / deg)
                             : models::place_text(row.state),
                    row.calm ? "weight only" : models::spread_text(row.spread),
                    text_of("%.2f", 100 * o.intercept), text_of("%.2f", 100 * o.intercept_row_mean),
                    text_of("%.2f", o.worst_twist / mrad), text_of("%.2f", o.slope / mrad),
                    text_of("%.2f", o.focal_change / mm), text_of("%.2f", o.receiver_shift / mm),
                    text_of("%.2f", o.rim_deflection / mm)});
  }
  return html_paragraph(
             text_of("The perfect trough would catch %.2f %% of the light with this sun, mirror and "
                     "receiver; the spread of the beam is %.2f mrad rms. 1 mrad is 1 mm in 1 m.",
                     100 * a.undeformed, a.beam_rms / mrad)) +
         figure(r, "light") + figure(r, "loss") + figure(r, "twist") + figure(r, "slope-map") +
         figure(r, "miss-map") + figure(r, "flux") +
         html_folded(
             "Every state: light, twist, slope, focus, receiver, rims",
             html_table({"state", "pressure pattern", ">light %", ">row-mean aim %", ">twist mrad",
                         ">slope mrad", ">focus mm", ">receiver mm", ">rim mm"},
                        rows) +
                 html_paragraph("slope: rms of the mirror's normal across the trough with every section's "
                                "own tilt and focus taken out, worst module; focus: change of the best-fit "
                                "focal length; receiver: from the moved focus; rim: mirror at the rib tips "
                                "along its normal, against the tube."));
}

std::string strength_body(const TroughReport& r) {
  std::vector<std::vector<std::string>> rows;
  for (const auto& [group, use] : r.assessment.strength.groups)
    rows.push_back({group, use.part, text_of("%.0f", use.stress / MPa),
                    use.allowed > 0 ? text_of("%.0f", use.allowed / MPa) : "not known",
                    use.allowed > 0 ? text_of("%.0f %%", 100 * use.used) : "-", models::place_text(use.state),
                    models::spread_text(use.spread)});
  std::vector<std::vector<std::string>> columns;
  for (const auto& [group, use] : r.assessment.strength.buckling)
    columns.push_back({group, use.part, shown(use.compression, Quantity::force),
                       shown(use.resistance, Quantity::force), text_of("%.0f %%", 100 * use.used),
                       models::place_text(use.state), models::spread_text(use.spread)});
  return figure(r, "strength") +
         html_table(
             {"group", "worst member", ">stress MPa", ">allowed MPa", ">used", "state", "pressure pattern"},
             rows) +
         html_table({"buckling of", "worst member", ">pushed by", ">bears", ">used with its moments", "state",
                     "pressure pattern"},
                    columns);
}

std::string drive_body(const TroughReport& r) {
  const auto& s = r.assessment.strength;
  return figure(r, "torque") +
         html_table({"case", ">torque about the axis", "state"},
                    {{"greatest while tracking or turning",
                      shown(std::abs(s.moving.torque), Quantity::torque), models::place_text(s.moving.state)},
                     {"greatest to hold, any state", shown(std::abs(s.holding.torque), Quantity::torque),
                      models::place_text(s.holding.state)}});
}

std::string ground_body(const TroughReport& r) {
  const Assessment& a = r.assessment;
  const char* names[6] = {"force along the row, X",  "force across it, Y", "force upwards, Z",
                          "moment about the row, X", "moment about Y",     "moment about the vertical, Z"};
  std::vector<std::vector<std::string>> rows;
  for (std::size_t i = 0; i < 6; ++i) {
    const auto &most = a.strength.greatest[i], &least = a.strength.least[i];
    const Quantity q = i < 3 ? Quantity::force : Quantity::torque;
    rows.push_back({names[i], shown(most.value[i], q),
                    text_of("pylon %d, ", most.stand + 1) + models::place_text(most.state),
                    shown(least.value[i], q),
                    text_of("pylon %d, ", least.stand + 1) + models::place_text(least.state)});
  }
  return html_paragraph(
             "What the ground puts on the foot of one pylon, unfactored, at ground level: X along the row, Y "
             "across "
             "it, Z up; moments right-handed. The six values of a line need not occur together.") +
         html_table({"component", ">greatest", "where", ">least", "where"}, rows);
}

std::string wind_body(const TroughReport& r) {
  const Assessment& a = r.assessment;
  std::string out;
  for (const models::WindUse& use : a.winds) {
    std::vector<std::vector<std::string>> rows;
    for (const loads::ChainStep& s : use.at_axis.chain)
      rows.push_back({s.what, text_of("%.4g", s.value), s.unit, s.how});
    rows.push_back(
        {"size factor cs", text_of("%.4g", use.size_factor), "-", "for drive torque and the drive pylon"});
    const std::string body = html_table({"step", ">value", "unit", "how"}, rows);
    const std::string title =
        models::state_text(use.kind) +
        text_of(": mean %.1f m/s and %.0f Pa, 3 s gust %.1f m/s and %.0f Pa at the axis",
                use.at_axis.mean_speed, use.at_axis.mean_pressure, use.at_axis.gust_speed,
                use.at_axis.gust_pressure);
    out += html_folded(title, body);
  }
  out += html_paragraph("Coefficients: " + a.table + ", " + a.table_title + ". Confidence " +
                        a.table_confidence + ". Source: " + a.table_source) +
         html_paragraph(
             text_of("Zone %s. Greatest moment of the row about its axis: %.3f q W² L on the gust, size "
                     "factor in.",
                     a.zone.c_str(), a.row_moment_coefficient));
  if (std::isfinite(a.divergence_speed))
    out += html_paragraph(text_of("The row would wind itself up at a mean wind of %.1f m/s (%s).",
                                  a.divergence_speed, models::place_text(a.divergence_state).c_str()));
  return out;
}

std::string frame_body(const TroughReport& r) {
  const Assessment& a = r.assessment;
  std::vector<std::vector<std::string>> rows{
      {"aperture", text_of("%.3f m", a.aperture)},
      {"length of the row", text_of("%.2f m", a.length)},
      {"focal length", text_of("%.3f m", a.focal_length)},
      {"rim angle", text_of("%.1f deg", a.rim_angle / deg)},
      {"mirror, flat aperture (multiplies the coefficients)", text_of("%.2f m²", a.mirror_area)},
      {"mass of what turns", text_of("%.0f kg, %.1f kg/m²", a.mass, a.mass_per_area)},
      {"mass of pylons and heads", text_of("%.0f kg", a.stand_mass)},
      {"rotation axis", text_of("%.0f mm %s the mirror vertex", std::abs(a.axis_to_vertex) / mm,
                                a.axis_to_vertex >= 0 ? "behind" : "in front of")},
      {"centre of gravity", text_of("%.0f mm %s the axis", std::abs(a.centre_below_axis) / mm,
                                    a.centre_below_axis >= 0 ? "behind" : "in front of")},
      {"torque of the weight, facing the horizon", shown(a.weight_torque, Quantity::torque)}};
  return r.view + figure(r, "frame-views") + figure(r, "modes") + html_table({"", ""}, rows) +
         html_paragraph(
             "Elevation: 0 deg looks at the horizon on the +Y side, 90 deg at the zenith, beyond 90 deg it "
             "leans to -Y. \"face\": the wind strikes the concave side; \"back\": the convex side.");
}

std::string proof_body(const TroughReport& r) {
  const Assessment& a = r.assessment;
  const auto& p = a.proof;
  return html_table(
      {"check", ">found"},
      {{"wind force put on the nodes against q A C in the governing state",
        text_of("%.1f N and %.1f N", p.wind_force, p.q_area_c)},
       {"greatest relative difference of forces and moment, all states", text_of("%.0e", p.load_error)},
       {"loads and reactions add up to this share of the loads", text_of("%.0e", p.balance)},
       {"residual of the factorised system", text_of("%.0e", p.residual)},
       {"condition of the scaled stiffness, estimate", text_of("%.0e", p.condition)},
       {"degrees of freedom of what turns", text_of("%d", a.freedoms)},
       {"half-size elements change the residual slope by", text_of("%.3f %%", 100 * p.slope_change)},
       {"half-size elements change the light by", text_of("%.4f points", 100 * p.intercept_change)}});
}

std::string bounds_body(const TroughReport& r) {
  const Assessment& a = r.assessment;
  std::string out;
  if (!a.not_judged.empty()) out += heading("Reported but not judged") + html_list(a.not_judged);
  out += heading("Not part of this check") + html_list(a.not_checked);
  out += heading("Cautions") + html_list(a.cautions);
  if (!r.messages.empty()) {
    std::vector<std::vector<std::string>> rows;
    for (const Message& m : r.messages)
      rows.push_back({m.level == Level::note ? "NOTE" : "WARN", m.line ? text_of("line %d", m.line) : "",
                      m.head, m.text + (m.likely.empty() ? "" : " Likely meant: " + m.likely)});
    out += heading("Raised about this input") + html_table({"", "", "place", "what"}, rows);
  }
  return out +
         html_paragraph(
             "This is a screening aid. It does not replace design by a competent person or the approval "
             "required where you build. A licensed engineer signs.");
}

std::string input_body(const TroughReport& r) {
  return html_folded("The design file as it was read", "<pre>" + escaped(r.design_text) + "</pre>\n") +
         "<div class=\"sign\"><div>date</div><div>worked out by</div><div>checked by</div></div>\n";
}

}  // namespace

Page trough_page(const TroughReport& r) {
  const Assessment& a = r.assessment;
  Page page;
  page.title = a.name;
  page.subtitle = text_of("Parabolic trough %.4g x %.4g m, turning mass %.0f kg (%.1f kg/m²)", a.aperture,
                          a.length, a.mass, a.mass_per_area);
  page.verdict = r.verdict;
  page.holds = a.verdict != models::Verdict::does_not_hold;
  page.foot =
      "focalframe " FOCALFRAME_VERSION ", input " + r.hash + ". Screening aid; a licensed engineer signs.";
  page.sections = {{"verdict", "Verdict", verdict_body(r)},
                   {"frame", "The frame", frame_body(r)},
                   {"light", "Light", light_body(r)},
                   {"strength", "Strength", strength_body(r)},
                   {"drive", "Drive", drive_body(r)},
                   {"ground", "Ground", ground_body(r)},
                   {"wind", "The wind, step by step", wind_body(r)},
                   {"proof", "Proof", proof_body(r)},
                   {"bounds", "What this check does not say", bounds_body(r)},
                   {"input", "Input", input_body(r)}};
  page.script = r.script;
  return page;
}

}  // namespace focalframe::cli
