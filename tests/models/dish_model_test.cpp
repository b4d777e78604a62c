#include "models/dish_model.h"

#include <Eigen/Geometry>
#include <Eigen/LU>
#include <catch2/catch.hpp>
#include <cmath>
#include <numbers>

#include "fem/statics.h"
#include "fem/units.h"
#include "loads/pose.h"
#include "models/actuator.h"
#include "models/catalogue.h"
#include "models/dish.h"
#include "models/dish_full_frame.h"
#include "models/dish_wind.h"
#include "tests/support/dish_design.h"

using namespace focalframe;
using namespace focalframe::models;
using C = DishColumns;
using Eigen::MatrixXd;
using Eigen::Vector3d;
using Eigen::VectorXd;

namespace {

constexpr double pi = std::numbers::pi;

DishWind wind(double from, double Ca, double Cs, double Cm, Spread spread = Spread::linear) {
  DishWind w;
  w.upwind = upwind_of(from);
  w.coefficients = {Ca, Cs, Cm};
  w.spread = spread;
  return w;
}

// The solution of the uncondensed frame for weight and body loads, as displacement of the focus, yoke axes.
VectorXd full_focus(const DishModel& model, double elevation, const VectorXd& amplitudes) {
  const DishCollector& c = model.collector();
  const DishFullFrame full = dish_full_frame(c, elevation);
  const Eigen::Matrix3d turn = loads::world_to_collector(elevation).transpose();
  fem::LoadCase load;
  load.gravity = {0, 0, -amplitudes[C::base_gravity]};
  VectorXd rest = amplitudes.head(C::body);
  rest.segment<3>(C::gravity).setZero();
  const VectorXd forces = model.nodal_loads() * rest;
  for (int n = 0; 6 * n < forces.size(); ++n)
    load.nodes.push_back(
        {full.first_body_node + n, turn * forces.segment<3>(6 * n), turn * forces.segment<3>(6 * n + 3)});
  const fem::Response r = fem::StaticSolver(full.frame).solve(load);
  return r.displacement.row(full.first_body_node + c.focus).transpose();
}

VectorXd condensed_focus(const DishModel& model, const DishPose& pose, const VectorXd& amplitudes) {
  const VectorXd u = model.evaluate(model.focus, pose, amplitudes);
  const Eigen::Matrix3d turn = pose.collector_from_yoke().transpose();
  VectorXd out(6);
  out << turn * u.head<3>(), turn * u.tail<3>();
  return out;
}

}  // namespace

TEST_CASE("the condensed dish moves like the whole frame", "[dish][model]") {
  for (const bool cradle : {false, true})
    for (const bool slewing : {false, true}) {
      DishDesign d = support::small_dish();
      if (cradle) d.dish.axis.cradle = support::tube(60.3 * mm, 4 * mm);
      if (slewing) {
        d.dish.actuator = {};
        d.dish.slewing.stiffness = 1.2e6;
      }
      const DishModel model(build_dish(d));
      for (const double e : {0.0, 40 * deg, 90 * deg}) {
        const DishPose pose = model.pose(e);
        VectorXd a = dish_weight_amplitudes(pose) +
                     60 * dish_wind_amplitudes(model, pose, wind(50 * deg, 1.4, 0.2, 0.1));
        a.segment<2>(C::base_wind).setZero();
        const VectorXd whole = full_focus(model, e, a), condensed = condensed_focus(model, pose, a);
        CHECK((whole - condensed).cwiseAbs().maxCoeff() < 1e-7 * whole.cwiseAbs().maxCoeff());
      }
    }
}

TEST_CASE("a dish that is moved as a rigid body moves its skin with it", "[dish][skin]") {
  const DishCollector c = build_dish(support::small_dish());
  const Vector3d shift(1e-3, -2e-3, 3e-3), turn(2e-3, -1e-3, 4e-3);
  VectorXd u(c.body.freedoms());
  for (std::size_t n = 0; n < c.body.nodes.size(); ++n)
    u.segment<6>(6 * static_cast<Eigen::Index>(n)) << shift + turn.cross(c.body.nodes[n].at), turn;
  const VectorXd move = c.skin.move * u, turned = c.skin.turn * u;
  double worst = 0;
  for (int s = 0; s < c.skin.samples(); ++s) {
    worst = std::max(
        worst, (move.segment<3>(3 * s) - shift - turn.cross(c.skin.at[static_cast<std::size_t>(s)])).norm());
    worst = std::max(worst, (turned.segment<3>(3 * s) - turn).norm());
  }
  CHECK(worst < 1e-15);
}

TEST_CASE("nodal loads of a pressure have its force and its moment about the vertex", "[dish][skin]") {
  const DishModel model(build_dish(support::small_dish()));
  const DishCollector& c = model.collector();
  const double A = pi * 1.5 * 1.5, f = c.focal_length, D = c.diameter;
  // Uniform pressure: - A along the axis. Linear in 2y/D, on the real surface: moment A D (1/8 + (D/f)^2/384)
  // and in-plane force A (D/f)/16 (integrals of the paraboloid, closed form).
  CHECK(model.totals()(2, C::uniform) == Approx(-A).epsilon(1e-12));
  CHECK(model.totals()(0, C::uniform) == Approx(0).margin(1e-12));
  CHECK(model.totals()(1, C::linear + 1) == Approx(A * (D / f) / 16).epsilon(1e-12));
  CHECK(model.totals()(3, C::linear + 1) ==
        Approx(-A * D * (1.0 / 8 + (D / f) * (D / f) / 384)).epsilon(1e-12));
}

TEST_CASE("wind loads meet axial force, side force and vertex moment exactly in both patterns",
          "[dish][wind]") {
  const DishModel model(build_dish(support::small_dish()));
  const DishPose pose = model.pose(35 * deg);
  const double A = model.collector().area, D = model.collector().diameter;
  for (Spread spread : {Spread::linear, Spread::edge})
    for (double from = 0; from < 360 * deg; from += 50 * deg) {
      const DishWind w = wind(from, 1.55, 0.31, -0.08, spread);
      const VectorXd a = dish_wind_amplitudes(model, pose, w);
      const Vector3d have = wind_integrals(model, pose, w, a);
      CHECK(have[0] == Approx(1.55 * A).epsilon(1e-11));
      CHECK(have[1] == Approx(0.31 * A).epsilon(1e-11));
      CHECK(have[2] == Approx(-0.08 * A * D).epsilon(1e-11));
    }
}

TEST_CASE("wind force on an antenna of 0.7 m square to the wind", "[dish][wind][published]") {
  // CFE, Manual de Diseno de Obras Civiles, Diseno por Viento (2008), antenna example: qz = 689.5 Pa, gust
  // factor 1.621, A = 0.385 m2, D = 0.7 m; at 90 deg Cs = 0.625, Ca = -0.1094, Cm = 0.098: 268.9 N, -47.1
  // N, 29.5 N m.
  DishDesign d = support::small_dish();
  d.parabola.aperture = 0.7;
  d.parabola.focal_length = 0.28;
  d.dish.hub.diameter = 0.14;
  d.dish.rings[0].radius = 0.2;
  d.dish.rings[1].radius = 0.35;
  const DishModel model(build_dish(d));
  const DishPose pose = model.pose(90 * deg);
  const DishWind w = wind(0, -0.1094, 0.625, 0.098);
  const VectorXd a = 1.621 * 689.5 * dish_wind_amplitudes(model, pose, w);
  const Vector3d have = wind_integrals(model, pose, w, a);
  CHECK(have[0] == Approx(-47.1).epsilon(2e-3));
  CHECK(have[1] == Approx(268.9).epsilon(2e-3));
  CHECK(have[2] == Approx(29.5).epsilon(2e-3));
}

TEST_CASE("drag is downwind and the ground's reaction against it, in every pose and direction",
          "[dish][wind]") {
  const DishModel model(build_dish(support::small_dish()));
  for (const double e : {5 * deg, 50 * deg, 90 * deg})
    for (double from = 0; from < 360 * deg; from += 45 * deg) {
      const DishPose pose = model.pose(e);
      const DishWind w = wind(from, std::cos(e) * std::cos(from), 0.3, 0.05);
      const VectorXd a = dish_wind_amplitudes(model, pose, w);
      const VectorXd foot = model.foot_reactions(pose, a);
      CHECK(foot.head<3>().dot(upwind_of(from)) > 0);
    }
}

TEST_CASE("turning the wind by one quarter and the dish with it changes nothing", "[dish][symmetry]") {
  // Twelve ribs, four legs: three bays further the frame is the same. The dish is held at its hub.
  const DishModel model(build_dish(support::small_dish()));
  const DishCollector& c = model.collector();
  const MatrixXd& move = model.skin_move.held;
  const double quarter = pi / 2;
  for (const double from : {0.0, 0.3, 1.1}) {
    VectorXd one = VectorXd::Zero(C::body), two = one;
    for (int m = 0; m < C::edge_terms; ++m) {
      one[C::edge_cos(m)] = std::cos(m * from);
      two[C::edge_cos(m)] = std::cos(m * (from + quarter));
      if (m > 0) one[C::edge_sin(m)] = std::sin(m * from);
      if (m > 0) two[C::edge_sin(m)] = std::sin(m * (from + quarter));
    }
    const VectorXd a = move * one, b = move * two;
    const Eigen::Matrix3d turn = Eigen::AngleAxisd(quarter, Vector3d::UnitZ()).toRotationMatrix();
    double worst = 0, size = 0;
    for (int s = 0; s < c.skin.samples(); ++s)
      for (int t = 0; t < c.skin.samples(); ++t) {
        const Vector3d at = turn * c.skin.at[static_cast<std::size_t>(s)];
        if ((at - c.skin.at[static_cast<std::size_t>(t)]).norm() > 1e-6) continue;
        worst = std::max(worst, (turn * a.segment<3>(3 * s) - b.segment<3>(3 * t)).norm());
        size = std::max(size, a.segment<3>(3 * s).norm());
      }
    CHECK(size > 0);
    CHECK(worst < 1e-8 * size);
  }
}

TEST_CASE("a rib without rings bends like a cantilever under its own weight", "[dish][closed form]") {
  DishDesign d = support::small_dish();
  d.parabola.focal_length = 60;  // nearly flat
  d.dish.rings.clear();
  d.dish.feed.legs = {};
  d.dish.feed.boom = support::tube(60.3 * mm, 3 * mm);
  d.dish.surface.mass = 1e-6;
  d.dish.hub.profile.thickness = 60 * mm;
  const DishModel model(build_dish(d));
  const DishCollector& c = model.collector();
  const fem::Section section = fem::round_tube({.outside_diameter = 42.4 * mm, .wall = 2.6 * mm});
  const fem::Material steel = material_of("S235", 2.6 * mm);
  const double w = section.A * steel.density, L = 1.25;
  for (int s = 0; s < c.skin.samples(); ++s) {
    const Vector3d at = c.skin.at[static_cast<std::size_t>(s)];
    const double x = std::hypot(at.x(), at.y()) - 0.25;
    if (x < 0.9) continue;
    // w x^2 (6 L^2 - 4 L x + x^2) / 24 E I on the ribs, gravity along +z of 1 m/s2; between them the skin is
    // straight, so a sample on the circle lies a little outside the line between the ribs and gains by the
    // slope.
    const double EI = steel.E * section.Iy, r = x + 0.25;
    const double bent = w * x * x * (6 * L * L - 4 * L * x + x * x) / (24 * EI);
    const double slope = w * (3 * L * L * x - 3 * L * x * x + x * x * x) / (6 * EI);
    const double off_middle = std::remainder(std::atan2(at.y(), at.x()) - pi / 12, pi / 6);
    const double beyond = r - r * std::cos(pi / 12) / std::cos(off_middle);
    CHECK(model.skin_move.held(3 * s + 2, C::gravity + 2) == Approx(bent + slope * beyond).epsilon(0.01));
  }
}

TEST_CASE("a ring on radial ribs under outward forces takes its hoop share", "[dish][closed form]") {
  // Per node: a polygon of N sides, k = 2 E A sin(pi / N) / R; a rib of length l: k = E A / l. Flat dish,
  // forces at the rim.
  DishDesign d = support::small_dish();
  d.parabola.focal_length = 300;
  d.dish.rings.erase(d.dish.rings.begin());
  d.dish.hub.profile.thickness = 60 * mm;
  d.dish.feed.legs = {};
  d.dish.feed.boom = support::tube(60.3 * mm, 3 * mm);
  const DishCollector c = build_dish(d);
  fem::Frame body = c.body;
  body.supports.push_back({c.hub, {true, true, true, true, true, true}, fem::Vec6::Zero()});
  fem::LoadCase load;
  int some = -1;
  for (std::size_t n = 0; n < body.nodes.size(); ++n) {
    const Vector3d at = body.nodes[n].at;
    if (std::abs(std::hypot(at.x(), at.y()) - 1.5) > 1e-6) continue;
    load.nodes.push_back(
        {static_cast<int>(n), 1000 * Vector3d(at.x(), at.y(), 0).normalized(), Vector3d::Zero()});
    some = static_cast<int>(n);
  }
  REQUIRE(load.nodes.size() == 12);
  const fem::Response r = fem::StaticSolver(body).solve(load);
  const double E = material_of("S235", 2.3 * mm).E;
  const double ring = fem::round_tube({.outside_diameter = 26.9 * mm, .wall = 2.3 * mm}).A;
  const double rib = fem::round_tube({.outside_diameter = 42.4 * mm, .wall = 2.6 * mm}).A;
  const double stiffness = 2 * E * ring * std::sin(pi / 12) / 1.5 + E * rib / 1.25;
  const Vector3d out = Vector3d(body.nodes[static_cast<std::size_t>(some)].at.x(),
                                body.nodes[static_cast<std::size_t>(some)].at.y(), 0)
                           .normalized();
  CHECK(r.displacement.row(some).head<3>().dot(out) == Approx(1000 / stiffness).epsilon(0.03));
}

TEST_CASE("a hub of discs stretches like a disc under even edge tension", "[dish][closed form]") {
  // u = p a (1 - nu) / (E t) for a disc (Timoshenko, Theory of Plates and Shells); two discs share the
  // tension.
  DishDesign d = support::small_dish();
  const DishCollector c = build_dish(d);
  fem::Frame body = c.body;
  body.supports.push_back({c.hub, {true, true, true, true, true, true}, fem::Vec6::Zero()});
  fem::LoadCase load;
  int some = -1;
  for (std::size_t n = 0; n < body.nodes.size(); ++n) {
    const Vector3d at = body.nodes[n].at;
    if (std::abs(std::hypot(at.x(), at.y()) - 0.25) > 1e-6) continue;
    const double force = 1e5 * 2 * pi * 0.25 / 12;  // p = 100 kN/m
    load.nodes.push_back(
        {static_cast<int>(n), force * Vector3d(at.x(), at.y(), 0).normalized(), Vector3d::Zero()});
    some = static_cast<int>(n);
  }
  REQUIRE(load.nodes.size() == 12);
  const fem::Response r = fem::StaticSolver(body).solve(load);
  const double u = r.displacement.row(some).head<2>().norm();
  // The rings hold back a little of it through the ribs.
  CHECK(u == Approx(1e5 * 0.25 * 0.7 / (210e9 * 2 * 6 * mm)).epsilon(0.02));
}

TEST_CASE("the actuator's push times its arm is the torque about the elevation axis", "[dish][drive]") {
  const DishDesign d = support::small_dish();
  const DishModel model(build_dish(d));
  for (const double e : {0.0, 25 * deg, 70 * deg, 90 * deg}) {
    const DishPose pose = model.pose(e);
    CHECK(pose.arm == Approx(actuator_arm(d.dish.actuator, e)).epsilon(1e-12));
    const double push = pose.drive.dot(dish_weight_amplitudes(pose));
    // The centre of gravity lies z + 0.35 in front of the axis: torque m g z cos e, which lowers the dish.
    const double lever = model.body_centre.z() + 0.35, across = model.body_centre.y();
    const double torque = model.body_mass * standard_gravity * (lever * std::cos(e) + across * std::sin(e));
    CHECK(push * pose.arm == Approx(torque).epsilon(1e-9).margin(1e-6));
  }
}

TEST_CASE("post and tripod carry weight and overturning as statics says", "[dish][ground]") {
  DishDesign d = support::small_dish();
  for (const bool post : {true, false}) {
    d.dish.pedestal.kind = post ? "post" : "legs";
    d.dish.pedestal.legs = 3;
    d.dish.pedestal.foot_radius = 0.8;
    const DishModel model(build_dish(d));
    const DishPose pose = model.pose(0);
    const VectorXd feet = model.foot_reactions(pose, dish_weight_amplitudes(pose));
    Vector3d force = Vector3d::Zero(), moment = Vector3d::Zero();
    for (std::size_t f = 0; f < model.collector().feet.size(); ++f) {
      const auto row = 6 * static_cast<Eigen::Index>(f);
      const Vector3d at =
          model.collector().base.nodes[static_cast<std::size_t>(model.collector().feet[f].node)].at;
      force += feet.segment<3>(row);
      moment += feet.segment<3>(row + 3) + at.cross(Vector3d(feet.segment<3>(row)));
    }
    const double weight = standard_gravity * (model.body_mass + model.yoke_mass + model.base_mass);
    CHECK(force.z() == Approx(weight).epsilon(1e-10));
    CHECK(force.head<2>().norm() < 1e-9 * weight);
    // Looking at the horizon the body's centre stands in front (+Y): its weight turns the base about -X, the
    // yoke's bracket does a little too.
    const double ahead = model.body_mass * (model.body_centre.z() + 0.35);
    double bracket = 0;
    const fem::MassSummary yoke = fem::total_mass(model.collector().yoke);
    bracket = yoke.mass * yoke.centre.y();
    CHECK(moment.x() == Approx(standard_gravity * (ahead + bracket)).epsilon(1e-9));
    if (!post) CHECK(feet[2] + feet[8] + feet[14] == Approx(weight).epsilon(1e-10));
  }
}

TEST_CASE("what weight does to the reflector is the sum of two cases at every elevation", "[dish][gravity]") {
  const DishModel model(build_dish(support::small_dish()));
  const auto bent = [&](double e) {
    const DishPose pose = model.pose(e);
    const VectorXd a = dish_weight_amplitudes(pose);
    const VectorXd hub = model.evaluate(model.hub, pose, a);
    VectorXd move = model.evaluate(model.skin_move, pose, a);
    const Vector3d at = model.collector().body.nodes[static_cast<std::size_t>(model.collector().hub)].at;
    for (int s = 0; s < model.collector().skin.samples(); ++s)
      move.segment<3>(3 * s) -=
          hub.head<3>() +
          Vector3d(hub.tail<3>()).cross(model.collector().skin.at[static_cast<std::size_t>(s)] - at);
    return move;
  };
  const VectorXd level = bent(0), up = bent(90 * deg);
  for (const double e : {20 * deg, 45 * deg, 73 * deg})
    CHECK((bent(e) - std::cos(e) * level - std::sin(e) * up).norm() < 1e-9 * up.norm());
}

TEST_CASE("a polar mount turns weight and wind, not the dish", "[dish][polar]") {
  // A post leaning by 90 deg less the latitude: at the pole the polar axis is vertical and nothing changes.
  const DishModel model(build_dish(support::small_dish()));
  const DishPose upright = model.pose(30 * deg), same = model.pose(30 * deg, Eigen::Matrix3d::Identity());
  CHECK((upright.drive - same.drive).norm() == 0);
  // Leaning by t about X, elevation e looks as high as e + t with a vertical axis: the same pull on the
  // drive.
  const Eigen::Matrix3d lean = Eigen::AngleAxisd(-20 * deg, Vector3d::UnitX()).toRotationMatrix();
  const DishPose polar = model.pose(30 * deg, lean);
  const double moment = polar.drive.dot(dish_weight_amplitudes(polar)) * polar.arm;
  const DishPose vertical = model.pose(50 * deg);
  CHECK(moment == Approx(vertical.drive.dot(dish_weight_amplitudes(vertical)) * vertical.arm).epsilon(1e-9));
}
