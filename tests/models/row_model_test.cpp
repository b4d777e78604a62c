// Laws of the built row: rigid motion, totals, symmetry, the condensed way against the whole frame, hand
// values.

#include <Eigen/Geometry>
#include <catch2/catch.hpp>
#include <cmath>
#include <numbers>

#include "fem/statics.h"
#include "loads/pose.h"
#include "models/full_frame.h"
#include "models/trough.h"
#include "models/wind_load.h"
#include "tests/support/trough_design.h"

using namespace focalframe;
using namespace focalframe::models;
using Eigen::VectorXd;

namespace {

WindOnRow some_wind(double from, Spread spread = Spread::linear) {
  WindOnRow wind;
  wind.wind_from = from;
  wind.coefficients = {1.4, 0.2, -0.11};
  wind.spread = spread;
  wind.pressure = 100;
  return wind;
}

// Freedoms of every node when the whole body moves rigidly: translation u and small rotation w about the
// origin.
VectorXd rigid_motion(const fem::Frame& frame, const fem::Vec3& u, const fem::Vec3& w) {
  VectorXd all(frame.freedoms());
  for (std::size_t n = 0; n < frame.nodes.size(); ++n) {
    all.segment<3>(6 * static_cast<int>(n)) = u + w.cross(frame.nodes[n].at);
    all.segment<3>(6 * static_cast<int>(n) + 3) = w;
  }
  return all;
}

}  // namespace

TEST_CASE("the skin moves rigidly when the frame does", "[row]") {
  const Collector c = build_trough(support::small_row());
  const fem::Vec3 u(0.3, -0.2, 0.7), w(0.4, 0.5, -0.6);
  const VectorXd q = rigid_motion(c.body, u, w);
  const VectorXd moved = c.skin.move * q, turned = c.skin.turn * q;
  double worst = 0, worst_turn = 0;
  for (int st = 0; st < c.skin.modules * c.skin.stations; ++st)
    for (int r = 0; r < c.skin.rows; ++r) {
      const int s = c.skin.sample(st, r);
      const fem::Vec3 at = surface_point(c.skin.station_x[static_cast<std::size_t>(st)],
                                         c.skin.row_y[static_cast<std::size_t>(r)], c.focal_length);
      worst = std::max(worst, (moved.segment<3>(3 * s) - (u + w.cross(at))).norm());
      worst_turn =
          std::max(worst_turn, std::abs(turned[2 * s] - w.x()) + std::abs(turned[2 * s + 1] - w.y()));
    }
  CHECK(worst < 1e-11);
  CHECK(worst_turn < 1e-11);
}

TEST_CASE("rows and stations of the skin add up to the mirror", "[row]") {
  const auto d = support::small_row();
  const Collector c = build_trough(d);
  double across = 0, along = 0;
  for (double w : c.skin.row_weight) across += w;
  for (double w : c.skin.station_weight) along += w;
  CHECK(across == Approx(d.parabola.aperture).epsilon(1e-14));
  // The mirror runs between the end ribs of every module: gaps of one fiftieth of the module at both ends by
  // default.
  CHECK(along == Approx(d.row.modules * d.row.module_length * (1 - 2.0 / 50)).epsilon(1e-12));
}

TEST_CASE("nodal wind loads are q A C in both forces and the moment, for every pattern and wind", "[row]") {
  const RowModel row(build_trough(support::small_row()), {});
  const double area = row.collector().mirror_area, width = row.collector().width;
  for (double from : {0.0, std::numbers::pi})
    for (Spread spread : {Spread::linear, Spread::edge})
      for (double elevation : {-90 * deg, 20 * deg, 100 * deg}) {
        const WindOnRow wind = some_wind(from, spread);
        VectorXd a = wind_amplitudes(row, elevation, wind).head(row.columns().body());
        a[Columns::receiver_y] = a[Columns::receiver_z] = 0;
        const Eigen::Vector3d sum = row.load_totals() * a;
        const double side = from == 0 ? 1 : -1;
        const double y = -side * 0.2 * area, z = -1.4 * area;
        CHECK(sum[0] == Approx(y).epsilon(1e-12));
        CHECK(sum[1] == Approx(z).epsilon(1e-12));
        // Moment about the axis by statics from the vertex, 0.20 m above it.
        CHECK(sum[2] == Approx(side * -0.11 * area * width - 0.20 * y).epsilon(1e-11));
      }
}

TEST_CASE("the condensed row moves as the whole frame does, in any pose", "[row]") {
  TroughDesign design = support::small_row();
  design.row.modules = GENERATE(1, 2, 4);
  const RowModel row(build_trough(design), {});
  const Collector& c = row.collector();
  for (double elevation : {-90 * deg, 35 * deg, 140 * deg}) {
    const PoseModel pose = row.pose(elevation);
    const VectorXd weight = weight_amplitudes(row, elevation);
    const FullFrame full = full_frame(c, elevation);
    const fem::StaticSolver solver(full.frame);
    fem::LoadCase load;
    load.gravity = {0, 0, -standard_gravity};
    // The same pressure through the transposed skin operator.
    VectorXd force = VectorXd::Zero(3 * c.skin.samples());
    const double pressure = 60;
    for (int st = 0; st < c.skin.modules * c.skin.stations; ++st)
      for (int r = 0; r < c.skin.rows; ++r)
        force.segment<3>(3 * c.skin.sample(st, r)) =
            -pressure * c.skin.station_weight[static_cast<std::size_t>(st)] *
            c.skin.row_weight[static_cast<std::size_t>(r)] *
            area_normal(c.skin.row_y[static_cast<std::size_t>(r)], c.focal_length);
    load.nodes = in_world(full, c.skin.move.transpose() * force, elevation);
    VectorXd amplitudes = weight;
    for (int m = 0; m < row.columns().modules; ++m)
      amplitudes[row.columns().basis(m, Pattern::uniform)] = pressure;

    const fem::Response response = solver.solve(load);
    const VectorXd ends = row.evaluate(row.end_force, pose, amplitudes);
    double worst = 0, scale = 0;
    for (std::size_t m = 0; m < c.body.members.size(); ++m) {
      const Eigen::Matrix<double, 12, 1> whole =
          response.end_force.row(full.first_body_member + static_cast<int>(m)).transpose();
      worst = std::max(worst, (whole - ends.segment<12>(12 * static_cast<int>(m))).cwiseAbs().maxCoeff());
      scale = std::max(scale, whole.cwiseAbs().maxCoeff());
    }
    CHECK(worst / scale < 1e-7);

    const Eigen::Matrix3d turn = loads::world_to_collector(elevation);
    const VectorXd tubes = row.evaluate(row.module_turn, pose, amplitudes);
    for (std::size_t m = 0; m < c.modules.size(); ++m) {
      double mean = 0;
      for (int node : c.modules[m].rib_roots) {
        const Eigen::Vector3d r =
            response.displacement.row(full.first_body_node + node).tail<3>().transpose();
        mean += (turn * r).x() / static_cast<double>(c.modules[m].rib_roots.size());
      }
      CHECK(tubes[static_cast<int>(m)] ==
            Approx(mean).epsilon(1e-7).margin(1e-12));  // face down: no twist at all
    }
  }
}

TEST_CASE("a row whose modules are not coupled is a mechanism, told by place, direction and cause", "[row]") {
  Collector loose = build_trough(support::small_row());
  for (fem::Spring& s : loose.body.springs) s.stiffness[fem::rx] = 0;
  // The receiver runs through all modules and would hold them by its bending: hinge it where it crosses a
  // pylon.
  for (int m : loose.receiver_members) {
    fem::Member& member = loose.body.members[static_cast<std::size_t>(m)];
    const double from = loose.body.nodes[static_cast<std::size_t>(member.from)].at.x();
    const double to = loose.body.nodes[static_cast<std::size_t>(member.to)].at.x();
    for (const ModulePart& part : loose.modules)
      if (from < part.x_from && part.x_from < to) member.release_from = {false, true, true, true, true, true};
  }
  try {
    const RowModel row(loose, {});
    FAIL("no mechanism reported");
  } catch (const fem::Mechanism& m) {
    const std::string text = m.what();
    INFO(text);
    CHECK(text.find("module") != std::string::npos);
    CHECK(text.find("without resistance") != std::string::npos);
    CHECK(text.find("Likely cause") != std::string::npos);
    CHECK(m.pivot_ratio < 1e-7);
  }
}

TEST_CASE("the drive's torque is the moment of all loads about the axis", "[row]") {
  const RowModel row(build_trough(support::small_row()), {});
  const double elevation = 30 * deg;
  const PoseModel pose = row.pose(elevation);
  VectorXd a = weight_amplitudes(row, elevation) + 100 * wind_amplitudes(row, elevation, some_wind(0));
  const double loads_about_axis = (row.load_totals() * a.head(row.columns().body()))[2];
  CHECK((pose.bearing_force.row(row.drive_turn()) * a)(0, 0) == Approx(-loads_about_axis).epsilon(1e-9));
  // Weight alone: m g times the horizontal arm of the centre of gravity.
  const VectorXd weight = weight_amplitudes(row, elevation);
  const double behind = -(row.body_centre.z() + row.collector().axis_to_vertex);
  const double by_hand = row.body_mass * standard_gravity * behind * std::cos(elevation);
  CHECK((pose.bearing_force.row(row.drive_turn()) * weight)(0, 0) == Approx(-by_hand).epsilon(1e-9));
}

TEST_CASE("a row turned over in the other wind is its own mirror image", "[row]") {
  auto d = support::small_row();
  d.row.modules = 2;
  const RowModel row(build_trough(d), {});
  const double e = 40 * deg, mirrored = std::numbers::pi - e;
  const PoseModel one = row.pose(e), two = row.pose(mirrored);
  const VectorXd a = weight_amplitudes(row, e) + 100 * wind_amplitudes(row, e, some_wind(0, Spread::edge));
  const VectorXd b = weight_amplitudes(row, mirrored) +
                     100 * wind_amplitudes(row, mirrored, some_wind(std::numbers::pi, Spread::edge));
  const VectorXd ta = row.evaluate(row.module_turn, one, a), tb = row.evaluate(row.module_turn, two, b);
  for (int m = 0; m < 2; ++m) CHECK(ta[m] == Approx(-tb[m]).epsilon(1e-9));
}

TEST_CASE("twist accumulates from the drive to the ends as torque over stiffness says", "[row]") {
  // Pure torque: the linear pattern's moment on every module, drive and joints rigid, pylons and footings
  // rigid, no purlins to help the tube. Closed form (strength of materials): a torque t per rib, ribs along
  // x, rotation at a rib = sum over the ribs of t min(x_i, x) / GJ.
  auto d = support::small_row();
  d.row.axis_to_vertex = d.row.tube_to_vertex;
  d.row.drive_after_module = 0;
  d.purlins.count = 0;
  d.mirror.fixed_to = "ribs";
  d.receiver.outside_diameter =
      6 * mm;  // a full-size one, bent sideways by its posts, takes 0.8 % of the twist
  d.receiver.wall = 1 * mm;
  d.end_plates.twist_stiffness = d.drive.stiffness = std::numeric_limits<double>::infinity();
  auto& f = d.pylons.footing;
  f.sideways = f.along_row = f.upright = f.rocking = std::numeric_limits<double>::infinity();
  d.pylons.profile.side = 300 * mm;
  d.pylons.profile.wall = 16 * mm;
  const RowModel row(build_trough(d), {});
  const Collector& c = row.collector();
  const PoseModel pose = row.pose(90 * deg);
  VectorXd a = VectorXd::Zero(row.columns().all());
  for (int m = 0; m < 3; ++m) a[row.columns().basis(m, Pattern::linear)] = 100;
  const double head = (pose.bearing_motion.row(row.drive_turn()) * a)(0, 0);

  // Torque of each rib: the skin between ribs hangs half on either side, so end ribs carry half a bay.
  const double total = (row.load_totals() * a.head(row.columns().body()))[2];
  const double per_bay = total / (3 * 3);
  const double outer = 0.1397, inner = 0.1317;  // tube 139.7 x 4.0: GJ by the exact ring formula
  const double gj = 81e9 * std::numbers::pi / 32 * (std::pow(outer, 4) - std::pow(inner, 4));
  std::vector<double> x, t;
  for (const ModulePart& part : c.modules)
    for (std::size_t i = 0; i < part.rib_roots.size(); ++i) {
      x.push_back(c.body.nodes[static_cast<std::size_t>(part.rib_roots[i])].at.x());
      t.push_back(i == 0 || i + 1 == part.rib_roots.size() ? per_bay / 2 : per_bay);
    }
  const VectorXd turns = row.evaluate(row.module_turn, pose, a);
  for (int m = 0; m < 3; ++m) {
    double mean = 0;
    for (std::size_t j = 0; j < 4; ++j) {
      const double at = x[static_cast<std::size_t>(4 * m) + j];
      for (std::size_t i = 0; i < x.size(); ++i) mean += t[i] * std::min(x[i], at) / gj / 4;
    }
    CHECK(turns[m] - head == Approx(mean).epsilon(2e-3));
  }
}

TEST_CASE("mass is the sum of what a fabricator would weigh", "[row]") {
  auto d = support::small_row();
  const Collector c = build_trough(d);
  const double pi = std::numbers::pi, rho = 7850;
  const double tube = rho * pi / 4 * (std::pow(0.1397, 2) - std::pow(0.1317, 2)) * 12.0;
  double tube_mass = 0, mirror = 0;
  for (const fem::Member& m : c.body.members) {
    if (m.group != "torque tube") continue;
    const fem::Vec3 a = c.body.nodes[static_cast<std::size_t>(m.from)].at + m.offset_from;
    const fem::Vec3 b = c.body.nodes[static_cast<std::size_t>(m.to)].at + m.offset_to;
    tube_mass += rho * c.body.sections[static_cast<std::size_t>(m.section)].A * (b - a).norm();
  }
  CHECK(tube_mass == Approx(tube).epsilon(1e-12));
  for (const fem::PointMass& p : c.body.masses)
    if (p.group == "mirror") mirror += p.mass;
  // Arc length of a parabola: 2 f (t sqrt(1 + t^2) + asinh t), t = W / 4f (closed form).
  const double t = 2.4 / (4 * 0.8);
  const double arc = 2 * 0.8 * (t * std::sqrt(1 + t * t) + std::asinh(t));
  CHECK(mirror == Approx(arc * 3 * 4.0 * 0.96 * 1.2e-3 * 2700).epsilon(1e-9));
}

TEST_CASE("a balanced axis goes through the centre of gravity", "[row]") {
  auto d = support::small_row();
  d.row.axis_word = "balanced";
  d.row.axis_to_vertex = not_given;
  const RowModel row(build_trough(d), {});
  CHECK(std::abs(row.body_centre.z() + row.collector().axis_to_vertex) < 2 * mm);
}

TEST_CASE("twist feedback grows towards the wind-up speed and is infinite there", "[row]") {
  const RowModel row(build_trough(support::small_row()), {});
  const PoseModel pose = row.pose(90 * deg);
  WindOnRow wind = some_wind(0);
  wind.moment_slope = 0.5;
  const double limit = divergence_pressure(row, pose, wind.moment_slope);
  REQUIRE(std::isfinite(limit));
  const auto twist = [&](double q) {
    wind.pressure = q;
    VectorXd a = q * wind_amplitudes(row, 90 * deg, wind);
    return add_twist_feedback(row, pose, wind, a).cwiseAbs().maxCoeff() / q;
  };
  CHECK(twist(0.5 * limit) > 1.5 * twist(1e-6 * limit));
  CHECK(twist(0.999 * limit) > 300 * twist(1e-6 * limit));
  CHECK(divergence_pressure(row, pose, 1.0) == Approx(limit / 2).epsilon(1e-9));
  CHECK(std::isinf(divergence_pressure(row, pose, -0.3)));
}
