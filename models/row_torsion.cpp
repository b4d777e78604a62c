#include "models/row_torsion.h"

#include <cmath>

#include "fem/modes.h"
#include "fem/units.h"
#include "loads/dynamic.h"
#include "loads/profile.h"
#include "models/full_frame.h"
#include "models/quantity.h"
#include "models/states.h"
#include "models/trough.h"

namespace focalframe::models {
namespace {

// Modes looked through for the first that twists the tube.
constexpr int modes_tried = 16;

// A mode twists the row when the rims move more by the tube's rotation than the tube moves sideways.
bool twists(const Collector& c, const FullFrame& full, const Eigen::MatrixXd& shape) {
  double turn = 0, shift = 0;
  for (const ModulePart& module : c.modules)
    for (int root : module.rib_roots) {
      const int node = full.first_body_node + root;
      turn += std::pow(shape(node, fem::rx) * c.width / 2, 2);
      shift += shape.row(node).head<3>().squaredNorm();
    }
  return turn > shift;
}

double first_torsional(const Collector& c, double elevation) {
  const FullFrame full = full_frame(c, elevation);
  for (const fem::Mode& mode : fem::natural_modes(full.frame, modes_tried))
    if (twists(c, full, mode.shape)) return mode.frequency;
  return not_given;
}

}  // namespace

RowDynamics row_dynamics(const TroughDesign& design) {
  RowDynamics out;
  const Collector collector = build_trough(design);
  const double pose = std::isnan(design.optics.set_true) ? 90 * deg : design.optics.set_true;
  out.frequency = first_torsional(collector, pose);
  out.factor = 1;
  out.chain.push_back({"first torsional frequency", out.frequency, "Hz",
                       "from the modes of the whole row at " + number_text(pose / deg) + " deg"});
  if (std::isnan(out.frequency)) return out;
  const StateWinds winds = winds_at_axis(design);
  const loads::Site site = site_of(design.site);
  for (StateKind kind : all_state_kinds) {
    const loads::WindAtHeight& wind = winds.of(kind);
    if (std::isnan(wind.height) || kind == StateKind::maintenance) continue;
    loads::DynamicInput in;
    in.width = design.row.modules * design.row.module_length;
    in.height = design.parabola.aperture;
    in.mean_speed = wind.mean_speed;
    in.turbulence = wind.turbulence;
    in.length_scale = loads::length_scale(loads::equivalent_en_terrain(site, wind.height), wind.height);
    in.frequency = out.frequency;
    in.log_decrement = design.wind.damping;
    const loads::DynamicFactors f = loads::dynamic_factors(in);
    out.chain.push_back({"dynamic factor cd, " + state_text(kind), f.dynamic, "-",
                         "EN 1991-1-4 Annex B: B2 = " + number_text(f.background2) +
                             ", R2 = " + number_text(f.resonance2) + ", kp = " + number_text(f.peak) +
                             ", cs = " + number_text(f.size) + ", decrement " +
                             number_text(design.wind.damping) + ", air damping left out"});
    if (f.dynamic > out.factor) out.factor = f.dynamic;
  }
  return out;
}

TroughDesign with_dynamic_factor(const TroughDesign& design, RowDynamics* found) {
  if (design.wind.dynamic_word.empty()) return design;
  const RowDynamics dynamics = row_dynamics(design);
  TroughDesign out = design;
  out.wind.dynamic_factor = dynamics.factor;
  out.wind.dynamic_word.clear();
  if (found) *found = dynamics;
  return out;
}

}  // namespace focalframe::models
