#pragma once

/// The man page and the completion of bash, made from the same words as --help.

#include <string>
#include <vector>

namespace focalframe::cli {

struct ManualOption {
  std::string names;  ///< "--json" or "-h,--help"; a positional has its plain name
  std::string value;  ///< "FILE"; empty for a flag
  std::string text;
  std::vector<std::string> words;  ///< values it knows; empty = any
};

struct ManualCommand {
  std::string name, text;
  std::vector<ManualOption> options, positionals;
};

struct Manual {
  std::string about, version, examples;
  std::vector<ManualCommand> commands;
};

/// In the man macros, section 1.
std::string man_page(const Manual& manual);

/// A script to be sourced by bash; completes commands, options, known words and file names.
std::string bash_completion(const Manual& manual);

}  // namespace focalframe::cli
