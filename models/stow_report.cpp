#include "models/stow_report.h"

#include <cmath>
#include <cstdio>

#include "fem/units.h"
#include "models/pose_limits.h"

namespace focalframe::models {
namespace {

std::string text(const char* format, double a, double b = 0) {
  char out[400];
  std::snprintf(out, sizeof out, format, a, b);
  return out;
}

// Reynolds number from which a smooth cylinder's drag begins to fall (Munson, Young, Okiishi, Fundamentals of
// Fluid Mechanics, Fig. 9.21, from memory); air at 15 degC.
constexpr double drag_crisis = 2e5, kinematic_viscosity = 1.5e-5;

void remark(const TroughDesign& d, const loads::CoefficientTable& table, StowReport& r) {
  const WindLimits& w = r.limits;
  const double width = std::isnan(d.receiver.sleeve.outside_diameter) ? d.receiver.outside_diameter
                                                                      : d.receiver.sleeve.outside_diameter;
  if (std::isfinite(w.turning.gust)) {
    const double reynolds = w.turning.gust * width / kinematic_viscosity;
    if (reynolds > drag_crisis)
      r.remarks.push_back(
          text("The receiver's drag of 1.2 is kept at the limit, where its Reynolds number is %.1e; "
               "beyond about 2e5 it falls, so this is on the safe side.",
               reynolds));
  }
  if (d.drive.play > 0 && std::isfinite(w.drive_reversal))
    r.remarks.push_back(
        text("At some tracking pose a mean of %.1f m/s at the axis already turns the load of the drive round "
             "(the weight nearly balances there): the row tips over by its play of %.2g mrad",
             w.drive_reversal, d.drive.play / mrad) +
        (d.sensor.correction == "none"
             ? ", which nothing corrects and the light here does not count."
             : "; the sensor sees that and the tracker takes it out, but not within a gust."));
  if (d.drive.friction > 0)
    r.remarks.push_back(
        "Bearing friction is added to what the drive must move, in either sense; the twist it leaves "
        "in the row is not counted in the light.");
  if (d.wind.dynamic_factor != 1)
    r.remarks.push_back(
        text("The dynamic factor of %.2f is taken the same at every speed.", d.wind.dynamic_factor));
  if (!(table.yaw_max > 59 * deg))
    r.remarks.push_back(
        "Oblique winds: the loads across the row are reduced by cos^2 of the yaw angle up to 60 deg and "
        "held at a quarter beyond (standard approximation, from memory; not in the table).");
}

}  // namespace

StowReport stow_report(const TroughDesign& design, const loads::CoefficientTable& table, const RowModel& row,
                       const StowOptions& options) {
  StowReport out;
  out.name = design.name;
  out.table = table.name;
  out.table_confidence = table.confidence;
  out.zone = design.wind.zone;
  out.rule = strength_rule(design).text;
  out.by_hand = design.operation.turned_by == "hand";
  out.moving_capacity = moving_capacity(design);
  out.limits = wind_limits(row, design, table);
  const Meter meter = meter_of(design);
  out.trigger = stow_trigger(design, out.limits, meter);
  if (!meter.hand_held)
    out.hand_held =
        stow_trigger(design, out.limits, {hand_meter_height, hand_meter_averaging, 0, false, true});
  out.price = stow_price(design, out.limits, out.trigger, options.record);
  if (options.sensitivity)
    out.shifts = trigger_sensitivity(design, table, row, out.trigger, options.progress);
  for (const StateLimit* s : {&out.limits.operate, &out.limits.turning, &out.limits.stow, &out.limits.stuck})
    out.states_missed += s->judged && !s->holds() ? 1 : 0;
  remark(design, table, out);
  out.not_covered = {"wind along the row, and what hangs from it",
                     "joints, bearings and mirror pads without a stated capacity",
                     "the absorber against its glass sleeve",
                     "member buckling, and galloping, flutter and buffeting by rows upwind",
                     "snow, ice and temperature together with wind"};
  if (std::isnan(out.moving_capacity))
    out.not_covered.insert(out.not_covered.begin(), "whether the drive can move: no moving torque given");
  return out;
}

Trigger quick_trigger(const TroughDesign& design, const loads::CoefficientTable& table, const RowModel& row) {
  MapOptions options;
  options.whole = false;
  options.light = design.operation.trigger.from == "light";
  return stow_trigger(design, wind_limits(row, design, table, options), meter_of(design));
}

}  // namespace focalframe::models
