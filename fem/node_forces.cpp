#include "fem/node_forces.h"

#include <Eigen/QR>
#include <algorithm>
#include <map>

#include "fem/assembly_parts.h"

namespace focalframe::fem {
namespace {

using Index = Eigen::Index;

/// Supports and joints that touch each other through joints, with the forces they carry: few enough for a
/// dense least-squares solve of (their directions)^T force = unbalanced node force.
class Constraints {
 public:
  explicit Constraints(const Frame& frame) : frame_(frame) {}

  /// `unbalanced` = K u - f over all freedoms.
  void share_out(const Eigen::VectorXd& unbalanced, Response& response) const {
    response.reaction = Eigen::MatrixXd::Zero(unbalanced.size() / 6, 6);
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

}  // namespace

void share_unbalanced_force(const Frame& frame, const Eigen::VectorXd& unbalanced, Response& response) {
  Constraints(frame).share_out(unbalanced, response);
}

void add_spring_forces(const Frame& frame, const Eigen::VectorXd& u, Response& response) {
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

}  // namespace focalframe::fem
