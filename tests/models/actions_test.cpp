// Actions besides weight and wind across the row: totals by statics, and where they must be nothing.

#include <catch2/catch.hpp>
#include <cmath>
#include <numbers>

#include "loads/pose.h"
#include "loads/snow.h"
#include "models/action_loads.h"
#include "models/assess.h"
#include "models/factored_cases.h"
#include "models/row_torsion.h"
#include "models/trough.h"
#include "models/wind_chain.h"
#include "tests/support/trough_design.h"

using namespace focalframe;
using namespace focalframe::models;
using Eigen::Vector3d;
using Eigen::VectorXd;

namespace {

constexpr double pi = std::numbers::pi;

RowModel row_of(const TroughDesign& d) {
  Collector c = build_trough(d);
  UnitCases units = unit_cases(d, c);
  return RowModel(std::move(c), {}, std::move(units));
}

// Sum of the nodal forces of body amplitudes, world axes [N].
Vector3d force_of(const RowModel& row, const VectorXd& amplitudes, double elevation) {
  const VectorXd nodal = row.nodal_loads(amplitudes);
  Vector3d sum = Vector3d::Zero();
  for (int n = 0; 6 * n < nodal.size(); ++n) sum += nodal.segment<3>(6 * n);
  return loads::world_to_collector(elevation).transpose() * sum;
}

const OtherLoad* find(const std::vector<OtherLoad>& all, const std::string& name) {
  for (const OtherLoad& o : all)
    if (o.name == name) return &o;
  return nullptr;
}

double mirror_length(const RowModel& row) { return row.collector().mirror_area / row.collector().width; }

}  // namespace

TEST_CASE(
    "snow weighs ground load times its area by attitude, straight down, and slides off a face turned down",
    "[actions]") {
  auto d = support::small_row();
  d.snow.on_ground = 800;
  const RowModel row = row_of(d);
  for (double e : {35 * deg, 90 * deg, 130 * deg}) {
    const auto others = other_loads(d, row, {StateKind::operate, e, 0});
    REQUIRE(find(others, "snow"));
    const Vector3d sum = force_of(row, find(others, "snow")->amplitudes, e);
    const double area = loads::snow_area({2.4, 0.8, false}, e).area;
    CHECK(sum.z() == Approx(-800 * area * mirror_length(row)).epsilon(1e-9));
    CHECK(std::hypot(sum.x(), sum.y()) < 1e-9 * std::abs(sum.z()));
  }
  CHECK_FALSE(find(other_loads(d, row, {StateKind::stow, -90 * deg, 0}), "snow"));
  d.snow.back = "holds";
  CHECK(find(other_loads(d, row, {StateKind::stow, -90 * deg, 0}), "snow"));
}

TEST_CASE("blocked drains hold water up to the lower rim, and only in a mirror that faces up", "[actions]") {
  auto d = support::small_row();
  d.water.drains = "blocked";
  const RowModel row = row_of(d);
  const auto level = other_loads(d, row, {StateKind::operate, 90 * deg, 0});
  REQUIRE(find(level, "standing water"));
  const Vector3d sum = force_of(row, find(level, "standing water")->amplitudes, 90 * deg);
  // Two thirds of width times depth W^2 / 16 f = 0.45 m: 0.72 m2 of water.
  CHECK(sum.z() == Approx(-1000 * 9.80665 * 2.0 / 3 * 2.4 * 0.45 * mirror_length(row)).epsilon(1e-9));
  CHECK(std::abs(sum.y()) < 1e-9 * std::abs(sum.z()));
  // Tilted, less stays, and its pressure still adds up to a weight.
  const auto tilted = other_loads(d, row, {StateKind::operate, 75 * deg, 0});
  REQUIRE(find(tilted, "standing water"));
  const Vector3d less = force_of(row, find(tilted, "standing water")->amplitudes, 75 * deg);
  CHECK(less.z() > sum.z());
  CHECK(std::abs(less.y()) < 0.03 * std::abs(less.z()));
  CHECK_FALSE(find(other_loads(d, row, {StateKind::operate, 15 * deg, 0}), "standing water"));
  d.water.drains = "open";
  CHECK_FALSE(find(other_loads(d, row, {StateKind::operate, 90 * deg, 0}), "standing water"));
}

TEST_CASE("one side of the hydrostatic pressure is the depth of water there", "[actions]") {
  // At 90 deg the water is 0.45 m deep over the vertex and dry at the rim.
  const loads::Aperture a{2.4, 0.8, false};
  CHECK(loads::water_pressure(a, 90 * deg, 0) == Approx(1000 * 9.80665 * 0.45));
  CHECK(loads::water_pressure(a, 90 * deg, 1.2) == Approx(0).margin(1e-9));
  CHECK(loads::water_pressure(a, -90 * deg, 0) == 0);
}

TEST_CASE("ice weighs what its thickness makes of every surface", "[actions]") {
  auto d = support::small_row();
  d.ice.thickness = 0.010;
  const RowModel row = row_of(d);
  const double mass = action_amounts(d, row, 0).ice_mass;
  // By hand: mirror arc 2.603 m both faces 18 kg/m2 on 11.52 m; tube pi t (D + t) 900 = 4.23 kg/m on 12 m;
  // receiver 1.24 kg/m on 12 m; purlins 6 of 4 x 30 mm + 4 t on 11.5 m: 1.44 kg/m; ribs 24 arms of 0.075
  // x 1.25 m both faces; posts 6 of 0.86 m.
  const double by_hand =
      2.603 * 18 * 11.52 + 4.23 * 12 + 1.24 * 12 + 6 * 1.44 * 11.5 + 24 * 0.075 * 1.25 * 18 + 6 * 0.86 * 1.44;
  CHECK(mass == Approx(by_hand).epsilon(0.03));
}

TEST_CASE("a row of one material heated evenly grows without stress", "[actions]") {
  auto d = support::small_row();
  d.row.axis_to_vertex = d.row.tube_to_vertex;  // no rigid end plates in between
  d.temperature = {293.15, 253.15, 333.15, 0, 0, not_given};
  const RowModel row = row_of(d);
  const auto ways = optical_temperatures(d, row);
  REQUIRE(ways.size() == 2);
  const PoseModel pose = row.pose(40 * deg);
  const Eigen::MatrixXd ends = row.evaluate(row.end_force, pose, ways[0].amplitudes);
  // A tube held at both ends would feel E A alpha 40 K = 1.7e5 N.
  CHECK(ends.cwiseAbs().maxCoeff() < 1);
}

TEST_CASE("a tube warmer on one side bows by alpha dT L^2 / 8h between its bearings", "[actions]") {
  auto d = support::small_row();
  d.row.axis_to_vertex = d.row.tube_to_vertex;
  d.purlins.count = 0;  // they would tie rib to rib
  d.mirror.fixed_to = "ribs";
  d.temperature = {293.15, 293.15, 293.15, 10, 0, not_given};
  const RowModel row = row_of(d);
  const PoseModel pose = row.pose(90 * deg);
  const auto ways = optical_temperatures(d, row);
  const Eigen::MatrixXd w = row.evaluate(row.vertex, pose, ways[0].amplitudes);
  double greatest = 0;
  for (int st = 0; 2 * st < w.rows(); ++st) greatest = std::max(greatest, w(2 * st + 1, 0));
  const double bow = 12e-6 * 10 / 0.1397 * 4.0 * 4.0 / 8;
  // The mirror runs straight between the two ribs 0.64 m off the middle.
  CHECK(greatest == Approx(bow * (1 - 0.32 * 0.32)).epsilon(1e-3));
}

TEST_CASE("an earthquake's base shear is mass times acceleration", "[actions]") {
  auto d = support::small_row();
  d.earthquake.ground_acceleration = 2.0;
  d.earthquake.period = 0.3;
  // EN 1998-1 ground B: S 1.2, plateau 2.5 / 1.5 between 0.15 and 0.5 s.
  CHECK(design_acceleration(d.earthquake) == Approx(2.0 * 1.2 * 2.5 / 1.5));
  const RowModel row = row_of(d);
  const auto others = other_loads(d, row, {StateKind::stow, -90 * deg, 0});
  const double masses = row.body_mass + 4 * fem::total_mass(row.collector().stands[0].frame).mass;
  const PoseModel pose = row.pose(-90 * deg);
  for (const auto& [name, foot] : {std::pair{"earthquake towards +Y", 2}, {"earthquake along the row", 1}}) {
    REQUIRE(find(others, name));
    double shear = 0;
    for (int k = 0; k < 4; ++k) shear += row.evaluate_stand(k, pose, find(others, name)->amplitudes)(foot, 0);
    CHECK(shear == Approx(-masses * 4.0).epsilon(1e-6));
  }
}

TEST_CASE("without a period the worst of the spectrum is taken", "[actions]") {
  EarthquakeInput q;
  CHECK(std::isnan(design_acceleration(q)));
  q.ground_acceleration = 1;
  const double worst = design_acceleration(q);
  for (double period : {0.05, 0.3, 1.0, 2.0}) {
    q.period = period;
    CHECK(design_acceleration(q) <= worst * (1 + 1e-12));
  }
  EarthquakeInput asce;
  asce.code = "ASCE 7";
  asce.s_ds = 0.5;
  CHECK(design_acceleration(asce) == Approx(0.5 / 1.25 * 9.80665));
}

TEST_CASE("a person on a rib's tip turns the drive by weight times distance", "[actions]") {
  auto d = support::small_row();
  d.maintenance = {1000, 90 * deg};
  const RowModel row = row_of(d);
  const auto others = other_loads(d, row, {StateKind::maintenance, 90 * deg, 0});
  REQUIRE(others.size() == 4);
  const PoseModel pose = row.pose(90 * deg);
  const OtherLoad* tip = find(others, "person on the rib tip on the +Y side");
  REQUIRE(tip);
  const double torque = pose.bearing_force.row(row.drive_turn()).dot(tip->amplitudes);
  CHECK(std::abs(torque) == Approx(1000 * 1.2).epsilon(0.05));  // the rib's axis ends a little inside the rim
  CHECK(force_of(row, tip->amplitudes, 90 * deg).z() == Approx(-1000).epsilon(1e-9));
}

TEST_CASE("a row without mirrors weighs less by its mirrors, half of them on either side", "[actions]") {
  auto d = support::small_row();
  d.erection.at = 60 * deg;
  const RowModel row = row_of(d);
  double mirror = 0;
  for (const fem::PointMass& p : row.collector().body.masses)
    if (p.group == "mirror") mirror += p.mass;
  const auto weight = [&](int side) {
    return -force_of(row, unfinished_weight(row, 60 * deg, side), 60 * deg).z() / 9.80665;
  };
  CHECK(weight(2) == Approx(row.body_mass).epsilon(1e-9));
  CHECK(weight(0) == Approx(row.body_mass - mirror).epsilon(1e-9));
  CHECK(weight(1) == Approx(row.body_mass - mirror / 2).epsilon(1e-9));
  CHECK(weight(-1) == Approx(weight(1)).epsilon(1e-9));
}

TEST_CASE("a half pattern takes half of one module's load away and nothing elsewhere", "[actions]") {
  const RowModel row = row_of(support::small_row());
  WindOnRow wind;
  wind.coefficients = {1.5, 0, 0};
  wind.bare_members = false;
  const auto axial = [&](Spread spread) {
    wind.spread = spread;
    return -(row.load_totals() * wind_amplitudes(row, 30 * deg, wind).head(row.columns().body()))[1];
  };
  const double whole = axial(Spread::linear);
  CHECK(whole == Approx(1.5 * row.collector().mirror_area).epsilon(1e-12));
  for (Spread half : {Spread::half_minus, Spread::half_plus})
    CHECK(axial(half) == Approx(whole * (1 - 0.5 / 3)).epsilon(1e-12));
  wind.half_everywhere = true;
  CHECK(axial(Spread::half_plus) == Approx(whole / 2).epsilon(1e-12));
}

TEST_CASE("oblique wind loads the row across by cos^2 and along by its own part", "[actions]") {
  auto d = support::small_row();
  const auto table = support::test_table();
  const RowModel row = row_of(d);
  const RowWinds winds(d, table);
  const State straight{StateKind::stow, -90 * deg, 0}, oblique{StateKind::stow, -90 * deg, 45 * deg},
      along{StateKind::stow, -90 * deg, 90 * deg};
  const WindChainRow a = wind_chain_row(row, winds, straight, true, 100),
                     b = wind_chain_row(row, winds, oblique, true, 100),
                     c = wind_chain_row(row, winds, along, true, 100);
  CHECK(b.side == Approx(a.side / 2));
  CHECK(c.side == Approx(a.side / 4));  // held beyond 60 deg
  CHECK(a.along == 0);
  CHECK(b.along == Approx(c.along / 2));
  // By hand for wind along the row: friction 0.05 on the arc; 24 rib arms of mean depth 75 mm with drag 2 on
  // their length; 6 posts 30 mm wide, drag 2.2.
  const double arc = 2.603, arm = 1.25, post = 0.86;
  const double by_hand =
      100 * (0.05 * arc * mirror_length(row) + 24 * 1.2 * 0.075 * arm + 6 * 2.2 * 0.03 * post);
  CHECK(c.along == Approx(by_hand).epsilon(0.03));
}

TEST_CASE("tube and ribs have drag of their own as far as the mirror does not hide them", "[actions]") {
  CHECK(bare_share("mirror", 0) == 0);
  CHECK(bare_share("mirror", 90 * deg) == Approx(1));
  CHECK(bare_share("mirror", 180 * deg) == Approx(0).margin(1e-30));
  CHECK(bare_share("none", 0) == 1);
  CHECK(bare_share("all", 90 * deg) == 0);
  auto d = support::small_row();
  auto table = support::test_table();
  const RowModel row = row_of(d);
  const State edge_on{StateKind::operate, 90 * deg, 0};
  const WindChainRow open = wind_chain_row(row, RowWinds(d, table), edge_on, false, 50);
  // Tube 1.2 x 139.7 mm on 12 m; 24 arms 2 x 3 mm x 1.25 m.
  CHECK(open.frame == Approx(50 * (1.2 * 0.1397 * 12 + 24 * 2 * 0.003 * 1.25)).epsilon(0.02));
  CHECK(open.receiver == Approx(50 * 1.2 * 0.0337 * 12).epsilon(1e-6));
  table.includes_frame = true;
  CHECK(wind_chain_row(row, RowWinds(d, table), edge_on, false, 50).frame == 0);
}

TEST_CASE("every line of the wind chain is q A C, and its nodal loads say the same", "[actions]") {
  auto d = support::small_row();
  d.wind.zone = "interior";
  const Assessment a = assess(d, support::test_table(), {.discretisation = false});
  REQUIRE(a.wind_loads.size() > 40);
  for (const WindChainRow& r : a.wind_loads) {
    CHECK(r.axial == Approx(r.pressure * r.area * r.table.Ca * 0.5 * r.yaw_factor));
    CHECK(r.moment_axis == Approx(r.pressure * r.area *
                                  (r.width * r.table.Cm * 0.7 + 0.20 * r.table.Cs * 0.5) * r.yaw_factor));
    CHECK(r.total_error < 1e-12);
  }
}

TEST_CASE("profile stations may lie anywhere: a mirrored wind sees the mirrored profile", "[actions]") {
  Collector c = build_trough(support::small_row());
  const std::vector<double> stations{-0.5, -0.1, 0.3, 0.5};
  const RowModel row(std::move(c), stations);
  WindOnRow wind;
  wind.coefficients = {1.2, 0.1, -0.05};
  wind.spread = Spread::profile;
  wind.profile = {1.4, 1.2, 1.0, 0.6};
  wind.bare_members = false;
  for (double from : {0.0, pi}) {
    wind.wind_from = from;
    const double side = from == 0 ? 1 : -1;
    const Vector3d sum = row.load_totals() * wind_amplitudes(row, 40 * deg, wind).head(row.columns().body());
    CHECK(-sum[1] == Approx(1.2 * row.collector().mirror_area).epsilon(1e-12));
    CHECK(-side * sum[0] == Approx(0.1 * row.collector().mirror_area).epsilon(1e-11));
    // The rim at s/W = -0.5 carries the larger share: +y for wind from +Y.
    const PatternNumbers p = pattern_numbers(row, 40 * deg, wind);
    CHECK(p.edge_upwind > p.edge_downwind);
  }
}

TEST_CASE("combinations are run only where their leading action occurs, and variable actions may stay away",
          "[actions]") {
  StateLoads loads;
  loads.state = {StateKind::stow, -90 * deg, 0};
  loads.weight = VectorXd::Zero(3);
  loads.wind = Eigen::MatrixXd::Zero(3, 2);
  loads.spread = {Spread::linear, Spread::edge};
  const loads::CombinationSet set = support::en_1990();
  CHECK(factored_cases(set, loads, Wanted::strength).size() == 4);  // 2 combinations x 2 winds
  loads.others.push_back({loads::Action::snow, "snow", VectorXd::Zero(3)});
  const auto cases = factored_cases(set, loads, Wanted::strength);
  // Wind leading with and without snow, weight helping, snow leading with either wind or none.
  CHECK(cases.size() == 2 * 2 + 2 + 3);
  bool found = false;
  for (const FactoredCase& c : cases) found = found || case_text(c, loads) == "1.35 G + 1.5 S + 0.9 W (snow)";
  CHECK(found);
  loads.state.kind = StateKind::stuck;
  for (const FactoredCase& c : factored_cases(set, loads, Wanted::strength))
    CHECK(case_text(c, loads) == "1 G + 1 W");
  // Drive and ground feel the unfactored wind whatever the set's service combinations are.
  CHECK(case_text(factored_cases(set, loads, Wanted::service)[0], loads) == "1 G + 1 W");
}

TEST_CASE("earthquakes act once per pose, people only in MAINTENANCE", "[actions]") {
  StateLoads loads;
  loads.weight = VectorXd::Zero(3);
  loads.wind = Eigen::MatrixXd::Zero(3, 1);
  loads.spread = {Spread::linear};
  loads.others.push_back({loads::Action::seismic, "earthquake", VectorXd::Zero(3)});
  const loads::CombinationSet set = support::en_1990();
  const auto quakes = [&](StateKind kind, double from) {
    loads.state = {kind, 0, from};
    int count = 0;
    for (const FactoredCase& c : factored_cases(set, loads, Wanted::strength)) count += c.earthquake ? 1 : 0;
    return count;
  };
  CHECK(quakes(StateKind::operate, 0) == 1);
  CHECK(quakes(StateKind::operate, pi) == 0);
  CHECK(quakes(StateKind::stuck, 0) == 0);
  loads.others = {{loads::Action::imposed, "person", VectorXd::Zero(3)}};
  loads.state = {StateKind::maintenance, 0, 0};
  for (const FactoredCase& c : factored_cases(set, loads, Wanted::strength)) CHECK(c.others.size() == 1);
}

TEST_CASE("snow raises stress where it lies, and the report says by which combination", "[actions]") {
  auto d = support::small_row();
  const Assessment bare = assess(d, support::test_table(), {.discretisation = false});
  d.snow.on_ground = 4000;
  const Assessment snowed = assess(d, support::test_table(), {.discretisation = false});
  const StressUse& use = snowed.strength.groups.at("rib root");
  CHECK(use.stress > bare.strength.groups.at("rib root").stress);
  CHECK(use.combination.find("S") != std::string::npos);
  CHECK(snowed.optics.size() == bare.optics.size());  // light is judged without snow
  CHECK(snowed.actions.size() > 10);
}

TEST_CASE("temperature and friction add poses of their own to the light, unfactored", "[actions]") {
  auto d = support::small_row();
  const Assessment plain = assess(d, support::test_table(), {.discretisation = false});
  d.temperature = {293.15, 263.15, 323.15, 8, 30, not_given};
  d.drive.friction = 60;
  const Assessment more = assess(d, support::test_table(), {.discretisation = false});
  CHECK(more.optics.size() == 5 * plain.optics.size());
  // Friction either way moves the sensor's reading by as much.
  double plus = not_given, minus = not_given, none = not_given;
  for (const OpticalRow& row : more.optics) {
    if (!row.calm || std::abs(row.state.elevation - 45 * deg) > 1e-9) continue;
    (row.also == "friction +"   ? plus
     : row.also == "friction -" ? minus
     : row.also.empty()         ? none
                                : plus) = row.result.sensor_reading;
  }
  CHECK(plus - none == Approx(none - minus).epsilon(1e-6));
  CHECK(plus != minus);
}

TEST_CASE("the light can be judged in a shorter mean, which blows harder", "[actions]") {
  auto d = support::small_row();
  const auto factor = [&](double averaging) {
    d.optics.wind_averaging = averaging;
    return assess(d, support::test_table(), {.discretisation = false}).optics_pressure_factor;
  };
  CHECK(factor(600) == 1);
  // Durst: 1.24 / 1.06 (from memory) on the speed.
  CHECK(factor(60) == Approx(std::pow(1.24 / 1.06, 2)).epsilon(1e-6));
  CHECK(factor(3) > factor(60));
}

TEST_CASE("a speed measured on the site is not one of open country", "[actions]") {
  auto d = support::small_row();
  d.site.terrain = "EN III";
  const double map = winds_at_axis(d).operate.mean_speed;
  d.wind.operate.over = "site";
  const double own = winds_at_axis(d).operate.mean_speed;
  CHECK(own > map);
  d.row.axis_height = 10;
  CHECK(winds_at_axis(d).operate.mean_speed == Approx(10));  // measured there
}

TEST_CASE("the dynamic factor falls with damping and is never below 1", "[actions]") {
  auto d = support::small_row();
  d.wind.dynamic_word = "EN Annex B";
  const RowDynamics once = row_dynamics(d);
  CHECK(once.frequency > 0.5);
  CHECK(once.frequency < 60);
  CHECK(once.factor >= 1);
  d.wind.damping = 0.01;
  CHECK(row_dynamics(d).factor > once.factor);
  const TroughDesign number = with_dynamic_factor(d);
  CHECK(number.wind.dynamic_factor > 1);
  CHECK(number.wind.dynamic_word.empty());
}

TEST_CASE("a row being built and a person on it are states of their own", "[actions]") {
  auto d = support::small_row();
  d.wind.unfinished = {true, 18, 600, 10};
  d.erection = {90 * deg, "one side"};
  d.maintenance = {1500, 60 * deg};
  int unfinished = 0, person = 0;
  for (const State& s : asked_states(d)) {
    unfinished += s.kind == StateKind::unfinished ? 1 : 0;
    person += s.kind == StateKind::maintenance ? 1 : 0;
  }
  CHECK(unfinished == 3);  // both winds and along the row
  CHECK(person == 2);
  const Assessment a = assess(d, support::test_table(), {.discretisation = false});
  CHECK(a.proof.load_error < 1e-12);
  d.erection.mirrors = "none";
  CHECK(assess(d, support::test_table(), {.discretisation = false}).proof.load_error < 1e-12);
}
