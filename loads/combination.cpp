#include "loads/combination.h"

#include <array>
#include <stdexcept>

#include "loads/number_text.h"

namespace focalframe::loads {

namespace {

void require_edition(int edition) {
  if (edition != 5 && edition != 10 && edition != 16 && edition != 22)
    throw std::invalid_argument("ASCE 7 edition must be 5, 10, 16 or 22, not " + std::to_string(edition));
}

std::string edition_text(int edition) { return (edition < 10 ? "7-0" : "7-") + std::to_string(edition); }

constexpr std::array editions{5, 10, 16, 22};

// Letter of the printed formula, factor.
std::array<std::pair<const char*, double>, 8> terms(const Combination& c) {
  return {{{"G", c.permanent},
           {"W", c.wind},
           {"S", c.snow},
           {"T", c.temperature},
           {"Q", c.imposed},
           {"D_ice", c.ice},
           {"W_ice", c.wind_on_ice},
           {"E", c.seismic}}};
}

}  // namespace

CombinationSet en_1990(double altitude) {
  const double snow0 = altitude > 1000 ? 0.7 : 0.5;
  constexpr double wind0 = 0.6, temperature0 = 0.6, wind1 = 0.2, imposed0 = 0.7;
  constexpr Purpose strength = Purpose::strength, service = Purpose::service;
  return {"EN 1990",
          "2002+A1:2005",
          false,
          {{.name = "wind leading, weight unfavourable",
            .purpose = strength,
            .permanent = 1.35,
            .wind = 1.5,
            .snow = 1.5 * snow0,
            .temperature = 1.5 * temperature0},
           {.name = "wind leading, no snow",
            .purpose = strength,
            .permanent = 1.35,
            .wind = 1.5,
            .temperature = 1.5 * temperature0},
           {.name = "wind leading, weight favourable", .purpose = strength, .permanent = 1.0, .wind = 1.5},
           {.name = "snow leading",
            .purpose = strength,
            .permanent = 1.35,
            .wind = 1.5 * wind0,
            .snow = 1.5,
            .temperature = 1.5 * temperature0},
           {.name = "temperature leading",
            .purpose = strength,
            .permanent = 1.35,
            .wind = 1.5 * wind0,
            .snow = 1.5 * snow0,
            .temperature = 1.5},
           {.name = "maintenance leading",
            .purpose = strength,
            .permanent = 1.35,
            .wind = 1.5 * wind0,
            .imposed = 1.5},
           {.name = "maintenance accompanying",
            .purpose = strength,
            .permanent = 1.35,
            .wind = 1.5,
            .imposed = 1.5 * imposed0},
           {.name = "equilibrium, weight favourable",
            .purpose = Purpose::equilibrium,
            .permanent = 0.9,
            .wind = 1.5},
           {.name = "equilibrium, weight unfavourable",
            .purpose = Purpose::equilibrium,
            .permanent = 1.1,
            .wind = 1.5},
           {.name = "characteristic", .purpose = service, .permanent = 1.0, .wind = 1.0},
           {.name = "characteristic, snow leading",
            .purpose = service,
            .permanent = 1.0,
            .wind = wind0,
            .snow = 1.0},
           {.name = "frequent", .purpose = service, .permanent = 1.0, .wind = wind1},
           {.name = "stuck",
            .purpose = Purpose::accidental,
            .states = StateGroup::stuck,
            .permanent = 1.0,
            .wind = 1.0},
           {.name = "earthquake", .purpose = Purpose::seismic, .permanent = 1.0, .seismic = 1.0}}};
}

CombinationSet asce_7_strength(int edition) {
  require_edition(edition);
  const double wind = edition >= 10 ? 1.0 : 1.6, wind_with_snow = edition >= 10 ? 0.5 : 0.8;
  const double snow = edition >= 22 ? 1.0 : 1.6, snow_with_wind = edition >= 22 ? 0.3 : 0.5;
  constexpr Purpose strength = Purpose::strength;
  return {
      "ASCE 7 strength",
      edition_text(edition),
      edition >= 10,
      {{.name = "weight alone", .purpose = strength, .permanent = 1.4},
       {.name = "maintenance leading",
        .purpose = strength,
        .permanent = 1.2,
        .snow = snow_with_wind,
        .temperature = 1.2,
        .imposed = 1.6},
       {.name = "snow leading", .purpose = strength, .permanent = 1.2, .wind = wind_with_snow, .snow = snow},
       {.name = "wind leading",
        .purpose = strength,
        .permanent = 1.2,
        .wind = wind,
        .snow = snow_with_wind,
        .temperature = 1.0},
       {.name = "wind, weight favourable", .purpose = strength, .permanent = 0.9, .wind = wind},
       {.name = "ice and wind on ice",
        .purpose = strength,
        .permanent = 1.2,
        .snow = snow_with_wind,
        .ice = 1.0,
        .wind_on_ice = 1.0},
       {.name = "ice, weight favourable",
        .purpose = strength,
        .permanent = 0.9,
        .ice = 1.0,
        .wind_on_ice = 1.0},
       {.name = "earthquake",
        .purpose = Purpose::seismic,
        .permanent = 1.2,
        .snow = edition >= 22 ? 0.15 : 0.2,
        .seismic = 1.0},
       {.name = "earthquake, weight favourable",
        .purpose = Purpose::seismic,
        .permanent = 0.9,
        .seismic = 1.0}}};
}

CombinationSet asce_7_allowable(int edition) {
  require_edition(edition);
  const double wind = edition >= 10 ? 0.6 : 1.0, snow = edition >= 22 ? 0.7 : 1.0;
  constexpr Purpose strength = Purpose::strength;
  return {
      "ASCE 7 allowable",
      edition_text(edition),
      edition >= 10,
      {{.name = "weight alone", .purpose = strength, .permanent = 1.0},
       {.name = "snow", .purpose = strength, .permanent = 1.0, .snow = snow},
       {.name = "wind", .purpose = strength, .permanent = 1.0, .wind = wind},
       {.name = "wind and snow",
        .purpose = strength,
        .permanent = 1.0,
        .wind = 0.75 * wind,
        .snow = 0.75 * snow},
       {.name = "wind, weight favourable", .purpose = strength, .permanent = 0.6, .wind = wind},
       {.name = "ice and wind on ice", .purpose = strength, .permanent = 1.0, .ice = 0.7, .wind_on_ice = 0.7},
       {.name = "earthquake", .purpose = Purpose::seismic, .permanent = 1.0, .seismic = 0.7},
       {.name = "earthquake, weight favourable",
        .purpose = Purpose::seismic,
        .permanent = 0.6,
        .seismic = 0.7}}};
}

std::optional<CombinationSet> find_combinations(const std::string& name, double altitude) {
  if (name == "EN 1990") return en_1990(altitude);
  for (const int edition : editions) {
    if (name == "ASCE " + edition_text(edition)) return asce_7_strength(edition);
    if (name == "ASCE " + edition_text(edition) + " allowable") return asce_7_allowable(edition);
  }
  return std::nullopt;
}

std::vector<std::string> combination_names() {
  std::vector<std::string> names{"EN 1990"};
  for (const int edition : editions) {
    names.push_back("ASCE " + edition_text(edition));
    names.push_back("ASCE " + edition_text(edition) + " allowable");
  }
  return names;
}

double combined(const Combination& c, const Effects& e) {
  return c.permanent * e.permanent + c.wind * e.wind + c.snow * e.snow + c.temperature * e.temperature +
         c.imposed * e.imposed + c.ice * e.ice + c.wind_on_ice * e.wind_on_ice + c.seismic * e.seismic;
}

std::string formula(const Combination& combination) {
  std::string text;
  for (const auto& [letter, factor] : terms(combination)) {
    if (factor == 0) continue;
    text += (text.empty() ? "" : " + ") + number_text(factor, 4) + " " + letter;
  }
  return text;
}

}  // namespace focalframe::loads
