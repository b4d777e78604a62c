#pragma once

/// Words and numbers out of a table's source, each refusal said with its line.

#include <optional>
#include <string>
#include <vector>

#include "cli/messages.h"
#include "cli/table_file.h"
#include "cli/table_source.h"

namespace focalframe::cli {

class TableReader {
 public:
  TableReader(const TableSource& source, const std::string& file, std::vector<Message>& messages)
      : source_(source), file_(file), messages_(messages) {}

  const TableSource& source() const { return source_; }
  bool stopped() const { return stopped_; }

  /// The message for further filling; valid until the next one.
  Message& say(Level level, int line, const std::string& head, const std::string& text,
               const std::string& likely = "");

  /// nullptr when the key is absent or empty.
  const SourceText* find(const std::string& key) const;
  std::string text(const std::string& key) const;

  /// One of a few words. Absent: a STOP when required (returns ""), else the first one.
  enum class Need { required, optional };
  std::string word(const std::string& key, const std::vector<std::string>& allowed, Need need,
                   const std::string& why);

  /// A plain finite number with a decimal point.
  std::optional<double> number(const std::string& written, int line, const std::string& head);
  std::vector<double> numbers(const std::string& list, int line, const std::string& head);
  /// The number of a key, `otherwise` when it is absent.
  double ratio(const std::string& key, double otherwise);
  /// "0.25 to 0.35".
  struct Range {
    double from = loads::unstated, to = loads::unstated;
  };
  Range range(const std::string& key);
  std::optional<double> angle(const SourceText& written, const std::string& head);

 private:
  const TableSource& source_;
  const std::string& file_;
  std::vector<Message>& messages_;
  bool stopped_ = false;
};

/// "Ca Cs Cm" or "Cfx Cfz Cm".
std::vector<std::string> force_columns(const loads::TableConventions& conventions);

/// Provenance, kind, reference, conventions, validity.
void read_declarations(TableReader& reader, ReadTable& result);
/// Rows and profiles, converted, ascending in pitch.
void read_rows(TableReader& reader, ReadTable& result);
void read_profiles(TableReader& reader, ReadTable& result);
/// What can only be said of the converted table: gaps, radians, wind pulling upwind.
void judge(TableReader& reader, ReadTable& result);

}  // namespace focalframe::cli
