#pragma once

/// Cross-sections of straight members.
///
/// Section axes: x runs along the member from node `from` to node `to`; y and z are the member axes of
/// fem/frame.h. Iy belongs to bending *about* y (displacement along z), Iz to bending about z.
/// All factories are exact for the stated outline unless their comment names an approximation, and throw
/// std::invalid_argument with the violated inequality and the values when a size is impossible.

#include <string>

namespace focalframe::fem {

struct Section {
  std::string name;
  double A = 0;             ///< area [m^2]
  double Iy = 0, Iz = 0;    ///< second moments of area about y and z [m^4]
  double J = 0;             ///< St-Venant torsion constant [m^4]
  double shear_area_y = 0;  ///< carries the shear force along y [m^2]; 0 = rigid in shear
  double shear_area_z = 0;  ///< carries the shear force along z [m^2]; 0 = rigid in shear
  double Wy = 0, Wz = 0;    ///< elastic section moduli, Iy / greatest |z| and Iz / greatest |y| [m^3]
  double Wt = 0;            ///< torsion modulus: T / Wt is the greatest shear stress [m^3]
  double peak_shear_y = 0;  ///< shear force along y / this = greatest shear stress [m^2]; 0 = not known
  double peak_shear_z = 0;  ///< shear force along z / this = greatest shear stress [m^2]; 0 = not known
  double depth_y = 0, depth_z = 0;  ///< overall sizes along y and z [m]
  double perimeter = 0;             ///< outer perimeter [m] (painting, wind on bare members)
  bool round = false;               ///< circular symmetry: moments combine to their resultant
  bool closed = true;               ///< false for open thin-walled sections (weak in torsion)
};

struct RoundTube {
  double outside_diameter = 0;  ///< [m]
  double wall = 0;              ///< [m], 0 < wall <= outside_diameter / 2
};
struct RectangularTube {
  double depth_z = 0;        ///< outer size along z [m]
  double width_y = 0;        ///< outer size along y [m]
  double wall = 0;           ///< [m]
  double outer_radius = -1;  ///< corner radius [m]; negative = cold-formed rule of EN 10219-2 Annex B
  double inner_radius = -1;  ///< corner radius [m]; negative = cold-formed rule of EN 10219-2 Annex B
};
struct RoundBar {
  double diameter = 0;  ///< [m]
};
struct Flat {              // also one slice of a plate rib
  double depth_z = 0;      ///< size along z [m]
  double thickness_y = 0;  ///< size along y [m]
};

/// Exact for any wall (closed is true for all round and rectangular tubes and bars); shear area by Cowper
/// (1966) for a hollow circle, nu = 0.3.
Section round_tube(const RoundTube& size);
/// EN 10210-2 / EN 10219-2 Annex B formulas with corner radii; shear areas A h / (b + h) (EN 1993-1-1 6.2.6).
Section rectangular_tube(const RectangularTube& size);
Section round_bar(const RoundBar& size);
/// Solid rectangle; J and Wt by the series solution of St-Venant's problem (both ratios), shear area 5/6 A.
/// `closed` is false when one side is more than five times the other: weak in torsion like an open section.
Section flat(const Flat& size);

/// Stress resultants in one cross-section, member axes, forces acting on the face with outward normal +x.
struct Resultants {
  double N = 0, Vy = 0, Vz = 0;  ///< [N]
  double T = 0, My = 0, Mz = 0;  ///< [N m]
};

/// Greatest von Mises stress in the section [Pa], on the safe side: the greatest normal stress (axial +
/// biaxial bending) is taken to meet the greatest shear stress (torsion + transverse shear) in one point.
/// Where the peak shear areas are not known, 0.8 of the shear area is used (0.4 A if that is 0 too), below
/// the exact value of every solid and tube shape here. NaN when a modulus that is needed is not known (0).
double von_mises_bound(const Section& section, const Resultants& r);

}  // namespace focalframe::fem
