#include "models/dish_optics_check.h"

#include <Eigen/Cholesky>
#include <Eigen/Geometry>
#include <Eigen/QR>
#include <cmath>

#include "fem/units.h"
#include "models/dish_wind.h"
#include "models/optics_check.h"
#include "models/schema.h"

namespace focalframe::models {
namespace {

using Eigen::MatrixXd;
using Eigen::Vector2d;
using Eigen::Vector3d;
using Eigen::VectorXd;

// Least squares with the weights already in rows; what is left of b.
VectorXd left_over(const MatrixXd& a, const VectorXd& b) { return b - a * a.colPivHouseholderQr().solve(b); }

// Power at a radius for a parabola-on-pedestal illumination with this amplitude at the rim.
double illumination(double share_of_rim, double taper_db) {
  const double rim = std::pow(10, -taper_db / 20);
  const double amplitude = 1 - (1 - rim) * share_of_rim * share_of_rim;
  return amplitude * amplitude;
}

}  // namespace

DishOpticsCheck::DishOpticsCheck(const DishModel& model, const DishDesign& d)
    : model_(model),
      parabola_{d.parabola.aperture, focal_length(d.parabola)},
      radio_(d.dish.radio.given),
      learned_(d.dish.learned == "gravity"),
      rod_play_(d.dish.actuator.play),
      slew_play_(d.dish.slewing.play),
      azimuth_play_(d.dish.azimuth.play),
      hole_(d.dish.surface.hole) {
  const DishSkin& skin = model.collector().skin;
  for (int s = 0; s < skin.samples(); ++s) {
    const auto i = static_cast<std::size_t>(s);
    x_.push_back(skin.at[i].x());
    y_.push_back(skin.at[i].y());
    rho_.push_back(std::hypot(x_.back(), y_.back()));
    weight_.push_back(skin.weight[i]);
    const double lit = radio_ ? illumination(2 * rho_.back() / parabola_.width, d.dish.radio.edge_taper) : 1;
    illumination_.push_back(weight_.back() * lit);
  }
  double set_true = d.optics.set_true;
  if (radio_) {
    const RadioInput& r = d.dish.radio;
    set_true = r.set_true;
    wavelength_ = wavelength(r.frequency);
    // 1.02 for even illumination, 1.22 for a taper of 12 dB (from memory), straight between.
    beamwidth_ = models::beamwidth(parabola_, wavelength_, 1.02 + 0.2 * std::min(r.edge_taper, 18.0) / 12);
    built_ = r.surface_as_built;
    built_db_ = ruze_loss_db(built_, wavelength_);
  } else {
    beam_ = beam_error(d.optics);
    beam_.longitudinal_slope_rms = 0;
    beam_.incidence = 0;
    intercept_.emplace(parabola_, d.dish.feed.aperture / 2, beam_, PointReceiver::flat);
  }
  set_.move = MatrixXd::Zero(3, skin.samples());
  set_.turn = set_.move;
  if (!std::isnan(set_true)) {
    const DishPose pose = model.pose(set_true);
    set_ = motion(pose, dish_weight_amplitudes(pose));
  }
}

double DishOpticsCheck::undeformed() const { return radio_ ? not_given : intercept_->undeformed(hole_ / 2); }
double DishOpticsCheck::beam_rms() const { return radio_ ? not_given : total_rms(beam_); }

DishOpticsCheck::Motion DishOpticsCheck::motion(const DishPose& pose, const VectorXd& amplitudes) const {
  const DishCollector& c = model_.collector();
  const auto all = [&](const LinearOutput& output) { return model_.evaluate(output, pose, amplitudes); };
  Motion m;
  m.move = all(model_.skin_move).reshaped(3, c.skin.samples());
  m.turn = all(model_.skin_turn).reshaped(3, c.skin.samples());
  m.focus = all(model_.focus);
  const Eigen::Matrix<double, 6, 1> hub = all(model_.hub);
  const Vector3d at = c.body.nodes[static_cast<std::size_t>(c.hub)].at, shift = hub.head<3>(),
                 turn = hub.tail<3>();
  for (int s = 0; s < c.skin.samples(); ++s) {
    m.move.col(s) -= shift + turn.cross(c.skin.at[static_cast<std::size_t>(s)] - at);
    m.turn.col(s) -= turn;
  }
  const Vector3d focus = c.body.nodes[static_cast<std::size_t>(c.focus)].at;
  m.focus.head<3>() -= shift + turn.cross(focus - at);
  m.focus.tail<3>() -= turn;
  const Eigen::Matrix3d from_yoke = pose.collector_from_yoke();
  const Vector3d head = pose.yoke_from_world * (pose.head_motion * amplitudes).tail(3);
  const Vector3d bearing = (pose.yoke_motion * amplitudes).segment(3, 3);
  m.pointing.base = (from_yoke * head).head<2>();
  m.pointing.bearing = (from_yoke * (bearing - head)).head<2>();
  m.pointing.drive = (turn - from_yoke * bearing).head<2>();
  return m;
}

DishOpticsCheck::Motion DishOpticsCheck::less(const Motion& a, const Motion& b) const {
  Motion m = a;
  m.move -= b.move;
  m.turn -= b.turn;
  m.focus -= b.focus;
  m.pointing.base -= b.pointing.base;
  m.pointing.bearing -= b.pointing.bearing;
  m.pointing.drive -= b.pointing.drive;
  return m;
}

DishShape DishOpticsCheck::fit(const Motion& m) const {
  const auto n = static_cast<std::size_t>(m.move.cols());
  std::vector<double> u(n), v(n), w(n);
  for (std::size_t i = 0; i < n; ++i) {
    const auto s = static_cast<Eigen::Index>(i);
    u[i] = m.move(0, s), v[i] = m.move(1, s), w[i] = m.move(2, s);
  }
  return fit_paraboloid(parabola_, {x_, y_, illumination_, u, v, w}, DishFit::no_shift);
}

DishPointing DishOpticsCheck::point(const Motion& m, const DishShape& shape) const {
  DishPointing p = m.pointing;
  if (radio_) {
    const BeamTurn turn = beam_turn(parabola_, shape, m.focus[0], m.focus[1]);
    p.dish = {turn.about_x, turn.about_y};
  } else {
    p.dish = best_aim(m);
  }
  return p;
}

// The rotation of the light that leaves the least rms miss.
Vector2d DishOpticsCheck::best_aim(const Motion& m) const {
  Eigen::Matrix2d normal = Eigen::Matrix2d::Zero();
  Vector2d right = Vector2d::Zero();
  for (std::size_t i = 0; i < x_.size(); ++i) {
    const auto s = static_cast<Eigen::Index>(i);
    const DishMiss miss = dish_miss(parabola_, x_[i], y_[i],
                                    {m.move.col(s), m.turn.col(s), m.focus.head<3>(), Vector3d::Zero()});
    Eigen::Matrix2d per;
    for (int k = 0; k < 2; ++k) {
      DishMotion unit;
      unit.aim = Vector3d::Unit(k);
      const DishMiss one = dish_miss(parabola_, x_[i], y_[i], unit);
      per.col(k) << one.radial, one.tangential;
    }
    normal += weight_[i] * per.transpose() * per;
    right -= weight_[i] * per.transpose() * Vector2d(miss.radial, miss.tangential);
  }
  return normal.ldlt().solve(right);
}

// Change of the mirror's gradient at fixed x, y as angles of the normal, radial then tangential, weighted so
// that the norm is the 1-D rms. `fitted`: tilt and focal length taken out.
VectorXd DishOpticsCheck::gradients(const Motion& m, bool fitted) const {
  const auto n = static_cast<Eigen::Index>(x_.size());
  const double f = parabola_.focal_length, whole = VectorXd::Map(weight_.data(), n).sum();
  VectorXd change(2 * n);
  MatrixXd basis = MatrixXd::Zero(2 * n, 3);
  for (Eigen::Index s = 0; s < n; ++s) {
    const auto i = static_cast<std::size_t>(s);
    const Vector3d normal(-x_[i] / (2 * f), -y_[i] / (2 * f), 1),
        turned = Vector3d(m.turn.col(s)).cross(normal);
    const Vector2d gradient =
        -turned.head<2>() + normal.head<2>() * turned.z() - m.move.col(s).head<2>() / (2 * f);
    const Vector2d out = Vector2d(x_[i], y_[i]) / rho_[i], across(-out.y(), out.x());
    const double steep = normal.squaredNorm(), share = std::sqrt(weight_[i] / whole / 2);
    const Vector2d radial = share / steep * out, tangential = share / std::sqrt(steep) * across;
    change[2 * s] = radial.dot(gradient);
    change[2 * s + 1] = tangential.dot(gradient);
    basis.row(2 * s) << radial.x(), radial.y(), radial.dot(out) * rho_[i];
    basis.row(2 * s + 1) << tangential.x(), tangential.y(), 0;
  }
  return fitted ? left_over(basis, change) : change;
}

void DishOpticsCheck::look_at_light(const Motion& all, const Vector2d& aim, DishOptical& out) const {
  std::vector<DishMiss> miss(x_.size());
  for (std::size_t i = 0; i < x_.size(); ++i) {
    const auto s = static_cast<Eigen::Index>(i);
    miss[i] = dish_miss(parabola_, x_[i], y_[i],
                        {all.move.col(s), all.turn.col(s), all.focus.head<3>(), {aim.x(), aim.y(), 0}});
  }
  out.intercept = intercept_->mean(rho_, miss, weight_);
}

void DishOpticsCheck::look_at_gain(const Motion& all, const DishShape& shape, DishOptical& out) const {
  out.half_path = shape.half_path_after;
  out.surface_db = ruze_loss_db(std::hypot(built_, shape.half_path_after), wavelength_);
  out.defocus_db = defocus_loss_db(parabola_, all.focus[2] - shape.focus_z, wavelength_);
  out.pointing_db = pointing_loss_db(out.aim_error, beamwidth_);
  out.gain_loss = out.surface_db + out.defocus_db + out.pointing_db;
  out.pointing_beams = out.aim_error / beamwidth_;
}

Vector2d DishOpticsCheck::play(const DishPose& pose) const {
  const double up = model_.collector().slewing ? slew_play_ / 2 : rod_play_ / 2 / std::abs(pose.arm);
  // A turn about the azimuth axis moves the beam less the higher it looks.
  const Vector3d azimuth = pose.collector_from_yoke() * Vector3d(0, 0, azimuth_play_ / 2);
  return {up, std::abs(azimuth.y())};
}

DishOptical DishOpticsCheck::look(const DishPose& pose, const VectorXd& weight, const VectorXd& wind) const {
  DishOptical out;
  const Motion steady = less(motion(pose, weight), set_);
  const Motion all = wind.size() == 0 ? steady : less(motion(pose, weight + wind), set_);
  const DishShape shape = fit(all);
  out.pointing = point(all, shape);
  Vector2d missed = out.pointing.total();
  Vector2d taken = Vector2d::Zero();  // what the pointing table turns back
  if (learned_) taken = point(steady, fit(steady)).total();
  missed -= taken;
  Vector2d slack = play(pose);
  for (int i = 0; i < 2; ++i) slack[i] = std::copysign(slack[i], missed[i]);
  out.aim_error = (missed + slack).norm();
  out.slope = gradients(all, true).norm();
  out.slope_before = gradients(all, false).norm();
  out.focal_change = shape.focal_change;
  out.focus_along = std::abs(all.focus[2] - shape.focus_z);
  out.focus_across = std::hypot(all.focus[0] - shape.focus_x, all.focus[1] - shape.focus_y);
  for (Eigen::Index s = 0; s < all.move.cols(); ++s) {
    const double w = std::abs(all.move(2, s));
    if (!(w <= out.skin_move)) out.skin_move = w;
  }
  if (radio_)
    look_at_gain(all, shape, out);
  else
    // The hub's turn less what is taken back and the dish's own share, which the motion still holds.
    look_at_light(all, -(out.pointing.total() - out.pointing.dish) + taken - slack, out);
  return out;
}

ResidualField DishOpticsCheck::gravity_residual(const DishPose& pose) const {
  const Motion m = motion(pose, dish_weight_amplitudes(pose));
  if (!radio_) return gradients(m, true);
  const auto n = static_cast<Eigen::Index>(x_.size());
  VectorXd half(n);
  MatrixXd basis(n, 4);
  double whole = 0;
  for (double w : illumination_) whole += w;
  for (Eigen::Index s = 0; s < n; ++s) {
    const auto i = static_cast<std::size_t>(s);
    const double z = parabola_.height(rho_[i]), share = std::sqrt(illumination_[i] / whole);
    const auto path = [&](double u, double v, double w) {
      return share * half_path_error(parabola_, x_[i], y_[i], u, v, w);
    };
    half[s] = path(m.move(0, s), m.move(1, s), m.move(2, s));
    basis.row(s) << path(0, 0, 1), path(0, -z, y_[i]), path(z, 0, -x_[i]), path(0, 0, rho_[i] * rho_[i]);
  }
  return left_over(basis, half);
}

DishPointing DishOpticsCheck::gravity_pointing(const DishPose& pose) const {
  const Motion m = motion(pose, dish_weight_amplitudes(pose));
  return point(m, fit(m));
}

}  // namespace focalframe::models
