#include "models/optics_check.h"

#include <algorithm>
#include <cmath>

#include "models/set_true.h"
#include "models/sun_table.h"
#include "models/wind_load.h"

namespace focalframe::models {
namespace {

using Eigen::MatrixXd;
using Eigen::RowVectorXd;
using Eigen::VectorXd;

std::span<const double> span_of(const MatrixXd& m, Eigen::Index from, Eigen::Index count) {
  return {m.data() + from, static_cast<std::size_t>(count)};
}

double greatest(const RowVectorXd& values) {
  Eigen::Index at = 0;
  values.cwiseAbs().maxCoeff(&at);
  return values[at];
}

std::vector<double> flat(const MatrixXd& m) { return {m.data(), m.data() + m.size()}; }

// The module a sensor on the row sits on when none is named: beside the drive.
int sensor_module(const SensorInput& sensor, const Collector& row) {
  if (sensor.module > 0) return sensor.module - 1;
  return std::min(row.drive_bearing, static_cast<int>(row.modules.size()) - 1);
}

}  // namespace

BeamError beam_error(const OpticsInput& optics) {
  BeamError error;
  if (optics.sun_shape == "pillbox")
    error.sun = pillbox_sun();
  else if (optics.sun_shape == "buie")
    error.sun = buie_sun(optics.circumsolar_ratio);
  else if (optics.sun_shape == "table")
    error.sun = sun_of_table(optics.sun_table);
  else
    error.sun = gaussian_sun(optics.sun);
  error.slope_rms = error.longitudinal_slope_rms =
      std::isnan(optics.workshop_slope) ? 0 : optics.workshop_slope;
  error.scatter_rms = optics.mirror_scatter;
  error.tracking_rms = optics.tracking;
  error.incidence = optics.incidence;
  return error;
}

double target_half_width(const ReceiverInput& receiver) {
  return (receiver.catches == "strip" ? receiver.strip_width : receiver.outside_diameter) / 2;
}

LineReceiver target_kind(const ReceiverInput& receiver) {
  return receiver.catches == "strip" ? LineReceiver::strip : LineReceiver::tube;
}

OpticsCheck::OpticsCheck(const RowModel& row, const TroughDesign& design)
    : row_(row),
      parabola_{row.collector().width, row.collector().focal_length},
      beam_(beam_error(design.optics)),
      half_width_(models::target_half_width(design.receiver)),
      target_(target_kind(design.receiver)),
      intercept_(parabola_, half_width_, beam_, row.collector().skin.row_y, target_),
      panel_(design, row),
      sections_(parabola_, row.collector().skin.row_y, row.collector().skin.row_weight),
      sensor_(design.sensor) {
  const Skin& skin = row.collector().skin;
  for (double along : skin.station_weight)
    for (double across : skin.row_weight) weight_.push_back(along * across);
  row_weight_ = Eigen::Map<const VectorXd>(skin.row_weight.data(), skin.rows);
  station_weight_ = Eigen::Map<const VectorXd>(skin.station_weight.data(),
                                               static_cast<Eigen::Index>(skin.station_weight.size()));
  for (VectorXd* v : {&mirror_v_, &mirror_w_, &rotation_, &along_, &aim_}) v->resize(skin.rows);
  for (int r = 0; r < skin.rows; ++r) {
    const double y = skin.row_y[static_cast<std::size_t>(r)];
    const MissTerms t = miss_terms(parabola_, y);
    mirror_v_[r] = t.mirror_v;
    mirror_w_[r] = t.mirror_w;
    rotation_[r] = t.rotation;
    aim_[r] = t.aim;
    // A normal turned along the row turns the ray across it at an incidence angle; light travels towards +x.
    along_[r] = t.rotation * std::tan(beam_.incidence) * std::sin(parabola_.ray_angle(y) / 2);
  }
  if (!std::isnan(design.optics.set_true))
    set_ = motions(row.pose(design.optics.set_true), weight_amplitudes(row, design.optics.set_true), false);
}

std::vector<OpticalMotion> OpticsCheck::motions(const PoseModel& pose, const MatrixXd& amplitudes,
                                                bool set_true) const {
  const Skin& skin = row_.collector().skin;
  const Eigen::Index rows = skin.rows, stations = static_cast<Eigen::Index>(skin.station_x.size());
  const auto of = [&](const LinearOutput& output) { return row_.evaluate(output, pose, amplitudes); };
  const MatrixXd v = of(row_.mirror_v), w = of(row_.mirror_w), turn = of(row_.mirror_turn),
                 along = of(row_.mirror_along), receiver = of(row_.receiver), vertex = of(row_.vertex),
                 module_turn = of(row_.module_turn), beside = of(row_.sensor_turn);
  const int head = 6 * row_.collector().drive_bearing + fem::rx;
  const MatrixXd encoder =
      (pose.bearing_motion.row(row_.drive_turn()) - pose.head_motion.row(head)) * amplitudes;
  const PanelMotion panel = panel_.motion(amplitudes);
  const auto grid = [&](const MatrixXd& m, Eigen::Index c, Eigen::Index height) {
    return MatrixXd(Eigen::Map<const MatrixXd>(m.col(c).data(), height, stations));
  };
  std::vector<OpticalMotion> out;
  for (Eigen::Index c = 0; c < amplitudes.cols(); ++c) {
    OpticalMotion m{
        grid(v, c, rows),       grid(w, c, rows),       grid(turn, c, rows),       grid(along, c, rows),
        grid(panel.v, c, rows), grid(panel.w, c, rows), grid(panel.turn, c, rows), grid(panel.along, c, rows),
        grid(receiver, c, 2),   grid(vertex, c, 2),     module_turn.col(c),        beside(0, c),
        encoder(0, c)};
    out.push_back(set_true && !set_.empty() ? against(std::move(m), set_.front()) : std::move(m));
  }
  return out;
}

MatrixXd OpticsCheck::frame_miss(const OpticalMotion& m) const {
  return mirror_v_.asDiagonal() * m.v + mirror_w_.asDiagonal() * m.w + rotation_.asDiagonal() * m.turn +
         along_.asDiagonal() * m.along - mirror_v_ * m.receiver.row(0) - mirror_w_ * m.receiver.row(1);
}

MatrixXd OpticsCheck::panel_miss(const OpticalMotion& m) const {
  return mirror_v_.asDiagonal() * m.panel_v + mirror_w_.asDiagonal() * m.panel_w +
         rotation_.asDiagonal() * m.panel_turn + along_.asDiagonal() * m.panel_along;
}

MatrixXd OpticsCheck::miss(const OpticalMotion& m, double back) const {
  return (frame_miss(m) + panel_miss(m)).colwise() + back * aim_;
}

SensorReadings OpticsCheck::readings(const OpticalMotion& m) const {
  const Skin& skin = row_.collector().skin;
  const int module = sensor_module(sensor_, row_.collector());
  const MatrixXd raw = miss(m, 0).middleCols(module * skin.stations, skin.stations);
  const VectorXd share = row_weight_.cwiseProduct(aim_);
  const auto along = station_weight_.segment(module * skin.stations, skin.stations);
  SensorReadings read;
  read.encoder = m.encoder;
  read.inclinometer = sensor_.module > 0 ? m.module_turn[module] : m.beside_drive;
  read.sun = -(share.transpose() * raw * along).value() / (share.dot(aim_) * along.sum());
  read.row_mean = m.module_turn.mean();
  return read;
}

double OpticsCheck::correction(const SensorReadings& read, const std::string& kind,
                               const std::string& rule) const {
  if (rule == "none") return 0;
  if (rule == "row-mean") return read.row_mean;
  return kind == "encoder" ? read.encoder : kind == "sun" ? read.sun : read.inclinometer;
}

double OpticsCheck::correction(const SensorReadings& read) const {
  return correction(read, sensor_.kind, sensor_.correction);
}

double OpticsCheck::caught(const MatrixXd& miss) const {
  return intercept_.mean(span_of(miss, 0, miss.size()), weight_);
}

double OpticsCheck::caught(const MatrixXd& miss, int module) const {
  const Skin& skin = row_.collector().skin;
  const Eigen::Index count = skin.stations * skin.rows;
  return intercept_.mean(span_of(miss, module * count, count),
                         std::span<const double>(weight_).subspan(static_cast<std::size_t>(module * count),
                                                                  static_cast<std::size_t>(count)));
}

std::vector<MissPart> OpticsCheck::parts(const OpticalMotion& m, double back) const {
  const Eigen::Index tube = m.v.rows() / 2;  // this row rides on the tube itself
  const SectionFit::Shapes shape = sections_.fit(m.v, m.w, m.turn);
  const RowVectorXd turned = m.turn.row(tube);
  const double mean = m.module_turn.mean(), f = parabola_.focal_length;
  const Eigen::Index stations = turned.size();
  const RowVectorXd lateral = m.receiver.row(0) - shape.vertex_v + f * turned;
  const RowVectorXd axial = m.receiver.row(1) - shape.vertex_w;
  const MatrixXd tilt = aim_ * RowVectorXd::Constant(stations, back - mean);
  const MatrixXd twist = -aim_ * (turned.array() - mean).matrix();
  const MatrixXd receiver = -mirror_v_ * lateral - mirror_w_ * axial;
  const MatrixXd focus = mirror_w_ * shape.focal_change;
  const MatrixXd ribs = (frame_miss(m).colwise() + back * aim_) - tilt - twist - receiver - focus;
  return {{"tilt", flat(tilt)},   {"twist", flat(twist)}, {"receiver", flat(receiver)},
          {"focus", flat(focus)}, {"ribs", flat(ribs)},   {"panel", flat(panel_miss(m))}};
}

std::vector<OpticalResult> OpticsCheck::look(const PoseModel& pose, const MatrixXd& amplitudes,
                                             OpticsDetail detail) const {
  std::vector<OpticalResult> results;
  for (const OpticalMotion& m : motions(pose, amplitudes)) results.push_back(look_at(m, detail));
  return results;
}

OpticalResult OpticsCheck::look_at(const OpticalMotion& m, OpticsDetail detail) const {
  OpticalResult out;
  const SensorReadings read = readings(m);
  out.sensor_reading = correction(read);
  const MatrixXd missed = miss(m, out.sensor_reading);
  out.intercept = caught(missed);
  for (double turn : m.module_turn) out.module_twist.push_back(turn - out.sensor_reading);
  out.worst_twist = (m.module_turn.array() - out.sensor_reading).abs().maxCoeff();
  look_at_shape(m, out);
  look_at_receiver(m, out);
  if (detail != OpticsDetail::all) return out;
  out.intercept_at_drive = caught(miss(m, correction(read, sensor_.kind, "sensor")));
  out.intercept_row_mean = caught(miss(m, read.row_mean));
  for (int i = 0; i < row_.collector().skin.modules; ++i) out.module_intercept.push_back(caught(missed, i));
  out.worst_module =
      static_cast<int>(std::min_element(out.module_intercept.begin(), out.module_intercept.end()) -
                       out.module_intercept.begin());
  out.attribution = attribute(intercept_, weight_, parts(m, out.sensor_reading));
  return out;
}

void OpticsCheck::look_at_shape(const OpticalMotion& m, OpticalResult& out) const {
  const Skin& skin = row_.collector().skin;
  const SectionFit::Shapes shape = sections_.fit(m.v + m.panel_v, m.w + m.panel_w, m.turn + m.panel_turn);
  out.focal_change = greatest(shape.focal_change);
  out.focal_shift = greatest(shape.focal_line_w);
  const VectorXd share = row_weight_ / row_weight_.sum();
  const RowVectorXd before = share.transpose() * shape.slope_before.cwiseAbs2();
  const RowVectorXd after = share.transpose() * shape.slope_after.cwiseAbs2();
  for (int i = 0; i < skin.modules; ++i) {
    const auto along = station_weight_.segment(i * skin.stations, skin.stations);
    const auto rms = [&](const RowVectorXd& square) {
      return std::sqrt(square.segment(i * skin.stations, skin.stations).dot(along) / along.sum());
    };
    out.slope = std::fmax(out.slope, rms(after));
    out.slope_before = std::fmax(out.slope_before, rms(before));
  }
  const auto row_rms = [&](const MatrixXd& slope) {
    return std::sqrt((share.transpose() * slope.cwiseAbs2()).dot(station_weight_) / station_weight_.sum());
  };
  out.slope_along = row_rms(m.along + m.panel_along);
  out.slope_panel = row_rms(m.panel_turn);
}

// The receiver against the focus carried along by the tube (the vertex line's motion and the rotation about
// it), and the rims against the tube.
void OpticsCheck::look_at_receiver(const OpticalMotion& m, OpticalResult& out) const {
  const Skin& skin = row_.collector().skin;
  const RowVectorXd turned = m.turn.row(skin.rows / 2);
  const RowVectorXd lateral = m.receiver.row(0) - m.vertex.row(0) + parabola_.focal_length * turned;
  const RowVectorXd axial = m.receiver.row(1) - m.vertex.row(1);
  Eigen::Index at = 0;
  out.receiver_shift = std::sqrt((lateral.cwiseAbs2() + axial.cwiseAbs2()).maxCoeff(&at));
  out.receiver_lateral = lateral[at];
  out.receiver_axial = axial[at];
  double most = 0;
  for (int r : {0, skin.rows - 1}) {
    const double y = skin.row_y[static_cast<std::size_t>(r)];
    const fem::Vec3 normal = area_normal(y, parabola_.focal_length).normalized();
    const RowVectorXd v = m.v.row(r) - m.vertex.row(0) + turned * parabola_.height(y);
    const RowVectorXd w = m.w.row(r) - m.vertex.row(1) - turned * y;
    const double rim = greatest(v * normal.y() + w * normal.z());
    if (std::abs(rim) > std::abs(most)) most = rim;
  }
  out.rim_deflection = most;
}

}  // namespace focalframe::models
