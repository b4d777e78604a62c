#include "models/cures.h"

#include <algorithm>
#include <cmath>
#include <set>

#include "fem/units.h"
#include "models/catalogue.h"
#include "models/many_runs.h"
#include "models/profile.h"
#include "models/quantity.h"
#include "models/trough_layout.h"

namespace focalframe::models {
namespace {

struct Idea {
  std::string part;  ///< two ideas about one part exclude each other
  std::string text;
  std::function<void(TroughDesign&)> apply;
};

/// The next size upwards of a plate thickness series common in workshops [m] (common practice, no source).
double next_plate(double thickness) {
  for (double t : {1.5, 2.0, 2.5, 3.0, 4.0, 5.0, 6.0, 8.0, 10.0, 12.0, 15.0, 20.0})
    if (t * mm > thickness * 1.001) return t * mm;
  return thickness * 1.25;
}

/// Upwards to a rating a catalogue would round to: 1, 1.2, 1.5, 2, 2.5, 3, 4, 5, 6, 8 times a power of ten.
double next_rating(double needed) {
  const double decade = std::pow(10.0, std::floor(std::log10(needed)));
  for (double step : {1.0, 1.2, 1.5, 2.0, 2.5, 3.0, 4.0, 5.0, 6.0, 8.0, 10.0})
    if (step * decade >= needed) return step * decade;
  return 10 * decade;
}

void bigger_profile(std::vector<Idea>& ideas, const std::string& part, const std::string& word,
                    const ProfileInput& profile, std::function<ProfileInput&(TroughDesign&)> at) {
  std::vector<ProfileInput> sizes;
  if (profile.shape == "round-tube")
    for (const RoundTubeSize& s : next_round_tubes(profile.outside_diameter, profile.wall)) {
      ProfileInput next = profile;
      next.outside_diameter = s.outside_diameter;
      next.wall = s.wall;
      sizes.push_back(next);
    }
  else if (profile.shape == "square-tube")
    for (const SquareTubeSize& s : next_square_tubes(profile.side, profile.wall)) {
      ProfileInput next = profile;
      next.side = s.side;
      next.wall = s.wall;
      sizes.push_back(next);
    }
  if (sizes.size() > 4) sizes.resize(4);
  for (const ProfileInput& next : sizes)
    ideas.push_back({part, word + " " + sizes_text(next), [=](TroughDesign& d) { at(d) = next; }});
}

bool missed(const Assessment& a, const std::string& start) {
  return std::any_of(a.criteria.begin(), a.criteria.end(),
                     [&](const Criterion& c) { return !c.met() && c.key.rfind(start, 0) == 0; });
}

std::vector<Idea> ideas_for(const TroughDesign& d, const Assessment& a) {
  std::vector<Idea> ideas;
  const bool light = missed(a, "intercept") || missed(a, "lost-to-frame") || missed(a, "twist");
  const bool torque = missed(a, "moving-torque") || missed(a, "holding-torque");
  const bool ribs = missed(a, "slope") || missed(a, "stress rib") || light;
  if (light || missed(a, "stress torque tube") || missed(a, "wind-up"))
    bigger_profile(ideas, "tube", "tube", d.tube.profile,
                   [](TroughDesign& x) -> ProfileInput& { return x.tube.profile; });
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
  if (ribs) {
    const double plate = next_plate(d.ribs.thickness),
                 depth = std::round(1.25 * d.ribs.depth_at_tube / (5 * mm)) * 5 * mm;
    ideas.push_back({"ribs", "rib plate " + number_text(plate / mm) + " mm",
                     [=](TroughDesign& x) { x.ribs.thickness = plate; }});
    ideas.push_back({"ribs", "ribs " + number_text(depth / mm) + " mm deep at the tube",
                     [=](TroughDesign& x) { x.ribs.depth_at_tube = depth; }});
  }
  if (missed(a, "stress pylon"))
    bigger_profile(ideas, "pylons", "pylons", d.pylons.profile,
                   [](TroughDesign& x) -> ProfileInput& { return x.pylons.profile; });
  if (missed(a, "receiver-shift") || missed(a, "stress receiver post"))
    bigger_profile(ideas, "posts", "receiver posts", d.receiver.posts.profile,
                   [](TroughDesign& x) -> ProfileInput& { return x.receiver.posts.profile; });
  if (missed(a, "stress purlin"))
    bigger_profile(ideas, "purlins", "purlins", d.purlins.profile,
                   [](TroughDesign& x) -> ProfileInput& { return x.purlins.profile; });
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
  const std::vector<Idea> ideas = ideas_for(design, assessment);
  if (keys.empty() || ideas.empty()) return {};
  Trials trials(design, table, assessment, ideas);
  std::vector<Choice> singles;
  for (std::size_t i = 0; i < ideas.size(); ++i) singles.push_back({i});
  trials.run(singles, progress);

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
