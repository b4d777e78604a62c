#include "fem/statics.h"

#include <Eigen/QR>
#include <algorithm>
#include <map>

#include "fem/assembly_parts.h"
#include "fem/mechanism_search.h"
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

/// Supports and joints that touch each other through joints, with the forces they carry: few enough for a
/// dense least-squares solve of (their directions)^T force = unbalanced node force.
class Constraints {
 public:
  explicit Constraints(const Frame& frame) : frame_(frame) {}

  /// `unbalanced` = K u - f over all freedoms.
  void share_out(const Eigen::VectorXd& unbalanced, Response& response) const {
    response.joint_force = Eigen::MatrixXd::Zero(static_cast<Index>(frame_.joints.size()), 6);
    std::map<int, int> part;  // node -> smallest node it is joined with
    for (const Joint& j : frame_.joints) part[j.node] = j.node, part[j.other] = j.other;
    for (bool changed = true; changed;) {
      changed = false;
      for (const Joint& j : frame_.joints) {
        int &a = part[j.node], &b = part[j.other];
        if (a != b) a = b = std::min(a, b), changed = true;
      }
    }
    for (const Support& s : frame_.supports)
      for (int d = 0; d < 6; ++d)
        if (s.fix[static_cast<std::size_t>(d)] && !part.count(s.node))
          response.reaction(s.node, d) = unbalanced(6 * s.node + d);
    std::map<int, std::vector<int>> clusters;
    for (const auto& [node, root] : part) clusters[root].push_back(node);
    for (const auto& [root, nodes] : clusters) share_cluster(nodes, unbalanced, response);
  }

 private:
  void share_cluster(const std::vector<int>& nodes, const Eigen::VectorXd& unbalanced,
                     Response& response) const {
    std::map<int, Index> row;
    Eigen::VectorXd force(6 * static_cast<Index>(nodes.size()));
    for (const int n : nodes) {
      const auto first = static_cast<Index>(6 * row.size());
      row[n] = first;
      force.segment<6>(first) = unbalanced.segment<6>(6 * n);
    }
    std::map<std::pair<int, int>, int> fixed;  // (node, dof), each once however many supports name it
    for (const Support& s : frame_.supports)
      for (int d = 0; d < 6; ++d)
        if (row.count(s.node) && s.fix[static_cast<std::size_t>(d)]) fixed[{s.node, d}] = 1;
    std::vector<std::pair<int, int>> held;  // (joint, direction)
    for (int j = 0; j < static_cast<int>(frame_.joints.size()); ++j)
      for (int k = 0; k < 6; ++k) {
        const Joint& joint = frame_.joints[static_cast<std::size_t>(j)];
        if (row.count(joint.node) && joint.held[static_cast<std::size_t>(k)]) held.push_back({j, k});
      }
    Eigen::MatrixXd directions =
        Eigen::MatrixXd::Zero(force.size(), static_cast<Index>(fixed.size() + held.size()));
    Index column = 0;
    for (const auto& [place, once] : fixed) directions(row[place.first] + place.second, column++) = 1;
    for (const auto& [j, k] : held) {
      const Joint& joint = frame_.joints[static_cast<std::size_t>(j)];
      const Index part = k < 3 ? 0 : 3;
      directions.block<3, 1>(row[joint.node] + part, column) = joint.axes.col(k % 3);
      directions.block<3, 1>(row[joint.other] + part, column) = -joint.axes.col(k % 3);
      ++column;
    }
    // Moments are small beside forces in millimetre frames and the other way round: plain least squares is
    // enough, because the forces fit exactly.
    const Eigen::VectorXd carried = directions.completeOrthogonalDecomposition().solve(force);
    column = 0;
    for (const auto& [place, once] : fixed) response.reaction(place.first, place.second) = carried(column++);
    for (const auto& [j, k] : held) response.joint_force(j, k) = carried(column++);
  }

  const Frame& frame_;
};

void add_springs(const Frame& frame, const Eigen::VectorXd& u, Response& response) {
  response.spring_force = Eigen::MatrixXd::Zero(static_cast<Index>(frame.springs.size()), 6);
  for (std::size_t i = 0; i < frame.springs.size(); ++i) {
    const Spring& s = frame.springs[i];
    Vec12 ends = Vec12::Zero();
    ends.head<6>() = u.segment<6>(6 * s.node);
    if (s.other >= 0) ends.tail<6>() = u.segment<6>(6 * s.other);
    const Mat6x12 motion = spring_motion(frame, s);
    const Vec6 force = -s.stiffness.cwiseProduct(Vec6(motion * ends));
    response.spring_force.row(static_cast<Index>(i)) = force;
    if (s.other < 0) response.reaction.row(s.node) += (motion.leftCols<6>().transpose() * force).transpose();
  }
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
  const Constraints constraints(d.frame);
  std::vector<Response> responses(cases.size());
  for (std::size_t c = 0; c < cases.size(); ++c) {
    Response& r = responses[c];
    const auto col = static_cast<Index>(c);
    const Eigen::VectorXd u = solved.u.col(col), ends = end_force.col(col);
    r.displacement = Eigen::Map<const Eigen::MatrixXd>(u.data(), 6, nodes).transpose();
    r.end_force = Eigen::Map<const Eigen::MatrixXd>(ends.data(), 12, members).transpose();
    r.reaction = Eigen::MatrixXd::Zero(nodes, 6);
    constraints.share_out(unbalanced.col(col), r);
    add_springs(d.frame, u, r);
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
