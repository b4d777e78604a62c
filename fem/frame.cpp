#include "fem/frame.h"

#include "fem/beam.h"

namespace focalframe::fem {

MassSummary total_mass(const Frame& frame) {
  double mass = 0;
  Vec3 moment = Vec3::Zero();
  const auto add = [&](double part, const Vec3& at) {
    mass += part;
    moment += part * at;
  };
  for (int m = 0; m < static_cast<int>(frame.members.size()); ++m) {
    const Member& member = frame.members[static_cast<std::size_t>(m)];
    const double per_length = frame.sections.at(static_cast<std::size_t>(member.section)).A *
                              frame.materials.at(static_cast<std::size_t>(member.material)).density;
    const Vec3 start = frame.nodes.at(static_cast<std::size_t>(member.from)).at + member.offset_from;
    const Vec3 end = frame.nodes.at(static_cast<std::size_t>(member.to)).at + member.offset_to;
    add(per_length * (end - start).norm(), (start + end) / 2);
  }
  for (const PointMass& p : frame.masses)
    add(p.mass, frame.nodes.at(static_cast<std::size_t>(p.node)).at + p.offset);
  return {mass, mass > 0 ? Vec3(moment / mass) : Vec3(Vec3::Zero())};
}

}  // namespace focalframe::fem
