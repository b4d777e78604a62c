#include "cli/wind_record_file.h"

#include <array>
#include <charconv>
#include <cmath>
#include <filesystem>
#include <map>
#include <optional>
#include <sstream>

#include "cli/read_file.h"
#include "fem/units.h"

namespace focalframe::cli {
namespace {

struct Unit {
  const char* word;
  double factor;
};
struct Column {
  const char* name;
  bool required;
  std::vector<Unit> units;  ///< the first one is the example in messages
  double least, most;       ///< plausible, in SI
};

const std::vector<Column>& columns() {
  static const std::vector<Column> all = {
      {"speed",
       true,
       {{"m/s", 1}, {"km/h", 1 / 3.6}, {"mph", 0.44704}, {"kn", 0.514444}, {"kt", 0.514444}},
       0,
       60},
      {"direction", false, {{"deg", deg}, {"°", deg}}, 0, 360 * deg},
      {"beam", false, {{"W/m2", 1}, {"W/m²", 1}, {"W/m^2", 1}, {"kW/m2", 1000}}, 0, 1500}};
  return all;
}

std::string trimmed(const std::string& s) {
  const auto from = s.find_first_not_of(" \t\""), to = s.find_last_not_of(" \t\"");
  return from == std::string::npos ? "" : s.substr(from, to - from + 1);
}

std::vector<std::string> split(const std::string& line, char separator) {
  std::vector<std::string> out;
  std::string cell;
  std::istringstream in(line);
  while (std::getline(in, cell, separator)) out.push_back(trimmed(cell));
  if (!line.empty() && line.back() == separator) out.emplace_back();
  return out;
}

std::optional<double> number(const std::string& cell) {
  double value = 0;
  const char* end = cell.data() + cell.size();
  const auto [stop, error] = std::from_chars(cell.data(), end, value);
  if (error != std::errc() || stop != end || !std::isfinite(value)) return std::nullopt;
  return value;
}

bool is_gap(const std::string& cell) {
  return cell.empty() || cell == "NaN" || cell == "nan" || cell == "NA" || cell == "-";
}

class Reader {
 public:
  Reader(const std::string& name, std::vector<Message>& messages) : name_(name), messages_(messages) {}

  models::WindRecord read(const std::string& text) {
    std::istringstream in(text);
    std::string line;
    bool header = false;
    while (std::getline(in, line)) {
      ++line_;
      if (trimmed(line).empty() || line[0] == '#') continue;
      if (!header) {
        if (!read_header(line)) return {};
        header = true;
      } else {
        read_row(line);
      }
    }
    if (!header)
      say(Level::stop, 0, "the record is empty", "It needs a header line and one line per hour.",
          "speed [m/s],direction [deg],beam [W/m2]");
    finish();
    return std::move(out_);
  }

 private:
  void say(Level level, int line, std::string head, std::string text, std::string likely = {},
           std::string advice = {}) {
    Message m;
    m.level = level;
    m.file = name_;
    m.line = line;
    m.head = std::move(head);
    m.text = std::move(text);
    m.likely = std::move(likely);
    m.advice = std::move(advice);
    messages_.push_back(std::move(m));
  }

  // The first of its kind is told, the rest counted.
  void fault(const std::string& kind, std::string head, std::string text, std::string advice) {
    if (faults_[kind]++ > 0) return;
    first_[kind] = messages_.size();
    say(Level::stop, line_, std::move(head), std::move(text), {}, std::move(advice));
  }

  bool read_header(const std::string& line) {
    separator_ = line.find(';') != std::string::npos    ? ';'
                 : line.find('\t') != std::string::npos ? '\t'
                                                        : ',';
    if (number(split(line, separator_)[0])) {
      say(Level::stop, line_, "no header line",
          "The first line holds numbers. It must name the columns with "
          "their units, so that km/h are not taken for m/s.",
          "speed [m/s],direction [deg],beam [W/m2]");
      return false;
    }
    place_.assign(columns().size(), -1);
    factor_.assign(columns().size(), 1);
    const std::vector<std::string> cells = split(line, separator_);
    bool sound = true;
    for (std::size_t c = 0; c < cells.size(); ++c)
      sound = take_column(cells[c], static_cast<int>(c)) && sound;
    if (place_[0] < 0 && sound) {
      say(Level::stop, line_, "no column \"speed\"",
          "The columns found are: " + line + ". One of them must be the wind's speed.", "speed [m/s]");
      return false;
    }
    width_ = cells.size();
    return sound;
  }

  bool take_column(const std::string& cell, int at) {
    const std::string word = cell.substr(0, cell.find_first_of(" [("));
    for (std::size_t k = 0; k < columns().size(); ++k) {
      const Column& column = columns()[k];
      if (word != column.name) continue;
      if (place_[k] >= 0) {
        say(Level::stop, line_, "two columns \"" + word + "\"", "Each column may be there once.");
        return false;
      }
      std::string unit = trimmed(cell.substr(word.size()));
      if (unit.size() > 2 && (unit[0] == '[' || unit[0] == '('))
        unit = trimmed(unit.substr(1, unit.size() - 2));
      for (const Unit& known : column.units)
        if (unit == known.word) {
          place_[k] = at;
          factor_[k] = known.factor;
          return true;
        }
      std::string words;
      for (const Unit& known : column.units) words += (words.empty() ? "" : ", ") + std::string(known.word);
      say(Level::stop, line_, "column \"" + cell + "\"",
          (unit.empty() ? "It needs its unit: " : "Its unit must be one of: ") + words + ".",
          std::string(column.name) + " [" + column.units[0].word + "]");
      return false;
    }
    if (!word.empty()) passed_over_ += (passed_over_.empty() ? "" : ", ") + word;
    return true;
  }

  void read_row(const std::string& line) {
    const std::vector<std::string> cells = split(line, separator_);
    if (cells.size() != width_) {
      const bool decimal_comma = separator_ == ',' && cells.size() > width_;
      fault("width", "a line of " + std::to_string(cells.size()) + " cells",
            "The header has " + std::to_string(width_) + " columns." +
                (decimal_comma ? " Numbers with a decimal comma, or another separator in some lines?" : ""),
            decimal_comma
                ? "Write decimal points, or part the columns with semicolons and still write decimal "
                  "points."
                : "Every line needs as many cells as the header; an empty cell is a gap.");
      return;
    }
    std::array<double, 3> value{models::not_given, models::not_given, models::not_given};
    for (std::size_t k = 0; k < columns().size(); ++k)
      if (place_[k] >= 0) value[k] = read_cell(cells[static_cast<std::size_t>(place_[k])], k);
    out_.speed.push_back(value[0]);
    if (place_[1] >= 0) out_.direction.push_back(value[1]);
    if (place_[2] >= 0) out_.beam.push_back(value[2]);
  }

  double read_cell(const std::string& cell, std::size_t k) {
    const Column& column = columns()[k];
    if (is_gap(cell)) return models::not_given;
    const std::optional<double> read = number(cell);
    const std::string head = std::string(column.name) + " " + cell;
    if (!read) {
      fault(column.name + std::string("/number"), head,
            cell.find(',') != std::string::npos
                ? "Decimals are written with a point."
                : "A number is expected, without its unit, or nothing for a gap.",
            "Leave the cell empty where nothing was recorded.");
      return models::not_given;
    }
    double value = *read * factor_[k];
    if (k == 2 && value < 0 && value > -10) value = 0;  // a sensor's offset at night
    if (value < 0) {
      const bool filler = *read <= -9 && std::abs(std::remainder(std::abs(*read) + 1, 10)) < 1e-9;
      fault(column.name + std::string("/negative"), head,
            filler ? "This looks like a filler for missing hours." : "It cannot be negative.",
            "Leave the cell empty where nothing was recorded.");
      return models::not_given;
    }
    if (value > column.most * (1 + 1e-9)) {
      fault(column.name + std::string("/most"), head,
            "More than a place on earth sees in an hour's mean; is the unit in the header right?",
            "Write the unit the numbers have, for example " + std::string(column.name) + " [" +
                column.units.back().word + "]");
      return models::not_given;
    }
    return value;
  }

  void finish() {
    for (const auto& [kind, count] : faults_)
      if (count > 1)
        messages_[first_[kind]].text += " So in " + std::to_string(count) + " lines, this is the first.";
    if (has_stop(messages_)) return;
    out_.source = name_;
    for (const double v : out_.speed) out_.gaps += std::isnan(v) ? 1 : 0;
    const std::size_t hours = out_.speed.size();
    const double gap_share = hours > 0 ? static_cast<double>(out_.gaps) / static_cast<double>(hours) : 1;
    if (hours < 24)
      say(Level::stop, 0, std::to_string(hours) + " hours", "A day at least is needed, a year is meant.");
    else if (gap_share > 0.5)
      say(Level::stop, 0, std::to_string(out_.gaps) + " hours without a speed",
          "More than half of the record is missing.");
    else if (hours < 8000)
      say(Level::warn, 0, std::to_string(hours) + " hours",
          "A year has 8760; what is there is taken for the whole year, seasons or not.");
    if (hours >= 24 && gap_share > 0.1 && gap_share <= 0.5)
      say(Level::warn, 0, std::to_string(out_.gaps) + " hours without a speed",
          "They are left out. Meters fail in storms: the missing hours may be the windy ones.");
    else if (out_.gaps > 0 && gap_share <= 0.1)
      say(Level::note, 0, std::to_string(out_.gaps) + " hours without a speed", "They are left out.");
    if (!passed_over_.empty()) say(Level::note, 0, "columns not used", passed_over_ + ".");
  }

  std::string name_, passed_over_;
  std::vector<Message>& messages_;
  models::WindRecord out_;
  char separator_ = ',';
  int line_ = 0;
  std::size_t width_ = 0;
  std::vector<int> place_;
  std::vector<double> factor_;
  std::map<std::string, int> faults_;
  std::map<std::string, std::size_t> first_;
};

}  // namespace

models::WindRecord parse_wind_record(const std::string& text, const std::string& name,
                                     std::vector<Message>& messages) {
  return Reader(name, messages).read(text);
}

models::WindRecord read_wind_record(const std::string& path, const std::string& design_path,
                                    std::vector<Message>& messages) {
  const std::filesystem::path beside = std::filesystem::path(design_path).parent_path() / path;
  const FileText file = read_file(beside.string(), "wind record");
  if (!file.ok) {
    messages.push_back(file.message);
    return {};
  }
  return parse_wind_record(file.text, path, messages);
}

}  // namespace focalframe::cli
