#include "models/settle.h"

#include <algorithm>
#include <cmath>

#include "models/assess.h"
#include "models/cure_ladders.h"

namespace focalframe::models {
namespace {

// A drive that is only just strong enough is not what anybody would order.
constexpr double rating_reserve = 1.1;

// Lifts a rating; the drive's stiffness grows with it.
bool lift(double& rating, double needed, DriveInput& drive) {
  if (!(needed > rating)) return false;
  const double next = next_rating(rating_reserve * needed);
  if (&rating == &drive.moving_torque) drive.stiffness = next_rating(drive.stiffness * next / rating);
  rating = next;
  return true;
}

// One step for everything that is missed; false when nothing is left to enlarge.
bool enlarge(TroughDesign& design, const Assessment& a) {
  bool changed = lift(design.drive.moving_torque, std::abs(a.strength.moving.torque), design.drive);
  changed = lift(design.drive.holding_torque, std::abs(a.strength.holding.torque), design.drive) || changed;
  // A receiver that sags between its posts is helped by one more of them.
  for (const Criterion& c : a.criteria)
    if (c.key == "receiver-shift" && !c.met() && design.receiver.posts.per_module < 12) {
      ++design.receiver.posts.per_module;
      changed = true;
    }
  for (const Ladder& ladder : size_ladders(design, a)) {
    // The second size of a catalogue is about one step of strength; the first is often a shade of wall.
    ladder.rungs[std::min<std::size_t>(1, ladder.rungs.size() - 1)].apply(design);
    changed = true;
  }
  return changed;
}

}  // namespace

Settled settle(const TroughDesign& design, const loads::CoefficientTable& table, int most) {
  Settled out;
  out.design = design;
  for (;;) {
    const Assessment a = assess(out.design, table, {.discretisation = false});
    ++out.rounds;
    out.missed.clear();
    for (const Criterion& c : a.criteria)
      if (!c.met()) out.missed.push_back(c);
    if (out.missed.empty() || out.rounds >= most || !enlarge(out.design, a)) return out;
  }
}

}  // namespace focalframe::models
