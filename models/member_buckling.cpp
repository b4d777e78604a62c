#include "models/member_buckling.h"

#include <algorithm>
#include <cmath>
#include <numbers>

#include "fem/units.h"

namespace focalframe::models {
namespace {

using std::numbers::pi;

bool is_light_metal(const fem::Material& material) { return material.E < 100 * GPa; }

// EN 1999-1-1: partial factor on buckling; EN 1993-1-1 recommends 1.0 (both from memory).
double member_factor(const fem::Material& material) { return is_light_metal(material) ? 1.1 : 1.0; }

// EN 1993-1-1 6.3.2.2, sections that are neither rolled nor welded I: curve d.
constexpr ColumnCurve lateral_curve{0.76, 0.2};

// Beyond this share of the Euler load the amplified moments are held: the sum is past 1 by then.
constexpr double nearest_to_euler = 0.95;

}  // namespace

ColumnCurve column_curve(const std::string& shape, const fem::Material& material) {
  if (is_light_metal(material)) return {0.32, 0.0};
  if (shape == "angle") return {0.34, 0.2};
  if (shape == "properties") return {0.76, 0.2};
  return {0.49, 0.2};
}

double reduction(double slenderness, const ColumnCurve& curve) {
  if (slenderness <= curve.plateau) return 1;
  const double phi =
      0.5 * (1 + curve.imperfection * (slenderness - curve.plateau) + slenderness * slenderness);
  return std::min(1.0, 1 / (phi + std::sqrt(phi * phi - slenderness * slenderness)));
}

double critical_moment(const fem::Section& section, const fem::Material& material, double length) {
  return pi / length * std::sqrt(material.E * section.Iz * material.G * section.J);
}

std::vector<MemberResistance> buckling_resistances(const fem::Frame& frame,
                                                   const std::vector<BucklingLength>& lengths,
                                                   double on_yield) {
  std::vector<MemberResistance> all;
  for (const BucklingLength& b : lengths) {
    const fem::Member& member = frame.members[static_cast<std::size_t>(b.member)];
    const fem::Section& s = frame.sections[static_cast<std::size_t>(member.section)];
    const fem::Material& material = frame.materials[static_cast<std::size_t>(member.material)];
    const double strength = material.yield * on_yield / member_factor(material);
    if (!(strength > 0) || !(s.Wy > 0) || !(s.Wz > 0)) continue;
    MemberResistance r;
    r.member = b.member;
    r.Ncr_y = pi * pi * material.E * s.Iy / (b.about_y * b.about_y);
    r.Ncr_z = pi * pi * material.E * s.Iz / (b.about_z * b.about_z);
    const ColumnCurve curve = column_curve(b.shape, material);
    const double squash = s.A * material.yield;
    r.N = s.A * strength * reduction(std::sqrt(squash / std::min(r.Ncr_y, r.Ncr_z)), curve);
    r.My = s.Wy * strength;
    r.Mz = s.Wz * strength;
    if (b.lateral > 0)
      r.My *= reduction(std::sqrt(s.Wy * material.yield / critical_moment(s, material, b.lateral)),
                        lateral_curve);
    all.push_back(r);
  }
  return all;
}

BucklingShare buckling_share(const MemberResistance& r, const Eigen::Ref<const Eigen::VectorXd>& ends) {
  const double pushed = std::max({0.0, ends[0], -ends[6]});  // forces on the member: pushing at its start
  const auto amplified = [&](double euler) { return 1 / (1 - std::min(pushed / euler, nearest_to_euler)); };
  BucklingShare share;
  share.compression = pushed;
  share.used = pushed / r.N + amplified(r.Ncr_y) * std::max(std::abs(ends[4]), std::abs(ends[10])) / r.My +
               amplified(r.Ncr_z) * std::max(std::abs(ends[5]), std::abs(ends[11])) / r.Mz;
  return share;
}

}  // namespace focalframe::models
