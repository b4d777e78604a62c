#include "loads/table_conventions.h"

#include <catch2/catch.hpp>
#include <cmath>

#include "fem/units.h"

using namespace focalframe;
using namespace focalframe::loads;

namespace {

std::vector<TableConventions> usual_conventions() {
  std::vector<TableConventions> all;
  for (const auto& [zero, sense] : {std::pair{AngleZero::face_on, AngleSense::upwards},
                                    {AngleZero::face_on, AngleSense::downwards},
                                    {AngleZero::zenith, AngleSense::leeward},
                                    {AngleZero::zenith, AngleSense::windward}})
    for (const bool wind_axes : {false, true})
      for (const bool about_axis : {false, true})
        for (const double sign : {1.0, -1.0}) {
          TableConventions c{.zero = zero,
                             .sense = sense,
                             .wind_axes = wind_axes,
                             .about_axis = about_axis,
                             .axis_behind = about_axis ? 0.08 : 0};
          c.second_sign = c.moment_sign = sign;
          c.length_ratio = sign > 0 ? 1 : 0.5;
          all.push_back(c);
        }
  return all;
}

}  // namespace

TEST_CASE("coefficients come back unchanged through every usual convention", "[loads][conventions]") {
  const Coefficients c{1.2, -0.3, 0.15};
  for (const TableConventions& conventions : usual_conventions())
    for (int p = -175; p <= 180; p += 25) {
      const AuthorRow author = to_author(p * deg, c, conventions);
      CHECK(to_pitch(author.angle, conventions) == Approx(p * deg).margin(1e-12));
      const Coefficients back = to_coefficients(author, conventions);
      CHECK(back.Ca == Approx(c.Ca));
      CHECK(back.Cs == Approx(c.Cs));
      CHECK(back.Cm == Approx(c.Cm));
    }
}

TEST_CASE("named angles of the usual conventions are the poses they name", "[loads][conventions]") {
  const TableConventions zenith{.zero = AngleZero::zenith, .sense = AngleSense::leeward};
  CHECK(to_pitch(0, zenith) == Approx(90 * deg));
  CHECK(to_pitch(-90 * deg, zenith) == Approx(0).margin(1e-12));
  CHECK(to_pitch(90 * deg, zenith) == Approx(180 * deg));
  const TableConventions windward{.zero = AngleZero::zenith, .sense = AngleSense::windward};
  CHECK(to_pitch(90 * deg, windward) == Approx(0).margin(1e-12));
  const TableConventions down{.zero = AngleZero::face_on, .sense = AngleSense::downwards};
  CHECK(to_pitch(90 * deg, down) == Approx(-90 * deg));
}

TEST_CASE("wind axes turn into body axes", "[loads][conventions]") {
  // Rows of the derived trough table: pitch 60: Ca 1.83, Cs 0.27 <-> Cfx 1.15, Cfz -1.45.
  TableConventions wind;
  wind.wind_axes = true;
  const Coefficients c = to_coefficients({.angle = 60 * deg, .first = 1.15, .second = -1.45}, wind);
  CHECK(c.Ca == Approx(1.83).margin(0.01));
  CHECK(c.Cs == Approx(0.27).margin(0.01));
}

TEST_CASE("a moment about an axis behind the vertex moves to the vertex by statics", "[loads][conventions]") {
  TableConventions about_axis;
  about_axis.about_axis = true;
  about_axis.axis_behind = 0.1;
  // Moment about the axis of a force at the vertex alone: lever 0.1 W times the side force.
  const Coefficients c =
      to_coefficients({.angle = 0.5, .first = 1.5, .second = 0.4, .moment = 0.04}, about_axis);
  CHECK(c.Cm == Approx(0).margin(1e-15));
}

TEST_CASE("an angle sense that does not belong to its zero is refused", "[loads][conventions]") {
  CHECK_THROWS_AS(to_pitch(0, {.zero = AngleZero::zenith, .sense = AngleSense::upwards}),
                  std::invalid_argument);
  CHECK_THROWS_AS(to_pitch(0, {.zero = AngleZero::face_on, .sense = AngleSense::leeward}),
                  std::invalid_argument);
}

TEST_CASE("what was understood names the angle of each face", "[loads][conventions]") {
  const auto lines = describe({.zero = AngleZero::zenith, .sense = AngleSense::windward});
  CHECK_THAT(lines[0], Catch::Contains("angle 90 deg: the hollow face meets the wind"));
  CHECK_THAT(lines[1], Catch::Contains("angle 0 deg: the face looks up"));
  CHECK_THAT(lines[2], Catch::Contains("angle -90 deg: the back meets the wind"));
}
