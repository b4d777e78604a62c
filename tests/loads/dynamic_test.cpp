#include "loads/dynamic.h"

#include <catch2/catch.hpp>
#include <cmath>
#include <numbers>

#include "loads/profile.h"

using namespace focalframe::loads;

namespace {

double step(const DynamicFactors& f, const std::string& what) {
  for (const ChainStep& s : f.chain)
    if (s.what == what) return s.value;
  return std::nan("");
}

DynamicInput building() {
  return {.width = 10,
          .height = 35,
          .mean_speed = 23.8,
          .turbulence = 0.235377,
          .length_scale = 75.9,
          .frequency = 3.1,
          .log_decrement = 0.0503};
}

}  // namespace

TEST_CASE("a multi-storey building gets the printed resonance part", "[loads][dynamic][published]") {
  // Multi-Storey Steel Buildings part 3, appendix A, p. 3-32: fL 9.89, SL 0.0302, Rh 0.0465, Rb 0.153,
  // delta_a 0.0003, R^2 0.0211.
  const DynamicFactors f = dynamic_factors(building());
  CHECK(step(f, "f_L") == Approx(9.89).margin(0.005));
  CHECK(step(f, "spectral density S_L") == Approx(0.0302702).margin(1e-6));
  CHECK(step(f, "admittance R_h") == Approx(0.0465).margin(1e-4));
  CHECK(step(f, "admittance R_b") == Approx(0.153).margin(5e-4));
  CHECK(f.resonance2 == Approx(0.0211).margin(1e-4));
  CHECK(air_damping({.force_coefficient = 0.9,
                     .density = 1.25,
                     .width = 10,
                     .mean_speed = 23.8,
                     .frequency = 3.1,
                     .mass_per_length = 150e3}) == Approx(2.879e-4).epsilon(1e-3));
  // Continued by hand from the printed, rounded R^2 = 0.0211.
  CHECK(f.background2 == Approx(0.60699).margin(1e-5));
  CHECK(f.crossing == Approx(0.5682).margin(7e-4));
  CHECK(f.peak == Approx(3.5908).margin(5e-4));
  CHECK(f.product() == Approx(0.88369).margin(1e-4));
}

TEST_CASE("a 600 m tower gets the printed background, spectrum and resonance",
          "[loads][dynamic][published]") {
  // Course notebook of TU Munich (SWELecture, exercise 6): v_b 40.12 / 1.4 m/s, terrain IV of the German
  // annex (0.56 v_b (z / 10)^0.30 at z = 200 m), L 248.954 m, n 46/600 Hz, h 600, b 60, delta 0.01 pi.
  const DynamicFactors f = dynamic_factors({.width = 60,
                                            .height = 600,
                                            .mean_speed = 40.12 / 1.4 * 0.56 * std::pow(20, 0.30),
                                            .turbulence = 0.175,
                                            .length_scale = 248.95409571882422,
                                            .frequency = 46.0 / 600,
                                            .log_decrement = 0.01 * std::numbers::pi});
  CHECK(f.background2 == Approx(0.37545813068626666));
  CHECK(step(f, "spectral density S_L") == Approx(0.16906048998718498));
  CHECK(f.resonance2 == Approx(3.2337528286355393));
}

TEST_CASE(
    "size and dynamic factor together are cs cd, and stiff heavy things have cd near its quasi-static value",
    "[loads][dynamic]") {
  DynamicInput stiff = building();
  stiff.frequency = 300;
  const DynamicFactors f = dynamic_factors(stiff);
  CHECK(f.resonance2 < 1e-5);
  const double B = std::sqrt(f.background2), Iv = stiff.turbulence;
  CHECK(f.product() ==
        Approx((1 + 2 * f.peak * Iv * std::sqrt(f.background2 + f.resonance2)) / (1 + 7 * Iv)));
  CHECK(f.size == Approx((1 + 7 * Iv * B) / (1 + 7 * Iv)));
}

TEST_CASE("less damping and a lower frequency raise the dynamic factor", "[loads][dynamic]") {
  const double base = dynamic_factors(building()).dynamic;
  DynamicInput loose = building();
  loose.log_decrement = 0.02;
  CHECK(dynamic_factors(loose).dynamic > base);
  DynamicInput slow = building();
  slow.frequency = 1;
  CHECK(dynamic_factors(slow).dynamic > base);
}

TEST_CASE("the size factor here is the one of the wind chain", "[loads][dynamic]") {
  Site site;
  site.terrain = Terrain::en_3;
  DynamicInput in = building();
  in.length_scale = length_scale(en_terrain(Terrain::en_3), 21);
  CHECK(dynamic_factors(in).size == Approx(size_factor(10, 35, 21, in.turbulence, site)));
}

TEST_CASE("the admittance is 1 for a point, falls with size and has no seam at its series",
          "[loads][dynamic]") {
  CHECK(aerodynamic_admittance(0) == 1);
  CHECK(aerodynamic_admittance(1.0001e-3) == Approx(aerodynamic_admittance(0.9999e-3)).epsilon(1e-6));
  CHECK(aerodynamic_admittance(1) < aerodynamic_admittance(0.5));
  CHECK(aerodynamic_admittance(1000) == Approx(1e-3).epsilon(1e-3));
}

TEST_CASE("the wind spectrum integrates to the whole variance", "[loads][dynamic]") {
  // S_L = n S / sigma^2, so its integral over ln f is 1.
  double sum = 0;
  const double step_size = 0.01;
  for (double u = -25; u < 25; u += step_size) sum += spectral_density(std::exp(u)) * step_size;
  CHECK(sum == Approx(1).margin(2e-3));
}

TEST_CASE("a dynamic factor without frequency or damping is refused", "[loads][dynamic]") {
  DynamicInput in = building();
  in.frequency = not_given;
  CHECK_THROWS_WITH(dynamic_factors(in), Catch::Contains("frequency must be > 0"));
  in = building();
  in.log_decrement = 0;
  CHECK_THROWS_AS(dynamic_factors(in), std::invalid_argument);
}
