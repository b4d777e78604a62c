#include "models/trough_ribs.h"

#include <cmath>

#include "fem/beam.h"
#include "models/quadrature.h"

namespace focalframe::models {
namespace {

using Triplet = Eigen::Triplet<double>;

// Two-point Gauss rule on [0, 1].
constexpr double gauss[2] = {0.5 - 0.28867513459481287, 0.5 + 0.28867513459481287};

// Linear functions of the freedoms of one or two nodes: 3 rows of displacement, 1 row of rotation about x.
struct Motion {
  std::array<int, 2> node = {-1, -1};
  Eigen::Matrix<double, 3, 12> move = Eigen::Matrix<double, 3, 12>::Zero();
  Eigen::Matrix<double, 1, 12> turn_x = Eigen::Matrix<double, 1, 12>::Zero();
};

fem::Mat3 cross_matrix(const fem::Vec3& v) {
  fem::Mat3 m;
  m << 0, -v.z(), v.y(), v.z(), 0, -v.x(), -v.y(), v.x(), 0;
  return m;
}

// Point rigid with a node: u + theta x arm.
Motion ride_on_node(const fem::Frame& frame, int node, const fem::Vec3& point) {
  Motion m;
  m.node[0] = node;
  m.move.block<3, 3>(0, 0).setIdentity();
  m.move.block<3, 3>(0, 3) = -cross_matrix(point - frame.nodes[static_cast<std::size_t>(node)].at);
  m.turn_x(0, 3) = 1;
  return m;
}

// Point carried by the cross-section of a member at fraction xi; its slope is that of the member's axis.
Motion ride_on_member(const fem::Frame& frame, int member, double xi, const fem::Vec3& point) {
  const fem::Member& part = frame.members[static_cast<std::size_t>(member)];
  const fem::Vec3 start = frame.nodes[static_cast<std::size_t>(part.from)].at + part.offset_from;
  const fem::Vec3 end = frame.nodes[static_cast<std::size_t>(part.to)].at + part.offset_to;
  const fem::Mat6x12 section = fem::motion_at(frame, member, xi, true);
  const fem::Mat6x12 axis = fem::motion_at(frame, member, xi, false);
  Motion m;
  m.node = {part.from, part.to};
  m.move =
      section.topRows<3>() - cross_matrix(point - (start + xi * (end - start))) * section.bottomRows<3>();
  m.turn_x = axis.row(3);
  return m;
}

// The lateral rows: which arm and element they ride on (arm < 0: over the tube), where along it, at which y.
struct Row {
  int arm = -1, element = 0;
  double xi = 0, y = 0, weight = 0;
};

std::vector<Row> lateral_rows(const TroughLayout& layout) {
  std::vector<Row> rows;
  const auto& y = layout.arm_y;
  const int elements = static_cast<int>(y.size()) - 1;
  for (int e = elements - 1; e >= 0; --e) {
    const double a = y[static_cast<std::size_t>(e)], b = y[static_cast<std::size_t>(e) + 1];
    for (double g : {gauss[1], gauss[0]}) rows.push_back({0, e, g, -(a + g * (b - a)), (b - a) / 2});
  }
  const double half = layout.tube_half_width;
  for (double part : {-1.0, 0.0})
    for (double g : gauss) rows.push_back({-1, 0, 0, (part + g) * half, half / 2});
  for (int e = 0; e < elements; ++e) {
    const double a = y[static_cast<std::size_t>(e)], b = y[static_cast<std::size_t>(e) + 1];
    for (double g : gauss) rows.push_back({1, e, g, a + g * (b - a), (b - a) / 2});
  }
  return rows;
}

Motion rib_motion(const fem::Frame& frame, const RibPart& rib, const Row& row, double focal_length) {
  const fem::Vec3 point = surface_point(rib.x, row.y, focal_length);
  if (row.arm < 0) return ride_on_node(frame, rib.tube_node, point);
  const int member = rib.members[static_cast<std::size_t>(row.arm)][static_cast<std::size_t>(row.element)];
  return ride_on_member(frame, member, row.xi, point);
}

void add_rows(std::vector<Triplet>& out, int first_row, const Motion& m, const Eigen::MatrixXd& matrix,
              double factor) {
  for (std::size_t end = 0; end < 2; ++end) {
    if (m.node[end] < 0) continue;
    for (int r = 0; r < matrix.rows(); ++r)
      for (int c = 0; c < 6; ++c) {
        const double value = factor * matrix(r, static_cast<int>(end) * 6 + c);
        if (value != 0) out.emplace_back(first_row + r, 6 * m.node[end] + c, value);
      }
  }
}

}  // namespace

Skin make_skin(const fem::Frame& frame, const TroughLayout& layout, const std::vector<RibPart>& ribs,
               int modules) {
  const std::vector<Row> rows = lateral_rows(layout);
  const int per_module = static_cast<int>(ribs.size()) / modules;
  Skin skin;
  skin.modules = modules;
  const Quadrature along = gauss_legendre(layout.stations_per_bay, 0, 1);
  skin.stations_per_bay = layout.stations_per_bay;
  skin.bay_share = along.point;
  skin.stations = layout.stations_per_bay * (per_module - 1);
  skin.rows = static_cast<int>(rows.size());
  for (const Row& row : rows) {
    skin.row_y.push_back(row.y);
    skin.row_weight.push_back(row.weight);
  }
  std::vector<Triplet> move, turn, vertex;
  int station = 0;
  for (std::size_t r = 0; r + 1 < ribs.size(); ++r) {
    const RibPart &left = ribs[r], &right = ribs[r + 1];
    if (left.module != right.module) continue;
    const double bay = right.x - left.x;
    std::array<std::vector<Motion>, 2> ride;
    for (const Row& row : rows) {
      ride[0].push_back(rib_motion(frame, left, row, layout.focal_length));
      ride[1].push_back(rib_motion(frame, right, row, layout.focal_length));
    }
    skin.bay = bay;
    for (std::size_t at = 0; at < along.point.size(); ++at) {
      const double g = along.point[at];
      skin.station_x.push_back(left.x + g * bay);
      skin.station_weight.push_back(bay * along.weight[at]);
      for (std::size_t side = 0; side < 2; ++side) {
        const double share = side == 0 ? 1 - g : g;
        const RibPart& rib = side == 0 ? left : right;
        for (int i = 0; i < skin.rows; ++i) {
          const Motion& m = ride[side][static_cast<std::size_t>(i)];
          const int s = skin.sample(station, i);
          add_rows(move, 3 * s, m, m.move, share);
          add_rows(turn, 2 * s, m, m.turn_x, share);
          // Rotation about y of the ruled surface: -dw/dx, the derivative of the straight blend.
          add_rows(turn, 2 * s + 1, m, m.move.row(2), side == 0 ? 1 / bay : -1 / bay);
        }
        const Motion over_tube = ride_on_node(frame, rib.tube_node, fem::Vec3(rib.x, 0, 0));
        add_rows(vertex, 3 * station, over_tube, over_tube.move, share);
      }
      ++station;
    }
  }
  skin.move.resize(3 * skin.samples(), frame.freedoms());
  skin.move.setFromTriplets(move.begin(), move.end());
  skin.turn.resize(2 * skin.samples(), frame.freedoms());
  skin.turn.setFromTriplets(turn.begin(), turn.end());
  skin.vertex_move.resize(3 * station, frame.freedoms());
  skin.vertex_move.setFromTriplets(vertex.begin(), vertex.end());
  return skin;
}

}  // namespace focalframe::models
