#include "models/judgement.h"

#include <algorithm>
#include <cmath>
#include <cstdio>

#include "fem/units.h"
#include "models/profile.h"
#include "models/quantity.h"

namespace focalframe::models {
namespace {

std::string format(const char* text, double a, double b = 0) {
  char out[240];
  std::snprintf(out, sizeof out, text, a, b);
  return out;
}

const OpticalRow* worst_by(const std::vector<OpticalRow>& rows, double OpticalResult::*field) {
  const OpticalRow* worst = nullptr;
  for (const OpticalRow& row : rows)
    if (!worst || row.result.*field > worst->result.*field) worst = &row;
  return worst;
}

std::string where(const OpticalRow& row) {
  if (!row.calm) return place_text(row.state);
  return format("OPERATE %.0f deg, calm", row.state.elevation / deg);
}

std::string alongside(const OpticalRow& row) { return row.also.empty() ? "" : ", " + row.also; }

void judge_focus(const TroughDesign& d, Assessment& a) {
  const LimitsInput& limits = d.limits;
  const auto add = [&](const char* key, const char* name, Quantity q, double value, double limit,
                       bool at_least, const OpticalRow& row) {
    Criterion c{Question::focus, key, name, q, value, limit, at_least, where(row), {}};
    c.note =
        (row.calm ? "weight only" : a.optics_averaging + " wind, " + spread_text(row.spread) + " pattern") +
        alongside(row);
    a.criteria.push_back(c);
  };
  if (a.worst_light < 0) return;
  const OpticalRow& light = a.optics[static_cast<std::size_t>(a.worst_light)];
  add("intercept", "light caught", Quantity::ratio, light.result.intercept, limits.intercept, true, light);
  if (!std::isnan(limits.lost_to_frame))
    add("lost-to-frame", "lost to frame", Quantity::ratio, a.undeformed - light.result.intercept,
        limits.lost_to_frame, false, light);
  const OpticalRow* slope = worst_by(a.optics, &OpticalResult::slope);
  add("slope", "residual slope", Quantity::angle, slope->result.slope, limits.slope, false, *slope);
  const OpticalRow* twist = worst_by(a.optics, &OpticalResult::worst_twist);
  add("twist", "module twist", Quantity::angle, twist->result.worst_twist, limits.twist, false, *twist);
  const OpticalRow* receiver = worst_by(a.optics, &OpticalResult::receiver_shift);
  add("receiver-shift", "receiver shift", Quantity::length, receiver->result.receiver_shift,
      limits.receiver_shift, false, *receiver);
  if (!std::isnan(limits.re_aim))
    add("re-aim", "time to re-aim", Quantity::time, a.study.re_aim_time, limits.re_aim, true, light);
}

void judge_strength(const TroughDesign& d, Assessment& a) {
  const bool judged = !d.limits.strength.empty() || !std::isnan(d.limits.strength_factor);
  std::vector<std::pair<std::string, StressUse>> groups(a.strength.groups.begin(), a.strength.groups.end());
  std::sort(groups.begin(), groups.end(),
            [](const auto& x, const auto& y) { return x.second.used > y.second.used; });
  for (const auto& [group, use] : groups) {
    if (use.part.empty()) continue;
    const bool known = use.allowed > 0;
    Criterion c{
        Question::together,    "stress " + group, group, Quantity::pressure, use.stress, not_given, false,
        place_text(use.state), use.part};
    if (judged && known) c.limit = use.allowed;
    c.note = use.part + ", 3 s gust, " + spread_text(use.spread) + " pattern, " + use.combination;
    a.criteria.push_back(c);
    if (judged && !known) a.not_judged.push_back(group + ": its yield stress is not known");
  }
}

void judge_buckling(const TroughDesign& d, Assessment& a) {
  const bool judged = !d.limits.strength.empty() || !std::isnan(d.limits.strength_factor);
  for (const auto& [group, use] : a.strength.buckling) {
    if (use.part.empty()) continue;
    const std::string name = "buckl. " + (group == "receiver post" ? "post" : group);  // the screen is narrow
    Criterion c{Question::together,
                "buckling " + group,
                name,
                Quantity::ratio,
                use.used,
                not_given,
                false,
                place_text(use.state),
                use.part};
    if (judged) c.limit = 1;
    c.note = use.part + ", " + quantity_text(use.compression, Quantity::force) + " of " +
             quantity_text(use.resistance, Quantity::force) + " and its moments, 3 s gust, " +
             spread_text(use.spread) + " pattern";
    a.criteria.push_back(c);
  }
}

void judge_drive(const TroughDesign& d, Assessment& a) {
  const auto add = [&](const char* key, const char* name, const TorqueUse& use, double limit) {
    Criterion c{Question::drive,       key, name, Quantity::torque, std::abs(use.torque), limit, false,
                place_text(use.state), {}};
    c.note = "3 s gust with size factor, " + spread_text(use.spread) + " pattern, " + use.combination;
    a.criteria.push_back(c);
  };
  add("moving-torque", "drive, moving", a.strength.moving, d.drive.moving_torque);
  add("holding-torque", "drive, holding", a.strength.holding, d.drive.holding_torque);
  // The row winds itself up when its twist feeds the wind's moment: EN 1991-1-4 E.4 asks twice the mean speed
  // (from memory).
  for (const WindUse& use : a.winds) {
    if (use.kind != a.divergence_state.kind || !std::isfinite(a.divergence_speed)) continue;
    Criterion c{Question::drive,
                "wind-up",
                "mean wind",
                Quantity::speed,
                use.at_axis.mean_speed,
                a.divergence_speed / 2,
                false,
                place_text(a.divergence_state),
                "half the speed at which the row winds itself up (EN 1991-1-4 E.4, factor 2 from memory)"};
    a.criteria.push_back(c);
  }
  if (std::isfinite(d.drive.moving_torque))
    for (const WindUse& use : a.winds)
      if (use.kind == StateKind::operate)
        a.rated_moment_coefficient =
            d.drive.moving_torque / (use.at_axis.gust_pressure * a.aperture * a.mirror_area);
}

void judge_ground(const TroughDesign& d, Assessment& a) {
  const FootingInput& footing = d.pylons.footing;
  const StrengthResult& s = a.strength;
  const double overturn = std::max(s.greatest[3].value[3], -s.least[3].value[3]);
  const State& state =
      s.greatest[3].value[3] >= -s.least[3].value[3] ? s.greatest[3].state : s.least[3].state;
  a.criteria.push_back({Question::ground, "overturning", "foot moment", Quantity::torque, overturn,
                        footing.overturning_capacity, false, place_text(state),
                        "unfactored, 3 s gust with size factor"});
  const double uplift = std::max(0.0, -s.least[2].value[2]);
  a.criteria.push_back({Question::ground, "uplift", "foot uplift", Quantity::force, uplift,
                        footing.uplift_capacity, false, place_text(s.least[2].state),
                        "unfactored, 3 s gust with size factor"});
}

// Inputs that look like a slip because the results do not fit them (levels as the checklist of bad inputs).
void remark(const TroughDesign& d, Assessment& a) {
  const auto add = [&](Violation::Level level, const char* element, const char* attribute, std::string text,
                       std::string likely = {}) {
    Violation v;
    v.level = level;
    v.element = element;
    v.attribute = attribute;
    v.text = std::move(text);
    v.likely = std::move(likely);
    a.remarks.push_back(v);
  };
  const auto warn = Violation::Level::warn;
  const double need = std::abs(a.strength.moving.torque), rated = d.drive.moving_torque;
  if (need > 0 && std::isfinite(rated) && (need / rated > 50 || rated / need > 50)) {
    const bool small = need > rated;
    add(warn, "drive", "moving-torque",
        "The row needs " + quantity_text(need, Quantity::torque) + " in the asked winds, " +
            number_text(small ? need / rated : rated / need) +
            (small ? " times this rating" : " times less than this") +
            "; beyond 50 times a slip in the unit is more likely than a drive of the wrong size.",
        small ? "moving-torque=\"" + quantity_text(rated * 1000, Quantity::torque) + "\"" : std::string());
  }
  if (a.mass_per_area < 3 || a.mass_per_area > 150)
    add(warn, "", "",
        "What turns weighs " + number_text(a.mass_per_area) +
            " kg per square metre of mirror; built troughs lie between 10 and 40. Look at wall, thickness "
            "and mirror.");
  for (const Criterion& c : a.criteria) {
    if (!c.judged() || c.at_least) continue;
    if (c.question == Question::together && c.used() > 20)
      add(warn, "", "",
          c.name + " is used " + number_text(c.used()) +
              " times over: a slip in a unit is more likely than a frame that weak. Look at its sizes and "
              "the wind.");
  }
  for (const Criterion& c : a.criteria)
    if (c.question == Question::together && c.judged() && c.used() > 2) {
      add(warn, "", "",
          c.name + " is stressed to " + number_text(c.used()) + " times what is allowed: it would " +
              std::string(c.key.starts_with("buckling") ? "buckle" : "yield") +
              ", and light and deflections here are those of a frame that does not.");
      break;
    }
  if (a.worst_light >= 0) {
    const double lost = a.undeformed - a.optics[static_cast<std::size_t>(a.worst_light)].result.intercept;
    if (std::abs(lost) < 1e-6)
      add(warn, "", "",
          "The bent frame costs no light at all: check that wind and weight are what you mean.");
    if (a.optics[static_cast<std::size_t>(a.worst_light)].result.worst_twist > 100 * mrad)
      add(warn, "torque-tube", "",
          "The twist exceeds 100 mrad: the linear calculation no longer holds. The row is far too soft as "
          "described.");
  }
}

void caution(const TroughDesign& d, const Assessment& a, std::vector<std::string>& out) {
  out.push_back("Wind coefficients: " + a.table + " (" + a.table_title + "), confidence " +
                a.table_confidence +
                ". Outside the geometry they were made for the result must not be used for sign-off.");
  if (d.wind.dynamic_factor == 1)
    out.push_back(
        "Dynamic factor 1: gusts are taken to load the row as if at rest; buffeting, galloping and flutter "
        "are screened only by the wind-up speed.");
  out.push_back(
      "Ribs are taken as braced sideways by " +
      std::string(d.mirror.sheet_braces_ribs ? "the mirror sheet"
                  : d.purlins.count > 0      ? "their purlins"
                                             : "nothing") +
      "; members are judged one by one by buckling curves with the lengths between what holds them, "
      "the frame as a whole is not (focalframe modes gives its buckling factors).");
  const bool lopsided = is_lopsided(d.purlins.profile) || is_lopsided(d.ribs.bar) ||
                        is_lopsided(d.ribs.chords) || is_lopsided(d.ribs.webs) ||
                        is_lopsided(d.tube.chords) || is_lopsided(d.tube.webs) ||
                        is_lopsided(d.receiver.posts.profile) || is_lopsided(d.pylons.profile);
  if (lopsided)
    out.push_back(
        "Angles and channels are loaded and joined at their centroids: the twist from loads beside the shear "
        "centre and the bending from one-sided end joints are not in here.");
  if (d.ribs.kind == "truss")
    out.push_back(
        "Truss ribs are welded throughout and both chords start on a rigid hub; the hub, its pads "
        "and all joints are yours to check; wind on the bars themselves is left out.");
  if (d.tube.profile.shape == "lattice-box")
    out.push_back(
        "The lattice box has rigid end frames, and a hub at every rib that holds its section in "
        "shape; both, and all joints, are yours to check; wind on the bars themselves is left out.");
  if (d.mirror.kind == "sheet")
    out.push_back(
        "The mirror carries no frame load here; a riveted sheet would stiffen twist and slope, a loose one "
        "would not.");
  out.push_back(
      "A pass means: no limit exceeded in the checked states with these inputs. It does not mean zero damage "
      "in an extreme storm.");
  out.push_back(
      "Concentrated sunlight burns skin, eyes and anything near the focus, also off axis and parked.");
  out.push_back(
      "The result holds only if the row reaches stow in time: plan for no power and no operator (STUCK).");
}

}  // namespace

Answer answer_of(const std::vector<Criterion>& criteria, Question question) {
  bool judged = false;
  for (const Criterion& c : criteria) {
    if (c.question != question || !c.judged()) continue;
    if (!c.met()) return Answer::no;
    judged = true;
  }
  return judged ? Answer::yes : Answer::not_judged;
}

void judge(const TroughDesign& design, Assessment& a) {
  judge_focus(design, a);
  judge_strength(design, a);
  judge_buckling(design, a);
  judge_drive(design, a);
  judge_ground(design, a);
  for (const Criterion& c : a.criteria) {
    if (c.judged()) ++a.limits_judged;
    if (!c.met()) ++a.limits_missed;
    if (!c.judged() && c.question != Question::together) a.not_judged.push_back(c.name);
  }
  if (design.limits.strength.empty() && std::isnan(design.limits.strength_factor))
    a.not_judged.push_back("strength");
  for (int q = 0; q < 4; ++q)
    a.answers[static_cast<std::size_t>(q)] = answer_of(a.criteria, static_cast<Question>(q));
  a.verdict = a.limits_missed > 0     ? Verdict::does_not_hold
              : !a.not_judged.empty() ? Verdict::holds_as_far_as_judged
                                      : Verdict::holds;
  for (const auto& [element, basis] : design.basis)
    if (basis == "guess") ++a.guesses;
  a.not_checked = {"joints, welds, bolts, bearings and mirror pads",
                   "stress of mirror sheet or glass between its supports",
                   "local buckling of thin walls, buckling of the frame as a whole",
                   "fatigue",
                   "wind along the row and oblique wind on the finished row",
                   "row ends and shading of the receiver (shown beside the light, not in it)"};
  const auto left_out = [&](bool given, const char* what) {
    if (!given) a.not_checked.push_back(what);
  };
  left_out(!std::isnan(design.temperature.set_at), "temperature (no <temperature>)");
  left_out(!std::isnan(design.snow.on_ground), "snow (no <snow>)");
  left_out(!design.water.drains.empty(), "water standing in the mirror (no <water>)");
  left_out(!std::isnan(design.ice.thickness), "ice (no <ice>)");
  left_out(!std::isnan(design_acceleration(design.earthquake)), "earthquake (no <earthquake>)");
  left_out(!std::isnan(design.maintenance.load), "people and vehicles touching it (no <maintenance>)");
  left_out(design.wind.unfinished.given, "the row while it is being built (no <wind><unfinished>)");
  remark(design, a);
  caution(design, a, a.cautions);
}

}  // namespace focalframe::models
