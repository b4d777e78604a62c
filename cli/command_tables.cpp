#include <cmath>
#include <iostream>

#include "cli/combination_file.h"
#include "cli/commands.h"
#include "cli/embedded.h"
#include "cli/exit_code.h"
#include "cli/messages.h"
#include "cli/quantity.h"
#include "cli/read_file.h"
#include "cli/shipped_tables.h"
#include "cli/table_sketch.h"
#include "cli/write_file.h"
#include "fem/units.h"

namespace focalframe::cli {
namespace {

std::string padded(const std::string& text, std::size_t width) {
  return text + std::string(text.size() < width ? width - text.size() : 1, ' ');
}

std::string range(const std::string& what, double least, double most) {
  if (std::isnan(least) && std::isnan(most)) return "";
  return "  " + what + " " + number_text(least) + " to " + number_text(most) + "\n";
}

std::string fixed(double value) {
  char buffer[32];
  std::snprintf(buffer, sizeof buffer, "%9.3f", value == 0 ? 0.0 : value);
  return buffer;
}

void print_table(const ReadTable& read) {
  const loads::CoefficientTable& t = read.table;
  std::cout << t.name << ": " << t.title << "\n"
            << wrapped("Source: " + t.source, 2) << "  Confidence: " << t.confidence
            << "; kind: " << (t.kind == loads::CoefficientKind::mean ? "mean" : "peak")
            << (t.uncertainty > 0 ? "; uncertainty about " + number_text(100 * t.uncertainty) + " %" : "")
            << "\n"
            << wrapped("Reference: " + t.reference, 2) << "Made for\n"
            << range("f/W", t.focal_ratio_min, t.focal_ratio_max)
            << range("axis height/W", t.height_ratio_min, t.height_ratio_max)
            << range("pitch, deg", t.pitch_min / deg, t.pitch_max / deg);
  std::cout << "Coefficients (program's signs)      upper bounds for strength\n"
            << "pitch deg       Ca       Cs       Cm |       Ca       Cs       Cm\n";
  for (const loads::CoefficientRow& row : t.rows)
    std::cout << fixed(row.pitch / deg).substr(0, 7) << "  " << fixed(row.best.Ca) << fixed(row.best.Cs)
              << fixed(row.best.Cm) << " |" << fixed(row.upper.Ca) << fixed(row.upper.Cs)
              << fixed(row.upper.Cm) << "\n";
  std::cout << table_sketch(t) << "What was understood\n";
  for (const std::string& line : read.understood) std::cout << line << "\n";
  for (const std::string& caution : t.cautions) std::cout << wrapped("CAUTION " + caution, 0);
}

std::optional<loads::CombinationSet> combinations_by_name(const std::string& name,
                                                          std::vector<Message>& messages) {
  for (const EmbeddedText& shipped : shipped_combinations())
    if (shipped.name == name) return read_combinations_text(shipped.text, name, messages);
  if (!name.ends_with(".xml")) return std::nullopt;
  const FileText file = read_file(name, "table");
  if (!file.ok || file.text.find("<combinations") == std::string::npos) return std::nullopt;
  return read_combinations_text(file.text, name, messages);
}

void print_combinations(const loads::CombinationSet& set) {
  std::cout << set.name << ": " << set.title << ", " << set.edition << "\n"
            << wrapped("Source: " + set.source, 2) << "  wind from "
            << (set.ultimate_wind_map ? "an ultimate-level map" : "a service-level map") << "; "
            << number_text(set.on_yield) << " times yield\n"
            << "G weight, W wind, S snow, T temperature, Q person, E earthquake; each with its factor\n";
  const char* purposes[] = {"strength", "equilibrium", "service", "accidental", "seismic"};
  for (const loads::Combination& c : set.combinations)
    std::cout << "  " << padded(purposes[static_cast<int>(c.purpose)], 12) << padded(c.name, 38)
              << loads::formula(c) << "\n";
}

}  // namespace

int run_tables(const std::string& name, const std::string& svg_path) {
  std::vector<Message> messages;
  if (const auto set = combinations_by_name(name, messages); set || has_stop(messages)) {
    std::cerr << to_text(messages, true);
    if (!set) return bad_input;
    print_combinations(*set);
    return all_met;
  }
  if (!name.empty()) {
    Message place;
    place.file = "command line";
    place.head = "focalframe tables " + name;
    const auto table = find_table(name, "./", place, messages);
    std::cerr << to_text(messages, true);
    if (!table) return bad_input;
    print_table(*table);
    if (svg_path.empty()) return all_met;
    const std::string problem = write_file(svg_path, table_svg(table->table));
    if (problem.empty()) return all_met;
    place.file = svg_path;
    place.text = problem;
    std::cerr << to_text(place);
    return bad_input;
  }
  std::cout << "Shipped coefficient tables; `focalframe tables NAME` shows one:\n";
  for (const EmbeddedText& shipped : shipped_tables()) {
    const auto read = read_table_text(shipped.text, shipped.name, messages);
    std::cout << "  " << padded(shipped.name, 20)
              << (read ? "confidence " + read->table.confidence : std::string("cannot be read")) << "\n";
    if (read) std::cout << wrapped(read->table.title, 22);
  }
  std::cout << "Shipped sets of load combinations (limits strength=\"...\"):\n";
  for (const EmbeddedText& shipped : shipped_combinations())
    if (const auto set = read_combinations_text(shipped.text, shipped.name, messages))
      std::cout << "  " << padded(set->name, 20) << set->title << ", " << set->edition << "\n";
  std::cerr << to_text(messages, true);
  return has_stop(messages) ? bad_input : all_met;
}

}  // namespace focalframe::cli
