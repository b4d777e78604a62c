// Wind inputs that engineers get wrong, each in the words of somebody who made the slip, and what is said
// about it.

#include <catch2/catch.hpp>
#include <string>
#include <vector>

#include "cli/quantity.h"
#include "cli/shipped_tables.h"
#include "loads/guards.h"
#include "models/states.h"
#include "models/wind_rules.h"
#include "tests/cli/designs.h"

using namespace focalframe;
using namespace focalframe::cli;

namespace {

using Changes = std::initializer_list<std::pair<std::string, std::string>>;

struct Said {
  Level level;
  std::string text;
};

Level level_of(models::Violation::Level level) {
  return level == models::Violation::Level::stop   ? Level::stop
         : level == models::Violation::Level::warn ? Level::warn
                                                   : Level::note;
}

// Everything `check` says about the row before it computes anything.
std::vector<Said> said(Changes changes, const loads::CoefficientTable* other = nullptr,
                       const std::string& table_zone = {}) {
  const DesignFile design = changed_row(changes);
  std::vector<Said> all;
  for (const Message& m : design.messages)
    all.push_back({m.level, m.head + " | " + m.rule + " | " + m.text + " | " + m.likely + " | " + m.advice});
  if (!design.sound()) return all;
  std::vector<Message> ignored;
  const auto table = find_table(design.trough.wind.table, "./", {}, ignored);
  REQUIRE(table);
  for (const models::Violation& v :
       models::wind_rules(design.trough, other ? *other : table->table, table_zone))
    all.push_back({level_of(v.level), v.element + " " + v.attribute + " | " + v.rule + " | " + v.text +
                                          " | " + v.likely + " | " + v.advice});
  return all;
}

bool says(const std::vector<Said>& all, Level level, const std::string& words) {
  for (const Said& s : all) {
    UNSCOPED_INFO((s.level == Level::stop ? "STOP " : s.level == Level::warn ? "WARN " : "NOTE ") << s.text);
    if (s.level == level && s.text.find(words) != std::string::npos) return true;
  }
  return false;
}

loads::CoefficientTable derived() {
  std::vector<Message> ignored;
  return find_table("trough-derived", "./", {}, ignored)->table;
}

const std::string operate = "<operate speed=\"10 m/s\" averaging=\"10 min\" height=\"10 m\"/>";
const std::string site = "<site altitude=\"450 m\" terrain=\"EN II\"/>";

}  // namespace

TEST_CASE("a speed of another unit looks like no wind a trough works in", "[bad-wind]") {
  CHECK(says(said({{"<operate speed=\"10 m/s\"", "<operate speed=\"36 m/s\""}}), Level::warn,
             "36 m/s is 80.53 mph"));
  CHECK(says(said({{"<stow    speed=\"26 m/s\"", "<stow    speed=\"95 m/s\""}}), Level::warn, "in km/h"));
  CHECK(says(said({{"<stow    speed=\"26 m/s\"", "<stow    speed=\"11 m/s\""}}), Level::warn,
             "1.3 to 6 is usual"));
  CHECK(says(said({{"<operate speed=\"10 m/s\"", "<operate speed=\"10\""}}), Level::stop, "mph"));
}

TEST_CASE("a speed without its averaging is refused with what each would mean by the design's own chain",
          "[bad-wind]") {
  const auto all = said({{operate, "<operate speed=\"10 m/s\" height=\"10 m\"/>"}});
  CHECK(says(all, Level::stop, "averaging=\"3 s\""));
  // The chain of this row: see `check --verbose` with either averaging.
  DesignFile gust = changed_row({{operate, "<operate speed=\"10 m/s\" averaging=\"3 s\" height=\"10 m\"/>"}});
  const double low = models::winds_at_axis(gust.trough).operate.gust_pressure,
               high = models::winds_at_axis(changed_row({}).trough).operate.gust_pressure;
  CHECK(says(all, Level::stop, "gusts of " + std::to_string(std::lround(low)) + " Pa"));
  CHECK(says(all, Level::stop, "of " + std::to_string(std::lround(high)) + " Pa if it is a 10-minute mean"));
  CHECK(says(said({{operate, "<operate speed=\"10 m/s\" averaging=\"5 min\" height=\"10 m\"/>"}}),
             Level::stop, "\"10 min\""));
}

TEST_CASE("peak coefficients on gusts count them twice", "[bad-wind]") {
  auto table = derived();
  table.kind = loads::CoefficientKind::peak;
  CHECK(says(said({{operate, "<operate speed=\"10 m/s\" averaging=\"3 s\" height=\"10 m\"/>"}}, &table),
             Level::stop, "gust-twice"));
  // On means they are right for strength and too much for the light.
  CHECK(says(said({}, &table), Level::warn, "peak-for-optics"));
}

TEST_CASE("mean coefficients on a wind that hardly gusts leave the gusts out", "[bad-wind]") {
  CHECK(says(
      said(
          {{site,
            "<site altitude=\"450 m\" terrain=\"power law\" power-exponent=\"0.14\" turbulence=\"0.02\"/>"}}),
      Level::warn, "gust-left-out"));
}

TEST_CASE("a height that makes the axis windier than ten metres above it is doubted", "[bad-wind]") {
  CHECK(says(said({{operate, "<operate speed=\"10 m/s\" averaging=\"10 min\"/>"}}), Level::stop, "height"));
  loads::WindAtHeight axis, above;
  axis.height = 1.6;
  axis.mean_speed = 11;
  above.mean_speed = 10;
  const auto v = loads::guard_profile(axis, above);
  REQUIRE(v);
  CHECK(v->severity == loads::Severity::warned);
}

TEST_CASE("height above ground and altitude above the sea are not the same", "[bad-wind]") {
  CHECK(says(said({{"altitude=\"450 m\"", "altitude=\"1.7 m\""}}), Level::warn, "both 1.7 m"));
  CHECK(says(said({{"axis-height=\"1.7 m\"", "axis-height=\"70 m\""}}), Level::warn, "70 m above ground"));
  CHECK(says(said({{"altitude=\"450 m\"", "altitude=\"6200 m\""}}), Level::stop, "altitude"));
}

TEST_CASE("thin air must not be counted twice", "[bad-wind]") {
  CHECK(says(said({{"<wind table", "<wind altitude-in-speed=\"yes\" table"}}), Level::stop, "density-twice"));
  CHECK_FALSE(says(said({{site, "<site air-density=\"1.225 kg/m3\" terrain=\"EN II\"/>"},
                         {"<wind table", "<wind altitude-in-speed=\"yes\" table"}}),
                   Level::stop, "density"));
  CHECK(says(said({{site, "<site air-density=\"0.5 kg/m3\" terrain=\"EN II\"/>"}}), Level::stop,
             "air-density"));
  CHECK(says(said({{site, "<site terrain=\"EN II\"/>"}}), Level::note, "safe side"));
}

TEST_CASE("a load factor on a speed that already holds it, or none on one that does not", "[bad-wind]") {
  CHECK(says(said({{"<wind table", "<wind map=\"ultimate\" table"}}), Level::stop, "factor-twice"));
  CHECK(says(
      said({{"<wind table", "<wind map=\"service\" table"}, {"strength=\"EN 1990\"", "strength=\"ASCE 7\""}}),
      Level::warn, "factor-missing"));
  CHECK_FALSE(says(said({{"<wind table", "<wind map=\"service\" table"}}), Level::stop, "factor"));
  CHECK_FALSE(says(said({{"<wind table", "<wind map=\"ultimate\" table"},
                         {"strength=\"EN 1990\"", "strength=\"ASCE 7\""}}),
                   Level::stop, "factor"));
}

TEST_CASE("air temperature and pressure in the wrong unit", "[bad-wind]") {
  CHECK(says(said({{site, "<site altitude=\"450 m\" temperature=\"95 degC\" terrain=\"EN II\"/>"}}),
             Level::stop, "temperature"));
  CHECK(says(said({{site, "<site altitude=\"450 m\" pressure=\"960 Pa\" terrain=\"EN II\"/>"}}), Level::stop,
             "pressure"));
}

TEST_CASE("an angle without unit is refused, radians or degrees", "[bad-wind]") {
  CHECK(says(said({{"track-from=\"15 deg\"", "track-from=\"0.26\""}}), Level::stop, "deg"));
  CHECK(says(said({{"stow-at=\"-90 deg\"", "stow-at=\"-1.57\""}}), Level::stop, "deg"));
}

TEST_CASE("a table whose zero angle, moment centre or reference is not told cannot be read", "[bad-wind]") {
  const std::string whole =
      R"(<coefficients name="t" collector="trough" kind="mean"><conventions pitch-zero="face-on" pitch-grows="upwards" axes="body" moment-about="vertex"/>
<reference speed="mean" height="axis height" area="aperture" length="width"/><source text="test"/>
<row pitch="0 deg" Ca="1.5" Cs="0" Cm="0"/><row pitch="30 deg" Ca="1.4" Cs="0" Cm="0"/></coefficients>)";
  std::vector<Message> fine;
  CHECK(read_table_text(whole, "t.xml", fine));
  for (const std::string& part :
       {std::string(" pitch-zero=\"face-on\""), std::string(" moment-about=\"vertex\""),
        std::string(" area=\"aperture\""), std::string(" length=\"width\""), std::string(" speed=\"mean\""),
        std::string(" kind=\"mean\"")}) {
    std::string less = whole;
    less.erase(less.find(part), part.size());
    std::vector<Message> messages;
    INFO(part);
    CHECK_FALSE(read_table_text(less, "t.xml", messages));
    CHECK(has_stop(messages));
  }
}

TEST_CASE("every case names the face the wind strikes, and both are always run", "[bad-wind]") {
  int face = 0, back = 0;
  for (const models::State& s : models::asked_states(changed_row({}).trough)) {
    const std::string place = models::place_text(s);
    face += place.find("face") != std::string::npos ? 1 : 0;
    back += place.find("back") != std::string::npos ? 1 : 0;
  }
  CHECK(face > 10);
  CHECK(back > 10);
}

TEST_CASE("coefficients outside their box are doubted, far outside refused", "[bad-wind]") {
  auto table = derived();
  table.focal_ratio_min = 0.40;  // the row: f / W = 0.33
  table.focal_ratio_max = 0.60;
  CHECK(says(said({}, &table), Level::warn, "table-range"));
  table.focal_ratio_min = 0.50;
  CHECK(says(said({}, &table), Level::stop, "table-range"));
}

TEST_CASE("shelter needs a row upwind, and counts once", "[bad-wind]") {
  CHECK(says(said({{" zone=\"isolated\"", ""}}), Level::stop, "zone"));
  CHECK(says(said({{"zone=\"isolated\"", "zone=\"interior\" faces-open-ground=\"yes\""}}), Level::stop,
             "no shelter"));
  CHECK(says(said({{"zone=\"isolated\"", "zone=\"interior\""}}, nullptr, "interior"), Level::stop,
             "zone-twice"));
  CHECK(says(said({}, nullptr, "interior"), Level::warn, "zone-table"));
}

TEST_CASE("a mesh's openness given as its solid share", "[bad-wind]") {
  REQUIRE(loads::guard_solidity(1.2));
  CHECK(loads::guard_solidity(1.2)->severity == loads::Severity::refused);
  REQUIRE(loads::guard_solidity(0.1));
  CHECK(loads::guard_solidity(0.1)->severity == loads::Severity::warned);
}

TEST_CASE("snow on a face turned down and snow in a storm are answered", "[bad-wind]") {
  const auto with_snow = [](const std::string& snow) { return said({{"</wind>", "</wind>\n  " + snow}}); };
  CHECK(says(with_snow("<snow on-ground=\"0.8 kPa\"/>"), Level::note, "carries no snow"));
  CHECK(says(with_snow("<snow on-ground=\"0.8 kPa\" back=\"holds\"/>"), Level::note, "do not come together"));
  CHECK(says(with_snow("<snow on-ground=\"0.8 kg/m2\"/>"), Level::stop, "on-ground"));
}

TEST_CASE("tables with gaps, wrong order or missing cells are answered", "[bad-wind]") {
  const std::string head =
      R"(<coefficients name="t" collector="trough" kind="mean"><conventions pitch-zero="face-on" pitch-grows="upwards" axes="body" moment-about="vertex"/>
<reference speed="mean" height="axis height" area="aperture" length="width"/><source text="test"/>)";
  const auto complaint = [&](const std::string& rows) {
    std::vector<Message> messages;
    read_table_text(head + rows + "</coefficients>", "t.xml", messages);
    std::string text;
    for (const Message& m : messages) text += to_text(m);
    return text;
  };
  CHECK(
      complaint(R"(<row pitch="0 deg" Ca="1.5" Cs="0" Cm="0"/><row pitch="60 deg" Ca="1.4" Cs="0" Cm="0"/>)")
          .find("gap") != std::string::npos);
  CHECK(
      complaint(
          R"(<row pitch="0 deg" Ca="1.5" Cs="0" Cm="0"/><row pitch="30 deg" Ca="1.4" Cs="0" Cm="0"/><row pitch="15 deg" Ca="1.4" Cs="0" Cm="0"/>)")
          .find("STOP") != std::string::npos);
  CHECK(complaint(R"(<row pitch="0 deg" Ca="" Cs="0" Cm="0"/><row pitch="30 deg" Ca="1.4" Cs="0" Cm="0"/>)")
            .find("STOP") != std::string::npos);
}

TEST_CASE("winds in the wrong order are doubted", "[bad-wind]") {
  CHECK(says(said({{"<stow    speed=\"26 m/s\"", "<stow    speed=\"9 m/s\""}}), Level::warn,
             "yet this one is weaker"));
  CHECK(says(said({{"<stuck   speed=\"18 m/s\"", "<stuck   speed=\"8 m/s\""}}), Level::warn,
             "that is operation"));
}

TEST_CASE("wind statistics of all hours for a machine that works by day", "[bad-wind]") {
  CHECK(says(said({{"hours=\"daylight\"", "hours=\"all\""}}), Level::warn, "by day"));
}

TEST_CASE("old units are taken where they are plain and refused where they are not", "[bad-wind]") {
  CHECK(parse_quantity("1 kgf", Quantity::force).value == Approx(9.80665));
  CHECK(parse_quantity("1 lbf", Quantity::force).value == Approx(4.4482216));
  CHECK(parse_quantity("1 psf", Quantity::pressure).value == Approx(47.880259));
  CHECK(parse_quantity("1 lbf ft", Quantity::torque).value == Approx(1.3558179));
  for (const char* text : {"100 lb", "2 t", "2 ton"}) {
    INFO(text);
    CHECK_FALSE(parse_quantity(text, Quantity::force).ok());
  }
}

TEST_CASE("actions that lack what they need are refused with what to add", "[bad-wind]") {
  const auto with = [](const std::string& element) { return said({{"</wind>", "</wind>\n  " + element}}); };
  CHECK(says(with("<erection at=\"90 deg\"/>"), Level::stop, "Add <unfinished"));
  CHECK(says(
      said({{"<stuck ", "<unfinished speed=\"15 m/s\" averaging=\"10 min\" height=\"10 m\"/>\n    <stuck "}}),
      Level::stop, "Add <erection"));
  CHECK(says(with("<earthquake code=\"ASCE 7\"/>"), Level::stop, "S_DS"));
  CHECK(says(with("<temperature set-at=\"20 degC\" least=\"40 degC\" most=\"10 degC\"/>"), Level::stop,
             "colder"));
  CHECK(says(with("<maintenance load=\"1 kN\" at=\"175 deg\"/>"), Level::stop, "The drive turns from"));
}
