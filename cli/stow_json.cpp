#include "cli/stow_json.h"

#include <cmath>
#include <nlohmann/json.hpp>

#include "fem/units.h"

namespace focalframe::cli {
namespace {

using Json = nlohmann::ordered_json;

Json number(double value) { return std::isfinite(value) ? Json(value) : Json(nullptr); }

Json criterion(const models::CriterionLimit& c) {
  return {{"criterion", models::limit_word(c.key)},
          {"averaging_s", c.averaging},
          {"speed_m_s", number(c.speed)},
          {"gust_3s_m_s", number(c.gust)},
          {"pattern", models::spread_text(c.spread)},
          {"gust_angle_rad", c.gust_angle},
          {"part", c.part}};
}

Json place(const models::State& s) {
  return {{"elevation_rad", s.elevation}, {"wind_from_rad", s.wind_from}, {"words", models::place_text(s)}};
}

Json state(const models::StateLimit& s) {
  Json out = {{"kind", models::state_text(s.kind)},
              {"from_rad", number(s.from)},
              {"to_rad", number(s.to)},
              {"judged", s.judged},
              {"covered_by_table", s.covered},
              {"wind_limit_gust_m_s", s.judged ? number(s.gust) : Json(nullptr)},
              {"asked_gust_m_s", number(s.asked)},
              {"holds", s.judged ? Json(s.holds()) : Json(nullptr)}};
  if (s.judged) {
    out["governing"] = criterion(s.governing);
    out["at"] = place(s.at);
    if (std::isfinite(s.next.gust)) {
      out["next"] = criterion(s.next);
      out["next_at"] = place(s.next_at);
    }
  }
  return out;
}

Json trigger(const models::Trigger& t) {
  Json steps = Json::array();
  for (const models::TriggerStep& s : t.steps)
    steps.push_back({{"operation", std::string(1, s.sign)},
                     {"by", s.by},
                     {"what", s.what},
                     {"source", s.source},
                     {"after_m_s", s.after}});
  return {{"known", t.known},
          {"meter_height_m", t.meter.height},
          {"meter_averaging_s", t.meter.averaging},
          {"meter_tolerance_m_s", t.meter.tolerance},
          {"hand_held", t.meter.hand_held},
          {"from_gust_at_axis_m_s", number(t.axis_gust)},
          {"travel_s", number(t.travel)},
          {"steps", steps},
          {"trigger_m_s", number(t.speed)},
          {"second_trigger_gust_m_s", number(t.second)},
          {"resume_m_s", number(t.resume)},
          {"dwell_s", number(t.dwell)},
          {"light_short_from_10min_m_s", number(t.light_speed)},
          {"trigger_as_10min_mean_at_10m_m_s", number(t.mean_at_10m)},
          {"beaufort", t.beaufort}};
}

// Every cell carries all its criteria; for a direction psi the limit is divided by sqrt(load share).
Json map(const models::WindLimits& w) {
  Json cells = Json::array(), shares = Json::array();
  for (const models::PoseLimit& p : w.map) {
    Json criteria = Json::array();
    for (const models::CriterionLimit& c : p.criteria) criteria.push_back(criterion(c));
    cells.push_back({{"kind", models::state_text(p.kind)},
                     {"elevation_rad", p.elevation},
                     {"wind_from_rad", p.wind_from},
                     {"covered_by_table", p.covered},
                     {"criteria", criteria}});
  }
  models::PoseLimit one;
  one.criteria = {{}};
  one.criteria[0].gust = 1;
  for (int k = 0; k < 24; ++k)
    shares.push_back({{"wind_from_rad", 15 * k * deg},
                      {"gust_limit_over_side_limit", models::gust_from(one, 15 * k * deg)}});
  return {{"cells", cells}, {"directions", shares}};
}

Json price(const models::Price& p) {
  if (!p.known) return nullptr;
  Json rows = Json::array();
  for (const models::PriceRow& r : p.rows)
    rows.push_back({{"trigger_m_s", r.trigger},
                    {"above_h", number(r.hours_above)},
                    {"stowed_with_wait_h", number(r.hours_stowed)},
                    {"light_stowed_ratio", number(r.share_stowed)},
                    {"light_lost_below_ratio", number(r.share_lost)}});
  return {{"source", p.source},
          {"daylight", p.daylight},
          {"beam_weighted", p.weighted},
          {"directions_used", p.directions},
          {"hours_h", p.hours},
          {"record_over_meter_ratio", p.to_record},
          {"axis_over_record_ratio", p.record_to_axis},
          {"gaps", p.gaps},
          {"rows", rows}};
}

}  // namespace

std::string stow_json(const models::StowReport& r, const std::string& hash) {
  const models::WindLimits& w = r.limits;
  Json ways = Json::array(), shifts = Json::array(), light = Json::array();
  for (const models::Way& way : w.ways)
    ways.push_back({{"from_rad", way.from},
                    {"to_rad", way.to},
                    {"time_s", number(way.time)},
                    {"wind_limit_gust_m_s", number(way.limit.gust)},
                    {"at", place(way.limit.at)}});
  for (const models::TriggerShift& s : r.shifts)
    shifts.push_back({{"what", s.what},
                      {"change_ratio", s.change},
                      {"axis_gust_m_s", number(s.axis_gust)},
                      {"trigger_m_s", number(s.speed)},
                      {"shift_m_s", number(s.shift)},
                      {"governing", models::limit_word(s.governing)},
                      {"governing_changed", s.governing_changed}});
  for (const models::LightCurve& c : w.light)
    light.push_back({{"elevation_rad", c.elevation},
                     {"wind_from_rad", c.wind_from},
                     {"mean_speed_m_s", c.speed},
                     {"intercept_ratio", c.intercept}});
  const Json out = {{"schema", "focalframe-stow-1"},
                    {"version", FOCALFRAME_VERSION},
                    {"input_hash", hash},
                    {"name", r.name},
                    {"table", r.table},
                    {"table_confidence", r.table_confidence},
                    {"zone", r.zone},
                    {"strength_rule", r.rule},
                    {"axis",
                     {{"height_m", w.axis.height},
                      {"air_density_kg_m3", w.axis.density},
                      {"turbulence_ratio", w.axis.turbulence},
                      {"gust_over_mean_ratio", w.axis.gust_over_mean},
                      {"size_and_dynamic_factor_ratio", w.axis.size_factor}}},
                    {"states", {state(w.operate), state(w.turning), state(w.stow), state(w.stuck)}},
                    {"operate_without_light", state(w.operate_safe)},
                    {"ways", ways},
                    {"best_stow",
                     {{"elevation_rad", number(w.best.elevation)},
                      {"parked", state(w.best.parked)},
                      {"way_gust_m_s", number(w.best.way.limit.gust)}}},
                    {"drive_reversal_mean_m_s", number(w.drive_reversal)},
                    {"trigger", trigger(r.trigger)},
                    {"hand_held_trigger", r.hand_held.known ? trigger(r.hand_held) : Json(nullptr)},
                    {"moving_capacity_N_m", number(r.moving_capacity)},
                    {"price", price(r.price)},
                    {"sensitivity", shifts},
                    {"order", w.order},
                    {"reminders", r.trigger.reminders},
                    {"remarks", r.remarks},
                    {"not_covered", r.not_covered},
                    {"map", map(w)},
                    {"light", light}};
  return out.dump(1) + "\n";
}

}  // namespace focalframe::cli
