#pragma once

/// How wind grows with height: EN 1991-1-4 terrain categories and ASCE 7 exposures.

#include <string>

#include "loads/wind.h"

namespace focalframe::loads {

bool is_en(Terrain terrain);
bool is_asce(Terrain terrain);
std::string terrain_name(Terrain terrain);  ///< "EN terrain II", "ASCE 7 exposure C", "power law"

/// EN 1991-1-4:2005+A1:2010, Table 4.1.
struct EnTerrain {
  double z0 = 0;    ///< roughness length [m]
  double zmin = 0;  ///< below this height the values of zmin hold [m]
  double kr = 0;    ///< terrain factor 0.19 (z0 / 0.05 m)^0.07 [-]
};
EnTerrain en_terrain(Terrain terrain);

/// Heights above ground [m], 0 < z <= 200; below zmin the value at zmin.
double en_roughness(const EnTerrain& terrain, double height);  ///< c_r = kr ln(z / z0) [-]
struct EnTurbulence {
  double height = 10;     ///< [m]
  double orography = 1;   ///< c_o [-]
  double turbulence = 1;  ///< k_I [-]
};
double en_turbulence(const EnTerrain& terrain, const EnTurbulence& at);  ///< Iv = kI / (co ln(z / z0)) [-]
double en_exposure(const EnTerrain& terrain, double height);  ///< c_e = c_r^2 (1 + 7 Iv), co = kI = 1 [-]

/// L(z) = 300 m (z / 200 m)^(0.67 + 0.05 ln z0), z at least zmin (Annex B.1) [m].
double length_scale(const EnTerrain& terrain, double height);

/// Roughness that stands for any terrain where only Annex B's length scale needs one: ASCE B, C, D as III,
/// II, 0; power law z0 = z exp(-1 / exponent), the height at which a logarithmic profile has that exponent.
EnTerrain equivalent_en_terrain(const Site& site, double height);

/// Velocity pressure exposure coefficient Kz [-], from 4.57 m (15 ft) upward; below, the value there.
/// Editions 2010 and 2016: 2.01 (z / zg)^(2 / alpha); 2022: 2.41 and other alpha, zg (from memory). The floor
/// of 0.70 that some tables give exposure B below 9.1 m (claddings) is not applied.
double asce_kz(Terrain exposure, double height, int edition);
std::string asce_kz_text(Terrain exposure, double height, int edition);  ///< formula with its numbers

/// Iz = c (10 m / z)^(1/6), c = 0.30, 0.20, 0.15 for B, C, D, z at least 9.14, 4.57, 2.13 m (from memory)
/// [-].
double asce_turbulence(Terrain exposure, double height);
std::string asce_turbulence_text(Terrain exposure, double height);

}  // namespace focalframe::loads
