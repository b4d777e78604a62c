#include "loads/combination.h"

#include <algorithm>
#include <array>

#include "loads/number_text.h"

namespace focalframe::loads {

namespace {

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

std::string action_word(Action action) {
  constexpr const char* words[action_count] = {"wind", "snow",        "temperature", "imposed",
                                               "ice",  "wind-on-ice", "seismic"};
  return words[static_cast<int>(action)];
}

double factor_of(const Combination& c, Action action) {
  const double factors[action_count] = {c.wind, c.snow,        c.temperature, c.imposed,
                                        c.ice,  c.wind_on_ice, c.seismic};
  return factors[static_cast<int>(action)];
}

double greatest_wind_factor(const CombinationSet& set) {
  double greatest = 0;
  for (const Combination& c : set.combinations)
    if (c.purpose == Purpose::strength) greatest = std::max(greatest, c.wind);
  return greatest;
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
