#include "models/panel_span.h"

#include <Eigen/Cholesky>
#include <algorithm>
#include <array>
#include <cmath>
#include <stdexcept>

#include "models/quadrature.h"

namespace focalframe::models {
namespace {

using Eigen::MatrixXd;
using Eigen::VectorXd;

constexpr double same_place = 1e-9;  // [m]

// Coefficients of g^0 .. g^4 of the deflected line.
std::array<double, 5> line_of(SpanEnds ends) {
  if (ends.from_held && ends.to_held) return {0, 0, 1 / 24.0, -2 / 24.0, 1 / 24.0};
  if (!ends.from_held && !ends.to_held) return {0, 1 / 24.0, 0, -2 / 24.0, 1 / 24.0};
  if (ends.to_held) return {0, 1 / 48.0, 0, -3 / 48.0, 2 / 48.0};
  return {0, 0, 3 / 48.0, -5 / 48.0, 2 / 48.0};
}

// Cubic shape functions of a beam element of length l at xi, for (w, w') at both ends, and their slopes.
struct Hermite {
  Eigen::RowVector4d value, slope;
};
Hermite hermite(double l, double xi) {
  const double a = xi * xi, b = a * xi;
  Hermite h;
  h.value << 1 - 3 * a + 2 * b, l * (xi - 2 * a + b), 3 * a - 2 * b, l * (b - a);
  h.slope << (6 * a - 6 * xi) / l, 1 - 4 * xi + 3 * a, (6 * xi - 6 * a) / l, 3 * a - 2 * xi;
  return h;
}

// One panel of the strip: its own beam from edge to edge.
class Panel {
 public:
  Panel(const StripInput& input, double from, double to) : in_(input) {
    nodes_ = {from, to};
    for (const auto* places : {&in_.node_s, &in_.support_s})
      for (double s : *places)
        if (s > from + same_place && s < to - same_place) nodes_.push_back(s);
    std::sort(nodes_.begin(), nodes_.end());
    const auto same = [](double a, double b) { return b - a < same_place; };
    nodes_.erase(std::unique(nodes_.begin(), nodes_.end(), same), nodes_.end());
    for (std::size_t k = 0; k < in_.support_s.size(); ++k)
      for (std::size_t n = 0; n < nodes_.size(); ++n)
        if (std::abs(nodes_[n] - in_.support_s[k]) < 2 * same_place)
          held_.push_back({2 * static_cast<int>(n), static_cast<int>(k)});
    for (std::size_t r = 0; r < in_.row_s.size(); ++r)
      if (in_.row_s[r] >= from && in_.row_s[r] < to) rows_.push_back(static_cast<int>(r));
  }

  void add_to(StripAnswer& out) const {
    if (held_.size() < 2)
      throw std::invalid_argument("a panel across the trough needs at least two lines of supports");
    const int dofs = 2 * static_cast<int>(nodes_.size()), rows = static_cast<int>(in_.row_s.size());
    const int supports = static_cast<int>(held_.size());
    MatrixXd K = MatrixXd::Zero(dofs, dofs), load = MatrixXd::Zero(dofs, rows);
    for (std::size_t e = 0; e + 1 < nodes_.size(); ++e) K.block<4, 4>(2 * e, 2 * e) += stiffness(e);
    for (int r : rows_) {
      const auto [e, xi] = place(in_.row_s[static_cast<std::size_t>(r)]);
      load.block<4, 1>(2 * e, r) +=
          hermite(length(e), xi).value.transpose() * in_.row_ds[static_cast<std::size_t>(r)];
    }
    std::vector<int> free, fixed;
    for (int d = 0; d < dofs; ++d)
      (std::any_of(held_.begin(), held_.end(), [&](const auto& h) { return h.dof == d; }) ? fixed : free)
          .push_back(d);
    const Eigen::LLT<MatrixXd> factor(MatrixXd(K(free, free)));
    MatrixXd u = MatrixXd::Zero(dofs, rows), settled = MatrixXd::Zero(dofs, supports);
    u(free, Eigen::all) = MatrixXd(factor.solve(MatrixXd(load(free, Eigen::all))));
    for (int k = 0; k < supports; ++k) settled(fixed[static_cast<std::size_t>(k)], k) = 1;
    settled(free, Eigen::all) = -MatrixXd(factor.solve(MatrixXd(K(free, fixed))));
    const MatrixXd push = load - K * u;
    for (int k = 0; k < supports; ++k)
      out.reaction.row(support_at(fixed[static_cast<std::size_t>(k)])) +=
          push.row(fixed[static_cast<std::size_t>(k)]);
    for (int r : rows_) {
      const auto [e, xi] = place(in_.row_s[static_cast<std::size_t>(r)]);
      const double l = length(e);
      const Hermite h = hermite(l, xi);
      out.deflection.row(r) = h.value * u.middleRows<4>(2 * e);
      out.slope.row(r) = h.slope * u.middleRows<4>(2 * e);
      // The element's own sag under the pressure at the row, which its nodes do not know.
      out.deflection(r, r) += std::pow(l, 4) / in_.rigidity * span_line({}, xi);
      out.slope(r, r) += std::pow(l, 3) / in_.rigidity * span_line({}, xi, 1);
      for (int k = 0; k < supports; ++k) {
        const int at = support_at(fixed[static_cast<std::size_t>(k)]);
        out.settled_deflection(r, at) = h.value * settled.col(k).segment<4>(2 * e);
        out.settled_slope(r, at) = h.slope * settled.col(k).segment<4>(2 * e);
      }
    }
  }

 private:
  struct Held {
    int dof, support;
  };
  struct Place {
    Eigen::Index element;
    double xi;
  };

  int support_at(int dof) const {
    return std::find_if(held_.begin(), held_.end(), [&](const Held& h) { return h.dof == dof; })->support;
  }
  double length(Eigen::Index e) const {
    return nodes_[static_cast<std::size_t>(e) + 1] - nodes_[static_cast<std::size_t>(e)];
  }
  Place place(double s) const {
    auto e = std::upper_bound(nodes_.begin() + 1, nodes_.end() - 1, s) - nodes_.begin() - 1;
    return {e, (s - nodes_[static_cast<std::size_t>(e)]) / length(e)};
  }
  Eigen::Matrix4d stiffness(std::size_t e) const {
    const double l = length(static_cast<Eigen::Index>(e));
    Eigen::Matrix4d k;
    k << 12, 6 * l, -12, 6 * l, 6 * l, 4 * l * l, -6 * l, 2 * l * l, -12, -6 * l, 12, -6 * l, 6 * l,
        2 * l * l, -6 * l, 4 * l * l;
    return k * (in_.rigidity / (l * l * l));
  }

  const StripInput& in_;
  std::vector<double> nodes_;
  std::vector<Held> held_;
  std::vector<int> rows_;
};

}  // namespace

double span_line(SpanEnds ends, double g, int order) {
  const std::array<double, 5> c = line_of(ends);
  double sum = 0;
  for (int k = 4; k >= order; --k) {
    double factor = c[static_cast<std::size_t>(k)];
    for (int i = 0; i < order; ++i) factor *= k - i;
    sum = sum * g + factor;
  }
  return sum;
}

SpanMeans span_means(SpanEnds ends) {
  SpanMeans means;
  const Quadrature rule = gauss_legendre(6, 0, 1);
  for (std::size_t i = 0; i < rule.point.size(); ++i) {
    const double g = rule.point[i], w = rule.weight[i];
    means.mean += w * span_line(ends, g);
    means.rms += w * std::pow(span_line(ends, g), 2);
    means.rms_slope += w * std::pow(span_line(ends, g, 1), 2);
  }
  means.rms = std::sqrt(means.rms);
  means.rms_slope = std::sqrt(means.rms_slope);
  return means;
}

StripAnswer solve_strip(const StripInput& input) {
  const auto rows = static_cast<Eigen::Index>(input.row_s.size());
  const auto supports = static_cast<Eigen::Index>(input.support_s.size());
  StripAnswer out{MatrixXd::Zero(rows, rows), MatrixXd::Zero(rows, rows), MatrixXd::Zero(supports, rows),
                  MatrixXd::Zero(rows, supports), MatrixXd::Zero(rows, supports)};
  for (std::size_t p = 0; p + 1 < input.edge_s.size(); ++p)
    Panel(input, input.edge_s[p], input.edge_s[p + 1]).add_to(out);
  return out;
}

}  // namespace focalframe::models
