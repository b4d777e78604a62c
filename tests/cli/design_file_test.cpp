#include "cli/design_file.h"

#include <catch2/catch.hpp>
#include <cmath>
#include <filesystem>
#include <numbers>

#include "tests/cli/designs.h"

using namespace focalframe::cli;
using Catch::Contains;

namespace {

constexpr double deg = std::numbers::pi / 180;

// The one message of a design with one slip.
Message only_message(std::initializer_list<std::pair<std::string, std::string>> changes) {
  const DesignFile design = changed_row(changes);
  INFO(to_text(design.messages, true));
  REQUIRE(design.messages.size() == 1);
  return design.messages.front();
}

}  // namespace

TEST_CASE("a sound design is read without a word, in SI, with the lines of its values", "[design]") {
  const DesignFile design = changed_row({});
  INFO(to_text(design.messages, true));
  CHECK(design.messages.empty());
  CHECK(design.kind == "trough");
  CHECK(design.name == "Quillbrook row 1");
  const auto& d = design.trough;
  CHECK(d.parabola.aperture == Approx(2.4));
  CHECK(d.row.modules == 6);
  CHECK(d.row.row_azimuth == Approx(180 * deg));
  CHECK(d.tube.profile.wall == Approx(4e-3));
  CHECK(d.tube.profile.material == "S235");
  CHECK(d.end_plates.twist_stiffness == Approx(1.5e6));
  CHECK_FALSE(d.mirror.sheet_braces_ribs);
  CHECK(d.receiver.sleeve.outside_diameter == Approx(0.06));
  CHECK(d.receiver.posts.per_module == 2);
  CHECK(d.pylons.footing.rocking == Approx(3e6));
  CHECK(d.drive.turns_from == Approx(-95 * deg));
  CHECK(d.wind.operate.given);
  CHECK(d.wind.operate.averaging == Approx(600));
  CHECK_FALSE(d.wind.turning.given);
  CHECK(d.wind.year.hours == "daylight");
  CHECK(d.operation.anemometer.averaging == Approx(60));
  CHECK(d.optics.set_true == Approx(90 * deg));
  CHECK(d.limits.intercept == Approx(0.97));
  CHECK(std::isnan(d.limits.twist));
  CHECK(d.basis.at("pylons/footing") == "guess");
  CHECK(design.lines.at("torque-tube/wall") == 12);
  CHECK(design.lines.at("receiver/posts/side") == 21);
  CHECK(design.lines.at("limits") == 48);
}

TEST_CASE("a slip of units is found by this design's own range, and the unit that would fit is named",
          "[design]") {
  const Message m = only_message({{"wall=\"4.0 mm\"", "wall=\"4.0 m\""}});
  CHECK(to_text(m) ==
        "STOP row.xml:12 torque-tube wall=\"4.0 m\"\n"
        "     A wall must be more than 0 and less than half the outside diameter, here\n"
        "     69.85 mm. Found 4000 mm.\n"
        "     Likely meant: wall=\"4.0 mm\"\n");
}

TEST_CASE("a number without unit is shown with what each unit would mean", "[design]") {
  const Message m = only_message({{"aperture=\"2.4 m\"", "aperture=\"2.4\""}});
  CHECK(m.line == 7);
  CHECK(m.head == "parabola aperture=\"2.4\"");
  CHECK_THAT(m.text,
             Contains("2.4 m gives a rim angle of 73.7 deg, 2.4 ft 25.8 deg, the others no usable shape"));
  CHECK(m.likely == "aperture=\"2.4 m\"");
}

TEST_CASE("a misspelt attribute is one message, also where another rule misses what it stood for",
          "[design]") {
  const Message m = only_message({{"thickness=\"3 mm\"", "tickness=\"3 mm\""}});
  CHECK(m.head == "ribs tickness=\"3 mm\"");
  CHECK_THAT(m.text, Contains("<ribs> has no \"tickness\". It knows: kind per-module thickness"));
  CHECK(m.likely == "thickness=\"3 mm\"");
}

TEST_CASE("single slips give one message with the fix that would pass", "[design]") {
  struct Slip {
    std::pair<std::string, std::string> change;
    int line;
    const char *said, *likely;
  };
  const Slip slips[] = {
      {{"mass=\"14 kg\"", "mass=\"30 lb\""}, 23, "\"lb\" can be a mass or a force", "mass=\"30 lbm\""},
      {{"wall=\"4.0 mm\"", "wall=\"-4 mm\""}, 12, "more than 0", "wall=\"4 mm\""},
      {{"wall=\"4.0 mm\"", "wall=\"70 mm\""}, 12, "less than half", ""},
      {{"wall=\"4.0 mm\"", "wall=\"0.1 mm\""}, 12, "tubes lie between 4 and 400", ""},
      {{"aperture=\"2.4 m\"", "aperture=\"2,4 m\""}, 7, "decimal mark", "aperture=\"2.4 m\""},
      {{"aperture=\"2.4 m\"", "aperture=\"2400 m\""}, 7, "Allowed is 100 mm to 20 m", "aperture=\"2400 mm\""},
      {{"aperture=\"2.4 m\"", "aperture=\"2.4 mm\""}, 7, "Allowed is 100 mm to 20 m", "aperture=\"2.4 m\""},
      {{"aperture=\"2.4 m\"", "aperture=\"NaN m\""}, 7, "not a number", ""},
      {{"outside-diameter=\"139.7 mm\"", "outside-diameter=\"139.7 cm\""},
       12,
       "more than 0.3 leaves no trough",
       "outside-diameter=\"139.7 mm\""},
      {{"material=\"S235\" basis=\"catalogue\"", "material=\"S 235\""},
       12,
       "Allowed is S235",
       "material=\"S235\""},
      {{"basis=\"catalogue\"", "basis=\"guessed\""}, 12, "How a value is known", "basis=\"guess\""},
      {{"count=\"8\"", "count=\"7\""}, 14, "must be even", "count=\"8\""},
      {{"per-module=\"5\"", "per-module=\"1\""}, 13, "Allowed is 2 to 60", ""},
      {{"modules=\"6\"", "modules=\"0\""}, 8, "needs \"modules\"", ""},
      {{"drive-after-module=\"3\"", "drive-after-module=\"7\""}, 8, "The row has 6 modules", ""},
      {{"sheet-braces-ribs=\"no\"", "sheet-braces-ribs=\"false\""},
       18,
       "Allowed is yes or no",
       "sheet-braces-ribs=\"no\""},
      {{"filled-with=\"water\"", "filled-with=\"watr\""}, 19, "Allowed is water", "filled-with=\"water\""},
      {{"shape=\"round-tube\"", "shape=\"pipe\""},
       12,
       "round-tube, square-tube, rectangular-tube, lattice-box or",
       ""},
      {{"side=\"120 mm\" wall", "outside-diameter=\"120 mm\" side=\"120 mm\" wall"},
       26,
       "A square-tube has no \"outside-diameter\"",
       ""},
      {{"side=\"120 mm\" ", ""}, 26, "\"side\" is missing", ""},
      {{"tube-to-vertex=\"130 mm\"", "tube-to-vertex=\"13 mm\""}, 9, "stand in the mirror", ""},
      {{" tube-to-vertex=\"130 mm\"", ""}, 8, "\"tube-to-vertex\"", ""},
      {{"fixed-to=\"purlins\"", "fixed-to=\"purlin\""},
       18,
       "Allowed is ribs or purlins",
       "fixed-to=\"purlins\""},
      {{"stow-at=\"-90 deg\"", "stow-at=\"-93 deg\""}, 42, "this pose needs -98 deg to -88 deg", ""},
      {{"track-from=\"15 deg\"", "track-from=\"170 deg\""}, 42, "from the smaller to the greater", ""},
      {{"turning-rate=\"0.75 deg/s\"", "turning-rate=\"0.75\""}, 42, "needs its unit", ""},
      {{" zone=\"isolated\"", ""}, 34, "needs \"zone\"", ""},
      {{" zone=\"isolated\"", " zone=\"interor\""}, 34, "Allowed is isolated", "zone=\"interior\""},
      {{"set-true=\"90 deg\" ", ""}, 45, "needs \"set-true\"", ""},
      {{"set-true=\"90 deg\"", "set-true=\"unladen\""}, 45, "Or the word unloaded", "set-true=\"unloaded\""},
      {{"averaging=\"10 min\" height=\"10 m\"/>", "averaging=\"2 min\" height=\"10 m\"/>"},
       35,
       "3 s (gust), 1 min, 10 min or 1 h",
       ""},
      {{"speed=\"10 m/s\" averaging=\"10 min\" height=\"10 m\"", "speed=\"10 m/s\" averaging=\"10 min\""},
       35,
       "A speed holds at one height",
       ""},
      {{"intercept=\"0.97\"", "intercept=\"97\""}, 48, "Allowed is 0.2 to 1", "intercept=\"97 %\""},
      {{"altitude=\"450 m\"", "altitude=\"9000 m\""},
       33,
       "Allowed is -430 m to 5500 m",
       "altitude=\"9000 ft\""},
      {{"outside-diameter=\"60 mm\"", "outside-diameter=\"36 mm\""}, 20, "does not clear the receiver", ""},
      {{"rocking=\"3 MN m/rad\"", "rocking=\"3 MN m\""}, 27, "is a moment", "rocking=\"3 MN m/rad\""},
      {{"rocking=\"3 MN m/rad\" ", ""}, 27, "needs \"rocking\"", ""},
      {{"format=\"1\"", "format=\"2\""}, 4, "The format read here is 1", "format=\"1\""},
      {{"<limits", "<limit"}, 48, "<collector> has no <limit>", "<limits>"},
      {{"<counterweights", "<counterwights"}, 23, "<collector> has no", "<counterweights>"},
  };
  for (const Slip& slip : slips) {
    INFO(slip.change.second);
    const DesignFile design = changed_row({slip.change});
    INFO(to_text(design.messages, true));
    REQUIRE(design.messages.size() == 1);
    const Message& m = design.messages.front();
    CHECK(m.level == Level::stop);
    CHECK(m.line == slip.line);
    CHECK_THAT(m.text, Contains(slip.said));
    CHECK(m.likely == slip.likely);
    CHECK(exit_code(design.messages) == 2);
  }
}

TEST_CASE("depth and focal length must agree within one per cent", "[design]") {
  const Message m = only_message({{"focal-length=\"0.80 m\"", "focal-length=\"0.80 m\" depth=\"0.40 m\""}});
  CHECK(m.head == "parabola focal-length=\"0.80 m\" depth=\"0.40 m\"");
  CHECK_THAT(m.text,
             Contains("2.4 m wide and 400 mm deep has its focus at 0.9 m; 0.8 m needs a depth of 450 mm"));
  CHECK(changed_row({{"focal-length=\"0.80 m\"", "focal-length=\"0.80 m\" depth=\"453 mm\""}}).sound());
  CHECK(changed_row({{"focal-length=\"0.80 m\"", "depth=\"0.45 m\""}}).sound());
}

TEST_CASE("a wind without averaging shows how much that leaves open", "[design]") {
  const Message m = only_message({{"speed=\"10 m/s\" averaging=\"10 min\"", "speed=\"10 m/s\""}});
  CHECK(m.head == "operate speed=\"10 m/s\" without averaging");
  CHECK_THAT(m.advice, Contains("Add one of: averaging=\"3 s\""));
}

TEST_CASE("a row without a drive, or without pylons, has no solution", "[design]") {
  const DesignFile design =
      changed_row({{"<drive", "<!-- <drive"}, {"turns-to=\"170 deg\"/>", "turns-to=\"170 deg\"/> -->"}});
  REQUIRE(design.messages.size() == 1);
  CHECK_THAT(to_text(design.messages.front()),
             Contains("STOP row.xml: the row can turn freely about its tube") &&
                 Contains("all 7 pylons are bearings"));
  CHECK(exit_code(design.messages) == 3);
  const DesignFile floating = changed_row({{"<pylons", "<!-- <pylons"}, {"</pylons>", "</pylons> -->"}});
  CHECK(exit_code(floating.messages) == 3);
}

TEST_CASE("an unlikely number is warned about with the units it may have been in", "[design]") {
  const Message fast = only_message({{"speed=\"10 m/s\"", "speed=\"40 m/s\""}});
  CHECK(fast.level == Level::warn);
  CHECK_THAT(fast.text, Contains("if the number was in mph, it is 17.88 m/s"));
  CHECK_THAT(fast.advice, Contains("speed=\"40 mph\""));
  const Message swapped = only_message({{"holding-torque=\"18 kN m\"", "holding-torque=\"3 kN m\""}});
  CHECK(swapped.level == Level::warn);
  CHECK_THAT(swapped.text, Contains("exchanged"));
}

TEST_CASE("what is missing as a whole is said once", "[design]") {
  const DesignFile design =
      changed_row({{"<site", "<!-- <site"}, {"terrain=\"EN II\"/>", "terrain=\"EN II\"/> -->"}});
  REQUIRE(design.messages.size() == 1);
  CHECK(design.messages.front().head == "<site> is missing");
  const DesignFile unlimited =
      changed_row({{"<limits", "<!-- <limits"}, {"\"EN 1990\"/>", "\"EN 1990\"/> -->"}});
  REQUIRE(unlimited.messages.size() == 1);
  CHECK(unlimited.messages.front().level == Level::warn);
  CHECK_THAT(unlimited.messages.front().text, Contains("nothing is judged"));
}

TEST_CASE("an element in the wrong place or twice is said with where it belongs", "[design]") {
  const Message misplaced = only_message({{"<sensor", "<anemometer height=\"3 m\"/>\n  <sensor"}});
  CHECK(misplaced.advice == "It belongs inside <operation>");
  const Message doubled = only_message({{"<sensor", "<drive stiffness=\"1 MN m/rad\"/>\n  <sensor"}});
  CHECK_THAT(doubled.text, Contains("the first stands in line 29"));
}

TEST_CASE("many slips come sorted by line, twelve at most unless asked, and counted at the end", "[design]") {
  const DesignFile design = changed_row({{"aperture=\"2.4 m\"", "aperture=\"2,4 m\""},
                                         {"modules=\"6\"", "modules=\"six\""},
                                         {"axis-height=\"1.7 m\"", "axis-height=\"1.7\""},
                                         {"wall=\"4.0 mm\"", "wall=\"4.0\""},
                                         {"thickness=\"3 mm\"", "thickness=\"3 ga\""},
                                         {"count=\"8\"", "count=\"7\""},
                                         {"mass=\"6 kg\"", "mass=\"6 lb\""},
                                         {"kind=\"sheet\"", "kind=\"sheets\""},
                                         {"filled-with=\"water\"", "filled-with=\"steam\""},
                                         {"mass=\"14 kg\"", "mass=\"14 t\""},
                                         {"play=\"0.5 mrad\"", "play=\"0.5\""},
                                         {"terrain=\"EN II\"", "terrain=\"EN 2\""},
                                         {"zone=\"isolated\"", ""},
                                         {"intercept=\"0.97\"", "intercept=\"0,97\""}});
  REQUIRE(design.messages.size() == 14);
  for (std::size_t i = 1; i < design.messages.size(); ++i)
    CHECK(design.messages[i - 1].line <= design.messages[i].line);
  CHECK_THAT(to_text(design.messages, false),
             Contains("and 2 more (--verbose)\n14 to mend. Nothing was computed, nothing was written.\n"));
  CHECK_THAT(to_text(design.messages, true), !Contains("more (--verbose)"));
}

TEST_CASE("what a slip makes impossible to judge is not complained about as well", "[design]") {
  // The aperture enters a dozen rules; its own message is enough.
  CHECK(changed_row({{"aperture=\"2.4 m\"", "aperture=\"wide\""}}).messages.size() == 1);
  CHECK(changed_row({{"aperture=\"2.4 m\" ", ""}}).messages.size() == 1);
  CHECK(changed_row({{"shape=\"round-tube\"", "shape=\"\""}}).messages.size() == 1);
}

TEST_CASE("a suggestion is only made when the design would pass with it", "[design]") {
  // In every unit this tube has no sensible wall.
  CHECK(only_message({{"wall=\"4.0 mm\"", "wall=\"900 m\""}}).likely.empty());
  CHECK(only_message({{"thickness=\"3 mm\"", "tickness=\"3 lb\""}}).likely.empty());
}

TEST_CASE("kinds and outermost elements that are not read are named", "[design]") {
  CHECK_THAT(only_message({{"kind=\"trough\"", "kind=\"disc\""}}).text, Contains("trough, dish or frame"));
  CHECK(only_message({{"kind=\"trough\"", "kind=\"through\""}}).likely == "kind=\"trough\"");
  CHECK_THAT(only_message({{" kind=\"trough\"", ""}}).advice, Contains("kind=\"frame\""));
  CHECK(only_message({{"<collector ", "<colector "}, {"</collector", "</colector"}}).likely == "<collector>");
}

TEST_CASE("an early close tag never drops the limits without a word", "[design]") {
  const Message m = only_message({{"</pylons>", "</pylons>\n</collector>"}});
  CHECK(m.line == 29);
  CHECK_THAT(m.text, Contains("beginning with <drive>, would be dropped"));
}

TEST_CASE("files that are none are told apart", "[design]") {
  namespace fs = std::filesystem;
  const fs::path folder = fs::temp_directory_path() / "focalframe_design_file_test";
  fs::create_directories(folder);
  std::ofstream(folder / "empty.xml").close();
  std::ofstream(folder / "my-row.xml") << "<collector/>";
  const auto said = [&](const char* name) {
    return to_text(read_design((folder / name).string()).messages, true);
  };
  CHECK_THAT(said("empty.xml"), Contains("The file is empty"));
  CHECK_THAT(said("my-rwo.xml"), Contains("There is no such file") && Contains("my-row.xml"));
  CHECK_THAT(said("."), Contains("This is a folder"));
  CHECK_THAT(said("nowhere/x.xml"), Contains("There is no folder"));
  CHECK_THAT(to_text(read_design("").messages, true), Contains("There is no such file"));
  fs::remove_all(folder);
}

TEST_CASE("no cut and no lost attribute of a design makes the reader fail", "[design]") {
  const std::string text = row_text({});
  for (std::size_t i = 0; i < text.size(); i += 7) {
    CHECK_NOTHROW(read_design_text(text.substr(0, i), "row.xml"));
    std::string cut = text;
    cut.erase(i, 5);
    CHECK_NOTHROW(to_text(read_design_text(cut, "row.xml").messages, true));
  }
}
