#include "models/cure_ladders.h"

#include <algorithm>
#include <cmath>

#include "fem/units.h"
#include "models/catalogue.h"
#include "models/profile.h"
#include "models/quantity.h"
#include "models/schema.h"

namespace focalframe::models {
namespace {

using Keys = std::vector<std::string>;
using At = std::function<ProfileInput&(TroughDesign&)>;

constexpr int whole_catalogue = 100;

// Plates, bars and equal angles common in workshops [mm] (common practice, no source).
constexpr double plates[] = {1.5, 2, 2.5, 3, 4, 5, 6, 8, 10, 12, 15, 20};
constexpr double bars[] = {6, 8, 10, 12, 14, 16, 18, 20, 22, 25, 28, 30, 35, 40, 50};
struct AngleSize {
  double leg, thickness;
};
constexpr AngleSize angles[] = {{20, 3}, {25, 3}, {30, 3}, {35, 4}, {40, 4},   {45, 5},  {50, 5},
                                {60, 6}, {70, 7}, {80, 8}, {90, 9}, {100, 10}, {120, 12}};

// The nearest sizes first as the catalogue orders them, then one per outer size.
template <class Size, class Make>
void climb(std::vector<ProfileInput>& out, const std::vector<Size>& near, const std::vector<Size>& all,
           double Size::*outer, Make make) {
  for (const Size& s : near) out.push_back(make(s));
  double last = near.empty() ? 0 : near.back().*outer;
  for (const Size& s : all)
    if (s.*outer > last * 1.001) {
      out.push_back(make(s));
      last = s.*outer;
    }
}

std::vector<ProfileInput> greater(const ProfileInput& p) {
  std::vector<ProfileInput> out;
  if (p.shape == "round-tube")
    climb(out, next_round_tubes(p.outside_diameter, p.wall),
          next_round_tubes(p.outside_diameter, p.wall, whole_catalogue), &RoundTubeSize::outside_diameter,
          [p](const RoundTubeSize& s) {
            ProfileInput next = p;
            next.outside_diameter = s.outside_diameter;
            next.wall = s.wall;
            return next;
          });
  else if (p.shape == "square-tube")
    climb(out, next_square_tubes(p.side, p.wall), next_square_tubes(p.side, p.wall, whole_catalogue),
          &SquareTubeSize::side, [p](const SquareTubeSize& s) {
            ProfileInput next = p;
            next.side = s.side;
            next.wall = s.wall;
            next.outer_radius = next.inner_radius = not_given;
            return next;
          });
  else if (p.shape == "round-bar")
    for (double size : bars) {
      ProfileInput next = p;
      next.outside_diameter = size * mm;
      if (size * mm > 1.001 * p.outside_diameter) out.push_back(next);
    }
  else if (p.shape == "angle" && p.depth == p.width)
    for (const AngleSize& size : angles) {
      ProfileInput next = p;
      next.depth = next.width = size.leg * mm;
      next.thickness = size.thickness * mm;
      next.root_radius = next.toe_radius = not_given;
      if (size.leg * mm > 1.001 * p.depth) out.push_back(next);
    }
  return out;
}

void profile_ladder(std::vector<Ladder>& all, const std::string& part, const Keys& keys,
                    const std::string& word, const TroughDesign& design, const At& at) {
  TroughDesign copy = design;
  Ladder ladder{part, keys, {}};
  for (const ProfileInput& next : greater(at(copy)))
    ladder.rungs.push_back({word + " " + sizes_text(next), [=](TroughDesign& d) { at(d) = next; }});
  all.push_back(std::move(ladder));
}

Keys with(Keys keys, const Keys& more) {
  keys.insert(keys.end(), more.begin(), more.end());
  return keys;
}

void tube_ladders(std::vector<Ladder>& all, const TroughDesign& d, const Keys& light) {
  if (d.tube.profile.shape != "lattice-box") {
    profile_ladder(all, "tube", with(light, {"stress torque tube", "wind-up"}), "tube", d,
                   [](TroughDesign& x) -> ProfileInput& { return x.tube.profile; });
    return;
  }
  profile_ladder(all, "box chords", {"stress box chord", "buckling box chord"}, "box chords", d,
                 [](TroughDesign& x) -> ProfileInput& { return x.tube.chords; });
  profile_ladder(all, "box webs", with(light, {"stress box web", "buckling box web", "wind-up"}), "box webs",
                 d, [](TroughDesign& x) -> ProfileInput& { return x.tube.webs; });
}

void rib_ladders(std::vector<Ladder>& all, const TroughDesign& d, const Keys& light) {
  const Keys shape = with(light, {"slope"});
  if (d.ribs.kind == "bent")
    profile_ladder(all, "ribs", with(shape, {"stress rib", "buckling rib"}), "rib", d,
                   [](TroughDesign& x) -> ProfileInput& { return x.ribs.bar; });
  if (d.ribs.kind == "truss") {
    profile_ladder(all, "rib chords", with(shape, {"stress rib chord", "buckling rib chord"}), "rib chords",
                   d, [](TroughDesign& x) -> ProfileInput& { return x.ribs.chords; });
    profile_ladder(all, "rib webs", {"stress rib web", "buckling rib web"}, "rib webs", d,
                   [](TroughDesign& x) -> ProfileInput& { return x.ribs.webs; });
  }
  const Keys strength{"stress rib", "buckling rib"};
  if (d.ribs.kind == "plate") {
    Ladder plate{"ribs", with(shape, strength), {}};
    for (double t : plates)
      if (t * mm > d.ribs.thickness * 1.001)
        plate.rungs.push_back(
            {"rib plate " + number_text(t) + " mm", [t](TroughDesign& x) { x.ribs.thickness = t * mm; }});
    all.push_back(std::move(plate));
  }
  if (d.ribs.kind == "bent") return;
  Ladder depth{"rib depth", with(shape, strength), {}};
  for (double more : {1.25, 1.5, 2.0}) {
    const double tube = std::round(more * d.ribs.depth_at_tube / (5 * mm)) * 5 * mm;
    depth.rungs.push_back({"ribs " + number_text(tube / mm) + " mm deep at the tube",
                           [tube](TroughDesign& x) { x.ribs.depth_at_tube = tube; }});
  }
  all.push_back(std::move(depth));
}

/// Whether the mirror's own bending is worth mending where light or slope is short.
bool panels_bend(const Assessment& a) {
  const auto costs = [](const PartLoss& p) { return p.name == "panel" && p.alone > 0.003; };
  return std::any_of(a.optics.begin(), a.optics.end(), [&](const OpticalRow& row) {
    const auto& parts = row.result.attribution.parts;
    return row.result.slope_panel > 0.5 * row.result.slope || std::any_of(parts.begin(), parts.end(), costs);
  });
}

// A stiffer skin, or more of what carries it: purlins under a skin on purlins, else ribs.
void panel_ladders(std::vector<Ladder>& all, const TroughDesign& d, const Keys& light) {
  const Keys shape = with(light, {"slope"});
  Ladder skin{"mirror", shape, {}}, pitch{"mirror supports", shape, {}};
  if (!std::isnan(d.mirror.thickness) && std::isnan(d.mirror.bending_stiffness))
    for (double t : plates)
      if (t * mm > 1.001 * d.mirror.thickness && t <= 6)
        skin.rungs.push_back({"mirror " + number_text(t) + " mm thick",
                              [t](TroughDesign& x) { x.mirror.thickness = t * mm; }});
  const bool on_purlins = d.mirror.fixed_to == "purlins";
  for (int more : {1, 2, 3, 4}) {
    const int count = on_purlins ? d.purlins.count + 2 * more : d.ribs.per_module + more;
    pitch.rungs.push_back(
        {std::to_string(count) + (on_purlins ? " purlins" : " ribs a module") + ", from " +
             std::to_string(on_purlins ? d.purlins.count : d.ribs.per_module),
         [=](TroughDesign& x) { (on_purlins ? x.purlins.count : x.ribs.per_module) = count; }});
  }
  all.push_back(std::move(skin));
  all.push_back(std::move(pitch));
}

bool fits(const TroughDesign& design) {
  for (const Violation& v : validate(design))
    if (v.level == Violation::Level::stop) return false;
  return true;
}

}  // namespace

double next_rating(double needed) {
  const double decade = std::pow(10.0, std::floor(std::log10(needed)));
  for (double step : {1.0, 1.2, 1.5, 2.0, 2.5, 3.0, 4.0, 5.0, 6.0, 8.0, 10.0})
    if (step * decade >= needed) return step * decade;
  return 10 * decade;
}

bool aims_at(const Ladder& ladder, const std::string& key) {
  return std::any_of(ladder.keys.begin(), ladder.keys.end(),
                     [&](const std::string& start) { return key.rfind(start, 0) == 0; });
}

std::vector<Ladder> size_ladders(const TroughDesign& d, const Assessment& a) {
  const Keys light{"intercept", "lost-to-frame", "twist"};
  std::vector<Ladder> all;
  tube_ladders(all, d, light);
  rib_ladders(all, d, light);
  if (panels_bend(a)) panel_ladders(all, d, light);
  profile_ladder(all, "pylons", {"stress pylon", "buckling pylon"}, "pylons", d,
                 [](TroughDesign& x) -> ProfileInput& { return x.pylons.profile; });
  profile_ladder(all, "posts", {"receiver-shift", "stress receiver post", "buckling receiver post"},
                 "receiver posts", d,
                 [](TroughDesign& x) -> ProfileInput& { return x.receiver.posts.profile; });
  profile_ladder(all, "purlins", {"stress purlin"}, "purlins", d,
                 [](TroughDesign& x) -> ProfileInput& { return x.purlins.profile; });
  const bool sound = fits(d);  // a design that breaks rules on purpose is not held to them here
  std::erase_if(all, [&](Ladder& ladder) {
    const bool wanted = std::any_of(a.criteria.begin(), a.criteria.end(),
                                    [&](const Criterion& c) { return !c.met() && aims_at(ladder, c.key); });
    if (!wanted) return true;
    // Stiffer ribs help a row that only lacks light a little; the tube is what is climbed for that.
    const bool own = std::any_of(a.criteria.begin(), a.criteria.end(), [&](const Criterion& c) {
      return !c.met() && aims_at(ladder, c.key) &&
             std::find(light.begin(), light.end(), c.key) == light.end();
    });
    if (!own && ladder.part.starts_with("rib") && ladder.rungs.size() > 2) ladder.rungs.resize(2);
    std::erase_if(ladder.rungs, [&](const Rung& rung) {
      TroughDesign changed = d;
      rung.apply(changed);
      return sound && !fits(changed);
    });
    return ladder.rungs.empty();
  });
  return all;
}

}  // namespace focalframe::models
