#include "models/cures.h"

#include <algorithm>
#include <cmath>
#include <set>

#include "models/cure_ladders.h"
#include "models/many_runs.h"
#include "models/quantity.h"
#include "models/trough_layout.h"

namespace focalframe::models {
namespace {

struct Idea {
  std::string part;  ///< two ideas about one part exclude each other
  std::string text;
  std::function<void(TroughDesign&)> apply;
};

bool missed(const Assessment& a, const std::string& start) {
  return std::any_of(a.criteria.begin(), a.criteria.end(),
                     [&](const Criterion& c) { return !c.met() && c.key.rfind(start, 0) == 0; });
}

std::vector<Idea> ideas_for(const TroughDesign& d, const Assessment& a) {
  std::vector<Idea> ideas;
  const bool light = missed(a, "intercept") || missed(a, "lost-to-frame") || missed(a, "twist");
  const bool torque = missed(a, "moving-torque") || missed(a, "holding-torque");
  if ((light || torque) && std::isfinite(a.balancing_counterweight) &&
      std::abs(a.balancing_counterweight - d.counterweights.mass) > 1) {
    const double present = d.counterweights.mass, full = std::round(a.balancing_counterweight);
    for (double mass : {std::round((present + full) / 2), full})
      if (std::abs(mass - present) >= 1)
        ideas.push_back({"counterweights",
                         "counterweights " + number_text(present) + " -> " + number_text(mass) + " kg",
                         [=](TroughDesign& x) { x.counterweights.mass = mass; }});
  }
  if (light && d.sensor.correction != "row-mean" && d.row.modules > 1)
    ideas.push_back(
        {"aim", "aim at the row's mean twist", [](TroughDesign& x) { x.sensor.correction = "row-mean"; }});
  if (missed(a, "moving-torque")) {
    const double rating = next_rating(std::abs(a.strength.moving.torque));
    ideas.push_back({"moving", "drive moving " + quantity_text(rating, Quantity::torque),
                     [=](TroughDesign& x) { x.drive.moving_torque = rating; }});
  }
  if (missed(a, "holding-torque")) {
    const double rating = next_rating(std::abs(a.strength.holding.torque));
    ideas.push_back({"holding", "drive holding " + quantity_text(rating, Quantity::torque),
                     [=](TroughDesign& x) { x.drive.holding_torque = rating; }});
  }
  if (light && std::isfinite(d.drive.stiffness))
    ideas.push_back(
        {"drive stiffness", "drive twice as stiff", [](TroughDesign& x) { x.drive.stiffness *= 2; }});
  if (d.row.modules > 2 && (light || torque || missed(a, "wind-up"))) {
    const int fewer = d.row.modules - (d.row.modules > 3 ? 2 : 1);
    ideas.push_back(
        {"modules", "row cut to " + std::to_string(fewer) + " modules, from " + std::to_string(d.row.modules),
         [=](TroughDesign& x) {
           if (x.row.drive_after_module >= 0)
             x.row.drive_after_module = static_cast<int>(
                 std::lround(x.row.drive_after_module * static_cast<double>(fewer) / x.row.modules));
           x.row.modules = fewer;
         }});
  }
  return ideas;
}

using Choice = std::vector<std::size_t>;  // indices into the ideas

class Trials {
 public:
  Trials(const TroughDesign& design, const loads::CoefficientTable& table, const Assessment& start,
         std::vector<Idea> ideas)
      : design_(design),
        table_(table),
        start_(start),
        ideas_(std::move(ideas)),
        built_(build_row(design, table)) {}

  void run(const std::vector<Choice>& choices, const Progress& progress) {
    std::vector<Choice> fresh;
    for (const Choice& c : choices)
      if (tried_.insert(c).second) fresh.push_back(c);
    std::vector<TroughDesign> designs;
    for (const Choice& c : fresh) {
      TroughDesign changed = design_;
      for (std::size_t i : c) ideas_[i].apply(changed);
      designs.push_back(changed);
    }
    const std::vector<Assessment> results = assess_many(designs, table_, progress, &built_);
    for (std::size_t i = 0; i < fresh.size(); ++i)
      if (!std::isnan(results[i].mass)) keep(fresh[i], results[i]);
  }

  /// Adds ideas for later runs; returns their indices.
  std::vector<std::size_t> add(const std::string& part, const std::vector<Rung>& rungs) {
    std::vector<std::size_t> numbers;
    for (const Rung& rung : rungs) {
      numbers.push_back(ideas_.size());
      ideas_.push_back({part, rung.text, rung.apply});
    }
    return numbers;
  }

  const std::string& part(std::size_t idea) const { return ideas_[idea].part; }

  /// Ideas that mend limit `key` alone, best (fewest limits missed, then lightest) first.
  std::vector<std::size_t> menders(const std::string& key) const {
    std::vector<const Trial*> good;
    for (const Trial& t : trials_)
      if (t.choice.size() == 1 && std::none_of(t.cure.still_missed.begin(), t.cure.still_missed.end(),
                                               [&](const Criterion& c) { return c.key == key; }))
        good.push_back(&t);
    std::sort(good.begin(), good.end(),
              [](const Trial* x, const Trial* y) { return better(x->cure, y->cure); });
    std::vector<std::size_t> out;
    for (const Trial* t : good) out.push_back(t->choice[0]);
    return out;
  }

  bool exclude(std::size_t a, std::size_t b) const { return ideas_[a].part == ideas_[b].part; }
  bool any_meets_all() const {
    return std::any_of(trials_.begin(), trials_.end(), [](const Trial& t) { return t.cure.meets_all; });
  }

  std::vector<Cure> best() const {
    std::vector<Cure> cures;
    for (const Trial& t : trials_) cures.push_back(t.cure);
    std::stable_sort(cures.begin(), cures.end(), better);
    return cures;
  }

 private:
  struct Trial {
    Choice choice;
    Cure cure;
  };

  static bool better(const Cure& x, const Cure& y) {
    if (x.missed != y.missed) return x.missed < y.missed;
    if (x.mirror_lost != y.mirror_lost) return x.mirror_lost < y.mirror_lost;
    if (x.changes.size() != y.changes.size()) return x.changes.size() < y.changes.size();
    return x.mass_change < y.mass_change;
  }

  void keep(const Choice& choice, const Assessment& a) {
    Cure cure;
    for (std::size_t i : choice) cure.changes.push_back(ideas_[i].text);
    cure.missed = a.limits_missed;
    cure.meets_all = a.limits_missed == 0;
    if (a.worst_light >= 0)
      cure.intercept = a.optics[static_cast<std::size_t>(a.worst_light)].result.intercept;
    cure.moving_torque = std::abs(a.strength.moving.torque);
    cure.mirror_lost = std::max(0.0, start_.mirror_area - a.mirror_area);
    cure.mass = a.mass + a.stand_mass;
    cure.mass_change = cure.mass - (start_.mass + start_.stand_mass);
    for (const Criterion& c : a.criteria)
      if (!c.met()) cure.still_missed.push_back(c);
    trials_.push_back({choice, cure});
  }

  const TroughDesign& design_;
  const loads::CoefficientTable& table_;
  const Assessment& start_;
  std::vector<Idea> ideas_;
  BuiltRow built_;
  std::vector<Trial> trials_;
  std::set<Choice> tried_;
};

// Every ladder's first sizes; then on upwards while a limit it is made for is mended by none of them.
void climb(Trials& trials, const std::vector<Ladder>& ladders, const std::vector<std::string>& keys,
           std::vector<Choice> singles, const Progress& progress) {
  constexpr std::size_t step = 4;
  const auto rungs = [](const Ladder& ladder, std::size_t from) {
    const auto begin =
        ladder.rungs.begin() + static_cast<std::ptrdiff_t>(std::min(from, ladder.rungs.size()));
    const auto end =
        ladder.rungs.begin() + static_cast<std::ptrdiff_t>(std::min(from + step, ladder.rungs.size()));
    return std::vector<Rung>(begin, end);
  };
  const auto mended = [&](const Ladder& ladder) {
    return std::all_of(keys.begin(), keys.end(), [&](const std::string& key) {
      if (!aims_at(ladder, key)) return true;
      const std::vector<std::size_t> good = trials.menders(key);
      return std::any_of(good.begin(), good.end(),
                         [&](std::size_t i) { return trials.part(i) == ladder.part; });
    });
  };
  for (std::size_t from = 0;; from += step) {
    for (const Ladder& ladder : ladders)
      if (from == 0 || !mended(ladder))
        for (std::size_t i : trials.add(ladder.part, rungs(ladder, from))) singles.push_back({i});
    if (singles.empty()) return;
    trials.run(singles, progress);
    singles.clear();
  }
}

Choice sorted(Choice c) {
  std::sort(c.begin(), c.end());
  c.erase(std::unique(c.begin(), c.end()), c.end());
  return c;
}

}  // namespace

std::vector<Cure> find_cures(const TroughDesign& design, const loads::CoefficientTable& table,
                             const Assessment& assessment, const Progress& progress) {
  std::vector<std::string> keys;
  for (const Criterion& c : assessment.criteria)
    if (!c.met()) keys.push_back(c.key);
  if (keys.empty()) return {};
  const std::vector<Idea> ideas = ideas_for(design, assessment);
  const std::vector<Ladder> ladders = size_ladders(design, assessment);
  if (ideas.empty() && ladders.empty()) return {};
  Trials trials(design, table, assessment, ideas);
  std::vector<Choice> singles;
  for (std::size_t i = 0; i < ideas.size(); ++i) singles.push_back({i});
  climb(trials, ladders, keys, singles, progress);

  // Pairs of ideas that each mend something; the two best menders of every missed limit.
  std::vector<std::vector<std::size_t>> menders;
  for (const std::string& key : keys) {
    menders.push_back(trials.menders(key));
    if (menders.back().size() > 3) menders.back().resize(3);
  }
  std::vector<Choice> pairs;
  for (std::size_t k = 0; k < menders.size(); ++k)
    for (std::size_t l = k + 1; l < menders.size(); ++l)
      for (std::size_t a : menders[k])
        for (std::size_t b : menders[l])
          if (!trials.exclude(a, b)) pairs.push_back(sorted({a, b}));
  if (pairs.size() > 12) pairs.resize(12);
  trials.run(pairs, progress);
  if (trials.any_meets_all() || keys.size() < 3) return trials.best();

  // One mender per missed limit, the best of each first.
  std::vector<Choice> all;
  for (std::size_t rank = 0; rank < 2; ++rank) {
    Choice choice;
    for (const auto& list : menders)
      if (!list.empty()) {
        const std::size_t pick = list[std::min(rank, list.size() - 1)];
        if (std::none_of(choice.begin(), choice.end(),
                         [&](std::size_t i) { return i != pick && trials.exclude(i, pick); }))
          choice.push_back(pick);
      }
    all.push_back(sorted(choice));
  }
  trials.run(all, progress);
  return trials.best();
}

}  // namespace focalframe::models
