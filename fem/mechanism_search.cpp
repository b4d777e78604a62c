#include "fem/mechanism_search.h"

#include <Eigen/Dense>
#include <algorithm>
#include <array>
#include <cmath>
#include <limits>

#include "fem/beam.h"
#include "fem/near_mechanism.h"
#include "fem/text.h"

namespace focalframe::fem {
namespace {

using Index = Eigen::Index;

constexpr double suspicious_ratio = 1e-7;
/// Energy of the softest motion over that of its diagonal. Round-off leaves about 1e-16 in a true mechanism;
/// a sound cantilever of a thousand pieces still has 1e-12.
constexpr double no_energy = 1e-13;

/// Fixed pseudo-random numbers in -1..1: no motion is orthogonal to them by chance of symmetry.
Eigen::VectorXd scattered(Index n) {
  Eigen::VectorXd x(n);
  unsigned long long state = 88172645463325252ULL;
  for (Index i = 0; i < n; ++i) {
    state = state * 6364136223846793005ULL + 1442695040888963407ULL;
    x(i) = static_cast<double>(state >> 11) / 4503599627370496.0 - 1.0;
  }
  return x;
}

struct Softest {
  Eigen::VectorXd motion;  ///< over the matrix's rows
  double energy = std::numeric_limits<double>::quiet_NaN();
};

/// Inverse iteration on A + shift diag A.
Softest softest_motion(const SparseMatrix& matrix, const std::vector<int>& group) {
  const Eigen::VectorXd diagonal = matrix.diagonal();
  SparseMatrix shifted = matrix;
  shifted.diagonal() += 1e-11 * diagonal;
  const Factor factor(shifted, group);
  Softest softest;
  if (!factor.ok()) return softest;
  Eigen::VectorXd x = scattered(matrix.rows()).cwiseQuotient(diagonal.cwiseSqrt());
  for (int step = 0; step < 6; ++step) {
    x = factor.solve(diagonal.cwiseProduct(x));
    x /= std::sqrt(x.dot(diagonal.cwiseProduct(x)));
  }
  if (!x.allFinite()) return softest;
  softest.motion = x;
  softest.energy = std::abs(x.dot(matrix * x));
  return softest;
}

double typical_length(const Frame& frame) {
  double sum = 0;
  for (int m = 0; m < static_cast<int>(frame.members.size()); ++m) sum += member_length(frame, m);
  return frame.members.empty() ? 1.0 : sum / static_cast<double>(frame.members.size());
}

/// Full motion scaled so that rotations count as displacements at a typical member's length.
Eigen::MatrixXd node_motions(const Frame& frame, const Eigen::VectorXd& full) {
  Eigen::MatrixXd motion = Eigen::Map<const Eigen::MatrixXd>(full.data(), 6, full.size() / 6).transpose();
  motion.rightCols<3>() *= typical_length(frame);
  return motion;
}

/// Is the motion that of one rigid body?
bool is_rigid(const Frame& frame, const Eigen::VectorXd& full) {
  Eigen::MatrixXd rigid = Eigen::MatrixXd::Zero(full.size(), 6);
  for (std::size_t i = 0; i < frame.nodes.size(); ++i)
    for (int k = 0; k < 3; ++k) {
      const Vec3 axis = Vec3::Unit(k);
      const auto row = static_cast<Index>(6 * i);
      rigid.block<3, 1>(row, k) = axis;
      rigid.block<3, 1>(row, 3 + k) = axis.cross(frame.nodes[i].at);
      rigid.block<3, 1>(row + 3, 3 + k) = axis;
    }
  const Eigen::VectorXd fit = rigid * rigid.colPivHouseholderQr().solve(full);
  return (full - fit).norm() < 1e-4 * full.norm();
}

bool has_release(const Member& m) {
  const auto any = [](const Six& six) { return std::find(six.begin(), six.end(), true) != six.end(); };
  return any(m.release_from) || any(m.release_to);
}

bool has_spring(const Member& m) {
  const auto any = [](const std::array<double, 6>& k) { return *std::max_element(k.begin(), k.end()) > 0; };
  return any(m.spring_from) || any(m.spring_to);
}

/// Up to three releases and joints (`soft`: springs too) whose nodes take part in the motion.
std::string suspects(const Frame& frame, const Eigen::MatrixXd& motion, bool soft) {
  const double limit = 1e-3 * motion.cwiseAbs().maxCoeff();
  const auto moves = [&](int node) { return motion.row(node).cwiseAbs().maxCoeff() > limit; };
  std::string list;
  int count = 0;
  const auto add = [&](const std::string& what) {
    if (++count <= 3) list += (list.empty() ? "" : ", ") + what;
  };
  for (const Joint& j : frame.joints)
    if (moves(j.node) || moves(j.other)) add("joint '" + j.name + "'");
  if (soft)
    for (const Spring& s : frame.springs)
      if (moves(s.node) || (s.other >= 0 && moves(s.other))) add("the stiffness of '" + s.name + "'");
  for (int m = 0; m < static_cast<int>(frame.members.size()); ++m) {
    const Member& member = frame.members[static_cast<std::size_t>(m)];
    if (soft && has_spring(member) && (moves(member.from) || moves(member.to)))
      add("the end springs of " + member_words(frame, m));
    if (has_release(member) && (moves(member.from) || moves(member.to)))
      add("the releases of " + member_words(frame, m));
  }
  return count > 3 ? list + " and others" : list;
}

bool held_at_all(const Frame& frame) {
  const auto fixes = [](const Support& s) {
    return std::find(s.fix.begin(), s.fix.end(), true) != s.fix.end();
  };
  const auto grounds = [](const Spring& s) { return s.other < 0 && s.stiffness.maxCoeff() > 0; };
  return std::any_of(frame.supports.begin(), frame.supports.end(), fixes) ||
         std::any_of(frame.springs.begin(), frame.springs.end(), grounds);
}

std::string likely_cause(const Frame& frame, const Eigen::VectorXd& full, const Eigen::MatrixXd& motion,
                         int dof, bool soft) {
  const std::string who = suspects(frame, motion, soft);
  if (is_rigid(frame, full) && !(soft && !who.empty())) {
    if (!held_at_all(frame)) return "nothing holds the frame: it has no support and no spring to ground";
    return std::string("the supports let the whole frame move; hold ") + dof_name(dof) +
           " (or what stops this motion) at one more node";
  }
  if (soft)
    return who.empty() ? std::string("members that are very slender for their length")
                       : "very soft beside its neighbours; look at " + who;
  const double limit = 1e-3 * motion.cwiseAbs().maxCoeff();
  const auto moving = (motion.cwiseAbs().rowwise().maxCoeff().array() > limit).count();
  if (moving == 1)
    return "nothing that ends at this node resists this motion" +
           (who.empty() ? std::string("; hold it or connect a member that does") : "; look at " + who);
  return who.empty() ? std::string("a part of the frame is connected too loosely or not held")
                     : "a part of the frame moves by itself; look at " + who;
}

// `soft`: it moves with hardly any resistance instead of none.
Mechanism describe(const Frame& frame, const Eigen::VectorXd& full, double ratio, bool soft) {
  const Eigen::MatrixXd motion = node_motions(frame, full);
  Index node = 0, dof = 0;
  // A hair of preference for the first of several equal motions, so that round-off does not choose.
  const double largest = motion.cwiseAbs().maxCoeff();
  for (Index i = motion.rows(); i-- > 0;)
    for (Index d = 6; d-- > 0;)
      if (std::abs(motion(i, d)) > largest * (1 - 1e-6)) node = i, dof = d;
  const auto n = static_cast<int>(node), d = static_cast<int>(dof);
  return Mechanism(n, d, ratio,
                   std::string("the frame can move ") + (soft ? "with hardly any" : "without") +
                       " resistance: " + node_words(frame, n) + " moves most, it " + dof_words(d) + " (" +
                       dof_name(d) + "). Likely cause: " + likely_cause(frame, full, motion, d, soft) + ".");
}

[[noreturn]] void throw_mechanism(const Frame& frame, const Eigen::VectorXd& full, double ratio) {
  throw describe(frame, full, ratio, false);
}

}  // namespace

double require_no_mechanism(const Frame& frame, const SparseMatrix& matrix, const SparseMatrix& map,
                            const Factor& factor, const std::vector<int>& group) {
  const Index n = matrix.rows();
  if (n == 0) return 1;
  const Eigen::VectorXd diagonal = matrix.diagonal();
  Index at = 0;
  if (diagonal.minCoeff(&at) <= 0) throw_mechanism(frame, map * Eigen::VectorXd::Unit(n, at), 0);
  double ratio = 0;
  if (factor.ok()) {
    ratio = factor.pivots().cwiseQuotient(diagonal).minCoeff(&at);
    if (ratio >= suspicious_ratio) return ratio;
  }
  const Softest softest = softest_motion(matrix, group);
  if (factor.ok() && ratio > 0 && softest.energy > no_energy) return ratio;
  throw_mechanism(
      frame,
      map * (softest.motion.size() > 0 ? softest.motion : Eigen::VectorXd(Eigen::VectorXd::Unit(n, at))),
      ratio);
}

std::optional<Mechanism> near_mechanism(const Frame& frame) {
  const FreedomMap map = freedom_map(frame);
  const SparseMatrix matrix = map.map.transpose() * assemble_stiffness(frame) * map.map;
  std::vector<int> group;
  for (const int f : map.kept) group.push_back(f / 6);
  const Factor factor(matrix, group);
  if (matrix.rows() == 0 || !factor.ok()) return std::nullopt;
  const double ratio = factor.pivots().cwiseQuotient(matrix.diagonal()).minCoeff();
  if (ratio >= suspicious_ratio) return std::nullopt;
  const Softest softest = softest_motion(matrix, group);
  if (softest.motion.size() == 0) return std::nullopt;
  return describe(frame, map.map * softest.motion, ratio, true);
}

}  // namespace focalframe::fem
