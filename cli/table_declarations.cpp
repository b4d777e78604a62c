#include <sstream>

#include "cli/nearest.h"
#include "cli/table_reader.h"

namespace focalframe::cli {

namespace {

using Need = TableReader::Need;

void read_kind(TableReader& in, ReadTable& result) {
  auto& t = result.table;
  const std::string kind =
      in.word("kind", {"mean", "peak"}, Need::required, "A peak on a gust speed counts the gusts twice.");
  t.kind = kind == "peak" ? loads::CoefficientKind::peak : loads::CoefficientKind::mean;
  const std::string speed = in.word("reference-speed", {"mean", "gust"}, Need::required,
                                    "It is the speed the loads were divided by.");
  if (kind != "peak" || speed != "gust") return;
  in.say(Level::stop, in.find("kind")->line, "kind=\"peak\" on a gust speed",
         "A peak load over the gust pressure is used like a mean coefficient here: on the gust, without a "
         "further factor. "
         "Call it mean and say in the title that it came from peaks.",
         "kind=\"mean\"")
      .rule = "gust-twice";
}

void read_provenance(TableReader& in, ReadTable& result) {
  auto& t = result.table;
  for (const char* key : {"name", "source", "reference-area", "reference-length", "reference-height"})
    if (!in.find(key))
      in.say(Level::stop, 0, std::string(key) + " is missing",
             "A coefficient means nothing without where it comes from and the height, area and length it is "
             "made with.");
  t.name = in.text("name");
  t.title = in.find("title") ? in.text("title") : t.name;
  t.source = in.text("source");
  t.confidence = in.text("confidence");
  if (t.confidence.empty())
    in.say(Level::note, 0, "confidence is not stated",
           "Reports print the confidence of a table beside its numbers.");
  t.collector_kind = in.word("collector", {"trough", "dish"}, Need::required,
                             "It says which area and moment length are meant.");
  t.includes_frame =
      in.word("includes", {"reflector", "reflector+frame"}, Need::optional, "") == "reflector+frame";
  t.cautions = in.source().cautions;
  if (in.find("zone"))
    result.zone = in.word("zone", {"isolated", "edge", "second-row", "interior"}, Need::optional,
                          "Leave it out when it is not known.");
  t.reference = in.text("reference-speed") + " velocity pressure at " + in.text("reference-height") +
                "; area " + in.text("reference-area") + "; length " + in.text("reference-length") +
                "; moment about the " + in.text("moment-about");
  if (in.find("format") && in.text("format") != "1")
    in.say(Level::stop, in.find("format")->line, "format=\"" + in.text("format") + "\"",
           "This program reads format 1.");
}

void read_angle(TableReader& in, loads::TableConventions& c) {
  using loads::AngleSense;
  const bool zenith =
      in.word("pitch-zero", {"face-on", "zenith"}, Need::required,
              "face-on: the hollow face meets the wind at 0; zenith: it looks up at 0.") == "zenith";
  c.zero = zenith ? loads::AngleZero::zenith : loads::AngleZero::face_on;
  if (zenith) {
    const std::string grows = in.word("pitch-grows", {"leeward", "windward"}, Need::required,
                                      "From the zenith the face turns away from the wind or towards it.");
    c.sense = grows == "windward" ? AngleSense::windward : AngleSense::leeward;
  } else {
    const std::string grows = in.word("pitch-grows", {"upwards", "downwards"}, Need::required,
                                      "From face-on the face turns up or down.");
    c.sense = grows == "downwards" ? AngleSense::downwards : AngleSense::upwards;
  }
}

void read_reversed(TableReader& in, loads::TableConventions& c) {
  const SourceText* found = in.find("reversed");
  if (!found) return;
  const std::vector<std::string> columns = force_columns(c);
  double* const signs[] = {&c.first_sign, &c.second_sign, &c.moment_sign};
  std::istringstream stream(found->text);
  for (std::string name; stream >> name;) {
    bool known = false;
    for (std::size_t i = 0; i < columns.size(); ++i) {
      if (name != columns[i]) continue;
      *signs[i] = -1;
      known = true;
    }
    if (!known)
      in.say(Level::stop, found->line, "reversed=\"" + found->text + "\"",
             "These columns can point the other way: " + joined(columns) + ".", nearest_name(name, columns));
  }
}

void read_axes(TableReader& in, loads::TableConventions& c) {
  c.wind_axes = in.word("axes", {"body", "wind"}, Need::required,
                        "body: Ca and Cs; wind: Cfx downwind and Cfz up.") == "wind";
  c.about_axis = in.word("moment-about", {"vertex", "axis"}, Need::required,
                         "The line the moment is taken about.") == "axis";
  c.axis_behind = in.ratio("axis-behind-vertex", 0);
  if (c.about_axis && !in.find("axis-behind-vertex"))
    in.say(Level::stop, in.find("moment-about")->line, "moment-about=\"axis\"",
           "The distance from the vertex back to that axis, over the aperture width, is needed to move the "
           "moment.")
        .advice = "Add axis-behind-vertex, negative when the axis lies on the hollow side";
}

void read_ratios(TableReader& in, loads::TableConventions& c) {
  c.area_ratio = in.ratio("area-ratio", 1);
  c.length_ratio = in.ratio("length-ratio", 1);
  c.pressure_ratio = in.ratio("pressure-ratio", 1);
  const std::pair<const char*, double> all[] = {
      {"area-ratio", c.area_ratio}, {"length-ratio", c.length_ratio}, {"pressure-ratio", c.pressure_ratio}};
  for (const auto& [key, value] : all)
    if (!(value > 0.05 && value < 20))
      in.say(Level::stop, in.find(key)->line, std::string(key) + "=\"" + in.text(key) + "\"",
             "It must lie between 0.05 and 20.");
  const SourceText* area = in.find("reference-area");
  if (area && area->text.find("developed") != std::string::npos && !in.find("area-ratio"))
    in.say(Level::stop, area->line, "reference area \"" + area->text + "\"",
           "Loads are made with the aperture area; area-ratio says how many times larger the developed area "
           "is.");
  const SourceText* height = in.find("reference-height");
  if (height && height->text.find("axis") == std::string::npos &&
      height->text.find("centre") == std::string::npos && !in.find("pressure-ratio"))
    in.say(Level::warn, height->line, "reference height \"" + height->text + "\"",
           "Coefficients are used on the velocity pressure at axis height. If this is another height, add "
           "pressure-ratio: the "
           "pressure there over the pressure at the axis.");
}

}  // namespace

std::vector<std::string> force_columns(const loads::TableConventions& conventions) {
  return conventions.wind_axes ? std::vector<std::string>{"Cfx", "Cfz", "Cm"}
                               : std::vector<std::string>{"Ca", "Cs", "Cm"};
}

void read_declarations(TableReader& in, ReadTable& result) {
  read_provenance(in, result);
  read_kind(in, result);
  auto& c = result.conventions;
  read_angle(in, c);
  read_axes(in, c);
  read_reversed(in, c);
  read_ratios(in, c);
  auto& t = result.table;
  t.uncertainty = in.ratio("uncertainty", 0);
  const auto focal = in.range("focal-ratio"), height = in.range("axis-height-ratio");
  t.focal_ratio_min = focal.from;
  t.focal_ratio_max = focal.to;
  t.height_ratio_min = height.from;
  t.height_ratio_max = height.to;
  if (const SourceText* yaw = in.find("yaw")) t.yaw_max = in.angle(*yaw, "yaw").value_or(loads::unstated);
}

}  // namespace focalframe::cli
