#include "cli/report_json.h"

#include <cmath>
#include <nlohmann/json.hpp>

#include "cli/json_parts.h"
#include "cli/report_optics.h"

namespace focalframe::cli {
namespace {

using Json = nlohmann::ordered_json;
using models::Assessment;

// A number that was not computed is null, never 0.
Json number(double value) { return std::isfinite(value) ? Json(value) : Json(nullptr); }

const char* suffix(models::Quantity q) {
  switch (q) {
    case models::Quantity::ratio:
      return "ratio";
    case models::Quantity::angle:
      return "rad";
    case models::Quantity::length:
      return "m";
    case models::Quantity::pressure:
      return "Pa";
    case models::Quantity::torque:
      return "N_m";
    case models::Quantity::force:
      return "N";
    case models::Quantity::speed:
      return "m_s";
    case models::Quantity::time:
      return "s";
    default:
      return "";
  }
}

Json state(const models::State& s) {
  return {{"kind", models::state_text(s.kind)},
          {"elevation_rad", s.elevation},
          {"wind_from_rad", s.wind_from},
          {"words", models::place_text(s)}};
}

Json criterion(const models::Criterion& c) {
  const char* questions[] = {"focus", "together", "drive", "ground"};
  return {{"question", questions[static_cast<int>(c.question)]},
          {"key", c.key},
          {"name", c.name},
          {"unit", suffix(c.quantity)},
          {"value", number(c.value)},
          {"limit", number(c.limit)},
          {"limit_is", c.at_least ? "least" : "most"},
          {"judged", c.judged()},
          {"met", c.judged() ? Json(c.met()) : Json(nullptr)},
          {"used_ratio", c.judged() ? number(c.used()) : Json(nullptr)},
          {"decided_in", c.decided_in},
          {"note", c.note}};
}

Json trace(const models::RowTrace& t) {
  if (t.traced.rays == 0) return nullptr;
  return {{"rays", t.traced.rays},
          {"intercept_ratio", number(t.traced.intercept)},
          {"interval_99_9_ratio", {number(t.low), number(t.high)}},
          {"analytic_ratio", number(t.analytic)},
          {"allowance_ratio", number(t.allowance)},
          {"agrees", t.agrees}};
}

Json optical(const models::OpticalRow& row) {
  const models::OpticalResult& r = row.result;
  Json parts = Json::array();
  for (const models::PartLoss& p : r.attribution.parts)
    parts.push_back(
        {{"part", p.name}, {"lost_alone_ratio", number(p.alone)}, {"won_if_mended_ratio", number(p.mended)}});
  return {{"state", state(row.state)},
          {"calm", row.calm},
          {"also", row.also},
          {"pattern", row.calm ? "none" : models::spread_text(row.spread)},
          {"intercept_ratio", number(r.intercept)},
          {"intercept_sensor_at_drive_ratio", number(r.intercept_at_drive)},
          {"intercept_row_mean_aim_ratio", number(r.intercept_row_mean)},
          {"module_intercept_ratio", r.module_intercept},
          {"module_twist_rad", r.module_twist},
          {"sensor_reading_rad", number(r.sensor_reading)},
          {"worst_twist_rad", number(r.worst_twist)},
          {"slope_rms_rad", number(r.slope)},
          {"slope_rms_before_fit_rad", number(r.slope_before)},
          {"slope_rms_along_row_rad", number(r.slope_along)},
          {"slope_rms_panel_rad", number(r.slope_panel)},
          {"focal_change_m", number(r.focal_change)},
          {"focal_shift_m", number(r.focal_shift)},
          {"receiver_shift_m", number(r.receiver_shift)},
          {"receiver_lateral_m", number(r.receiver_lateral)},
          {"receiver_axial_m", number(r.receiver_axial)},
          {"rim_deflection_m", number(r.rim_deflection)},
          {"loss_ratio", number(r.attribution.loss)},
          {"loss_parts", parts},
          {"loss_interaction_ratio", number(r.attribution.interaction)},
          {"trace", trace(row.trace)}};
}

Json winds(const Assessment& a) {
  Json list = Json::array();
  for (const models::WindUse& use : a.winds) {
    Json chain = Json::array();
    for (const loads::ChainStep& s : use.at_axis.chain)
      chain.push_back({{"what", s.what}, {"value", number(s.value)}, {"unit", s.unit}, {"how", s.how}});
    list.push_back({{"kind", models::state_text(use.kind)},
                    {"height_m", number(use.at_axis.height)},
                    {"density_kg_m3", number(use.at_axis.density)},
                    {"turbulence_ratio", number(use.at_axis.turbulence)},
                    {"mean_speed_m_s", number(use.at_axis.mean_speed)},
                    {"gust_speed_m_s", number(use.at_axis.gust_speed)},
                    {"mean_pressure_Pa", number(use.at_axis.mean_pressure)},
                    {"gust_pressure_Pa", number(use.at_axis.gust_pressure)},
                    {"size_factor_ratio", number(use.size_factor)},
                    {"chain", chain}});
  }
  return list;
}

Json wind_loads(const Assessment& a) {
  Json list = Json::array();
  for (const models::WindChainRow& r : a.wind_loads)
    list.push_back({{"state", state(r.state)},
                    {"gust", r.gust},
                    {"pressure_Pa", number(r.pressure)},
                    {"pitch_rad", number(r.pitch)},
                    {"Ca", r.table.Ca},
                    {"Cs", r.table.Cs},
                    {"Cm", r.table.Cm},
                    {"zone_Ca_ratio", r.zone.Ca},
                    {"zone_Cs_ratio", r.zone.Cs},
                    {"zone_Cm_ratio", r.zone.Cm},
                    {"yaw_ratio", r.yaw_factor},
                    {"area_m2", r.area},
                    {"width_m", r.width},
                    {"axial_N", number(r.axial)},
                    {"side_N", number(r.side)},
                    {"moment_vertex_N_m", number(r.moment_vertex)},
                    {"moment_axis_N_m", number(r.moment_axis)},
                    {"pattern", models::spread_text(r.spread)},
                    {"slope_b_ratio", number(r.straight.slope)},
                    {"rim_upwind_ratio", number(r.straight.edge_upwind)},
                    {"rim_downwind_ratio", number(r.straight.edge_downwind)},
                    {"residual_side_ratio", number(r.straight.residual_side)},
                    {"thin_shell", r.thin_shell},
                    {"receiver_drag_N", number(r.receiver)},
                    {"tube_and_ribs_drag_N", number(r.frame)},
                    {"pylon_drag_N", number(r.pylons)},
                    {"along_row_N", number(r.along)},
                    {"total_error_ratio", number(r.total_error)}});
  return list;
}

Json actions(const Assessment& a) {
  Json poses = Json::array(), dynamics = Json::array();
  for (const models::ActionRow& row : a.actions)
    poses.push_back({{"elevation_rad", row.elevation},
                     {"snow_N_per_m", number(row.amounts.snow_per_length)},
                     {"snow_centre_m", number(row.amounts.snow_lever)},
                     {"water_N_per_m", number(row.amounts.water_per_length)},
                     {"ice_kg", number(row.amounts.ice_mass)},
                     {"earthquake_m_s2", number(row.amounts.earthquake)}});
  for (const loads::ChainStep& s : a.dynamics.chain)
    dynamics.push_back({{"what", s.what}, {"value", number(s.value)}, {"unit", s.unit}, {"how", s.how}});
  return {{"poses", poses},
          {"receiver_expansion_m", number(a.receiver_expansion)},
          {"receiver_post_drop_m", number(a.receiver_drop)},
          {"torsional_frequency_Hz", number(a.dynamics.frequency)},
          {"dynamic_factor_ratio", number(a.dynamics.factor)},
          {"dynamic_chain", dynamics}};
}

Json strength(const Assessment& a) {
  Json groups = Json::array();
  for (const auto& [group, use] : a.strength.groups)
    groups.push_back({{"group", group},
                      {"part", use.part},
                      {"stress_Pa", number(use.stress)},
                      {"allowed_Pa", use.allowed > 0 ? Json(use.allowed) : Json(nullptr)},
                      {"state", state(use.state)},
                      {"pattern", models::spread_text(use.spread)},
                      {"combination", use.combination}});
  Json buckling = Json::array();
  for (const auto& [group, use] : a.strength.buckling)
    buckling.push_back({{"group", group},
                        {"part", use.part},
                        {"used_ratio", number(use.used)},
                        {"compression_N", number(use.compression)},
                        {"resistance_N", number(use.resistance)},
                        {"state", state(use.state)},
                        {"pattern", models::spread_text(use.spread)}});
  Json curve = Json::array();
  for (const auto& [elevation, torque] : a.strength.moving_torque)
    curve.push_back({{"elevation_rad", elevation}, {"moving_torque_N_m", torque}});
  Json feet = Json::array();
  const char* names[6] = {"Fx_N", "Fy_N", "Fz_N", "Mx_N_m", "My_N_m", "Mz_N_m"};
  for (std::size_t i = 0; i < 6; ++i)
    for (const models::FootReaction* foot : {&a.strength.greatest[i], &a.strength.least[i]})
      feet.push_back({{"extreme_of", names[i]},
                      {"pylon", foot->stand + 1},
                      {"reaction_N_and_N_m", foot->value},
                      {"combination", foot->combination},
                      {"state", state(foot->state)}});
  return {{"rule", a.rule},
          {"groups", groups},
          {"buckling", buckling},
          {"moving_torque_N_m", number(std::abs(a.strength.moving.torque))},
          {"holding_torque_N_m", number(std::abs(a.strength.holding.torque))},
          {"moving_torque_by_elevation", curve},
          {"foot_reactions", feet}};
}

Json cures(const Assessment& a) {
  Json list = Json::array();
  for (const models::Cure& c : a.cures) {
    Json missed = Json::array();
    for (const models::Criterion& m : c.still_missed) missed.push_back(m.key);
    list.push_back({{"changes", c.changes},
                    {"meets_all", c.meets_all},
                    {"still_missed", missed},
                    {"intercept_ratio", number(c.intercept)},
                    {"moving_torque_N_m", number(c.moving_torque)},
                    {"mass_kg", number(c.mass)},
                    {"mass_change_kg", number(c.mass_change)},
                    {"mirror_lost_m2", c.mirror_lost}});
  }
  return list;
}

}  // namespace

Json number_json(double value) { return number(value); }
Json criterion_json(const models::Criterion& c) { return criterion(c); }
Json winds_json(const Assessment& a) { return winds(a); }

std::string trough_json(const Assessment& a, const std::string& hash, const models::Trigger* trigger) {
  const char* verdicts[] = {"HOLDS", "DOES NOT HOLD", "HOLDS AS FAR AS JUDGED"};
  const char* answers[] = {"yes", "no", "not judged"};
  Json questions = Json::object();
  const char* names[] = {"keeps_the_focus", "keeps_together", "turns_and_stays_put", "stands"};
  for (std::size_t i = 0; i < 4; ++i) questions[names[i]] = answers[static_cast<int>(a.answers[i])];
  Json criteria = Json::array(), optics = Json::array(), guesses = Json::array(), remarks = Json::array();
  for (const auto& c : a.criteria) criteria.push_back(criterion(c));
  for (const auto& row : a.optics) optics.push_back(optical(row));
  for (const auto& g : a.deciding_guesses)
    guesses.push_back({{"element", g.element},
                       {"attribute", g.attribute},
                       {"value_si", number(g.value)},
                       {"turns_at_si", number(g.flips_at)},
                       {"words", g.text}});
  for (const auto& r : a.remarks) remarks.push_back(r.text);
  Json stow = nullptr;
  if (trigger && trigger->known)
    stow = {{"trigger_m_s", number(trigger->speed)},
            {"meter_height_m", trigger->meter.height},
            {"meter_averaging_s", trigger->meter.averaging},
            {"governing", models::limit_word(trigger->basis.governing.key)},
            {"at", state(trigger->basis.at)}};
  const Json out = {{"schema", "focalframe-trough-1"},
                    {"program_version", FOCALFRAME_VERSION},
                    {"input_hash", hash},
                    {"name", a.name},
                    {"verdict", verdicts[static_cast<int>(a.verdict)]},
                    {"limits_judged", a.limits_judged},
                    {"limits_missed", a.limits_missed},
                    {"questions", questions},
                    {"criteria", criteria},
                    {"stow", stow},
                    {"not_judged", a.not_judged},
                    {"guesses", a.guesses},
                    {"deciding_guesses", guesses},
                    {"row",
                     {{"aperture_m", a.aperture},
                      {"length_m", a.length},
                      {"focal_length_m", a.focal_length},
                      {"rim_angle_rad", a.rim_angle},
                      {"axis_to_vertex_m", number(a.axis_to_vertex)},
                      {"mirror_area_m2", a.mirror_area},
                      {"mass_kg", a.mass},
                      {"mass_per_area_kg_m2", a.mass_per_area},
                      {"stand_mass_kg", a.stand_mass},
                      {"centre_of_gravity_behind_axis_m", number(a.centre_below_axis)},
                      {"weight_torque_N_m", number(a.weight_torque)},
                      {"balancing_counterweight_kg", number(a.balancing_counterweight)},
                      {"undeformed_intercept_ratio", number(a.undeformed)},
                      {"beam_rms_rad", number(a.beam_rms)}}},
                    {"wind",
                     {{"table", a.table},
                      {"title", a.table_title},
                      {"confidence", a.table_confidence},
                      {"source", a.table_source},
                      {"zone", a.zone},
                      {"states", winds(a)},
                      {"loads", wind_loads(a)},
                      {"row_moment_coefficient_ratio", number(a.row_moment_coefficient)},
                      {"rated_moment_coefficient_ratio", number(a.rated_moment_coefficient)},
                      {"wind_up_speed_m_s", number(a.divergence_speed)},
                      {"wind_up_state", state(a.divergence_state)}}},
                    {"actions", actions(a)},
                    {"optics", optics},
                    {"light", Json::parse(optics_study_json(a))},
                    {"strength", strength(a)},
                    {"cures", cures(a)},
                    {"proof",
                     {{"wind_force_N", number(a.proof.wind_force)},
                      {"q_area_coefficient_N", number(a.proof.q_area_c)},
                      {"load_error_ratio", number(a.proof.load_error)},
                      {"balance_ratio", number(a.proof.balance)},
                      {"residual_ratio", number(a.proof.residual)},
                      {"condition_estimate_ratio", number(a.proof.condition)},
                      {"slope_change_halved_elements_ratio", number(a.proof.slope_change)},
                      {"intercept_change_halved_elements_ratio", number(a.proof.intercept_change)},
                      {"freedoms", a.freedoms}}},
                    {"remarks", remarks},
                    {"not_checked", a.not_checked},
                    {"cautions", a.cautions}};
  return out.dump(1) + "\n";
}

}  // namespace focalframe::cli
