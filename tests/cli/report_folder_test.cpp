// The report folder: what is in it, that it stands whole, and that it touches nothing else.

#include <tinyxml2.h>

#include <catch2/catch.hpp>
#include <filesystem>
#include <fstream>
#include <regex>
#include <set>

#include "cli/report/chart.h"
#include "cli/report/out_folder.h"
#include "cli/report/trough_report.h"
#include "cli/report/view.h"
#include "cli/report/vtu.h"
#include "models/portrait_states.h"
#include "tests/support/trough_design.h"

using namespace focalframe;
using namespace focalframe::cli;
namespace fs = std::filesystem;

namespace {

// Built once: a small row with its table, assessment and files.
struct Made {
  models::TroughDesign design = support::small_row();
  loads::CoefficientTable table = support::test_table();
  models::BuiltRow built = models::build_row(design, table);
  models::Assessment assessment = models::assess(design, table, {.discretisation = false, .built = &built});
  std::map<std::string, std::string> files = trough_report_files(
      {design, table, *built.row, assessment, {}, "0123456789abcdef", "<collector name=\"a & b\"/>"});
};

const Made& made() {
  static const Made once;
  return once;
}

fs::path fresh_folder(const char* name) {
  const fs::path folder =
      fs::temp_directory_path() / ("focalframe-test-" + std::to_string(::getpid())) / name;
  fs::remove_all(folder);
  fs::create_directories(folder.parent_path());
  return folder;
}

std::set<std::string> names_in(const fs::path& folder) {
  std::set<std::string> names;
  for (const auto& entry : fs::directory_iterator(folder)) names.insert(entry.path().filename().string());
  return names;
}

std::string text_at(const fs::path& path) {
  std::ifstream in(path, std::ios::binary);
  return {std::istreambuf_iterator<char>(in), {}};
}

// Name of the root element, empty when the text is not well-formed.
std::string root_of(const std::string& text) {
  tinyxml2::XMLDocument document;
  return document.Parse(text.c_str(), text.size()) == tinyxml2::XML_SUCCESS ? document.RootElement()->Name()
                                                                            : "";
}

}  // namespace

TEST_CASE("the report page needs nothing from elsewhere and has every place it points to", "[report]") {
  const std::string& page = made().files.at("report.html");
  const std::string body = page.substr(0, page.find("<script>/* three.js"));
  CHECK_FALSE(std::regex_search(body, std::regex("(src|href)=\"[a-z]*:?//")));
  CHECK(body.find("@import") == std::string::npos);
  CHECK(body.find("url(") == std::string::npos);
  const std::regex link("href=\"#([a-z]+)\"");
  int links = 0;
  for (auto at = std::sregex_iterator(body.begin(), body.end(), link); at != std::sregex_iterator();
       ++at, ++links)
    CHECK(body.find("<section id=\"" + (*at)[1].str() + "\">") != std::string::npos);
  CHECK(links >= 8);
  // The design is echoed as text, not as markup.
  CHECK(body.find("&lt;collector name=&quot;a &amp; b&quot;/&gt;") != std::string::npos);
}

TEST_CASE("every drawing of a report is well-formed and says what it shows", "[report]") {
  int drawings = 0;
  for (const auto& [name, text] : made().files) {
    if (name.size() < 4 || name.substr(name.size() - 4) != ".svg") continue;
    INFO(name);
    ++drawings;
    CHECK(text.find("<title>") != std::string::npos);
    CHECK(text.find("nan") == std::string::npos);
    CHECK(text.find("inf") == std::string::npos);
    CHECK(root_of(text) == "svg");
  }
  CHECK(drawings >= 6);
}

TEST_CASE("every line of a table has as many fields as its header", "[report]") {
  for (const auto& [name, text] : made().files) {
    if (name.rfind("tables/", 0) != 0) continue;
    INFO(name);
    std::set<int> counts;
    int fields = 1;
    bool inside = false;
    for (char c : text) {
      if (c == '"') inside = !inside;
      if (!inside && c == ',') ++fields;
      if (!inside && c == '\n') {
        counts.insert(fields);
        fields = 1;
      }
    }
    CHECK(counts.size() == 1);
    CHECK_FALSE(inside);
  }
}

TEST_CASE("a report replaces an earlier one whole and leaves nothing beside it", "[report]") {
  const fs::path folder = fresh_folder("again");
  REQUIRE(write_report_folder(folder.string(), {{"report.html", "one"}, {"figures/a.svg", "a"}}).empty());
  REQUIRE(
      write_report_folder(folder.string() + "/", {{"report.html", "two"}, {"tables/b.csv", "b"}}).empty());
  CHECK(names_in(folder) == std::set<std::string>{"report.html", "tables"});
  CHECK(text_at(folder / "report.html") == "two");
  CHECK(names_in(folder.parent_path()) == std::set<std::string>{"again"});
  fs::remove_all(folder.parent_path());
}

TEST_CASE("a folder that holds something else, a file and a missing parent are refused untouched",
          "[report]") {
  const fs::path folder = fresh_folder("else");
  fs::create_directories(folder);
  std::ofstream(folder / "thesis.txt") << "mine";
  CHECK(write_report_folder(folder.string(), {{"report.html", "x"}}).find("something other") !=
        std::string::npos);
  CHECK(text_at(folder / "thesis.txt") == "mine");
  CHECK(names_in(folder) == std::set<std::string>{"thesis.txt"});
  CHECK_FALSE(refuse_report_folder((folder / "thesis.txt").string()).empty());
  CHECK(refuse_report_folder((folder / "no" / "where").string()).find("no folder") != std::string::npos);
  CHECK(refuse_report_folder((folder / "new").string()).empty());
  CHECK_FALSE(refuse_report_folder("").empty());
  fs::remove_all(folder.parent_path());
}

TEST_CASE("marks of an axis are round, rising and enclose the data", "[report]") {
  for (double low : {-3.7, 0.0, 0.951, 94.3})
    for (double span : {0.003, 0.8, 5.0, 730.0}) {
      const auto marks = round_marks(low, low + span, 6);
      REQUIRE(marks.size() >= 2);
      CHECK(marks.size() <= 9);
      CHECK(marks.front() <= low + 1e-9 * span);
      CHECK(marks.back() >= low + span - 1e-9 * span);
      const double step = marks[1] - marks[0];
      const double lead = step / std::pow(10.0, std::floor(std::log10(step) + 1e-9));
      CHECK((std::abs(lead - 1) < 1e-6 || std::abs(lead - 2) < 1e-6 || std::abs(lead - 5) < 1e-6));
    }
}

TEST_CASE("the frame's view holds every member and every state, and names them", "[report]") {
  const auto requests = models::looked_at(made().design, made().table, *made().built.row);
  const models::Portrait p = models::portrait(*made().built.row, requests);
  const std::string html = view_html(p, 0);
  for (const auto& state : p.states)
    CHECK(html.find("\"words\":\"" + state.words + "\"") != std::string::npos);
  CHECK(html.find("nan") == std::string::npos);
  CHECK(drawn_scale(p, 0) >= 1);
  const std::string vtu = frame_vtu(p, 0);
  CHECK(vtu.find("NumberOfPoints=\"" + std::to_string(p.points.size()) + "\" NumberOfCells=\"" +
                 std::to_string(p.members.size()) + "\"") != std::string::npos);
  CHECK(root_of(vtu) == "VTKFile");
  CHECK(root_of(mirror_vtu(p, 0)) == "VTKFile");
}
