#include "loads/aeroelastic.h"

#include <catch2/catch.hpp>
#include <cmath>
#include <numbers>

using namespace focalframe::loads;

namespace {

constexpr double pi = std::numbers::pi;

// Course notebook of TU Munich (SWELecture, exercise 6).
const BluffBody chimney{.width = 4.75,
                        .mass_per_length = 2500 * 12.5,
                        .frequency = 0.24,
                        .log_decrement = 0.01 * pi,
                        .density = 1.25};

const TwistingSection section{.width = 5.77, .moment_slope = pi / 2, .density = 1.225};
const TorqueTube tube{.torsional_stiffness = 80e9 * 2 * pi * std::pow(0.247, 3) * 0.006, .length = 60};

}  // namespace

TEST_CASE("a chimney gets the printed Scruton number, correlation, amplitude and galloping speed",
          "[loads][aeroelastic][published]") {
  CHECK(scruton_number(chimney) == Approx(69.61978179700372));
  const double correlation = cantilever_correlation({.slenderness = 70 / 4.75});
  CHECK(correlation == Approx(0.7916228134110788));
  const double y = vortex_amplitude(
      chimney, {.mode_shape = 0.13, .correlation = correlation, .lateral_force = 1.1, .strouhal = 0.2});
  CHECK(y == Approx(0.193).margin(5e-4));
  CHECK(galloping_speed(chimney, 2.0) == Approx(79.36655124858424));
  CHECK(vortex_speed(chimney, 0.2) == Approx(5.7));
}

TEST_CASE("a wing held at its root diverges at the printed speed", "[loads][aeroelastic][published]") {
  // Textbook exercise (aircraft structures, eq. 29.11, read on holooly.com): GJ 12e6 N m2, s 8 m, c 2.8 m,
  // lift slope 3.1, aerodynamic centre 1.2 m ahead of the flexural axis, V_d 269.2 m/s. W^2 dCm/dp = e c a.
  const TwistingSection wing{.width = 1, .moment_slope = 1.2 * 2.8 * 3.1, .density = 1.226};
  CHECK(divergence_speed(wing, TorqueTube{.torsional_stiffness = 12e6, .length = 8}) ==
        Approx(269.2).margin(0.05));
}

TEST_CASE("a 60 m half row on a 0.5 m tube diverges at 31.2 m/s", "[loads][aeroelastic]") {
  CHECK(tube.torsional_stiffness == Approx(4.54477e7).epsilon(1e-5));
  CHECK(divergence_speed(section, tube) == Approx(31.184).margin(1e-3));  // computed
  CHECK(divergence_speed(section, 1e5) == Approx(55.874).margin(1e-3));   // computed, spring per length
}

TEST_CASE("end twist grows from m L^2 / 2GJ to infinity at the divergence pressure", "[loads][aeroelastic]") {
  const double m = 100, free = m * 60 * 60 / (2 * tube.torsional_stiffness);
  CHECK(end_twist(section, tube, {.torque_per_length = m, .pressure = 0}) == Approx(free));
  const double speed = divergence_speed(section, tube), q_div = 0.5 * section.density * speed * speed;
  double last = free;
  for (const double share : {0.2, 0.5, 0.9}) {
    const double twist = end_twist(section, tube, {.torque_per_length = m, .pressure = share * q_div});
    CHECK(twist > last);
    // One mode carries nearly all of it: amplification 1 / (1 - q / q_div).
    CHECK(twist / free == Approx(1 / (1 - share)).epsilon(0.04));
    last = twist;
  }
  CHECK(std::isnan(end_twist(section, tube, {.torque_per_length = m, .pressure = q_div * 1.0001})));
}

TEST_CASE("wind that turns the row back stiffens it", "[loads][aeroelastic]") {
  TwistingSection steady = section;
  steady.moment_slope = -1;
  CHECK(std::isinf(divergence_speed(steady, tube)));
  const double m = 100, free = m * 60 * 60 / (2 * tube.torsional_stiffness);
  CHECK(end_twist(steady, tube, {.torque_per_length = m, .pressure = 300}) < free);
  CHECK(end_twist(steady, tube, {.torque_per_length = m, .pressure = 300}) > 0);
}
