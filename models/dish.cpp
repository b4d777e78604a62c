#include "models/dish.h"

#include <algorithm>
#include <cmath>
#include <numbers>

#include "models/actuator.h"
#include "models/catalogue.h"
#include "models/dish_names.h"
#include "models/dish_ribs.h"
#include "models/dish_skin.h"
#include "models/profile.h"
#include "models/schema.h"

namespace focalframe::models {
namespace {

using fem::Vec3;
constexpr double pi = std::numbers::pi;

class Builder {
 public:
  Builder(const DishDesign& design, int refine) : d_(design), dish_(design.dish), make_(out_.body) {
    out_.diameter = d_.parabola.aperture;
    out_.focal_length = focal_length(d_.parabola);
    out_.axis_to_vertex = d_.row.axis_to_vertex;
    out_.axis_height = d_.row.axis_height;
    out_.area = pi * out_.diameter * out_.diameter / 4;
    out_.feed_width = dish_.feed.blocks;
    out_.slewing = std::isnan(dish_.actuator.stiffness);
    out_.drive_stiffness = out_.slewing ? dish_.slewing.stiffness : dish_.actuator.stiffness;
    out_.twist_stiffness = dish_.azimuth.twist_stiffness;
    out_.tilt_stiffness = dish_.azimuth.tilt_stiffness;
    ribs_ = build_ribs(d_, refine, make_);
    out_.hub = ribs_.hub;
  }

  DishCollector run() {
    add_feed();
    add_mount();
    const double hole = dish_.surface.hole / 2;
    out_.skin = make_dish_skin(out_.body, ribs_, hole);
    for (double w : out_.skin.weight) out_.surface_area += w;
    hang_skin(out_.body, ribs_, out_.skin, skin_mass());
    add_yoke();
    add_base();
    return std::move(out_);
  }

 private:
  double skin_mass() const {
    const SurfaceInput& s = dish_.surface;
    return std::isnan(s.mass) ? s.thickness * material_of(s.material, s.thickness).density * s.solidity
                              : s.mass;
  }

  // The rib whose direction is nearest to the k-th of `count` evenly spaced ones, the first along +y.
  const DishRib& rib_near(int k, int count) const {
    const auto n = static_cast<int>(ribs_.ribs.size());
    return ribs_.ribs[static_cast<std::size_t>(std::lround(static_cast<double>(k * n) / count) % n)];
  }

  void add_feed() {
    const FeedInput& feed = dish_.feed;
    out_.focus = make_.node({0, 0, out_.focal_length}, dish_.radio.given ? "feed" : "receiver");
    const double beyond = std::isnan(feed.centre_of_mass) ? 0 : feed.centre_of_mass;
    make_.mass(out_.focus, feed.mass, {0, 0, beyond}, dish_.radio.given ? "feed" : "receiver", "feed");
    if (feed.legs.count == 0) {
      chain(out_.hub, out_.focus, feed.boom, "boom", Vec3::UnitY(), Vec3::Zero());
      return;
    }
    const int ring = ring_of(dish_, feed.legs.stand_on);
    const auto at = static_cast<std::size_t>(
        ring < 0 ? 0 : ribs_.index_of(dish_.rings[static_cast<std::size_t>(ring)].radius));
    for (int k = 0; k < feed.legs.count; ++k) {
      const DishRib& rib = rib_near(k, feed.legs.count);
      const Vec3 out(std::cos(rib.angle), std::sin(rib.angle), 0);
      chain(rib.nodes[at], out_.focus, feed.legs.profile, "leg " + std::to_string(k + 1), Vec3::UnitZ(),
            feed.blocks / 2 * out);
    }
  }

  // Legs in three pieces, so that they can swing and buckle between their ends.
  void chain(int from, int to, const ProfileInput& profile, const std::string& name, const Vec3& up,
             const Vec3& arm) {
    const Vec3 a = make_.at(from), b = make_.at(to) + arm;
    int last = from;
    for (int i = 1; i <= 3; ++i) {
      const int next = i == 3 ? to : make_.node(a + (b - a) * i / 3.0, name + ", third " + std::to_string(i));
      fem::Member& m =
          make_.member(last, next, profile, up, name + ", part " + std::to_string(i), "feed leg");
      if (i == 3) m.offset_to = arm;
      out_.feed_members.push_back(make_.members() - 1);
      last = next;
    }
  }

  Vec3 bearing_place(double side) const {
    return {side * dish_.axis.bearing_spread / 2, 0, -out_.axis_to_vertex};
  }

  // At elevation 0 "below" is +y and "front" is +z of the collector axes.
  Vec3 lug_place() const {
    const PinInput& pin = dish_.actuator.dish_pin;
    return {0, pin.below, pin.front - out_.axis_to_vertex};
  }

  void add_mount() {
    const ProfileInput& cradle = dish_.axis.cradle;
    int weight_node = out_.hub;
    if (cradle.shape.empty()) {
      out_.held = {out_.hub};
      out_.left = {out_.hub, bearing_place(-1)};
      out_.right = {out_.hub, bearing_place(1)};
      out_.lug = {out_.hub, lug_place()};
    } else {
      weight_node = add_cradle(cradle);
    }
    const DishWeightInput& weight = dish_.counterweight;
    if (weight.mass > 0)
      make_.mass(weight_node, weight.mass,
                 Vec3(0, 0, -out_.axis_to_vertex - weight.behind_axis) - make_.at(weight_node),
                 "counterweight", "counterweight");
  }

  // Struts from each bearing to two rib roots on its side, a shaft between the bearings, and the actuator's
  // pin on two struts and the shaft.
  int add_cradle(const ProfileInput& p) {
    const int left = make_.node(bearing_place(-1), "elevation bearing at -x"),
              right = make_.node(bearing_place(1), "elevation bearing at +x"),
              middle = make_.node(bearing_place(0), "middle of the elevation axis");
    make_.member(left, middle, p, Vec3::UnitZ(), "shaft, -x half", "cradle");
    make_.member(middle, right, p, Vec3::UnitZ(), "shaft, +x half", "cradle");
    // Even sided: the rib nearest to 45 deg from +y, and its mirror images.
    const auto n = static_cast<int>(ribs_.ribs.size());
    const int k = static_cast<int>(std::lround(n / 8.0)), half = static_cast<int>(std::lround(n / 2.0));
    const int corner[4] = {root(k), root(half - k), root(half + k), root(n - k)};  // -x+y, -x-y, +x-y, +x+y
    const auto strut = [&](int from, int to, const char* name) {
      make_.member(from, to, p, up_for(from, to), name, "cradle");
    };
    strut(left, corner[0], "cradle strut at -x, +y");
    strut(left, corner[1], "cradle strut at -x, -y");
    strut(right, corner[2], "cradle strut at +x, -y");
    strut(right, corner[3], "cradle strut at +x, +y");
    strut(middle, corner[0], "cradle brace at -x, +y");
    strut(middle, corner[3], "cradle brace at +x, +y");
    strut(middle, corner[1], "cradle brace at -x, -y");
    strut(middle, corner[2], "cradle brace at +x, -y");
    if (dish_.hub.kind == "ring") {
      for (int c : corner) strut(out_.hub, c, "spider of the hub ring");
    }
    out_.held = {left, right};
    out_.left = {left, make_.at(left)};
    out_.right = {right, make_.at(right)};
    if (!out_.slewing) {
      const int lug = make_.node(lug_place(), "actuator pin on the dish");
      strut(middle, lug, "actuator bracket");
      strut(corner[0], lug, "actuator strut at -x");
      strut(corner[3], lug, "actuator strut at +x");
      out_.held.push_back(lug);
      out_.lug = {lug, make_.at(lug)};
    }
    return middle;
  }

  // Root of a rib on the side that looks to the axis.
  int root(int k) const {
    const DishRib& rib = ribs_.ribs[static_cast<std::size_t>(k) % ribs_.ribs.size()];
    return rib.back[0] >= 0 ? rib.back[0] : rib.nodes[0];
  }

  Vec3 up_for(int from, int to) const {
    const Vec3 along = (make_.at(to) - make_.at(from)).normalized();
    return std::abs(along.z()) < 0.9 ? Vec3::UnitZ() : Vec3::UnitY();
  }

  void add_yoke() {
    FrameMaker make(out_.yoke);
    const YokeInput& y = dish_.yoke;
    const double top = out_.axis_height, bottom = top - y.height, s = dish_.axis.bearing_spread / 2;
    out_.azimuth = make.node({0, 0, bottom}, "azimuth bearing");
    const int low[2] = {make.node({-s, 0, bottom}, "yoke arm at -x"),
                        make.node({s, 0, bottom}, "yoke arm at +x")};
    out_.yoke_left = make.node({-s, 0, top}, "yoke, elevation bearing at -x");
    out_.yoke_right = make.node({s, 0, top}, "yoke, elevation bearing at +x");
    make.member(out_.azimuth, low[0], y.profile, Vec3::UnitZ(), "yoke beam at -x", "yoke");
    make.member(out_.azimuth, low[1], y.profile, Vec3::UnitZ(), "yoke beam at +x", "yoke");
    make.member(low[0], out_.yoke_left, y.profile, Vec3::UnitY(), "yoke arm at -x", "yoke");
    make.member(low[1], out_.yoke_right, y.profile, Vec3::UnitY(), "yoke arm at +x", "yoke");
    const double more = out_.slewing ? dish_.slewing.mass : 0;
    if (y.mass > 0) make.mass(out_.azimuth, y.mass, Vec3::Zero(), "azimuth gear", "yoke");
    if (more > 0) make.mass(out_.yoke_left, more, Vec3::Zero(), "slewing drive", "yoke");
    if (out_.slewing) return;
    const PinInput& pin = dish_.actuator.stand_pin;
    const Vec3 at(0, pin.front, top - pin.below);
    if ((at - make.at(out_.azimuth)).norm() < 0.01) {
      out_.yoke_pin = out_.azimuth;
      return;
    }
    out_.yoke_pin = make.node(at, "actuator pin on the yoke");
    make.member(out_.azimuth, out_.yoke_pin, y.profile, Vec3::UnitX(), "actuator bracket of the yoke",
                "yoke");
  }

  void add_base() {
    FrameMaker make(out_.base);
    const PedestalInput& p = dish_.pedestal;
    const double top = out_.axis_height - dish_.yoke.height;
    const bool post = p.kind == "post";
    const int feet = post ? 1 : p.legs;
    out_.post_width = profile_depth(p.profile);
    std::vector<Vec3> places;
    for (int k = 0; k < feet; ++k) {
      const double angle = pi / 2 + 2 * pi * k / feet;
      places.push_back(post ? Vec3(0, 0, 0)
                            : Vec3(p.foot_radius * std::cos(angle), p.foot_radius * std::sin(angle), 0));
    }
    std::vector<int> nodes;
    for (int k = 0; k < feet; ++k)
      nodes.push_back(make.node(places[static_cast<std::size_t>(k)], "foot " + std::to_string(k + 1)));
    out_.head = make.node({0, 0, top}, "pedestal head");
    for (int k = 0; k < feet; ++k) {
      const std::string name = post ? std::string("pedestal") : "leg " + std::to_string(k + 1);
      const Vec3 a = places[static_cast<std::size_t>(k)], b = make.at(out_.head);
      const int mid = make.node((a + b) / 2, name + ", middle");
      const int foot = nodes[static_cast<std::size_t>(k)];
      make.member(foot, mid, p.profile, Vec3::UnitX(), name + ", lower half", "pedestal");
      out_.feet.push_back({foot, {make.members() - 1}});
      make.member(mid, out_.head, p.profile, Vec3::UnitX(), name + ", upper half", "pedestal");
      add_footing(foot, k);
    }
    if (p.mass > 0) make.mass(out_.head, p.mass, Vec3::Zero(), "pedestal head", "pedestal");
  }

  void add_footing(int node, int k) {
    const FootingInput& f = dish_.pedestal.footing;
    const double twisting = std::isnan(f.twisting) ? f.rocking : f.twisting;
    const double k6[6] = {f.sideways, f.sideways, f.upright, f.rocking, f.rocking, twisting};
    fem::Support held;
    held.node = node;
    fem::Spring spring;
    spring.node = node;
    spring.name = "footing " + std::to_string(k + 1);
    for (std::size_t i = 0; i < 6; ++i)
      if (std::isinf(k6[i]))
        held.fix[i] = true;
      else
        spring.stiffness[static_cast<int>(i)] = k6[i];
    out_.base.supports.push_back(held);
    if (spring.stiffness.any()) out_.base.springs.push_back(spring);
  }

  const DishDesign& d_;
  const DishInput& dish_;
  DishCollector out_;
  FrameMaker make_;
  DishRibs ribs_;
};

}  // namespace

DishCollector build_dish(const DishDesign& design, int refine) { return Builder(design, refine).run(); }

}  // namespace focalframe::models
