#include <algorithm>
#include <cmath>
#include <cstdio>

#include "fem/units.h"
#include "models/dish_assess.h"

namespace focalframe::models {
namespace {

std::string where(const DishOpticalRow& row) {
  if (!row.calm) return place_text(row.state);
  char text[48];
  std::snprintf(text, sizeof text, "OPERATE %.0f deg, calm", row.state.state.elevation / deg);
  return text;
}

std::string note_of(const DishOpticalRow& row) {
  return row.calm ? "weight only" : "10 min mean wind, " + spread_text(row.spread) + " pattern";
}

const DishOpticalRow& worst_by(const std::vector<DishOpticalRow>& rows, double DishOptical::*field) {
  return *std::max_element(rows.begin(), rows.end(), [&](const DishOpticalRow& a, const DishOpticalRow& b) {
    return a.result.*field < b.result.*field;
  });
}

void judge_focus(const DishDesign& d, DishAssessment& a) {
  if (a.optics.empty()) return;
  const auto add = [&](const char* key, const char* name, Quantity q, double value, double limit,
                       bool at_least, const DishOpticalRow& row) {
    a.common.criteria.push_back(
        {Question::focus, key, name, q, value, limit, at_least, where(row), note_of(row)});
  };
  const DishOpticalRow& worst = a.optics[static_cast<std::size_t>(a.worst)];
  if (a.radio) {
    add("gain-loss", "gain lost, dB", Quantity::none, worst.result.gain_loss, d.dish.limits.gain_loss, false,
        worst);
    const DishOpticalRow& aim = worst_by(a.optics, &DishOptical::pointing_beams);
    add("pointing", "pointing, beams", Quantity::none, aim.result.pointing_beams, d.dish.limits.pointing,
        false, aim);
  } else {
    add("intercept", "light caught", Quantity::ratio, worst.result.intercept, d.limits.intercept, true,
        worst);
    if (!std::isnan(d.limits.lost_to_frame))
      add("lost-to-frame", "lost to frame", Quantity::ratio, a.common.undeformed - worst.result.intercept,
          d.limits.lost_to_frame, false, worst);
    const DishOpticalRow& aim = worst_by(a.optics, &DishOptical::aim_error);
    add("aim", "aim", Quantity::angle, aim.result.aim_error, d.dish.limits.aim, false, aim);
  }
  const DishOpticalRow& slope = worst_by(a.optics, &DishOptical::slope);
  if (!a.radio || !std::isnan(d.limits.slope))
    add("slope", "residual slope", Quantity::angle, slope.result.slope, d.limits.slope, false, slope);
  const DishOpticalRow& shift = worst_by(a.optics, &DishOptical::focus_across);
  const DishOpticalRow& along = worst_by(a.optics, &DishOptical::focus_along);
  const bool across = shift.result.focus_across > along.result.focus_along;
  add("receiver-shift", a.radio ? "feed shift" : "receiver shift", Quantity::length,
      across ? shift.result.focus_across : along.result.focus_along, d.limits.receiver_shift, false,
      across ? shift : along);
}

void judge_strength(const DishDesign& d, DishAssessment& a) {
  const bool judged = !d.limits.strength.empty() || !std::isnan(d.limits.strength_factor);
  std::vector<Criterion> found;
  const auto add = [&](const std::string& key, const std::string& name, Quantity q, const DishUse& use) {
    Criterion c{Question::together,
                key,
                name,
                q,
                use.value,
                not_given,
                false,
                place_text(use.state),
                use.part + ", 3 s gust, " + spread_text(use.spread) + " pattern"};
    if (judged && use.allowed > 0) c.limit = use.allowed;
    if (judged && !(use.allowed > 0)) a.common.not_judged.push_back(name + ": its yield stress is not known");
    found.push_back(c);
  };
  for (const auto& [group, use] : a.strength.stress)
    if (!use.part.empty()) add("stress " + group, group, Quantity::pressure, use);
  for (const auto& [group, use] : a.strength.buckling)
    if (!use.part.empty()) add("buckling " + group, group + " buckling", Quantity::force, use);
  std::stable_sort(found.begin(), found.end(), [](const Criterion& x, const Criterion& y) {
    return (x.judged() ? x.used() : 0) > (y.judged() ? y.used() : 0);
  });
  a.common.criteria.insert(a.common.criteria.end(), found.begin(), found.end());
}

void judge_drive(const DishDesign& d, DishAssessment& a) {
  const auto add = [&](const char* key, const char* name, Quantity q, const DishForce& use, double limit,
                       const char* note) {
    a.common.criteria.push_back({Question::drive, key, name, q, std::abs(use.value), limit, false,
                                 place_text(use.state),
                                 note + (", " + spread_text(use.spread)) + " pattern"});
  };
  const DishInput& dish = d.dish;
  const char* gust = "3 s gust with size factor";
  if (a.slewing) {
    add("moving-torque", "elevation, moving", Quantity::torque, a.strength.moving, dish.slewing.moving_torque,
        gust);
    add("holding-torque", "elevation, hold", Quantity::torque, a.strength.holding,
        dish.slewing.holding_torque, gust);
  } else {
    add("actuator-moving", "actuator, moving", Quantity::force, a.strength.moving, dish.actuator.push, gust);
    add("actuator-holding", "actuator, hold", Quantity::force, a.strength.holding, dish.actuator.hold, gust);
    // Euler over 3: usual for jack screws and cylinder rods (common practice, no source).
    if (!std::isnan(dish.actuator.rod_diameter)) {
      const DishForce& rod = a.strength.rod_compression;
      add("rod-buckling", "rod buckling", Quantity::force, rod,
          a.strength.rod_share > 0 ? std::abs(rod.value) / a.strength.rod_share / 3 : not_given,
          "a third of the Euler load at this length");
    }
  }
  add("azimuth-moving", "azimuth, moving", Quantity::torque, a.strength.azimuth_moving,
      dish.azimuth.moving_torque, gust);
  add("azimuth-holding", "azimuth, hold", Quantity::torque, a.strength.azimuth_holding,
      dish.azimuth.holding_torque, gust);
}

void judge_ground(const DishDesign& d, DishAssessment& a) {
  const FootingInput& footing = d.dish.pedestal.footing;
  a.common.criteria.push_back({Question::ground, "overturning", "overturning", Quantity::torque,
                               a.strength.overturning.value, footing.overturning_capacity, false,
                               place_text(a.strength.overturning.state),
                               "unfactored, 3 s gust with size factor"});
  a.common.criteria.push_back({Question::ground, "uplift", "foot uplift", Quantity::force,
                               a.strength.uplift.value, footing.uplift_capacity, false,
                               place_text(a.strength.uplift.state), "unfactored, 3 s gust with size factor"});
}

void remark(const DishDesign& d, DishAssessment& a) {
  const auto add = [&](Violation::Level level, const char* element, const char* attribute, std::string text) {
    Violation v;
    v.level = level;
    v.element = element;
    v.attribute = attribute;
    v.text = std::move(text);
    a.common.remarks.push_back(v);
  };
  const auto warn = Violation::Level::warn, note = Violation::Level::note;
  if (a.mass_per_area < 3 || a.mass_per_area > 80)
    add(warn, "", "",
        "Reflector and feed weigh " + number_text(a.mass_per_area) +
            " kg per square metre of aperture; built dishes lie between 8 and 50. Look at walls and skin.");
  for (const Criterion& c : a.common.criteria)
    if (c.question == Question::together && c.judged() && c.used() > 2) {
      add(warn, "", "",
          c.name + " is used " + number_text(c.used()) +
              " times over: it would yield or buckle, and the deflections here are those of a frame that "
              "does not.");
      break;
    }
  if (a.frequency < 2)
    add(warn, "", "",
        "The lowest frequency is " + number_text(a.frequency) +
            " Hz: gusts excite a dish this soft, which factors of 1 do not cover. Small dishes have 4 to 12 "
            "Hz.");
  if (a.residual_side > 0.15)
    add(note, "wind", "table",
        "The table is not that of a bare thin shell: up to " + number_text(a.residual_side) +
            " q A of in-plane force is put on the hub beside the pressures.");
  if (d.dish.surface.kind == "mesh" && d.dish.mesh_relief == "solidity")
    add(note, "wind", "mesh-relief",
        "A 50 % relief for a half open surface proved too optimistic on a 64 m antenna, whose torque had to "
        "be "
        "raised by 40 % (JPL DSN progress report XV, 1973, pp. 96-101, abstract).");
}

void caution(const DishDesign& d, const DishAssessment& a, std::vector<std::string>& out) {
  out.push_back("Wind coefficients: " + a.common.table + " (" + a.common.table_title + "), confidence " +
                a.common.table_confidence +
                ". Outside the geometry they were made for the result must not be used for sign-off.");
  if (d.wind.dynamic_factor == 1)
    out.push_back(
        "Dynamic factor 1: gusts are taken to load the dish as if at rest. Moments of dishes with open backs "
        "fluctuate more than their mean.");
  out.push_back(
      "The angle is counted at the motor: stretch of the actuator and of everything below it is not seen by "
      "the controller" +
      std::string(d.dish.learned == "gravity" ? ", but what the weight does is learned." : "."));
  out.push_back(
      "The result holds only if the dish reaches stow in time: plan for no power and no operator (STUCK).");
  if (!a.radio)
    out.push_back(
        "Concentrated sunlight burns skin, eyes and anything near the focus, also off axis and parked.");
}

}  // namespace

void judge_dish(const DishDesign& design, DishAssessment& a) {
  judge_focus(design, a);
  judge_strength(design, a);
  judge_drive(design, a);
  judge_ground(design, a);
  Assessment& out = a.common;
  for (const Criterion& c : out.criteria) {
    if (c.judged()) ++out.limits_judged;
    if (!c.met()) ++out.limits_missed;
    if (!c.judged() && c.question != Question::together) out.not_judged.push_back(c.name);
  }
  if (design.limits.strength.empty() && std::isnan(design.limits.strength_factor))
    out.not_judged.push_back("strength");
  for (int q = 0; q < 4; ++q)
    out.answers[static_cast<std::size_t>(q)] = answer_of(out.criteria, static_cast<Question>(q));
  out.verdict = out.limits_missed > 0     ? Verdict::does_not_hold
                : !out.not_judged.empty() ? Verdict::holds_as_far_as_judged
                                          : Verdict::holds;
  for (const auto& [element, basis] : design.basis)
    if (basis == "guess") ++out.guesses;
  out.not_checked = {"joints, welds, bolts, bearings, pins and lugs", "the skin between its supports",
                     "chords and plate ribs sideways (focalframe modes gives buckling factors)",
                     "fatigue, temperature, earthquake",
                     "wind on ribs, yoke and counterweight; shading by receiver and legs"};
  remark(design, a);
  caution(design, a, out.cautions);
}

}  // namespace focalframe::models
