#include "models/section_fit.h"

#include <Eigen/QR>
#include <cmath>
#include <stdexcept>
#include <utility>

#include "models/intercept.h"
#include "models/shape_fit.h"

namespace focalframe::models {
namespace {

using Eigen::MatrixXd;
using Eigen::VectorXd;

// Least squares of a weighted system as one matrix: answer = inverse * (right-hand side, not yet weighted).
MatrixXd pseudo_inverse(const MatrixXd& a, const VectorXd& root) {
  MatrixXd weighted = root.asDiagonal() * a;
  const Eigen::RowVectorXd scale = weighted.colwise().norm().cwiseMax(1e-300);
  weighted = weighted * scale.cwiseInverse().asDiagonal();
  const MatrixXd inverse = weighted.completeOrthogonalDecomposition().pseudoInverse();
  return scale.cwiseInverse().asDiagonal() * inverse * root.asDiagonal();
}

}  // namespace

SectionFit::SectionFit(const Parabola& parabola, std::vector<double> row_y,
                       const std::vector<double>& row_weight) {
  const std::size_t n = row_y.size();
  const std::vector<double> zero(n, 0.0);
  TroughSamples still;
  still.y = row_y;
  still.weight = row_weight;
  still.v = still.w = still.rotation = zero;
  const TroughShape shape = fit_shape(parabola, still);
  rank_ = shape.rank;
  condition_ = shape.condition;

  const auto rows = static_cast<Eigen::Index>(n);
  for (VectorXd* v : {&height_, &half_slope_, &inverse_2r_, &t_over_r_, &miss_v_, &miss_w_, &miss_turn_})
    v->resize(rows);
  VectorXd root(rows), both(2 * rows);
  MatrixXd rigid(2 * rows, 3), heights(rows, 3), line(rows, 2);
  for (Eigen::Index i = 0; i < rows; ++i) {
    const double y = row_y[static_cast<std::size_t>(i)], r = parabola.local_focal_distance(y);
    const double t = y / (2 * parabola.focal_length);
    const MissTerms terms = miss_terms(parabola, y);
    height_[i] = parabola.height(y);
    half_slope_[i] = t;
    inverse_2r_[i] = 1 / (2 * r);
    t_over_r_[i] = t / r;
    miss_v_[i] = terms.mirror_v;
    miss_w_[i] = terms.mirror_w;
    miss_turn_[i] = terms.rotation;
    root[i] = std::sqrt(row_weight[static_cast<std::size_t>(i)]);
    both[i] = both[rows + i] = root[i];
    rigid.row(i) << 1, 0, -height_[i];
    rigid.row(rows + i) << 0, 1, y;
    heights.row(i) << 1, y * (1 + t * t / 2), -t * t;
    line.row(i) << terms.mirror_v, terms.mirror_w;
  }
  rigid_ = pseudo_inverse(rigid, both).topRows(1);
  heights_ = pseudo_inverse(heights, root);
  line_ = pseudo_inverse(line, root);
}

SectionFit::Shapes SectionFit::fit(const MatrixXd& v, const MatrixXd& w, const MatrixXd& turn) const {
  const Eigen::Index rows = v.rows();
  Shapes s;
  s.vertex_v = rigid_.leftCols(rows) * v + rigid_.rightCols(rows) * w;
  const MatrixXd fitted = heights_ * (w - half_slope_.asDiagonal() * v + half_slope_ * s.vertex_v);
  s.vertex_w = fitted.row(0);
  s.tilt = fitted.row(1);
  s.focal_change = fitted.row(2);
  const MatrixXd line =
      line_ * (miss_v_.asDiagonal() * v + miss_w_.asDiagonal() * w + miss_turn_.asDiagonal() * turn);
  s.focal_line_v = line.row(0);
  s.focal_line_w = line.row(1);
  s.slope_before = turn - inverse_2r_.asDiagonal() * v;
  const VectorXd turned = VectorXd::Ones(rows) + inverse_2r_.cwiseProduct(height_);
  s.slope_after = s.slope_before - turned * s.tilt + inverse_2r_ * s.vertex_v + t_over_r_ * s.focal_change;
  return s;
}

}  // namespace focalframe::models
