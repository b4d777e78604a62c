#include "cli/report/out_folder.h"

#include <unistd.h>

#include <filesystem>

#include "cli/write_file.h"

namespace focalframe::cli {
namespace {

namespace fs = std::filesystem;

// What a report's folder is known by.
constexpr const char* marker = "report.html";

}  // namespace

std::string refuse_report_folder(const std::string& folder) {
  std::error_code error;
  const fs::path path(folder);
  if (folder.empty()) return "No folder is named.";
  if (!fs::exists(fs::symlink_status(path, error))) {
    const fs::path parent = fs::absolute(path).lexically_normal().parent_path();
    if (!fs::is_directory(parent, error)) return "There is no folder " + parent.string() + ".";
    if (::access(parent.c_str(), W_OK) != 0)
      return "Nothing may be written in the folder " + parent.string() + ".";
    return "";
  }
  if (!fs::is_directory(path, error)) return "This is not a folder.";
  if (fs::is_empty(path, error) || fs::is_regular_file(path / marker, error)) return "";
  return "This folder holds something other than a report. It was not touched; name a new folder.";
}

std::string write_report_folder(const std::string& folder, const std::map<std::string, std::string>& files) {
  if (auto problem = refuse_report_folder(folder); !problem.empty()) return problem;
  std::error_code error;
  const fs::path target = fs::absolute(folder).lexically_normal();
  const fs::path clean = target.has_filename() ? target : target.parent_path();
  const std::string tag = "." + std::to_string(::getpid()) + ".tmp";
  const fs::path fresh = clean.string() + tag, old = clean.string() + ".old" + tag;
  const auto give_up = [&](std::string problem) {
    fs::remove_all(fresh, error);
    return problem;
  };
  fs::create_directories(fresh, error);
  if (error) return give_up("The folder cannot be made: " + error.message() + ".");
  for (const auto& [name, text] : files) {
    fs::create_directories((fresh / name).parent_path(), error);
    if (auto problem = write_file((fresh / name).string(), text); !problem.empty())
      return give_up(name + ": " + problem);
  }
  if (fs::exists(clean, error)) {
    fs::rename(clean, old, error);
    if (error) return give_up("The earlier report cannot be moved away: " + error.message() + ".");
  }
  fs::rename(fresh, clean, error);
  if (error) {
    const std::string problem = "The report cannot be put in its place: " + error.message() + ".";
    if (fs::exists(old)) fs::rename(old, clean, error);
    return give_up(problem);
  }
  fs::remove_all(old, error);
  return "";
}

}  // namespace focalframe::cli
