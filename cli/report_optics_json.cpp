#include <cmath>
#include <nlohmann/json.hpp>

#include "cli/report_optics.h"

namespace focalframe::cli {
namespace {

using Json = nlohmann::ordered_json;
using models::Attribution;
using models::OpticsStudy;

Json number(double value) { return std::isfinite(value) ? Json(value) : Json(nullptr); }

Json losses(const Attribution& a) {
  Json parts = Json::array();
  for (const models::PartLoss& p : a.parts)
    parts.push_back(
        {{"part", p.name}, {"lost_alone_ratio", number(p.alone)}, {"won_if_mended_ratio", number(p.mended)}});
  return {{"intercept_ratio", number(a.intercept)},
          {"loss_ratio", number(a.loss)},
          {"loss_parts", parts},
          {"loss_interaction_ratio", number(a.interaction)}};
}

Json budget(const models::ErrorBudget& b) {
  Json lines = Json::array();
  for (const models::BudgetLine& line : b.lines)
    lines.push_back({{"name", line.name},
                     {"stated_rms_rad", number(line.rms)},
                     {"stated_of", line.of == models::ErrorOf::normal ? "normal" : "beam"},
                     {"beam_rms_rad", number(models::beam_rms(line))},
                     {"nature", line.nature == models::ErrorNature::random ? "random" : "systematic"}});
  return {{"lines", lines}, {"random_beam_rms_rad", number(b.random)}};
}

Json study(const OpticsStudy& s) {
  if (!s.made) return nullptr;
  Json modules = Json::array();
  for (const Attribution& m : s.modules) modules.push_back(losses(m));
  const auto aim = [](double caught, double reading) {
    return Json{{"intercept_ratio", number(caught)}, {"reading_rad", number(reading)}};
  };
  const models::PlayBound& p = s.play;
  const models::TroughShape& f = s.fit;
  return {{"noise_loss_ratio", number(1 - s.perfect)},
          {"modules", modules},
          {"causes", losses(s.causes)},
          {"weight_alone", losses(s.by_weight)},
          {"aims",
           {{"none", aim(s.aims.none, 0)},
            {"encoder", aim(s.aims.encoder, s.aims.readings.encoder)},
            {"inclinometer", aim(s.aims.inclinometer, s.aims.readings.inclinometer)},
            {"sun", aim(s.aims.sun, s.aims.readings.sun)},
            {"row_mean", aim(s.aims.row_mean, s.aims.readings.row_mean)}}},
          {"error_budget", budget(s.budget)},
          {"play_bound",
           {{"half_drive_play_rad", number(p.drive)},
            {"half_joint_play_rad", number(p.joint)},
            {"friction_twist_rad", number(p.friction_twist)},
            {"farthest_module_rad", number(p.farthest)},
            {"intercept_ratio", number(p.intercept)},
            {"drive_torque_weight_N_m", number(p.torque_weight)},
            {"drive_torque_state_N_m", number(p.torque_all)},
            {"torque_reverses", p.reverses()}}},
          {"re_aim",
           {{"least_intercept_ratio", number(s.re_aim_least)},
            {"angle_rad", number(s.re_aim_angle)},
            {"time_s", number(s.re_aim_time)}}},
          {"best_fit",
           {{"module", s.module + 1},
            {"vertex_across_m", number(f.vertex_v)},
            {"vertex_axial_m", number(f.vertex_w)},
            {"tilt_rad", number(f.tilt)},
            {"focal_change_m", number(f.focal_change)},
            {"rank", f.rank},
            {"condition_ratio", number(f.condition)},
            {"height_rms_after_m", number(f.height_rms)},
            {"slope_across_rms_before_rad", number(f.slope_rms)},
            {"slope_across_rms_after_rad", number(f.slope_rms_after)},
            {"slope_along_rms_rad", number(f.longitudinal_slope_rms)},
            {"slope_radial_rms_after_rad", number(s.slope_radial)},
            {"focus_deviation_rms_m", number(f.focus_deviation)},
            {"focal_shift_across_m", number(f.focal_line_v)},
            {"focal_shift_axial_m", number(f.focal_line_w)}}},
          {"not_in_intercept",
           {{"end_loss_ratio", number(s.end_loss)},
            {"receiver_shadow_ratio", number(s.shade_receiver)},
            {"behind_posts_ratio", number(s.behind_posts)}}},
          {"panel_method", s.panel_method}};
}

Json matrix(const Eigen::MatrixXd& m) {
  Json rows = Json::array();
  for (Eigen::Index r = 0; r < m.rows(); ++r) {
    Json row = Json::array();
    for (Eigen::Index c = 0; c < m.cols(); ++c) row.push_back(number(m(r, c)));
    rows.push_back(std::move(row));
  }
  return rows;
}

// Matrices as in models/optical_maps.h: one row per y, one column per x.
Json maps(const models::ApertureMaps& m, const models::ReceiverMap& r) {
  if (m.x.empty()) return nullptr;
  const bool tube = r.target == models::LineReceiver::tube;
  return {{"aperture",
           {{"x_m", m.x},
            {"y_m", m.y},
            {"module_of_x", m.module},
            {"slope_across_rad", matrix(m.slope)},
            {"slope_along_rad", matrix(m.slope_along)},
            {"miss_m", matrix(m.miss)},
            {"intercept_ratio", matrix(m.intercept)}}},
          {"receiver",
           {{"target", tube ? "tube" : "strip"},
            {tube ? "angle_from_vertex_side_rad" : "across_m", r.place},
            {"bin_width_m", number(r.bin)},
            {"flux_suns", r.flux},
            {"flux_worst_module_suns", r.worst}}}};
}

Json rigging(const models::Rigging& r) {
  if (std::isnan(r.best.least)) return nullptr;
  const auto one = [](const models::RiggingChoice& c) {
    return Json{{"set_true_rad", number(c.set_true)},
                {"least_intercept_ratio", number(c.least)},
                {"mean_intercept_ratio", number(c.mean)}};
  };
  Json tried = Json::array();
  for (const models::RiggingChoice& c : r.tried) tried.push_back(one(c));
  return {{"now", one(r.now)}, {"best", one(r.best)}, {"tried", tried}};
}

}  // namespace

std::string optics_study_json(const models::Assessment& a) {
  return Json{
      {"study", study(a.study)}, {"maps", maps(a.maps, a.receiver_map)}, {"rigging", rigging(a.rigging)}}
      .dump();
}

}  // namespace focalframe::cli
