#include "models/panel_shell.h"

#include <Eigen/Cholesky>
#include <algorithm>
#include <cmath>

#include "models/quadrature.h"

namespace focalframe::models {
namespace {

using Eigen::MatrixXd;
using Eigen::RowVectorXd;
using Eigen::VectorXd;
using Row6 = Eigen::Matrix<double, 1, 12>;  // u u' v v' w w' at both ends of an element

// Integrals of the span's line over g in [0, 1].
struct LineIntegrals {
  double first = 0, j0 = 0, j1 = 0, j2 = 0, j02 = 0;
};
LineIntegrals integrals(SpanEnds ends) {
  LineIntegrals j;
  const Quadrature rule = gauss_legendre(6, 0, 1);
  for (std::size_t i = 0; i < rule.point.size(); ++i) {
    const double g = rule.point[i], a = rule.weight[i];
    const double w = span_line(ends, g), w1 = span_line(ends, g, 1), w2 = span_line(ends, g, 2);
    j.first += a * w;
    j.j0 += a * w * w;
    j.j1 += a * w1 * w1;
    j.j2 += a * w2 * w2;
    j.j02 += a * w * w2;
  }
  return j;
}

double arc_at(double y, double f) {
  const double t = y / (2 * f);
  return f * (t * std::sqrt(1 + t * t) + std::asinh(t));
}

// Curvature of the parabola and its derivative along the arc.
double curvature(double y, double f) { return std::pow(1 + std::pow(y / (2 * f), 2), -1.5) / (2 * f); }
double curvature_rate(double y, double f) {
  const double t = y / (2 * f);
  return -1.5 * 2 * t / (2 * f) * std::pow(1 + t * t, -2.5) / (2 * f) / std::sqrt(1 + t * t);
}

// Value and first two derivatives along s of the three fields at a point of an element.
struct Fields {
  Row6 u, u1, v, v1, w, w1, w2;
};
Fields fields(double l, double xi) {
  const double a = xi * xi, b = a * xi;
  const double h[3][4] = {
      {1 - 3 * a + 2 * b, l * (xi - 2 * a + b), 3 * a - 2 * b, l * (b - a)},
      {(6 * a - 6 * xi) / l, 1 - 4 * xi + 3 * a, (6 * xi - 6 * a) / l, 3 * a - 2 * xi},
      {(12 * xi - 6) / (l * l), (6 * xi - 4) / l, (6 - 12 * xi) / (l * l), (6 * xi - 2) / l}};
  const auto row = [&](int field, int order) {
    Row6 r = Row6::Zero();
    r[2 * field] = h[order][0];
    r[2 * field + 1] = h[order][1];
    r[6 + 2 * field] = h[order][2];
    r[6 + 2 * field + 1] = h[order][3];
    return r;
  };
  return {row(0, 0), row(0, 1), row(1, 0), row(1, 1), row(2, 0), row(2, 1), row(2, 2)};
}

class Shell {
 public:
  explicit Shell(const ShellInput& input) : in_(input), f_(input.parabola.focal_length) {
    for (double y : in_.node_y) node_s_.push_back(arc_at(y, f_));
  }

  ShellAnswer solve() const {
    const int dofs = 6 * static_cast<int>(node_s_.size()), rows = static_cast<int>(in_.row_y.size());
    const LineIntegrals j = integrals(in_.ends);
    MatrixXd K = MatrixXd::Zero(dofs, dofs), load = MatrixXd::Zero(dofs, 2 * rows);
    for (std::size_t e = 0; e + 1 < node_s_.size(); ++e)
      K.block<12, 12>(6 * static_cast<Eigen::Index>(e), 6 * static_cast<Eigen::Index>(e)) += stiffness(e, j);
    for (int r = 0; r < rows; ++r) {
      const auto [e, at] = fields_at(r);
      const double force = in_.row_ds[static_cast<std::size_t>(r)] * in_.pitch * j.first;
      load.block<12, 1>(6 * e, r) += force * at.w.transpose();
      load.block<12, 1>(6 * e, rows + r) += force * at.v.transpose();
    }
    std::vector<int> used;
    for (int d = 0; d < dofs; ++d)
      if (in_.membrane > 0 || d % 6 >= 4) used.push_back(d);
    MatrixXd x = MatrixXd::Zero(dofs, 2 * rows);
    const Eigen::LDLT<MatrixXd> factor(MatrixXd(K(used, used)));
    x(used, Eigen::all) = MatrixXd(factor.solve(MatrixXd(load(used, Eigen::all))));
    ShellAnswer out{MatrixXd(rows, 2 * rows), MatrixXd(rows, 2 * rows), MatrixXd(rows, 2 * rows)};
    for (int r = 0; r < rows; ++r) {
      const auto [e, at] = fields_at(r);
      const auto part = x.middleRows<12>(6 * e);
      const double bend = in_.membrane > 0 ? curvature(in_.row_y[static_cast<std::size_t>(r)], f_) : 0;
      out.normal.row(r) = at.w * part;
      out.tangential.row(r) = at.v * part;
      out.slope.row(r) = (at.w1 + bend * at.v) * part;
    }
    return out;
  }

 private:
  struct Spot {
    Eigen::Index element;
    Fields fields;
  };
  Spot fields_at(int r) const {
    const double s = arc_at(in_.row_y[static_cast<std::size_t>(r)], f_);
    const auto e = std::upper_bound(node_s_.begin() + 1, node_s_.end() - 1, s) - node_s_.begin() - 1;
    const double from = node_s_[static_cast<std::size_t>(e)];
    const double l = node_s_[static_cast<std::size_t>(e) + 1] - from;
    return {e, models::fields(l, (s - from) / l)};
  }

  // u goes with the line's slope, v and w with the line itself; integrated over the pitch.
  Eigen::Matrix<double, 12, 12> stiffness(std::size_t e, const LineIntegrals& j) const {
    const double l = node_s_[e + 1] - node_s_[e], b = in_.pitch, nu = in_.poisson;
    const double D = in_.rigidity, C = in_.membrane;
    Eigen::Matrix<double, 12, 12> k = Eigen::Matrix<double, 12, 12>::Zero();
    const Quadrature rule = gauss_legendre(5, 0, 1);
    for (std::size_t i = 0; i < rule.point.size(); ++i) {
      const Fields at = fields(l, rule.point[i]);
      const double y = in_.node_y[e] + rule.point[i] * (in_.node_y[e + 1] - in_.node_y[e]);
      const double bend = C > 0 ? curvature(y, f_) : 0, rate = C > 0 ? curvature_rate(y, f_) : 0;
      const double a = rule.weight[i] * l;
      const Row6 hoop = at.v1 - bend * at.w, shear = at.u1 + at.v / b;
      const Row6 turn = at.w1 + bend * at.v, bow = at.w2 + bend * at.v1 + rate * at.v;
      const auto both = [](const Row6& p, const Row6& q) {
        return Eigen::Matrix<double, 12, 12>(p.transpose() * q + q.transpose() * p);
      };
      k += a * C *
           (j.j2 / b * at.u.transpose() * at.u + b * j.j0 * hoop.transpose() * hoop +
            nu * j.j02 * both(at.u, hoop) + (1 - nu) / 2 * b * j.j1 * shear.transpose() * shear);
      k += a * D *
           (j.j2 / (b * b * b) * at.w.transpose() * at.w + b * j.j0 * bow.transpose() * bow +
            nu * j.j02 / b * both(at.w, bow) + 2 * (1 - nu) * j.j1 / b * turn.transpose() * turn);
    }
    return k;
  }

  const ShellInput& in_;
  double f_;
  std::vector<double> node_s_;
};

}  // namespace

ShellAnswer solve_shell(const ShellInput& input) { return Shell(input).solve(); }

}  // namespace focalframe::models
