#pragma once

#include <string>

namespace focalframe::fem {

/// Isotropic linear-elastic material.
struct Material {
  std::string name;
  double E = 0;          ///< Young's modulus [Pa]
  double G = 0;          ///< shear modulus [Pa]
  double density = 0;    ///< [kg/m^3]
  double yield = 0;      ///< yield or 0.2 % proof stress [Pa]; 0 = not known, never judged
  double expansion = 0;  ///< coefficient of thermal expansion [1/K]
};

}  // namespace focalframe::fem
