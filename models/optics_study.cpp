#include "models/optics_study.h"

#include <algorithm>
#include <cmath>

#include "models/profile.h"

namespace focalframe::models {
namespace {

using Eigen::MatrixXd;
using Eigen::VectorXd;

std::vector<double> flat(const MatrixXd& m) { return {m.data(), m.data() + m.size()}; }

std::vector<Attribution> by_module(const OpticsCheck& check, const std::vector<MissPart>& parts) {
  const Skin& skin = check.row().collector().skin;
  const auto count = static_cast<std::ptrdiff_t>(skin.stations * skin.rows);
  std::vector<Attribution> modules;
  for (int i = 0; i < skin.modules; ++i) {
    std::vector<MissPart> own;
    for (const MissPart& part : parts) {
      const auto from = part.miss.begin() + i * count;
      own.push_back({part.name, {from, from + count}});
    }
    modules.push_back(
        attribute(check.intercept(),
                  std::span<const double>(check.weight())
                      .subspan(static_cast<std::size_t>(i * count), static_cast<std::size_t>(count)),
                  own));
  }
  return modules;
}

AimChoices aim_choices(const OpticsCheck& check, const OpticalMotion& m) {
  AimChoices aims;
  aims.readings = check.readings(m);
  const auto caught = [&](double back) { return check.caught(check.miss(m, back)); };
  aims.none = caught(0);
  aims.encoder = caught(aims.readings.encoder);
  aims.inclinometer = caught(aims.readings.inclinometer);
  aims.sun = caught(aims.readings.sun);
  aims.row_mean = caught(aims.readings.row_mean);
  return aims;
}

ErrorBudget budget_of(const OpticsCheck& check, const std::vector<MissPart>& parts) {
  std::vector<BudgetLine> lines = budget_lines(check.beam());
  const VectorXd r = check.aim_lever();
  const auto rows = static_cast<std::size_t>(r.size());
  for (const MissPart& part : parts) {
    double square = 0, area = 0;
    for (std::size_t i = 0; i < part.miss.size(); ++i) {
      const double a = check.weight()[i];
      square += a * std::pow(part.miss[i] / r[static_cast<Eigen::Index>(i % rows)], 2);
      area += a;
    }
    lines.push_back(
        {part.name, std::sqrt(square / area), ErrorOf::beam, ErrorMeasure::line, ErrorNature::systematic});
  }
  return add_up(std::move(lines));
}

PlayBound play_bound(const OpticsCheck& check, const TroughDesign& design, const PoseModel& pose,
                     const MatrixXd& miss) {
  const Collector& row = check.row().collector();
  const Skin& skin = row.skin;
  PlayBound bound;
  bound.drive = design.drive.play / 2;
  bound.joint = design.end_plates.play / 2;
  const VectorXd friction =
      pose.twist_gain * VectorXd::Constant(skin.modules, design.drive.friction / skin.modules);
  bound.friction_twist = friction.cwiseAbs().maxCoeff();
  VectorXd off(skin.modules);
  for (int i = 0; i < skin.modules; ++i) {
    const int joints = i < row.drive_bearing ? row.drive_bearing - 1 - i : i - row.drive_bearing;
    off[i] = bound.drive + joints * bound.joint + std::abs(friction[i]);
  }
  bound.farthest = off.maxCoeff();
  for (const double sign : {1.0, -1.0}) {
    MatrixXd turned = miss;
    for (int i = 0; i < skin.modules; ++i)
      turned.middleCols(i * skin.stations, skin.stations).colwise() += sign * off[i] * check.aim_lever();
    bound.intercept = std::fmin(bound.intercept, check.caught(turned));
  }
  return bound;
}

TroughShape fit_module(const OpticsCheck& check, const OpticalMotion& m, int module) {
  const Skin& skin = check.row().collector().skin;
  const auto cut = [&](const MatrixXd& a) {
    return flat(MatrixXd(a.middleCols(module * skin.stations, skin.stations)));
  };
  const std::vector<double> v = cut(m.v + m.panel_v), w = cut(m.w + m.panel_w),
                            turn = cut(m.turn + m.panel_turn), along = cut(m.along + m.panel_along),
                            rv = cut(m.receiver.row(0)), rw = cut(m.receiver.row(1));
  const auto first = static_cast<std::size_t>(module * skin.stations * skin.rows);
  TroughSamples samples;
  samples.y = skin.row_y;
  samples.weight = std::span<const double>(check.weight()).subspan(first, v.size());
  samples.v = v;
  samples.w = w;
  samples.rotation = turn;
  samples.receiver_v = rv;
  samples.receiver_w = rw;
  samples.longitudinal = along;
  return fit_shape(check.parabola(), samples);
}

void note_target(const OpticsCheck& check, const TroughDesign& design, OpticsStudy& out) {
  const Collector& row = check.row().collector();
  const double gap = row.skin.station_x.front() - row.skin.bay_share.front() * row.skin.bay;
  double length = 0;
  for (double l : row.skin.station_weight) length += l;
  out.end_loss = end_loss(check.parabola(), length, check.beam().incidence, gap);
  out.shade_receiver = std::max(row.receiver_drag_width, 2 * check.target_half_width()) / row.width;
  const ProfileInput& post = design.receiver.posts.profile;
  const double wide = std::isnan(post.width) ? profile_depth(post) : post.width;
  out.behind_posts = design.receiver.posts.per_module * wide / design.row.module_length;
  out.panel_method = check.panel().method();
}

}  // namespace

OpticsStudy study_optics(const OpticsCheck& check, const TroughDesign& design, const PoseModel& pose,
                         const VectorXd& weight, const VectorXd& all) {
  MatrixXd both(all.size(), 2);
  both << weight, all;
  const std::vector<OpticalMotion> motions = check.motions(pose, both);
  const OpticalMotion &calm = motions[0], &windy = motions[1];
  OpticsStudy out;
  out.made = true;
  out.aims = aim_choices(check, windy);
  const double back = check.correction(out.aims.readings), calm_back = check.correction(check.readings(calm));
  const MatrixXd miss = check.miss(windy, back), of_weight = check.miss(calm, calm_back);
  const std::vector<MissPart> parts = check.parts(windy, back);
  out.causes =
      attribute(check.intercept(), check.weight(),
                std::vector<MissPart>{{"weight", flat(of_weight)}, {"wind", flat(miss - of_weight)}});
  out.perfect = out.causes.undeformed;
  out.by_weight = attribute(check.intercept(), check.weight(), check.parts(calm, calm_back));
  out.modules = by_module(check, parts);
  out.budget = budget_of(check, parts);
  out.play = play_bound(check, design, pose, miss);
  const Eigen::RowVectorXd drive = pose.bearing_force.row(check.row().drive_turn());
  out.play.torque_weight = drive * weight;
  out.play.torque_all = drive * all;

  const double caught = check.caught(miss);
  out.re_aim_least = std::isnan(design.limits.intercept) ? 0.9 * caught : design.limits.intercept;
  const VectorXd lever = check.aim_lever();
  const std::vector<double> misses = flat(miss), levers(lever.data(), lever.data() + lever.size());
  out.re_aim_angle = aim_tolerance(check.intercept(), misses, levers, check.weight(), out.re_aim_least);
  out.re_aim_time = out.re_aim_angle / sun_rate;
  for (std::size_t i = 0; i < out.modules.size(); ++i)
    if (out.modules[i].intercept < out.modules[static_cast<std::size_t>(out.module)].intercept)
      out.module = static_cast<int>(i);
  out.fit = fit_module(check, windy, out.module);
  out.slope_radial = std::hypot(out.fit.slope_rms_after, out.fit.longitudinal_slope_rms);
  note_target(check, design, out);
  return out;
}

}  // namespace focalframe::models
