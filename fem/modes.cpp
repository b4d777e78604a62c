#include "fem/modes.h"

#include <algorithm>
#include <cmath>
#include <numbers>

#include "fem/assembly_parts.h"
#include "fem/eigen_pairs.h"
#include "fem/mechanism_search.h"
#include "fem/text.h"

namespace focalframe::fem {
namespace {

using Index = Eigen::Index;

/// 0 when K alone is positive; else a shift s with K + s M positive: well below the stiffest freedom and, as
/// omega_1^2 <= K_ii / M_ii, not far from the first frequencies.
double shift_for(const SparseMatrix& K, const SparseMatrix& M, const std::vector<int>& group) {
  const Eigen::VectorXd k = K.diagonal(), m = M.diagonal();
  const Factor factor(K, group);
  if (factor.ok() && k.minCoeff() > 0 && factor.pivots().cwiseQuotient(k).minCoeff() > 1e-7) return 0;
  double least = std::numeric_limits<double>::infinity();
  for (Index i = 0; i < k.size(); ++i)
    if (m(i) > 0 && k(i) > 0) least = std::min(least, k(i) / m(i));
  return std::isfinite(least) ? 1e-3 * least : 1.0;
}

void normalise(Eigen::VectorXd& x) {
  double greatest = 0, greatest_turn = 0;
  for (Index i = 0; i < x.size(); ++i) {
    double& g = i % 6 < 3 ? greatest : greatest_turn;
    if (std::abs(x(i)) > std::abs(g)) g = x(i);
  }
  x /= std::abs(greatest) > 1e-9 * std::abs(greatest_turn) ? greatest : greatest_turn;
}

Vec3 effective_mass(const SparseMatrix& M, const Eigen::VectorXd& x, double modal_mass) {
  const Eigen::VectorXd Mx = M * x;
  Vec3 along = Vec3::Zero();
  for (Index i = 0; i < x.size(); ++i)
    if (i % 6 < 3) along(i % 6) += Mx(i);
  return along.cwiseAbs2() / modal_mass;
}

}  // namespace

std::vector<Mode> natural_modes(const Frame& frame, int count) {
  const auto faults = find_faults(frame);
  require(faults.empty(), faults.empty() ? "" : faults.front().what);
  const std::vector<Element> elements = make_elements(frame);
  const FreedomMap map = freedom_map(frame);
  std::vector<int> group;
  for (const int f : map.kept) group.push_back(f / 6);
  const SparseMatrix M_full = assemble_mass(frame, elements);
  const SparseMatrix K = map.map.transpose() * assemble_stiffness(frame, elements) * map.map;
  const SparseMatrix M = map.map.transpose() * M_full * map.map;
  if (K.rows() == 0) return {};
  require(M.squaredNorm() > 0, "the frame has no mass: give densities or point masses");
  const double shift = shift_for(K, M, group);
  const SparseMatrix B = K + shift * M;
  const Factor factor(B, group);
  require_no_mechanism(frame, B, map.map, factor, group);
  const EigenPairs pairs = greatest_pairs(M, B, factor, group, count, std::numeric_limits<double>::min());

  std::vector<Mode> modes;
  for (Index k = 0; k < pairs.value.size(); ++k) {
    const double raised = 1 / pairs.value(k);  // omega^2 + shift
    double omega_2 = std::max(0.0, raised - shift);
    if (omega_2 < 1e-7 * shift) omega_2 = 0;
    const Eigen::VectorXd reduced = pairs.vector.col(k);
    const Eigen::VectorXd inertia = M * reduced;
    Eigen::VectorXd x = map.map * reduced;
    normalise(x);
    Mode mode;
    mode.frequency = std::sqrt(omega_2) / (2 * std::numbers::pi);
    mode.shape = Eigen::Map<const Eigen::MatrixXd>(x.data(), 6, x.size() / 6).transpose();
    mode.modal_mass = x.dot(M_full * x);
    mode.effective_mass = effective_mass(M_full, x, mode.modal_mass);
    mode.residual = (K * reduced - omega_2 * inertia).norm() / (raised * inertia.norm());
    mode.count_at = std::sqrt(std::max(0.0, 1 / pairs.place - shift)) / (2 * std::numbers::pi);
    mode.counted = pairs.counted;
    modes.push_back(mode);
  }
  return modes;
}

}  // namespace focalframe::fem
