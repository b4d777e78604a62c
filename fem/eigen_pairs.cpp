#include "fem/eigen_pairs.h"

#include <Spectra/SymEigsSolver.h>

#include <Eigen/Eigenvalues>
#include <algorithm>
#include <numeric>
#include <stdexcept>

namespace focalframe::fem {
namespace {

using Index = Eigen::Index;

constexpr Index dense_limit = 120;  ///< up to here a dense solve is faster and misses nothing
/// Values this far below the greatest magnitude are round-off of zero.
constexpr double negligible = 1e-11;

/// C = R^-1 A R^-T with B = R R^T, less the pairs that are already known: y -> C y - Y (theta * Y^T y).
class DeflatedOperator {
 public:
  using Scalar = double;
  DeflatedOperator(const SparseMatrix& A, const Factor& factor, const EigenPairs& known)
      : A_(A), factor_(factor), known_(known) {}
  Index rows() const { return A_.rows(); }
  Index cols() const { return A_.rows(); }
  void perform_op(const double* in, double* out) const {
    const Eigen::Map<const Eigen::VectorXd> y(in, rows());
    Eigen::Map<Eigen::VectorXd> result(out, rows());
    result = factor_.lower_inverse(A_ * factor_.upper_inverse(y));
    if (known_.value.size() > 0)
      result -= known_.vector * known_.value.cwiseProduct(known_.vector.transpose() * y);
  }

 private:
  const SparseMatrix& A_;
  const Factor& factor_;
  const EigenPairs& known_;
};

EigenPairs dense_pairs(const SparseMatrix& A, const SparseMatrix& B) {
  const Eigen::GeneralizedSelfAdjointEigenSolver<Eigen::MatrixXd> solver(Eigen::MatrixXd{A},
                                                                         Eigen::MatrixXd{B});
  return {solver.eigenvalues().reverse(), solver.eigenvectors().rowwise().reverse(), 0, 0};
}

/// Adds up to `wanted` further pairs in the standard form's own vectors; false when nothing converged.
bool add_pairs(const SparseMatrix& A, const Factor& factor, int wanted, EigenPairs& known) {
  const Index n = A.rows();
  const Index ask = std::min<Index>(wanted, n - 1);
  // A wide space: frames of many equal parts have clusters of nearly equal values.
  const Index space = std::min<Index>(n, std::max<Index>(3 * ask, ask + 70));
  DeflatedOperator op(A, factor, known);
  Spectra::SymEigsSolver<DeflatedOperator> solver(op, ask, space);
  solver.init();
  const Index found =
      solver.compute(Spectra::SortRule::LargestAlge, 1000, 1e-11, Spectra::SortRule::LargestAlge);
  if (found == 0) return false;
  EigenPairs all{Eigen::VectorXd(known.value.size() + found), Eigen::MatrixXd(n, known.value.size() + found),
                 0, 0};
  all.value << known.value, solver.eigenvalues();
  all.vector << known.vector, solver.eigenvectors();
  std::vector<Index> order(static_cast<std::size_t>(all.value.size()));
  std::iota(order.begin(), order.end(), Index{0});
  std::stable_sort(order.begin(), order.end(), [&](Index a, Index b) { return all.value(a) > all.value(b); });
  known = {all.value(order), all.vector(Eigen::all, order), 0, 0};
  return true;
}

/// About the greatest magnitude of all eigenvalues, never above it: a few steps of the power method.
double magnitude(const SparseMatrix& A, const SparseMatrix& B, const Factor& factor) {
  Eigen::VectorXd x = Eigen::VectorXd::LinSpaced(A.rows(), 1.0, 2.0);
  double value = 0;
  for (int step = 0; step < 12; ++step) {
    const double size = std::sqrt(x.dot(B * x));
    if (!(size > 0)) return 0;
    x /= size;
    const Eigen::VectorXd Ax = A * x;
    value = std::max(value, std::abs(x.dot(Ax)));
    x = factor.solve(Ax);
  }
  return value;
}

/// Number of eigenvalues above mu.
int count_above(const SparseMatrix& A, const SparseMatrix& B, const std::vector<int>& group, double mu) {
  for (double shift = 1; shift < 1.001; shift += 1e-7) {
    const Factor factor(mu * shift * B - A, group);
    if (factor.ok()) return factor.negative_pivots();
  }
  throw std::runtime_error("the count of eigenvalues failed: every shift hits one");
}

/// A place below the last wanted value, in the gap to the next one where there is one.
double place_below(const Eigen::VectorXd& value, Index last, double floor) {
  if (last + 1 < value.size() && value(last + 1) > floor) return (value(last) + value(last + 1)) / 2;
  return std::max(floor, 0.999 * value(last));
}

}  // namespace

EigenPairs greatest_pairs(const SparseMatrix& A, const SparseMatrix& B, const Factor& factor_of_B,
                          const std::vector<int>& group, int count, double floor) {
  const Index n = A.rows();
  EigenPairs known{Eigen::VectorXd(0), Eigen::MatrixXd(n, 0), 0, 0};
  if (n == 0 || count <= 0 || A.squaredNorm() == 0) return known;
  const bool dense = n <= dense_limit;
  if (dense) known = dense_pairs(A, B);
  const double least = std::max(floor, negligible * magnitude(A, B, factor_of_B));
  int missing = count + 2;  // two more show the gap below the last one
  for (int round = 0; round < 8; ++round) {
    if (!dense && !add_pairs(A, factor_of_B, missing, known))
      throw std::runtime_error("the eigenvalue search did not converge");
    const auto usable = static_cast<Index>((known.value.array() > least).count());
    Index taken = std::min<Index>(count, usable);
    // A cluster that the last wanted value belongs to is taken whole, so that the count has a gap to stand
    // in.
    while (taken > 0 && taken < usable && known.value(taken) > known.value(taken - 1) * (1 - 1e-6)) ++taken;
    const double place = taken < count || taken == 0 ? least : place_below(known.value, taken - 1, least);
    const auto found = static_cast<int>((known.value.array() > place).count());
    const int present = count_above(A, B, group, place);
    if (present <= found) {
      const Index kept = std::min<Index>(count, taken);
      EigenPairs result{known.value.head(kept), known.vector.leftCols(kept), place, present};
      if (!dense)
        for (Index k = 0; k < kept; ++k)
          result.vector.col(k) = factor_of_B.upper_inverse(known.vector.col(k));
      return result;
    }
    if (dense) break;
    missing = present - found;
  }
  throw std::runtime_error("the eigenvalue search skipped values that a count of pivots shows to exist");
}

}  // namespace focalframe::fem
