// What a user reads: it fits the screen, says what the numbers say, and JSON says the same.

#include <algorithm>
#include <catch2/catch.hpp>
#include <nlohmann/json.hpp>
#include <sstream>

#include "cli/report_detail.h"
#include "cli/report_json.h"
#include "cli/report_text.h"
#include "cli/report_units.h"
#include "models/cures.h"
#include "tests/support/trough_design.h"

using namespace focalframe;
using namespace focalframe::cli;

namespace {

models::Assessment failing() {
  auto d = support::small_row();
  d.drive.moving_torque = 200;
  d.limits.intercept = 0.985;
  models::Assessment a = models::assess(d, support::test_table(), {.discretisation = true});
  a.cures = models::find_cures(d, support::test_table(), a);
  return a;
}

std::vector<std::string> lines_of(const std::string& text) {
  std::vector<std::string> lines;
  std::istringstream in(text);
  for (std::string line; std::getline(in, line);) lines.push_back(line);
  return lines;
}

}  // namespace

TEST_CASE("the summary fits a screen of 24 lines and 80 columns, in ASCII, without trailing blanks",
          "[report]") {
  const auto lines = lines_of(summary_text(failing(), "0123456789abcdef"));
  CHECK(lines.size() <= 24);
  for (const std::string& line : lines) {
    INFO(line);
    CHECK(line.size() <= 80);
    CHECK((line.empty() || line.back() != ' '));
    CHECK(std::all_of(line.begin(), line.end(), [](char c) { return c >= 32 && c < 127; }));
  }
}

TEST_CASE("the verdict line counts what was missed", "[report]") {
  models::Assessment a = failing();
  REQUIRE(a.limits_missed > 0);
  CHECK(verdict_line(a).rfind("DOES NOT HOLD: " + std::to_string(a.limits_missed) + " of ", 0) == 0);
  a.verdict = models::Verdict::holds;
  CHECK(verdict_line(a).rfind("HOLDS: all", 0) == 0);
  a.verdict = models::Verdict::holds_as_far_as_judged;
  CHECK(verdict_line(a).rfind("HOLDS AS FAR AS JUDGED", 0) == 0);
}

TEST_CASE("value and limit are shown with enough digits to tell them apart", "[report]") {
  models::Criterion c;
  c.quantity = models::Quantity::ratio;
  c.value = 0.96996;
  c.limit = 0.97;
  c.at_least = true;
  const ShownPair pair = shown_pair(c);
  CHECK(pair.value != pair.limit + " %");
  CHECK(shown(-0.0001, models::Quantity::torque) == "0 N m");
  CHECK(shown(models::not_given, models::Quantity::torque) == "-");
  CHECK(shown(2.0e-3, models::Quantity::angle) == "2.00 mrad");
}

TEST_CASE("JSON holds the criteria, the optics and the cures in SI", "[report]") {
  const models::Assessment a = failing();
  const auto json = nlohmann::json::parse(trough_json(a, "0123456789abcdef"));
  CHECK(json["schema"] == "focalframe-trough-1");
  CHECK(json["verdict"] == "DOES NOT HOLD");
  REQUIRE(json["criteria"].size() == a.criteria.size());
  for (std::size_t i = 0; i < a.criteria.size(); ++i) {
    CHECK(json["criteria"][i]["key"] == a.criteria[i].key);
    CHECK(json["criteria"][i]["value"] == a.criteria[i].value);
    if (!a.criteria[i].judged()) CHECK(json["criteria"][i]["limit"].is_null());
  }
  CHECK(json["optics"].size() == a.optics.size());
  CHECK(json["cures"].size() == a.cures.size());
  CHECK(json["proof"]["wind_force_N"] == a.proof.wind_force);
  CHECK(json["wind"]["states"][0]["chain"].size() > 5);
}

TEST_CASE("the details name every state of the wind, every group and every caution", "[report]") {
  const models::Assessment a = failing();
  const std::string text = detail_text(a);
  for (const char* word : {"OPERATE", "TURNING", "STOW", "STUCK", "torque tube", "rib root", "size factor cs",
                           "moment about the row", "Not part of this check"})
    CHECK(text.find(word) != std::string::npos);
  for (const auto& line : lines_of(text)) CHECK(line.size() <= 100);
}
