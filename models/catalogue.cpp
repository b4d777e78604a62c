#include "models/catalogue.h"

#include <algorithm>
#include <cmath>
#include <limits>
#include <stdexcept>
#include <utility>

#include "fem/units.h"

namespace focalframe::models {
namespace {

constexpr double steel_E = 210 * GPa, steel_G = 81 * GPa, steel_density = 7850, steel_expansion = 12e-6;
constexpr double aluminium_E = 70 * GPa, aluminium_G = 27 * GPa, aluminium_density = 2700,
                 aluminium_expansion = 23e-6;

CatalogueMaterial steel(std::string name, std::vector<YieldStep> steps, std::string confidence) {
  return {std::move(name),
          steel_E,
          steel_G,
          steel_density,
          steel_expansion,
          std::move(steps),
          "EN 10025-2 yield by thickness; E, G, expansion EN 1993-1-1 3.2.6",
          std::move(confidence)};
}

CatalogueMaterial aluminium(std::string name, std::vector<YieldStep> steps, std::string source,
                            std::string confidence) {
  return {std::move(name),     aluminium_E,      aluminium_G,       aluminium_density,
          aluminium_expansion, std::move(steps), std::move(source), std::move(confidence)};
}

// Standard diameters, each with the thinnest and thickest wall usually stocked [mm].
struct Series {
  double size, thinnest, thickest;
};
constexpr Series round_series[] = {{21.3, 2, 3.2},   {26.9, 2, 3.2},   {33.7, 2, 4},       {42.4, 2, 5},
                                   {48.3, 2, 5},     {60.3, 2, 6.3},   {76.1, 2, 8},       {88.9, 2, 8},
                                   {101.6, 2, 10},   {114.3, 2, 10},   {139.7, 2.6, 12.5}, {168.3, 2.9, 12.5},
                                   {193.7, 3.6, 16}, {219.1, 3.6, 16}, {244.5, 4.5, 16},   {273, 4.5, 20},
                                   {323.9, 4.5, 25}, {355.6, 5, 25},   {406.4, 5, 25},     {457, 5.6, 25},
                                   {508, 5.6, 25},   {610, 6.3, 30},   {711, 6.3, 30},     {762, 6.3, 30},
                                   {813, 8, 30},     {914, 8, 30},     {1016, 8, 30}};
constexpr double round_walls[] = {2,   2.3, 2.6, 2.9, 3.2, 3.6,  4,  4.5, 5,  5.6, 6.3,
                                  7.1, 8,   8.8, 10,  11,  12.5, 16, 20,  25, 30};
constexpr Series square_series[] = {
    {20, 2, 2.5}, {25, 2, 3},   {30, 2, 3},   {40, 2, 5},     {50, 2, 5},     {60, 2, 6.3},   {70, 2.5, 6.3},
    {80, 2, 8},   {90, 3, 8},   {100, 3, 10}, {120, 3, 12.5}, {140, 4, 12.5}, {150, 4, 12.5}, {160, 4, 12.5},
    {180, 5, 16}, {200, 5, 16}, {250, 5, 16}, {300, 6, 16},   {350, 8, 16},   {400, 8, 16}};
constexpr double square_walls[] = {2, 2.5, 3, 4, 5, 6, 6.3, 8, 10, 12, 12.5, 16};

constexpr double same = 1 + 1e-6;

template <std::size_t n, std::size_t m>
std::vector<std::pair<double, double>> next_sizes(const Series (&series)[n], const double (&walls)[m],
                                                  double size, double wall, int more) {
  std::vector<std::pair<double, double>> result;
  const auto add_walls = [&](const Series& s, double at_least, int count) {
    for (double w : walls)
      if (count > 0 && w * same >= std::max(at_least, s.thinnest) && w <= s.thickest * same) {
        result.emplace_back(s.size * mm, w * mm);
        --count;
      }
  };
  for (const Series& s : series)
    if (std::abs(s.size * mm - size) < 0.6 * mm) add_walls(s, wall / mm * (1 + 1e-3) + 1e-3, 2);
  for (const Series& s : series)
    if (more > 0 && s.size * mm > size + 0.6 * mm) {
      add_walls(s, wall / mm, 2);
      --more;
    }
  return result;
}

}  // namespace

const std::vector<CatalogueMaterial>& materials() {
  static const std::string en1999 = "EN 1999-1-1 table 3.2b, extruded products";
  static const std::vector<CatalogueMaterial> all{
      steel("S235",
            {{16 * mm, 235 * MPa},
             {40 * mm, 225 * MPa},
             {63 * mm, 215 * MPa},
             {80 * mm, 215 * MPa},
             {100 * mm, 215 * MPa},
             {150 * mm, 195 * MPa}},
            "from memory"),
      steel("S275",
            {{16 * mm, 275 * MPa},
             {40 * mm, 265 * MPa},
             {63 * mm, 255 * MPa},
             {80 * mm, 245 * MPa},
             {100 * mm, 235 * MPa},
             {150 * mm, 225 * MPa}},
            "read"),
      steel("S355",
            {{16 * mm, 355 * MPa},
             {40 * mm, 345 * MPa},
             {63 * mm, 335 * MPa},
             {80 * mm, 325 * MPa},
             {100 * mm, 315 * MPa},
             {150 * mm, 295 * MPa}},
            "read"),
      {"1.4301",
       200 * GPa,
       76.9 * GPa,
       7900,
       16e-6,
       {{8 * mm, 210 * MPa}, {75 * mm, 210 * MPa}},
       "EN 10088-4, EN 1993-1-4",
       "from memory"},
      aluminium("EN AW-6060 T6", {{15 * mm, 140 * MPa}}, en1999, "read"),
      aluminium("EN AW-6060 T66", {{3 * mm, 160 * MPa}, {25 * mm, 150 * MPa}}, en1999, "from memory"),
      aluminium("EN AW-6063 T6", {{25 * mm, 160 * MPa}}, en1999, "read"),
      aluminium("EN AW-6063 T66", {{10 * mm, 200 * MPa}}, en1999, "read"),
      aluminium("EN AW-6061 T6", {{20 * mm, 240 * MPa}}, en1999, "read"),
      aluminium("EN AW-6082 T6", {{5 * mm, 250 * MPa}, {15 * mm, 260 * MPa}}, en1999, "from memory"),
      aluminium("aluminium", {},
                "E, G, density, expansion of EN 1999-1-1 3.2.5; sheet of unnamed temper, strength not judged",
                "from memory"),
      {"glass",
       70 * GPa,
       70 * GPa / (2 * 1.22),
       2500,
       9e-6,
       {},
       "EN 572-1 (E, density); Poisson 0.22 as used for plate checks; strength not judged",
       "from memory"}};
  return all;
}

const CatalogueMaterial* find_material(const std::string& name) {
  const auto& all = materials();
  const auto at = std::find_if(all.begin(), all.end(), [&](const auto& m) { return m.name == name; });
  return at == all.end() ? nullptr : &*at;
}

fem::Material material_of(const std::string& name, double thickness) {
  const CatalogueMaterial* found = find_material(name);
  if (!found) throw std::invalid_argument("material '" + name + "' is not in the catalogue");
  fem::Material result{name, found->E, found->G, found->density, 0, found->expansion};
  for (const YieldStep& step : found->yield_steps)
    if (thickness <= step.up_to * same) {
      result.yield = step.yield;
      break;
    }
  return result;
}

const std::vector<CatalogueFluid>& fluids() {
  static const std::vector<CatalogueFluid> all{
      {"water", 1000, "4 degC; lighter when hot (from memory)"},
      {"oil", 1060, "synthetic heat-transfer oil at 20 degC; about 815 at 300 degC (from memory)"},
      {"salt", 1900, "nitrate salt at 300 degC; about 1770 at 500 degC (from memory)"},
      {"nothing", 0, "empty tube"}};
  return all;
}

std::vector<RoundTubeSize> next_round_tubes(double outside_diameter, double wall, int diameters) {
  std::vector<RoundTubeSize> result;
  for (const auto& [size, w] : next_sizes(round_series, round_walls, outside_diameter, wall, diameters))
    result.push_back({size, w});
  return result;
}

std::vector<SquareTubeSize> next_square_tubes(double side, double wall, int sides) {
  std::vector<SquareTubeSize> result;
  for (const auto& [size, w] : next_sizes(square_series, square_walls, side, wall, sides))
    result.push_back({size, w});
  return result;
}

RoundTubeSize standard_round_tube(double at_least_diameter, double at_least_wall) {
  for (const Series& s : round_series)
    if (s.size * mm * same >= at_least_diameter)
      for (double w : round_walls)
        if (w * mm * same >= at_least_wall && w >= s.thinnest && w <= s.thickest)
          return {s.size * mm, w * mm};
  return {std::end(round_series)[-1].size * mm, std::end(round_series)[-1].thickest * mm};
}

double pipe_outside_diameter_of_inches(double nominal) {
  constexpr std::pair<double, double> pipes[] = {
      {0.5, 21.3},  {0.75, 26.7}, {1, 33.4},  {1.25, 42.2}, {1.5, 48.3}, {2, 60.3},   {2.5, 73.0}, {3, 88.9},
      {3.5, 101.6}, {4, 114.3},   {5, 141.3}, {6, 168.3},   {8, 219.1},  {10, 273.0}, {12, 323.8}};
  for (const auto& [size, outside] : pipes)
    if (std::abs(size - nominal) < 1e-6) return outside * mm;
  return std::numeric_limits<double>::quiet_NaN();
}

double pipe_outside_diameter_of_dn(double nominal) {
  constexpr std::pair<double, double> pipes[] = {
      {15, 21.3}, {20, 26.9},   {25, 33.7},   {32, 42.4},   {40, 48.3},   {50, 60.3},   {65, 76.1},
      {80, 88.9}, {100, 114.3}, {125, 139.7}, {150, 168.3}, {200, 219.1}, {250, 273.0}, {300, 323.9}};
  for (const auto& [size, outside] : pipes)
    if (std::abs(size - nominal) < 1e-6) return outside * mm;
  return std::numeric_limits<double>::quiet_NaN();
}

}  // namespace focalframe::models
