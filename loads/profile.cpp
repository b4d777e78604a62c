#include "loads/profile.h"

#include <algorithm>
#include <cmath>
#include <stdexcept>

#include "loads/number_text.h"

namespace focalframe::loads {

namespace {

void require_height(double height, double most) {
  if (!(height > 0 && height <= most))
    throw std::invalid_argument("height " + number_text(height) + " m must lie above 0 and up to " +
                                number_text(most) + " m, where the profile is defined");
}

EnTerrain en_terrain_of(double z0, double zmin) { return {z0, zmin, 0.19 * std::pow(z0 / 0.05, 0.07)}; }

double log_height(const EnTerrain& terrain, double height) {
  require_height(height, 200);
  return std::log(std::max(height, terrain.zmin) / terrain.z0);
}

struct AsceProfile {
  double factor, alpha, gradient_height;
};

// Editions 2010, 2016: 1200, 900, 700 ft. Edition 2022: 3280, 2460, 1935 ft, from memory; at 10 m they give
// 0.71, 1.00, 1.19 against 0.72, 1.00, 1.18 by the older constants.
AsceProfile asce_profile(Terrain exposure, int edition) {
  if (edition != 10 && edition != 16 && edition != 22)
    throw std::invalid_argument("ASCE 7 edition must be 10, 16 or 22, not " + std::to_string(edition));
  const bool newest = edition == 22;
  switch (exposure) {
    case Terrain::asce_b:
      return newest ? AsceProfile{2.41, 7.5, 999.744} : AsceProfile{2.01, 7.0, 365.76};
    case Terrain::asce_c:
      return newest ? AsceProfile{2.41, 9.8, 749.808} : AsceProfile{2.01, 9.5, 274.32};
    case Terrain::asce_d:
      return newest ? AsceProfile{2.41, 11.5, 589.788} : AsceProfile{2.01, 11.5, 213.36};
    default:
      throw std::invalid_argument(terrain_name(exposure) + " has no Kz");
  }
}

constexpr double lowest_kz_height = 4.572;  // 15 ft

struct GustConstant {
  double c, lowest;
};
GustConstant gust_constant(Terrain exposure) {
  if (exposure == Terrain::asce_b) return {0.30, 9.144};
  if (exposure == Terrain::asce_c) return {0.20, 4.572};
  return {0.15, 2.134};
}

}  // namespace

bool is_en(Terrain terrain) { return terrain <= Terrain::en_4; }

bool is_asce(Terrain terrain) {
  return terrain == Terrain::asce_b || terrain == Terrain::asce_c || terrain == Terrain::asce_d;
}

std::string terrain_name(Terrain terrain) {
  switch (terrain) {
    case Terrain::en_0:
      return "EN terrain 0";
    case Terrain::en_1:
      return "EN terrain I";
    case Terrain::en_2:
      return "EN terrain II";
    case Terrain::en_3:
      return "EN terrain III";
    case Terrain::en_4:
      return "EN terrain IV";
    case Terrain::asce_b:
      return "ASCE 7 exposure B";
    case Terrain::asce_c:
      return "ASCE 7 exposure C";
    case Terrain::asce_d:
      return "ASCE 7 exposure D";
    case Terrain::power_law:
      return "power law";
  }
  return "unknown terrain";
}

EnTerrain en_terrain(Terrain terrain) {
  switch (terrain) {
    case Terrain::en_0:
      return en_terrain_of(0.003, 1);
    case Terrain::en_1:
      return en_terrain_of(0.01, 1);
    case Terrain::en_2:
      return en_terrain_of(0.05, 2);
    case Terrain::en_3:
      return en_terrain_of(0.3, 5);
    case Terrain::en_4:
      return en_terrain_of(1.0, 10);
    default:
      throw std::invalid_argument(terrain_name(terrain) + " has no EN 1991-1-4 roughness");
  }
}

double en_roughness(const EnTerrain& terrain, double height) {
  return terrain.kr * log_height(terrain, height);
}

double en_turbulence(const EnTerrain& terrain, const EnTurbulence& at) {
  return at.turbulence / (at.orography * log_height(terrain, at.height));
}

double en_exposure(const EnTerrain& terrain, double height) {
  const double cr = en_roughness(terrain, height);
  return cr * cr * (1 + 7 * en_turbulence(terrain, {.height = height}));
}

double length_scale(const EnTerrain& terrain, double height) {
  require_height(height, 200);
  return 300 * std::pow(std::max(height, terrain.zmin) / 200, 0.67 + 0.05 * std::log(terrain.z0));
}

EnTerrain equivalent_en_terrain(const Site& site, double height) {
  switch (site.terrain) {
    case Terrain::asce_b:
      return en_terrain(Terrain::en_3);
    case Terrain::asce_c:
      return en_terrain(Terrain::en_2);
    case Terrain::asce_d:
      return en_terrain(Terrain::en_0);
    case Terrain::power_law:
      return en_terrain_of(height * std::exp(-1 / site.power_exponent), 0);
    default:
      return en_terrain(site.terrain);
  }
}

double asce_kz(Terrain exposure, double height, int edition) {
  const AsceProfile p = asce_profile(exposure, edition);
  require_height(height, p.gradient_height);
  return p.factor * std::pow(std::max(height, lowest_kz_height) / p.gradient_height, 2 / p.alpha);
}

std::string asce_kz_text(Terrain exposure, double height, int edition) {
  const AsceProfile p = asce_profile(exposure, edition);
  return number_text(p.factor) + " (z / " + number_text(p.gradient_height) + " m)^(2 / " +
         number_text(p.alpha) + "), z = " + number_text(std::max(height, lowest_kz_height)) + " m" +
         (height < lowest_kz_height
              ? " (lowest height of the profile; the wind is at " + number_text(height) + " m)"
              : "") +
         " (ASCE 7-" + std::to_string(edition) + ", " + terrain_name(exposure) + ")";
}

double asce_turbulence(Terrain exposure, double height) {
  const GustConstant k = gust_constant(exposure);
  return k.c * std::pow(10 / std::max(height, k.lowest), 1.0 / 6);
}

std::string asce_turbulence_text(Terrain exposure, double height) {
  const GustConstant k = gust_constant(exposure);
  return number_text(k.c) + " (10 / " + number_text(std::max(height, k.lowest)) + ")^(1/6)" +
         (height < k.lowest ? ", at the lowest height of the formula" : "") + " (ASCE 7, from memory)";
}

}  // namespace focalframe::loads
