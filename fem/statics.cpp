#include "fem/statics.h"

#include "fem/assembly_parts.h"
#include "fem/mechanism_search.h"
#include "fem/node_forces.h"
#include "fem/text.h"

namespace focalframe::fem {
namespace {

using Index = Eigen::Index;

std::vector<int> nodes_of(const std::vector<int>& freedoms) {
  std::vector<int> nodes;
  nodes.reserve(freedoms.size());
  for (const int f : freedoms) nodes.push_back(f / 6);
  return nodes;
}

const Frame& sound(const Frame& frame) {
  const auto faults = find_faults(frame);
  require(faults.empty(), faults.empty() ? "" : faults.front().what);
  return frame;
}

}  // namespace

struct StaticSolver::Data {
  Frame frame;
  std::vector<Element> elements;
  SparseMatrix stiffness;  ///< over all freedoms
  SparseMatrix end_forces;
  FreedomMap map;
  SparseMatrix reduced;
  std::vector<int> group;
  Factor factor;
  double pivot_ratio = 0;

  explicit Data(const Frame& f)
      : frame(sound(f)),
        elements(make_elements(frame)),
        stiffness(fem::assemble_stiffness(frame, elements)),
        end_forces(fem::assemble_end_forces(frame, elements)),
        map(freedom_map(frame)),
        reduced(map.map.transpose() * stiffness * map.map),
        group(nodes_of(map.kept)),
        factor(reduced, group),
        pivot_ratio(require_no_mechanism(frame, reduced, map.map, factor, group)) {}

  struct Solved {
    Eigen::MatrixXd u;         ///< over all freedoms
    Eigen::VectorXd residual;  ///< relative, per column
  };

  Solved solve(const Eigen::MatrixXd& loads) const {
    const Eigen::MatrixXd shifted = loads.colwise() - stiffness * map.shift;
    const Eigen::MatrixXd right = map.map.transpose() * shifted;
    Eigen::MatrixXd x = factor.solve(right);
    const auto left_over = [&]() -> Eigen::MatrixXd {
      return map.map.transpose() * Eigen::MatrixXd(shifted - stiffness * Eigen::MatrixXd(map.map * x));
    };
    x += factor.solve(left_over());  // one step of refinement
    const Eigen::MatrixXd rest = left_over();
    Solved solved{map.map * x, Eigen::VectorXd::Zero(loads.cols())};
    solved.u.colwise() += map.shift;
    for (Index c = 0; c < loads.cols(); ++c)
      if (right.col(c).norm() > 0) solved.residual(c) = rest.col(c).norm() / right.col(c).norm();
    return solved;
  }
};

StaticSolver::StaticSolver(const Frame& frame) : data_(std::make_unique<Data>(frame)) {}
StaticSolver::~StaticSolver() = default;
StaticSolver::StaticSolver(StaticSolver&&) noexcept = default;
StaticSolver& StaticSolver::operator=(StaticSolver&&) noexcept = default;

Response StaticSolver::solve(const LoadCase& load) const {
  return solve(std::vector<LoadCase>{load}).front();
}

std::vector<Response> StaticSolver::solve(const std::vector<LoadCase>& cases) const {
  const Data& d = *data_;
  const auto nodes = static_cast<Index>(d.frame.nodes.size()),
             members = static_cast<Index>(d.elements.size());
  const AssembledLoads loads = assemble_loads(d.frame, d.elements, cases);
  const Data::Solved solved = d.solve(loads.node_force);
  const Eigen::MatrixXd unbalanced = d.stiffness * solved.u - loads.node_force;
  const Eigen::MatrixXd end_force = d.end_forces * solved.u + loads.fixed_end_force;
  std::vector<Response> responses(cases.size());
  for (std::size_t c = 0; c < cases.size(); ++c) {
    Response& r = responses[c];
    const auto col = static_cast<Index>(c);
    const Eigen::VectorXd u = solved.u.col(col), ends = end_force.col(col);
    r.displacement = Eigen::Map<const Eigen::MatrixXd>(u.data(), 6, nodes).transpose();
    r.end_force = Eigen::Map<const Eigen::MatrixXd>(ends.data(), 12, members).transpose();
    share_unbalanced_force(d.frame, unbalanced.col(col), r);
    add_spring_forces(d.frame, u, r);
    r.residual = solved.residual(col);
  }
  return responses;
}

Eigen::MatrixXd StaticSolver::displacements(const Eigen::MatrixXd& loads) const {
  require(loads.rows() == data_->frame.freedoms(), "load vectors have " + std::to_string(loads.rows()) +
                                                       " rows, must have " +
                                                       std::to_string(data_->frame.freedoms()));
  return data_->solve(loads).u;
}

double StaticSolver::smallest_pivot_ratio() const { return data_->pivot_ratio; }
double StaticSolver::condition_estimate() const {
  return fem::condition_estimate(data_->reduced, data_->factor);
}

}  // namespace focalframe::fem
