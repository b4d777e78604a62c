#pragma once

/// What can be bought: materials and tube sizes, each with where the numbers come from.

#include <string>
#include <vector>

#include "fem/material.h"

namespace focalframe::models {

/// Yield (0.2 % proof) stress of a product not thicker than `up_to`.
struct YieldStep {
  double up_to = 0;  ///< wall or plate thickness [m]
  double yield = 0;  ///< [Pa]
};

struct CatalogueMaterial {
  std::string name;                    ///< as written in a design file
  double E = 0, G = 0;                 ///< [Pa]
  double density = 0;                  ///< [kg/m^3]
  double expansion = 0;                ///< [1/K]
  std::vector<YieldStep> yield_steps;  ///< ascending thickness; empty = never judged for strength
  std::string source;                  ///< standard and table
  std::string confidence;              ///< "read" or "from memory"
};

const std::vector<CatalogueMaterial>& materials();

/// nullptr when the catalogue has no such name.
const CatalogueMaterial* find_material(const std::string& name);

/// Material of a part of the given thickness [m]. Beyond the thickest step yield is 0 (not known).
/// Throws std::invalid_argument when the name is not in the catalogue.
fem::Material material_of(const std::string& name, double thickness);

/// What a receiver can be filled with; density [kg/m^3] on the heavy side of its use.
struct CatalogueFluid {
  std::string name;
  double density = 0;
  std::string source;
};
const std::vector<CatalogueFluid>& fluids();

/// One size of a standard series.
struct RoundTubeSize {
  double outside_diameter = 0, wall = 0;  ///< [m]
};
struct SquareTubeSize {
  double side = 0, wall = 0;  ///< [m]
};

/// Sizes a workshop would try next when a tube is too weak or too soft, in the order of effort: the next
/// walls of the same diameter, then the next diameters with this wall or the nearest one sold, each also one
/// wall thicker. Diameters and walls of the EN 10219-2 / EN 10220 series (from memory).
std::vector<RoundTubeSize> next_round_tubes(double outside_diameter, double wall, int diameters = 2);
/// The same for square tubes of EN 10219-2 (from memory).
std::vector<SquareTubeSize> next_square_tubes(double side, double wall, int sides = 2);

/// Smallest standard round tube of at least this diameter and wall [m]; the largest one when none is enough.
RoundTubeSize standard_round_tube(double at_least_diameter, double at_least_wall);

/// Outside diameter [m] of a nominal pipe size given in inches (ASME B36.10, from memory) or as DN (in mm,
/// EN 10220, from memory); NaN when the size is not in the series.
double pipe_outside_diameter_of_inches(double nominal);
double pipe_outside_diameter_of_dn(double nominal);

}  // namespace focalframe::models
