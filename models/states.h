#pragma once

/// Which poses and winds a row is checked in.

#include <string>
#include <vector>

#include "loads/coefficients.h"
#include "loads/wind.h"
#include "models/design.h"
#include "models/schema.h"

namespace focalframe::models {

enum class StateKind { operate, turning, stow, stuck, unfinished, maintenance };
inline constexpr StateKind all_state_kinds[] = {StateKind::operate,    StateKind::turning,
                                                StateKind::stow,       StateKind::stuck,
                                                StateKind::unfinished, StateKind::maintenance};
std::string state_text(StateKind kind);

/// One pose with the wind on one face.
struct State {
  StateKind kind = StateKind::operate;
  double elevation = 0;  ///< [rad]
  double wind_from = 0;  ///< [rad]: 0 from +Y, pi from -Y
};

/// "OPERATE 45 deg, back": the face the wind strikes is the concave one ("face") or the convex one
/// ("back"); edge-on "from +Y" or "from -Y".
std::string place_text(const State& state);

/// Every asked state in both winds. Operate: the ends of the tracking range and every multiple of 15 deg
/// between. Turning: from the stow pose to the farther end of the tracking range, likewise. Stow: the pose
/// and both ends of its tolerance. Stuck: the drive's whole range (or what the states above span). Unfinished
/// and maintenance: their own pose, unfinished also in wind along the row.
std::vector<State> asked_states(const TroughDesign& design);

/// The wind of each kind of state at the rotation axis; chain empty when the design states none. Maintenance
/// works in the OPERATE wind.
struct StateWinds {
  loads::WindAtHeight operate, turning, stow, stuck, unfinished;
  const loads::WindAtHeight& of(StateKind kind) const;
};

/// Turning, when not stated: gusts 1.2 times those of operate (judgement: a front arrives while the row
/// turns).
inline constexpr double turning_over_operate = 1.2;

StateWinds winds_at_axis(const TroughDesign& design);
loads::Site site_of(const SiteInput& site);

/// Part of the gust angle that turbulence brings, added to the pose tolerance for strength [rad] (judgement).
inline constexpr double turbulence_angle = 5.0 * 3.14159265358979323846 / 180.0;

/// Angle off the row's normal of the along-row wind [rad].
inline constexpr double along_row_angle = 90.0 * 3.14159265358979323846 / 180.0;

/// Poses of asked states that the table does not cover, as violations with rule "table-range".
std::vector<Violation> table_gaps(const TroughDesign& design, const loads::CoefficientTable& table);

}  // namespace focalframe::models
