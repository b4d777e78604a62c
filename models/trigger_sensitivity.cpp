#include "models/trigger_sensitivity.h"

#include <cmath>
#include <memory>

#include "fem/units.h"
#include "models/trough.h"

namespace focalframe::models {
namespace {

// A design, a table and a row that may be changed; the row is built only where the change asks for it.
struct Variant {
  TroughDesign design;
  loads::CoefficientTable table;
  std::shared_ptr<const RowModel> row;  // empty = the unchanged one
};

struct Change {
  const char* what;
  std::function<void(Variant&, double factor)> apply;
};

void rebuild(Variant& v, const std::function<void(Collector&)>& change) {
  Collector collector = build_trough(v.design);
  change(collector);
  v.row = std::make_shared<const RowModel>(std::move(collector), v.table.stations);
}

void scale_tube_torsion(Collector& collector, double factor) {
  std::vector<bool> done(collector.body.sections.size(), false);
  for (const fem::Member& m : collector.body.members) {
    const std::size_t s = static_cast<std::size_t>(m.section);
    if (m.group != "torque tube" || done[s]) continue;
    collector.body.sections[s].J *= factor;
    done[s] = true;
  }
}

void scale_mass(Collector& collector, double factor) {
  const auto scale = [&](fem::Frame& frame) {
    for (fem::Material& m : frame.materials) m.density *= factor;
    for (fem::PointMass& m : frame.masses) {
      m.mass *= factor;
      m.inertia *= factor;
    }
  };
  scale(collector.body);
  for (Stand& stand : collector.stands) scale(stand.frame);
}

const std::vector<Change>& changes() {
  static const std::vector<Change> all = {
      {"wind coefficients",
       [](Variant& v, double factor) {
         for (loads::CoefficientRow& row : v.table.rows)
           for (loads::Coefficients* c : {&row.best, &row.upper}) {
             c->Ca *= factor;
             c->Cs *= factor;
             c->Cm *= factor;
           }
         // Net-pressure profiles are brought to the axial force of the table anyway.
         for (loads::ProfileRow& row : v.table.profiles)
           for (double& net : row.net) net *= factor;
       }},
      {"tube's torsional stiffness",
       [](Variant& v, double factor) { rebuild(v, [&](Collector& c) { scale_tube_torsion(c, factor); }); }},
      {"foundation stiffness",
       [](Variant& v, double factor) {
         FootingInput& f = v.design.pylons.footing;
         for (double* k : {&f.sideways, &f.along_row, &f.upright, &f.rocking, &f.twisting}) *k *= factor;
         rebuild(v, [](Collector&) {});
       }},
      {"drive stiffness",
       [](Variant& v, double factor) {
         v.design.drive.stiffness *= factor;
         rebuild(v, [](Collector&) {});
       }},
      {"mass", [](Variant& v, double factor) { rebuild(v, [&](Collector& c) { scale_mass(c, factor); }); }},
      {"moving torque",
       [](Variant& v, double factor) {
         v.design.drive.moving_torque *= factor;
         v.design.operation.push *= factor;
       }},
  };
  return all;
}

// The governing pose and its neighbours, the ends of every range, and each third pose of the rest: a tenth
// more or less of anything moves the governing pose by little.
std::vector<double> poses_to_try(const TroughDesign& design, const Trigger& trigger) {
  const OperationInput& run = design.operation;
  const std::vector<double> all = map_elevations(design);
  std::vector<double> out;
  for (std::size_t i = 0; i < all.size(); ++i) {
    const bool end = all[i] == run.track_from || all[i] == run.track_to || all[i] == run.stow_at;
    if (end || i % 3 == 0 || std::abs(all[i] - trigger.basis.at.elevation) < 10.1 * deg)
      out.push_back(all[i]);
  }
  return out;
}

}  // namespace

std::vector<TriggerShift> trigger_sensitivity(const TroughDesign& design,
                                              const loads::CoefficientTable& table, const RowModel& row,
                                              const Trigger& trigger,
                                              const std::function<void(int done, int all)>& progress) {
  std::vector<TriggerShift> out;
  if (!trigger.known) return out;
  MapOptions options;
  options.whole = false;
  options.light = design.operation.trigger.from == "light";
  options.elevations = poses_to_try(design, trigger);
  const auto run = [&](const Variant& v) {
    const WindLimits limits = wind_limits(v.row ? *v.row : row, v.design, v.table, options);
    return stow_trigger(v.design, limits, trigger.meter);
  };
  const double unchanged = trigger.steps.back().after;
  const int all = 2 * static_cast<int>(changes().size());
  for (const Change& change : changes())
    for (const double by : {0.1, -0.1}) {
      Variant v{design, table, nullptr};
      change.apply(v, 1 + by);
      const Trigger moved = run(v);
      TriggerShift shift;
      shift.what = change.what;
      shift.change = by;
      if (moved.known) {
        shift.axis_gust = moved.axis_gust;
        shift.speed = moved.steps.back().after;
        shift.shift = shift.speed - unchanged;
        shift.governing = moved.basis.governing.key;
        shift.governing_changed = shift.governing != trigger.basis.governing.key;
      }
      out.push_back(shift);
      if (progress) progress(static_cast<int>(out.size()), all);
    }
  return out;
}

}  // namespace focalframe::models
