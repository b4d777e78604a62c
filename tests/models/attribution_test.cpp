#include "models/attribution.h"

#include <catch2/catch.hpp>

#include "fem/units.h"

using namespace focalframe;
using namespace focalframe::models;

namespace {

TroughIntercept sampled() {
  BeamError error;
  error.scatter_rms = 6 * mrad;
  return {{5.77, 1.71}, 35 * mm, error, {-2.0, -0.7, 0.7, 2.0}};
}

const std::vector<double> weight{1, 1, 1, 1};

}  // namespace

TEST_CASE("losses alone and their interaction add up to the whole loss") {
  const TroughIntercept intercept = sampled();
  const std::vector<MissPart> parts{{"twist", {9 * mm, 7 * mm, 7 * mm, 9 * mm}},
                                    {"focus", {-12 * mm, -3 * mm, 3 * mm, 12 * mm}},
                                    {"ribs", {4 * mm, 2 * mm, -2 * mm, -4 * mm}}};
  const Attribution a = attribute(intercept, weight, parts);
  CHECK(a.undeformed == Approx(intercept.mean(std::vector<double>(4, 0.0), weight)));
  CHECK(a.loss == Approx(a.undeformed - a.intercept));
  double sum = a.interaction;
  for (const PartLoss& part : a.parts) sum += part.alone;
  CHECK(sum == Approx(a.loss).epsilon(1e-12));
  CHECK(a.parts[0].name == "twist");
  CHECK(a.parts[0].alone == Approx(a.undeformed - intercept.mean(parts[0].miss, weight)));
  // Ribs undo part of the change of focus: mending them alone makes things worse.
  CHECK(a.parts[2].mended < 0);
}

TEST_CASE("a single part is the whole loss, and opposite parts cost nothing together") {
  const TroughIntercept intercept = sampled();
  const MissPart up{"receiver", {0.0, 10 * mm, 10 * mm, 12 * mm}},
      down{"focus", {0.0, -10 * mm, -10 * mm, -12 * mm}};
  const Attribution one = attribute(intercept, weight, std::vector<MissPart>{up});
  CHECK(one.parts[0].alone == Approx(one.loss));
  CHECK(one.parts[0].mended == Approx(one.loss));
  CHECK(one.interaction == Approx(0).margin(1e-15));
  const Attribution two = attribute(intercept, weight, std::vector<MissPart>{up, down});
  CHECK(two.loss == Approx(0).margin(1e-15));
  CHECK(two.interaction == Approx(-2 * one.loss).epsilon(1e-12));
}

TEST_CASE("parts of different length, or none, are refused") {
  const TroughIntercept intercept = sampled();
  CHECK_THROWS_AS(attribute(intercept, weight, std::vector<MissPart>{}), std::invalid_argument);
  CHECK_THROWS_AS(attribute(intercept, weight, std::vector<MissPart>{{"a", {0, 0, 0, 0}}, {"b", {0}}}),
                  std::invalid_argument);
}
