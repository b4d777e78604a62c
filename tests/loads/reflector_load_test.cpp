#include "loads/reflector_load.h"

#include <catch2/catch.hpp>
#include <cmath>
#include <numbers>

#include "fem/units.h"
#include "loads/pose.h"

using namespace focalframe;
using namespace focalframe::loads;

namespace {

// Coefficients with the right symmetry, none of them zero by accident.
Coefficients some(double p) {
  return {1.4 * std::cos(p) + 0.2, 0.3 * std::sin(p), -0.1 * std::sin(p) - 0.15 * std::sin(2 * p)};
}

WorldLoad at(double elevation, double wind_from) {
  const Coefficients c = some(pitch_seen_by_wind(elevation, wind_from));
  return world_load(reflector_load(c, 500, {.area = 60, .length = 5}),
                    {.elevation = elevation, .wind_from = wind_from, .axis_behind = 0.3});
}

}  // namespace

TEST_CASE("the load of a pose in front wind mirrors that of the supplementary pose in rear wind",
          "[loads][reflector]") {
  for (int e = -90; e <= 270; e += 7) {
    const WorldLoad front = at(e * deg, 0), rear = at((180 - e) * deg, 180 * deg);
    CHECK(front.force.x() == 0);
    CHECK(front.force.y() == Approx(-rear.force.y()).margin(1e-9));
    CHECK(front.force.z() == Approx(rear.force.z()).margin(1e-9));
    CHECK(front.moment_vertex == Approx(-rear.moment_vertex).margin(1e-9));
    CHECK(front.moment_axis == Approx(-rear.moment_axis).margin(1e-9));
  }
}

TEST_CASE("forces in world axes are the wind-axis coefficients times q A", "[loads][reflector]") {
  for (int e = -90; e <= 270; e += 15)
    for (const double from : {0.0, 180 * deg}) {
      const double p = pitch_seen_by_wind(e * deg, from);
      const Coefficients c = some(p);
      const WorldLoad w = at(e * deg, from);
      const double downwind = c.Ca * std::cos(p) + c.Cs * std::sin(p),
                   up = -c.Ca * std::sin(p) + c.Cs * std::cos(p);
      CHECK(w.force.y() == Approx(-upwind_side(from) * downwind * 500 * 60).margin(1e-9));
      CHECK(w.force.z() == Approx(up * 500 * 60).margin(1e-9));
      CHECK(w.force.norm() == Approx(500 * 60 * std::hypot(c.Ca, c.Cs)));
    }
}

TEST_CASE("the moment moves from the vertex to the axis by statics", "[loads][reflector]") {
  for (int e = -90; e <= 270; e += 15)
    for (const double from : {0.0, 180 * deg}) {
      const WorldLoad w = at(e * deg, from);
      const Eigen::Vector3d vertex = 0.3 * world_to_collector(e * deg).row(2).transpose();
      CHECK(w.moment_axis == Approx(w.moment_vertex + vertex.cross(w.force).x()).margin(1e-9));
    }
}

TEST_CASE("a positive moment turns the face towards larger pitch in both winds", "[loads][reflector]") {
  for (const double from : {0.0, 180 * deg}) {
    const WorldLoad w =
        world_load({.axial = 0, .side = 0, .moment = 1}, {.elevation = 60 * deg, .wind_from = from});
    // A positive moment about +X raises the elevation.
    const double before = pitch_seen_by_wind(60 * deg, from);
    const double after = pitch_seen_by_wind(60 * deg + 0.01 * w.moment_vertex, from);
    CHECK(after > before);
  }
}

TEST_CASE("microwave antennas get the printed forces", "[loads][reflector][published]") {
  // CFE, Manual de Diseno de Obras Civiles, Diseno por Viento (2008), examples pp. 4.III.92-94: (a) 612.9 Pa,
  // Gh 1.621, A 0.283, Ca 1.2617 -> 354.7 N; (b) at 90 deg, 689.5 Pa, D 0.7, Cs 0.625 -> 268.9 N, Ca -0.1094
  // -> -47.1 N, Cm 0.098 -> 29.5 N m. Areas as printed; (b) uses the same gust factor.
  const ReflectorLoad a = reflector_load({1.2617, 0, 0}, 612.9 * 1.621, {.area = 0.283, .length = 0.6});
  CHECK(a.axial == Approx(354.7).margin(0.1));
  const ReflectorLoad b =
      reflector_load({-0.1094, 0.625, 0.098}, 689.5 * 1.621, {.area = 0.385, .length = 0.7});
  CHECK(b.side == Approx(268.9).margin(0.1));
  CHECK(b.axial == Approx(-47.1).margin(0.1));
  CHECK(b.moment == Approx(29.5).margin(0.1));
}

TEST_CASE("a solid 1.2 m dish facing 42 m/s is pushed with about 1588 N", "[loads][reflector][published]") {
  // Knowledge page of rfessentials.com: Cd 1.3, rho 1.225, A 1.13 m2.
  const double q = 0.5 * 1.225 * 42 * 42;
  CHECK(reflector_load({1.3, 0, 0}, q, {.area = 1.13, .length = 1.2}).axial == Approx(1588).margin(1));
}
