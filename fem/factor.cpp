#include "fem/factor.h"

#include <Eigen/OrderingMethods>
#include <algorithm>
#include <numeric>

namespace focalframe::fem {
namespace {

using Index = Eigen::Index;
using Permutation = Eigen::PermutationMatrix<Eigen::Dynamic, Eigen::Dynamic, int>;

/// Row -> place in the factor: minimum degree on the graph of groups, members of a group side by side.
std::vector<int> ordering(const SparseMatrix& matrix, const std::vector<int>& group) {
  const int highest = group.empty() ? -1 : *std::max_element(group.begin(), group.end());
  std::vector<int> compact(static_cast<std::size_t>(highest + 1), -1);
  std::vector<std::vector<int>> rows;
  for (int i = 0; i < static_cast<int>(group.size()); ++i) {
    int& g = compact[static_cast<std::size_t>(group[static_cast<std::size_t>(i)])];
    if (g < 0) {
      g = static_cast<int>(rows.size());
      rows.emplace_back();
    }
    rows[static_cast<std::size_t>(g)].push_back(i);
  }
  const auto group_of = [&](Index i) {
    return compact[static_cast<std::size_t>(group[static_cast<std::size_t>(i)])];
  };
  std::vector<Eigen::Triplet<double>> links;
  std::vector<int> seen(rows.size(), -1);
  for (int g = 0; g < static_cast<int>(rows.size()); ++g)
    for (const int j : rows[static_cast<std::size_t>(g)])
      for (SparseMatrix::InnerIterator it(matrix, j); it; ++it) {
        int& last = seen[static_cast<std::size_t>(group_of(it.row()))];
        if (last == g) continue;
        last = g;
        links.emplace_back(group_of(it.row()), g, 1.0);
      }
  const auto n = static_cast<int>(rows.size());
  SparseMatrix graph(n, n);
  graph.setFromTriplets(links.begin(), links.end());
  Permutation order;
  Eigen::AMDOrdering<int>()(graph, order);
  std::vector<int> place(group.size());
  int next = 0;
  for (int k = 0; k < n; ++k)
    for (const int i : rows[static_cast<std::size_t>(order.indices()(k))])
      place[static_cast<std::size_t>(i)] = next++;
  return place;
}

}  // namespace

Factor::Factor(const SparseMatrix& matrix, const std::vector<int>& group) : place_(ordering(matrix, group)) {
  const auto n = static_cast<int>(matrix.rows());
  Permutation permutation(n);
  for (int i = 0; i < n; ++i) permutation.indices()(i) = place_[static_cast<std::size_t>(i)];
  SparseMatrix turned(n, n);
  turned.selfadjointView<Eigen::Lower>() = matrix.selfadjointView<Eigen::Lower>().twistedBy(permutation);
  Eigen::SimplicialLDLT<SparseMatrix, Eigen::Lower, Eigen::NaturalOrdering<int>> ldlt;
  ldlt.compute(turned);
  ok_ = n == 0 || ldlt.info() == Eigen::Success;
  if (!ok_ || n == 0) return;
  lower_ = ldlt.matrixL().nestedExpression();
  diagonal_ = ldlt.vectorD();
  ok_ = diagonal_.allFinite();
  pivots_.resize(n);
  for (int i = 0; i < n; ++i) pivots_(i) = diagonal_(place_[static_cast<std::size_t>(i)]);
}

int Factor::negative_pivots() const { return static_cast<int>((diagonal_.array() < 0).count()); }

// Several columns at once, rows of the panel contiguous: each entry of L is read once for all of them.
template <int width>
void Factor::solve_panel(const Eigen::MatrixXd& b, Index first, Eigen::MatrixXd& x) const {
  using Panel = Eigen::Matrix<double, Eigen::Dynamic, width, width == 1 ? Eigen::ColMajor : Eigen::RowMajor>;
  const Index n = b.rows(), count = std::min<Index>(width, b.cols() - first);
  Panel panel = Panel::Zero(n, width);
  for (Index i = 0; i < n; ++i)
    panel.row(place_[static_cast<std::size_t>(i)]).head(count) = b.row(i).segment(first, count);
  for (Index j = 0; j < n; ++j) {
    const Eigen::Matrix<double, 1, width> row = panel.row(j);
    for (SparseMatrix::InnerIterator it(lower_, j); it; ++it)
      panel.row(it.row()).noalias() -= it.value() * row;
  }
  for (Index j = n; j-- > 0;) {
    Eigen::Matrix<double, 1, width> row = panel.row(j) / diagonal_(j);
    for (SparseMatrix::InnerIterator it(lower_, j); it; ++it)
      row.noalias() -= it.value() * panel.row(it.row());
    panel.row(j) = row;
  }
  for (Index i = 0; i < n; ++i)
    x.row(i).segment(first, count) = panel.row(place_[static_cast<std::size_t>(i)]).head(count);
}

Eigen::MatrixXd Factor::solve(const Eigen::MatrixXd& b) const {
  Eigen::MatrixXd x(b.rows(), b.cols());
  for (Index first = 0; first < b.cols();) {
    const Index left = b.cols() - first;
    if (left > 4)
      solve_panel<16>(b, first, x), first += 16;
    else if (left > 1)
      solve_panel<4>(b, first, x), first += 4;
    else
      solve_panel<1>(b, first, x), first += 1;
  }
  return x;
}

Eigen::VectorXd Factor::lower_inverse(const Eigen::VectorXd& b) const {
  Eigen::VectorXd y(b.size());
  for (Index i = 0; i < b.size(); ++i) y(place_[static_cast<std::size_t>(i)]) = b(i);
  for (Index j = 0; j < y.size(); ++j)
    for (SparseMatrix::InnerIterator it(lower_, j); it; ++it) y(it.row()) -= it.value() * y(j);
  return y.cwiseQuotient(diagonal_.cwiseSqrt());
}

Eigen::VectorXd Factor::upper_inverse(const Eigen::VectorXd& y) const {
  Eigen::VectorXd z = y.cwiseQuotient(diagonal_.cwiseSqrt());
  for (Index j = z.size(); j-- > 0;)
    for (SparseMatrix::InnerIterator it(lower_, j); it; ++it) z(j) -= it.value() * z(it.row());
  Eigen::VectorXd x(z.size());
  for (Index i = 0; i < z.size(); ++i) x(i) = z(place_[static_cast<std::size_t>(i)]);
  return x;
}

double condition_estimate(const SparseMatrix& matrix, const Factor& factor) {
  const Index n = matrix.rows();
  if (n == 0) return 1;
  const Eigen::VectorXd root = Eigen::VectorXd(matrix.diagonal()).cwiseSqrt();
  double norm = 0;
  for (Index j = 0; j < n; ++j) {
    double sum = 0;
    for (SparseMatrix::InnerIterator it(matrix, j); it; ++it)
      sum += std::abs(it.value()) / (root(it.row()) * root(j));
    norm = std::max(norm, sum);
  }
  const auto inverse = [&](const Eigen::VectorXd& x) -> Eigen::VectorXd {
    return root.cwiseProduct(Eigen::VectorXd(factor.solve(root.cwiseProduct(x))));
  };
  Eigen::VectorXd x = Eigen::VectorXd::Constant(n, 1.0 / static_cast<double>(n));
  double estimate = 0;
  for (int step = 0; step < 5; ++step) {
    const Eigen::VectorXd y = inverse(x);
    const double norm_1 = y.lpNorm<1>();
    if (norm_1 <= estimate) break;
    estimate = norm_1;
    const Eigen::VectorXd sign = (y.array() >= 0).select(Eigen::VectorXd::Ones(n), -Eigen::VectorXd::Ones(n));
    const Eigen::VectorXd z = inverse(sign);
    Index at = 0;
    if (z.cwiseAbs().maxCoeff(&at) <= z.dot(x)) break;
    x = Eigen::VectorXd::Unit(n, at);
  }
  return norm * estimate;
}

}  // namespace focalframe::fem
