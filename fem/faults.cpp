#include <Eigen/Dense>
#include <algorithm>
#include <cmath>
#include <map>
#include <numeric>
#include <tuple>

#include "fem/beam.h"
#include "fem/frame.h"
#include "fem/text.h"

namespace focalframe::fem {
namespace {

/// Sets of nodes that hang together.
class Parts {
 public:
  explicit Parts(std::size_t n) : parent_(n) { std::iota(parent_.begin(), parent_.end(), 0); }
  int find(int i) {
    while (parent_[index(i)] != i) i = parent_[index(i)] = parent_[index(parent_[index(i)])];
    return i;
  }
  void join(int a, int b) { parent_[index(find(a))] = find(b); }

 private:
  static std::size_t index(int i) { return static_cast<std::size_t>(i); }
  std::vector<int> parent_;
};

using Faults = std::vector<FrameFault>;

bool within(int i, std::size_t n) { return i >= 0 && static_cast<std::size_t>(i) < n; }

double extent(const Frame& frame) {
  if (frame.nodes.empty()) return 0;
  Vec3 low = frame.nodes.front().at, high = low;
  for (const Node& n : frame.nodes) {
    low = low.cwiseMin(n.at);
    high = high.cwiseMax(n.at);
  }
  return (high - low).norm();
}

double tolerance(const Frame& frame) { return 1e-7 * std::max(1.0, extent(frame)); }

bool orthonormal(const Mat3& axes) {
  return (axes.transpose() * axes - Mat3::Identity()).norm() < 1e-9 && axes.determinant() > 0;
}

void find_bad_values(const Frame& frame, Faults& faults) {
  for (const Section& s : frame.sections) {
    const auto need = [&](double value, const char* field, bool zero_allowed) {
      if (!(std::isfinite(value) && (value > 0 || (zero_allowed && value == 0))))
        faults.push_back({"section '" + s.name + "': " + field + " " + number(value) + " must be " +
                          (zero_allowed ? ">= 0" : "> 0")});
    };
    need(s.A, "A", false);
    need(s.Iy, "Iy", false);
    need(s.Iz, "Iz", false);
    need(s.J, "J", false);
    need(s.shear_area_y, "shear area along y", true);
    need(s.shear_area_z, "shear area along z", true);
  }
  for (const Material& m : frame.materials) {
    const auto bad = [&](const char* field, double value, const char* rule) {
      faults.push_back({"material '" + m.name + "': " + field + " " + number(value) + " must be " + rule});
    };
    if (!(std::isfinite(m.E) && m.E > 0)) bad("E", m.E, "> 0");
    if (!(std::isfinite(m.G) && m.G > 0)) bad("G", m.G, "> 0");
    if (!(std::isfinite(m.density) && m.density >= 0)) bad("density", m.density, ">= 0");
    if (!std::isfinite(m.expansion)) bad("expansion", m.expansion, "a finite number");
  }
  for (int n = 0; n < static_cast<int>(frame.nodes.size()); ++n)
    if (!frame.nodes[static_cast<std::size_t>(n)].at.allFinite())
      faults.push_back({node_words(frame, n) + ": its place is not finite", n});
}

void find_bad_members(const Frame& frame, Faults& faults) {
  std::map<std::tuple<int, int, std::vector<double>>, int> seen;
  for (int m = 0; m < static_cast<int>(frame.members.size()); ++m) {
    const Member& member = frame.members[static_cast<std::size_t>(m)];
    const std::string who = member_words(frame, m);
    const auto fault = [&](const std::string& what) { faults.push_back({who + ": " + what, -1, m}); };
    if (!within(member.from, frame.nodes.size()) || !within(member.to, frame.nodes.size())) {
      fault("a node index is out of range");
      continue;
    }
    if (!within(member.section, frame.sections.size())) fault("its section index is out of range");
    if (!within(member.material, frame.materials.size())) fault("its material index is out of range");
    for (const auto& springs : {member.spring_from, member.spring_to})
      for (const double k : springs)
        if (!(std::isfinite(k) && k >= 0)) fault("end spring " + number(k) + " must be >= 0");
    const double length = member_length(frame, m);
    if (!(length > tolerance(frame))) {
      fault("its length is " + number(length) + " m");
      continue;
    }
    const Vec3 axis = (frame.nodes[static_cast<std::size_t>(member.to)].at + member.offset_to -
                       frame.nodes[static_cast<std::size_t>(member.from)].at - member.offset_from) /
                      length;
    if (!(axis.cross(member.up).norm() > 1e-6 * member.up.norm()))
      fault(member.up.norm() > 0 ? "up is parallel to the member" : "up is zero");
    const bool swap = member.from > member.to;
    const Vec3& a = swap ? member.offset_to : member.offset_from;
    const Vec3& b = swap ? member.offset_from : member.offset_to;
    const auto [before, fresh] = seen.insert({{std::min(member.from, member.to),
                                               std::max(member.from, member.to),
                                               {a.x(), a.y(), a.z(), b.x(), b.y(), b.z()}},
                                              m});
    if (!fresh) fault("it lies on " + member_words(frame, before->second));
  }
}

void find_bad_links(const Frame& frame, Faults& faults) {
  const std::size_t n = frame.nodes.size();
  for (const Support& s : frame.supports)
    if (!within(s.node, n)) faults.push_back({"a support names a node that does not exist"});
  for (const PointMass& p : frame.masses) {
    if (!within(p.node, n)) faults.push_back({"mass '" + p.name + "': it names a node that does not exist"});
    if (!(std::isfinite(p.mass) && p.mass >= 0))
      faults.push_back({"mass '" + p.name + "': " + number(p.mass) + " kg must be >= 0", p.node});
  }
  for (const Spring& s : frame.springs) {
    const std::string who = "spring '" + s.name + "'";
    if (!within(s.node, n) || (s.other >= 0 && !within(s.other, n)))
      faults.push_back({who + ": it names a node that does not exist"});
    else if (s.node == s.other)
      faults.push_back({who + ": both its ends are " + node_words(frame, s.node), s.node});
    if (!(s.stiffness.allFinite() && s.stiffness.minCoeff() >= 0))
      faults.push_back({who + ": stiffness " + number(s.stiffness.minCoeff()) + " must be >= 0", s.node});
    if (!orthonormal(s.axes)) faults.push_back({who + ": its axes are not a right-handed set", s.node});
  }
  for (const Joint& j : frame.joints) {
    const std::string who = "joint '" + j.name + "'";
    if (!within(j.node, n) || !within(j.other, n) || j.node == j.other) {
      faults.push_back({who + ": it must name two different nodes"});
      continue;
    }
    const double gap =
        (frame.nodes[static_cast<std::size_t>(j.node)].at - frame.nodes[static_cast<std::size_t>(j.other)].at)
            .norm();
    if (!(gap <= tolerance(frame)))
      faults.push_back({who + ": " + node_words(frame, j.node) + " and " + node_words(frame, j.other) +
                            " are " + number(gap) + " m apart",
                        j.node});
    if (!orthonormal(j.axes)) faults.push_back({who + ": its axes are not a right-handed set", j.node});
  }
}

void find_coincident_nodes(const Frame& frame, Faults& faults) {
  const int n = static_cast<int>(frame.nodes.size());
  const auto at = [&](int i) -> const Vec3& { return frame.nodes[static_cast<std::size_t>(i)].at; };
  Parts linked(frame.nodes.size());
  for (const Joint& j : frame.joints) linked.join(j.node, j.other);
  for (const Spring& s : frame.springs)
    if (s.other >= 0) linked.join(s.node, s.other);
  const Vec3 sweep = Vec3(0.5377, 0.7312, 0.4197).normalized();  // no frame has many nodes on one such plane
  std::vector<std::pair<double, int>> order;
  for (int i = 0; i < n; ++i) order.push_back({sweep.dot(at(i)), i});
  std::sort(order.begin(), order.end());
  const double close = tolerance(frame);
  for (std::size_t a = 0; a < order.size(); ++a)
    for (std::size_t b = a + 1; b < order.size() && order[b].first - order[a].first <= close; ++b) {
      const int i = std::min(order[a].second, order[b].second),
                j = std::max(order[a].second, order[b].second);
      if ((at(i) - at(j)).norm() <= close && linked.find(i) != linked.find(j))
        faults.push_back(
            {node_words(frame, i) + " and " + node_words(frame, j) +
                 " lie in one place and nothing connects them: use one node, or a joint or spring",
             i});
    }
}

void find_loose_parts(const Frame& frame, const std::vector<int>& held_nodes, Faults& faults) {
  const int n = static_cast<int>(frame.nodes.size());
  Parts parts(frame.nodes.size());
  for (const Member& m : frame.members) parts.join(m.from, m.to);
  for (const Joint& j : frame.joints) parts.join(j.node, j.other);
  std::vector<int> holders = held_nodes;
  for (const Spring& s : frame.springs) {
    if (s.other >= 0) parts.join(s.node, s.other);
    if (s.other < 0 && s.stiffness.maxCoeff() > 0) holders.push_back(s.node);
  }
  for (const Support& s : frame.supports)
    if (std::find(s.fix.begin(), s.fix.end(), true) != s.fix.end()) holders.push_back(s.node);
  std::map<int, int> count;
  for (int i = 0; i < n; ++i) ++count[parts.find(i)];
  if (count.size() < 2) return;
  std::vector<bool> held(frame.nodes.size(), false);
  for (const int i : holders) held[static_cast<std::size_t>(parts.find(i))] = true;
  const auto largest = std::max_element(count.begin(), count.end(),
                                        [](const auto& a, const auto& b) { return a.second < b.second; });
  for (int i = 0; i < n; ++i) {
    const int root = parts.find(i);
    if (root == largest->first || held[static_cast<std::size_t>(root)]) continue;
    held[static_cast<std::size_t>(root)] = true;  // one fault for each part
    const int size = count[root];
    faults.push_back({node_words(frame, i) +
                          (size > 1 ? " and " + std::to_string(size - 1) + " more nodes are" : " is") +
                          " not connected with the rest and not held",
                      i});
  }
}

}  // namespace

std::vector<FrameFault> find_faults(const Frame& frame, const std::vector<int>& held_nodes) {
  Faults faults;
  if (frame.nodes.empty()) faults.push_back({"the frame has no nodes"});
  find_bad_values(frame, faults);
  find_bad_members(frame, faults);
  find_bad_links(frame, faults);
  if (!faults.empty()) return faults;  // the searches below need sound indices
  find_coincident_nodes(frame, faults);
  find_loose_parts(frame, held_nodes, faults);
  return faults;
}

std::vector<FrameFault> find_faults(const Frame& frame) { return find_faults(frame, {}); }

}  // namespace focalframe::fem
