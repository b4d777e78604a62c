#include "cli/write_file.h"

#include <unistd.h>

#include <filesystem>
#include <fstream>
#include <system_error>

namespace focalframe::cli {
namespace {

namespace fs = std::filesystem;

std::string temporary_name(const std::string& path) {
  return path + "." + std::to_string(::getpid()) + ".tmp";
}

std::string write_whole(const std::string& path, const std::string& text) {
  std::ofstream stream(path, std::ios::binary | std::ios::trunc);
  if (!stream) return "The file cannot be written. Look at the folder and its rights.";
  stream << text;
  stream.close();
  return stream ? "" : "The file cannot be written to its end. Is the disk full?";
}

std::string folder_problem(const fs::path& path) {
  std::error_code error;
  if (path.empty()) return "No file is named.";
  if (fs::is_directory(path, error)) return "This is a folder; name a file in it.";
  const fs::path folder = path.parent_path();
  if (!folder.empty() && !fs::is_directory(folder, error))
    return "There is no folder " + folder.string() + ".";
  return "";
}

bool looks_like_design(const fs::path& path) {
  std::ifstream stream(path, std::ios::binary);
  std::string start(4096, '\0');
  stream.read(start.data(), static_cast<std::streamsize>(start.size()));
  start.resize(static_cast<std::size_t>(stream.gcount()));
  return start.find("<collector") != std::string::npos || start.find("<?xml") != std::string::npos;
}

}  // namespace

std::string write_file(const std::string& path, const std::string& text) {
  if (auto problem = folder_problem(path); !problem.empty()) return problem;
  std::error_code error;
  // A device or pipe (/dev/stdout) is written to directly: it cannot be replaced.
  if (fs::exists(path, error) && !fs::is_regular_file(path, error)) return write_whole(path, text);
  const std::string temporary = temporary_name(path);
  std::string problem = write_whole(temporary, text);
  if (problem.empty()) {
    fs::rename(temporary, path, error);
    if (error) problem = "The file cannot be put in its place: " + error.message() + ".";
  }
  if (!problem.empty()) fs::remove(temporary, error);
  return problem;
}

std::string write_new_file(const std::string& path, const std::string& text) {
  if (auto problem = folder_problem(path); !problem.empty()) return problem;
  std::error_code error;
  if (fs::exists(fs::symlink_status(path, error))) return "This file exists already. It was not touched.";
  const std::string temporary = temporary_name(path);
  std::string problem = write_whole(temporary, text);
  if (problem.empty()) {
    // A hard link fails when the name is taken, also by a file that came up just now.
    fs::create_hard_link(temporary, path, error);
    if (error) {
      error.clear();
      if (fs::exists(path, error))
        problem = "This file exists already. It was not touched.";
      else
        fs::rename(temporary, path, error);
      if (problem.empty() && error) problem = "The file cannot be put in its place: " + error.message() + ".";
    }
  }
  fs::remove(temporary, error);
  return problem;
}

std::string refuse_result_path(const std::string& path, const std::string& design_path) {
  std::error_code error;
  if (fs::equivalent(path, design_path, error))
    return "Results would be written over the design itself. It was not touched.";
  error.clear();
  if (fs::is_regular_file(path, error) && looks_like_design(path))
    return "Results would be written over a design or another XML file. It was not touched.";
  return folder_problem(path);
}

}  // namespace focalframe::cli
