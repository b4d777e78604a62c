#include "models/error_budget.h"

#include <catch2/catch.hpp>
#include <cmath>
#include <stdexcept>

#include "fem/units.h"
#include "models/quadrature.h"

using namespace focalframe;
using namespace focalframe::models;

namespace {

constexpr Parabola wide{5.77, 1.71};

BeamError errors() {
  BeamError error;
  error.sun = gaussian_sun(2.6 * mrad);
  error.slope_rms = 3 * mrad;
  error.scatter_rms = 1.5 * mrad;
  error.tracking_rms = 2 * mrad;
  return error;
}

struct Sampled {
  Quadrature rule = gauss_legendre(16, 8, -wide.width / 2, wide.width / 2);
  std::vector<double> lever, none;
  TroughIntercept intercept;

  explicit Sampled(double sigma) : intercept(wide, 35 * mm, beam(sigma), rule.point) {
    for (const double y : rule.point) lever.push_back(miss_terms(wide, y).aim);
    none.assign(lever.size(), 0.0);
  }
  static BeamError beam(double sigma) {
    BeamError error;
    error.scatter_rms = sigma;
    return error;
  }
};

}  // namespace

TEST_CASE("slope counts twice in the beam, a radial error less by the root of two") {
  CHECK(beam_rms({"a", 3 * mrad, ErrorOf::normal}) == Approx(6 * mrad));
  CHECK(beam_rms({"b", 3 * mrad, ErrorOf::beam}) == Approx(3 * mrad));
  CHECK(beam_rms({"c", 3 * mrad, ErrorOf::normal, ErrorMeasure::radial}) ==
        Approx(6 * mrad / std::sqrt(2.0)));
}

TEST_CASE("the budget of an intercept's errors adds up to its total spread") {
  const ErrorBudget budget = add_up(budget_lines(errors()));
  CHECK(budget.random == Approx(total_rms(errors())));
  // Computed here: sun 2.6, slope 3, scatter 1.5, tracking 2 mrad.
  CHECK(budget.random / mrad == Approx(7.0007).margin(1e-4));
  CHECK(budget.systematic == 0);
}

TEST_CASE("systematic errors are never mixed into the random sum") {
  std::vector<BudgetLine> lines = budget_lines(errors());
  lines.push_back({"sag", 1 * mrad, ErrorOf::normal, ErrorMeasure::line, ErrorNature::systematic});
  lines.push_back({"twist", 1.5 * mrad, ErrorOf::beam, ErrorMeasure::line, ErrorNature::systematic});
  const ErrorBudget budget = add_up(lines);
  CHECK(budget.random == Approx(total_rms(errors())));
  CHECK(budget.systematic == Approx(2.5 * mrad));
}

TEST_CASE("a line without a value leaves the sum without one") {
  CHECK(std::isnan(add_up({BudgetLine{"forgotten"}}).random));
}

TEST_CASE("the aim may stray as far as one percent of the light allows") {
  // Computed here: 3.282 mrad for 1 % and 5.399 mrad for 3 % at 6 mrad beam.
  const Sampled s(6 * mrad);
  const double whole = s.intercept.undeformed();
  CHECK(aim_tolerance(s.intercept, s.none, s.lever, s.rule.weight, whole - 0.01) / mrad ==
        Approx(3.282).margin(2e-3));
  CHECK(aim_tolerance(s.intercept, s.none, s.lever, s.rule.weight, whole - 0.03) / mrad ==
        Approx(5.399).margin(2e-3));
  CHECK(aim_tolerance(s.intercept, s.none, s.lever, s.rule.weight, whole + 0.001) == 0);
}

TEST_CASE("a misaim already there is taken from the tolerance, whichever its sign") {
  const Sampled s(6 * mrad);
  const double least = s.intercept.undeformed() - 0.03;
  const double free = aim_tolerance(s.intercept, s.none, s.lever, s.rule.weight, least);
  for (const double there : {1 * mrad, -1 * mrad}) {
    std::vector<double> miss;
    for (const double lever : s.lever) miss.push_back(there * lever);
    CHECK(aim_tolerance(s.intercept, miss, s.lever, s.rule.weight, least) ==
          Approx(free - 1 * mrad).epsilon(1e-6));
  }
}

TEST_CASE("misses and levers that do not fit each other are refused") {
  const Sampled s(6 * mrad);
  const std::vector<double> two{1.0, 1.0, 1.0};
  CHECK_THROWS_AS(aim_tolerance(s.intercept, s.none, two, s.rule.weight, 0.9), std::invalid_argument);
}
