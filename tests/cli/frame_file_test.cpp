#include "cli/frame_file.h"

#include <catch2/catch.hpp>
#include <string>

#include "cli/frame_results.h"
#include "fem/mechanism.h"

using namespace focalframe;
using namespace focalframe::cli;
using Catch::Contains;

namespace {

constexpr double inch = 0.0254, kip = 1000 * 0.45359237 * 9.80665;

std::string frame_text(const std::string& inside) {
  return "<collector name=\"test\" kind=\"frame\">\n<frame>\n" + inside + "</frame>\n</collector>\n";
}

FrameFile read_text(const std::string& text) {
  const DesignFile design = read_design_text(text, "frame.xml");
  INFO(to_text(design.messages, true));
  REQUIRE(design.sound());
  return read_frame(design);
}

// A cantilever of 2 m, with pieces of its text replaced.
std::string cantilever(std::initializer_list<std::pair<std::string, std::string>> changes = {}) {
  std::string text = frame_text(
      "<material id=\"steel\" E=\"210 GPa\" G=\"81 GPa\" density=\"7850 kg/m3\" yield=\"235 MPa\"/>\n"
      "<section id=\"tube\" shape=\"round-tube\" outside-diameter=\"114.3 mm\" wall=\"3.6 mm\"/>\n"
      "<node id=\"a\" x=\"0 m\" y=\"0 m\" z=\"0 m\"/>\n"
      "<node id=\"b\" x=\"2 m\" y=\"0 m\" z=\"0 m\"/>\n"
      "<member id=\"m\" from=\"a\" to=\"b\" section=\"tube\" material=\"steel\" up=\"0 0 1\"/>\n"
      "<support node=\"a\" fix=\"ux uy uz rx ry rz\"/>\n"
      "<load case=\"tip\" node=\"b\" fz=\"-1 kN\"/>\n");
  for (const auto& [from, to] : changes) {
    const std::size_t at = text.find(from);
    INFO(from);
    REQUIRE(at != std::string::npos);
    text.replace(at, from.size(), to);
  }
  return text;
}

}  // namespace

TEST_CASE("a space frame typed from a textbook in inches and kips gives the textbook's numbers", "[frame]") {
  // Logan, A First Course in the Finite Element Method, example 5.8 (inputs and published values from memory;
  // the longer numbers recomputed independently with straight Euler-Bernoulli members).
  const FrameFile file = read_text(frame_text(
      "<material id=\"s\" E=\"30000 ksi\" G=\"10000 ksi\"/>\n"
      "<section id=\"p\" shape=\"properties\" area=\"10 in2\" Iy=\"100 in4\" Iz=\"100 in4\" J=\"50 in4\"/>\n"
      "<node id=\"1\" x=\"0 in\" y=\"0 in\" z=\"0 in\"/>\n<node id=\"2\" x=\"-100 in\" y=\"0 in\" z=\"0 "
      "in\"/>\n"
      "<node id=\"3\" x=\"0 in\" y=\"0 in\" z=\"-100 in\"/>\n<node id=\"4\" x=\"0 in\" y=\"-100 in\" z=\"0 "
      "in\"/>\n"
      "<member id=\"1\" from=\"2\" to=\"1\" section=\"p\" material=\"s\"/>\n"
      "<member id=\"2\" from=\"3\" to=\"1\" section=\"p\" material=\"s\" up=\"0 1 0\"/>\n"
      "<member id=\"3\" from=\"4\" to=\"1\" section=\"p\" material=\"s\"/>\n"
      "<support node=\"2\" fix=\"ux uy uz rx ry rz\"/>\n<support node=\"3\" fix=\"ux uy uz rx ry rz\"/>\n"
      "<support node=\"4\" fix=\"ux uy uz rx ry rz\"/>\n"
      "<load case=\"1\" node=\"1\" fy=\"-50 kip\" mx=\"-1000 kip in\"/>\n"));
  INFO(to_text(file.messages, true));
  REQUIRE_FALSE(has_stop(file.messages));
  const FrameResults results = compute_frame(file, 0, 0);
  const auto u = results.cases.at(0).response.displacement.row(0);
  const double expected[] = {7.09826e-5 * inch, -1.399513e-2 * inch, -2.351889e-3 * inch,
                             -3.996090e-3,      1.780069e-5,         -1.033429e-4};
  for (int i = 0; i < 6; ++i) CHECK(u[i] == Approx(expected[i]).epsilon(1e-5));
  const auto r = results.cases.at(0).response.reaction.row(3);
  CHECK(r[1] == Approx(41.98540 * kip).epsilon(1e-5));
  CHECK(r[3] == Approx(-235.5320 * kip * inch).epsilon(1e-5));
  CHECK(results.cases.at(0).balance < 1e-10);
}

TEST_CASE("member axes follow the up vector: a frame with unequal Iy and Iz gives its published numbers",
          "[frame]") {
  // Ferreira, MATLAB Codes for Finite Element Analysis, problem 12: local y = global y for members 1-2 and
  // 1-3, local y = global x for member 1-4 (inputs read; Fz = 20 kN as in the printed table, from memory).
  const FrameFile file = read_text(frame_text(
      "<material id=\"s\" E=\"210 GPa\" G=\"84 GPa\"/>\n"
      "<section id=\"p\" shape=\"properties\" area=\"0.02 m2\" Iy=\"10e-5 m4\" Iz=\"20e-5 m4\" J=\"5e-5 "
      "m4\"/>\n"
      "<node id=\"1\" x=\"0 m\" y=\"0 m\" z=\"0 m\"/>\n<node id=\"2\" x=\"3 m\" y=\"0 m\" z=\"0 m\"/>\n"
      "<node id=\"3\" x=\"0 m\" y=\"0 m\" z=\"-3 m\"/>\n<node id=\"4\" x=\"0 m\" y=\"-4 m\" z=\"0 m\"/>\n"
      // y = z x x: along +x z = +Z gives y = +Y; along -Z z = +X gives y = +Y; along -Y z = +Z gives y = +X.
      "<member id=\"a\" from=\"1\" to=\"2\" section=\"p\" material=\"s\" up=\"0 0 1\"/>\n"
      "<member id=\"b\" from=\"1\" to=\"3\" section=\"p\" material=\"s\" up=\"1 0 0\"/>\n"
      "<member id=\"c\" from=\"1\" to=\"4\" section=\"p\" material=\"s\" up=\"0 0 1\"/>\n"
      "<support node=\"2\" fix=\"ux uy uz\"/>\n<support node=\"2\" fix=\"rx ry rz\"/>\n"
      "<support node=\"3\" fix=\"ux uy uz rx ry rz\"/>\n<support node=\"4\" fix=\"ux uy uz rx ry rz\"/>\n"
      // Two loads on one node add up.
      "<load case=\"1\" node=\"1\" fx=\"-10 kN\"/>\n<load case=\"1\" node=\"1\" fz=\"20 kN\"/>\n"));
  REQUIRE_FALSE(has_stop(file.messages));
  const FrameResults results = compute_frame(file, 0, 0);
  const auto u = results.cases.at(0).response.displacement.row(0);
  const double expected[] = {-7.051478e-6, -6.653671e-8, 1.417696e-5, 1.447788e-6, 1.748584e-6, 1.136054e-6};
  for (int i = 0; i < 6; ++i) CHECK(u[i] == Approx(expected[i]).epsilon(1e-5));
}

TEST_CASE("elements may come in any order and cases keep the order of the file", "[frame]") {
  const FrameFile file = read_text(frame_text(
      "<load case=\"second\" node=\"b\" fz=\"-1 kN\"/>\n<gravity case=\"first\" value=\"9.80665 m/s2\" "
      "direction=\"0 0 -2\"/>\n"
      "<member id=\"m\" from=\"a\" to=\"b\" section=\"t\" material=\"s\"/>\n<node id=\"b\" x=\"1 m\" y=\"0 "
      "m\" z=\"0 m\"/>\n"
      "<section id=\"t\" shape=\"square-tube\" side=\"50 mm\" wall=\"3 mm\"/>\n<material id=\"s\" E=\"70 "
      "GPa\" density=\"2700 kg/m3\"/>\n"
      "<node id=\"a\" x=\"0 m\" y=\"0 m\" z=\"0 m\"/>\n<support node=\"a\" fix=\"ux uy uz rx ry rz\"/>\n"));
  REQUIRE_FALSE(has_stop(file.messages));
  REQUIRE(file.cases.size() == 2);
  CHECK(file.cases[0].name == "second");
  CHECK(file.cases[1].gravity.z() == Approx(-9.80665));
  CHECK(file.frame.materials.at(0).G == Approx(70e9 / 2.6));
}

TEST_CASE("springs of one node add up, and a rigid one is a support", "[frame]") {
  const FrameFile file = read_text(cantilever(
      {{"<support node=\"a\" fix=\"ux uy uz rx ry rz\"/>",
        "<spring node=\"a\" ux=\"rigid\" uy=\"rigid\" uz=\"1 MN/m\" rx=\"rigid\" ry=\"rigid\" rz=\"rigid\"/>"
        "<spring node=\"a\" uz=\"3 MN/m\"/>"}}));
  REQUIRE_FALSE(has_stop(file.messages));
  const FrameResults results = compute_frame(file, 0, 0);
  CHECK(results.cases.at(0).response.displacement(0, 2) == Approx(-1000 / 4e6));
}

TEST_CASE("slips in a frame are said with their line, what is known, and what was meant", "[frame]") {
  struct Slip {
    std::pair<std::string, std::string> change;
    int line;
    const char *said, *likely;
    int exit;
  };
  const Slip slips[] = {
      {{"<node id=\"b\"", "<node id=\"a\""}, 6, "has this id already, in line 5", "", 2},
      {{"to=\"b\"", "to=\"c\""}, 7, "There is no node with this id. The nodes are: a b", "", 2},
      {{"material=\"steel\"", "material=\"stel\""}, 7, "no material with this id", "material=\"steel\"", 2},
      {{"section=\"tube\"", "section=\"tubes\""}, 7, "no section with this id", "section=\"tube\"", 2},
      {{"x=\"2 m\"", "x=\"2\""}, 6, "needs its unit", "", 2},
      {{"x=\"2 m\"", "x=\"2,5 m\""}, 6, "decimal mark", "x=\"2.5 m\"", 2},
      {{"x=\"2 m\"", "x=\"NaN m\""}, 6, "not a number", "", 2},
      {{"x=\"2 m\"", "x=\"0 m\""}, 7, "its length is 0", "", 2},
      {{"up=\"0 0 1\"", "up=\"1 0 0\""}, 7, "up is parallel to the member", "", 2},
      {{"up=\"0 0 1\"", "up=\"0 0 0\""}, 7, "cannot be zero", "", 2},
      {{"up=\"0 0 1\"", "up=\"up\""}, 7, "three plain numbers", "", 2},
      {{"fix=\"ux uy uz rx ry rz\"", "fix=\"all\""}, 8, "is no freedom", "fix=\"ux uy uz rx ry rz\"", 2},
      {{"wall=\"3.6 mm\"", "wall=\"3.6 m\""},
       4,
       "less than half the outer size, here 57.15 mm",
       "wall=\"3.6 mm\"",
       2},
      {{"wall=\"3.6 mm\"", "wall=\"-3.6 mm\""}, 4, "more than 0", "", 2},
      {{"wall=\"3.6 mm\"", "wal=\"3.6 mm\""}, 4, "has no \"wal\"", "wall=\"3.6 mm\"", 2},
      {{" wall=\"3.6 mm\"", ""}, 4, "\"wall\" is missing", "", 2},
      {{"round-tube", "round-tub"}, 4, "The shapes are", "shape=\"round-tube\"", 2},
      {{"fz=\"-1 kN\"", "fz=\"-1 kn\""}, 9, "is a speed", "fz=\"-1 kN\"", 2},
      {{"fz=\"-1 kN\"", "fz=\"-100 lb\""}, 9, "mass or a force", "fz=\"-100 lbf\"", 2},
      {{" fz=\"-1 kN\"", ""}, 9, "at least one of", "", 2},
      {{"<support ", "<suport "}, 8, "<frame> has no <suport>", "<support>", 2},
      {{" E=\"210 GPa\"", ""}, 3, "needs \"E\"", "", 2},
      {{"<support node=\"a\" fix=\"ux uy uz rx ry rz\"/>", ""}, 0, "no support and no spring", "", 3},
      {{"up=\"0 0 1\"", "release-from=\"rx\" release-to=\"rx\""}, 7, "let go at both ends", "", 2},
  };
  for (const Slip& slip : slips) {
    INFO(slip.change.second);
    const FrameFile file = read_text(cantilever({slip.change}));
    INFO(to_text(file.messages, true));
    REQUIRE(has_stop(file.messages));
    const Message* first = nullptr;
    for (const Message& m : file.messages)
      if (!first && m.level == Level::stop) first = &m;
    CHECK(first->line == slip.line);
    CHECK_THAT(first->text, Contains(slip.said));
    CHECK(first->likely == slip.likely);
    CHECK(exit_code(file.messages) == slip.exit);
  }
}

TEST_CASE("a Young's modulus a million times off is warned about with the unit that fits", "[frame]") {
  const FrameFile file = read_text(cantilever({{"E=\"210 GPa\" G=\"81 GPa\"", "E=\"210 kPa\""}}));
  const auto& messages = file.messages;
  REQUIRE_FALSE(messages.empty());
  bool found = false;
  for (const Message& m : messages) found = found || (m.level == Level::warn && m.likely == "E=\"210 GPa\"");
  INFO(to_text(messages, true));
  CHECK(found);
}

TEST_CASE("a frame that can still move is refused by the node that moves", "[frame]") {
  const FrameFile file = read_text(cantilever({{"fix=\"ux uy uz rx ry rz\"", "fix=\"ux uy uz\""}}));
  REQUIRE_FALSE(has_stop(file.messages));
  CHECK_THROWS_AS(compute_frame(file, 0, 0), fem::Mechanism);
}

TEST_CASE("weight without density is warned about, no density otherwise only noted", "[frame]") {
  const FrameFile quiet = read_text(cantilever({{" density=\"7850 kg/m3\"", ""}}));
  REQUIRE(quiet.messages.size() == 1);
  CHECK(quiet.messages[0].level == Level::note);
  const FrameFile heavy = read_text(cantilever(
      {{" density=\"7850 kg/m3\"", ""},
       {"<load case", "<gravity case=\"w\" value=\"9.81 m/s2\" direction=\"0 0 -1\"/><load case"}}));
  REQUIRE(heavy.messages.size() == 1);
  CHECK(heavy.messages[0].level == Level::warn);
}

TEST_CASE("no cut of a frame makes the reader fail", "[frame]") {
  const std::string text = cantilever();
  for (std::size_t i = 0; i < text.size(); i += 3) {
    std::string cut = text;
    cut.erase(i, 4);
    const DesignFile design = read_design_text(cut, "frame.xml");
    if (design.sound() && design.kind == "frame") CHECK_NOTHROW(read_frame(design));
  }
}
