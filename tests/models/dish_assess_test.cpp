#include "models/dish_assess.h"

#include <catch2/catch.hpp>
#include <cmath>

#include "fem/units.h"
#include "models/dish.h"
#include "models/dish_full_frame.h"
#include "tests/support/dish_design.h"

using namespace focalframe;
using namespace focalframe::models;

namespace {

// Every 10 deg: an invented dish table, Ca cos p (1.3), Cs and Cm of a plausible size.
loads::CoefficientTable table() {
  loads::CoefficientTable t;
  t.name = "test";
  t.collector_kind = "dish";
  for (int p = 0; p <= 180; p += 10) {
    loads::CoefficientRow row;
    row.pitch = p * deg;
    row.best = {1.3 * std::cos(row.pitch), 0.35 * std::sin(row.pitch),
                0.1 * std::sin(row.pitch) - 0.08 * std::sin(2 * row.pitch)};
    row.upper = row.best;
    t.rows.push_back(row);
  }
  t.pitch_min = -180 * deg;
  t.pitch_max = 180 * deg;
  return t;
}

const DishAssessOptions quick{1, false, false};

const Criterion& named(const DishAssessment& a, const std::string& key) {
  for (const Criterion& c : a.common.criteria)
    if (c.key == key) return c;
  throw std::runtime_error("no criterion " + key);
}

}  // namespace

TEST_CASE("a check of a solar dish balances and meets q A C", "[dish][assess]") {
  const DishAssessment a = assess_dish(support::small_dish(), table(), quick);
  CHECK(a.common.proof.load_error < 1e-11);
  CHECK(a.common.proof.balance < 1e-9);
  CHECK(a.common.proof.residual < 1e-9);
  REQUIRE(a.worst >= 0);
  CHECK(a.optics[static_cast<std::size_t>(a.worst)].result.intercept < a.common.undeformed);
  CHECK(named(a, "intercept").value > 0.5);
}

TEST_CASE("without wind and set true where it is, a dish is perfect", "[dish][assess]") {
  DishDesign d = support::small_dish();
  d.operation.track_from = 30 * deg;
  d.operation.track_to = 60 * deg;
  d.dish.actuator.play = 0;
  const DishAssessment a = assess_dish(d, table(), quick);
  for (const DishOpticalRow& row : a.optics)
    if (row.calm && std::abs(row.state.state.elevation - 45 * deg) < 1e-9) {
      CHECK(row.result.slope < 1e-12);
      CHECK(row.result.aim_error < 1e-12);
      CHECK(row.result.focus_along < 1e-12);
    }
}

TEST_CASE("wind effects of a dish grow with the velocity pressure", "[dish][assess]") {
  DishDesign d = support::small_dish();
  d.dish.learned = "gravity";
  d.optics.set_true = not_given;
  d.optics.set_true_word = "unloaded";
  const auto aim = [&](double speed) {
    d.wind.operate.speed = speed;
    const DishAssessment a = assess_dish(d, table(), quick);
    return named(a, "aim").value;
  };
  CHECK(aim(12) == Approx(4 * aim(6)).epsilon(1e-6));
}

TEST_CASE("a learned pointing table takes out what the weight does", "[dish][assess]") {
  DishDesign d = support::small_dish();
  const auto calm = [&](const char* learned) {
    d.dish.learned = learned;
    double worst = 0;
    for (const DishOpticalRow& row : assess_dish(d, table(), quick).optics)
      if (row.calm) worst = std::max(worst, row.result.aim_error);
    return worst;
  };
  CHECK(calm("gravity") < 1e-12);
  CHECK(calm("none") > 1e-5);
}

TEST_CASE("an antenna loses at least what its surface as built costs", "[dish][assess][antenna]") {
  const DishAssessment a = assess_dish(support::small_antenna(), table(), quick);
  CHECK(a.radio);
  // Ruze at 5.76 GHz and 1 mm: 685.8 (1 / 52.05)^2 dB.
  CHECK(a.built_db == Approx(685.8 / (52.0474 * 52.0474)).epsilon(1e-3));
  for (const DishOpticalRow& row : a.optics) {
    CHECK(row.result.gain_loss >= a.built_db);
    CHECK(row.result.gain_loss ==
          Approx(row.result.surface_db + row.result.defocus_db + row.result.pointing_db).epsilon(1e-12));
  }
  CHECK(named(a, "pointing").value > 0);
}

TEST_CASE("a stiffer actuator leaves less aim error in the wind", "[dish][assess]") {
  DishDesign d = support::small_dish();
  const double soft = named(assess_dish(d, table(), quick), "aim").value;
  d.dish.actuator.stiffness *= 10;
  CHECK(named(assess_dish(d, table(), quick), "aim").value < soft);
}

TEST_CASE("wind from the mirrored side mirrors azimuth torque and leaves the drive alone", "[dish][assess]") {
  DishDesign d = support::small_dish();
  const DishModel model(build_dish(d));
  const loads::CoefficientTable t = table();
  const DishWinds winds(d, t);
  const DishPose pose = model.pose(30 * deg);
  for (const double from : {45 * deg, 90 * deg, 135 * deg}) {
    const auto a = dish_wind_amplitudes(
        model, pose, winds.at({{StateKind::operate, 30 * deg, from}, 0}, Spread::linear, 0, true));
    const auto b = dish_wind_amplitudes(
        model, pose,
        winds.at({{StateKind::operate, 30 * deg, 360 * deg - from}, 0}, Spread::linear, 0, true));
    CHECK(pose.azimuth.row(5).dot(a) == Approx(-pose.azimuth.row(5).dot(b)).epsilon(1e-8).margin(1e-9));
    CHECK(pose.drive.dot(a) == Approx(pose.drive.dot(b)).epsilon(1e-8).margin(1e-9));
  }
}

TEST_CASE("a softer ground lowers a dish's first frequency", "[dish][modes]") {
  DishDesign d = support::small_dish();
  const double stiff = dish_stability(d, table(), 90 * deg, 2).modes[0].frequency;
  d.dish.pedestal.footing.rocking /= 20;
  const double soft = dish_stability(d, table(), 90 * deg, 2).modes[0].frequency;
  CHECK(soft < stiff);
  CHECK(stiff < 100);
}

TEST_CASE("the face-up bowl holds pi D^4 / 128 f of water", "[dish][water]") {
  DishDesign d = support::small_dish();
  const DishAssessment a = assess_dish(d, table(), quick);
  // Volume under the rim of z = r^2 / 4f: pi R^4 / (8 f).
  CHECK(a.bowl.water == Approx(3.14159265 * std::pow(1.5, 4) / (8 * 1.5)).epsilon(1e-6));
  CHECK(a.bowl.water_stress_used > 0);
}

TEST_CASE("the greatest gust uses the first limit up, and a stronger drive takes more", "[dish][limits]") {
  DishDesign d = support::small_dish();
  d.limits.strength.clear();
  d.dish.actuator.hold = 6e3;
  const loads::CoefficientTable t = table();
  const auto limit = [&] { return DishLimits(d, t).at(StateKind::stow, 60 * deg, 180 * deg); };
  const DishLimit weak = limit();
  CHECK(weak.governs == "actuator slips");
  CHECK(weak.gust > 5);
  d.dish.actuator.hold = 12e3;
  CHECK(limit().gust > weak.gust);
  d.dish.actuator.hold = 1;  // the weight alone is too much
  CHECK(limit().gust == 0);
}

TEST_CASE("a parked dish is best where its weakest direction is strongest", "[dish][limits]") {
  DishDesign d = support::small_dish();
  d.operation.stow_at = 90 * deg;
  std::vector<DishLimit> map;
  for (const double e : {0.0, 90.0})
    for (int k = 0; k < 8; ++k)
      map.push_back({e * deg, k * 45 * deg, e == 0 && k == 4 ? 60.0 : e == 0 ? 20.0 : 30.0, "x"});
  for (int k : {3, 5}) map[static_cast<std::size_t>(k)].gust = 50;
  const StowSearch s = search_stow(map, d);
  CHECK(s.any.elevation == Approx(90 * deg));
  CHECK(s.any.gust == 30);
  CHECK(s.turned.elevation == 0);
  CHECK(s.turned.azimuth == "back to the wind");
  CHECK(s.turned.gust == 50);
  CHECK(s.asked.gust == 30);
}
