#pragma once

/// Unit load cases of what turns, beyond its weight, the pressure patterns and the receiver's drag: drag of
/// bare members, wind along the row, ice, parts of the mirror's weight, temperature, bearing friction, a
/// person, snow and water. Which of them exist follows from what the design asks.

#include <vector>

#include "fem/load_case.h"
#include "models/collector.h"
#include "models/design.h"

namespace focalframe::models {

/// Numbers of the cases in UnitCases::cases; -1 = not asked for. Collector axes.
struct UnitNumbers {
  int bare_y = -1, bare_z = -1;  ///< 1 Pa on tube and ribs from one side, drag along y, z
  int along = -1;                ///< 1 Pa blowing along +x: ribs and posts broadside, friction on the mirror
  int push_x = -1;               ///< every mass pushed with 1 m/s^2 along x
  int ice_y = -1, ice_z = -1;    ///< 1 m/s^2 on the ice
  int minus_y = -1, minus_z = -1;  ///< 1 m/s^2 on the mirror of the -y side
  int plus_y = -1, plus_z = -1;    ///< of the +y side
  int warm = -1;                   ///< everything that turns 1 K warmer
  int frame_gradient = -1;         ///< mirror side of tube and ribs 1 K warmer than their back
  int receiver_gradient = -1;      ///< lit side of the receiver 1 K warmer than the other
  int friction = -1;               ///< 1 N m about x, shared evenly by all bearings
};

/// 1 N along y and along z at one place.
struct PersonPlace {
  std::string where;
  int y = -1, z = -1;
};

struct UnitCases {
  std::vector<fem::LoadCase> cases;
  UnitNumbers at;
  std::vector<PersonPlace> person;
  /// Stations y/W of the hat functions of load per area of the aperture (along y and z each), for snow and
  /// water; empty = none. Their columns follow those of `cases`: y of station 0, z of station 0, y of 1 ...
  std::vector<double> heap_stations;
  double receiver_drag = 1.2, pylon_drag = 2.2;  ///< [-]
  std::string shielding = "mirror";              ///< of tube and ribs, as BareMembersInput

  int columns() const { return static_cast<int>(cases.size()) + 2 * static_cast<int>(heap_stations.size()); }
};

UnitCases unit_cases(const TroughDesign& design, const Collector& collector);

/// Drag coefficient of a profile across the wind: 1.20 round, 2.2 sharp-edged (loads/bare_members.h) [-].
double profile_drag(const ProfileInput& profile);

}  // namespace focalframe::models
