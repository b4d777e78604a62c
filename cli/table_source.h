#pragma once

/// A coefficient table as it stands in its file, before anything is understood: words by key, rows by column.
/// XML and CSV come to the same shape here.

#include <map>
#include <string>
#include <vector>

#include "cli/messages.h"

namespace focalframe::cli {

struct SourceText {
  std::string text;
  int line = 0;
};

struct SourceRow {
  int line = 0;
  SourceText pitch;                          ///< with its unit
  std::map<std::string, std::string> cells;  ///< by column name; empty text = blank
};

struct SourceProfile {
  SourceText pitch;
  std::string values;  ///< blank-separated
};

struct TableSource {
  std::map<std::string, SourceText> keys;  ///< "name", "pitch-zero", "reference-speed" ...
  std::vector<std::string> cautions;
  std::vector<SourceRow> rows;
  SourceText stations;  ///< blank-separated s/W; empty = none
  std::vector<SourceProfile> profiles;
};

/// Every key a table may carry; the same words head the lines of a CSV file.
const std::vector<std::string>& table_keys();
/// Every column a row may carry.
const std::vector<std::string>& table_columns();

TableSource read_xml_source(const std::string& text, const std::string& file, std::vector<Message>& messages);
TableSource read_csv_source(const std::string& text, const std::string& file, std::vector<Message>& messages);

}  // namespace focalframe::cli
