// Every example design: the ray trace confirms its light, and the light's account adds up.

#include <catch2/catch.hpp>
#include <cmath>
#include <filesystem>
#include <nlohmann/json.hpp>

#include "cli/design_file.h"
#include "cli/report_json.h"
#include "cli/report_optics.h"
#include "cli/shipped_tables.h"
#include "models/assess.h"

using namespace focalframe;
using namespace focalframe::cli;

namespace {

models::Assessment traced(const std::string& path) {
  const DesignFile file = read_design(path);
  REQUIRE(file.sound());
  std::vector<Message> messages;
  const auto table = find_table(file.trough.wind.table, path, {}, messages);
  REQUIRE(table);
  models::AssessOptions asked;
  asked.discretisation = false;
  asked.trace_rays = 20'000;
  asked.maps = asked.rigging = true;
  return models::assess(file.trough, table->table, asked);
}

}  // namespace

TEST_CASE("the ray trace and the analytic light agree in every state of every example design",
          "[examples][trace]") {
  int designs = 0;
  for (const auto& entry : std::filesystem::directory_iterator(FOCALFRAME_SOURCE_DIR "/models/examples")) {
    if (entry.path().extension() != ".xml" || read_design(entry.path().string()).kind != "trough") continue;
    ++designs;
    const models::Assessment a = traced(entry.path().string());
    REQUIRE_FALSE(a.optics.empty());
    for (const models::OpticalRow& row : a.optics) {
      INFO(a.name << ", " << models::place_text(row.state) << ": " << row.trace.analytic << " traced "
                  << row.trace.traced.intercept << " +- " << row.trace.traced.standard_error);
      CHECK(row.trace.analytic == Approx(row.result.intercept));
      CHECK(row.trace.agrees);
      double sum = row.result.attribution.interaction;
      for (const models::PartLoss& part : row.result.attribution.parts) sum += part.alone;
      CHECK(sum == Approx(row.result.attribution.loss).margin(1e-12));
    }
    CHECK(trace_text(a).find("states agree") != std::string::npos);
    CHECK(a.rigging.best.least >= a.rigging.now.least);

    const auto light = nlohmann::json::parse(trough_json(a, "0")).at("light");
    const auto& receiver = light.at("maps").at("receiver");
    double flux = 0;
    for (double suns : receiver.at("flux_suns")) flux += suns * receiver.at("bin_width_m").get<double>();
    CHECK(flux / a.aperture ==
          Approx(a.optics[static_cast<std::size_t>(a.worst_light)].result.intercept).epsilon(1e-5));
    const auto& aperture = light.at("maps").at("aperture");
    CHECK(aperture.at("miss_m").size() == aperture.at("y_m").size());
    CHECK(aperture.at("miss_m").at(0).size() == aperture.at("x_m").size());
    CHECK(light.at("study").at("best_fit").at("rank") == 3);
  }
  CHECK(designs >= 2);
}

TEST_CASE("the close look at the light fits 100 columns of ASCII and names every part",
          "[examples][report]") {
  const models::Assessment a = traced(FOCALFRAME_SOURCE_DIR "/models/examples/quillbrook.xml");
  const std::string text = optics_study_text(a) + trace_text(a);
  for (const char* word : {"noise",
                           "tilt",
                           "twist",
                           "receiver",
                           "focus",
                           "ribs",
                           "panel",
                           "interaction",
                           "weight alone",
                           "encoder",
                           "inclinometer",
                           "sun sensor",
                           "row's mean twist",
                           "random together",
                           "Play and friction",
                           "for ",
                           "end loss",
                           "condition",
                           "radial",
                           "Rigging"}) {
    INFO(word);
    CHECK(text.find(word) != std::string::npos);
  }
  std::size_t start = 0;
  for (std::size_t end = text.find('\n'); end != std::string::npos; end = text.find('\n', start)) {
    INFO(text.substr(start, end - start));
    CHECK(end - start <= 100);
    start = end + 1;
  }
}
