#include "models/portrait.h"

#include <algorithm>
#include <map>

#include "fem/statics.h"
#include "fem/units.h"
#include "loads/pose.h"
#include "models/full_frame.h"
#include "models/wind_load.h"

namespace focalframe::models {
namespace {

using Eigen::VectorXd;
using fem::Vec3;

void place_parts(const Collector& c, const FullFrame& full, Portrait& out) {
  for (std::size_t n = 0; n < full.frame.nodes.size(); ++n) {
    const int body = static_cast<int>(n) - full.first_body_node;
    if (body >= 0)
      out.points.push_back({c.body.nodes[static_cast<std::size_t>(body)].at, true});
    else
      out.points.push_back({full.frame.nodes[n].at, false});
  }
  for (std::size_t m = 0; m < full.frame.members.size(); ++m) {
    const fem::Member& member = full.frame.members[m];
    const fem::Section& s = full.frame.sections[static_cast<std::size_t>(member.section)];
    out.members.push_back({member.from, member.to, std::max(s.depth_y, s.depth_z), member.group, member.name,
                           static_cast<int>(m) >= full.first_body_member,
                           full.frame.materials[static_cast<std::size_t>(member.material)].yield});
  }
  out.stations = c.skin.modules * c.skin.stations;
  out.rows = c.skin.rows;
  for (int s = 0; s < out.stations; ++s) {
    out.module_of_station.push_back(c.skin.module_of_station(s));
    for (double y : c.skin.row_y)
      out.mirror.push_back(
          fem::Vec3(c.skin.station_x[static_cast<std::size_t>(s)], y, y * y / (4 * c.focal_length)));
  }
}

fem::LoadCase load_case(const RowModel& row, const FullFrame& full, const PortraitRequest& request) {
  const double elevation = request.state.elevation;
  VectorXd wind = request.amplitudes - weight_amplitudes(row, elevation);
  // The receiver's drag acts along its members: end forces need it there, not at the nodes.
  const Vec3 drag(0, wind[Columns::receiver_y], wind[Columns::receiver_z]);
  wind[Columns::receiver_y] = wind[Columns::receiver_z] = 0;
  fem::LoadCase load;
  load.gravity = {0, 0, -standard_gravity};
  load.nodes = in_world(full, row.nodal_loads(wind), elevation);
  const Vec3 on_receiver = loads::world_to_collector(elevation).transpose() * drag;
  if (!drag.isZero(0))
    for (int m : row.collector().receiver_members)
      load.lines.push_back({full.first_body_member + m, 0, 1, on_receiver, on_receiver, false});
  const Vec3 across(0, wind[row.columns().stand_wind()], 0);
  for (int m = 0; m < full.first_body_member; ++m)
    if (full.frame.members[static_cast<std::size_t>(m)].group == "pylon" && !across.isZero(0))
      load.lines.push_back({m, 0, 1, across, across, false});
  return load;
}

fem::Resultants at_end(const Eigen::Matrix<double, 12, 1>& f, bool end) {
  const double sign = end ? 1 : -1;
  const auto six = f.segment<6>(end ? 6 : 0);
  return {sign * six[0], sign * six[1], sign * six[2], sign * six[3], sign * six[4], sign * six[5]};
}

MemberForces forces_of(const fem::Section& section, const Eigen::Matrix<double, 12, 1>& f) {
  MemberForces out;
  out.torsion = at_end(f, false).T;
  for (bool end : {false, true}) {
    const fem::Resultants r = at_end(f, end);
    if (std::abs(r.N) > std::abs(out.axial)) out.axial = r.N;
    out.shear = std::max(out.shear, std::hypot(r.Vy, r.Vz));
    out.bending = std::max(out.bending, std::hypot(r.My, r.Mz));
    out.stress = std::max(out.stress, fem::von_mises_bound(section, r));
  }
  return out;
}

PortraitState state_of(const Collector& c, const FullFrame& full, const PortraitRequest& request,
                       const fem::Response& response) {
  PortraitState out;
  out.state = request.state;
  out.calm = request.calm;
  out.words = request.calm ? state_text(request.state.kind) + " " +
                                 std::to_string(std::lround(request.state.elevation / deg)) + " deg, calm"
                           : place_text(request.state);
  const Eigen::Matrix3d turn = loads::world_to_collector(request.state.elevation);
  VectorXd body(c.body.freedoms());
  for (int n = 0; n < response.displacement.rows(); ++n) {
    const Vec3 move = response.displacement.row(n).head<3>().transpose();
    const Vec3 rotation = response.displacement.row(n).tail<3>().transpose();
    const int b = n - full.first_body_node;
    out.moves.push_back(b < 0 ? move : turn * move);
    if (b >= 0) body.segment<6>(6 * b) << turn * move, turn * rotation;
  }
  const VectorXd mirror = c.skin.move * body;
  const VectorXd turned = c.skin.turn * body;
  for (int s = 0; s < c.skin.samples(); ++s) {
    out.mirror.push_back(mirror.segment<3>(3 * s));
    out.turned_across.push_back(turned[2 * s]);
    out.turned_along.push_back(turned[2 * s + 1]);
  }
  for (std::size_t m = 0; m < full.frame.members.size(); ++m)
    out.forces.push_back(
        forces_of(full.frame.sections[static_cast<std::size_t>(full.frame.members[m].section)],
                  response.end_force.row(static_cast<int>(m)).transpose()));
  return out;
}

// Whole frame less condensed row, end forces of what turns, over the greatest.
double disagreement(const RowModel& row, const FullFrame& full, const PoseModel& pose,
                    const VectorXd& amplitudes, const fem::Response& response) {
  const VectorXd condensed = row.evaluate(row.end_force, pose, amplitudes);
  double worst = 0;
  for (int m = 0; 12 * m < condensed.size(); ++m)
    worst = std::max(worst, (response.end_force.row(full.first_body_member + m).transpose() -
                             condensed.segment<12>(12 * m))
                                .cwiseAbs()
                                .maxCoeff());
  return worst / condensed.cwiseAbs().maxCoeff();
}

}  // namespace

Portrait portrait(const RowModel& row, const std::vector<PortraitRequest>& requests) {
  const Collector& c = row.collector();
  Portrait out;
  out.axis_height = c.stands.front().height;
  out.axis_to_vertex = c.axis_to_vertex;
  out.width = c.width;
  out.length = c.modules.back().x_to - c.modules.front().x_from;
  place_parts(c, full_frame(c, requests.empty() ? 0 : requests.front().state.elevation), out);
  out.states.resize(requests.size());
  std::map<double, std::vector<std::size_t>> poses;
  for (std::size_t i = 0; i < requests.size(); ++i) poses[requests[i].state.elevation].push_back(i);
  double worst = 0;
  for (const auto& [elevation, which] : poses) {
    const FullFrame full = full_frame(c, elevation);
    const fem::StaticSolver solver(full.frame);
    std::vector<fem::LoadCase> loads;
    for (std::size_t i : which) loads.push_back(load_case(row, full, requests[i]));
    const std::vector<fem::Response> responses = solver.solve(loads);
    const PoseModel pose = row.pose(elevation);
    for (std::size_t k = 0; k < which.size(); ++k) {
      out.states[which[k]] = state_of(c, full, requests[which[k]], responses[k]);
      worst = std::max(worst, disagreement(row, full, pose, requests[which[k]].amplitudes, responses[k]));
    }
  }
  if (!requests.empty()) out.disagreement = worst;
  return out;
}

}  // namespace focalframe::models
