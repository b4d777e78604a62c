#include "models/factored_cases.h"

#include <algorithm>
#include <cmath>
#include <set>
#include <utility>

#include "models/quantity.h"

namespace focalframe::models {
namespace {

using loads::Action;
using loads::Combination;
using loads::Purpose;

constexpr Action other_actions[] = {Action::snow, Action::temperature, Action::imposed, Action::ice,
                                    Action::seismic};

bool fits(const Combination& c, const StateLoads& loads, Wanted wanted) {
  const StateKind kind = loads.state.kind;
  const bool stuck = kind == StateKind::stuck, person = kind == StateKind::maintenance;
  if (c.purpose == Purpose::seismic)
    return (kind == StateKind::operate || kind == StateKind::stow) && loads.state.wind_from == 0;
  if (person && c.imposed == 0) return false;
  if (c.states == loads::StateGroup::extreme_wind && kind != StateKind::stow && kind != StateKind::unfinished)
    return false;
  if (wanted == Wanted::service) return c.purpose == Purpose::service;
  if (stuck) return c.states == loads::StateGroup::stuck;
  return c.purpose == Purpose::strength && c.states != loads::StateGroup::stuck;
}

std::vector<int> numbers_of(const StateLoads& loads, Action action) {
  std::vector<int> numbers;
  for (std::size_t i = 0; i < loads.others.size(); ++i)
    if (loads.others[i].action == action) numbers.push_back(static_cast<int>(i));
  return numbers;
}

bool occurs(const StateLoads& loads, Action action) {
  if (action == Action::wind_on_ice) action = Action::ice;
  return action == Action::wind || !numbers_of(loads, action).empty();
}

// Every choice of at most one way of each other action, a leading one always there.
void choose(const Combination& c, const StateLoads& loads, std::size_t next, std::vector<int>& chosen,
            std::vector<std::vector<int>>& out) {
  if (next == std::size(other_actions)) {
    out.push_back(chosen);
    return;
  }
  const Action action = other_actions[next];
  const bool leads = c.leading == action || (c.leading == Action::wind_on_ice && action == Action::ice);
  const std::vector<int> ways =
      loads::factor_of(c, action) > 0 ? numbers_of(loads, action) : std::vector<int>{};
  if (!leads || ways.empty()) choose(c, loads, next + 1, chosen, out);
  for (int way : ways) {
    chosen.push_back(way);
    choose(c, loads, next + 1, chosen, out);
    chosen.pop_back();
  }
}

FactoredCase make(const Combination& c, const StateLoads& loads, int variant,
                  const std::vector<int>& others) {
  FactoredCase out;
  out.combination = &c;
  out.variant = variant;
  out.others = others;
  out.earthquake = c.purpose == Purpose::seismic;
  out.terms.push_back({0, c.permanent, false});
  bool iced = false;
  for (int i : others) {
    const OtherLoad& other = loads.others[static_cast<std::size_t>(i)];
    iced = iced || other.action == Action::ice;
    out.terms.push_back(
        {1 + static_cast<int>(loads.wind.cols()) + i, loads::factor_of(c, other.action), false});
  }
  const double wind = c.wind + (iced ? c.wind_on_ice * loads.ice_wind_share : 0);
  if (variant >= 0 && wind > 0) out.terms.push_back({1 + variant, wind, true});
  return out;
}

// Cases in the order found, each sum of columns once.
struct Cases {
  std::vector<FactoredCase> list;
  std::set<std::vector<std::pair<int, double>>> sums;

  void add(FactoredCase one) {
    std::vector<std::pair<int, double>> sum;
    for (const FactoredTerm& t : one.terms) sum.emplace_back(t.column, t.factor);
    if (sums.insert(std::move(sum)).second) list.push_back(std::move(one));
  }
};

void add_combination(Cases& cases, const Combination& c, const StateLoads& loads) {
  if (loads::factor_of(c, c.leading) > 0 && !occurs(loads, c.leading)) return;
  std::vector<std::vector<int>> choices;
  std::vector<int> chosen;
  choose(c, loads, 0, chosen, choices);
  const bool windy = c.wind > 0 || c.wind_on_ice > 0;
  for (const std::vector<int>& others : choices) {
    if (!windy || c.leading != Action::wind) cases.add(make(c, loads, -1, others));
    for (int v = 0; windy && v < loads.wind.cols(); ++v) cases.add(make(c, loads, v, others));
  }
}

const Combination& plain(const char* name) {
  for (const Combination& c : plain_set().combinations)
    if (c.name == name) return c;
  return plain_set().combinations.front();
}

}  // namespace

const loads::CombinationSet& plain_set() {
  using loads::StateGroup;
  const auto make_set = [] {
    loads::CombinationSet set;
    set.name = "plain";
    for (const Purpose purpose : {Purpose::strength, Purpose::service}) {
      const auto add = [&](Combination c) {
        c.purpose = purpose;
        c.permanent = 1;
        set.combinations.push_back(c);
      };
      add({.name = "wind", .wind = 1, .temperature = 1});
      add({.name = "snow", .leading = Action::snow, .snow = 1});
      add({.name = "temperature", .leading = Action::temperature, .temperature = 1});
      add({.name = "maintenance", .leading = Action::imposed, .wind = 1, .imposed = 1});
      add({.name = "ice", .leading = Action::ice, .ice = 1, .wind_on_ice = 1});
    }
    set.combinations.push_back({.name = "stuck",
                                .purpose = Purpose::accidental,
                                .states = StateGroup::stuck,
                                .permanent = 1,
                                .wind = 1});
    set.combinations.push_back({.name = "earthquake",
                                .purpose = Purpose::seismic,
                                .leading = Action::seismic,
                                .permanent = 1,
                                .seismic = 1});
    return set;
  };
  static const loads::CombinationSet set = make_set();
  return set;
}

std::vector<FactoredCase> factored_cases(const loads::CombinationSet& set, const StateLoads& loads,
                                         Wanted wanted) {
  Cases cases;
  // Whatever a set's service combinations are, the drive and the ground feel the full wind of the state.
  const bool person = loads.state.kind == StateKind::maintenance;
  if (wanted == Wanted::service) add_combination(cases, plain(person ? "maintenance" : "wind"), loads);
  for (const Combination& c : set.combinations)
    if (fits(c, loads, wanted)) add_combination(cases, c, loads);
  if (cases.list.empty())
    add_combination(cases,
                    plain(person                                 ? "maintenance"
                          : loads.state.kind == StateKind::stuck ? "stuck"
                                                                 : "wind"),
                    loads);
  return std::move(cases.list);
}

std::string case_text(const FactoredCase& factored, const StateLoads& loads) {
  std::string text;
  const int winds = static_cast<int>(loads.wind.cols());
  const auto letter = [&](const FactoredTerm& term) -> std::string {
    if (term.column == 0) return "G";
    if (term.column <= winds) return "W";
    constexpr const char* letters[loads::action_count] = {"W", "S", "T", "Q", "D_ice", "W_ice", "E"};
    const OtherLoad& other = loads.others[static_cast<std::size_t>(term.column - 1 - winds)];
    return letters[static_cast<int>(other.action)];
  };
  for (const FactoredTerm& term : factored.terms)
    text += (text.empty() ? "" : " + ") + number_text(term.factor) + " " + letter(term);
  std::string names;
  for (int i : factored.others)
    names += (names.empty() ? "" : ", ") + loads.others[static_cast<std::size_t>(i)].name;
  return names.empty() ? text : text + " (" + names + ")";
}

}  // namespace focalframe::models
