// `why`: every word a report prints and every word of the file has an explanation.

#include "cli/explanations.h"

#include <algorithm>
#include <catch2/catch.hpp>
#include <sstream>

#include "models/assess.h"
#include "models/schema.h"
#include "tests/support/trough_design.h"

using namespace focalframe;
using namespace focalframe::cli;

TEST_CASE("every criterion a check can name is explained under its printed name and its key", "[why]") {
  const auto a = models::assess(support::small_row(), support::test_table(), {.discretisation = false});
  REQUIRE(a.criteria.size() > 8);
  for (const models::Criterion& c : a.criteria) {
    INFO(c.name << " / " << c.key);
    CHECK_FALSE(explain(c.name).empty());
    if (c.key.rfind("stress", 0) != 0) CHECK_FALSE(explain(c.key).empty());
  }
}

TEST_CASE("every element and attribute of a trough's design is explained", "[why]") {
  for (const models::Element& element : models::trough_schema()) {
    CHECK_FALSE(explain(element.path).empty());
    for (const models::Field& field : element.fields) {
      const std::string text = explain(element.path.substr(element.path.rfind('/') + 1) + " " + field.name);
      INFO(element.path << " " << field.name);
      CHECK(text.find("<" + element.path + " " + field.name + ">") != std::string::npos);
    }
  }
}

TEST_CASE("explanations say what they mean, fit the screen, and none stands twice", "[why]") {
  std::vector<std::string> names;
  for (const Explanation& e : explanations()) {
    INFO(e.name);
    REQUIRE_FALSE(e.parts.empty());
    CHECK(e.parts.front().first == "means");
    names.push_back(e.name);
    names.insert(names.end(), e.also.begin(), e.also.end());
    std::istringstream lines(explain(e.name));
    for (std::string line; std::getline(lines, line);) CHECK(line.size() <= 80);
  }
  std::sort(names.begin(), names.end());
  CHECK(std::adjacent_find(names.begin(), names.end()) == names.end());
  CHECK(explain("no such thing").empty());
  CHECK(explain("Light Caught") == explain("light caught"));
}
