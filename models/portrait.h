#pragma once

/// A row to be looked at: where its parts are and how they move in chosen states, for drawings and views.
///
/// Everything that turns is in collector axes, everything that stands in world axes (models/collector.h),
/// motions too; one pose turns all of it. The motions come from the whole frame in that pose, nothing
/// condensed, so a picture also witnesses the condensed row: `disagreement` compares both.

#include <string>
#include <vector>

#include "models/row_model.h"
#include "models/states.h"

namespace focalframe::models {

struct PortraitPoint {
  fem::Vec3 at = fem::Vec3::Zero();  ///< [m]
  bool turns = false;                ///< collector axes if true, world axes if false
};

struct PortraitMember {
  int from = 0, to = 0;  ///< points
  double size = 0;       ///< greatest outer size of its section [m]
  std::string group, name;
  bool turns = false;
  double yield = 0;  ///< [Pa]; 0 = not known
};

/// Greatest of both ends, unfactored.
struct MemberForces {
  double axial = 0;    ///< [N], tension positive
  double shear = 0;    ///< resultant [N]
  double torsion = 0;  ///< [N m], sign of the member's start
  double bending = 0;  ///< resultant [N m]
  double stress = 0;   ///< upper bound of the equivalent stress [Pa]
};

struct PortraitState {
  State state;
  bool calm = false;
  std::string words;                                ///< "OPERATE 45 deg, back"
  std::vector<fem::Vec3> moves;                     ///< per point, its own axes [m]
  std::vector<fem::Vec3> mirror;                    ///< per mirror point, collector axes [m]
  std::vector<double> turned_across, turned_along;  ///< rotation of the mirror there about x, about y [rad]
  std::vector<MemberForces> forces;
};

struct Portrait {
  double axis_height = not_given, axis_to_vertex = not_given, width = not_given, length = not_given;  ///< [m]
  std::vector<PortraitPoint> points;
  std::vector<PortraitMember> members;
  int stations = 0, rows = 0;     ///< of the mirror's grid, all modules; point (s, r) is s * rows + r
  std::vector<fem::Vec3> mirror;  ///< collector axes [m]
  std::vector<int> module_of_station;
  std::vector<PortraitState> states;
  double disagreement = not_given;  ///< greatest difference of end forces, whole frame less condensed, over
                                    ///< the greatest end force, all states [-]
};

struct PortraitRequest {
  State state;
  bool calm = false;
  Eigen::VectorXd amplitudes;  ///< weight, wind and twist feedback together (RowModel::columns)
};

/// One full factorisation per elevation among the requests. Throws fem::Mechanism as the row itself does.
Portrait portrait(const RowModel& row, const std::vector<PortraitRequest>& requests);

}  // namespace focalframe::models
