#include "fem/condensed.h"

#include <algorithm>

#include "fem/assembly_parts.h"
#include "fem/mechanism_search.h"
#include "fem/text.h"

namespace focalframe::fem {
namespace {

using Index = Eigen::Index;

std::vector<int> full_numbers(const Frame& frame, const std::vector<Freedom>& freedoms) {
  std::vector<int> full;
  for (const Freedom& f : freedoms) {
    require(f.node >= 0 && f.node < static_cast<int>(frame.nodes.size()) && f.dof >= 0 && f.dof < 6,
            "chosen freedom " + std::to_string(f.dof) + " of node number " + std::to_string(f.node) +
                " does not exist");
    const int number_of = 6 * f.node + f.dof;
    require(std::find(full.begin(), full.end(), number_of) == full.end(),
            std::string("the freedom ") + dof_name(f.dof) + " of " + node_words(frame, f.node) +
                " is chosen twice");
    full.push_back(number_of);
  }
  return full;
}

void require_sound(const Frame& frame, const std::vector<Freedom>& freedoms) {
  std::vector<int> held;
  for (const Freedom& f : freedoms) held.push_back(f.node);
  const auto faults = find_faults(frame, held);
  require(faults.empty(), faults.empty() ? "" : faults.front().what);
  for (const Support& s : frame.supports)
    require(s.imposed.isZero(0),
            "a support of " + node_words(frame, s.node) +
                " imposes a displacement: condensation has no place for it, give it as a "
                "chosen freedom");
}

/// Columns of the map that belong to the chosen freedoms, and the others.
struct Partition {
  SparseMatrix chosen, inner;  ///< full freedoms x #chosen, x #inner
  std::vector<int> group;      ///< node of each inner column
};

Partition partition(const FreedomMap& map, const std::vector<int>& chosen) {
  std::vector<int> place(static_cast<std::size_t>(map.map.rows()), -1);
  for (std::size_t i = 0; i < chosen.size(); ++i)
    place[static_cast<std::size_t>(chosen[i])] = static_cast<int>(i);
  std::vector<Eigen::Triplet<double>> to_chosen, to_inner;
  Partition p;
  for (std::size_t k = 0; k < map.kept.size(); ++k) {
    const int at = place[static_cast<std::size_t>(map.kept[k])];
    const int column = at >= 0 ? at : static_cast<int>(p.group.size());
    for (SparseMatrix::InnerIterator it(map.map, static_cast<int>(k)); it; ++it)
      (at >= 0 ? to_chosen : to_inner).emplace_back(static_cast<int>(it.row()), column, it.value());
    if (at < 0) p.group.push_back(map.kept[k] / 6);
  }
  p.chosen.resize(map.map.rows(), static_cast<Index>(chosen.size()));
  p.chosen.setFromTriplets(to_chosen.begin(), to_chosen.end());
  p.inner.resize(map.map.rows(), static_cast<Index>(p.group.size()));
  p.inner.setFromTriplets(to_inner.begin(), to_inner.end());
  return p;
}

double worst_ratio(const Eigen::MatrixXd& rest, const Eigen::MatrixXd& right) {
  double worst = 0;
  for (Index c = 0; c < right.cols(); ++c)
    if (right.col(c).norm() > 0) worst = std::max(worst, rest.col(c).norm() / right.col(c).norm());
  return worst;
}

}  // namespace

Condensed condense(const Frame& frame, const std::vector<Freedom>& freedoms, const Eigen::MatrixXd& loads) {
  require_sound(frame, freedoms);
  require(loads.rows() == frame.freedoms(), "load columns have " + std::to_string(loads.rows()) +
                                                " rows, must have " + std::to_string(frame.freedoms()));
  const std::vector<int> chosen = full_numbers(frame, freedoms);
  const SparseMatrix K = assemble_stiffness(frame);
  const Partition p = partition(freedom_map(frame, chosen), chosen);
  const SparseMatrix inner_stiffness = p.inner.transpose() * K * p.inner;
  const Factor factor(inner_stiffness, p.group);

  Condensed c;
  c.freedoms = freedoms;
  c.smallest_pivot_ratio = require_no_mechanism(frame, inner_stiffness, p.inner, factor, p.group);
  c.condition_estimate = condition_estimate(inner_stiffness, factor);

  // Unit load columns first, then unit motions of the chosen freedoms: one block of right-hand sides.
  Eigen::MatrixXd given(K.rows(), loads.cols() + p.chosen.cols());
  given << loads, -Eigen::MatrixXd(K * p.chosen);
  const Eigen::MatrixXd right = p.inner.transpose() * given;
  Eigen::MatrixXd x = factor.solve(right);
  const auto left_over = [&]() -> Eigen::MatrixXd {
    return p.inner.transpose() * Eigen::MatrixXd(given - K * Eigen::MatrixXd(p.inner * x));
  };
  x += factor.solve(left_over());  // one step of refinement
  c.residual = worst_ratio(left_over(), right);
  c.held_response = p.inner * x.leftCols(loads.cols());
  c.joint_response = p.inner * x.rightCols(p.chosen.cols());
  c.joint_response += p.chosen;

  // Energy forms: an error in the responses enters them only squared.
  const Eigen::MatrixXd forces = K * c.joint_response;
  const Eigen::MatrixXd stiffness = c.joint_response.transpose() * forces;
  c.stiffness = (stiffness + stiffness.transpose()) / 2;
  c.load = c.joint_response.transpose() * (loads - K * c.held_response);
  return c;
}

}  // namespace focalframe::fem
