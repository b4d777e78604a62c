#include "models/dish_skin.h"

#include <algorithm>
#include <cmath>
#include <map>
#include <numbers>

#include "fem/beam.h"
#include "models/quadrature.h"

namespace focalframe::models {
namespace {

using fem::Mat3;
using fem::Vec3;
using Mat3x12 = Eigen::Matrix<double, 3, 12>;
constexpr double pi = std::numbers::pi;

Mat3 skew(const Vec3& a) {
  Mat3 m;
  m << 0, -a.z(), a.y(), a.z(), 0, -a.x(), -a.y(), a.x(), 0;
  return m;
}

Vec3 on_paraboloid(double r, double angle, double f) {
  return {r * std::cos(angle), r * std::sin(angle), r * r / (4 * f)};
}

// Motion of the skin where it lies on a rib, from the twelve freedoms of the member under it.
struct OnRib {
  Vec3 at;
  int from = 0, to = 0;
  Mat3x12 move, turn;
};

OnRib on_rib(const fem::Frame& body, const DishRibs& ribs, std::size_t k, double r) {
  const DishRib& rib = ribs.ribs[k];
  DishRibs::Along along = ribs.along(r);
  if (along.piece < 0 && rib.inner < 0) along = {0, 0};  // petals reach inwards from the root
  const int member = along.piece < 0 ? rib.inner : rib.members[static_cast<std::size_t>(along.piece)];
  const fem::Member& m = body.members[static_cast<std::size_t>(member)];
  const Vec3 start = body.nodes[static_cast<std::size_t>(m.from)].at + m.offset_from;
  const Vec3 end = body.nodes[static_cast<std::size_t>(m.to)].at + m.offset_to;
  const fem::Mat6x12 motion = fem::motion_at(body, member, along.xi);
  OnRib out;
  out.at = on_paraboloid(r, rib.angle, ribs.focal_length);
  out.from = m.from;
  out.to = m.to;
  out.turn = motion.bottomRows<3>();
  out.move = motion.topRows<3>() - skew(out.at - (start + along.xi * (end - start))) * out.turn;
  return out;
}

using Entries = std::vector<Eigen::Triplet<double>>;

void put(Entries& entries, int row, const OnRib& rib, const Mat3x12& part) {
  for (int i = 0; i < 3; ++i)
    for (int c = 0; c < 12; ++c)
      if (part(i, c) != 0) entries.emplace_back(row + i, 6 * (c < 6 ? rib.from : rib.to) + c % 6, part(i, c));
}

// Straight between two ribs, t from the first to the second. The panel turns with the line between its edges,
// and about that line with the ribs; so it follows every rigid motion exactly.
void put_sample(int row, double t, const Vec3& at, const OnRib (&rib)[2], Entries& move, Entries& turn) {
  const Vec3 line = rib[1].at - rib[0].at;
  const Vec3 along = line.normalized(), off = at - ((1 - t) * rib[0].at + t * rib[1].at);
  const Mat3 swing = skew(line) / line.squaredNorm(), roll = along * along.transpose();
  for (int i = 0; i < 2; ++i) {
    const double share = i == 0 ? 1 - t : t, sign = i == 0 ? -1 : 1;
    const Mat3x12 turned = sign * swing * rib[i].move + share * roll * rib[i].turn;
    put(turn, row, rib[i], turned);
    put(move, row, rib[i], share * rib[i].move - skew(off) * turned);
  }
}

struct Row {
  double radius = 0, weight = 0;  // weight: r dr
};

std::vector<Row> rows(double inner, double hub, double rim) {
  std::vector<Row> out;
  const auto band = [&](double from, double to, int points) {
    if (to - from < 1e-9 * rim) return;
    const Quadrature rule = gauss_legendre(points, from, to);
    for (std::size_t i = 0; i < rule.point.size(); ++i)
      out.push_back({rule.point[i], rule.weight[i] * rule.point[i]});
  };
  band(inner, std::max(inner, hub), 3);
  band(std::max(inner, hub), rim, 8);
  return out;
}

// The bay around the hub may be a single point when the ribs meet in the middle.
int columns_per_bay(std::size_t ribs) { return std::max(3, static_cast<int>(36 / ribs)); }

}  // namespace

DishSkin make_dish_skin(const fem::Frame& body, const DishRibs& ribs, double inner_radius) {
  DishSkin skin;
  Entries move, turn;
  const std::size_t bays = ribs.ribs.size();
  const int columns = columns_per_bay(bays);
  const double bay = 2 * pi / static_cast<double>(bays);
  for (const Row& row : rows(inner_radius, ribs.hub_radius, ribs.rim))
    for (std::size_t k = 0; k < bays; ++k) {
      const OnRib rib[2] = {on_rib(body, ribs, k, row.radius),
                            on_rib(body, ribs, (k + 1) % bays, row.radius)};
      for (int c = 0; c < columns; ++c) {
        const double t = (c + 0.5) / columns;
        const Vec3 at = on_paraboloid(row.radius, ribs.ribs[k].angle + t * bay, ribs.focal_length);
        put_sample(3 * skin.samples(), t, at, rib, move, turn);
        skin.at.push_back(at);
        skin.weight.push_back(row.weight * bay / columns);
      }
    }
  skin.move.resize(3 * skin.samples(), body.freedoms());
  skin.turn.resize(3 * skin.samples(), body.freedoms());
  skin.move.setFromTriplets(move.begin(), move.end());
  skin.turn.setFromTriplets(turn.begin(), turn.end());
  return skin;
}

void hang_skin(fem::Frame& body, const DishRibs& ribs, const DishSkin& skin, double area_mass) {
  struct Share {
    double mass = 0;
    Vec3 moment = Vec3::Zero();
  };
  std::map<int, Share> shares;
  const std::size_t bays = ribs.ribs.size();
  const double bay = 2 * pi / static_cast<double>(bays), first = ribs.ribs[0].angle;
  for (int s = 0; s < skin.samples(); ++s) {
    const Vec3& at = skin.at[static_cast<std::size_t>(s)];
    const double r = std::hypot(at.x(), at.y());
    const double mass = area_mass * skin.weight[static_cast<std::size_t>(s)] *
                        std::sqrt(1 + std::pow(r / (2 * ribs.focal_length), 2));
    double turned = (std::atan2(at.y(), at.x()) - first) / bay;
    turned -= std::floor(turned / static_cast<double>(bays)) * static_cast<double>(bays);
    const std::size_t k = std::min(static_cast<std::size_t>(turned), bays - 1);
    const double t = turned - static_cast<double>(k);
    const DishRibs::Along along = ribs.along(r);
    for (int side = 0; side < 2; ++side) {
      const DishRib& rib = ribs.ribs[(k + static_cast<std::size_t>(side)) % bays];
      const double to_rib = mass * (side == 0 ? 1 - t : t);
      const int inner = along.piece < 0 ? (rib.inner < 0 ? rib.nodes[0] : ribs.hub)
                                        : rib.nodes[static_cast<std::size_t>(along.piece)];
      const int outer = along.piece < 0 ? rib.nodes[0] : rib.nodes[static_cast<std::size_t>(along.piece) + 1];
      for (const auto& [node, share] : {std::pair(inner, 1 - along.xi), std::pair(outer, along.xi)}) {
        shares[node].mass += to_rib * share;
        shares[node].moment += to_rib * share * at;
      }
    }
  }
  for (const auto& [node, share] : shares) {
    if (share.mass <= 0) continue;
    fem::PointMass mass;
    mass.node = node;
    mass.mass = share.mass;
    mass.offset = share.moment / share.mass - body.nodes[static_cast<std::size_t>(node)].at;
    mass.name = "skin";
    mass.group = "skin";
    body.masses.push_back(mass);
  }
}

}  // namespace focalframe::models
