/// Published section tables: CHS and SHS hot finished (EN 10210-2), SHS and RHS cold formed (EN 10219-2),
/// read from producers' tables of 3-4 digits; ASME B36.10 pipes. Each value is checked to its own last digit.

#include "fem/section.h"
#include "tests/fem/frames.h"

using namespace focalframe::test;

namespace {

/// Half a unit of the last of `digits` significant digits, relative.
Approx rounded(double published, int digits) {
  return Approx(published).epsilon(0.51 * std::pow(10.0, 1 - digits)).margin(0);
}

constexpr double cm2 = 1e-4, cm3 = 1e-6, cm4 = 1e-8, mm = 1e-3;

}  // namespace

// EN 10210-2:2006 circular sections as printed in table P202 of the SCI series.
TEST_CASE("circular hollow sections match the table of EN 10210-2") {
  struct Row {
    double D, t, A, I, W, J, Wt;
  };
  const auto row =
      GENERATE(Row{21.3, 3.2, 1.82, 0.768, 0.722, 1.54, 1.44}, Row{26.9, 3.2, 2.38, 1.70, 1.27, 3.41, 2.53},
               Row{33.7, 4.0, 3.73, 4.19, 2.49, 8.38, 4.97}, Row{42.4, 3.2, 3.94, 7.62, 3.59, 15.2, 7.19},
               Row{42.4, 5.0, 5.87, 10.5, 4.93, 20.9, 9.86}, Row{48.3, 3.2, 4.53, 11.6, 4.80, 23.2, 9.59});
  const Section s = round_tube({.outside_diameter = row.D * mm, .wall = row.t * mm});
  INFO(s.name);
  CHECK(s.A / cm2 == rounded(row.A, 3));
  CHECK(s.Iy / cm4 == rounded(row.I, 3));
  CHECK(s.Wy / cm3 == rounded(row.W, 3));
  CHECK(s.J / cm4 == rounded(row.J, 3));
  CHECK(s.Wt / cm3 == rounded(row.Wt, 3));
}
