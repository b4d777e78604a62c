// Textbook cases typed as files: every thing a kind="frame" design can say, against published values.

#include <catch2/catch.hpp>
#include <cmath>
#include <numbers>
#include <string>

#include "cli/frame_file.h"
#include "cli/frame_results.h"
#include "cli/frame_text.h"

using namespace focalframe;
using namespace focalframe::cli;
using Catch::Contains;

namespace {

struct Solved {
  FrameFile file;
  FrameResults results;
  Eigen::Index index(const std::string& node) const {
    for (std::size_t n = 0; n < file.frame.nodes.size(); ++n)
      if (file.frame.nodes[n].name == node) return static_cast<Eigen::Index>(n);
    return -1;
  }
  double u(const std::string& node, int dof, std::size_t at = 0) const {
    return results.cases.at(at).response.displacement(index(node), dof);
  }
  double r(const std::string& node, int dof, std::size_t at = 0) const {
    return results.cases.at(at).response.reaction(index(node), dof);
  }
};

Solved solve(const std::string& inside, int modes = 0, int buckling = 0) {
  const DesignFile design = read_design_text(
      "<collector name=\"t\" kind=\"frame\">\n<frame>\n" + inside + "</frame>\n</collector>\n", "frame.xml");
  Solved s{read_frame(design), {}};
  INFO(to_text(s.file.messages, true));
  REQUIRE_FALSE(has_stop(s.file.messages));
  s.results = compute_frame(s.file, modes, buckling);
  for (const FrameCase& one : s.results.cases) CHECK(one.balance < 1e-9);
  return s;
}

// E I = 210 GPa x 8e-6 m4 = 1.68e6 N m2, no shear flexibility.
const std::string stuff =
    "<material id='s' E='210 GPa' G='81 GPa' expansion='12e-6 1/K'/>\n"
    "<section id='p' shape='properties' area='0.004 m2' Iy='8e-6 m4' Iz='8e-6 m4' J='16e-6 m4'/>\n";

std::string beam(double length, const std::string& more, const std::string& a = "ux uy uz rx ry rz",
                 const std::string& b = "") {
  return stuff + "<node id='a' x='0 m' y='0 m' z='0 m'/><node id='b' x='" + std::to_string(length) +
         " m' y='0 m' z='0 m'/>\n<member id='m' from='a' to='b' section='p' material='s'/>\n"
         "<support node='a' fix='" +
         a + "'/>\n" + (b.empty() ? "" : "<support node='b' fix='" + b + "'/>\n") + more;
}

Approx near(double value, double relative = 1e-5) { return Approx(value).epsilon(relative).margin(0); }

constexpr double EI = 1.68e6;

}  // namespace

TEST_CASE("Hibbeler's frame of a column and a beam typed as a file gives his table", "[frame]") {
  // Hibbeler, Structural Analysis, example 16.1, SI edition: displacements 17.51e-3 m, -37.47e-6 m,
  // -2.505e-3 rad, 17.51e-3 m, 1.243e-3 rad; forces -7.50, -20, 7.50 kN, 75 kN m. Each to its last digit.
  const Solved s = solve(
      "<material id='s' E='200 GPa'/>\n"
      "<section id='p' shape='properties' area='6000 mm2' Iy='180e6 mm4' Iz='180e6 mm4' J='180e6 mm4'/>\n"
      "<node id='1' x='0 m' y='6 m' z='0 m'/><node id='2' x='6 m' y='6 m' z='0 m'/>\n"
      "<node id='3' x='6 m' y='0 m' z='0 m'/>\n"
      "<member id='beam' from='2' to='1' section='p' material='s'/>\n"
      "<member id='column' from='3' to='2' section='p' material='s'/>\n"
      "<support node='1' fix='uy uz rx ry'/><support node='3' fix='ux uy uz rx ry rz'/>\n"
      "<load case='push' node='2' fx='20 kN'/>\n");
  CHECK(s.u("2", 0) == Approx(17.51e-3).margin(0.005e-3).epsilon(0));
  CHECK(s.u("2", 1) == Approx(-37.47e-6).margin(0.01e-6).epsilon(0));
  CHECK(s.u("2", 5) == Approx(-2.505e-3).margin(0.0005e-3).epsilon(0));
  CHECK(s.u("1", 0) == Approx(17.51e-3).margin(0.005e-3).epsilon(0));
  CHECK(s.u("1", 5) == Approx(1.243e-3).margin(0.0005e-3).epsilon(0));
  CHECK(s.r("1", 1) == Approx(-7.50e3).margin(5).epsilon(0));
  CHECK(s.r("3", 0) == Approx(-20e3).margin(5).epsilon(0));
  CHECK(s.r("3", 1) == Approx(7.50e3).margin(5).epsilon(0));
  CHECK(s.r("3", 5) == Approx(75.0e3).margin(50).epsilon(0));
}

TEST_CASE("a load that grows along a member, one on a part of it and one at a point", "[frame]") {
  // Cantilever of 3 m, triangular load 500 N/m at the root: w L^4 / 30 E I, w L^3 / 24 E I (any table).
  const Solved triangle = solve(beam(3, "<member-load case='1' member='m' fy='-500 N/m' fy-to='0 N/m'/>\n"));
  CHECK(triangle.u("b", 1) == near(-8.03571e-4));
  CHECK(triangle.u("b", 5) == near(-3.34821e-4));
  // The same from two parts, in member axes (here those of the frame: y = z x x).
  const Solved parts = solve(
      beam(3,
           "<member-load case='1' member='m' fy='-500 N/m' fy-to='-250 N/m' to='1.5 m' axes='member'/>\n"
           "<member-load case='1' member='m' fy='-250 N/m' fy-to='0 N/m' from='1500 mm'/>\n"));
  CHECK(parts.u("b", 1) == near(-8.03571e-4));
  // Simple span of 4 m, 1000 N at 1 m: end rotations P a b (L + b) / 6 L E I and P a b (L + a) / 6 L E I.
  const Solved point =
      solve(beam(4, "<point-load case='1' member='m' at='1 m' fy='-1 kN'/>\n", "ux uy uz rx", "uy uz"));
  CHECK(point.u("a", 5) == near(-5.20833e-4));
  CHECK(point.u("b", 5) == near(3.72024e-4));
  CHECK(point.r("a", 1) == near(750));
  // A couple at mid-span of the same beam: end reactions M / L, opposite.
  const Solved couple =
      solve(beam(4, "<point-load case='1' member='m' at='2 m' mz='1 kN m'/>\n", "ux uy uz rx", "uy uz"));
  CHECK(couple.r("a", 1) == near(250));
  CHECK(couple.r("b", 1) == near(-250));
}

TEST_CASE("the greatest moment and bow between the nodes are found and printed", "[frame]") {
  // Propped cantilever of 4 m, 500 N/m: clamp w L^2 / 8 = 1000 N m; 9 w L^2 / 128 = 562.5 N m at 3/8 L from
  // the prop; greatest deflection 4.12657e-4 m at 1.68614 m from it (Lindeburg, Civil Engineering Reference
  // Manual, from its summary: 0.00541 w L^4 / E I at 0.4215 L).
  const Solved s =
      solve(beam(4, "<member-load case='1' member='m' fy='-500 N/m'/>\n", "ux uy uz rx ry rz", "uy uz"));
  const fem::Extremes& e = s.results.cases.at(0).extremes.at(0);
  CHECK(std::max(std::abs(e.most_Mz.value), std::abs(e.least_Mz.value)) == near(1000));
  CHECK(std::min(std::abs(e.most_Mz.value), std::abs(e.least_Mz.value)) == near(562.5));
  CHECK(e.least_y.value == near(-4.12657e-4));
  CHECK(e.least_y.at == near(1 - 0.421535, 1e-4));
  const std::string text = frame_text("t", "0123456789", s.file, s.results, false);
  INFO(text);
  CHECK_THAT(text, Contains("extreme moment        1 kN m") || Contains("extreme moment        -1 kN m"));
  CHECK_THAT(text, Contains("bows from its chord") && Contains("along y of member m at 0.58"));
}

TEST_CASE("a settling support loads a clamped span in its own case only", "[frame]") {
  // Clamped span of 4 m, one end sinks by 5 mm: M = 6 E I d / L^2 = 3150 N m, V = 12 E I d / L^3 = 1575 N.
  const Solved s = solve(beam(4,
                              "<support-movement case='sinks' node='b' uy='-5 mm'/>\n"
                              "<load case='rest' node='b' fx='1 N'/>\n",
                              "ux uy uz rx ry rz", "ux uy uz rx ry rz"));
  CHECK(s.u("b", 1) == near(-5e-3));
  CHECK(s.r("a", 1) == near(1575));
  CHECK(s.r("a", 5) == near(3150));
  CHECK(s.u("b", 1, 1) == 0);
  CHECK(std::abs(s.r("a", 5, 1)) < 1e-9);
}

TEST_CASE("warmth presses a held bar and a warm side bends a free one", "[frame]") {
  // E alpha dT A = 403.2 kN; alpha (dT / h) L^2 / 2 = 8.1 mm for 30 K over 0.2 m, L = 3 m.
  const Solved held = solve(beam(3, "<temperature case='1' change='40 K'/>\n", "ux uy uz rx ry rz", "ux"));
  CHECK(held.r("b", 0) == near(-403.2e3));
  const Solved bent = solve(beam(3, "<temperature case='1' member='m' gradient-y='150 K/m'/>\n"));
  CHECK(std::abs(bent.u("b", 1)) == near(8.1e-3));
  CHECK(bent.u("b", 1) < 0);  // the warm side is y+ and grows longer
}

TEST_CASE("a hinge in a beam passes force and no moment", "[frame]") {
  // Gerber beam: clamped at a, hinge 2 m on, roller 3 m further, 1 kN/m on the far part. Statics alone:
  // roller and hinge 1.5 kN each, M_a = 3 kN m; the hinge sinks by 1.5 kN a^3 / 3 E I.
  const std::string joint =
      GENERATE(as<std::string>{}, "<joint id='h' node='b' other='c' hold='ux uy uz rx ry'/>\n",
               "<joint id='h' node='c' other='b' hold='uy ux uz rx rz' x-axis='0 1 0' "
               "up='-1 0 0'/>\n");
  // The second joint has x along frame y and z along frame -x, so its y is frame -z: free about y.
  const Solved s = solve(beam(2,
                              "<node id='c' x='2 m' y='0 m' z='0 m'/><node id='d' x='5 m' y='0 m' z='0 m'/>\n"
                              "<member id='n' from='c' to='d' section='p' material='s'/>\n"
                              "<support node='d' fix='uy uz'/>\n"
                              "<member-load case='1' member='n' fy='-1 kN/m'/>\n" +
                                  joint));
  CHECK(s.r("d", 1) == near(1500));
  CHECK(s.r("a", 5) == near(3000));
  CHECK(s.u("b", 1) == near(-1500 * 8 / (3 * EI)));
  CHECK(s.u("c", 1) == near(-1500 * 8 / (3 * EI)));
  CHECK(s.u("c", 5) != near(s.u("b", 5), 1e-2));
}

TEST_CASE("a roller on a slope of 45 degrees pushes the span along", "[frame]") {
  // Span of 4 m, 1 kN in the middle; the slope's normal is (-1, 1) / sqrt 2, so the roller gives 500 N up
  // and 500 N back, and the pin takes that.
  const Solved s = solve(beam(4, "<point-load case='1' member='m' at='2 m' fy='-1 kN'/>\n", "ux uy uz rx") +
                         "<support node='b' fix='uy uz' x-axis='1 1 0'/>\n");
  CHECK(s.r("a", 0) == near(500));
  CHECK(s.r("a", 1) == near(500));
  CHECK(s.r("ground of b", 0) == near(-500));
  CHECK(s.r("ground of b", 1) == near(500));
  CHECK(s.u("b", 0) == near(s.u("b", 1)));  // it moves along the slope
}

TEST_CASE("a rigid arm carries its load's moment into the member", "[frame]") {
  // Cantilever of 3 m whose node lies 0.5 m beside its tip, 1 kN there: P L^3 / 3 E I + P a^2 L / G J.
  const Solved s = solve(stuff +
                         "<node id='a' x='0 m' y='0 m' z='0 m'/><node id='c' x='3 m' y='0.5 m' z='0 m'/>\n"
                         "<member id='m' from='a' to='c' section='p' material='s'/>\n"
                         "<offset member='m' end='to' y='-500 mm'/>\n"
                         "<support node='a' fix='ux uy uz rx ry rz'/><load case='1' node='c' fz='1 kN'/>\n");
  CHECK(s.u("c", 2) == near(1000 * 27 / (3 * EI) + 1000 * 0.25 * 3 / (81e9 * 16e-6)));
  CHECK(s.u("c", 3) == near(1000 * 0.5 * 3 / (81e9 * 16e-6)));
}

TEST_CASE("an elastic clamp adds P L / k to the tip's turn", "[frame]") {
  const Solved s = solve(beam(3,
                              "<load case='1' node='b' fy='-1 kN'/>\n"
                              "<end-spring member='m' end='from' rz='2 MN m/rad'/>\n"));
  CHECK(s.u("b", 5) == near(-(1000 * 9 / (2 * EI) + 1000 * 3 / 2e6)));
  CHECK(s.u("b", 1) == near(-(1000 * 27 / (3 * EI) + 1000 * 9 / 2e6)));
}

TEST_CASE("springs between nodes act along their own axes", "[frame]") {
  // A bar of 0.5 m, guided at its head d, on a slanted spring at its foot b: along (1, 1) 100 kN/m, across
  // 400 kN/m. The head moves by P / k and by the bar's own P h^3 / 3 E I.
  const Solved s =
      solve(stuff +
            "<node id='b' x='1 m' y='1 m' z='0 m'/><node id='d' x='1 m' y='1 m' z='0.5 m'/>\n"
            "<node id='ground' x='1 m' y='1 m' z='0 m'/>\n"
            "<member id='n' from='d' to='b' section='p' material='s' up='1 0 0'/>\n"
            "<support node='d' fix='uz rx ry rz'/><support node='ground' fix='ux uy uz rx ry rz'/>\n"
            "<spring id='stay' node='b' other='ground' ux='100 kN/m' uy='400 kN/m' x-axis='1 1 0'/>\n"
            "<load case='1' node='d' fx='1 kN' fy='1 kN'/>\n"
            "<load case='2' node='d' fx='-1 kN' fy='1 kN'/>\n");
  const double own = 0.125 / (3 * EI);
  CHECK(s.u("d", 0) == near(1000 * (own + 1 / 100e3)));
  CHECK(s.u("d", 1) == near(1000 * (own + 1 / 100e3)));
  CHECK(s.u("d", 1, 1) == near(1000 * (own + 1 / 400e3)));
  CHECK(s.results.cases[0].response.spring_force(0, 0) == near(-1000 * std::sqrt(2.0)));
}

TEST_CASE("an inertia on a massless shaft and a mass beside its node swing as they must", "[frame]") {
  // G J / L = 799 101 N m/rad and 500 kg m2: 6.36262 Hz.
  const Solved s = solve(
      "<material id='s' E='210 GPa' G='81 GPa'/>\n"
      "<section id='t' shape='round-tube' outside-diameter='219.1 mm' wall='8 mm'/>\n"
      "<node id='a' x='0 m' y='0 m' z='0 m'/><node id='b' x='6 m' y='0 m' z='0 m'/>\n"
      "<member id='m' from='a' to='b' section='t' material='s'/>\n"
      "<support node='a' fix='ux uy uz rx ry rz'/><support node='b' fix='ux uy uz ry rz'/>\n"
      "<mass node='b' value='0 kg' Ixx='500 kg m2' Iyy='250 kg m2' Izz='250 kg m2'/>\n",
      1);
  CHECK(s.results.modes.modes.at(0).frequency == near(6.36262));
  const Solved offset = solve(
      "<material id='s' E='210 GPa' G='81 GPa'/>\n"
      "<section id='t' shape='round-tube' outside-diameter='219.1 mm' wall='8 mm'/>\n"
      "<node id='a' x='0 m' y='0 m' z='0 m'/><node id='b' x='6 m' y='0 m' z='0 m'/>\n"
      "<member id='m' from='a' to='b' section='t' material='s'/>\n"
      "<support node='a' fix='ux uy uz rx ry rz'/><support node='b' fix='ux uy uz ry rz'/>\n"
      "<mass id='counterweight' node='b' value='125 kg' z='-2 m'/>\n",
      1);
  CHECK(offset.results.modes.modes.at(0).frequency == near(6.36262));
}

TEST_CASE("an angle bends about its principal axes although the file names its leg", "[frame]") {
  // L 100 x 10 (EN 10056-1: Iu = 280 cm4, Iv = 73.0 cm4), cantilever of 2 m, 500 N down along a leg:
  // down P L^3 / 3 E (1 / Iu + 1 / Iv) / 2, sideways P L^3 / 3 E (1 / Iv - 1 / Iu) / 2.
  const Solved s = solve(
      "<material id='s' E='210 GPa' G='81 GPa'/>\n"
      "<section id='l' shape='angle' depth='100 mm' width='100 mm' thickness='10 mm' root-radius='12 mm' "
      "toe-radius='6 mm'/>\n"
      "<node id='a' x='0 m' y='0 m' z='0 m'/><node id='b' x='2 m' y='0 m' z='0 m'/>\n"
      "<member id='m' from='a' to='b' section='l' material='s' up='0 0 1'/>\n"
      "<support node='a' fix='ux uy uz rx ry rz'/><load case='1' node='b' fz='-500 N'/>\n");
  const double c = 500 * 8 / (3 * 210e9), Iu = 280e-8, Iv = 73.0e-8;
  CHECK(s.u("b", 2) == near(-c * (1 / Iu + 1 / Iv) / 2, 6e-3));  // 0.3 % is shear
  // Both legs point up and to +y from the heel; it gives way across its weak axis, towards the heel.
  CHECK(s.u("b", 1) == near(-c * (1 / Iv - 1 / Iu) / 2, 3e-3));
  CHECK(s.file.frame.sections[0].Iy == near(280e-8, 2e-3));
}

TEST_CASE("a channel lies with its web along up", "[frame]") {
  // Sharp-cornered 100 x 50 x 6 x 8.5 mm by hand: Iy = (50 x 100^3 - 44 x 83^3) / 12 = 2.0700e6 mm4.
  const Solved s = solve(
      "<material id='s' E='210 GPa' G='81 GPa'/>\n"
      "<section id='u' shape='channel' depth='100 mm' width='50 mm' web='6 mm' flange='8.5 mm'/>\n"
      "<node id='a' x='0 m' y='0 m' z='0 m'/><node id='b' x='2 m' y='0 m' z='0 m'/>\n"
      "<member id='m' from='a' to='b' section='u' material='s' up='0 0 1'/>\n"
      "<support node='a' fix='ux uy uz rx ry rz'/><load case='1' node='b' fz='-500 N'/>\n");
  const double Iy = (50 * 1e6 - 44 * std::pow(83, 3)) / 12 * 1e-12;
  CHECK(s.file.frame.sections[0].Iy == near(Iy));
  const double shear = 500 * 2 / (81e9 * s.file.frame.sections[0].shear_area_z);
  CHECK(s.u("b", 2) == near(-500 * 8 / (3 * 210e9 * Iy) - shear));
}

TEST_CASE("a clamped column typed as one member buckles at four times Euler's load", "[frame]") {
  const Solved s =
      solve(beam(4, "<load case='1' node='b' fx='-1 MN'/>\n", "ux uy uz rx ry rz", "uy uz rx ry rz"), 0, 3);
  const auto& modes = s.results.cases.at(0).buckling.modes;
  REQUIRE_FALSE(modes.empty());
  CHECK(modes.front().factor == near(4.14523, 1.5e-3));
  const std::string text = modes_text("t", "0123456789", s.file, s.results);
  INFO(text);
  CHECK_THAT(text, Contains("bending of m") && Contains("none is missing") &&
                       Contains("members divided into up to"));
  CHECK_THAT(text, Contains("second order"));
}

TEST_CASE("second-order growth is printed and judged when the buckling factor is below 10", "[frame]") {
  // AISC 360 commentary C2.1 benchmark, case 1 (published without shear: 0.311 in at 450 kip against 0.197
  // without axial force), typed in kips and inches.
  const Solved s = solve(
      "<material id='s' E='29000 ksi' G='11200 ksi' yield='50 ksi'/>\n"
      "<section id='w' shape='properties' area='14.1 in2' Iy='484 in4' Iz='484 in4' J='100 in4' Wy='70.2 "
      "in3' "
      "Wz='70.2 in3'/>\n"
      "<node id='a' x='0 ft' y='0 ft' z='0 ft'/><node id='c' x='14 ft' y='0 ft' z='0 ft'/>\n"
      "<node id='b' x='28 ft' y='0 ft' z='0 ft'/>\n"
      "<member id='m' from='a' to='c' section='w' material='s'/>\n"
      "<member id='n' from='c' to='b' section='w' material='s'/>\n"
      "<support node='a' fix='ux uy uz rx'/><support node='b' fix='uy uz'/>\n"
      "<member-load case='1' member='m' fy='-0.2 kip/ft'/><member-load case='1' member='n' fy='-0.2 "
      "kip/ft'/>\n"
      "<load case='1' node='b' fx='-450 kip'/>\n",
      0, 1);
  const FrameSecondOrder& bent = s.results.cases.at(0).second_order;
  REQUIRE(bent.asked);
  REQUIRE(bent.stable);
  const std::string text = frame_text("t", "0123456789", s.file, s.results, false);
  INFO(text);
  CHECK_THAT(text, Contains("second order") && Contains("instead of"));
  // The stress in the bent shape: N / A + M / W with the recomputed 375.414 kip in at mid-span, at the nodes'
  // own pieces (0.5 % for the shear that the bound adds).
  const double ksi = 6.894757293e6;
  CHECK(bent.stress == Approx((450 / 14.1 + 375.414 / 70.2) * ksi).epsilon(5e-3));
  CHECK(bent.used == Approx((450 / 14.1 + 375.414 / 70.2) / 50).epsilon(5e-3));
}

TEST_CASE("slips in the newer words of a frame are said with what they should be", "[frame]") {
  struct Slip {
    const char *element, *said;
  };
  const Slip slips[] = {
      {"<offset member='m' end='tip' x='1 m'/>", "This is one of: from to"},
      {"<offset member='m' end='to'/>", "at least one of: x y z"},
      {"<offset member='m' end='to' x='1 mm'/><offset member='m' end='to' x='1 mm'/>", "already, in line"},
      {"<end-spring member='m' end='to'/>", "at least one of"},
      {"<end-spring member='m' end='to' rz='0 N m/rad'/>", "more than 0"},
      {"<joint id='j' node='a' other='b' hold='ux'/>", "m apart"},
      {"<joint id='j' node='a' other='a' hold='ux'/>", "two different nodes"},
      {"<joint id='j' node='a' other='b' hold=''/>", "holds nothing"},
      {"<spring node='a' other='b' ux='rigid'/>", "is a <joint>"},
      {"<spring node='a' other='a' ux='1 N/m'/>", "two different"},
      {"<spring node='a' ux='1 N/m' up='0 0 1'/>", "need \"x-axis\" too"},
      {"<spring node='a' ux='1 N/m' x-axis='0 0 1' up='0 0 2'/>", "parallel to \"x-axis\""},
      {"<member-load case='1' member='m' fy='1 N/m' from='2 m' to='1 m'/>", "must lie behind"},
      {"<member-load case='1' member='m' fy='1 N/m' to='9 m'/>", "outside the member, which is 3 m long"},
      {"<member-load case='1' member='m' fy='1 N/m' axes='world'/>", "This is one of: frame member"},
      {"<point-load case='1' member='m' at='-1 m' fy='1 N'/>", "outside the member"},
      {"<point-load case='1' member='m' at='1 m'/>", "at least one of"},
      {"<temperature case='1' change='20 degC'/>", "a difference of two temperatures"},
      {"<support-movement case='1' node='b' uy='1 mm'/>", "No support holds uy"},
      {"<material id='x' E='70 GPa'/><member id='k' from='a' to='b' section='p' material='x'/><temperature "
       "case='1' change='20 K'/>",
       "has no \"expansion\""},
      {"<section id='l' shape='angle' depth='50 mm' width='50 mm' thickness='60 mm'/>",
       "do not make a section"},
      {"<section id='l' shape='angle' depth='50 mm' width='50 mm'/>", "\"thickness\" is missing"},
      {"<section id='l' shape='flat' depth='50 mm' thickness='5 mm' round='yes'/>",
       "Only a section of shape"},
  };
  for (const Slip& slip : slips) {
    INFO(slip.element);
    const DesignFile design = read_design_text("<collector name=\"t\" kind=\"frame\">\n<frame>\n" +
                                                   beam(3, slip.element) + "</frame>\n</collector>\n",
                                               "frame.xml");
    const FrameFile file = read_frame(design);
    const std::string text = to_text(file.messages, true);
    INFO(text);
    REQUIRE(has_stop(file.messages));
    bool said = false;
    for (const Message& m : file.messages)
      said = said || (m.level == Level::stop && m.text.find(slip.said) != std::string::npos && m.line > 0);
    CHECK(said);
  }
}

TEST_CASE("parts that lie on each other, touch or hang loose are found before solving, by line", "[frame]") {
  struct Slip {
    const char *element, *said;
  };
  const Slip slips[] = {
      {"<member id='twin' from='b' to='a' section='p' material='s'/>", "lies on member"},
      {"<node id='c' x='3 m' y='0 m' z='0 m'/><node id='d' x='3 m' y='1 m' z='0 m'/><member id='n' from='c' "
       "to='d' section='p' material='s'/>",
       "lie in one place and nothing connects them"},
      {"<node id='c' x='9 m' y='0 m' z='0 m'/><node id='d' x='9 m' y='1 m' z='0 m'/><member id='n' from='c' "
       "to='d' section='p' material='s'/>",
       "not connected with the rest"},
      {"<node id='lost' x='9 m' y='0 m' z='0 m'/>", "not connected with the rest"},
  };
  for (const Slip& slip : slips) {
    INFO(slip.element);
    const DesignFile design = read_design_text("<collector name=\"t\" kind=\"frame\">\n<frame>\n" +
                                                   beam(3, slip.element) + "</frame>\n</collector>\n",
                                               "frame.xml");
    const FrameFile file = read_frame(design);
    INFO(to_text(file.messages, true));
    bool said = false;
    for (const Message& m : file.messages)
      said = said || (m.level == Level::stop && m.text.find(slip.said) != std::string::npos && m.line > 3);
    CHECK(said);
  }
}

TEST_CASE("a frame that is nearly a mechanism is solved and said to be one", "[frame]") {
  const Solved s = solve(beam(3,
                              "<spring id='soil' node='a' ry='1e-4 N m/rad' rz='1 MN m/rad'/>\n"
                              "<load case='1' node='b' fy='-1 kN'/>\n",
                              "ux uy uz rx"));
  CHECK(s.results.smallest_pivot_ratio < 1e-7);
  const std::string text = frame_text("t", "0123456789", s.file, s.results, false);
  INFO(text);
  CHECK_THAT(text, Contains("nearly a mechanism") && Contains("the stiffness of 'soil'"));
}
