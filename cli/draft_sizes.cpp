#include <algorithm>
#include <cmath>
#include <numbers>

#include "cli/combination_file.h"
#include "cli/draft.h"
#include "fem/units.h"
#include "models/catalogue.h"
#include "models/schema.h"

// Rules of thumb for a first design, all from ordinary practice as remembered, none a proof: `check` is there
// to say what they are worth.
namespace focalframe::cli {
namespace {

using models::TroughDesign;

/// Two digits are enough for a guess: 3472 -> 3500.
double rounded(double value) {
  const double step = std::pow(10.0, std::floor(std::log10(value)) - 1);
  return std::round(value / step) * step;
}

double to_step(double value, double step) { return std::max(step, std::round(value / step) * step); }

int even_at_least(double value) { return 2 * static_cast<int>(std::ceil(value / 2 - 1e-9)); }

// Modules about 1.7 apertures long; 4 m is easy to carry.
void choose_row(TroughDesign& d, const DraftSizes& sizes) {
  const double width = d.parabola.aperture;
  models::RowInput& row = d.row;
  const double usual = std::clamp(to_step(1.7 * width, 0.5), 0.5, 12.0);
  const double length = std::isnan(sizes.length) ? 6 * usual : sizes.length;
  row.modules = sizes.modules > 0 ? sizes.modules
                : !std::isnan(sizes.module_length)
                    ? std::max(1, static_cast<int>(std::round(length / sizes.module_length)))
                    : std::max(1, static_cast<int>(std::round(length / usual)));
  const bool both = !std::isnan(sizes.module_length) && std::isnan(sizes.length);
  row.module_length = both ? sizes.module_length : length / row.modules;
  if (std::isnan(sizes.length) && sizes.modules > 0 && !both) row.module_length = usual;
  row.drive_after_module = row.modules / 2;
  row.row_azimuth = std::numbers::pi;
  row.axis_height = std::isnan(sizes.axis_height)
                        ? std::max(to_step(0.6 * width, 0.05), to_step(0.5 * width + 0.1, 0.05))
                        : sizes.axis_height;
}

// Twist under the mean operate wind of 10 m/s (about 28 Pa at the axis, moment coefficient 0.15) at most
// 5 mrad at the row's end; diameter at least a twentieth of the aperture; wall at least a fortieth of that.
void choose_tube(TroughDesign& d) {
  const double width = d.parabola.aperture,
               half_row = d.row.module_length *
                          std::max(d.row.drive_after_module, d.row.modules - d.row.drive_after_module);
  const double torque_per_length = 28 * 0.15 * width * width;
  const double needed_J = torque_per_length * half_row * half_row / (2 * 81 * GPa * 5 * mrad);
  models::RoundTubeSize size = models::standard_round_tube(width / 20, std::max(2 * mm, width / 20 / 40));
  const auto J = [](const models::RoundTubeSize& s) {
    return std::numbers::pi / 4 * std::pow(s.outside_diameter - s.wall, 3) * s.wall;
  };
  while (J(size) < needed_J && size.outside_diameter < 0.18 * width) {
    const models::RoundTubeSize next =
        models::standard_round_tube(size.outside_diameter + 1 * mm, (size.outside_diameter + 20 * mm) / 40);
    if (next.outside_diameter <= size.outside_diameter || next.outside_diameter > 0.25 * width) break;
    size = next;
  }
  d.tube.profile.shape = "round-tube";
  d.tube.profile.material = "S235";
  d.tube.profile.outside_diameter = size.outside_diameter;
  d.tube.profile.wall = size.wall;
  d.row.tube_to_vertex = d.row.axis_to_vertex =
      to_step(size.outside_diameter / 2 + std::max(20 * mm, 0.025 * width), 5 * mm);
}

// Plates 1/800 of the aperture thick, 1/20 deep at the tube, one every metre; purlins every 0.35 m.
void choose_structure(TroughDesign& d) {
  const double width = d.parabola.aperture, tube = d.tube.profile.outside_diameter;
  d.ribs.per_module = std::max(2, static_cast<int>(std::round(d.row.module_length / 1.0)) + 1);
  d.ribs.thickness = std::max(2 * mm, to_step(width / 800, 1 * mm));
  d.ribs.depth_at_tube = to_step(width / 20, 5 * mm);
  d.ribs.depth_at_tip = to_step(width / 50, 5 * mm);
  d.ribs.material = "S235";
  d.purlins.count = std::max(4, even_at_least(width / 0.35));
  d.purlins.profile.shape = "square-tube";
  d.purlins.profile.side = width < 1 ? 20 * mm : width < 3.5 ? 30 * mm : 40 * mm;
  d.purlins.profile.wall = 2 * mm;
  d.purlins.profile.material = "EN AW-6060 T66";
  d.end_plates.diameter = to_step(2.2 * tube, 10 * mm);
  d.end_plates.thickness = std::max(6 * mm, to_step(width / 240, 2 * mm));
  d.end_plates.mass = rounded(1.1 * 7850 * std::numbers::pi / 4 * std::pow(d.end_plates.diameter, 2) *
                              d.end_plates.thickness);
  d.end_plates.twist_stiffness = rounded(1.5e6 * std::pow(tube / 0.1397, 3));
}

// Receiver a seventieth of the aperture, glass at nearly twice its size.
void choose_carried(TroughDesign& d) {
  const double width = d.parabola.aperture;
  d.mirror.thickness = 1.2 * mm;
  d.mirror.material = "aluminium";
  d.mirror.fixed_to = "purlins";
  const models::RoundTubeSize pipe =
      models::standard_round_tube(width / 80, std::max(2.6 * mm, width / 2500));
  models::ReceiverInput& r = d.receiver;
  r.outside_diameter = pipe.outside_diameter;
  r.wall = pipe.wall;
  r.material = "S235";
  r.filled_with = "water";
  r.sleeve.outside_diameter = to_step(1.75 * pipe.outside_diameter, 5 * mm);
  r.sleeve.wall = width < 3.5 ? 2 * mm : 3 * mm;
  r.sleeve.material = "glass";
  r.posts.per_module = std::max(1, static_cast<int>(std::round(d.row.module_length / 2.0)));
  r.posts.profile.shape = "square-tube";
  r.posts.profile.side = width < 1 ? 20 * mm : width < 3 ? 30 * mm : width < 5 ? 40 * mm : 50 * mm;
  r.posts.profile.wall = 2.5 * mm;
  r.posts.profile.material = "S235";
}

// Counterweights balance mirror, purlins and receiver about the tube, roughly.
void choose_balance(TroughDesign& d) {
  const double width = d.parabola.aperture, f = models::focal_length(d.parabola),
               to_vertex = d.row.tube_to_vertex;
  const models::ReceiverInput& r = d.receiver;
  const double bore = std::numbers::pi / 4 * std::pow(r.outside_diameter - 2 * r.wall, 2);
  const double pipe = std::numbers::pi * r.outside_diameter * r.wall * 7850 + 1000 * bore +
                      std::numbers::pi * r.sleeve.outside_diameter * r.sleeve.wall * 2500;
  const double skin =
      width * 3.24 + d.purlins.count * 4 * d.purlins.profile.side * d.purlins.profile.wall * 2700;
  const double moment = pipe * (f + to_vertex) + skin * (width * width / (48 * f) + to_vertex) +
                        0.5 * r.posts.profile.side * 80 * (f + to_vertex) / 2;
  d.counterweights.per_module = 2;
  d.counterweights.behind_tube = to_step(0.25 * width, 10 * mm);
  d.counterweights.mass =
      rounded(moment * d.row.module_length / d.counterweights.behind_tube / d.counterweights.per_module);
}

void choose_ground(TroughDesign& d) {
  const double width = d.parabola.aperture;
  const double scale = std::pow(width / 2.4, 2) * d.row.module_length / 4;
  constexpr double sides[] = {60, 80, 100, 120, 140, 160, 180, 200, 250, 300, 350, 400};
  double side = 400;
  for (const double s : sides)
    if (s >= 50 * width * std::sqrt(d.row.module_length / 4)) {
      side = s;
      break;
    }
  d.pylons.profile.shape = "square-tube";
  d.pylons.profile.side = side * mm;
  d.pylons.profile.wall = std::max(4.0, std::round(side / 24)) * mm;
  d.pylons.profile.material = "S235";
  d.pylons.footing.sideways = d.pylons.footing.along_row = rounded(2e6 * std::max(0.25, scale));
  d.pylons.footing.upright = rounded(20e6 * std::max(0.25, scale));
  d.pylons.footing.rocking = rounded(3e6 * std::max(0.25, scale));
  // Gust of 85 Pa, moment coefficient 0.45 (upper bound about the axis), the whole row; two and a half times
  // that to hold in a storm.
  const double torque = 85 * 0.45 * width * width * d.row.module_length * d.row.modules;
  d.drive.moving_torque = rounded(torque);
  d.drive.holding_torque = rounded(2.5 * torque);
  d.drive.stiffness = rounded(400 * torque);
  d.drive.play = 0.5 * mrad;
  d.drive.turns_from = -95 * deg;
  d.drive.turns_to = 170 * deg;
}

void choose_site(TroughDesign& d, const DraftSizes& sizes) {
  d.site.altitude = std::isnan(sizes.altitude) ? 100 : sizes.altitude;
  d.site.terrain = "EN II";
  d.wind.table = "trough-computed";
  d.wind.zone = "isolated";
  d.wind.operate = {true, 10, 600, 10, models::not_given};
  d.wind.stow = {true, 24, 600, 10, models::not_given};
  d.wind.stuck = {true, 16, 600, 10, models::not_given};
  d.operation.track_from = 15 * deg;
  d.operation.track_to = 165 * deg;
  d.operation.stow_at = -90 * deg;
  d.operation.stow_within = 5 * deg;
  d.operation.turning_rate = 0.75 * deg;
  d.operation.anemometer = {6, 60, 0.5};
  d.optics.set_true = 90 * deg;
  d.optics.workshop_slope = 3 * mrad;
  d.optics.mirror_scatter = d.optics.tracking = 1.5 * mrad;
  d.limits.intercept = 0.95;
  d.limits.slope = 1.5 * mrad;
  d.limits.receiver_shift = rounded(d.receiver.outside_diameter / 5);
  d.limits.strength = "EN 1990";
}

}  // namespace

TroughDesign starter_trough(const DraftSizes& sizes) {
  TroughDesign d;
  d.parabola.aperture = std::isnan(sizes.aperture) ? 2.4 : sizes.aperture;
  d.parabola.focal_length = sizes.focal_length;
  d.parabola.depth = sizes.depth;
  if (std::isnan(sizes.focal_length) && std::isnan(sizes.depth))
    d.parabola.focal_length = to_step(d.parabola.aperture / 3, 10 * mm);
  choose_row(d, sizes);
  choose_tube(d);
  choose_structure(d);
  choose_carried(d);
  choose_balance(d);
  choose_ground(d);
  choose_site(d, sizes);
  for (const char* path : {"end-plates", "counterweights", "pylons/footing", "drive", "site", "wind/operate",
                           "wind/stow", "wind/stuck", "optics"})
    d.basis[path] = "guess";
  std::vector<Message> ignored;  // the set is shipped
  resolve_combinations(d, "", 0, ignored);
  return d;
}

}  // namespace focalframe::cli
