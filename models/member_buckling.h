#pragma once

/// Flexural buckling of single members and lateral-torsional buckling of plate ribs.
///
/// EN 1993-1-1 6.3.1 (aluminium: EN 1999-1-1 6.3.1, class B) gives the reduction of the squash load; end
/// moments are amplified by 1 / (1 - N / Ncr) and added linearly. That is a screening rule on the side of the
/// equivalent-imperfection method, not the interaction of 6.3.3.

#include <Eigen/Core>
#include <vector>

#include "fem/frame.h"
#include "models/collector.h"

namespace focalframe::models {

/// chi = 1 / (phi + sqrt(phi^2 - slenderness^2)), phi = (1 + imperfection (slenderness - plateau) +
/// slenderness^2) / 2, at most 1.
struct ColumnCurve {
  double imperfection = 0, plateau = 0;
};
/// By shape word: hollow sections c (cold formed), solids c, channels c, angles b, unknown ones d; of
/// aluminium class B of EN 1999-1-1 (all from memory).
ColumnCurve column_curve(const std::string& shape, const fem::Material& material);
double reduction(double slenderness, const ColumnCurve& curve);

/// Critical uniform moment of a narrow rectangle held sideways at both ends of `length` [N m]:
/// pi / length sqrt(E Iz G J) (Timoshenko and Gere, Theory of Elastic Stability; from memory).
double critical_moment(const fem::Section& section, const fem::Material& material, double length);

/// What a member can bear before it buckles.
struct MemberResistance {
  int member = 0;
  double N = 0, My = 0, Mz = 0;  ///< chi A f, chi_LT Wy f, Wz f [N], [N m]
  double Ncr_y = 0, Ncr_z = 0;   ///< Euler loads for bending about y and z [N]
};
/// `on_yield` scales the yield stress. Members of unknown yield get none.
std::vector<MemberResistance> buckling_resistances(const fem::Frame& frame,
                                                   const std::vector<BucklingLength>& lengths,
                                                   double on_yield);

struct BucklingShare {
  double used = 0;         ///< 1 = at the limit
  double compression = 0;  ///< [N]
};
/// `ends`: 12 end forces, member axes. A member in tension is used by its moments alone.
BucklingShare buckling_share(const MemberResistance& resistance,
                             const Eigen::Ref<const Eigen::VectorXd>& ends);

}  // namespace focalframe::models
