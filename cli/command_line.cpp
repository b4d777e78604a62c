#include "cli/command_line.h"

#include <CLI/CLI.hpp>
#include <exception>
#include <iostream>
#include <new>

#include "cli/command_line_fault.h"
#include "cli/commands.h"
#include "cli/exit_code.h"
#include "fem/mechanism.h"

namespace focalframe::cli {
namespace {

constexpr const char* examples = R"(Examples:
  focalframe draft trough my-row.xml --aperture 2.4m --length 24m
  focalframe check my-row.xml
  focalframe check my-row.xml --json my-row.json --strict
  focalframe tables

Exit codes: 0 all limits met, 1 a limit is missed, 2 bad input, 3 no solution.
1 mrad is 1 mm in 1 m; light caught is the intercept factor.)";

struct Typed {
  DesignCommand check, modes;
  DraftCommand draft;
  std::map<std::string, std::string> sizes;
  std::string table;
};

void add_design(CLI::App& command, DesignCommand& typed) {
  command.add_option("DESIGN", typed.design, "design file")->required()->type_name("");
  command.add_option("--json", typed.json_path, "write every number to this file too")->type_name("FILE");
  command.add_flag("--quiet", typed.quiet, "verdict only");
  command.add_flag("--verbose", typed.verbose, "everything, also messages beyond the first 12");
}

void add_commands(CLI::App& app, Typed& typed) {
  CLI::App* check = app.add_subcommand("check", "judge a design: focus, strength, drive, ground");
  add_design(*check, typed.check);
  check
      ->add_option("--out", typed.check.out_folder, "write the report (HTML, figures, tables) to this folder")
      ->type_name("FOLDER");
  check->add_flag("--strict", typed.check.strict, "what is not judged or warned about counts as missed");

  CLI::App* draft = app.add_subcommand("draft", "write a commented design to start from");
  draft->add_option("KIND", typed.draft.kind, "trough, frame, or xsd (for editors)")
      ->required()
      ->type_name("")
      ->check(CLI::IsMember({"trough", "frame", "xsd"}));
  draft->add_option("FILE", typed.draft.file, "file to write; never over an existing one")
      ->required()
      ->type_name("");
  draft->add_flag("--every-field", typed.draft.every_field, "show every attribute with its default");
  for (const std::string& name : draft_size_options())
    draft->add_option("--" + name, typed.sizes[name], "")
        ->type_name("SIZE")
        ->group("Sizes (trough), such as 2.4m");

  CLI::App* modes = app.add_subcommand("modes", "natural frequencies and buckling of a frame");
  add_design(*modes, typed.modes);
  modes->add_option("--count", typed.modes.count, "how many")->type_name("NUMBER")->check(CLI::Range(1, 200));

  CLI::App* tables = app.add_subcommand("tables", "wind coefficient tables: list them, or show one");
  tables->add_option("NAME", typed.table, "name of a shipped table or path of your own")->type_name("");
}

int run(CLI::App& app, Typed& typed) {
  if (app.got_subcommand("check")) return run_check(typed.check);
  if (app.got_subcommand("modes")) return run_modes(typed.modes);
  if (app.got_subcommand("tables")) return run_tables(typed.table);
  if (app.got_subcommand("draft")) {
    for (const std::string& name : draft_size_options())
      if (!typed.sizes[name].empty()) typed.draft.sizes.emplace_back(name, typed.sizes[name]);
    return run_draft(typed.draft);
  }
  std::cout << app.help();
  return all_met;
}

int fail(const char* what, int code) {
  std::cerr << "STOP focalframe: " << what << "\n";
  return code;
}

}  // namespace

int run_command_line(const std::vector<std::string>& arguments) try {
  CLI::App app("focalframe: does this frame hold the focus? Checks support frames of parabolic troughs.",
               "focalframe");
  app.set_version_flag("--version", std::string("focalframe ") + FOCALFRAME_VERSION);
  app.footer(examples);
  Typed typed;
  add_commands(app, typed);
  try {
    app.parse(std::vector<std::string>(arguments.rbegin(), arguments.rend()));
  } catch (const CLI::Success& asked) {  // --help, --version
    app.exit(asked);
    return all_met;
  } catch (const CLI::ParseError& error) {
    std::cerr << to_text({command_line_fault(arguments, error.what())}, true);
    return bad_input;
  }
  return run(app, typed);
} catch (const fem::Mechanism& mechanism) {
  return fail(mechanism.what(), no_solution);
} catch (const std::bad_alloc&) {
  return fail("There is not enough memory for this frame. Use fewer modules, ribs or elements.", no_solution);
} catch (const std::invalid_argument& error) {
  return fail(error.what(), bad_input);
} catch (const std::exception& error) {
  return fail(error.what(), no_solution);
}

}  // namespace focalframe::cli
