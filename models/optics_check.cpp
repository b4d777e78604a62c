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

// The receiver against the focus carried along by the tube: the vertex line's motion and the rotation about
// it.
void OpticsCheck::look_at_receiver(const Eigen::Vector2d& receiver, const Eigen::Vector2d& vertex,
                                   double twist, OpticalResult& out) const {
  const double lateral = receiver[0] - vertex[0] + parabola_.focal_length * twist;
  const double axial = receiver[1] - vertex[1];
  const double shift = std::hypot(lateral, axial);
  if (shift <= out.receiver_shift) return;
  out.receiver_shift = shift;
  out.receiver_lateral = lateral;
  out.receiver_axial = axial;
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

  // Every cross-section on its own: the tube twists inside a module too, and that is twist, not shape.
  std::vector<MissPart> parts = {{"twist", {}}, {"receiver", {}}, {"focus", {}}, {"ribs", {}}};
  const auto append = [](std::vector<double>& to, const std::vector<double>& more) {
    to.insert(to.end(), more.begin(), more.end());
  };
  double along = 0, area = 0;
  for (int i = 0; i < skin.modules; ++i) {
    double length = 0, before = 0, after = 0;
    for (int st = i * skin.stations; st < (i + 1) * skin.stations; ++st) {
      const int first = st * rows;
      const double twist = m.turn[first + rows / 2];  // this row rides on the tube itself
      TroughSamples section;
      section.y = skin.row_y;
      section.weight = skin.row_weight;
      section.v = part(m.v, first, rows);
      section.w = part(m.w, first, rows);
      section.rotation = part(m.turn, first, rows);
      section.receiver_v = part(m.receiver, 2 * st, 1);
      section.receiver_w = part(m.receiver, 2 * st + 1, 1);
      const TroughShape shape = fit_shape(parabola_, section);
      const TroughMissParts split =
          split_miss(parabola_, section, shape, std::span<const double>(&twist, 1), out.sensor_reading);
      append(parts[0].miss, split.twist);
      append(parts[1].miss, split.receiver);
      append(parts[2].miss, split.focus);
      std::vector<double> ribs = split.residual;
      for (std::size_t s = 0; s < ribs.size(); ++s) ribs[s] += split.tilt[s];
      append(parts[3].miss, ribs);

      const double weight = skin.station_weight[static_cast<std::size_t>(st)];
      length += weight;
      before += weight * shape.slope_rms * shape.slope_rms;
      after += weight * shape.slope_rms_after * shape.slope_rms_after;
      out.focal_change = keep_greater(out.focal_change, shape.focal_change);
      out.focal_shift = keep_greater(out.focal_shift, shape.focal_line_w);
      look_at_receiver(m.receiver.segment<2>(2 * st), m.vertex.segment<2>(2 * st), twist, out);
      for (int r : {0, rows - 1}) {
        const double rim = skin.row_y[static_cast<std::size_t>(r)];
        const double v = m.v[first + r] - m.vertex[2 * st] + twist * parabola_.height(rim);
        const double w = m.w[first + r] - m.vertex[2 * st + 1] - twist * rim;
        const fem::Vec3 normal = area_normal(rim, parabola_.focal_length).normalized();
        out.rim_deflection = keep_greater(out.rim_deflection, v * normal.y() + w * normal.z());
      }
      for (int s = first; s < first + rows; ++s) {
        along += weight_[static_cast<std::size_t>(s)] * m.along[s] * m.along[s];
        area += weight_[static_cast<std::size_t>(s)];
      }
    }
    out.slope = std::fmax(out.slope, std::sqrt(after / length));
    out.slope_before = std::fmax(out.slope_before, std::sqrt(before / length));
    const int first = i * skin.stations * rows, count = skin.stations * rows;
    out.module_intercept.push_back(intercept_.mean(
        part(miss, first, count), std::span<const double>(weight_).subspan(static_cast<std::size_t>(first),
                                                                           static_cast<std::size_t>(count))));
    if (out.module_intercept.back() < out.module_intercept[static_cast<std::size_t>(out.worst_module)])
      out.worst_module = i;
  }
  out.slope_along = std::sqrt(along / area);
  out.attribution = attribute(intercept_, weight_, parts);
  return out;
}

}  // namespace focalframe::models
