#include "cli/read_file.h"

#include <filesystem>
#include <fstream>
#include <iterator>
#include <system_error>
#include <vector>

#include "cli/nearest.h"

namespace focalframe::cli {
namespace {

namespace fs = std::filesystem;

constexpr std::uintmax_t largest = 4 * 1024 * 1024;

FileText refused(const std::string& path, std::string text, std::string likely = {}) {
  FileText result;
  result.message.file = path;
  result.message.head = "";
  result.message.text = std::move(text);
  result.message.likely = std::move(likely);
  return result;
}

std::vector<std::string> xml_files_in(const fs::path& folder) {
  std::vector<std::string> names;
  std::error_code error;
  for (fs::directory_iterator at(folder.empty() ? fs::path(".") : folder, error), end;
       !error && at != end && names.size() < 200; at.increment(error))
    if (at->path().extension() == ".xml") names.push_back(at->path().filename().string());
  return names;
}

FileText missing(const fs::path& path, const std::string& what) {
  std::error_code error;
  const fs::path folder = path.parent_path();
  if (!folder.empty() && !fs::is_directory(folder, error))
    return refused(path.string(),
                   "There is no folder " + folder.string() + ", so there is no " + what + " in it.");
  const std::string near = nearest_name(path.filename().string(), xml_files_in(folder));
  return refused(path.string(),
                 "There is no such file" + (folder.empty() ? std::string(" in this folder") : "") + ".",
                 near.empty() ? "" : (folder / near).string());
}

}  // namespace

std::string with_plain_line_ends(const std::string& bytes) {
  std::string text;
  text.reserve(bytes.size());
  for (std::size_t i = bytes.starts_with("\xEF\xBB\xBF") ? 3 : 0; i < bytes.size(); ++i) {
    if (bytes[i] == '\r') {
      text += '\n';
      if (i + 1 < bytes.size() && bytes[i + 1] == '\n') ++i;
    } else {
      text += bytes[i];
    }
  }
  return text;
}

FileText read_file(const std::string& name, const std::string& what) {
  const fs::path path(name);
  std::error_code error;
  const fs::file_status status = fs::status(path, error);
  if (name.empty() || status.type() == fs::file_type::not_found) return missing(path, what);
  if (fs::is_directory(status)) return refused(name, "This is a folder; a " + what + " is one file.");
  if (!fs::is_regular_file(status))
    return refused(name, "This is not a plain file, so it cannot be read as a " + what + ".");
  const std::uintmax_t size = fs::file_size(path, error);
  if (!error && size == 0)
    return refused(name, "The file is empty. `focalframe draft trough FILE` writes one to start from.");
  if (!error && size > largest)
    return refused(name, "The file has " + std::to_string(size / 1024) + " kB; a " + what +
                             " has a few, and more than " + std::to_string(largest / 1024) +
                             " are not read.");
  std::ifstream stream(path, std::ios::binary);
  std::string bytes((std::istreambuf_iterator<char>(stream)), std::istreambuf_iterator<char>());
  if (!stream || stream.bad())
    return refused(name, "The file cannot be opened for reading. Look at its owner and its rights.");
  FileText result;
  result.text = with_plain_line_ends(bytes);
  result.ok = true;
  return result;
}

}  // namespace focalframe::cli
