#include "models/row_model.h"

#include <Eigen/Cholesky>
#include <cmath>

#include "fem/assembly.h"
#include "fem/beam.h"
#include "loads/pose.h"

namespace focalframe::models {
namespace {

using Eigen::MatrixXd;
using Eigen::VectorXd;

}  // namespace

double basis_value(Pattern b, double y, double width) {
  const double decay = loads::edge_decay * width;
  switch (b) {
    case Pattern::uniform:
      return 1;
    case Pattern::linear:
      return 2 * y / width;
    case Pattern::edge_plus:
      return std::exp(-(width / 2 - y) / decay);
    case Pattern::edge_minus:
      return std::exp(-(width / 2 + y) / decay);
    case Pattern::half_plus:
      return y > 0 ? 1 : 0;
    case Pattern::line:
      return 0;
  }
  return 0;
}

// Hat function of a station list at position s/W.
double hat_value(const std::vector<double>& stations, int i, double at) {
  const std::size_t k = static_cast<std::size_t>(i);
  if (k > 0 && at < stations[k])
    return std::max(0.0, (at - stations[k - 1]) / (stations[k] - stations[k - 1]));
  if (k + 1 < stations.size() && at > stations[k])
    return std::max(0.0, (stations[k + 1] - at) / (stations[k + 1] - stations[k]));
  return 1.0;  // on the station itself, or beyond the first or last one
}

namespace {

std::vector<fem::LoadCase> stand_cases() {
  fem::LoadCase weight, wind, along, push_x, push_y;
  weight.gravity = {0, 0, -1};
  wind.lines = {{.member = 0, .at_from = fem::Vec3::UnitY(), .at_to = fem::Vec3::UnitY()}};
  along.lines = {{.member = 0, .at_from = fem::Vec3::UnitX(), .at_to = fem::Vec3::UnitX()}};
  push_x.gravity = fem::Vec3::UnitX();
  push_y.gravity = fem::Vec3::UnitY();
  return {weight, wind, along, push_x, push_y};
}

fem::Condensed condense_stand(const Stand& stand) {
  std::vector<fem::Freedom> head;
  for (int dof = 0; dof < 6; ++dof) head.push_back({stand.head, dof});
  return fem::condense(stand.frame, head, fem::assemble_loads(stand.frame, stand_cases()));
}

}  // namespace

RowModel::RowModel(Collector collector, std::vector<double> stations, UnitCases units)
    : collector_(std::move(collector)), units_(std::move(units)), stations_(std::move(stations)) {
  columns_.modules = static_cast<int>(collector_.modules.size());
  columns_.hats = static_cast<int>(stations_.size());
  columns_.units = units_.columns();
  const fem::MassSummary mass = fem::total_mass(collector_.body);
  body_mass = mass.mass;
  body_centre = mass.centre;

  std::vector<fem::LoadCase> members(4);
  members[Columns::gravity_y].gravity = fem::Vec3::UnitY();
  members[Columns::gravity_z].gravity = fem::Vec3::UnitZ();
  for (int m : collector_.receiver_members) {
    members[Columns::receiver_y].lines.push_back(
        {.member = m, .at_from = fem::Vec3::UnitY(), .at_to = fem::Vec3::UnitY()});
    members[Columns::receiver_z].lines.push_back(
        {.member = m, .at_from = fem::Vec3::UnitZ(), .at_to = fem::Vec3::UnitZ()});
  }
  MatrixXd loads = body_loads();
  loads.leftCols(4) = fem::assemble_loads(collector_.body, members);
  const int unit_cases = static_cast<int>(units_.cases.size());
  loads.middleCols(columns_.unit(0), unit_cases) = fem::assemble_loads(collector_.body, units_.cases);

  std::vector<fem::Freedom> kept;
  for (const Bearing& b : collector_.bearings) {
    kept.push_back({b.node, fem::uy});
    kept.push_back({b.node, fem::uz});
  }
  const int drive_node = collector_.bearings[static_cast<std::size_t>(collector_.drive_bearing)].node;
  kept.push_back({drive_node, fem::ux});
  kept.push_back({drive_node, fem::rx});
  body_ = fem::condense(collector_.body, kept, loads);
  residual = body_.residual;
  pivot_ratio = body_.smallest_pivot_ratio;
  condition = body_.condition_estimate;
  for (const Stand& stand : collector_.stands) {
    const fem::Condensed part = condense_stand(stand);
    const fem::SparseMatrix ends = fem::assemble_end_forces(stand.frame);
    stand_posts_.push_back(
        {ends * part.held_response + fem::assemble_fixed_end_forces(stand.frame, stand_cases()),
         ends * part.joint_response});
    stands_.push_back(part);
  }

  load_totals_ = MatrixXd::Zero(3, loads.cols());
  for (std::size_t n = 0; n < collector_.body.nodes.size(); ++n) {
    const fem::Vec3& at = collector_.body.nodes[n].at;
    const auto force = loads.middleRows(6 * static_cast<int>(n), 6);
    load_totals_.row(0) += force.row(1);
    load_totals_.row(1) += force.row(2);
    load_totals_.row(2) +=
        force.row(3) + at.y() * force.row(2) - (at.z() + collector_.axis_to_vertex) * force.row(1);
  }

  MatrixXd fixed = MatrixXd::Zero(12 * static_cast<int>(collector_.body.members.size()), loads.cols());
  fixed.leftCols(4) = fem::assemble_fixed_end_forces(collector_.body, members);
  fixed.middleCols(columns_.unit(0), unit_cases) =
      fem::assemble_fixed_end_forces(collector_.body, units_.cases);
  make_outputs(fixed);
  loads_ = std::move(loads);
  make_fold();
}

// Columns of the pressure patterns, of snow and water through the transposed skin operator; the first four
// columns and those of UnitCases::cases are left empty.
MatrixXd RowModel::body_loads() {
  const Skin& skin = collector_.skin;
  const double width = collector_.width, f = collector_.focal_length;
  MatrixXd loads = MatrixXd::Zero(collector_.body.freedoms(), columns_.body());
  integrals_.assign(static_cast<std::size_t>(columns_.body() * columns_.modules), {});
  module_area_.assign(static_cast<std::size_t>(columns_.modules), 0.0);

  const int samples = skin.samples();
  for (int m = 0; m < columns_.modules; ++m) {
    double& area = module_area_[static_cast<std::size_t>(m)];
    for (int st = m * skin.stations; st < (m + 1) * skin.stations; ++st)
      area += skin.station_weight[static_cast<std::size_t>(st)] * width;
  }
  const auto spread = [&](int column, int first_station, int last_station, auto&& value) {
    VectorXd force = VectorXd::Zero(3 * samples);
    for (int st = first_station; st < last_station; ++st) {
      const int m = skin.module_of_station(st);
      Integral& sum = integrals_[static_cast<std::size_t>(column * columns_.modules + m)];
      const double area = module_area_[static_cast<std::size_t>(m)];
      for (int r = 0; r < skin.rows; ++r) {
        const double y = skin.row_y[static_cast<std::size_t>(r)];
        const double da =
            skin.station_weight[static_cast<std::size_t>(st)] * skin.row_weight[static_cast<std::size_t>(r)];
        // dcp > 0 pushes from the concave to the convex side, against the normal that points to the focus.
        const fem::Vec3 push = -value(y) * da * area_normal(y, f);
        force.segment<3>(3 * skin.sample(st, r)) = push;
        const double z = y * y / (4 * f);
        sum.axial += -push.z() / area;
        sum.side += push.y() / area;
        sum.moment += (y * push.z() - z * push.y()) / (area * width);
      }
    }
    loads.col(column) = skin.move.transpose() * force;
  };
  for (int m = 0; m < columns_.modules; ++m) {
    const int from = m * skin.stations, to = from + skin.stations;
    for (const Pattern b :
         {Pattern::uniform, Pattern::linear, Pattern::edge_plus, Pattern::edge_minus, Pattern::half_plus})
      spread(columns_.basis(m, b), from, to, [&](double y) { return basis_value(b, y, width); });
    VectorXd line = VectorXd::Zero(3 * skin.modules * skin.stations);
    for (int st = from; st < to; ++st)
      line[3 * st + 1] = width * skin.station_weight[static_cast<std::size_t>(st)];
    loads.col(columns_.basis(m, Pattern::line)) = skin.vertex_move.transpose() * line;
    integrals_[static_cast<std::size_t>(columns_.basis(m, Pattern::line) * columns_.modules + m)].side = 1;
  }
  for (int i = 0; i < columns_.hats; ++i)
    spread(columns_.hat(i), 0, skin.modules * skin.stations,
           [&](double y) { return hat_value(stations_, i, y / width); });
  for (int i = 0; i < static_cast<int>(units_.heap_stations.size()); ++i)
    for (int axis = 0; axis < 2; ++axis) {
      VectorXd force = VectorXd::Zero(3 * samples);
      for (int st = 0; st < skin.modules * skin.stations; ++st)
        for (int r = 0; r < skin.rows; ++r)
          force[3 * skin.sample(st, r) + 1 + axis] =
              skin.station_weight[static_cast<std::size_t>(st)] *
              skin.row_weight[static_cast<std::size_t>(r)] *
              hat_value(units_.heap_stations, i, skin.row_y[static_cast<std::size_t>(r)] / width);
      loads.col(heap(i, axis == 1)) = skin.move.transpose() * force;
    }
  return loads;
}

Integral RowModel::integral(int column, int module) const {
  return integrals_[static_cast<std::size_t>(column * columns_.modules + module)];
}

void RowModel::make_outputs(const MatrixXd& fixed_ends) {
  const Skin& skin = collector_.skin;
  const int samples = skin.samples(), stations = skin.modules * skin.stations;
  const auto& B = body_.held_response;
  const auto& J = body_.joint_response;
  const auto freedom = [&](const MatrixXd& u, int node, int dof) -> Eigen::RowVectorXd {
    return u.row(6 * node + dof);
  };

  // Receiver at the stations, through the shape functions of its own members.
  Eigen::SparseMatrix<double, Eigen::RowMajor> at_receiver(2 * stations, collector_.body.freedoms());
  std::vector<Eigen::Triplet<double>> entries;
  std::size_t span = 0;
  for (int st = 0; st < stations; ++st) {
    const double x = skin.station_x[static_cast<std::size_t>(st)];
    const auto node_x = [&](std::size_t i) {
      return collector_.body.nodes[static_cast<std::size_t>(collector_.receiver_nodes[i])].at.x();
    };
    while (span + 2 < collector_.receiver_nodes.size() && x > node_x(span + 1)) ++span;
    const double xi = (x - node_x(span)) / (node_x(span + 1) - node_x(span));
    const fem::Mat6x12 motion = fem::motion_at(collector_.body, collector_.receiver_members[span], xi);
    for (int row = 0; row < 2; ++row)
      for (int c = 0; c < 12; ++c)
        entries.emplace_back(2 * st + row, 6 * collector_.receiver_nodes[span + (c < 6 ? 0 : 1)] + c % 6,
                             motion(1 + row, c));
  }
  at_receiver.setFromTriplets(entries.begin(), entries.end());
  receiver = {at_receiver * B, at_receiver * J};

  const MatrixXd moved[2] = {skin.move * B, skin.move * J}, turned[2] = {skin.turn * B, skin.turn * J};
  const auto every = [](const MatrixXd(&from)[2], int step, int first, int count) -> LinearOutput {
    const auto rows = Eigen::seqN(first, count, step);
    return {from[0](rows, Eigen::all), from[1](rows, Eigen::all)};
  };
  mirror_v = every(moved, 3, 1, samples);
  mirror_w = every(moved, 3, 2, samples);
  mirror_turn = every(turned, 2, 0, samples);
  mirror_along = every(turned, 2, 1, samples);
  const MatrixXd line[2] = {skin.vertex_move * B, skin.vertex_move * J};
  vertex = {MatrixXd(2 * stations, B.cols()), MatrixXd(2 * stations, J.cols())};
  for (int st = 0; st < stations; ++st) {
    vertex.held.middleRows(2 * st, 2) = line[0].middleRows(3 * st + 1, 2);
    vertex.joint.middleRows(2 * st, 2) = line[1].middleRows(3 * st + 1, 2);
  }

  const auto turns = [&](const MatrixXd& u) {
    MatrixXd mean = MatrixXd::Zero(columns_.modules, u.cols());
    for (int m = 0; m < columns_.modules; ++m) {
      const auto& roots = collector_.modules[static_cast<std::size_t>(m)].rib_roots;
      for (int node : roots) mean.row(m) += freedom(u, node, fem::rx) / static_cast<double>(roots.size());
    }
    return mean;
  };
  module_turn = {turns(B), turns(J)};

  // The tube beside the drive: the bearing node itself, which the drive's flange turns.
  const int beside = collector_.bearings[static_cast<std::size_t>(collector_.drive_bearing)].node;
  sensor_turn = {freedom(B, beside, fem::rx), freedom(J, beside, fem::rx)};

  const fem::SparseMatrix ends = fem::assemble_end_forces(collector_.body);
  end_force = {MatrixXd(ends * B) + fixed_ends, ends * J};
}

void RowModel::make_fold() {
  std::vector<std::vector<int>> sums;
  const auto alone = [&](int column) { sums.push_back({column}); };
  for (int c = 0; c < 4; ++c) alone(c);
  for (const Pattern b : {Pattern::edge_plus, Pattern::edge_minus, Pattern::line}) {
    sums.emplace_back();
    for (int m = 0; m < columns_.modules; ++m) sums.back().push_back(columns_.basis(m, b));
  }
  for (const Pattern b : {Pattern::uniform, Pattern::linear, Pattern::half_plus})
    for (int m = 0; m < columns_.modules; ++m) alone(columns_.basis(m, b));
  for (int i = 0; i < columns_.hats; ++i) alone(columns_.hat(i));
  for (int i = 0; i < columns_.units; ++i) alone(columns_.unit(i));
  for (int i = 0; i < Columns::stand; ++i) alone(columns_.stand_gravity() + i);
  fold_ = MatrixXd::Zero(columns_.all(), static_cast<int>(sums.size()));
  for (std::size_t s = 0; s < sums.size(); ++s) {
    fold_column_.push_back(sums[s][0]);
    for (int c : sums[s]) fold_(c, static_cast<int>(s)) = 1;
  }
  folded_ends_ = end_force.held * fold_.topRows(columns_.body());
}

MatrixXd RowModel::end_forces(const PoseModel& pose, const MatrixXd& amplitudes) const {
  const MatrixXd sums = amplitudes(fold_column_, Eigen::all);
  if ((fold_ * sums - amplitudes).cwiseAbs().maxCoeff() > 1e-12 * amplitudes.cwiseAbs().maxCoeff())
    return evaluate(end_force, pose, amplitudes);
  const MatrixXd per_sum = folded_ends_ + end_force.joint * (pose.bearing_motion * fold_);
  return per_sum * sums;
}

MatrixXd RowModel::evaluate(const LinearOutput& output, const PoseModel& pose,
                            const MatrixXd& amplitudes) const {
  return output.held * amplitudes.topRows(columns_.body()) +
         output.joint * (pose.bearing_motion * amplitudes);
}

MatrixXd RowModel::evaluate_stand(int k, const PoseModel& pose, const MatrixXd& amplitudes) const {
  const LinearOutput& post = stand_posts_[static_cast<std::size_t>(k)];
  return post.held * amplitudes.bottomRows(Columns::stand) +
         post.joint * (pose.head_motion.middleRows(6 * k, 6) * amplitudes);
}

PoseModel RowModel::pose(double elevation) const {
  const int stands = static_cast<int>(stands_.size()), heads = 6 * stands, joints = drive_turn() + 1;
  const bool rigid_drive = std::isinf(collector_.drive_stiffness);
  const int unknowns = heads + (rigid_drive ? 0 : 1);
  const Eigen::Matrix3d turn = loads::world_to_collector(elevation);

  // Bearing freedoms of the body from the unknowns: head motions (world) and the body's rotation at the
  // drive.
  MatrixXd couple = MatrixXd::Zero(joints, unknowns);
  for (int k = 0; k < stands; ++k) {
    couple.block<1, 3>(bearing_y(k), 6 * k) = turn.row(1);
    couple.block<1, 3>(bearing_y(k) + 1, 6 * k) = turn.row(2);
  }
  const int driven = 6 * collector_.drive_bearing;
  couple(drive_x(), driven) = 1;
  couple(drive_turn(), rigid_drive ? driven + fem::rx : heads) = 1;

  MatrixXd K = couple.transpose() * body_.stiffness * couple;
  MatrixXd rhs = MatrixXd::Zero(unknowns, columns_.all());
  rhs.leftCols(columns_.body()) = couple.transpose() * body_.load;
  for (int k = 0; k < stands; ++k) {
    const fem::Condensed& stand = stands_[static_cast<std::size_t>(k)];
    K.block<6, 6>(6 * k, 6 * k) += stand.stiffness;
    rhs.block(6 * k, columns_.stand_gravity(), 6, Columns::stand) += stand.load;
  }
  if (!rigid_drive) {
    const double kd = collector_.drive_stiffness;
    const int a = heads, b = driven + fem::rx;
    K(a, a) += kd;
    K(b, b) += kd;
    K(a, b) -= kd;
    K(b, a) -= kd;
  }
  const MatrixXd solution = K.llt().solve(rhs);

  PoseModel pose;
  pose.elevation = elevation;
  pose.bearing_motion = couple * solution;
  pose.bearing_force = body_.stiffness * pose.bearing_motion;
  pose.bearing_force.leftCols(columns_.body()) -= body_.load;
  pose.head_motion = solution.topRows(heads);

  MatrixXd unit = MatrixXd::Zero(columns_.all(), columns_.modules);
  for (int m = 0; m < columns_.modules; ++m) {
    const int column = columns_.basis(m, Pattern::linear);
    unit(column, m) = 1 / (integral(column, m).moment * module_area(m) * collector_.width);
  }
  pose.twist_gain = evaluate(module_turn, pose, unit);
  return pose;
}

}  // namespace focalframe::models
