#pragma once

/// Combinations of actions as data. The sets below are from memory of the named editions: compare them with
/// your own copy of the code before a design rests on them. Optical checks always use unfactored actions.

#include <optional>
#include <string>
#include <vector>

namespace focalframe::loads {

/// What a combination is for.
enum class Purpose { strength, equilibrium, service, accidental, seismic };

/// Which states of the collector it applies to.
enum class StateGroup {
  any,           ///< every state with its own wind
  extreme_wind,  ///< STOW and UNFINISHED: the wind of the return period
  stuck          ///< STUCK: a pose away from stow in a reduced wind, an accidental situation
};

struct Combination {
  std::string name;
  Purpose purpose = Purpose::strength;
  StateGroup states = StateGroup::any;
  // Factors on characteristic actions; 0 = not in this combination.
  double permanent = 0, wind = 0, snow = 0, temperature = 0, imposed = 0, ice = 0, wind_on_ice = 0,
         seismic = 0;
};

struct CombinationSet {
  std::string name;                ///< "EN 1990", "ASCE 7 strength", "ASCE 7 allowable"
  std::string edition;             ///< "2002+A1:2005", "7-16"
  bool ultimate_wind_map = false;  ///< the map speed already contains the wind factor
  std::vector<Combination> combinations;
};

/// EN 1990:2002+A1, Annex A1 with gamma 1.35 / 1.0 / 1.5, psi0 0.6 for wind and temperature, 0.5 for snow
/// (0.7 above 1000 m), psi1 0.2 for wind.
CombinationSet en_1990(double altitude);

/// ASCE 7 load and resistance factor combinations; edition 5, 10, 16 or 22. Before 2010 the wind factor
/// is 1.6 on a service-level map, from 2010 on 1.0 on an ultimate-level map; from 2022 on snow maps are
/// ultimate too.
CombinationSet asce_7_strength(int edition);

/// ASCE 7 allowable-stress combinations; edition 5, 10, 16 or 22.
CombinationSet asce_7_allowable(int edition);

/// "EN 1990", "ASCE 7-16", "ASCE 7-16 allowable" ...; nullopt when unknown.
std::optional<CombinationSet> find_combinations(const std::string& name, double altitude);

/// Every name find_combinations knows.
std::vector<std::string> combination_names();

/// A sum of effects: any quantity that is linear in the actions.
struct Effects {
  double permanent = 0, wind = 0, snow = 0, temperature = 0, imposed = 0, ice = 0, wind_on_ice = 0,
         seismic = 0;
};
double combined(const Combination& combination, const Effects& effects);

/// "1.35 G + 1.5 W + 0.75 S".
std::string formula(const Combination& combination);

}  // namespace focalframe::loads
