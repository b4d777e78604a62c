// The screen of the stow trigger can be followed by hand, and a wind record's slips are named with their
// line.

#include <algorithm>
#include <catch2/catch.hpp>
#include <cmath>
#include <nlohmann/json.hpp>
#include <sstream>

#include "cli/stow_json.h"
#include "cli/stow_text.h"
#include "cli/wind_record_file.h"
#include "models/assess.h"
#include "tests/support/trough_design.h"

using namespace focalframe;
using namespace focalframe::cli;

namespace {

models::TroughDesign metered_row() {
  models::TroughDesign d = support::small_row();
  d.ribs.per_module = 3;
  d.ribs.elements = 4;
  d.purlins.count = 2;
  d.row.axis_to_vertex = d.row.tube_to_vertex;
  d.operation.turning_rate = 0.75 * deg;
  d.operation.anemometer = {6, 60, 0.5, "free"};
  d.wind.year.given = true;
  d.wind.year.weibull_scale = 4.5;
  d.wind.year.weibull_shape = 2;
  d.wind.year.averaging = 600;
  d.wind.year.height = 10;
  d.wind.year.hours = "daylight";
  return d;
}

models::StowReport report_of(const models::TroughDesign& d) {
  const auto table = support::test_table();
  return models::stow_report(d, table, *models::build_row(d, table).row);
}

std::vector<Message> faults(const std::string& text) {
  std::vector<Message> messages;
  parse_wind_record(text, "hours.csv", messages);
  return messages;
}

std::string hours(int count, const std::string& line) {
  std::string out;
  for (int i = 0; i < count; ++i) out += line + "\n";
  return out;
}

}  // namespace

TEST_CASE("the stow screen is ASCII, 80 wide, and its chain multiplies to its first line", "[stow]") {
  const models::TroughDesign d = metered_row();
  const models::StowReport r = report_of(d);
  REQUIRE(r.trigger.known);
  const std::string screen = stow_text(r, d, "0123456789abcdef");
  std::istringstream in(screen);
  double speed = 0;
  bool in_chain = false;
  for (std::string line; std::getline(in, line);) {
    INFO(line);
    CHECK(line.size() <= 80);
    CHECK((line.empty() || line.back() != ' '));
    CHECK(std::all_of(line.begin(), line.end(), [](char c) { return c >= 32 && c < 127; }));
    // Follow the printed chain as a reader with a pocket calculator would.
    if (line.rfind("From the row to your anemometer", 0) == 0) {
      std::istringstream cells(line.substr(31));
      cells >> speed;
      in_chain = true;
    } else if (in_chain && line.rfind("  ", 0) == 0) {
      char sign = 0;
      double by = 0;
      std::istringstream cells(line);
      cells >> sign >> by;
      speed = sign == 'x' ? speed * by : sign == '/' ? speed / by : speed - by;
      CHECK(speed == Approx(std::stod(line.substr(line.rfind(' ')))).margin(0.11));
    } else {
      in_chain = false;
    }
  }
  CHECK(speed == Approx(r.trigger.speed).margin(0.15));
  CHECK(screen.find("STOW when the 1 min mean at 6 m reaches") != std::string::npos);
}

TEST_CASE("the details keep to the screen's width", "[stow]") {
  const models::TroughDesign d = metered_row();
  std::istringstream in(stow_detail(report_of(d), d));
  for (std::string line; std::getline(in, line);) {
    INFO(line);
    CHECK(line.size() <= 110);
    CHECK((line.empty() || line.back() != ' '));
  }
}

TEST_CASE("the JSON of stow holds the map, the chain and null where nothing limits", "[stow]") {
  const models::StowReport r = report_of(metered_row());
  const auto json = nlohmann::json::parse(stow_json(r, "abc"));
  CHECK(json["schema"] == "focalframe-stow-1");
  CHECK(json["map"]["cells"].size() == r.limits.map.size());
  CHECK(json["map"]["directions"].size() == 24);
  CHECK(json["trigger"]["trigger_m_s"].get<double>() == Approx(r.trigger.speed));
  CHECK(json["trigger"]["steps"].size() == r.trigger.steps.size());
  CHECK(json["price"]["rows"].size() == r.price.rows.size());
  CHECK(json["sensitivity"].size() == 12);
  for (const auto& cell : json["map"]["cells"])
    for (const auto& c : cell["criteria"]) CHECK((c["gust_3s_m_s"].is_null() || c["gust_3s_m_s"] < 1e6));
}

TEST_CASE("a good record is read with its units", "[record]") {
  std::vector<Message> messages;
  const auto record = parse_wind_record(
      "# made up\ntime;speed [km/h];direction [deg];beam [W/m2]\n" + hours(30, "1;36;180;-2") + "2;;90;500\n",
      "hours.csv", messages);
  CHECK_FALSE(has_stop(messages));
  REQUIRE(record.speed.size() == 31);
  CHECK(record.speed[0] == Approx(10));
  CHECK(record.direction[0] == Approx(180 * deg));
  CHECK(record.beam[0] == 0);
  CHECK(std::isnan(record.speed[30]));
  CHECK(record.gaps == 1);
}

TEST_CASE("a record's slips are named with line and fix", "[record]") {
  const auto only_stop = [](const std::string& text) {
    for (const Message& m : faults(text))
      if (m.level == Level::stop) return m;
    return Message{};
  };
  CHECK(only_stop("3.4,210\n").likely.find("speed [m/s]") != std::string::npos);
  CHECK(only_stop("wind,direction [deg]\n").head.find("no column \"speed\"") != std::string::npos);
  CHECK(only_stop("speed,direction [deg]\n").likely == "speed [m/s]");
  CHECK(only_stop("speed [knots]\n").text.find("kn") != std::string::npos);
  const Message negative = only_stop("speed [m/s]\n" + hours(3, "1") + "-99\n-99\n");
  CHECK(negative.line == 5);
  CHECK(negative.text.find("filler") != std::string::npos);
  CHECK(negative.text.find("2 lines") != std::string::npos);
  CHECK(only_stop("speed [m/s],beam [W/m2]\n3,4,500\n").advice.find("decimal points") != std::string::npos);
  CHECK(only_stop("speed [m/s];beam [W/m2]\n3,4;500\n").text.find("point") != std::string::npos);
  CHECK(only_stop("speed [m/s]\n" + hours(30, "72")).text.find("unit") != std::string::npos);
  CHECK(only_stop("speed [m/s]\n1\n").text.find("day") != std::string::npos);
  CHECK(only_stop("").head.find("empty") != std::string::npos);
  CHECK(only_stop("speed [m/s],beam [W/m2]\n" + hours(10, "3,0") + hours(30, ",0")).text.find("half") !=
        std::string::npos);
}

TEST_CASE("a hand-turned row without a meter is served with Beaufort and a meter in the hand", "[stow]") {
  models::TroughDesign d = metered_row();
  d.operation.anemometer = {};
  d.operation.turned_by = "hand";
  d.operation.notice = 900;
  d.operation.push = 200;
  d.operation.crank = 0.4;
  d.operation.gear = 60;
  d.drive.moving_torque = models::not_given;
  const std::string screen = stow_text(report_of(d), d, "0123456789abcdef");
  CHECK(screen.find("1 min mean at 2 m") != std::string::npos);
  CHECK(screen.find("Beaufort") != std::string::npos);
  CHECK(screen.find("crank brings 4.80 kN m") != std::string::npos);
}
