#include "models/sun.h"

#include <catch2/catch.hpp>

#include "fem/units.h"

using namespace focalframe;
using namespace focalframe::models;

TEST_CASE("Buie's formula yields another circumsolar ratio than its parameter says") {
  // Computed here from the published formula by integrating it.
  const double table[][2] = {{0.01, 0.00042}, {0.02, 0.00581}, {0.03, 0.01666}, {0.05, 0.04313},
                             {0.08, 0.07949}, {0.10, 0.10027}, {0.15, 0.14540}, {0.20, 0.18714},
                             {0.30, 0.27426}, {0.40, 0.37265}};
  for (const auto& [chi, ratio] : table) CHECK(buie_circumsolar_ratio(chi) == Approx(ratio).margin(6e-6));
}
