#include "cli/table_file.h"

#include "cli/read_file.h"
#include "cli/table_reader.h"

namespace focalframe::cli {

std::optional<ReadTable> read_table_text(const std::string& text, const std::string& file_name,
                                         std::vector<Message>& messages) {
  std::vector<Message> own;
  const std::string plain = with_plain_line_ends(text);
  const auto first = plain.find_first_not_of(" \t\n");
  const bool xml = first != std::string::npos && plain[first] == '<';
  const TableSource source =
      xml ? read_xml_source(plain, file_name, own) : read_csv_source(plain, file_name, own);
  ReadTable result;
  if (!has_stop(own)) {
    TableReader reader(source, file_name, own);
    read_declarations(reader, result);
    if (!reader.stopped()) read_rows(reader, result);
    if (!reader.stopped()) read_profiles(reader, result);
    if (!reader.stopped()) judge(reader, result);
    result.understood = loads::describe(result.conventions);
  }
  messages.insert(messages.end(), own.begin(), own.end());
  if (has_stop(own)) return std::nullopt;
  return result;
}

}  // namespace focalframe::cli
