// Sets of combinations as files: the shipped ones, and what is said about wrong ones.

#include "cli/combination_file.h"

#include <algorithm>
#include <catch2/catch.hpp>
#include <set>

#include "cli/embedded.h"
#include "tests/cli/designs.h"

using namespace focalframe;
using namespace focalframe::cli;
using Catch::Contains;

namespace {

loads::CombinationSet shipped(const std::string& name) {
  for (const EmbeddedText& text : shipped_combinations()) {
    if (text.name != name) continue;
    std::vector<Message> messages;
    const auto set = read_combinations_text(text.text, name, messages);
    INFO(to_text(messages, true));
    REQUIRE(set);
    CHECK(messages.empty());
    return *set;
  }
  FAIL("no set " << name);
  return {};
}

const loads::Combination& named(const loads::CombinationSet& set, const std::string& name) {
  const auto it = std::find_if(set.combinations.begin(), set.combinations.end(),
                               [&](const auto& c) { return c.name == name; });
  REQUIRE(it != set.combinations.end());
  return *it;
}

std::vector<Message> complaints(const std::string& inside,
                                const std::string& root = R"(name="mine" edition="1" wind-map="service")") {
  std::vector<Message> messages;
  const auto set = read_combinations_text(
      "<combinations " + root + ">\n<source text=\"test\"/>\n" + inside + "\n</combinations>", "mine.xml",
      messages);
  CHECK(set.has_value() == !has_stop(messages));
  return messages;
}

const std::string good = R"(<combination name="wind" for="strength" permanent="1" wind="1.5"/>)";

}  // namespace

TEST_CASE("every shipped set is sound, names its edition and source, and keeps its factor with its map",
          "[combinations]") {
  CHECK(shipped_combinations().size() == 10);
  for (const EmbeddedText& text : shipped_combinations()) {
    const loads::CombinationSet set = shipped(text.name);
    CHECK(set.name == text.name);
    CHECK_FALSE(set.edition.empty());
    CHECK_FALSE(set.source.empty());
    int service = 0, seismic = 0;
    for (const auto& c : set.combinations) {
      service += c.purpose == loads::Purpose::service ? 1 : 0;
      seismic += c.purpose == loads::Purpose::seismic ? 1 : 0;
      if (set.ultimate_wind_map) CHECK(c.wind <= 1);
    }
    CHECK(service > 0);
    CHECK(seismic > 0);
  }
}

TEST_CASE("EN 1990 combinations as remembered", "[combinations]") {
  const auto low = shipped("en-1990"), high = shipped("en-1990-high");
  CHECK(loads::formula(named(low, "wind leading, weight unfavourable")) == "1.35 G + 1.5 W + 0.75 S + 0.9 T");
  CHECK(named(high, "wind leading, weight unfavourable").snow == Approx(1.05));
  CHECK(named(low, "snow leading").wind == Approx(0.9));
  CHECK(named(low, "snow leading").leading == loads::Action::snow);
  CHECK(loads::formula(named(low, "equilibrium, weight favourable")) == "0.9 G + 1.5 W");
  CHECK(loads::formula(named(low, "frequent")) == "1 G + 0.2 W");
  CHECK(named(low, "stuck").states == loads::StateGroup::stuck);
}

TEST_CASE("ASCE 7 editions differ in wind and snow as remembered", "[combinations]") {
  CHECK(named(shipped("asce-7-05-strength"), "wind leading").wind == 1.6);
  CHECK(named(shipped("asce-7-16-strength"), "wind leading").wind == 1.0);
  CHECK(loads::formula(named(shipped("asce-7-16-strength"), "wind, weight favourable")) == "0.9 G + 1 W");
  CHECK(named(shipped("asce-7-16-strength"), "snow leading").snow == 1.6);
  CHECK(named(shipped("asce-7-22-strength"), "snow leading").snow == 1.0);
  CHECK(named(shipped("asce-7-22-strength"), "wind leading").snow == 0.3);
  CHECK(loads::formula(named(shipped("asce-7-16-allowable"), "wind, weight favourable")) == "0.6 G + 0.6 W");
  CHECK(named(shipped("asce-7-16-allowable"), "wind and snow").wind == Approx(0.45));
  CHECK(shipped("asce-7-16-strength").on_yield == 0.9);
}

TEST_CASE("a design's words lead to the set of its altitude and edition", "[combinations]") {
  models::TroughDesign d;
  d.limits.strength = "EN 1990";
  d.site.altitude = 400;
  CHECK(set_name(d) == "en-1990");
  d.site.altitude = 1400;
  CHECK(set_name(d) == "en-1990-high");
  d.limits.strength = "ASCE 7";
  d.site.asce_edition = 22;
  CHECK(set_name(d) == "asce-7-22-strength");
  CHECK(changed_row({}).trough.combinations.name == "en-1990");
}

TEST_CASE("an unknown set is refused with its line and the nearest name", "[combinations]") {
  const DesignFile design = changed_row({{"strength=\"EN 1990\"", "strength=\"en-199O\""}});
  REQUIRE(design.messages.size() == 1);
  CHECK(design.messages[0].line == 48);
  CHECK(design.messages[0].likely == "strength=\"en-1990\"");
  CHECK_THAT(design.messages[0].text, Contains("asce-7-16-strength"));
}

TEST_CASE("wrong sets are refused where they are wrong", "[combinations]") {
  CHECK(complaints(good).empty());
  const auto first = [](const std::vector<Message>& messages) {
    REQUIRE_FALSE(messages.empty());
    return messages.front();
  };
  CHECK_THAT(
      first(complaints("<combination name=\"w\" for=\"strenght\" permanent=\"1\" wind=\"1.5\"/>")).likely,
      Contains("strength"));
  CHECK_THAT(
      first(complaints("<combination name=\"w\" for=\"strength\" permanent=\"1,35\" wind=\"1.5\"/>")).text,
      Contains("decimal point"));
  CHECK_THAT(
      first(complaints("<combination name=\"w\" for=\"strength\" permanent=\"1\" wnd=\"1.5\"/>" + good))
          .likely,
      Contains("wind"));
  CHECK_THAT(first(complaints("<combination name=\"w\" for=\"service\" permanent=\"1\"/>")).text,
             Contains("wind would never be judged"));
  CHECK_THAT(first(complaints(good, R"(name="mine" edition="1" wind-map="ultimate")")).text,
             Contains("count it twice"));
  CHECK_THAT(first(complaints(good, R"(name="mine" edition="1")")).head, Contains("without wind-map"));
  CHECK_THAT(first(complaints(good + good)).text, Contains("twice"));
  CHECK_THAT(
      first(complaints(
                "<combination name=\"s\" for=\"strength\" leading=\"snow\" permanent=\"1\" wind=\"1\"/>" +
                good))
          .text,
      Contains("leading action has no factor"));
  CHECK(
      first(complaints("<combination name=\"w\" for=\"strength\" permanent=\"1.35\" wind=\"1.5\"/>")).level ==
      Level::warn);
}
