#include "models/antenna.h"

#include <Eigen/Core>
#include <cmath>
#include <complex>
#include <numbers>
#include <stdexcept>

#include "models/least_squares.h"
#include "models/quadrature.h"

namespace focalframe::models {

namespace {

constexpr double pi = std::numbers::pi;

double decibels(double ratio) { return -10 * std::log10(ratio); }

/// cos^2 of the incidence angle.
double obliquity(const Parabola& parabola, double rho) {
  return parabola.focal_length / parabola.local_focal_distance(rho);
}

void require_fitting_spans(const DishSamples& s) {
  const std::size_t n = s.x.size();
  if (n == 0 || s.y.size() != n || s.weight.size() != n || s.u.size() != n || s.v.size() != n ||
      s.w.size() != n)
    throw std::invalid_argument("sample arrays of a dish do not fit each other");
}

/// Half path errors that unit changes of the six unknowns make: shifts x, y, z; tilts x, y; focal length.
Eigen::Matrix<double, 1, 6> unit_errors(const Parabola& parabola, double x, double y) {
  const double f = parabola.focal_length, rho2 = x * x + y * y, lever = 1 + rho2 / (8 * f * f);
  Eigen::Matrix<double, 1, 6> row;
  row << -x / (2 * f), -y / (2 * f), 1, y * lever, -x * lever, -rho2 / (4 * f * f);
  return obliquity(parabola, std::sqrt(rho2)) * row;
}

}  // namespace

double wavelength(double frequency) { return light_speed / frequency; }

double half_path_error(const Parabola& parabola, double x, double y, double u, double v, double w) {
  const double dz = w - (x * u + y * v) / (2 * parabola.focal_length);
  return dz * obliquity(parabola, std::hypot(x, y));
}

DishShape fit_paraboloid(const Parabola& parabola, const DishSamples& samples, DishFit fit) {
  require_fitting_spans(samples);
  const auto n = static_cast<Eigen::Index>(samples.x.size());
  const Eigen::Map<const Eigen::VectorXd> weight(samples.weight.data(), n);
  const double total = weight.sum();
  if (!(total > 0)) throw std::invalid_argument("sample weights must add up to more than 0");
  const Eigen::VectorXd root = (weight / total).cwiseSqrt();
  Eigen::MatrixXd a(n, 6);
  Eigen::VectorXd error(n);
  for (Eigen::Index i = 0; i < n; ++i) {
    const auto k = static_cast<std::size_t>(i);
    a.row(i) = root(i) * unit_errors(parabola, samples.x[k], samples.y[k]);
    error(i) =
        half_path_error(parabola, samples.x[k], samples.y[k], samples.u[k], samples.v[k], samples.w[k]);
  }
  const Eigen::VectorXd b = root.cwiseProduct(error);
  const Eigen::Index first = fit == DishFit::full ? 0 : 2;
  const LeastSquares found = least_squares(a.rightCols(6 - first), b);
  Eigen::VectorXd answer = Eigen::VectorXd::Zero(6);
  answer.tail(6 - first) = found.answer;

  DishShape shape;
  shape.shift_x = answer(0);
  shape.shift_y = answer(1);
  shape.shift_z = answer(2);
  shape.tilt_x = answer(3);
  shape.tilt_y = answer(4);
  shape.focal_change = answer(5);
  shape.focus_x = shape.shift_x + parabola.focal_length * shape.tilt_y;
  shape.focus_y = shape.shift_y - parabola.focal_length * shape.tilt_x;
  shape.focus_z = shape.shift_z + shape.focal_change;
  shape.rank = found.rank;
  shape.condition = found.condition;
  const double mean = weight.dot(error) / total;
  shape.half_path_before = root.cwiseProduct((error.array() - mean).matrix()).norm();
  shape.half_path_after = (b - a * answer).norm();
  return shape;
}

double ruze_loss_db(double half_path_rms, double wave) {
  return 10 * std::numbers::log10e * std::pow(4 * pi * half_path_rms / wave, 2);
}

double phase_loss_db(std::span<const double> half_path, std::span<const double> weight, double wave) {
  if (half_path.empty() || half_path.size() != weight.size())
    throw std::invalid_argument("half path errors and weights do not fit each other");
  std::complex<double> sum = 0;
  double total = 0;
  for (std::size_t i = 0; i < half_path.size(); ++i) {
    sum += std::polar(weight[i], 4 * pi * half_path[i] / wave);
    total += weight[i];
  }
  return decibels(std::norm(sum / total));
}

double defocus_loss_db(const Parabola& parabola, double axial_shift, double wave) {
  // The distance p is uniform over the aperture's area, and cos(psi) = 2f/p - 1; the path changes by shift x
  // cos(psi).
  const double f = parabola.focal_length;
  const Quadrature rule = gauss_legendre(32, f, parabola.local_focal_distance(parabola.width / 2));
  std::vector<double> half_path;
  for (const double p : rule.point) half_path.push_back(axial_shift * (2 * f / p - 1) / 2);
  return phase_loss_db(half_path, rule.weight, wave);
}

double beam_deviation_factor(const Parabola& parabola) {
  const double t = std::pow(parabola.width / (4 * parabola.focal_length), 2);
  return (1 + 0.36 * t) / (1 + t);
}

double beamwidth(const Parabola& parabola, double wave, double factor) {
  return factor * wave / parabola.width;
}

double pointing_loss_db(double angle, double width) {
  return 40 * std::numbers::ln2 * std::numbers::log10e * std::pow(angle / width, 2);
}

double BeamTurn::size() const { return std::hypot(about_x, about_y); }

BeamTurn beam_turn(const Parabola& parabola, const DishShape& shape, double feed_x, double feed_y) {
  // A feed moved to one side throws the beam to the other.
  const double share = beam_deviation_factor(parabola) / parabola.focal_length;
  return {shape.tilt_x + share * (feed_y - shape.focus_y), shape.tilt_y - share * (feed_x - shape.focus_x)};
}

GainLoss gain_loss(const Parabola& parabola, const DishShape& shape, std::span<const double, 3> feed,
                   double wave, bool pointed_anew) {
  const double turn = beam_turn(parabola, shape, feed[0], feed[1]).size();
  return {ruze_loss_db(shape.half_path_after, wave), defocus_loss_db(parabola, feed[2] - shape.focus_z, wave),
          pointed_anew ? 0 : pointing_loss_db(turn, beamwidth(parabola, wave))};
}

}  // namespace focalframe::models
