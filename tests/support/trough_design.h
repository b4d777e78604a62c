#pragma once

/// A small invented row and a coefficient table for tests of laws; no number in it is checked against
/// anything.

#include "fem/units.h"
#include "loads/coefficients.h"
#include "models/design.h"

namespace focalframe::support {

/// The factors of EN 1990 that tests need, as in models/tables/combinations/en-1990.xml.
inline loads::CombinationSet en_1990() {
  using loads::Action;
  using loads::Purpose;
  loads::CombinationSet set;
  set.name = set.title = "EN 1990";
  set.edition = "test";
  set.combinations = {
      {.name = "wind, weight against", .permanent = 1.35, .wind = 1.5, .snow = 0.75, .temperature = 0.9},
      {.name = "wind, weight for", .permanent = 1, .wind = 1.5},
      {.name = "snow", .leading = Action::snow, .permanent = 1.35, .wind = 0.9, .snow = 1.5},
      {.name = "maintenance", .leading = Action::imposed, .permanent = 1.35, .wind = 0.9, .imposed = 1.5},
      {.name = "ice", .leading = Action::ice, .permanent = 1.35, .ice = 1.5, .wind_on_ice = 1.5},
      {.name = "stuck",
       .purpose = Purpose::accidental,
       .states = loads::StateGroup::stuck,
       .permanent = 1,
       .wind = 1},
      {.name = "earthquake",
       .purpose = Purpose::seismic,
       .leading = Action::seismic,
       .permanent = 1,
       .seismic = 1}};
  return set;
}

inline models::TroughDesign small_row() {
  models::TroughDesign d;
  d.name = "test row";
  d.parabola.aperture = 2.4;
  d.parabola.focal_length = 0.8;
  d.row.modules = 3;
  d.row.module_length = 4.0;
  d.row.drive_after_module = 1;
  d.row.axis_height = 1.7;
  d.row.axis_to_vertex = 0.20;
  d.row.tube_to_vertex = 0.13;
  d.tube.profile.shape = "round-tube";
  d.tube.profile.outside_diameter = 139.7 * mm;
  d.tube.profile.wall = 4 * mm;
  d.tube.profile.material = "S235";
  d.ribs.per_module = 4;
  d.ribs.thickness = 3 * mm;
  d.ribs.depth_at_tube = 110 * mm;
  d.ribs.depth_at_tip = 40 * mm;
  d.ribs.material = "S235";
  d.ribs.elements = 6;
  d.purlins.count = 6;
  d.purlins.profile.shape = "square-tube";
  d.purlins.profile.side = 30 * mm;
  d.purlins.profile.wall = 2 * mm;
  d.purlins.profile.material = "S235";
  d.end_plates.mass = 6;
  d.end_plates.twist_stiffness = 1.5e6;
  d.mirror.thickness = 1.2 * mm;
  d.mirror.material = "aluminium";
  d.mirror.bending_stiffness = 1e5;  // so that laws of the frame show; panels have tests of their own
  d.mirror.fixed_to = "purlins";
  d.receiver.outside_diameter = 33.7 * mm;
  d.receiver.wall = 2.6 * mm;
  d.receiver.material = "S235";
  d.receiver.filled_with = "water";
  d.receiver.posts.per_module = 2;
  d.receiver.posts.profile.shape = "square-tube";
  d.receiver.posts.profile.side = 30 * mm;
  d.receiver.posts.profile.wall = 2.6 * mm;
  d.receiver.posts.profile.material = "S235";
  d.counterweights.per_module = 2;
  d.counterweights.mass = 10;
  d.counterweights.behind_tube = 0.5;
  d.pylons.profile.shape = "square-tube";
  d.pylons.profile.side = 120 * mm;
  d.pylons.profile.wall = 5 * mm;
  d.pylons.profile.material = "S235";
  d.pylons.footing.sideways = d.pylons.footing.along_row = 2e6;
  d.pylons.footing.upright = 2e7;
  d.pylons.footing.rocking = 3e6;
  d.drive.moving_torque = 4000;
  d.drive.holding_torque = 20000;
  d.drive.stiffness = 2e6;
  d.drive.turns_from = -95 * deg;
  d.drive.turns_to = 170 * deg;
  d.site.altitude = 450;
  d.site.terrain = "EN II";
  d.wind.table = "test table";
  d.wind.zone = "isolated";
  d.wind.operate = {true, 10, 600, 10};
  d.wind.stow = {true, 24, 600, 10};
  d.wind.stuck = {true, 16, 600, 10};
  d.operation.track_from = 15 * deg;
  d.operation.track_to = 165 * deg;
  d.operation.stow_at = -90 * deg;
  d.operation.stow_within = 5 * deg;
  d.optics.set_true = 90 * deg;
  d.optics.workshop_slope = 3 * mrad;
  d.optics.mirror_scatter = 1.5 * mrad;
  d.optics.tracking = 1.5 * mrad;
  d.limits.intercept = 0.95;
  d.limits.slope = 1.5 * mrad;
  d.limits.receiver_shift = 6 * mm;
  d.limits.strength = "EN 1990";
  d.combinations = en_1990();
  return d;
}

inline loads::CoefficientTable test_table() {
  loads::CoefficientTable t;
  t.name = "test table";
  t.collector_kind = "trough";
  const double pitch[] = {0, 45, 90, 135, 180}, Ca[] = {1.7, 1.8, 0.2, -0.6, -0.9},
               Cs[] = {0, 0.05, 0.3, 0.3, 0}, Cm[] = {0, -0.08, 0.15, 0.18, 0};
  for (int i = 0; i < 5; ++i) {
    const loads::Coefficients c{Ca[i], Cs[i], Cm[i]};
    t.rows.push_back({pitch[i] * deg, c, c});
  }
  t.pitch_min = -180 * deg;
  t.pitch_max = 180 * deg;
  return t;
}

}  // namespace focalframe::support
