#include "cli/shipped_tables.h"

#include <filesystem>

#include "cli/embedded.h"
#include "cli/nearest.h"
#include "cli/read_file.h"

namespace focalframe::cli {

std::optional<ReadTable> find_table(const std::string& name, const std::string& design_path,
                                    const Message& place, std::vector<Message>& messages) {
  std::vector<std::string> names;
  for (const EmbeddedText& table : shipped_tables()) {
    if (table.name == name) return read_table_text(table.text, table.name, messages);
    names.push_back(table.name);
  }
  namespace fs = std::filesystem;
  const fs::path path =
      fs::path(name).is_absolute() ? fs::path(name) : fs::path(design_path).parent_path() / name;
  std::error_code ignored;
  if (fs::exists(path, ignored)) {
    const FileText file = read_file(path.string(), "table");
    if (file.ok) return read_table_text(file.text, path.string(), messages);
    messages.push_back(file.message);
    return std::nullopt;
  }
  Message message = place;
  std::string list;
  for (const std::string& n : names) list += (list.empty() ? "" : ", ") + n;
  message.text = "No shipped table and no file beside the design has this name. Shipped: " + list +
                 ". A table of your own is named by its path from the design's folder.";
  if (const std::string near = nearest_name(name, names); !near.empty())
    message.likely = "table=\"" + near + "\"";
  messages.push_back(message);
  return std::nullopt;
}

}  // namespace focalframe::cli
