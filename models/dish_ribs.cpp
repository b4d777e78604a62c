#include "models/dish_ribs.h"

#include <algorithm>
#include <cmath>
#include <numbers>

#include "models/catalogue.h"
#include "models/dish_names.h"
#include "models/profile.h"
#include "models/schema.h"

namespace focalframe::models {
namespace {

using fem::Vec3;
constexpr double pi = std::numbers::pi, nu = 0.3;

std::string rib_name(std::size_t k) { return "rib " + std::to_string(k + 1); }

class Builder {
 public:
  Builder(const DishDesign& design, int refine, FrameMaker& make)
      : d_(design.dish), ribs_(design.dish.ribs), make_(make) {
    out_.rim = design.parabola.aperture / 2;
    out_.hub_radius = d_.hub.diameter / 2;
    out_.focal_length = focal_length(design.parabola);
    const double skin = std::isnan(d_.surface.thickness) ? 0 : d_.surface.thickness;
    out_.standoff = skin + d_.surface.pad_height + front_depth() / 2;
    place_nodes(refine);
  }

  DishRibs run() {
    for (int k = 0; k < ribs_.count; ++k) {
      out_.ribs.emplace_back();
      out_.ribs.back().angle = pi / 2 + 2 * pi * k / ribs_.count;
      add_rib(static_cast<std::size_t>(k));
    }
    add_hub();
    for (std::size_t i = 0; i < d_.rings.size(); ++i) add_ring(i);
    for (const BracingInput& b : d_.bracing) add_bracing(b);
    return std::move(out_);
  }

 private:
  bool truss() const { return ribs_.kind == "truss"; }
  ProfileInput chords() const { return with_material(ribs_.chords, ribs_.profile.material); }
  double depth(double r) const {
    if (ribs_.kind == "tube") return profile_depth_or_zero(ribs_.profile);
    const double t = (r - out_.hub_radius) / (out_.rim - out_.hub_radius);
    return ribs_.depth_at_hub + t * (ribs_.depth_at_rim - ribs_.depth_at_hub);
  }
  // Of the chord or rib that carries the skin, at the hub; a plate's axis lies in its middle and sinks with
  // its depth, which the rigid arms of the skin follow.
  double front_depth() const { return truss() ? profile_depth_or_zero(ribs_.chords) : 0; }
  Vec3 axis_place(double angle, double r) const {
    const double below = out_.standoff + (truss() ? 0 : depth(r) / 2);
    return {r * std::cos(angle), r * std::sin(angle), r * r / (4 * out_.focal_length) - below};
  }

  // Hub, rim, panel points and rings are kept; what lies between is cut into equal pieces.
  void place_nodes(int refine) {
    std::vector<double> keep{out_.hub_radius, out_.rim};
    if (truss())
      for (int p = 1; p < ribs_.panels; ++p)
        keep.push_back(out_.hub_radius + (out_.rim - out_.hub_radius) * p / ribs_.panels);
    panels_ = keep;
    for (const RingInput& ring : d_.rings) keep.push_back(ring.radius);
    std::sort(keep.begin(), keep.end());
    const double near = 1e-3 * (out_.rim - out_.hub_radius);
    for (double r : keep) {
      if (!out_.radii.empty() && r - out_.radii.back() < near) continue;
      if (!out_.radii.empty()) {
        const double from = out_.radii.back(), share = (r - from) / (out_.rim - out_.hub_radius);
        const int pieces = std::max(1, static_cast<int>(std::ceil(share * ribs_.elements - 1e-9))) * refine;
        for (int i = 1; i < pieces; ++i) out_.radii.push_back(from + (r - from) * i / pieces);
      }
      out_.radii.push_back(r);
    }
  }

  bool panel_point(double r) const {
    return std::any_of(panels_.begin(), panels_.end(),
                       [&](double p) { return std::abs(p - r) < 1e-3 * (out_.rim - out_.hub_radius); });
  }
  // With rings welded to the back chord it has nodes there too.
  bool back_ring(double r) const {
    return std::any_of(d_.rings.begin(), d_.rings.end(), [&](const RingInput& ring) {
      return ring.at == "back" && std::abs(ring.radius - r) < 1e-3 * (out_.rim - out_.hub_radius);
    });
  }

  void add_rib(std::size_t k) {
    DishRib& rib = out_.ribs[k];
    for (double r : out_.radii) {
      char name[64];
      std::snprintf(name, sizeof name, "%s at radius %.0f mm", rib_name(k).c_str(), r * 1000);
      rib.nodes.push_back(make_.node(axis_place(rib.angle, r), name));
      rib.back.push_back(-1);
    }
    for (std::size_t i = 0; i + 1 < rib.nodes.size(); ++i) {
      add_piece(k, i);
      rib.members.push_back(make_.members() - 1);
    }
    if (truss()) add_truss(k);
  }

  void add_piece(std::size_t k, std::size_t i) {
    const DishRib& rib = out_.ribs[k];
    const std::string name = rib_name(k) + ", piece " + std::to_string(i + 1);
    if (truss()) {
      make_.member(rib.nodes[i], rib.nodes[i + 1], chords(), Vec3::UnitZ(), name + " of front chord",
                   "rib chord");
    } else if (ribs_.kind == "tube") {
      make_.member(rib.nodes[i], rib.nodes[i + 1], ribs_.profile, Vec3::UnitZ(), name, "rib");
    } else {
      const double middle = (out_.radii[i] + out_.radii[i + 1]) / 2, t = ribs_.profile.thickness;
      const int section = make_.section(fem::flat({.depth_z = depth(middle), .thickness_y = t}));
      make_.member(rib.nodes[i], rib.nodes[i + 1], section, make_.material(ribs_.profile.material, t),
                   Vec3::UnitZ(), name, "rib");
    }
  }

  void add_truss(std::size_t k) {
    DishRib& rib = out_.ribs[k];
    const ProfileInput webs = with_material(ribs_.webs, ribs_.profile.material);
    int last = -1, last_panel = -1;
    for (std::size_t i = 0; i < rib.nodes.size(); ++i) {
      const double r = out_.radii[i];
      if (!panel_point(r) && !back_ring(r)) continue;
      const std::string at = make_name(k, r);
      rib.back[i] = make_.node(make_.at(rib.nodes[i]) - depth(r) * Vec3::UnitZ(), at + ", back");
      if (last >= 0)
        make_.member(rib.back[static_cast<std::size_t>(last)], rib.back[i], chords(), Vec3::UnitZ(),
                     at + ", back chord", "rib chord");
      last = static_cast<int>(i);
      if (!panel_point(r)) continue;
      const Vec3 across(-std::sin(rib.angle), std::cos(rib.angle), 0);
      make_.strut(rib.back[i], rib.nodes[i], webs, across, at + ", post", "rib web");
      if (last_panel >= 0)
        make_.strut(rib.back[static_cast<std::size_t>(last_panel)], rib.nodes[i], webs, across,
                    at + ", diagonal", "rib web");
      last_panel = static_cast<int>(i);
    }
  }

  static std::string make_name(std::size_t k, double r) {
    char name[64];
    std::snprintf(name, sizeof name, "%s at radius %.0f mm", rib_name(k).c_str(), r * 1000);
    return name;
  }

  void add_hub() {
    const double a = out_.hub_radius, h = depth(a);
    const double front = make_.at(out_.ribs[0].nodes[0]).z();
    const double middle = truss() ? front - h / 2 : front;
    out_.hub = make_.node({0, 0, middle}, "middle of the hub");
    if (d_.hub.kind == "ring") {
      add_hoop("hub", 0, false, d_.hub.profile, "hub ring");
      if (truss()) add_hoop("hub", 0, true, d_.hub.profile, "back hub ring");
      return;
    }
    const double t = d_.hub.profile.thickness;
    const double width = 2 * pi * a / (ribs_.count * (1 - nu));
    const int section = make_.section(fem::flat({.depth_z = t, .thickness_y = width}));
    const int material = make_.massless(d_.hub.profile.material, t, 1 - nu);
    for (std::size_t k = 0; k < out_.ribs.size(); ++k) {
      DishRib& rib = out_.ribs[k];
      if (d_.hub.plates == 2) add_spoke(k, rib.nodes[0], h / 2, section, material, true);
      add_spoke(k, truss() ? rib.back[0] : rib.nodes[0], -h / 2, section, material, d_.hub.plates == 1);
    }
    const double mass = d_.hub.plates * pi * a * a * t * material_of(d_.hub.profile.material, t).density;
    make_.mass(out_.hub, mass / 2, Vec3::Zero(), "hub discs", "hub");
    for (const DishRib& rib : out_.ribs) {
      const Vec3 to_middle(0, 0, middle - make_.at(rib.nodes[0]).z());
      make_.mass(rib.nodes[0], mass / 2 / ribs_.count, to_middle, "hub discs", "hub");
    }
  }

  // A spoke of one disc, from the hub's middle node to a rib's root node, both by rigid arms along z.
  void add_spoke(std::size_t k, int root, double above_middle, int section, int material, bool under_skin) {
    const Vec3 from(0, 0, above_middle);
    const Vec3 to(0, 0, make_.at(out_.hub).z() + above_middle - make_.at(root).z());
    fem::Member& m = make_.member(out_.hub, root, section, material, Vec3::UnitZ(),
                                  "hub disc under " + rib_name(k), "hub disc");
    m.offset_from = from;
    m.offset_to = to;
    if (under_skin) out_.ribs[k].inner = make_.members() - 1;
  }

  void add_hoop(const std::string& name, std::size_t at, bool back, const ProfileInput& profile,
                const std::string& group) {
    for (std::size_t k = 0; k < out_.ribs.size(); ++k) {
      const DishRib &one = out_.ribs[k], &next = out_.ribs[(k + 1) % out_.ribs.size()];
      make_.member(back ? one.back[at] : one.nodes[at], back ? next.back[at] : next.nodes[at], profile,
                   Vec3::UnitZ(), name + ", bay " + std::to_string(k + 1), group);
    }
  }

  void add_ring(std::size_t i) {
    const RingInput& ring = d_.rings[i];
    add_hoop("ring " + std::to_string(i + 1), static_cast<std::size_t>(out_.index_of(ring.radius)),
             truss() && ring.at == "back", ring.profile, "ring " + std::to_string(i + 1));
  }

  void add_bracing(const BracingInput& b) {
    const auto place = [&](const std::string& word) {
      const int ring = ring_of(d_, word);
      return static_cast<std::size_t>(
          ring < 0 ? 0 : out_.index_of(d_.rings[static_cast<std::size_t>(ring)].radius));
    };
    const std::size_t from = place(b.from), to = place(b.to);
    const std::size_t step = b.in == "every bay" ? 1 : 2, n = out_.ribs.size();
    for (std::size_t k = 0; k < n; k += step) {
      const DishRib &one = out_.ribs[k], &next = out_.ribs[(k + 1) % n];
      const std::string name = "diagonal, " + b.from + " to " + b.to + ", bay " + std::to_string(k + 1);
      make_.strut(one.nodes[from], next.nodes[to], b.profile, Vec3::UnitZ(), name, "bracing");
      make_.strut(next.nodes[from], one.nodes[to], b.profile, Vec3::UnitZ(), name, "bracing");
    }
  }

  const DishInput& d_;
  const DishRibsInput& ribs_;
  FrameMaker& make_;
  DishRibs out_;
  std::vector<double> panels_;
};

}  // namespace

DishRibs::Along DishRibs::along(double radius) const {
  if (radius < radii.front()) return {-1, radius / radii.front()};
  std::size_t piece = 0;
  while (piece + 2 < radii.size() && radius > radii[piece + 1]) ++piece;
  return {static_cast<int>(piece), (radius - radii[piece]) / (radii[piece + 1] - radii[piece])};
}

int DishRibs::index_of(double radius) const {
  std::size_t best = 0;
  for (std::size_t i = 1; i < radii.size(); ++i)
    if (std::abs(radii[i] - radius) < std::abs(radii[best] - radius)) best = i;
  return static_cast<int>(best);
}

DishRibs build_ribs(const DishDesign& design, int refine, FrameMaker& make) {
  return Builder(design, refine, make).run();
}

}  // namespace focalframe::models
