#include "models/optics_check.h"

#include <algorithm>
#include <cmath>

#include "models/wind_load.h"

namespace focalframe::models {
namespace {

using Eigen::MatrixXd;
using Eigen::VectorXd;

std::span<const double> part(const VectorXd& all, int first, int count) {
  return {all.data() + first, static_cast<std::size_t>(count)};
}

double keep_greater(double greatest, double value) {
  return std::isnan(greatest) || std::abs(value) > std::abs(greatest) ? value : greatest;
}

}  // namespace

BeamError beam_error(const OpticsInput& optics) {
  BeamError error;
  if (optics.sun_shape == "pillbox")
    error.sun = pillbox_sun();
  else if (optics.sun_shape == "buie")
    error.sun = buie_sun(optics.circumsolar_ratio);
  else
    error.sun = gaussian_sun(optics.sun);
  error.slope_rms = error.longitudinal_slope_rms =
      std::isnan(optics.workshop_slope) ? 0 : optics.workshop_slope;
  error.scatter_rms = optics.mirror_scatter;
  error.tracking_rms = optics.tracking;
  error.incidence = optics.incidence;
  return error;
}

OpticsCheck::OpticsCheck(const RowModel& row, const TroughDesign& design)
    : row_(row),
      parabola_{row.collector().width, row.collector().focal_length},
      beam_(beam_error(design.optics)),
      intercept_(parabola_, row.collector().receiver_radius, beam_, row.collector().skin.row_y),
      sensor_kind_(design.sensor.kind),
      correction_(design.sensor.correction) {
  const Skin& skin = row.collector().skin;
  for (double along : skin.station_weight)
    for (double across : skin.row_weight) weight_.push_back(along * across);
  for (double y : row.collector().skin.row_y) terms_.push_back(miss_terms(parabola_, y));
  if (!std::isnan(design.optics.set_true)) {
    set_ = motion(row.pose(design.optics.set_true), weight_amplitudes(row, design.optics.set_true));
  }
}

OpticsCheck::Motion OpticsCheck::motion(const PoseModel& pose, const MatrixXd& amplitudes) const {
  Motion m;
  m.v = row_.evaluate(row_.mirror_v, pose, amplitudes);
  m.w = row_.evaluate(row_.mirror_w, pose, amplitudes);
  m.turn = row_.evaluate(row_.mirror_turn, pose, amplitudes);
  m.along = row_.evaluate(row_.mirror_along, pose, amplitudes);
  m.receiver = row_.evaluate(row_.receiver, pose, amplitudes);
  m.vertex = row_.evaluate(row_.vertex, pose, amplitudes);
  m.module_turn = row_.evaluate(row_.module_turn, pose, amplitudes);
  m.sensor = row_.evaluate(row_.sensor_turn, pose, amplitudes);
  const int head = 6 * row_.collector().drive_bearing + fem::rx;
  m.encoder = (pose.bearing_motion.row(row_.drive_turn()) - pose.head_motion.row(head)) * amplitudes;
  if (set_.v.size() > 0) {
    MatrixXd* const now[] = {&m.v,      &m.w,           &m.turn,   &m.along,  &m.receiver,
                             &m.vertex, &m.module_turn, &m.sensor, &m.encoder};
    const MatrixXd* const set[] = {&set_.v,           &set_.w,        &set_.turn,
                                   &set_.along,       &set_.receiver, &set_.vertex,
                                   &set_.module_turn, &set_.sensor,   &set_.encoder};
    for (std::size_t i = 0; i < 9; ++i) now[i]->colwise() -= set[i]->col(0);
  }
  return m;
}

std::vector<OpticalResult> OpticsCheck::look(const PoseModel& pose, const MatrixXd& amplitudes) const {
  const Motion all = motion(pose, amplitudes);
  std::vector<OpticalResult> results;
  for (int c = 0; c < amplitudes.cols(); ++c) results.push_back(look_at(all, c));
  return results;
}

OpticalResult OpticsCheck::look_at(const Motion& all, int column) const {
  const Skin& skin = row_.collector().skin;
  const int rows = skin.rows, stations = skin.modules * skin.stations, samples = skin.samples();
  struct {
    VectorXd v, w, turn, along, receiver, vertex, module_turn;
    double sensor, encoder;
  } const m{all.v.col(column),           all.w.col(column),        all.turn.col(column),
            all.along.col(column),       all.receiver.col(column), all.vertex.col(column),
            all.module_turn.col(column), all.sensor(0, column),    all.encoder(0, column)};
  VectorXd raw(samples);
  double aim_top = 0, aim_bottom = 0;
  for (int st = 0; st < stations; ++st)
    for (int r = 0; r < rows; ++r) {
      const int s = st * rows + r;
      const MissTerms& t = terms_[static_cast<std::size_t>(r)];
      raw[s] = t.mirror_v * m.v[s] + t.mirror_w * m.w[s] + t.rotation * m.turn[s] +
               t.receiver_v * m.receiver[2 * st] + t.receiver_w * m.receiver[2 * st + 1];
      const double a = weight_[static_cast<std::size_t>(s)];
      aim_top -= a * t.aim * raw[s];
      aim_bottom += a * t.aim * t.aim;
    }

  OpticalResult out;
  const double drive_angle = sensor_kind_ == "encoder" ? m.encoder
                             : sensor_kind_ == "sun"   ? aim_top / aim_bottom
                                                       : m.sensor;
  const double row_mean = m.module_turn.mean();
  out.sensor_reading = correction_ == "none" ? 0 : correction_ == "row-mean" ? row_mean : drive_angle;
  const auto aimed = [&](double back) {
    VectorXd miss = raw;
    for (int st = 0; st < stations; ++st)
      for (int r = 0; r < rows; ++r) miss[st * rows + r] += terms_[static_cast<std::size_t>(r)].aim * back;
    return miss;
  };
  const auto caught = [&](const VectorXd& miss) { return intercept_.mean(part(miss, 0, samples), weight_); };
  const VectorXd miss = aimed(out.sensor_reading);
  out.intercept = caught(miss);
  out.intercept_at_drive = caught(aimed(drive_angle));
  out.intercept_row_mean = caught(aimed(row_mean));
  for (int i = 0; i < skin.modules; ++i) out.module_twist.push_back(m.module_turn[i] - out.sensor_reading);
  for (double t : out.module_twist) out.worst_twist = keep_greater(out.worst_twist, t);
  out.worst_twist = std::abs(out.worst_twist);

  const int per_module = skin.stations * rows;
  std::vector<double> y;
  for (int s = 0; s < per_module; ++s) y.push_back(skin.row_y[static_cast<std::size_t>(s % rows)]);
  std::vector<MissPart> parts = {{"twist", {}}, {"receiver", {}}, {"focus", {}}, {"ribs", {}}};
  double along = 0, area = 0;
  for (int i = 0; i < skin.modules; ++i) {
    const int first = i * per_module;
    std::vector<double> receiver_v, receiver_w;
    for (int st = i * skin.stations; st < (i + 1) * skin.stations; ++st) {
      receiver_v.push_back(m.receiver[2 * st]);
      receiver_w.push_back(m.receiver[2 * st + 1]);
      // Against the focus carried along by the tube: the vertex line's motion and the module's rotation about
      // it.
      const double lateral =
          m.receiver[2 * st] - m.vertex[2 * st] + parabola_.focal_length * m.module_turn[i];
      const double axial = m.receiver[2 * st + 1] - m.vertex[2 * st + 1];
      const double shift = std::hypot(lateral, axial);
      if (std::isnan(out.receiver_shift) || shift > out.receiver_shift) {
        out.receiver_shift = shift;
        out.receiver_lateral = lateral;
        out.receiver_axial = axial;
      }
    }
    TroughSamples samples_of;
    samples_of.y = y;
    samples_of.weight = std::span<const double>(weight_).subspan(static_cast<std::size_t>(first),
                                                                 static_cast<std::size_t>(per_module));
    samples_of.v = part(m.v, first, per_module);
    samples_of.w = part(m.w, first, per_module);
    samples_of.rotation = part(m.turn, first, per_module);
    samples_of.longitudinal = part(m.along, first, per_module);
    samples_of.receiver_v = receiver_v;
    samples_of.receiver_w = receiver_w;
    const TroughShape shape = fit_shape(parabola_, samples_of);
    if (std::isnan(out.slope) || shape.slope_rms_after > out.slope) out.slope = shape.slope_rms_after;
    if (std::isnan(out.slope_before) || shape.slope_rms > out.slope_before)
      out.slope_before = shape.slope_rms;
    out.focal_change = keep_greater(out.focal_change, shape.focal_change);
    out.focal_shift = keep_greater(out.focal_shift, shape.focal_line_w);
    const double twist[] = {m.module_turn[i]};
    const TroughMissParts split = split_miss(parabola_, samples_of, shape, twist, out.sensor_reading);
    const auto append = [](std::vector<double>& to, const std::vector<double>& more) {
      to.insert(to.end(), more.begin(), more.end());
    };
    append(parts[0].miss, split.twist);
    append(parts[1].miss, split.receiver);
    append(parts[2].miss, split.focus);
    std::vector<double> ribs = split.residual;
    for (std::size_t s = 0; s < ribs.size(); ++s) ribs[s] += split.tilt[s];
    append(parts[3].miss, ribs);
    out.module_intercept.push_back(intercept_.mean(part(miss, first, per_module), samples_of.weight));
    if (out.module_intercept.back() < out.module_intercept[static_cast<std::size_t>(out.worst_module)])
      out.worst_module = i;
    for (int s = first; s < first + per_module; ++s) {
      along += weight_[static_cast<std::size_t>(s)] * m.along[s] * m.along[s];
      area += weight_[static_cast<std::size_t>(s)];
    }
  }
  out.slope_along = std::sqrt(along / area);
  out.attribution = attribute(intercept_, weight_, parts);
  return out;
}

}  // namespace focalframe::models
