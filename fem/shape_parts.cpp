#include "fem/shape_parts.h"

#include <algorithm>
#include <array>
#include <cmath>
#include <map>

#include "fem/assembly_parts.h"
#include "fem/element.h"
#include "fem/text.h"

namespace focalframe::fem {
namespace {

using Index = Eigen::Index;
using Energies = std::map<std::string, std::array<double, 4>>;  // by part, in the order of Strain

Vec12 ends_of(const Eigen::MatrixXd& shape, int from, int to) {
  Vec12 ends = Vec12::Zero();
  ends.head<6>() = shape.row(from).transpose();
  if (to >= 0) ends.tail<6>() = shape.row(to).transpose();
  return ends;
}

void add_member(const Frame& frame, const Eigen::MatrixXd& shape, int member, Energies& energies) {
  const Member& m = frame.members[static_cast<std::size_t>(member)];
  const Element e = make_element(frame, member);
  const Vec12 outer = e.carry * ends_of(shape, m.from, m.to);
  const Vec12 inner = e.inner() * outer;
  const Vec12 work = (e.rigid * inner).cwiseProduct(inner) / 2;
  const double stretch = work[0] + work[6], twist = work[3] + work[9];
  std::array<double, 4>& of = energies[m.group.empty() ? m.name : m.group];
  of[0] += work.sum() - stretch - twist;
  of[1] += twist;
  of[2] += stretch;
  of[3] += std::max(0.0, outer.dot(e.between * outer) / 2 - work.sum());
}

void add_spring(const Frame& frame, const Eigen::MatrixXd& shape, const Spring& spring, Energies& energies) {
  const Vec6 motion = spring_motion(frame, spring) * ends_of(shape, spring.node, spring.other);
  energies[spring.name][3] += motion.dot(spring.stiffness.cwiseProduct(motion)) / 2;
}

Vec3 sway_of(const Frame& frame, const Eigen::MatrixXd& shape) {
  Vec3 mean = Vec3::Zero();
  double square = 0, length = 0;
  for (int m = 0; m < static_cast<int>(frame.members.size()); ++m) {
    const Member& member = frame.members[static_cast<std::size_t>(m)];
    const double own = member_length(frame, m);
    for (const int node : {member.from, member.to}) {
      const Vec3 u = shape.row(node).head<3>().transpose();
      mean += own / 2 * u;
      square += own / 2 * u.squaredNorm();
    }
    length += own;
  }
  return square > 0 ? Vec3(mean / std::sqrt(square * length)) : Vec3::Zero();
}

}  // namespace

std::string shape_words(const Frame& frame, const ShapeParts& parts, const std::array<std::string, 3>& ways) {
  static const char* const how[] = {"bending", "twist", "stretch", "give"};
  std::string text;
  Index way = 0;
  if (parts.sway.cwiseAbs().maxCoeff(&way) > 0.9)
    text = "sways " + ways[static_cast<std::size_t>(way)] + "; ";
  if (parts.parts.empty()) text += "moves freely, nothing is strained";
  double told = 0;
  for (std::size_t i = 0; i < std::min<std::size_t>(3, parts.parts.size()); ++i) {
    const ShapePart& p = parts.parts[i];
    if (i > 0 && (p.share < 0.1 || told > 0.85)) break;
    told += p.share;
    text += (i > 0 ? ", " : "") + std::string(how[static_cast<std::size_t>(p.how)]) + " of " + p.part + " " +
            std::to_string(static_cast<int>(std::lround(100 * p.share))) + " %";
  }
  if (parts.node < 0) return text;
  const bool turns = parts.dof >= 3;
  return text + "; most at " + frame.nodes[static_cast<std::size_t>(parts.node)].name + ", " +
         (turns ? std::string(dof_words(parts.dof)) : ways[static_cast<std::size_t>(parts.dof)]);
}

ShapeParts shape_parts(const Frame& frame, const Eigen::MatrixXd& shape) {
  Energies energies;
  for (int m = 0; m < static_cast<int>(frame.members.size()); ++m) add_member(frame, shape, m, energies);
  for (const Spring& spring : frame.springs) add_spring(frame, shape, spring, energies);
  double sum = 0;
  for (const auto& [part, of] : energies)
    for (const double energy : of) sum += energy;
  ShapeParts out;
  // A rigid motion strains nothing but by round-off: measured against the stiffness that it would meet.
  double resisting = 0;
  for (int m = 0; m < static_cast<int>(frame.members.size()); ++m) {
    const Member& member = frame.members[static_cast<std::size_t>(m)];
    const Vec12 ends = ends_of(shape, member.from, member.to);
    resisting += ends.dot(stiffness(frame, m).diagonal().cwiseProduct(ends)) / 2;
  }
  if (sum > 1e-13 * resisting)
    for (const auto& [part, of] : energies)
      for (std::size_t how = 0; how < of.size(); ++how)
        if (of[how] > 0.01 * sum) out.parts.push_back({part, static_cast<Strain>(how), of[how] / sum});
  std::stable_sort(out.parts.begin(), out.parts.end(),
                   [](const ShapePart& a, const ShapePart& b) { return a.share > b.share; });
  out.sway = sway_of(frame, shape);
  const bool moved = shape.leftCols<3>().cwiseAbs().maxCoeff() > 0;
  const int first = moved ? 0 : 3;
  double greatest = -1;
  for (int n = 0; n < shape.rows(); ++n) {
    const double size = shape.row(n).segment<3>(first).norm();
    if (size > greatest * (1 + 1e-9)) greatest = size, out.node = n;
  }
  if (out.node < 0) return out;
  Index axis = 0;
  shape.row(out.node).segment<3>(first).cwiseAbs().maxCoeff(&axis);
  out.dof = first + static_cast<int>(axis);
  return out;
}

}  // namespace focalframe::fem
