#include "models/trigger.h"

#include <algorithm>
#include <cmath>
#include <cstdio>

#include "loads/gust_in_mean.h"
#include "loads/profile.h"
#include "models/quantity.h"

namespace focalframe::models {
namespace {

loads::WindAtHeight any_wind(const TroughDesign& design, double height) {
  loads::StatedWind wind;
  wind.speed = 10;
  wind.averaging = 600;
  return loads::wind_at(height, wind, site_of(design.site));
}

std::string text(const char* format, double a, double b = 0) {
  char out[160];
  std::snprintf(out, sizeof out, format, a, b);
  return out;
}

std::string averaging_text(double averaging) {
  return averaging <= 3.5 ? "3 s" : averaging < 3000 ? text("%.0f min", averaging / 60) : "1 h";
}

double travel_time(const TroughDesign& design, const WindLimits& limits) {
  double longest = 0;
  for (const Way& way : limits.ways)
    if (way.to == design.operation.stow_at) longest = std::max(longest, way.time);
  const double notice = design.operation.turned_by == "hand" ? design.operation.notice : 0;
  return longest + notice;
}

class Chain {
 public:
  Chain(const TroughDesign& design, Trigger& out) : d_(design), out_(out), speed_(out.axis_gust) {}

  double speed() const { return speed_; }

  void height(double axis_height) {
    const TriggerInput& yours = d_.operation.trigger;
    const double own = gust_ratio(d_, out_.meter.height, axis_height);
    step('*', yours.height_factor, own, text("gust at %.3g m against %.3g m", out_.meter.height, axis_height),
         loads::terrain_name(site_of(d_.site).terrain));
  }
  void shelter() {
    const double own = out_.meter.among_rows ? shelter_among_rows : 1;
    if (own == 1 && std::isnan(d_.operation.trigger.shelter)) return;
    step('*', d_.operation.trigger.shelter, own, "meter among the rows reads low", "judgement");
  }
  void averaging() {
    if (out_.meter.averaging <= 3.5) return;
    const auto exposure = loads::exposure_of(site_of(d_.site));
    step('/', d_.operation.trigger.gust_factor, loads::gust_in_mean(exposure, out_.meter.averaging),
         "3 s gust in a " + averaging_text(out_.meter.averaging) + " mean",
         "WMO " + loads::exposure_name(exposure) + ", memory");
  }
  void growth() {
    const bool known = std::isfinite(out_.travel);
    step('/', d_.operation.trigger.growth, default_growth(out_.travel),
         known ? "growth in " + quantity_text(out_.travel, Quantity::time) : "growth; no turning-rate given",
         "judgement");
  }
  void tolerance() {
    speed_ = std::max(0.0, speed_ - out_.meter.tolerance);
    out_.steps.push_back({'-', out_.meter.tolerance,
                          out_.meter.hand_held ? "meter's tolerance" : "anemometer tolerance",
                          out_.meter.tolerance > 0 ? "yours" : "none stated", speed_});
  }

 private:
  void step(char sign, double yours, double own, std::string what, std::string source) {
    const bool stated = !std::isnan(yours);
    const double by = stated ? yours : own;
    speed_ = sign == '*' ? speed_ * by : speed_ / by;
    out_.steps.push_back({sign, by, std::move(what), stated ? "yours" : std::move(source), speed_});
  }

  const TroughDesign& d_;
  Trigger& out_;
  double speed_;
};

std::vector<std::string> reminders_of(const TroughDesign& design) {
  std::vector<std::string> out = {
      "Stow as well when the anemometer falls silent, stands still or jumps, when the link to the row is "
      "lost, "
      "and when the stored energy left is just enough to stow.",
      "Thunderstorm gusts can rise faster than the row turns: stow on a storm warning, not on the meter.",
      "The trigger is for this height, place and averaging; move or replace the anemometer and it changes."};
  if (design.operation.turned_by == "hand")
    out.push_back(
        "Turned by hand: never leave it unattended facing the sun on a day when the trigger may be "
        "reached within the notice time.");
  return out;
}

}  // namespace

double default_growth(double time) {
  if (!std::isfinite(time)) return 1.2;
  return std::min(1.5, 1 + 0.1 * std::sqrt(time / 60));
}

Meter meter_of(const TroughDesign& design) {
  const AnemometerInput& given = design.operation.anemometer;
  if (!std::isfinite(given.height) || !std::isfinite(given.averaging))
    return {hand_meter_height, hand_meter_averaging, 0, false, true};
  return {given.height, given.averaging, given.tolerance, given.place == "among-rows", false};
}

double mean_ratio(const TroughDesign& design, double height, double over_height) {
  return any_wind(design, height).mean_speed / any_wind(design, over_height).mean_speed;
}

double gust_ratio(const TroughDesign& design, double height, double over_height) {
  return any_wind(design, height).gust_speed / any_wind(design, over_height).gust_speed;
}

Trigger stow_trigger(const TroughDesign& design, const WindLimits& limits, const Meter& meter) {
  Trigger out;
  out.meter = meter;
  const bool light = design.operation.trigger.from == "light";
  const StateLimit& tracking = light ? limits.operate : limits.operate_safe;
  out.basis = tracking.gust < limits.turning.gust ? tracking : limits.turning;
  out.known = out.basis.judged && std::isfinite(out.basis.gust);
  out.travel = travel_time(design, limits);
  out.reminders = reminders_of(design);
  const auto exposure = loads::exposure_of(site_of(design.site));
  out.to_ten_minutes = loads::gust_in_mean(exposure, meter.averaging) / loads::gust_in_mean(exposure, 600);
  double light_mean = no_limit;
  for (const PoseLimit& p : limits.map)
    for (const CriterionLimit& c : p.criteria)
      if (p.kind == StateKind::operate && is_optical(c.key)) light_mean = std::min(light_mean, c.speed);
  out.light_speed = light_mean * mean_ratio(design, meter.height, limits.axis.height);
  if (!out.known) return out;

  out.axis_gust = out.basis.gust;
  Chain chain(design, out);
  chain.height(limits.axis.height);
  chain.shelter();
  const double gust_at_meter = chain.speed();
  chain.averaging();
  chain.growth();
  chain.tolerance();
  const TriggerInput& yours = design.operation.trigger;
  const auto or_default = [](double stated, double own) { return std::isnan(stated) ? own : stated; };
  out.speed = std::floor(chain.speed() * 10 + 1e-9) / 10;
  out.second_ratio = or_default(yours.second, default_second);
  out.second = std::floor(out.second_ratio * gust_at_meter * 10 + 1e-9) / 10;
  out.resume = std::floor(or_default(yours.resume, default_resume) * out.speed * 10 + 1e-9) / 10;
  out.dwell = or_default(yours.dwell, default_dwell);
  out.mean_at_10m = out.speed * out.to_ten_minutes * mean_ratio(design, 10, meter.height);
  out.beaufort = loads::beaufort(out.mean_at_10m);
  return out;
}

}  // namespace focalframe::models
