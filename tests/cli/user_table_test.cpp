// A user's own wind tunnel table in any of the usual conventions gives the same answers as the table itself.

#include <algorithm>
#include <catch2/catch.hpp>
#include <cstdio>
#include <string>
#include <vector>

#include "cli/table_file.h"
#include "fem/units.h"
#include "models/assess.h"
#include "tests/support/trough_design.h"

using namespace focalframe;
using loads::AngleSense;
using loads::AngleZero;

namespace {

struct Author {
  AngleZero zero;
  AngleSense sense;
  bool wind_axes, about_axis;
  const char *zero_word, *sense_word;
};

// The test table as this author would have written it.
std::string csv_of(const loads::CoefficientTable& table, const Author& author) {
  loads::TableConventions c;
  c.zero = author.zero;
  c.sense = author.sense;
  c.wind_axes = author.wind_axes;
  c.about_axis = author.about_axis;
  c.axis_behind = 0.20 / 2.4;
  std::string text = "# name: tunnel\n# collector: trough\n# kind: mean\n# source: test\n# pitch-zero: ";
  text += std::string(author.zero_word) + "\n# pitch-grows: " + author.sense_word +
          "\n# axes: " + (author.wind_axes ? "wind" : "body") +
          "\n# moment-about: " + (author.about_axis ? "axis" : "vertex") + "\n";
  char line[120];
  if (author.about_axis) {
    std::snprintf(line, sizeof line, "# axis-behind-vertex: %.16f\n", c.axis_behind);
    text += line;
  }
  text +=
      "# reference-speed: mean\n# reference-height: axis height\n# reference-area: aperture\n"
      "# reference-length: width\n";
  text += author.wind_axes ? "pitch_deg,Cfx,Cfz,Cm\n" : "pitch_deg,Ca,Cs,Cm\n";
  std::vector<loads::AuthorRow> rows;
  for (const loads::CoefficientRow& row : table.rows)
    rows.push_back(loads::to_author(row.pitch, row.best, c));
  std::sort(rows.begin(), rows.end(), [](const auto& a, const auto& b) { return a.angle < b.angle; });
  for (const loads::AuthorRow& row : rows) {
    std::snprintf(line, sizeof line, "%.12f,%.16f,%.16f,%.16f\n", row.angle / deg, row.first, row.second,
                  row.moment);
    text += line;
  }
  return text;
}

}  // namespace

TEST_CASE(
    "the same table face-on or from the zenith, in body or wind axes, about vertex or axis, judges alike",
    "[cli][tables]") {
  const auto d = support::small_row();
  const models::Assessment own = models::assess(d, support::test_table(), {.discretisation = false});
  const Author authors[] = {{AngleZero::face_on, AngleSense::upwards, false, false, "face-on", "upwards"},
                            {AngleZero::face_on, AngleSense::upwards, true, true, "face-on", "upwards"},
                            {AngleZero::zenith, AngleSense::leeward, true, false, "zenith", "leeward"},
                            {AngleZero::zenith, AngleSense::leeward, false, true, "zenith", "leeward"},
                            {AngleZero::zenith, AngleSense::windward, true, true, "zenith", "windward"}};
  for (const Author& author : authors) {
    std::vector<cli::Message> messages;
    const std::string text = csv_of(support::test_table(), author);
    INFO(text);
    const auto read = cli::read_table_text(text, "tunnel.csv", messages);
    INFO(cli::to_text(messages, true));
    REQUIRE(read);
    const models::Assessment theirs = models::assess(d, read->table, {.discretisation = false});
    REQUIRE(theirs.criteria.size() == own.criteria.size());
    for (std::size_t i = 0; i < own.criteria.size(); ++i) {
      INFO(own.criteria[i].key);
      CHECK(theirs.criteria[i].value == Approx(own.criteria[i].value).epsilon(1e-9));
    }
  }
}
