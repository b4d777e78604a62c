#include "cli/dish_json.h"

#include <nlohmann/json.hpp>

#include "cli/json_parts.h"

namespace focalframe::cli {
namespace {

using Json = nlohmann::ordered_json;
using models::DishAssessment;

Json state(const models::DishState& s) {
  return {{"kind", models::state_text(s.state.kind)},
          {"elevation_rad", s.state.elevation},
          {"wind_from_rad", s.state.wind_from},
          {"hour_angle_rad", s.hour},
          {"words", models::place_text(s)}};
}

Json turn(const Eigen::Vector2d& v) { return Json::array({v.x(), v.y()}); }

Json force(const models::DishForce& f, const char* key) {
  return {{key, number_json(f.value)}, {"state", state(f.state)}};
}

Json optical(const models::DishOpticalRow& row) {
  const models::DishOptical& r = row.result;
  return {{"state", state(row.state)},
          {"calm", row.calm},
          {"pattern", row.calm ? "none" : models::spread_text(row.spread)},
          {"intercept_ratio", number_json(r.intercept)},
          {"slope_rms_rad", number_json(r.slope)},
          {"slope_rms_before_fit_rad", number_json(r.slope_before)},
          {"focal_change_m", number_json(r.focal_change)},
          {"receiver_along_axis_m", number_json(r.focus_along)},
          {"receiver_across_axis_m", number_json(r.focus_across)},
          {"skin_motion_m", number_json(r.skin_move)},
          {"aim_error_rad", number_json(r.aim_error)},
          {"beam_turn_base_rad", turn(r.pointing.base)},
          {"beam_turn_bearing_rad", turn(r.pointing.bearing)},
          {"beam_turn_drive_rad", turn(r.pointing.drive)},
          {"beam_turn_dish_rad", turn(r.pointing.dish)},
          {"half_path_rms_m", number_json(r.half_path)},
          {"surface_loss_dB", number_json(r.surface_db)},
          {"defocus_loss_dB", number_json(r.defocus_db)},
          {"pointing_loss_dB", number_json(r.pointing_db)},
          {"gain_loss_dB", number_json(r.gain_loss)},
          {"pointing_beamwidths", number_json(r.pointing_beams)}};
}

Json gravity(const models::GravityMap& map, bool radio) {
  Json points = Json::array();
  for (const models::GravityPoint& p : map.points)
    points.push_back({{"elevation_rad", p.elevation},
                      {radio ? "half_path_rms_m" : "slope_rms_rad", number_json(p.surface)},
                      {"beam_turn_rad", turn(p.pointing)},
                      {"receiver_along_axis_m", number_json(p.focus_along)}});
  return {{"by_elevation", points},
          {radio ? "worst_half_path_m" : "worst_slope_rad", number_json(map.worst)},
          {"best_set_true_rad", number_json(map.best_set)},
          {radio ? "worst_half_path_at_best_m" : "worst_slope_at_best_rad", number_json(map.worst_at_best)},
          {"pointing_offset_rad", number_json(map.offset)},
          {"pointing_cos_rad", number_json(map.sag_cos)},
          {"pointing_sin_rad", number_json(map.sag_sin)},
          {"pointing_left_over_rms_rad", number_json(map.left_over)}};
}

Json uses(const std::map<std::string, models::DishUse>& groups, const char* value, const char* allowed) {
  Json list = Json::array();
  for (const auto& [group, use] : groups)
    if (!use.part.empty())
      list.push_back({{"group", group},
                      {"part", use.part},
                      {value, number_json(use.value)},
                      {allowed, use.allowed > 0 ? Json(use.allowed) : Json(nullptr)},
                      {"state", state(use.state)},
                      {"pattern", models::spread_text(use.spread)}});
  return list;
}

Json mount(const DishAssessment& a) {
  const char* unit = a.slewing ? "torque_N_m" : "push_N";
  Json curve = Json::array(), ground = Json::array();
  for (const auto& [elevation, at] : a.strength.drive)
    curve.push_back({{"elevation_rad", elevation},
                     {"arm_m", a.slewing ? Json(nullptr) : number_json(at.arm)},
                     {"length_m", a.slewing ? Json(nullptr) : number_json(at.length)},
                     {std::string("weight_") + unit, number_json(at.weight)},
                     {std::string("moving_") + unit, number_json(at.moving)},
                     {std::string("holding_") + unit, number_json(at.holding)},
                     {std::string("back_driving_") + unit, number_json(at.back_driving)},
                     {"euler_load_N", a.slewing ? Json(nullptr) : number_json(at.buckling)}});
  const char* names[6] = {"Fx_N", "Fy_N", "Fz_N", "Mx_N_m", "My_N_m", "Mz_N_m"};
  for (std::size_t i = 0; i < 6; ++i) {
    ground.push_back(force(a.strength.greatest[i], names[i]));
    ground.push_back(force(a.strength.least[i], names[i]));
  }
  return {{"elevation_drive", curve},
          {"moving", force(a.strength.moving, unit)},
          {"holding", force(a.strength.holding, unit)},
          {"azimuth_moving", force(a.strength.azimuth_moving, "torque_N_m")},
          {"azimuth_holding", force(a.strength.azimuth_holding, "torque_N_m")},
          {"elevation_bearing", force(a.strength.bearing, "radial_N")},
          {"ground_reactions", ground},
          {"overturning", force(a.strength.overturning, "moment_N_m")},
          {"uplift", force(a.strength.uplift, "pull_N")}};
}

Json parking(const DishAssessment& a) {
  Json list = Json::array();
  for (const models::DishLimit& l : a.parking)
    list.push_back({{"elevation_rad", l.elevation},
                    {"wind_from_rad", l.wind_from},
                    {"gust_limit_m_s", number_json(l.gust)},
                    {"gives_first", l.governs}});
  const auto pose = [](const models::DishStowPose& p) {
    return Json{{"elevation_rad", number_json(p.elevation)},
                {"azimuth", p.azimuth},
                {"gust_limit_m_s", number_json(p.gust)},
                {"gives_first", p.governs}};
  };
  return {{"by_pose", list},
          {"asked", pose(a.stow.asked)},
          {"best_any_azimuth", pose(a.stow.any)},
          {"best_azimuth_turned", pose(a.stow.turned)}};
}

Json proof(const DishAssessment& a) {
  const models::Proof& p = a.common.proof;
  return {{"wind_force_N", number_json(p.wind_force)},
          {"q_area_coefficient_N", number_json(p.q_area_c)},
          {"load_error_ratio", number_json(p.load_error)},
          {"balance_ratio", number_json(p.balance)},
          {"residual_ratio", number_json(p.residual)},
          {"condition_estimate_ratio", number_json(p.condition)},
          {"slope_change_halved_elements_ratio", number_json(p.slope_change)},
          {a.radio ? "gain_change_halved_elements_dB" : "intercept_change_halved_elements_ratio",
           number_json(p.intercept_change)},
          {"in_plane_force_on_hub_ratio", number_json(a.residual_side)},
          {"freedoms", a.common.freedoms}};
}

Json geometry(const DishAssessment& a) {
  return {{"use", a.radio ? "antenna" : "solar"},
          {"diameter_m", a.diameter},
          {"focal_length_m", a.focal_length},
          {"rim_angle_rad", a.rim_angle},
          {"aperture_area_m2", a.common.mirror_area},
          {"skin_area_m2", a.surface_area},
          {"mass_kg", a.common.mass},
          {"counterweight_kg", a.counterweight},
          {"mass_per_area_kg_m2", a.mass_per_area},
          {"yoke_mass_kg", a.yoke_mass},
          {"base_mass_kg", a.base_mass},
          {"centre_of_gravity_behind_axis_m", number_json(a.centre_behind_axis)},
          {"weight_torque_N_m", number_json(a.weight_torque)},
          {"lowest_frequency_hz", number_json(a.frequency)},
          {"undeformed_intercept_ratio", number_json(a.common.undeformed)},
          {"beam_rms_rad", number_json(a.common.beam_rms)},
          {"wavelength_m", number_json(a.wavelength)},
          {"beamwidth_rad", number_json(a.beamwidth)},
          {"as_built_loss_dB", number_json(a.built_db)}};
}

}  // namespace

std::string dish_json(const DishAssessment& a, const std::string& hash) {
  const char* verdicts[] = {"HOLDS", "DOES NOT HOLD", "HOLDS AS FAR AS JUDGED"};
  const char* answers[] = {"yes", "no", "not judged"};
  const char* names[] = {"keeps_the_focus", "keeps_together", "turns_and_stays_put", "stands"};
  Json questions = Json::object(), criteria = Json::array(), optics = Json::array(), remarks = Json::array();
  for (std::size_t i = 0; i < 4; ++i) questions[names[i]] = answers[static_cast<int>(a.common.answers[i])];
  for (const auto& c : a.common.criteria) criteria.push_back(criterion_json(c));
  for (const auto& row : a.optics) optics.push_back(optical(row));
  for (const auto& r : a.common.remarks) remarks.push_back(r.text);
  const Json out = {{"schema", "focalframe-dish-1"},
                    {"program_version", FOCALFRAME_VERSION},
                    {"input_hash", hash},
                    {"name", a.common.name},
                    {"verdict", verdicts[static_cast<int>(a.common.verdict)]},
                    {"limits_judged", a.common.limits_judged},
                    {"limits_missed", a.common.limits_missed},
                    {"questions", questions},
                    {"criteria", criteria},
                    {"not_judged", a.common.not_judged},
                    {"guesses", a.common.guesses},
                    {"dish", geometry(a)},
                    {"wind",
                     {{"table", a.common.table},
                      {"title", a.common.table_title},
                      {"confidence", a.common.table_confidence},
                      {"source", a.common.table_source},
                      {"zone", a.common.zone},
                      {"states", winds_json(a.common)}}},
                    {"optics", optics},
                    {"weight", gravity(a.gravity, a.radio)},
                    {"held_water",
                     {{"volume_m3", number_json(a.bowl.water)},
                      {"force_N", number_json(a.bowl.water_force)},
                      {"yield_used_ratio", number_json(a.bowl.water_stress_used)},
                      {"part", a.bowl.water_part}}},
                    {"strength",
                     {{"rule", a.common.rule},
                      {"stress", uses(a.strength.stress, "stress_Pa", "allowed_Pa")},
                      {"buckling", uses(a.strength.buckling, "push_N", "allowed_N")}}},
                    {"mount", mount(a)},
                    {"parking", parking(a)},
                    {"proof", proof(a)},
                    {"remarks", remarks},
                    {"not_checked", a.common.not_checked},
                    {"cautions", a.common.cautions}};
  return out.dump(1) + "\n";
}

}  // namespace focalframe::cli
