#include "cli/manual.h"

#include <sstream>

namespace focalframe::cli {
namespace {

// Backslashes and hyphens as the man macros want them; a leading point or quote would be a macro.
std::string roff(const std::string& text) {
  std::string out;
  for (char c : text) {
    if (c == '\\')
      out += "\\e";
    else if (c == '-')
      out += "\\-";
    else
      out += c;
  }
  if (!out.empty() && (out[0] == '.' || out[0] == '\'')) out = "\\&" + out;
  return out;
}

std::string spaced(const std::string& names) {
  std::string out;
  for (char c : names) out += c == ',' ? std::string(", ") : std::string(1, c);
  return out;
}

std::string option_entry(const ManualOption& o) {
  return ".TP\n.B " + roff(spaced(o.names)) + (o.value.empty() ? "" : " " + roff(o.value)) + "\n" +
         (o.text.empty() ? "\\&" : roff(o.text)) + "\n";
}

std::string words_of(const std::vector<ManualOption>& options) {
  std::string out;
  for (const ManualOption& o : options) {
    std::istringstream names(o.names);
    for (std::string name; std::getline(names, name, ',');) out += (out.empty() ? "" : " ") + name;
  }
  return out;
}

}  // namespace

std::string man_page(const Manual& manual) {
  std::string out = ".TH FOCALFRAME 1 \"\" \"focalframe " + manual.version + "\"\n.SH NAME\nfocalframe \\- " +
                    roff(manual.about) + "\n.SH SYNOPSIS\n";
  for (const ManualCommand& c : manual.commands) {
    out += ".B focalframe " + roff(c.name) + "\n";
    for (const ManualOption& p : c.positionals) out += ".I " + roff(p.names) + "\n";
    out += "[options]\n.br\n";
  }
  out += ".SH COMMANDS\n";
  for (const ManualCommand& c : manual.commands) {
    out += ".SS " + roff(c.name) + "\n" + roff(c.text) + "\n";
    for (const ManualOption& p : c.positionals) out += option_entry(p);
    for (const ManualOption& o : c.options) out += option_entry(o);
  }
  out += ".SH EXAMPLES\n.nf\n";
  std::istringstream lines(manual.examples);
  for (std::string line; std::getline(lines, line);) out += roff(line) + "\n";
  return out + ".fi\n";
}

std::string bash_completion(const Manual& manual) {
  std::string names, cases;
  for (const ManualCommand& c : manual.commands) {
    names += (names.empty() ? "" : " ") + c.name;
    std::string words;
    for (const ManualOption& p : c.positionals)
      for (const std::string& word : p.words) words += " " + word;
    cases += "    " + c.name + ") words=\"" + words_of(c.options) + words + "\" ;;\n";
  }
  return R"(# Completion of focalframe for bash: source this file, or put it where bash-completion looks.
_focalframe() {
  local words now=${COMP_WORDS[COMP_CWORD]}
  COMPREPLY=()
  if [ "$COMP_CWORD" -eq 1 ]; then
    COMPREPLY=($(compgen -W ")" +
         names + R"( --help --version" -- "$now"))
    return
  fi
  case ${COMP_WORDS[1]} in
)" + cases +
         R"(    *) words="" ;;
  esac
  COMPREPLY=($(compgen -W "$words" -- "$now"))
  case $now in
    -*) ;;
    *) COMPREPLY+=($(compgen -f -- "$now")) ;;
  esac
}
complete -o filenames -F _focalframe focalframe
)";
}

}  // namespace focalframe::cli
