#include "models/wind_price.h"

#include <algorithm>
#include <cmath>
#include <cstdio>

#include "fem/units.h"
#include "loads/gust_in_mean.h"
#include "loads/pose.h"
#include "loads/statistics.h"

namespace focalframe::models {
namespace {

constexpr int rows_each_side = 3;

double between(const std::vector<double>& x, const std::vector<double>& y, double at) {
  if (x.empty()) return 0;
  const auto above = std::upper_bound(x.begin(), x.end(), at);
  if (above == x.begin()) return y.front();
  if (above == x.end()) return y.back();
  const std::size_t i = static_cast<std::size_t>(above - x.begin());
  return y[i - 1] + (y[i] - y[i - 1]) * (at - x[i - 1]) / (x[i] - x[i - 1]);
}

// Trapezoid rule in equal steps of speed; the density of a Weibull distribution may be infinite at 0, so the
// exceedance is differenced instead.
double weibull_loss(const loads::Weibull& wind, const LossCurve& loss, double to_axis, double up_to) {
  constexpr int steps = 400;
  double sum = 0;
  for (int i = 0; i < steps; ++i) {
    const double from = up_to * i / steps, to = up_to * (i + 1) / steps;
    sum +=
        (loads::exceedance(wind, from) - loads::exceedance(wind, to)) * loss.both(to_axis * (from + to) / 2);
  }
  return sum;
}

struct Hour {
  double speed = 0, loss = 0, weight = 1;
};

// One row from the hours of a record: stowed from the hour that reaches the trigger until one whose speed is
// below the resume speed (a dwell of more than an hour asks as many such hours in a row).
PriceRow record_row(const std::vector<Hour>& hours, double trigger, double resume, double dwell,
                    double year) {
  PriceRow row;
  double above = 0, stowed = 0, light_stowed = 0, lost = 0, all = 0;
  const int calm_needed = std::max(1, static_cast<int>(std::ceil(dwell / 3600)));
  bool parked = false;
  int calm = 0;
  for (const Hour& hour : hours) {
    all += hour.weight;
    if (hour.speed >= trigger) {
      above += hour.weight > 0 ? 1 : 0;
      parked = true;
      calm = 0;
    } else if (parked) {
      calm = hour.speed < resume ? calm + 1 : 0;
      if (calm >= calm_needed) parked = false;
    }
    if (parked) {
      stowed += hour.weight > 0 ? 1 : 0;
      light_stowed += hour.weight;
    } else {
      lost += hour.weight * hour.loss;
    }
  }
  const double scale = year / static_cast<double>(hours.size());  // a gap stands for an average hour
  row.hours_above = above * scale;
  row.hours_stowed = stowed * scale;
  row.share_stowed = all > 0 ? light_stowed / all : 0;
  row.share_lost = all > 0 ? lost / all : 0;
  return row;
}

// Hours that count: those with a speed and, where the beam is recorded, all of them weighted by it.
std::vector<Hour> hours_of(const WindRecord& record, const TroughDesign& design, const LossCurve& loss,
                           double to_axis) {
  std::vector<Hour> out;
  const bool sided = !record.direction.empty() && !std::isnan(design.row.row_azimuth);
  for (std::size_t i = 0; i < record.speed.size(); ++i) {
    if (std::isnan(record.speed[i])) continue;
    Hour hour;
    hour.speed = record.speed[i];
    hour.weight = record.beam.empty() ? 1 : std::isnan(record.beam[i]) ? 0 : record.beam[i];
    const double mean = to_axis * hour.speed;
    if (sided && !std::isnan(record.direction[i])) {
      // The row's azimuth is the bearing of +X, 90 deg clockwise of +Y.
      const double psi = loads::wrap_angle(record.direction[i] - design.row.row_azimuth + 90 * deg);
      const double across = mean * std::sqrt(loads::yaw_factor(loads::yaw(psi)));
      hour.loss = loss.at(loads::upwind_side(psi) > 0 ? loss.from_plus : loss.from_minus, across);
    } else {
      hour.loss = loss.both(mean);
    }
    out.push_back(hour);
  }
  return out;
}

}  // namespace

double LossCurve::at(const std::vector<double>& side, double mean_speed) const {
  return between(speed, side, mean_speed);
}

double LossCurve::both(double mean_speed) const {
  return 0.5 * (at(from_plus, mean_speed) + at(from_minus, mean_speed));
}

LossCurve loss_curve(const std::vector<LightCurve>& light) {
  LossCurve out;
  double most = 0;
  for (const LightCurve& c : light) most = std::max(most, c.speed.back());
  for (double v = 0; v <= most + 1e-9; v += 0.5) out.speed.push_back(v);
  const auto mean = [&](bool plus) {
    std::vector<double> lost(out.speed.size(), 0.0);
    int count = 0;
    for (const LightCurve& c : light) {
      if ((loads::upwind_side(c.wind_from) > 0) != plus || !(c.intercept.front() > 0)) continue;
      ++count;
      for (std::size_t i = 0; i < out.speed.size(); ++i)
        lost[i] += 1 - between(c.speed, c.intercept, out.speed[i]) / c.intercept.front();
    }
    for (double& l : lost) l /= std::max(1, count);
    return lost;
  };
  out.from_plus = mean(true);
  out.from_minus = mean(false);
  return out;
}

Price stow_price(const TroughDesign& design, const WindLimits& limits, const Trigger& trigger,
                 const WindRecord* record) {
  Price out;
  const YearInput& year = design.wind.year;
  if (!year.given || !trigger.known || (!record && std::isnan(year.weibull_scale))) return out;
  out.known = true;
  out.daylight = year.hours == "daylight";
  out.hours = out.daylight ? daylight_hours : loads::hours_per_year;
  // The same stated wind at the meter and at the axis; then the meter's mean from the 10 min mean there.
  loads::StatedWind stated;
  stated.speed = 10;
  stated.averaging = year.averaging;
  stated.height = year.height;
  const loads::Site site = site_of(design.site);
  const double at_meter = loads::wind_at(trigger.meter.height, stated, site).mean_speed / stated.speed;
  out.record_to_axis = loads::wind_at(limits.axis.height, stated, site).mean_speed / stated.speed;
  out.to_record = trigger.to_ten_minutes / at_meter;
  char how[200];
  std::snprintf(how, sizeof how,
                "10 min mean at the meter (%.3g m) %.3f of the record's; at the axis %.3f; meter's mean over "
                "its 10 min "
                "mean %.3f",
                trigger.meter.height, at_meter, out.record_to_axis, 1 / trigger.to_ten_minutes);
  out.how = how;
  const LossCurve loss = loss_curve(limits.light);
  const loads::Weibull weibull{year.weibull_scale, year.weibull_shape};
  std::vector<Hour> hours;
  double year_of_record = out.hours;
  if (record) {
    hours = hours_of(*record, design, loss, out.record_to_axis);
    if (hours.empty()) return {};
    out.source = record->source;
    out.gaps = record->gaps;
    out.weighted = !record->beam.empty();
    if (out.weighted) {
      // Then the record itself says which hours are daylight.
      const auto lit = std::count_if(hours.begin(), hours.end(), [](const Hour& h) { return h.weight > 0; });
      out.daylight = true;
      year_of_record = loads::hours_per_year;
      out.hours = year_of_record * static_cast<double>(lit) / static_cast<double>(hours.size());
    }
    out.directions = !record->direction.empty() && !std::isnan(design.row.row_azimuth);
  } else {
    char text[80];
    std::snprintf(text, sizeof text, "Weibull %.3g m/s, shape %.3g", weibull.scale, weibull.shape);
    out.source = text;
  }
  for (int step = -rows_each_side; step <= rows_each_side; ++step) {
    const double v = trigger.speed + step;
    if (v <= 0) continue;
    const double in_record = v * out.to_record;
    PriceRow row;
    if (record) {
      row = record_row(hours, in_record, in_record * trigger.resume / trigger.speed, trigger.dwell,
                       year_of_record);
    } else {
      row.hours_above = loads::hours_above(weibull, in_record, out.hours);
      row.share_stowed = row.hours_above / out.hours;
      row.share_lost = weibull_loss(weibull, loss, out.record_to_axis, in_record);
    }
    row.trigger = v;
    if (step == 0) out.at = static_cast<int>(out.rows.size());
    out.rows.push_back(row);
  }
  return out;
}

}  // namespace focalframe::models
