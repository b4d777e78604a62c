#pragma once

/// A small invented dish for tests of laws; no number in it is checked against anything.

#include "fem/units.h"
#include "models/dish_design.h"
#include "tests/support/trough_design.h"

namespace focalframe::support {

inline models::ProfileInput tube(double outside, double wall, const char* material = "S235") {
  models::ProfileInput p;
  p.shape = "round-tube";
  p.outside_diameter = outside;
  p.wall = wall;
  p.material = material;
  return p;
}

/// Twelve tube ribs between two hub discs, two rings, four legs, rigid cradle, actuator, post.
inline models::DishDesign small_dish() {
  models::DishDesign d;
  d.name = "test dish";
  d.parabola.aperture = 3.0;
  d.parabola.focal_length = 1.5;
  d.row.axis_to_vertex = 0.35;
  d.row.axis_height = 2.2;
  d.drive.turns_from = 0;
  d.drive.turns_to = 90 * deg;
  models::DishInput& dish = d.dish;
  dish.hub.diameter = 0.5;
  dish.hub.profile.thickness = 6 * mm;
  dish.hub.profile.material = "S235";
  dish.ribs.count = 12;
  dish.ribs.kind = "tube";
  dish.ribs.elements = 6;
  dish.ribs.profile = tube(42.4 * mm, 2.6 * mm);
  models::RingInput ring;
  ring.profile = tube(26.9 * mm, 2.3 * mm);
  ring.radius = 0.8;
  dish.rings.push_back(ring);
  ring.radius = 1.5;
  dish.rings.push_back(ring);
  dish.surface.mass = 5;
  dish.feed.mass = 10;
  dish.feed.blocks = 0.2;
  dish.feed.aperture = 0.2;
  dish.feed.legs.count = 4;
  dish.feed.legs.stand_on = "ring 1";
  dish.feed.legs.profile = tube(30 * mm, 2 * mm);
  dish.counterweight = {40, 0.6};
  dish.axis.bearing_spread = 0.6;
  dish.actuator.stiffness = 8e6;
  dish.actuator.shortest = 0.83;
  dish.actuator.longest = 1.40;
  dish.actuator.dish_pin = {0.28, 0.28};
  dish.actuator.stand_pin = {1.10, 0.12};
  dish.yoke.profile = tube(88.9 * mm, 4 * mm);
  dish.yoke.height = 0.45;
  dish.azimuth.twist_stiffness = 0.9e6;
  dish.azimuth.tilt_stiffness = 1.5e6;
  dish.pedestal.profile = tube(168.3 * mm, 6.3 * mm);
  dish.pedestal.footing.sideways = 20e6;
  dish.pedestal.footing.upright = 60e6;
  dish.pedestal.footing.rocking = 12e6;
  d.site.altitude = 120;
  d.site.terrain = "EN II";
  d.wind.table = "dish-open";
  d.wind.zone = "isolated";
  d.wind.operate = {true, 9, 600, 10, models::not_given};
  d.wind.stow = {true, 24, 600, 10, models::not_given};
  d.operation.track_from = 10 * deg;
  d.operation.track_to = 80 * deg;
  d.operation.stow_at = 90 * deg;
  d.optics.set_true = 45 * deg;
  d.optics.workshop_slope = 3 * mrad;
  d.limits.strength = "EN 1990";
  d.combinations = en_1990();
  return d;
}

/// The same as an antenna.
inline models::DishDesign small_antenna() {
  models::DishDesign d = small_dish();
  d.optics = {};
  d.dish.radio.given = true;
  d.dish.radio.set_true = 45 * deg;
  d.dish.radio.frequency = 5.76e9;
  d.dish.radio.surface_as_built = 1 * mm;
  return d;
}

}  // namespace focalframe::support
