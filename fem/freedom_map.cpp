#include <cmath>
#include <map>

#include "fem/assembly.h"
#include "fem/text.h"

namespace focalframe::fem {
namespace {

/// sum of terms = value, over full freedoms.
struct Equation {
  std::map<int, double> terms;
  double value = 0;
};

/// Exact elimination: each equation takes one freedom out, expressed by the others.
class Elimination {
 public:
  Elimination(int freedoms, const std::vector<int>& masters)
      : solved_(static_cast<std::size_t>(freedoms), -1), master_(static_cast<std::size_t>(freedoms), false) {
    for (const int m : masters) master_.at(static_cast<std::size_t>(m)) = true;
  }

  bool is_master(int freedom) const { return master_[static_cast<std::size_t>(freedom)]; }
  bool is_solved(int freedom) const { return solved_[static_cast<std::size_t>(freedom)] >= 0; }

  void fix(int freedom, double value) {
    solved_[static_cast<std::size_t>(freedom)] = static_cast<int>(solutions_.size());
    solutions_.push_back({freedom, {{}, value}});
  }

  /// False when the equation contradicts those before it; `held_master` tells that only masters are left in
  /// it.
  bool add(Equation e, bool& held_master) {
    substitute(e);
    int pivot = -1;
    double largest = 1e-9, largest_master = 0;
    for (const auto& [freedom, factor] : e.terms) {
      if (is_master(freedom))
        largest_master = std::max(largest_master, std::abs(factor));
      else if (std::abs(factor) > largest)
        largest = std::abs(factor), pivot = freedom;
    }
    held_master = pivot < 0 && largest_master > 1e-9;
    if (pivot < 0) return std::abs(e.value) <= 1e-12;
    const double factor = e.terms.at(pivot);
    e.terms.erase(pivot);
    for (auto& [freedom, term] : e.terms) term /= -factor;
    e.value /= factor;
    solved_[static_cast<std::size_t>(pivot)] = static_cast<int>(solutions_.size());
    solutions_.push_back({pivot, e});
    return true;
  }

  FreedomMap result() {
    FreedomMap map;
    const auto freedoms = static_cast<int>(solved_.size());
    std::vector<int> column(solved_.size(), -1);
    std::vector<Eigen::Triplet<double>> triplets;
    for (int f = 0; f < freedoms; ++f) {
      if (is_solved(f)) continue;
      column[static_cast<std::size_t>(f)] = static_cast<int>(map.kept.size());
      triplets.emplace_back(f, static_cast<int>(map.kept.size()), 1.0);
      map.kept.push_back(f);
    }
    map.shift = Eigen::VectorXd::Zero(freedoms);
    for (auto& [freedom, equation] : solutions_) {
      substitute(equation, 1);
      map.shift(freedom) = equation.value;
      for (const auto& [other, factor] : equation.terms)
        if (std::abs(factor) > 1e-14)
          triplets.emplace_back(freedom, column[static_cast<std::size_t>(other)], factor);
    }
    map.map.resize(freedoms, static_cast<int>(map.kept.size()));
    map.map.setFromTriplets(triplets.begin(), triplets.end());
    return map;
  }

 private:
  /// Replaces freedoms that are already solved. `sign` is -1 when the solution's value moves to the
  /// right-hand side (an equation), +1 when it adds to the value (an expression).
  void substitute(Equation& e, double sign = -1) {
    for (bool again = true; again;) {
      again = false;
      for (const auto& [freedom, factor] : e.terms) {
        if (!is_solved(freedom)) continue;
        const double by = factor;
        const Equation& solution =
            solutions_[static_cast<std::size_t>(solved_[static_cast<std::size_t>(freedom)])].second;
        e.terms.erase(freedom);
        for (const auto& [other, term] : solution.terms) e.terms[other] += by * term;
        e.value += sign * by * solution.value;
        again = true;
        break;
      }
    }
  }

  std::vector<int> solved_;  ///< per freedom: index of its solution, or -1
  std::vector<bool> master_;
  std::vector<std::pair<int, Equation>> solutions_;
};

void add_supports(const Frame& frame, Elimination& elimination) {
  std::map<int, double> fixed;
  for (const Support& s : frame.supports)
    for (int d = 0; d < 6; ++d)
      if (s.fix[static_cast<std::size_t>(d)]) fixed[6 * s.node + d] += s.imposed(d);
  for (const auto& [freedom, value] : fixed) {
    require(!elimination.is_master(freedom), std::string("the chosen freedom ") + dof_name(freedom % 6) +
                                                 " of " + node_words(frame, freedom / 6) +
                                                 " is fixed by a support");
    elimination.fix(freedom, value);
  }
}

void add_joint(const Frame& frame, const Joint& joint, Elimination& elimination) {
  for (int part = 0; part < 6; part += 3) {
    const auto first = static_cast<std::size_t>(part);
    const bool all = joint.held[first] && joint.held[first + 1] && joint.held[first + 2];
    const Mat3 axes = all ? Mat3(Mat3::Identity()) : joint.axes;  // no need to turn what is held altogether
    for (int k = 0; k < 3; ++k) {
      if (!joint.held[first + static_cast<std::size_t>(k)]) continue;
      Equation e;
      for (int i = 0; i < 3; ++i) {
        if (axes(i, k) == 0) continue;
        e.terms[6 * joint.node + part + i] = axes(i, k);
        e.terms[6 * joint.other + part + i] = -axes(i, k);
      }
      bool held_master = false;
      const bool sound = elimination.add(e, held_master);
      require(!held_master, "joint '" + joint.name + "' between " + node_words(frame, joint.node) + " and " +
                                node_words(frame, joint.other) +
                                " holds only chosen freedoms: choose the freedoms of one side");
      require(sound, "joint '" + joint.name + "' contradicts the imposed displacements of " +
                         node_words(frame, joint.node) + " and " + node_words(frame, joint.other));
    }
  }
}

}  // namespace

FreedomMap freedom_map(const Frame& frame, const std::vector<int>& masters) {
  Elimination elimination(frame.freedoms(), masters);
  add_supports(frame, elimination);
  for (const Joint& joint : frame.joints) add_joint(frame, joint, elimination);
  return elimination.result();
}

FreedomMap freedom_map(const Frame& frame) { return freedom_map(frame, {}); }

}  // namespace focalframe::fem
