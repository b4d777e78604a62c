#include "fem/buckling.h"

#include <cmath>

#include "fem/assembly_parts.h"
#include "fem/eigen_pairs.h"
#include "fem/geometric.h"
#include "fem/geometric_parts.h"
#include "fem/member_loads.h"
#include "fem/node_forces.h"

namespace focalframe::fem {
namespace {

using Index = Eigen::Index;

std::vector<int> nodes_of(const std::vector<int>& freedoms) {
  std::vector<int> nodes;
  for (const int f : freedoms) nodes.push_back(f / 6);
  return nodes;
}

bool empty(const LoadCase& load) {
  return load.gravity.isZero(0) && load.nodes.empty() && load.lines.empty() && load.points.empty() &&
         load.temperatures.empty();
}

Eigen::MatrixXd by_nodes(const Eigen::VectorXd& full) {
  return Eigen::Map<const Eigen::MatrixXd>(full.data(), 6, full.size() / 6).transpose();
}

[[noreturn]] void throw_unstable(const LoadCase& load) {
  throw Unstable("the frame is not stable under load case '" + load.name +
                 "': the load lies above the buckling load");
}

}  // namespace

std::vector<BucklingMode> buckling_modes(const Frame& frame, const LoadCase& load, int count,
                                         const LoadCase& constant, double greatest_factor) {
  const StaticSolver solver(frame);
  const std::vector<Element> elements = make_elements(frame);
  const FreedomMap map = freedom_map(frame);
  const std::vector<int> group = nodes_of(map.kept);
  const auto reduced = [&](const SparseMatrix& full) -> SparseMatrix {
    return map.map.transpose() * full * map.map;
  };
  SparseMatrix K = reduced(assemble_stiffness(frame, elements));
  if (!empty(constant)) K += reduced(assemble_geometric_stiffness(frame, constant, solver.solve(constant)));
  const Factor factor(K, group);
  if (!factor.ok() || factor.negative_pivots() > 0) throw_unstable(constant);
  const SparseMatrix G = -reduced(assemble_geometric_stiffness(frame, load, solver.solve(load)));
  const EigenPairs pairs = greatest_pairs(G, K, factor, group, count, 1 / greatest_factor);

  std::vector<BucklingMode> modes;
  for (Index k = 0; k < pairs.value.size(); ++k) {
    const Eigen::VectorXd x = pairs.vector.col(k);
    const Eigen::VectorXd elastic = K * x;
    BucklingMode mode;
    mode.factor = 1 / pairs.value(k);
    mode.residual = (elastic - mode.factor * (G * x)).norm() / elastic.norm();
    mode.shape = by_nodes(map.map * x);
    Index row = 0, col = 0;
    const double moved = mode.shape.leftCols<3>().cwiseAbs().maxCoeff(&row, &col);
    const double turned = mode.shape.rightCols<3>().cwiseAbs().maxCoeff();
    mode.shape /= moved > 1e-9 * turned ? mode.shape(row, col) : turned;
    mode.count_at = 1 / pairs.place;
    mode.counted = pairs.counted;
    modes.push_back(mode);
  }
  return modes;
}

SecondOrder second_order(const Frame& frame, const LoadCase& load) {
  SecondOrder result{StaticSolver(frame).solve(load)};
  const std::vector<Element> elements = make_elements(frame);
  const FreedomMap map = freedom_map(frame);
  const std::vector<int> group = nodes_of(map.kept);
  const SparseMatrix K = assemble_stiffness(frame, elements);
  const AssembledLoads loads = assemble_loads(frame, elements, {load});
  const std::vector<LoadCase> own = loads_by_member(frame, load);
  Response& r = result.response;
  for (result.steps = 1; result.steps <= 50; ++result.steps) {
    const Response stress = r;  // of the step before: its forces make the geometric stiffness
    const SparseMatrix total = K + assemble_geometric_stiffness(frame, load, stress);
    const SparseMatrix reduced = map.map.transpose() * total * map.map;
    const Factor factor(reduced, group);
    if (!factor.ok() || factor.negative_pivots() > 0) throw_unstable(load);
    const Eigen::VectorXd force = loads.node_force.col(0) - total * map.shift;
    const Eigen::VectorXd right = map.map.transpose() * force;
    Eigen::VectorXd x = factor.solve(right);
    x += factor.solve(right - reduced * x);  // one step of refinement
    const Eigen::VectorXd u = map.map * x + map.shift;
    const Eigen::MatrixXd before = r.displacement;
    r.displacement = by_nodes(u);
    share_unbalanced_force(frame, total * u - loads.node_force.col(0), r);
    add_spring_forces(frame, u, r);
    for (std::size_t m = 0; m < elements.size(); ++m) {
      const auto row = static_cast<Index>(m);
      const int member = static_cast<int>(m);
      Vec12 nodes;
      nodes << r.displacement.row(frame.members[m].from).transpose(),
          r.displacement.row(frame.members[m].to).transpose();
      const Vec12 ends = elements[m].carry * nodes;
      r.end_force.row(row) = elements[m].between * ends + loads.fixed_end_force.block<12, 1>(12 * row, 0) +
                             inner_geometric_stiffness(frame, own[m], stress, member, elements[m]) * ends;
    }
    r.residual = right.norm() > 0 ? (right - reduced * x).norm() / right.norm() : 0;
    result.change = (r.displacement - before).norm() / std::max(r.displacement.norm(), 1e-300);
    if (result.change < 1e-10) break;
  }
  if (!(result.change < 1e-6)) throw_unstable(load);
  return result;
}

}  // namespace focalframe::fem
