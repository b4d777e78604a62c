// The verdict: what the criteria say must follow from the physics, and a cure must be what it claims.

#include <catch2/catch.hpp>
#include <cmath>
#include <numbers>

#include "loads/pose.h"
#include "models/cures.h"
#include "models/guesses.h"
#include "models/many_runs.h"
#include "models/wind_rules.h"
#include "tests/support/trough_design.h"

using namespace focalframe;
using namespace focalframe::models;

namespace {

const Criterion& criterion(const Assessment& a, const std::string& key) {
  for (const Criterion& c : a.criteria)
    if (c.key == key) return c;
  throw std::logic_error("no criterion " + key);
}

const OpticalResult& optics_at(const Assessment& a, double elevation, double from, bool calm) {
  for (const OpticalRow& row : a.optics)
    if (row.calm == calm && std::abs(row.state.elevation - elevation) < 1e-9 && row.state.wind_from == from)
      return row.result;
  throw std::logic_error("no such pose");
}

}  // namespace

TEST_CASE("at the set-true pose weight alone costs nothing but the sag of what carries the mirror",
          "[assess]") {
  const Assessment a = assess(support::small_row(), support::test_table());
  const OpticalResult& r = optics_at(a, 90 * deg, 0, true);
  // The samples' own mean; the perfect trough's figure is an integral over the whole aperture.
  CHECK(r.intercept == Approx(a.undeformed).margin(2e-5));
  CHECK(r.worst_twist == Approx(0).margin(1e-12));
  CHECK(r.slope < 0.1 * mrad);
  CHECK(r.receiver_shift == Approx(0).margin(1e-12));
}

TEST_CASE("a pose and its mirror image in the other wind catch the same light", "[assess]") {
  auto d = support::small_row();
  d.row.modules = 2;
  const Assessment a = assess(d, support::test_table());
  for (double e : {15.0, 45.0, 75.0}) {
    const OpticalResult& one = optics_at(a, e * deg, 0, false);
    const OpticalResult& two = optics_at(a, (180 - e) * deg, std::numbers::pi, false);
    CHECK(one.intercept == Approx(two.intercept).epsilon(1e-9));
    CHECK(one.slope == Approx(two.slope).epsilon(1e-7));
    CHECK(one.worst_twist == Approx(two.worst_twist).epsilon(1e-7));
  }
}

TEST_CASE("wind twist grows with the square of the speed when feedback is off", "[assess]") {
  auto d = support::small_row();
  d.wind.moment_slope = 0;
  const auto sensor = [&](double speed) {
    d.wind.operate.speed = speed;
    const Assessment a = assess(d, support::test_table(), {.discretisation = false});
    return optics_at(a, 90 * deg, 0, false).sensor_reading - optics_at(a, 90 * deg, 0, true).sensor_reading;
  };
  CHECK(sensor(12) == Approx(4 * sensor(6)).epsilon(1e-9));
}

TEST_CASE("a criterion just inside its limit is met, just outside is missed", "[assess]") {
  auto d = support::small_row();
  const Assessment free = assess(d, support::test_table(), {.discretisation = false});
  const double slope = criterion(free, "slope").value;
  d.limits.slope = slope * 1.001;
  CHECK(criterion(assess(d, support::test_table(), {.discretisation = false}), "slope").met());
  d.limits.slope = slope * 0.999;
  const Assessment missed = assess(d, support::test_table(), {.discretisation = false});
  CHECK_FALSE(criterion(missed, "slope").met());
  CHECK(missed.verdict == Verdict::does_not_hold);
  CHECK(missed.answers[0] == Answer::no);
}

TEST_CASE("without limits nothing is judged and nothing passes silently", "[assess]") {
  auto d = support::small_row();
  d.limits = {};
  d.drive.moving_torque = d.drive.holding_torque = not_given;
  const Assessment a = assess(d, support::test_table(), {.discretisation = false});
  CHECK(a.verdict == Verdict::holds_as_far_as_judged);
  CHECK(a.answers[0] == Answer::not_judged);
  CHECK(a.answers[1] == Answer::not_judged);
  CHECK(a.not_judged.size() >= 5);
}

TEST_CASE("halved elements change slope and light by little, and the loads balance", "[assess]") {
  const Assessment a = assess(support::small_row(), support::test_table());
  CHECK(std::abs(a.proof.slope_change) < 0.01);
  CHECK(std::abs(a.proof.intercept_change) < 1e-3);
  CHECK(a.proof.load_error < 1e-12);
  CHECK(a.proof.balance < 1e-8);
  CHECK(a.proof.wind_force == Approx(a.proof.q_area_c).epsilon(1e-12));
}

TEST_CASE("the parts of the loss and their interaction add up to the loss", "[assess]") {
  const Assessment a = assess(support::small_row(), support::test_table(), {.discretisation = false});
  for (const OpticalRow& row : a.optics) {
    double sum = row.result.attribution.interaction;
    for (const PartLoss& p : row.result.attribution.parts) sum += p.alone;
    CHECK(sum == Approx(row.result.attribution.loss).margin(1e-12));
    CHECK(row.result.attribution.intercept == Approx(row.result.intercept).margin(1e-9));
  }
}

TEST_CASE("the row's light is the mean of its modules' light, never that of a mean twist", "[assess]") {
  const Assessment a = assess(support::small_row(), support::test_table(), {.discretisation = false});
  for (const OpticalRow& row : a.optics) {
    double mean = 0;
    for (double m : row.result.module_intercept)
      mean += m / static_cast<double>(row.result.module_intercept.size());
    CHECK(mean == Approx(row.result.intercept).epsilon(1e-12));
  }
}

TEST_CASE("a thicker tube twists less and weighs more", "[assess]") {
  auto d = support::small_row();
  const Assessment thin = assess(d, support::test_table(), {.discretisation = false});
  d.tube.profile.wall = 6 * mm;
  const Assessment thick = assess(d, support::test_table(), {.discretisation = false});
  CHECK(criterion(thick, "twist").value < criterion(thin, "twist").value);
  CHECK(thick.mass > thin.mass);
}

TEST_CASE("the same design gives the same bits, on one thread or on several", "[assess]") {
  const auto d = support::small_row();
  const Assessment one = assess(d, support::test_table(), {.discretisation = false});
  for (const Assessment& a : assess_many({d, d, d}, support::test_table())) {
    CHECK(criterion(a, "intercept").value == criterion(one, "intercept").value);
    CHECK(criterion(a, "moving-torque").value == criterion(one, "moving-torque").value);
    CHECK(a.strength.groups.at("rib root").stress == one.strength.groups.at("rib root").stress);
  }
}

TEST_CASE("a cure that claims to meet all limits does so when the change is made by hand", "[assess]") {
  auto d = support::small_row();
  d.drive.moving_torque = 100;  // far too weak: only the drive is missed
  const Assessment a = assess(d, support::test_table(), {.discretisation = false});
  REQUIRE_FALSE(criterion(a, "moving-torque").met());
  const std::vector<Cure> cures = find_cures(d, support::test_table(), a);
  REQUIRE_FALSE(cures.empty());
  bool stronger_drive = false;
  for (const Cure& cure : cures)
    if (cure.changes.size() == 1 && cure.changes[0].rfind("drive moving", 0) == 0) {
      stronger_drive = true;
      d.drive.moving_torque = 1e9;
      const Assessment by_hand = assess(d, support::test_table(), {.discretisation = false});
      CHECK(cure.missed == by_hand.limits_missed);
      CHECK(cure.mass_change == Approx(0).margin(1e-9));
      CHECK(cure.intercept == criterion(by_hand, "intercept").value);
    }
  CHECK(stronger_drive);
}

TEST_CASE("a guess decides when the verdict turns inside its band, and the turning point is right",
          "[assess]") {
  auto d = support::small_row();
  d.ribs.thickness = 5 * mm;  // nothing but the light may be missed
  d.basis["optics"] = "guess";
  const Assessment open = assess(d, support::test_table(), {.discretisation = false});
  d.limits.intercept = criterion(open, "intercept").value + 0.002;  // missed by a little
  const Assessment a = assess(d, support::test_table(), {.discretisation = false});
  REQUIRE_FALSE(criterion(a, "intercept").met());
  bool found = false;
  for (const GuessFinding& g : deciding_guesses(d, support::test_table(), a))
    if (g.attribute == "workshop-slope") {
      found = true;
      CHECK(g.flips_at < 3 * mrad);
      d.optics.workshop_slope = g.flips_at;
      CHECK(criterion(assess(d, support::test_table(), {.discretisation = false}), "intercept").met());
    }
  CHECK(found);
}

TEST_CASE("poses that the table does not cover are refused, never extrapolated", "[assess]") {
  auto table = support::test_table();
  const auto d = support::small_row();
  CHECK(table_gaps(d, table).empty());
  table.rows.pop_back();
  table.pitch_max = 135 * deg;
  const auto gaps = table_gaps(d, table);
  REQUIRE(gaps.size() == 1);
  CHECK(gaps[0].rule == "table-range");
  CHECK(gaps[0].level == Violation::Level::stop);
}

TEST_CASE("a dish's table, gusts counted twice and a table far outside its box are refused", "[assess]") {
  auto d = support::small_row();
  const auto stops = [&](const loads::CoefficientTable& t) {
    int count = 0;
    for (const Violation& v : wind_rules(d, t)) count += v.level == Violation::Level::stop ? 1 : 0;
    return count;
  };
  auto table = support::test_table();
  CHECK(stops(table) == 0);
  table.collector_kind = "dish";
  CHECK(stops(table) == 1);
  table.collector_kind = "trough";
  table.kind = loads::CoefficientKind::peak;
  CHECK(stops(table) == 0);  // peak coefficients on mean winds
  d.wind.stow.averaging = 3;
  CHECK(stops(table) == 1);
  table.kind = loads::CoefficientKind::mean;
  table.focal_ratio_min = 1.0;  // this row: f / W = 1/3
  table.focal_ratio_max = 1.2;
  CHECK(stops(table) == 1);
  d.accepted.push_back({"another rule", "checked against a tunnel report"});
  const auto rules = wind_rules(d, table);
  REQUIRE(rules.size() == 1);
  d.accepted.back().rule = rules[0].rule;
  CHECK(stops(table) == 0);
}

TEST_CASE("every asked state faces both winds", "[assess]") {
  const auto states = asked_states(support::small_row());
  int front = 0, rear = 0;
  for (const State& s : states)
    if (loads::yaw(s.wind_from) < 1e-9) (s.wind_from == 0 ? front : rear) += 1;
  CHECK(front == rear);
  CHECK(front > 30);
  CHECK(place_text({StateKind::operate, 35 * deg, 0}) == "OPERATE 35 deg, face");
  CHECK(place_text({StateKind::operate, 35 * deg, std::numbers::pi}) == "OPERATE 35 deg, back");
}
