// From the built row to light: panels, attribution, sensors, bounds, maps and the trace, by their laws.

#include "models/optics_study.h"

#include <catch2/catch.hpp>
#include <cmath>
#include <numbers>

#include "models/optical_maps.h"
#include "models/rigging.h"
#include "models/row_trace.h"
#include "models/sun_table.h"
#include "models/trough.h"
#include "models/wind_load.h"
#include "tests/support/trough_design.h"

using namespace focalframe;
using namespace focalframe::models;

namespace {

// The small row with its sheet as thin as it is.
TroughDesign thin_row() {
  auto d = support::small_row();
  d.mirror.bending_stiffness = not_given;
  return d;
}

// A row in a wind on its back at one pose.
struct Bent {
  TroughDesign design;
  RowModel row;
  OpticsCheck check;
  PoseModel pose;
  Eigen::VectorXd weight, all;
  OpticalMotion motion;

  explicit Bent(TroughDesign d, double elevation = 45 * deg, double pressure = 40)
      : design(std::move(d)),
        row(build_trough(design), {}),
        check(row, design),
        pose(row.pose(elevation)),
        weight(weight_amplitudes(row, elevation)) {
    WindOnRow wind;
    wind.wind_from = std::numbers::pi;
    wind.coefficients = {-0.6, 0.3, 0.18};
    wind.pressure = pressure;
    all = weight + pressure * wind_amplitudes(row, elevation, wind);
    motion = check.motions(pose, all).front();
  }
  double intercept() const { return check.look(pose, all, OpticsDetail::limits).front().intercept; }
  OpticsStudy study() const { return study_optics(check, design, pose, weight, all); }
};

}  // namespace

TEST_CASE("the parts of the miss add up to it, and their losses and interactions to the loss", "[optics]") {
  const Bent bent(thin_row());
  const double back = bent.check.correction(bent.check.readings(bent.motion));
  const Eigen::MatrixXd miss = bent.check.miss(bent.motion, back);
  std::vector<double> sum(static_cast<std::size_t>(miss.size()), 0.0);
  for (const MissPart& part : bent.check.parts(bent.motion, back))
    for (std::size_t i = 0; i < sum.size(); ++i) sum[i] += part.miss[i];
  for (std::size_t i = 0; i < sum.size(); ++i) CHECK(sum[i] == Approx(miss.data()[i]).margin(1e-12));
  const OpticsStudy study = bent.study();
  double row = 0;
  for (const Attribution& module : study.modules) {
    double parts = module.interaction;
    for (const PartLoss& part : module.parts) parts += part.alone;
    CHECK(parts == Approx(module.loss).margin(1e-12));
    row += module.intercept / static_cast<double>(study.modules.size());
  }
  CHECK(row == Approx(bent.intercept()));
  CHECK(study.causes.intercept == Approx(bent.intercept()));
  CHECK(study.causes.parts[0].alone + study.causes.parts[1].alone + study.causes.interaction ==
        Approx(study.perfect - bent.intercept()));
  CHECK(study.by_weight.loss == Approx(study.causes.parts[0].alone));
}

TEST_CASE("weight at the set-true pose costs nothing but the panels' own sag", "[optics]") {
  const Bent bent(thin_row(), 90 * deg, 0);
  const OpticsStudy study = bent.study();
  for (const PartLoss& part : study.by_weight.parts)
    if (part.name != "panel") CHECK(part.alone == Approx(0).margin(1e-9));
}

TEST_CASE("a thinner sheet and a wider support cost light, whatever carries the sheet", "[optics][panel]") {
  for (const char* carrier : {"ribs", "purlins"}) {
    const auto loss = [&](double thickness, int ribs, int purlins) {
      auto d = thin_row();
      d.mirror.fixed_to = carrier;
      d.mirror.thickness = thickness;
      d.ribs.per_module = ribs;
      d.purlins.count = purlins;
      const OpticsStudy study = Bent(std::move(d)).study();
      return study.modules[0].parts.back().alone;
    };
    INFO(carrier);
    CHECK(loss(0.6 * mm, 4, 6) > 2 * loss(1.2 * mm, 4, 6));
    const bool ribs = std::string(carrier) == "ribs";
    CHECK(loss(0.6 * mm, ribs ? 3 : 4, ribs ? 6 : 4) > 2 * loss(0.6 * mm, ribs ? 5 : 4, 6));
  }
}

TEST_CASE("purlins that bend cost light under the sheet they carry", "[optics][panel]") {
  const auto slope = [](double side, double wall) {
    auto d = thin_row();
    d.purlins.profile.side = side;
    d.purlins.profile.wall = wall;
    const Bent bent(d);
    return bent.motion.panel_along.norm();
  };
  CHECK(slope(12 * mm, 1 * mm) > 5 * slope(30 * mm, 2 * mm));
}

TEST_CASE("a skin of unknown stiffness stays straight and says so", "[optics][panel]") {
  auto d = thin_row();
  d.mirror.thickness = not_given;
  d.mirror.material.clear();
  d.mirror.mass = 3.2;
  const Bent bent(d);
  CHECK_FALSE(bent.check.panel().known());
  CHECK(bent.motion.panel_turn.norm() == 0);
  CHECK(bent.check.panel().method().find("not computed") != std::string::npos);
  d.mirror.bending_stiffness = 10;
  CHECK(Bent(d).motion.panel_turn.norm() > 0);
}

TEST_CASE("a sun sensor aims its module best, the row mean takes out the mean, an encoder sees no tube",
          "[optics][sensor]") {
  for (int module = 1; module <= 3; ++module) {
    auto d = thin_row();
    d.sensor.kind = "sun";
    d.sensor.module = module;
    const Bent bent(d);
    const SensorReadings read = bent.check.readings(bent.motion);
    // Aimed by its own sensor, the module's mean optical error is nothing.
    const Skin& skin = bent.row.collector().skin;
    const Eigen::MatrixXd miss = bent.check.miss(bent.motion, read.sun);
    double moment = 0, all = 0;
    for (int st = (module - 1) * skin.stations; st < module * skin.stations; ++st)
      for (int r = 0; r < skin.rows; ++r) {
        const double share = bent.check.weight()[static_cast<std::size_t>(skin.sample(st, r))] *
                             bent.check.aim_lever()[r] * miss(r, st);
        moment += share;
        all += std::abs(share);
      }
    CHECK(std::abs(moment) < 1e-9 * all);
    CHECK(read.inclinometer == Approx(bent.motion.module_turn[module - 1]));
    CHECK(read.row_mean == Approx(bent.motion.module_turn.mean()));
    CHECK(std::abs(read.encoder) < std::abs(bent.motion.beside_drive));
  }
  const AimChoices aims = Bent(thin_row()).study().aims;
  CHECK(aims.row_mean > aims.none);
}

TEST_CASE("play and friction bound the light from below, and cost nothing where there are none",
          "[optics][play]") {
  const Bent still(thin_row());
  CHECK(still.study().play.intercept == Approx(still.intercept()));
  double before = still.intercept();
  for (double play : {2 * mrad, 6 * mrad}) {
    auto d = thin_row();
    d.drive.play = play;
    d.end_plates.play = play / 2;
    d.drive.friction = 50;
    const PlayBound bound = Bent(d).study().play;
    CHECK(bound.intercept < before);
    before = bound.intercept;
    // Drive after module 1: one joint on the way to the third module.
    CHECK(bound.farthest == Approx(play / 2 + play / 4 + bound.friction_twist).epsilon(0.2));
  }
}

TEST_CASE("a row that has lost its light has no time to wait, a better limit leaves less", "[optics]") {
  auto d = thin_row();
  const auto minutes = [&](double limit) {
    d.limits.intercept = limit;
    return Bent(d).study().re_aim_time / 60;
  };
  CHECK(minutes(0.9999) == 0);
  CHECK(minutes(0.5) > minutes(0.7));
  CHECK(minutes(0.7) > 0);
}

TEST_CASE("the best-fit of a module has full rank and a slope that the fit lowers", "[optics]") {
  const OpticsStudy study = Bent(thin_row()).study();
  CHECK(study.fit.rank == 3);
  CHECK(study.fit.condition < 100);
  CHECK(study.fit.slope_rms_after < study.fit.slope_rms);
  CHECK(study.slope_radial >= study.fit.slope_rms_after);
}

TEST_CASE("maps hold the light of the state: local intercepts and the flux on the tube add up",
          "[optics][maps]") {
  for (const char* target : {"tube", "strip"}) {
    auto d = thin_row();
    d.receiver.catches = target;
    d.receiver.strip_width = 50 * mm;
    const Bent bent(d);
    const ApertureMaps maps = aperture_maps(bent.check, bent.motion);
    double light = 0, area = 0;
    for (Eigen::Index i = 0; i < maps.intercept.size(); ++i) {
      light += bent.check.weight()[static_cast<std::size_t>(i)] * maps.intercept.data()[i];
      area += bent.check.weight()[static_cast<std::size_t>(i)];
    }
    INFO(target);
    CHECK(light / area == Approx(bent.intercept()));
    const ReceiverMap map = receiver_map(bent.check, bent.motion);
    double sum = 0;
    for (double flux : map.flux) sum += flux * map.bin;
    CHECK(sum == Approx(bent.intercept() * 2.4).epsilon(1e-6));
    CHECK(map.peak() > 1);
  }
}

TEST_CASE("the flux on a perfect trough's tube is even on both sides and dark on the far one",
          "[optics][maps]") {
  const Bent bent(thin_row(), 90 * deg, 0);
  OpticalMotion still = bent.motion;
  for (auto* m : {&still.v, &still.w, &still.turn, &still.along, &still.panel_v, &still.panel_w,
                  &still.panel_turn, &still.panel_along})
    m->setZero();
  still.receiver.setZero();
  const ReceiverMap map = receiver_map(bent.check, still, 36);
  for (std::size_t k = 0; k < 36; ++k) CHECK(map.flux[k] == Approx(map.flux[35 - k]).margin(1e-9));
  CHECK(map.flux[0] < 0.01 * map.peak());
  // A receiver that has moved to -y gets the light on its +y side.
  still.receiver.row(0).setConstant(-5 * mm);
  const ReceiverMap moved = receiver_map(bent.check, still, 36);
  double plus = 0, minus = 0;
  for (std::size_t k = 0; k < 36; ++k) (moved.place[k] > 0 ? plus : minus) += moved.flux[k];
  CHECK(plus > 1.05 * minus);
}

TEST_CASE("the trace of the bent row agrees with the analytic light, calm and windy, square and oblique",
          "[optics][trace]") {
  for (const char* carrier : {"ribs", "purlins"})
    for (double incidence : {0.0, 30 * deg}) {
      auto d = thin_row();
      d.mirror.fixed_to = carrier;
      d.optics.incidence = incidence;
      d.ribs.elements = 15;  // the trace sees the skin through its samples
      const Bent bent(d);
      const RowTrace trace = trace_row(bent.check, bent.motion, 60'000);
      INFO(carrier << " " << trace.analytic << " " << trace.traced.intercept);
      CHECK(trace.agrees);
      CHECK(trace.analytic == Approx(bent.intercept()));
      CHECK(trace.high - trace.low < 0.01);
    }
  const Bent bent(thin_row());
  CHECK_THROWS_AS(trace_row(bent.check, bent.motion, 0), std::invalid_argument);
}

TEST_CASE("a row tracked evenly to both sides is best set true facing up, and never worse than now",
          "[optics][rigging]") {
  auto d = thin_row();
  d.optics.set_true = 30 * deg;
  const Bent bent(d);
  const Rigging rigging =
      best_rigging(bent.check, {15 * deg, 45 * deg, 90 * deg, 135 * deg, 165 * deg}, d.optics.set_true);
  CHECK(rigging.best.least >= rigging.now.least);
  CHECK(rigging.best.set_true == Approx(90 * deg).margin(1.5 * deg));
}

TEST_CASE("a sun written as a table is that sun, and what is no table says why", "[optics][sun]") {
  CHECK(line_rms(sun_of_table("0 mrad 1, 4.65 mrad 1")) == Approx(line_rms(pillbox_sun())).epsilon(1e-3));
  CHECK_THROWS_WITH(sun_of_table("0 mrad 1, 4 1"), Catch::Contains("4 1"));
  CHECK_THROWS_AS(sun_of_table("0 mrad 1"), std::invalid_argument);
  CHECK_THROWS_AS(sun_of_table("5 mrad 1, 4 mrad 1"), std::invalid_argument);
}
