// Ribs, lattice boxes and profiles of a trough against trusses by hand, closed shear flow, published tables;
// buckling of members against published reductions.

#include <Eigen/Geometry>
#include <catch2/catch.hpp>
#include <cmath>
#include <numbers>

#include "fem/statics.h"
#include "models/assess.h"
#include "models/catalogue.h"
#include "models/full_frame.h"
#include "models/member_buckling.h"
#include "models/profile.h"
#include "models/rib_arms.h"
#include "models/torque_box.h"
#include "models/trough.h"
#include "models/wind_load.h"
#include "tests/support/trough_design.h"

using namespace focalframe;
using namespace focalframe::models;
using fem::Vec3;

namespace {

constexpr fem::Six held{true, true, true, true, true, true};

ProfileInput square(double side, double wall, const char* material = "S235") {
  ProfileInput p;
  p.shape = "square-tube";
  p.side = side;
  p.wall = wall;
  p.material = material;
  return p;
}

ProfileInput bar(double diameter) {
  ProfileInput p;
  p.shape = "round-bar";
  p.outside_diameter = diameter;
  p.material = "S235";
  return p;
}

// The usual small row with truss ribs.
TroughDesign truss_row(int panels = 6) {
  TroughDesign d = support::small_row();
  d.ribs.kind = "truss";
  d.ribs.thickness = not_given;
  d.ribs.material.clear();
  d.ribs.depth_at_tube = 140 * mm;
  d.ribs.depth_at_tip = 60 * mm;
  d.ribs.panels = panels;
  d.ribs.chords = square(20 * mm, 2 * mm);
  d.ribs.webs = bar(10 * mm);
  return d;
}

TroughDesign box_row(const std::string& bracing = "cross") {
  TroughDesign d = truss_row();
  d.tube.profile = {};
  d.tube.profile.shape = "lattice-box";
  d.tube.profile.depth = 250 * mm;
  d.tube.profile.width = 200 * mm;
  d.tube.chords = square(30 * mm, 2.5 * mm);
  d.tube.webs = square(20 * mm, 2 * mm);
  d.tube.panels_per_bay = 3;
  d.tube.bracing = bracing;
  d.row.tube_to_vertex = 0.22;
  return d;
}

// One rib on a held tube, flat because its mirror is: the deflection of the +y rim under a force on it.
double rim_deflection(TroughDesign d, double force) {
  d.parabola.focal_length = 1e6;
  d.purlins.count = 0;
  d.mirror.fixed_to = "ribs";
  const TroughLayout layout = lay_out(d);
  BodyMaker make;
  const int tube = make.node({0, 0, -layout.tube_to_vertex}, "tube");
  RibArms arms(d, layout, make);
  const RibPart rib = arms.add(0, 0, 0, tube);
  fem::Frame frame = make.out.body;
  frame.supports = {{tube, held, fem::Vec6::Zero()}};
  fem::LoadCase load;
  load.nodes = {{rib.nodes[1].back(), Vec3(0, 0, -force), Vec3::Zero()}};
  return -fem::StaticSolver(frame).solve(load).displacement(rib.nodes[1].back(), 2);
}

struct FlatTruss {
  double arm, panel, depth, diagonal, chord_area, web_area;
  int panels;
};
FlatTruss flat_truss(const TroughDesign& d) {
  FlatTruss t{};
  t.arm = d.parabola.aperture / 2 - lay_out(d).tube_half_width;
  t.panels = d.ribs.panels;
  t.panel = t.arm / t.panels;
  t.depth = d.ribs.depth_at_tube;
  t.diagonal = std::hypot(t.panel, t.depth);
  t.chord_area = section_of(d.ribs.chords).A;
  t.web_area = section_of(d.ribs.webs).A;
  return t;
}

// Twist of one module's box between end plates under a torque of 1 N m, as GJ.
double twist_stiffness_of(const TroughDesign& d) {
  const TroughLayout layout = lay_out(d);
  BodyMaker make;
  const int start = make.node({0, 0, -layout.tube_to_vertex}, "start"),
            end = make.node({layout.module_length, 0, -layout.tube_to_vertex}, "end");
  add_torque_box(d, layout, make, 0, start, end, Vec3::Zero());
  fem::Frame frame = make.out.body;
  frame.supports = {{start, held, fem::Vec6::Zero()}};
  fem::LoadCase load;
  load.nodes = {{end, Vec3::Zero(), Vec3::UnitX()}};
  return layout.module_length / fem::StaticSolver(frame).solve(load).displacement(end, 3);
}

// A box of equal panels: ends, ribs and panel frames all `panel` apart.
TroughDesign even_box(double depth, double width, double panel, int panels, const std::string& bracing) {
  TroughDesign d = box_row(bracing);
  d.tube.profile.depth = depth;
  d.tube.profile.width = width;
  d.tube.panels_per_bay = 1;
  d.tube.chords = square(20 * mm, 2 * mm);
  d.tube.webs = bar(8 * mm);
  d.row.module_length = panel * panels;
  d.row.end_gap = panel;
  d.ribs.per_module = panels - 1;
  d.receiver.posts.per_module = 1;
  return d;
}

}  // namespace

TEST_CASE("the rim of a lattice rib sinks as the truss by hand says", "[parts][truss]") {
  TroughDesign d = truss_row(5);
  d.ribs.depth_at_tube = d.ribs.depth_at_tip = 200 * mm;
  d.ribs.chords = bar(12 * mm);
  d.ribs.webs = bar(8 * mm);
  const FlatTruss t = flat_truss(d);
  // Method of sections, unit load at the upper chord's end: chords (n - p) a / h and (n - p + 1) a / h in
  // panel p, every diagonal d / h, every post but the last 1. Sum of N^2 L / (E A).
  double sum = 0;
  for (int p = 1; p <= t.panels; ++p) {
    const double lower = (t.panels - p) * t.panel / t.depth, upper = (t.panels - p + 1) * t.panel / t.depth;
    sum += (lower * lower + upper * upper) * t.panel / t.chord_area;
    sum += std::pow(t.diagonal / t.depth, 2) * t.diagonal / t.web_area;
    if (p < t.panels) sum += t.depth / t.web_area;
  }
  const double by_hand = 1000 * sum / (210 * GPa);
  // Welded corners stiffen bars of slenderness 60 and more by little.
  CHECK(rim_deflection(d, 1000) == Approx(by_hand).epsilon(0.01));
}

TEST_CASE("a lattice rib of many panels bends like a beam of two chords that shears like its lacing",
          "[parts][truss]") {
  TroughDesign d = truss_row(24);
  d.parabola.aperture = 8;
  d.ribs.depth_at_tube = d.ribs.depth_at_tip = 250 * mm;
  d.ribs.chords = bar(10 * mm);
  d.ribs.webs = bar(6 * mm);
  const FlatTruss t = flat_truss(d);
  const double E = 210 * GPa, I = t.chord_area * t.depth * t.depth / 2;
  // Shear stiffness of an N truss: E a h^2 / (d^3 / A + h^3 / A) (Timoshenko and Gere, Theory of Elastic
  // Stability, laced columns; from memory).
  const double shear = E * t.panel * t.depth * t.depth /
                       (std::pow(t.diagonal, 3) / t.web_area + std::pow(t.depth, 3) / t.web_area);
  const double beam = 100 * (std::pow(t.arm, 3) / (3 * E * I) + t.arm / shear);
  // Chord forces jump by panels: relative to the beam about 1 / (2 n^2), and one post fewer.
  CHECK(rim_deflection(d, 100) == Approx(beam).epsilon(0.01));
}

TEST_CASE("a bent rib is a cantilever of its profile, a plate rib one of its plate", "[parts]") {
  TroughDesign d = support::small_row();
  const double arm = d.parabola.aperture / 2 - lay_out(d).tube_half_width, E = 210 * GPa, G = 81 * GPa;
  const auto cantilever = [&](const fem::Section& s) {
    return 100 * (std::pow(arm, 3) / (3 * E * s.Iy) + arm / (G * s.shear_area_z));
  };
  d.ribs.depth_at_tip = d.ribs.depth_at_tube = 60 * mm;
  CHECK(rim_deflection(d, 100) ==
        Approx(cantilever(fem::flat({.depth_z = 60 * mm, .thickness_y = 3 * mm}))).epsilon(1e-6));
  d.ribs.kind = "bent";
  d.ribs.bar = square(40 * mm, 3 * mm);
  CHECK(rim_deflection(d, 100) == Approx(cantilever(section_of(d.ribs.bar))).epsilon(1e-6));
}

TEST_CASE("a straight lower edge is straight and meets both depths", "[parts]") {
  TroughDesign d = support::small_row();
  d.ribs.lower_edge = "straight";
  d.ribs.depth_at_tube = 0.25;
  d.ribs.depth_at_tip = 0.15;
  const TroughLayout at = lay_out(d);
  CHECK(rib_depth(d, at, at.tube_half_width) == Approx(0.25).epsilon(1e-12));
  CHECK(rib_depth(d, at, at.width / 2) == Approx(0.15).epsilon(1e-12));
  const auto lower = [&](double y) {
    return Vec3(surface_point(0, y, at.focal_length) -
                area_normal(y, at.focal_length).normalized() * (at.rib_line + rib_depth(d, at, y)));
  };
  const Vec3 a = lower(at.tube_half_width), b = lower(at.width / 2);
  for (double y : {0.3, 0.6, 0.9}) {
    const Vec3 p = lower(y);
    CHECK((p - a).cross(b - a).norm() < 1e-12);
  }
  // The mirror sags below its chord, so the middle is shallower than the taper.
  CHECK(rib_depth(d, at, 0.6) < 0.2 - 0.05);
}

TEST_CASE("a square lattice box twists as its shear flow says", "[parts][box]") {
  const double E = 210 * GPa, area = section_of(bar(8 * mm)).A;
  for (const char* bracing : {"zigzag", "cross"}) {
    const TroughDesign d = even_box(0.5, 0.5, 0.5, 12, bracing);
    const double closed = lattice_box_torsion(0.5, 0.5, 0.5, area, E, bracing == std::string("cross"));
    INFO(bracing);
    CHECK(lattice_box_torsion(d, lay_out(d)) == Approx(closed).epsilon(1e-12));
    // Welded chords and lacing bend a little besides.
    CHECK(twist_stiffness_of(d) == Approx(closed).epsilon(0.01));
  }
}

TEST_CASE("a long oblong lattice box, free to warp between its end plates, comes near the shear flow",
          "[parts][box]") {
  const double area = section_of(bar(8 * mm)).A;
  const double closed = lattice_box_torsion(0.6, 0.4, 0.5, area, 210 * GPa, true);
  const double of_frame = twist_stiffness_of(even_box(0.6, 0.4, 0.5, 40, "cross"));
  CHECK(of_frame == Approx(closed).epsilon(0.02));
  CHECK(of_frame > closed);  // end plates and welds only stiffen
}

TEST_CASE("a lattice box weighs what its bars weigh", "[parts][box]") {
  const TroughDesign d = even_box(0.5, 0.4, 0.5, 12, "cross");
  const TroughLayout layout = lay_out(d);
  BodyMaker make;
  const int start = make.node({0, 0, -layout.tube_to_vertex}, "start"),
            end = make.node({layout.module_length, 0, -layout.tube_to_vertex}, "end");
  add_torque_box(d, layout, make, 0, start, end, Vec3::Zero());
  const double chords = 4 * 6.0 * section_of(d.tube.chords).A;
  const double lacing = section_of(d.tube.webs).A *
                        (12 * 2 * 2 * (std::hypot(0.5, 0.5) + std::hypot(0.4, 0.5)) + 11 * 2 * (0.5 + 0.4));
  CHECK(fem::total_mass(make.out.body).mass == Approx(7850 * (chords + lacing)).epsilon(1e-12));
}

TEST_CASE("rows with truss ribs and lattice boxes obey the laws of every row", "[parts][row]") {
  for (const TroughDesign& d : {truss_row(), box_row("zigzag"), box_row("cross")}) {
    INFO(d.ribs.kind << " on " << d.tube.profile.shape << " " << d.tube.bracing);
    const RowModel row(build_trough(d), {});
    const Collector& c = row.collector();
    // Rigid motion of the frame is rigid motion of the skin.
    const Vec3 u(0.3, -0.2, 0.7), w(0.4, 0.5, -0.6);
    Eigen::VectorXd q(c.body.freedoms());
    for (std::size_t n = 0; n < c.body.nodes.size(); ++n) {
      q.segment<3>(6 * static_cast<int>(n)) = u + w.cross(c.body.nodes[n].at);
      q.segment<3>(6 * static_cast<int>(n) + 3) = w;
    }
    const Eigen::VectorXd moved = c.skin.move * q;
    double worst = 0;
    for (int st = 0; st < c.skin.modules * c.skin.stations; ++st)
      for (int r = 0; r < c.skin.rows; ++r) {
        const int s = c.skin.sample(st, r);
        const Vec3 at = surface_point(c.skin.station_x[static_cast<std::size_t>(st)],
                                      c.skin.row_y[static_cast<std::size_t>(r)], c.focal_length);
        worst = std::max(worst, (moved.segment<3>(3 * s) - (u + w.cross(at))).norm());
      }
    CHECK(worst < 1e-10);

    // Condensed against the whole frame: weight at 35 deg, the drive's bearing.
    const double elevation = 35 * deg;
    const PoseModel pose = row.pose(elevation);
    const FullFrame full = full_frame(c, elevation);
    fem::LoadCase load;
    load.gravity = {0, 0, -standard_gravity};
    const fem::Response response = fem::StaticSolver(full.frame).solve(load);
    const Eigen::VectorXd ends = row.evaluate(row.end_force, pose, weight_amplitudes(row, elevation));
    double difference = 0, scale = 0;
    for (int m = 0; m < static_cast<int>(c.body.members.size()); ++m)
      for (int i = 0; i < 12; ++i) {
        scale = std::max(scale, std::abs(ends[12 * m + i]));
        difference = std::max(difference,
                              std::abs(ends[12 * m + i] - response.end_force(full.first_body_member + m, i)));
      }
    CHECK(difference < 1e-6 * scale);
  }
}

TEST_CASE("a row with truss ribs and a crossed box is the same from both sides", "[parts][assess]") {
  TroughDesign d = box_row("cross");
  d.row.modules = 2;
  const Assessment a = assess(d, support::test_table());
  const auto light = [&](double elevation, double from) {
    for (const OpticalRow& row : a.optics)
      if (!row.calm && std::abs(row.state.elevation - elevation) < 1e-9 && row.state.wind_from == from)
        return row.result.intercept;
    return -1.0;
  };
  for (double e : {15.0, 60.0})
    CHECK(light(e * deg, 0) == Approx(light((180 - e) * deg, std::numbers::pi)).epsilon(1e-6));
  CHECK(a.proof.balance < 1e-9);
  CHECK(std::abs(a.proof.slope_change) < 0.01);
  CHECK(a.tube_torsion == Approx(lattice_box_torsion(d, lay_out(d))));
  // Every part of both lattices is judged for stress and for buckling.
  for (const char* group : {"rib chord", "rib web", "box chord", "box web"}) {
    INFO(group);
    CHECK(a.strength.groups.count(group) == 1);
    CHECK(a.strength.buckling.at(group).used > 0);
  }
}

TEST_CASE("an angle bends about its principal axes whatever way it is turned", "[parts][profile]") {
  // L 60 x 40 x 5: Iu 19.7, Iv 3.54 cm4, tan alpha 0.43 (EN 10056-1 tables; here by the outline with radii).
  ProfileInput p;
  p.shape = "angle";
  p.depth = 60 * mm;
  p.width = 40 * mm;
  p.thickness = 5 * mm;
  p.root_radius = 6 * mm;
  p.toe_radius = 3 * mm;
  p.material = "S235";
  const double Iu = 19.749e-8, Iv = 3.5420e-8, tilt = std::atan(0.4335);
  const double mean = (Iu + Iv) / 2, half = (Iu - Iv) / 2;
  const double Iy = mean + half * std::cos(2 * tilt), Iz = mean - half * std::cos(2 * tilt),
               Iyz = -half * std::sin(2 * tilt);  // both legs point to positive y and z from the heel
  const double E = 210 * GPa, L = 2, F = 50, k = F * L * L * L / (3 * E * (Iy * Iz - Iyz * Iyz));
  for (double turned : {0.0, 90 * deg, 30 * deg}) {
    p.turned = turned;
    fem::Frame frame;
    frame.nodes = {{Vec3::Zero(), "a"}, {Vec3(L, 0, 0), "b"}};
    frame.materials = {material_of("S235", 5 * mm)};
    fem::Section s = section_of(p);
    s.shear_area_y = s.shear_area_z = 0;
    frame.sections = {s};
    fem::Member m;
    m.to = 1;
    m.up = rolled_up(p, Vec3::UnitX(), Vec3::UnitZ());
    frame.members = {m};
    frame.supports = {{0, held, fem::Vec6::Zero()}};
    // Along the turned upright leg.
    const Vec3 leg_z(0, -std::sin(turned), std::cos(turned)), leg_y(0, std::cos(turned), std::sin(turned));
    fem::LoadCase load;
    load.nodes = {{1, F * leg_z, Vec3::Zero()}};
    const auto u = fem::StaticSolver(frame).solve(load).displacement;
    const Vec3 moved(u(1, 0), u(1, 1), u(1, 2));
    INFO("turned " << turned / deg);
    CHECK(moved.dot(leg_z) == Approx(k * Iz).epsilon(2e-3));
    CHECK(moved.dot(leg_y) == Approx(-k * Iyz).epsilon(2e-3));
  }
}

TEST_CASE("corner radii and raw properties reach the section", "[parts][profile]") {
  // 60 x 60 x 5 hot finished, EN 10210-2: A 10.7 cm2, I 53.3 cm4, It 86.4 cm4 (tables; recomputed 10.732,
  // 53.259, 86.397).
  ProfileInput p = square(60 * mm, 5 * mm);
  p.outer_radius = 7.5 * mm;
  p.inner_radius = 5 * mm;
  CHECK(section_of(p).A == Approx(10.732e-4).epsilon(1e-4));
  CHECK(section_of(p).Iy == Approx(53.259e-8).epsilon(1e-4));
  CHECK(section_of(p).J == Approx(86.397e-8).epsilon(1e-4));
  ProfileInput raw;
  raw.shape = "properties";
  raw.depth = 0.1;
  raw.area = 1e-3;
  raw.Iy = 2e-6;
  raw.Iz = 1e-6;
  raw.J = 3e-6;
  raw.Wy = 4e-5;
  raw.Wz = 2e-5;
  raw.Wt = 5e-5;
  const fem::Section s = section_of(raw);
  CHECK(s.Iy == 2e-6);
  CHECK(s.Wt == 5e-5);
  CHECK(s.shear_area_z == 0);  // rigid in shear
}

TEST_CASE("the buckling curves give published reductions", "[parts][buckling]") {
  const fem::Material steel = material_of("S355", 5 * mm);
  // Steel Buildings in Europe, Multi-Storey Part 4, example A.5: HE 300 B, 0.655 on curve b gives 0.808.
  CHECK(reduction(0.655415, {0.34, 0.2}) == Approx(0.808).margin(5e-4));
  // EN 1993-1-1 6.3.1.2 curve c, evaluated: cold-formed hollow sections.
  const ColumnCurve c = column_curve("square-tube", steel);
  CHECK(reduction(0.5, c) == Approx(0.842991).margin(1e-6));
  CHECK(reduction(1.0, c) == Approx(0.539939).margin(1e-6));
  CHECK(reduction(2.0, c) == Approx(0.196184).margin(1e-6));
  CHECK(reduction(0.1, c) == 1);
  CHECK(reduction(1.0, column_curve("angle", steel)) == Approx(0.597023).margin(1e-6));
}

TEST_CASE("a pushed tube is used by its share of the buckling load", "[parts][buckling]") {
  // Square tube 150 x 6, cold formed, S355, 5 m: 564.9 kN on curve c (EN 1993-1-1, computed here and by
  // hand).
  fem::Frame frame;
  frame.nodes = {{Vec3::Zero(), "a"}, {Vec3(5, 0, 0), "b"}};
  frame.materials = {material_of("S355", 6 * mm)};
  frame.sections = {section_of(square(150 * mm, 6 * mm, "S355"))};
  fem::Member m;
  m.to = 1;
  frame.members = {m};
  const auto r = buckling_resistances(frame, {{0, 5, 5, 0, "square-tube"}}, 1);
  REQUIRE(r.size() == 1);
  CHECK(r[0].N == Approx(564.935e3).epsilon(1e-3));
  Eigen::VectorXd ends = Eigen::VectorXd::Zero(12);
  ends[0] = 100e3;
  ends[6] = -100e3;
  CHECK(buckling_share(r[0], ends).used == Approx(100e3 / r[0].N).epsilon(1e-12));
  CHECK(buckling_share(r[0], -ends).used == 0);  // pulled
  // An end moment grows by 1 / (1 - N / Ncr), Ncr = 950.0 kN.
  ends[4] = 10e3;
  CHECK(buckling_share(r[0], ends).used ==
        Approx(100e3 / r[0].N + 10e3 / (1 - 100.0 / 950.005) / (152.79e-6 * 355e6)).epsilon(2e-3));
  // Aluminium, EN 1999-1-1: tube 100 x 4, 2.5 m, EN AW-6063-T5 (fo 130 MPa, class B), gamma 1.1: 80.79 kN.
  fem::Material light = frame.materials[0];
  light.E = 70 * GPa;
  light.yield = 130 * MPa;
  frame.materials = {light};
  frame.sections = {fem::round_tube({.outside_diameter = 100 * mm, .wall = 4 * mm})};
  CHECK(buckling_resistances(frame, {{0, 2.5, 2.5, 0, "round-tube"}}, 1)[0].N ==
        Approx(80.7938e3).epsilon(1e-4));
}

TEST_CASE("a narrow strip buckles sideways at the classical moment", "[parts][buckling]") {
  // 100 x 10 mm aluminium over 1 m: pi / L sqrt(E Iz G J) = 2.200 kN m with J = 31233 mm4 (computed here).
  fem::Material light;
  light.E = 70 * GPa;
  light.G = light.E / 2.6;
  light.yield = 200 * MPa;
  const fem::Section strip = fem::flat({.depth_z = 100 * mm, .thickness_y = 10 * mm});
  CHECK(critical_moment(strip, light, 1) == Approx(2200.29).epsilon(1e-3));
  // Halving what is not held doubles it; holding the sheet takes the reduction off.
  CHECK(critical_moment(strip, light, 0.5) == Approx(2 * critical_moment(strip, light, 1)).epsilon(1e-12));
  fem::Frame frame;
  frame.nodes = {{Vec3::Zero(), "a"}, {Vec3(1, 0, 0), "b"}};
  frame.materials = {light};
  frame.sections = {strip};
  fem::Member m;
  m.to = 1;
  frame.members = {m};
  const double free = buckling_resistances(frame, {{0, 1, 1, 1, "flat"}}, 1)[0].My;
  const double sheeted = buckling_resistances(frame, {{0, 1, 1, 0, "flat"}}, 1)[0].My;
  CHECK(sheeted == Approx(strip.Wy * 200 * MPa / 1.1).epsilon(1e-12));
  CHECK(free < 0.8 * sheeted);
}

TEST_CASE("parts that do not fit their kind are refused by name", "[parts][rules]") {
  const auto stops = [](const TroughDesign& d) {
    std::string all;
    for (const Violation& v : validate(d))
      if (v.level == Violation::Level::stop) all += v.element + "/" + v.attribute + ": " + v.text + "\n";
    return all;
  };
  CHECK(stops(truss_row()).empty());
  CHECK(stops(box_row()).empty());
  TroughDesign d = truss_row();
  d.ribs.webs = {};
  CHECK_THAT(stops(d), Catch::Contains("needs <webs> inside <ribs>"));
  d = truss_row();
  d.ribs.thickness = 3 * mm;
  CHECK_THAT(stops(d), Catch::Contains("truss has no \"thickness\""));
  d = support::small_row();
  d.ribs.lower_edge = "straight";
  CHECK_THAT(stops(d), Catch::Contains("more at both ends would do"));
  d = box_row();
  d.receiver.posts.per_module = 7;
  CHECK_THAT(stops(d), Catch::Contains("one each"));
  d = box_row();
  d.tube.chords = {};
  CHECK_THAT(stops(d), Catch::Contains("needs <chords>"));
  d = support::small_row();
  d.purlins.profile.shape = "channel";
  CHECK_THAT(stops(d), Catch::Contains("channel needs depth, width, web or flange"));
}
