#include "cli/table_file.h"

#include <catch2/catch.hpp>
#include <cmath>
#include <cstdio>
#include <fstream>
#include <sstream>

#include "fem/units.h"
#include "loads/net_pressure.h"
#include "loads/pose.h"
#include "loads/wind.h"

using namespace focalframe;
using namespace focalframe::cli;
using loads::Coefficients;

namespace {

const char* const shipped[] = {"trough-computed", "trough-derived", "dish-open", "dish-with-radome"};

loads::CoefficientTable shipped_table(const std::string& name) {
  std::ifstream file(std::string(FOCALFRAME_SOURCE_DIR) + "/models/tables/" + name + ".xml");
  std::ostringstream text;
  text << file.rdbuf();
  std::vector<Message> messages;
  const auto read = read_table_text(text.str(), name + ".xml", messages);
  for (const Message& m : messages) UNSCOPED_INFO(to_text(m));
  REQUIRE(read);
  CHECK(messages.empty());
  return read->table;
}

// A table with declared conventions, as a user would write it; {0} stands for what a test varies.
struct UserTable {
  std::string root = R"(name="tunnel" collector="trough" kind="mean")";
  std::string conventions = R"(pitch-zero="face-on" pitch-grows="upwards" axes="body" moment-about="vertex")";
  std::string reference = R"(speed="mean" height="axis height" area="aperture" length="width")";
  std::string more = R"(<source text="test"/><confidence level="low"/>)";
  std::string rows =
      "\n<row pitch=\"0 deg\" Ca=\"1.5\" Cs=\"0\" Cm=\"0\"/>\n<row pitch=\"30 deg\" Ca=\"1.4\" Cs=\"0.1\" "
      "Cm=\"0.05\"/>";
  std::string text() const {
    return "<coefficients " + root + ">\n<conventions " + conventions + "/>\n<reference " + reference +
           "/>\n" + more + rows + "\n</coefficients>\n";
  }
};

std::vector<Message> complaints(const std::string& text) {
  std::vector<Message> messages;
  const auto read = read_table_text(text, "t.xml", messages);
  CHECK(read.has_value() == !has_stop(messages));
  return messages;
}

bool says(const std::vector<Message>& messages, Level level, const std::string& word, int line = -1) {
  for (const Message& m : messages)
    if (m.level == level &&
        (m.head + " " + m.text + " " + m.likely + " " + m.rule).find(word) != std::string::npos &&
        (line < 0 || m.line == line))
      return true;
  for (const Message& m : messages)
    UNSCOPED_INFO(m.line << ": " << m.head << " | " << m.text << " | " << m.likely);
  return false;
}

std::string shortest(double value) {
  char buffer[40];
  std::snprintf(buffer, sizeof buffer, "%.12g", value);
  return buffer;
}

}  // namespace

TEST_CASE("every shipped table says where it comes from and how far to trust it", "[cli][tables]") {
  const char* const confidence[] = {"medium-low", "low", "medium", "medium"};
  for (std::size_t i = 0; i < 4; ++i) {
    const auto t = shipped_table(shipped[i]);
    CHECK(t.name == shipped[i]);
    CHECK(t.confidence == confidence[i]);
    CHECK(t.kind == loads::CoefficientKind::mean);
    CHECK(t.source.size() > 40);
    CHECK_FALSE(t.cautions.empty());
    CHECK_FALSE(t.includes_frame);
    CHECK(t.pitch_min == Approx(-180 * deg));
    CHECK(t.pitch_max == Approx(180 * deg));
    CHECK(t.collector_kind == (i < 2 ? "trough" : "dish"));
  }
}

TEST_CASE("the wind pushes downwind in every pose of every shipped table", "[cli][tables]") {
  for (const char* name : shipped) {
    const auto t = shipped_table(name);
    for (const bool upper : {false, true})
      for (double p = -180; p <= 180; p += 0.5) {
        const auto c = loads::coefficients_at(t, p * deg, upper);
        REQUIRE(c);
        INFO(name << " pitch " << p << (upper ? " upper" : ""));
        CHECK(c->Ca * std::cos(p * deg) + c->Cs * std::sin(p * deg) > 0);
      }
  }
}

TEST_CASE("the upper column of a shipped table is nowhere below the best one in force or moment",
          "[cli][tables]") {
  for (const char* name : shipped)
    for (const auto& row : shipped_table(name).rows) {
      CHECK(std::abs(row.upper.Ca) >= std::abs(row.best.Ca));
      CHECK(std::abs(row.upper.Cm) >= std::abs(row.best.Cm));
    }
}

TEST_CASE("wind-axis columns of the references come out of the shipped rows", "[cli][tables]") {
  // Cfx, Cfz as listed with the derived trough rows, the open dish and the computed trough.
  struct Line {
    const char* table;
    double pitch, Cfx, Cfz, tolerance;
  };
  const Line lines[] = {
      {"trough-derived", 30, 1.48, -0.89, 0.011},  {"trough-derived", 75, 0.75, -1.02, 0.011},
      {"trough-derived", 120, 0.53, 0.14, 0.011},  {"dish-open", 50, 1.138, -1.217, 0.0015},
      {"dish-open", 110, 0.547, 0.292, 0.0015},    {"trough-computed", 30, 1.42, -0.84, 0.011},
      {"trough-computed", 60, 0.80, -1.60, 0.011}, {"trough-computed", 135, 0.97, 0.64, 0.011},
      {"trough-computed", 150, 1.30, 0.65, 0.011}};
  for (const Line& line : lines) {
    const Coefficients c = *loads::coefficients_at(shipped_table(line.table), line.pitch * deg);
    const double co = std::cos(line.pitch * deg), si = std::sin(line.pitch * deg);
    CHECK(c.Ca * co + c.Cs * si == Approx(line.Cfx).margin(line.tolerance));
    CHECK(-c.Ca * si + c.Cs * co == Approx(line.Cfz).margin(line.tolerance));
  }
}

TEST_CASE("handbook shapes bound the shipped tables at the two broadside poses", "[cli][tables]") {
  // Hollow half-cylinder, two-dimensional: 2.30 hollow to the wind, 1.20 back to the wind; hollow
  // hemisphere 1.42; disc 1.17 (aeronautical and fluid mechanics handbooks). 0.75: plate of aspect ratio 20
  // against an endless one.
  const auto derived = shipped_table("trough-derived");
  CHECK(loads::coefficients_at(derived, 0)->Ca == Approx(0.75 * 2.30).margin(0.01));
  CHECK(loads::coefficients_at(derived, 180 * deg)->Ca == Approx(-0.75 * 1.20).margin(0.01));
  const auto computed = shipped_table("trough-computed");
  CHECK(loads::coefficients_at(computed, 0, true)->Ca < 2.30);
  CHECK(loads::coefficients_at(computed, 180 * deg, true)->Ca > -1.20);
  const auto open = shipped_table("dish-open"), radome = shipped_table("dish-with-radome");
  CHECK(loads::coefficients_at(open, 0)->Ca == Approx(1.42).epsilon(0.10));
  CHECK(loads::coefficients_at(open, 0)->Ca > 1.17);
  CHECK(loads::coefficients_at(radome, 0)->Ca < 1.17);
}

TEST_CASE("a long row feels the expected moment coefficient on its gust", "[cli][tables]") {
  // Greatest |Cm| of the strength column x zone x size factor of a 150 m row at 3 m over open country.
  loads::Site site;
  const auto wind = loads::wind_at(3, {.speed = 30, .averaging = 3}, site);
  const double cs = loads::size_factor(150, 5, 3, wind.turbulence, site);
  CHECK(cs == Approx(0.71).margin(0.02));
  const auto greatest = [](const loads::CoefficientTable& t) {
    double most = 0;
    for (const auto& row : t.rows) most = std::max(most, std::abs(row.upper.Cm));
    return most;
  };
  const double interior = loads::zone_factors("interior")->Cm;
  const double derived = greatest(shipped_table("trough-derived")),
               computed = greatest(shipped_table("trough-computed"));
  CHECK(derived * cs == Approx(0.14).margin(0.01));
  CHECK(derived * cs * interior == Approx(0.10).margin(0.01));
  CHECK(computed * cs == Approx(0.22).margin(0.025));
  CHECK(computed * cs * interior == Approx(0.15).margin(0.02));
}

TEST_CASE("the profiles of the computed trough give its own forces and moments back", "[cli][tables]") {
  const auto t = shipped_table("trough-computed");
  REQUIRE(t.stations.size() == 11);
  REQUIRE(t.profiles.size() == 18);
  const loads::Aperture as_computed{.width = 1, .focal_length = 0.296};
  for (const auto& profile : t.profiles) {
    if (profile.pitch < 0 || std::abs(profile.pitch - 85 * deg) < 1e-6) continue;
    std::vector<loads::PressureStation> distribution;
    for (std::size_t i = 0; i < profile.net.size(); ++i)
      distribution.push_back({t.stations[i], profile.net[i]});
    const Coefficients got = loads::integrate(distribution, as_computed);
    const Coefficients listed = *loads::coefficients_at(t, profile.pitch);
    INFO("pitch " << profile.pitch / deg);
    // Eleven stations and straight lines against the full surface.
    CHECK(got.Ca == Approx(listed.Ca).margin(0.06));
    CHECK(got.Cm == Approx(listed.Cm).margin(0.04));
    CHECK(got.Cs == Approx(listed.Cs).margin(0.06));
  }
}

TEST_CASE("away from edge-on a profile needs little correction to meet the coefficients", "[cli][tables]") {
  const auto t = shipped_table("trough-computed");
  const loads::Aperture a{.width = 5.77, .focal_length = 1.71};
  for (const double p : {0.0, 15.0, 30.0, 45.0, 60.0, 75.0, 120.0, 135.0, 150.0, 165.0, 180.0}) {
    const Coefficients c = *loads::coefficients_at(t, p * deg);
    const auto pattern = loads::profile_pattern(t, p * deg, c, a);
    INFO("pitch " << p);
    CHECK(pattern.own_shape);
    CHECK(std::abs(pattern.slope) < 0.25);
    CHECK(std::abs(pattern.residual_side) < 0.15);
  }
}

TEST_CASE("the same wind tunnel table in any usual convention reads the same", "[cli][tables]") {
  const loads::CoefficientTable original = shipped_table("trough-derived");
  for (const std::string zero : {"face-on", "zenith"})
    for (const bool second_sense : {false, true})
      for (const bool wind_axes : {false, true})
        for (const bool about_axis : {false, true})
          for (const bool csv : {false, true}) {
            loads::TableConventions c;
            c.zero = zero == "zenith" ? loads::AngleZero::zenith : loads::AngleZero::face_on;
            const std::string grows = zero == "zenith" ? (second_sense ? "windward" : "leeward")
                                                       : (second_sense ? "downwards" : "upwards");
            c.sense = grows == "upwards"     ? loads::AngleSense::upwards
                      : grows == "downwards" ? loads::AngleSense::downwards
                      : grows == "leeward"   ? loads::AngleSense::leeward
                                             : loads::AngleSense::windward;
            c.wind_axes = wind_axes;
            c.about_axis = about_axis;
            c.axis_behind = about_axis ? 0.054 : 0;
            c.moment_sign = second_sense ? -1 : 1;
            const std::string x = wind_axes ? "Cfx" : "Ca", z = wind_axes ? "Cfz" : "Cs";
            UserTable xml;
            std::string csv_rows = "pitch_deg," + x + "," + z + ",Cm\r\n", last;
            xml.conventions = "pitch-zero=\"" + zero + "\" pitch-grows=\"" + grows + "\" axes=\"" +
                              (wind_axes ? "wind" : "body") + "\" moment-about=\"" +
                              (about_axis ? "axis" : "vertex") + "\"" +
                              (about_axis ? " axis-behind-vertex=\"0.054\"" : "") +
                              (second_sense ? " reversed=\"Cm\"" : "");
            xml.rows.clear();
            for (const auto& row : original.rows) {
              const loads::AuthorRow author = loads::to_author(row.pitch, row.best, c);
              // Downwards from face-on, the back to the wind is at -180, not at 180.
              const double angle = grows == "downwards" ? -std::abs(author.angle) : author.angle;
              xml.rows += "<row pitch=\"" + shortest(angle / deg) + " deg\" " + x + "=\"" +
                          shortest(author.first) + "\" " + z + "=\"" + shortest(author.second) + "\" Cm=\"" +
                          shortest(author.moment) + "\"/>\n";
              csv_rows += shortest(angle / deg) + "," + shortest(author.first) + "," +
                          shortest(author.second) + "," + shortest(author.moment) + "\r\n";
            }
            const std::string csv_text = std::string(
                                             "\xEF\xBB\xBF# name: tunnel\r\n# collector: trough\r\n# kind: "
                                             "mean\r\n# source: test\r\n# confidence: low\r\n"
                                             "# reference-speed: mean\r\n# reference-height: axis "
                                             "height\r\n# reference-area: aperture\r\n"
                                             "# reference-length: width\r\n# pitch-zero: ") +
                                         zero + "\r\n# pitch-grows: " + grows +
                                         "\r\n# axes: " + (wind_axes ? "wind" : "body") +
                                         "\r\n# moment-about: " + (about_axis ? "axis" : "vertex") + "\r\n" +
                                         (about_axis ? "# axis-behind-vertex: 0.054\r\n" : "") +
                                         (second_sense ? "# reversed: Cm\r\n" : "") + csv_rows;
            std::vector<Message> messages;
            const auto read = read_table_text(csv ? csv_text : xml.text(), csv ? "t.csv" : "t.xml", messages);
            for (const Message& m : messages) UNSCOPED_INFO(to_text(m));
            REQUIRE(read);
            CHECK(messages.empty());
            REQUIRE(read->table.rows.size() == original.rows.size());
            for (int p = -180; p <= 180; p += 5) {
              const Coefficients a = *loads::coefficients_at(read->table, p * deg),
                                 b = *loads::coefficients_at(original, p * deg);
              CHECK(a.Ca == Approx(b.Ca).margin(1e-9));
              CHECK(a.Cs == Approx(b.Cs).margin(1e-9));
              CHECK(a.Cm == Approx(b.Cm).margin(1e-9));
            }
          }
}

TEST_CASE("other reference areas, lengths and heights are converted", "[cli][tables]") {
  UserTable user;
  user.reference += R"( area-ratio="1.2" length-ratio="0.5" pressure-ratio="1.5")";
  std::vector<Message> messages;
  const auto read = read_table_text(user.text(), "t.xml", messages);
  REQUIRE(read);
  CHECK(read->table.rows[1].best.Ca == Approx(1.4 * 1.2 * 1.5));
  CHECK(read->table.rows[1].best.Cm == Approx(0.05 * 1.2 * 1.5 * 0.5));
}

TEST_CASE("what was understood is said in words", "[cli][tables]") {
  std::vector<Message> messages;
  const auto read = read_table_text(UserTable{}.text(), "t.xml", messages);
  REQUIRE(read);
  REQUIRE(read->understood.size() >= 5);
  CHECK_THAT(read->understood[0], Catch::Contains("angle 0 deg: the hollow face meets the wind"));
}

TEST_CASE("pressure columns of a CSV become profiles", "[cli][tables]") {
  const std::string text =
      "# name: tunnel\n# collector: trough\n# kind: mean\n# source: test\n# confidence: low\n# pitch-zero: "
      "face-on\n# pitch-grows: upwards\n"
      "# axes: body\n# moment-about: vertex\n# stations-from: upwind-rim\n# reference-speed: mean\n# "
      "reference-height: axis height\n"
      "# reference-area: aperture\n# reference-length: width\n"
      "pitch_deg;Ca;Cs;Cm;dcp -0.5;dcp 0;dcp 0.5\n-30;1;0;0;3;1;0\n0;1;0;0;1;1;1\n30;1;0;0;3;1;0\n";
  std::vector<Message> messages;
  const auto read = read_table_text(text, "t.csv", messages);
  for (const Message& m : messages) UNSCOPED_INFO(to_text(m));
  REQUIRE(read);
  CHECK(read->table.stations == std::vector<double>{-0.5, 0, 0.5});
  REQUIRE(read->table.profiles.size() == 3);
  CHECK(read->table.profiles[0].net == std::vector<double>{0, 1, 3});  // upwind rim at +0.5 below the horizon
  CHECK(read->table.profiles[2].net == std::vector<double>{3, 1, 0});
}

TEST_CASE("a table that does not declare its conventions is refused", "[cli][tables]") {
  for (const char* word : {"pitch-zero", "pitch-grows", "axes", "moment-about"}) {
    UserTable user;
    const auto at = user.conventions.find(word);
    user.conventions.erase(at, user.conventions.find('"', user.conventions.find('"', at) + 1) - at + 1);
    CHECK(says(complaints(user.text()), Level::stop, std::string(word) + " is missing"));
  }
  UserTable user;
  user.root = R"(name="tunnel" collector="trough")";
  CHECK(says(complaints(user.text()), Level::stop, "kind is missing"));
  user = {};
  user.reference = R"(height="axis height" area="aperture" length="width")";
  CHECK(says(complaints(user.text()), Level::stop, "reference-speed is missing"));
  user = {};
  user.more.clear();
  CHECK(says(complaints(user.text()), Level::stop, "source is missing"));
}

TEST_CASE("peak coefficients on a gust speed are refused", "[cli][tables]") {
  UserTable user;
  user.root = R"(name="tunnel" collector="trough" kind="peak")";
  CHECK_FALSE(has_stop(complaints(user.text())));
  user.reference = R"(speed="gust" height="axis height" area="aperture" length="width")";
  CHECK(says(complaints(user.text()), Level::stop, "gust-twice", 1));
}

TEST_CASE("slips in a table are found with their line and a fix", "[cli][tables]") {
  UserTable user;
  SECTION("a misspelt attribute") {
    user.rows = "\n<row pich=\"0 deg\" Ca=\"1.5\" Cs=\"0\" Cm=\"0\"/>";
    CHECK(says(complaints(user.text()), Level::stop, "pich", 5));
  }
  SECTION("a misspelt word") {
    user.conventions = R"(pitch-zero="zenit" pitch-grows="leeward" axes="body" moment-about="vertex")";
    CHECK(says(complaints(user.text()), Level::stop, "zenith", 2));
  }
  SECTION("a decimal comma") {
    user.rows = "\n<row pitch=\"0 deg\" Ca=\"1,5\" Cs=\"0\" Cm=\"0\"/>";
    CHECK(says(complaints(user.text()), Level::stop, "1.5", 5));
  }
  SECTION("a blank") {
    user.rows = "\n<row pitch=\"0 deg\" Ca=\"\" Cs=\"0\" Cm=\"0\"/>";
    CHECK(says(complaints(user.text()), Level::stop, "A blank is not a zero", 5));
  }
  SECTION("not a number") {
    for (const char* bad : {"nan", "inf", "0x1", "1.5 m", "1.2.3", "-", "+-1"}) {
      user.rows = std::string("\n<row pitch=\"0 deg\" Ca=\"") + bad + "\" Cs=\"0\" Cm=\"0\"/>";
      CHECK(says(complaints(user.text()), Level::stop, bad, 5));
    }
  }
  SECTION("an angle without its unit") {
    user.rows = "\n<row pitch=\"30\" Ca=\"1.5\" Cs=\"0\" Cm=\"0\"/>";
    CHECK(says(complaints(user.text()), Level::stop, "row pitch \"30\"", 5));
  }
  SECTION("columns of the other axes") {
    user.rows = "\n<row pitch=\"0 deg\" Cfx=\"1.5\" Cfz=\"0\" Cm=\"0\"/>";
    CHECK(says(complaints(user.text()), Level::stop, "\"Ca\" is missing", 5));
  }
  SECTION("an upper column with a gap") {
    user.rows = "\n<row pitch=\"0 deg\" Ca=\"1.5\" Cs=\"0\" Cm=\"0\" upper-Ca=\"1.7\"/>";
    CHECK(says(complaints(user.text()), Level::stop, "upper-Cs", 5));
  }
  SECTION("rows out of order") {
    user.rows += "\n<row pitch=\"20 deg\" Ca=\"1.5\" Cs=\"0\" Cm=\"0\"/>";
    CHECK(says(complaints(user.text()), Level::stop, "one direction", 7));
  }
  SECTION("the same row twice") {
    user.rows += "\n<row pitch=\"30 deg\" Ca=\"1.5\" Cs=\"0\" Cm=\"0\"/>";
    CHECK(says(complaints(user.text()), Level::stop, "each pitch once", 7));
  }
  SECTION("one pose twice, a turn apart") {
    user.rows += "\n<row pitch=\"390 deg\" Ca=\"1.5\" Cs=\"0\" Cm=\"0\"/>";
    CHECK(says(complaints(user.text()), Level::stop, "the same pose"));
  }
  SECTION("a gap") {
    user.rows += "\n<row pitch=\"90 deg\" Ca=\"0.5\" Cs=\"0.4\" Cm=\"0\"/>";
    CHECK(says(complaints(user.text()), Level::warn, "between pitch 30 deg and 90 deg"));
  }
  SECTION("radians taken for degrees") {
    user.rows.clear();
    for (const char* p : {"0", "0.5", "1.0", "1.5", "2.0", "2.5", "3.14"})
      user.rows += std::string("\n<row pitch=\"") + p + " deg\" Ca=\"1\" Cs=\"0\" Cm=\"0\"/>";
    CHECK(says(complaints(user.text()), Level::warn, "radians"));
  }
  SECTION("a sign that makes the wind pull") {
    user.rows = "\n<row pitch=\"0 deg\" Ca=\"-1.5\" Cs=\"0\" Cm=\"0\"/>";
    CHECK(says(complaints(user.text()), Level::warn, "pull the reflector towards itself"));
    user.conventions += " reversed=\"Ca\"";
    CHECK(complaints(user.text()).empty());
  }
  SECTION("a coefficient of another area") {
    user.rows = "\n<row pitch=\"0 deg\" Ca=\"15\" Cs=\"0\" Cm=\"0\"/>";
    CHECK(says(complaints(user.text()), Level::warn, "reference area", 5));
    user.rows = "\n<row pitch=\"0 deg\" Ca=\"150\" Cs=\"0\" Cm=\"0\"/>";
    CHECK(says(complaints(user.text()), Level::stop, "reference area", 5));
  }
  SECTION("a developed area without its ratio") {
    user.reference = R"(speed="mean" height="axis height" area="developed area" length="width")";
    CHECK(says(complaints(user.text()), Level::stop, "area-ratio", 3));
  }
  SECTION("another reference height") {
    user.reference = R"(speed="mean" height="10 m" area="aperture" length="width")";
    CHECK(says(complaints(user.text()), Level::warn, "pressure-ratio", 3));
  }
  SECTION("a moment about the axis without its place") {
    user.conventions = R"(pitch-zero="face-on" pitch-grows="upwards" axes="body" moment-about="axis")";
    CHECK(says(complaints(user.text()), Level::stop, "needed to move the moment", 2));
  }
  SECTION("no rows") {
    user.rows.clear();
    CHECK(says(complaints(user.text()), Level::stop, "no rows"));
  }
  SECTION("another root") { CHECK(says(complaints("<table/>"), Level::stop, "coefficients")); }
  SECTION("an early end") {
    CHECK(has_stop(complaints("<coefficients name=\"a\">\n</coefficients>\n<row pitch=\"0 deg\"/>\n")));
  }
  SECTION("a profile of another length") {
    user.conventions += " stations-from=\"fixed-rim\"";
    user.rows += "\n<stations at=\"-0.5 0 0.5\"/>\n<profile pitch=\"0 deg\" net=\"1 2\"/>";
    CHECK(says(complaints(user.text()), Level::stop, "2 values for 3 stations", 8));
  }
}

TEST_CASE("slips in a CSV are found with their line", "[cli][tables]") {
  CHECK(says(complaints("# nme: a\npitch_deg,Ca,Cs,Cm\n0,1,0,0\n"), Level::stop, "name", 1));
  CHECK(says(complaints("# name: a\nangle,Ca,Cs,Cm\n0,1,0,0\n"), Level::stop, "pitch_deg", 2));
  CHECK(says(complaints("# name: a\npitch_deg,Ca,Cs,Cm\n0,1,5,0,0\n"), Level::stop, "write 1.5, not 1,5", 3));
  CHECK(says(complaints("# name: a\n"), Level::stop, "column names"));
  CHECK(has_stop(complaints("")));
}
