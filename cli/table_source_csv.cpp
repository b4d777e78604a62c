#include <algorithm>
#include <sstream>

#include "cli/nearest.h"
#include "cli/table_source.h"

namespace focalframe::cli {

namespace {

std::string trimmed(const std::string& text) {
  const auto first = text.find_first_not_of(" \t\r\""), last = text.find_last_not_of(" \t\r\"");
  return first == std::string::npos ? "" : text.substr(first, last - first + 1);
}

std::vector<std::string> split(const std::string& line, char separator) {
  std::vector<std::string> cells;
  std::string cell;
  std::istringstream stream(line);
  while (std::getline(stream, cell, separator)) cells.push_back(trimmed(cell));
  if (!line.empty() && line.back() == separator) cells.emplace_back();
  return cells;
}

const std::string profile_prefix = "dcp ";

class Reader {
 public:
  Reader(const std::string& file, std::vector<Message>& messages) : file_(file), messages_(messages) {}

  TableSource read(const std::string& text) {
    std::istringstream stream(text);
    std::string line;
    while (std::getline(stream, line)) {
      ++line_;
      const std::string content = trimmed(line);
      if (content.empty()) continue;
      if (content[0] == '#')
        comment(trimmed(content.substr(1)));
      else if (columns_.empty())
        header(content);
      else
        row(content);
    }
    if (columns_.empty())
      stop("no column names",
           "After the lines that begin with # comes one line of column names: pitch_deg,Ca,Cs,Cm.");
    return source_;
  }

 private:
  void stop(const std::string& head, const std::string& text, const std::string& likely = "") {
    Message message;
    message.file = file_;
    message.line = line_;
    message.head = head;
    message.text = text;
    message.likely = likely;
    messages_.push_back(std::move(message));
  }

  void comment(const std::string& content) {
    const auto colon = content.find(':');
    if (colon == std::string::npos) return;  // a remark
    const std::string key = trimmed(content.substr(0, colon)), value = trimmed(content.substr(colon + 1));
    if (key == "caution") return source_.cautions.push_back(value);
    const auto& known = table_keys();
    if (std::find(known.begin(), known.end(), key) == known.end())
      return stop("# " + key + ":", "A table has no \"" + key + "\". It knows: " + joined(known) + ".",
                  nearest_name(key, known));
    if (source_.keys.count(key)) return stop("# " + key + ":", "This stands twice in the table.");
    source_.keys[key] = {value, line_};
  }

  void header(const std::string& content) {
    separator_ = content.find(';') != std::string::npos ? ';' : ',';
    columns_ = split(content, separator_);
    std::vector<std::string> known = table_columns();
    known.insert(known.begin(), {"pitch_deg", "pitch_rad"});
    for (const std::string& column : columns_) {
      if (column.rfind(profile_prefix, 0) == 0) {
        source_.stations.text += " " + column.substr(profile_prefix.size());
        source_.stations.line = line_;
      } else if (std::find(known.begin(), known.end(), column) == known.end()) {
        stop("column \"" + column + "\"",
             "A table has no such column. It knows: " + joined(known) + ", and dcp with a station s/W.",
             nearest_name(column, known));
      }
    }
    if (columns_.front() != "pitch_deg" && columns_.front() != "pitch_rad")
      stop("first column \"" + columns_.front() + "\"",
           "The first column is the pitch and its name carries the unit: pitch_deg or pitch_rad.",
           "pitch_deg");
  }

  void row(const std::string& content) {
    const std::vector<std::string> cells = split(content, separator_);
    if (cells.size() != columns_.size())
      return stop("a row of " + std::to_string(cells.size()) + " cells",
                  "The header names " + std::to_string(columns_.size()) +
                      " columns. A comma inside a number counts as a separator: write 1.5, not 1,5.");
    SourceRow r;
    r.line = line_;
    SourceProfile profile;
    for (std::size_t i = 0; i < cells.size(); ++i) {
      if (columns_[i].rfind(profile_prefix, 0) == 0)
        profile.values += " " + (cells[i].empty() ? std::string("blank") : cells[i]);
      else if (columns_[i] == "pitch_deg" || columns_[i] == "pitch_rad")
        r.pitch = {cells[i] + (columns_[i] == "pitch_deg" ? " deg" : " rad"), line_};
      else
        r.cells[columns_[i]] = cells[i];
    }
    if (!profile.values.empty()) {
      profile.pitch = r.pitch;
      source_.profiles.push_back(profile);
    }
    source_.rows.push_back(r);
  }

  const std::string& file_;
  std::vector<Message>& messages_;
  TableSource source_;
  std::vector<std::string> columns_;
  char separator_ = ',';
  int line_ = 0;
};

}  // namespace

TableSource read_csv_source(const std::string& text, const std::string& file,
                            std::vector<Message>& messages) {
  return Reader(file, messages).read(text);
}

}  // namespace focalframe::cli
