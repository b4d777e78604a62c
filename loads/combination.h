#pragma once

/// Combinations of actions as data: factors on weight and on the variable actions that may act at once. The
/// sets themselves are files (models/tables/combinations). Optical checks always use unfactored actions.

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

/// Variable actions.
enum class Action { wind, snow, temperature, imposed, ice, wind_on_ice, seismic };
inline constexpr int action_count = 7;
std::string action_word(Action action);  ///< as combination files write it: "wind-on-ice"

struct Combination {
  std::string name;
  Purpose purpose = Purpose::strength;
  StateGroup states = StateGroup::any;
  Action leading = Action::wind;  ///< a combination is left out where its leading action does not occur
  // Factors on characteristic actions; 0 = not in this combination.
  double permanent = 0, wind = 0, snow = 0, temperature = 0, imposed = 0, ice = 0, wind_on_ice = 0,
         seismic = 0;
};
double factor_of(const Combination& combination, Action action);

struct CombinationSet {
  std::string name;                ///< "en-1990"
  std::string title, edition;      ///< "EN 1990, Annex A1", "2002+A1:2005"
  std::string source;              ///< where the factors come from and how far to trust them
  bool ultimate_wind_map = false;  ///< the map speed already contains the wind factor
  double on_yield = 1;             ///< allowed stress over yield [-]
  std::vector<Combination> combinations;
};

/// Greatest wind factor of the strength combinations; 0 without any.
double greatest_wind_factor(const CombinationSet& set);

/// A sum of effects: any quantity that is linear in the actions.
struct Effects {
  double permanent = 0, wind = 0, snow = 0, temperature = 0, imposed = 0, ice = 0, wind_on_ice = 0,
         seismic = 0;
};
double combined(const Combination& combination, const Effects& effects);

/// "1.35 G + 1.5 W + 0.75 S".
std::string formula(const Combination& combination);

}  // namespace focalframe::loads
