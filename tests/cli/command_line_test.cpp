// The program as users run it: exit codes, what is written, what is said.

#include <sys/wait.h>
#include <unistd.h>

#include <array>
#include <catch2/catch.hpp>
#include <cstdio>
#include <filesystem>
#include <fstream>
#include <nlohmann/json.hpp>
#include <string>

#include "cli/command_line_fault.h"
#include "tests/cli/designs.h"

namespace fs = std::filesystem;
using namespace focalframe::cli;
using Catch::Contains;

namespace {

struct Run {
  int code = -1;
  std::string text;  // both streams
};

// An own folder per test case, gone afterwards.
class Folder {
 public:
  Folder() : path_(fs::temp_directory_path() / ("focalframe_cli_" + std::to_string(::getpid()))) {
    fs::remove_all(path_);
    fs::create_directories(path_);
  }
  ~Folder() { fs::remove_all(path_); }
  Folder(const Folder&) = delete;
  Folder& operator=(const Folder&) = delete;

  void write(const std::string& name, const std::string& text) const {
    std::ofstream(path_ / name, std::ios::binary) << text;
  }
  std::string read(const std::string& name) const { return file_text((path_ / name).string()); }
  bool has(const std::string& name) const { return fs::exists(path_ / name); }
  std::size_t files() const {
    return static_cast<std::size_t>(std::distance(fs::directory_iterator(path_), fs::directory_iterator()));
  }

  Run run(const std::string& words) const {
    Run result;
    FILE* pipe =
        ::popen(("cd '" + path_.string() + "' && '" FOCALFRAME_PROGRAM "' " + words + " 2>&1").c_str(), "r");
    REQUIRE(pipe);
    std::array<char, 4096> buffer{};
    while (const std::size_t got = std::fread(buffer.data(), 1, buffer.size(), pipe))
      result.text.append(buffer.data(), got);
    const int status = ::pclose(pipe);
    result.code = WIFEXITED(status) ? WEXITSTATUS(status) : -1;
    return result;
  }

 private:
  fs::path path_;
};

}  // namespace

TEST_CASE("asking for help or the version is no fault", "[command]") {
  const Folder folder;
  CHECK(folder.run("--help").code == 0);
  CHECK_THAT(folder.run("--help").text, Contains("focalframe draft trough my-row.xml"));
  CHECK(folder.run("check --help").code == 0);
  CHECK_THAT(folder.run("--version").text, Contains("focalframe 0."));
  CHECK(folder.run("").code == 0);
}

TEST_CASE("words that do not fit end with exit 2 and what was probably meant", "[command]") {
  const Folder folder;
  folder.write("row.xml", row_text({}));
  struct Fault {
    const char *words, *said, *likely;
  };
  const Fault faults[] = {
      {"chek row.xml", "The first word is what to do", "Likely meant: focalframe check row.xml"},
      {"row.xml", "The first word is what to do", "Likely meant: focalframe check row.xml"},
      {"help", "The first word is what to do", "Likely meant: focalframe --help"},
      {"check", "No design is named", ""},
      {"check --json row.xml", "--json took row.xml as the file to write",
       "Likely meant: focalframe check row.xml --json row.json"},
      {"check row.xml --json", "--json needs a value",
       "Likely meant: focalframe check row.xml --json row.json"},
      {"check row.xml --strct", "check has no \"--strct\"",
       "Likely meant: focalframe check row.xml --strict"},
      {"check row.xml other.xml", "One design at a time", ""},
      {"check row.xml --json row.xml", "over the design itself", ""},
      {"check row.xml --json nowhere/row.json", "There is no folder nowhere", ""},
      {"draft", "What to draft is not said", ""},
      {"draft throgh my.xml", "cannot be drafted", "Likely meant: focalframe draft trough my.xml"},
      {"draft trough", "The file to write is not named", "Likely meant: focalframe draft trough my-row.xml"},
      {"draft my.xml", "cannot be drafted", "Likely meant: focalframe draft trough my.xml"},
      {"draft trough my.xml --aperture 2,4m", "decimal mark is a point", "Likely meant: --aperture 2.4m"},
      {"draft trough my.xml --aperture 2.4", "needs its unit", ""},
      {"draft trough my.xml --aperture 500m", "Allowed is 100 mm to 20 m", ""},
      {"draft trough my.xml --focal-length 0.8m --depth 0.4m", "They disagree", ""},
      {"draft frame my.xml --aperture 2m", "Sizes are for", ""},
      {"tables trough-computd", "No shipped table", "Likely meant: table=\"trough-computed\""},
      {"check nowhere.xml", "There is no such file", ""},
      {"check .", "This is a folder", ""},
  };
  for (const Fault& fault : faults) {
    INFO(fault.words);
    const Run run = folder.run(fault.words);
    INFO(run.text);
    CHECK(run.code == 2);
    CHECK_THAT(run.text, Contains(fault.said) && Contains(fault.likely) && Contains("STOP"));
    CHECK(folder.read("row.xml") == row_text({}));
    CHECK(folder.files() == 1);
  }
}

TEST_CASE("draft writes a design that check reads, and never over an existing file", "[command]") {
  const Folder folder;
  const Run first = folder.run("draft trough my-row.xml --aperture 2.4m --length 24m");
  INFO(first.text);
  CHECK(first.code == 0);
  CHECK_THAT(first.text, Contains("focalframe check my-row.xml"));
  const std::string written = folder.read("my-row.xml");
  CHECK_THAT(written, Contains("aperture=\"2.4 m\"") && Contains("basis=\"guess\""));
  CHECK(read_design_text(written, "my-row.xml").sound());
  const Run again = folder.run("draft trough my-row.xml --aperture 3m");
  CHECK(again.code == 2);
  CHECK_THAT(again.text, Contains("exists already. It was not touched."));
  CHECK(folder.read("my-row.xml") == written);
  CHECK(folder.run("draft trough full.xml --every-field").code == 0);
  CHECK(read_design_text(folder.read("full.xml"), "full.xml").sound());
  CHECK(folder.run("draft xsd collector.xsd").code == 0);
  CHECK(folder.files() == 3);
}

TEST_CASE("a frame goes from draft to a table on the terminal and JSON in a file", "[command]") {
  const Folder folder;
  REQUIRE(folder.run("draft frame bracket.xml").code == 0);
  const Run run = folder.run("check bracket.xml --json bracket.json");
  INFO(run.text);
  CHECK(run.code == 0);
  CHECK_THAT(run.text, Contains("Case weight") && Contains("Case pull") && Contains("reaction at") &&
                           Contains("residual") && Contains("Frequencies"));
  std::size_t longest = 0;
  for (std::size_t at = 0; at < run.text.size();) {
    const std::size_t end = std::min(run.text.find('\n', at), run.text.size());
    longest = std::max(longest, end - at);
    at = end + 1;
  }
  CHECK(longest <= 80);
  const auto json = nlohmann::json::parse(folder.read("bracket.json"));
  CHECK(json.at("schema_version") == 1);
  const auto& one = json.at("cases").at(0);
  CHECK(one.at("name") == "weight");
  CHECK(one.at("nodes").size() == 4);
  CHECK(one.at("nodes").at(0).at("u").size() == 6);
  CHECK(one.at("reactions").at(0).at("id") == "foot");
  CHECK(one.at("members").at(0).at("end_force").size() == 12);
  CHECK_FALSE(one.at("frequencies_hz").empty());
  CHECK(one.at("buckling_factors").is_array());
  // Weight of everything arrives at the foot.
  CHECK(one.at("reactions").at(0).at("r").at(2).get<double>() ==
        Approx(json.at("mass_kg").get<double>() * 9.80665));
  CHECK(folder.run("modes bracket.xml --count 2").code == 0);
  CHECK(folder.run("check bracket.xml --quiet").text ==
        "bracket: solved; no member yields and nothing buckles in any case\n");
}

TEST_CASE("a mechanism ends with exit 3 and the node that moves; nothing is written", "[command]") {
  const Folder folder;
  REQUIRE(folder.run("draft frame bracket.xml").code == 0);
  std::string text = folder.read("bracket.xml");
  const std::string all = "fix=\"ux uy uz rx ry rz\"";
  text.replace(text.find(all), all.size(), "fix=\"ux uy uz\"");
  folder.write("loose.xml", text);
  const Run run = folder.run("check loose.xml --json loose.json");
  INFO(run.text);
  CHECK(run.code == 3);
  CHECK_THAT(run.text, Contains("STOP loose.xml") && Contains("can move freely"));
  CHECK_FALSE(folder.has("loose.json"));
  folder.write("no-drive.xml", row_text({{"<drive", "<!-- <drive"},
                                         {"turns-to=\"170 deg\"/>", "turns-to=\"170 deg\"/> -->"}}));
  CHECK(folder.run("check no-drive.xml").code == 3);
}

TEST_CASE("a design with slips ends with exit 2 and writes nothing", "[command]") {
  const Folder folder;
  folder.write("row.xml", row_text({{"wall=\"4.0 mm\"", "wall=\"4.0 m\""}}));
  const Run run = folder.run("check row.xml --json row.json");
  CHECK(run.code == 2);
  CHECK_THAT(run.text, Contains("STOP row.xml:12 torque-tube wall=\"4.0 m\"") &&
                           Contains("1 to mend. Nothing was computed, nothing was written."));
  CHECK(folder.files() == 1);
}

TEST_CASE("the shipped tables are listed and shown", "[command]") {
  const Folder folder;
  const Run list = folder.run("tables");
  CHECK(list.code == 0);
  CHECK_THAT(list.text, Contains("trough-computed") && Contains("trough-derived") && Contains("confidence"));
  const Run one = folder.run("tables trough-derived");
  CHECK(one.code == 0);
  CHECK_THAT(one.text, Contains("pitch deg") && Contains("Source:"));
}

TEST_CASE("the man page and the completion know every command and every option of the help",
          "[command line]") {
  const Folder folder;
  const Run man = folder.run("--man"), completion = folder.run("--completion");
  REQUIRE(man.code == 0);
  REQUIRE(completion.code == 0);
  for (const std::string command : {"check", "draft", "modes", "tables", "why"}) {
    CHECK_THAT(man.text, Contains(".SS " + command));
    CHECK_THAT(completion.text, Contains("    " + command + ") words="));
    const std::string help = folder.run(command + " --help").text;
    for (std::size_t at = help.find(" --"); at != std::string::npos; at = help.find(" --", at + 1)) {
      const std::string option = help.substr(at + 1, help.find_first_of(" ,\n", at + 1) - at - 1);
      if (option.size() < 4 || help.find("Examples:") < at) continue;
      INFO(command << " " << option);
      CHECK_THAT(completion.text, Contains(option));
    }
  }
}
