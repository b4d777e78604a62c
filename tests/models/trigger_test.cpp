// From the row's limit to the meter's reading: the printed steps must multiply to the trigger, and the price
// must be what a Weibull distribution and a record say in closed form.

#include <catch2/catch.hpp>
#include <cmath>

#include "loads/gust_in_mean.h"
#include "loads/statistics.h"
#include "models/wind_price.h"
#include "tests/support/trough_design.h"

using namespace focalframe;
using namespace focalframe::models;

namespace {

// Limits as if found: turning bears 20 m/s, tracking more.
WindLimits some_limits(const TroughDesign& d) {
  WindLimits limits;
  limits.axis = axis_wind(d);
  limits.turning.judged = limits.operate_safe.judged = limits.operate.judged = true;
  limits.turning.kind = StateKind::turning;
  limits.turning.gust = 20;
  limits.operate_safe.gust = 24;
  limits.operate.gust = 9;
  Way way;
  way.from = d.operation.track_to;
  way.to = d.operation.stow_at;
  way.time = 240;
  limits.ways = {way};
  for (const double from : {0.0, 3.14159265358979323846}) {
    LightCurve light{1.0, from, {0, 10, 20}, {0.9, 0.9, 0.45}};
    limits.light.push_back(light);
  }
  return limits;
}

TroughDesign metered() {
  TroughDesign d = support::small_row();
  d.operation.anemometer = {6, 60, 0.5, "free"};
  d.wind.year.given = true;
  d.wind.year.weibull_scale = 5;
  d.wind.year.weibull_shape = 2;
  d.wind.year.averaging = 600;
  d.wind.year.height = 10;
  d.wind.year.hours = "daylight";
  return d;
}

}  // namespace

TEST_CASE("the steps of the chain lead from the limit to the trigger", "[trigger]") {
  const TroughDesign d = metered();
  const Trigger t = stow_trigger(d, some_limits(d), meter_of(d));
  REQUIRE(t.known);
  double speed = t.axis_gust;
  CHECK(speed == 20);
  for (const TriggerStep& step : t.steps) {
    speed = step.sign == '*' ? speed * step.by : step.sign == '/' ? speed / step.by : speed - step.by;
    CHECK(step.after == Approx(speed));
    CHECK_FALSE(step.source.empty());
  }
  // EN 1991-1-4 terrain II: gusts at 6 m over those below z_min = 2 m, by c_r and I_v of the standard's
  // formulas: 0.190 ln(6 / 0.05) sqrt(1 + 7 x 0.2089) over 0.190 ln(2 / 0.05) sqrt(1 + 7 x 0.2711).
  const double height =
      std::log(120) / std::log(40) * std::sqrt((1 + 7 / std::log(120)) / (1 + 7 / std::log(40)));
  const double by_hand = 20 * height / 1.49 / (1 + 0.1 * std::sqrt(4)) - 0.5;
  CHECK(t.speed == Approx(std::floor(10 * by_hand) / 10));
  CHECK(t.second == Approx(std::floor(10 * 0.85 * 20 * height) / 10));
  CHECK(t.resume == Approx(std::floor(10 * 0.8 * t.speed) / 10));
  CHECK(t.dwell == 1200);
}

TEST_CASE("a step the user settles replaces ours and says so", "[trigger]") {
  TroughDesign d = metered();
  d.operation.trigger = {"safety", 1.2, 0.9, 1.5, 1.25, 0.8, 0.7, 600};
  const Trigger t = stow_trigger(d, some_limits(d), meter_of(d));
  CHECK(t.steps.back().after == Approx(20 * 1.2 * 0.9 / 1.5 / 1.25 - 0.5));
  CHECK(t.second == Approx(std::floor(10 * 0.8 * 20 * 1.2 * 0.9) / 10));
  CHECK(t.resume == Approx(std::floor(10 * 0.7 * t.speed + 1e-9) / 10));
  CHECK(t.dwell == 600);
  for (const TriggerStep& step : t.steps) CHECK(step.source == "yours");
}

TEST_CASE("the trigger may be drawn by the light", "[trigger]") {
  TroughDesign d = metered();
  const double safe = stow_trigger(d, some_limits(d), meter_of(d)).axis_gust;
  d.operation.trigger.from = "light";
  CHECK(stow_trigger(d, some_limits(d), meter_of(d)).axis_gust == 9);
  CHECK(safe == 20);
}

TEST_CASE("slower hands and meters among the rows ask for an earlier trigger", "[trigger]") {
  TroughDesign d = metered();
  const double driven = stow_trigger(d, some_limits(d), meter_of(d)).speed;
  d.operation.turned_by = "hand";
  d.operation.notice = 15 * 60;
  const Trigger by_hand = stow_trigger(d, some_limits(d), meter_of(d));
  CHECK(by_hand.travel == Approx(240 + 900));
  CHECK(by_hand.speed < driven);
  d.operation.turned_by = "drive";
  d.operation.anemometer.place = "among-rows";
  CHECK(stow_trigger(d, some_limits(d), meter_of(d)).speed < driven);
  CHECK(default_growth(0) == 1);
  CHECK(default_growth(1e6) == 1.5);
}

TEST_CASE("without an anemometer a hand-held meter at 2 m is read for a minute", "[trigger]") {
  TroughDesign d = support::small_row();
  const Meter meter = meter_of(d);
  CHECK(meter.hand_held);
  CHECK(meter.height == 2);
  CHECK(meter.averaging == 60);
  CHECK(stow_trigger(d, some_limits(d), meter).known);
}

TEST_CASE("nothing judged means no trigger, not a high one", "[trigger]") {
  const TroughDesign d = metered();
  WindLimits limits = some_limits(d);
  limits.turning = limits.operate_safe = {};
  CHECK_FALSE(stow_trigger(d, limits, meter_of(d)).known);
}

TEST_CASE("a mean over a longer time hides a greater gust", "[trigger]") {
  using loads::Exposure3s;
  for (const auto exposure : {Exposure3s::in_land, Exposure3s::off_land, Exposure3s::off_sea}) {
    CHECK(loads::gust_in_mean(exposure, 3) == 1);
    for (double t = 3; t < 3600; t *= 2)
      CHECK(loads::gust_in_mean(exposure, 2 * t) >= loads::gust_in_mean(exposure, t));
  }
  // WMO/TD-1555, in-land (from memory).
  CHECK(loads::gust_in_mean(Exposure3s::in_land, 60) == Approx(1.49));
  CHECK(loads::gust_in_mean(Exposure3s::in_land, 600) == Approx(1.66));
  CHECK(loads::gust_in_mean(Exposure3s::in_land, 3600) == Approx(1.75));
}

TEST_CASE("Beaufort's forces follow 0.836 B^1.5", "[trigger]") {
  for (int force = 1; force <= 12; ++force) {
    // Middle of a force by the formula of the WMO scale (from memory).
    CHECK(loads::beaufort(0.836 * std::pow(force, 1.5)) == force);
    CHECK(loads::beaufort(loads::beaufort_from(force)) == force);
    CHECK(loads::beaufort(loads::beaufort_from(force) - 0.01) == force - 1);
  }
}

TEST_CASE("hours above the trigger follow Weibull's distribution", "[price]") {
  TroughDesign d = metered();
  d.operation.anemometer = {10, 600, 0, "free"};  // the record's own terms
  const WindLimits limits = some_limits(d);
  const Trigger t = stow_trigger(d, limits, meter_of(d));
  const Price price = stow_price(d, limits, t, nullptr);
  REQUIRE(price.known);
  // The standard's own profile gives 1.007 at 10 m over terrain II.
  CHECK(price.to_record == Approx(1 / (0.19 * std::log(200))));
  for (const PriceRow& row : price.rows) {
    CHECK(row.hours_above == Approx(4380 * std::exp(-std::pow(row.trigger * price.to_record / 5, 2))));
    // No light is lost up to 10 m/s at the axis, 5 % of the calm light for each further m/s:
    // integral of 0.05 (a v - 10) over the distribution, by parts the integral of exp(-(v/5)^2).
    const double a = price.record_to_axis, from = 10 / a, to = std::max(row.trigger * price.to_record, from);
    const double sqrt_pi = std::sqrt(3.14159265358979323846);
    const double area = 5 * sqrt_pi / 2 * (std::erf(to / 5) - std::erf(from / 5));
    const double exact = 0.05 * a * (area - (to - from) * std::exp(-to * to / 25));
    CHECK(row.share_lost == Approx(exact).margin(1e-5));
  }
  CHECK(price.rows[static_cast<std::size_t>(price.at)].trigger == t.speed);
}

TEST_CASE("a record is counted hour by hour, with the wait for the resume speed", "[price]") {
  TroughDesign d = metered();
  d.operation.anemometer = {10, 600, 0, "free"};
  d.wind.year.hours = "all";
  const WindLimits limits = some_limits(d);
  const Trigger t = stow_trigger(d, limits, meter_of(d));
  WindRecord record;
  // Ten hours: calm, one above, three between resume speed and trigger, then calm again.
  const double between = (t.speed + t.resume) / 2;
  record.speed = {0, t.speed + 0.3, between, between, between, 0, 0, 0, 0, not_given};
  const Price all = stow_price(d, limits, t, &record);
  const PriceRow& row = all.rows[static_cast<std::size_t>(all.at)];
  CHECK(row.hours_above == Approx(8760.0 / 9));
  CHECK(row.hours_stowed == Approx(4 * 8760.0 / 9));
  // Weighted with the beam: only hours with light count.
  record.beam = {0, 500, 500, 0, 0, 1000, 0, 0, 0, 0};
  const Price lit = stow_price(d, limits, t, &record);
  CHECK(lit.weighted);
  CHECK(lit.rows[static_cast<std::size_t>(lit.at)].share_stowed == Approx(0.5));
  CHECK(lit.hours == Approx(8760.0 * 3 / 9));
}

TEST_CASE("a wind along the row costs less light than one across it", "[price]") {
  TroughDesign d = metered();
  d.operation.anemometer = {10, 600, 0, "free"};
  d.row.row_azimuth = 90 * deg;  // the row runs east, +Y is north
  WindLimits limits = some_limits(d);
  limits.turning.gust = limits.operate_safe.gust = 60;
  limits.light[0].intercept = {0.9, 0.9, 0.0};  // wind from +Y hurts more
  const Trigger t = stow_trigger(d, limits, meter_of(d));
  const auto lost = [&](double bearing) {
    WindRecord record;
    record.speed = std::vector<double>(24, 18);
    record.direction = std::vector<double>(24, bearing * deg);
    const Price price = stow_price(d, limits, t, &record);
    return price.rows[static_cast<std::size_t>(price.at)].share_lost;
  };
  CHECK(lost(0) > lost(180));
  CHECK(lost(90) < lost(180));
  CHECK(lost(30) < lost(0));
}
