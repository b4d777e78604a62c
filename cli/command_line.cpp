#include "cli/command_line.h"

#include <CLI/CLI.hpp>
#include <exception>
#include <iostream>
#include <new>

#include "cli/command_line_fault.h"
#include "cli/commands.h"
#include "cli/exit_code.h"
#include "cli/manual.h"
#include "fem/mechanism.h"

namespace focalframe::cli {
namespace {

constexpr const char* about = "does this frame hold the focus? Checks support frames of parabolic troughs.";

constexpr const char* examples = R"(Examples:
  focalframe draft trough my-row.xml --aperture 2.4m --length 24m
  focalframe check my-row.xml
  focalframe check my-row.xml --json my-row.json --strict
  focalframe check my-row.xml --out my-row-report
  focalframe why receiver shift
  focalframe stow my-row.xml --verbose
  focalframe tables

Exit codes: 0 all limits met, 1 a limit is missed, 2 bad input, 3 no solution.
1 mrad is 1 mm in 1 m; light caught is the intercept factor.)";

const std::vector<std::string> draft_kinds{"trough", "frame", "xsd"};

struct Typed {
  DesignCommand check, stow, modes;
  DraftCommand draft;
  FrameCommand frame;
  std::map<std::string, std::string> sizes;
  std::string table, table_svg;
  std::vector<std::string> why;
  bool manual = false, completion = false;
};

void add_design(CLI::App& command, DesignCommand& typed) {
  command.add_option("DESIGN", typed.design, "design file")->required()->type_name("");
  command.add_option("--json", typed.json_path, "write every number to this file too")->type_name("FILE");
  command.add_flag("--quiet", typed.quiet, "verdict only");
  command.add_flag("--verbose", typed.verbose, "everything, also messages beyond the first 12");
}

void add_commands(CLI::App& app, Typed& typed) {
  app.add_flag("--man", typed.manual, "print the man page")->group("");
  app.add_flag("--completion", typed.completion, "print the completion script of bash")->group("");
  CLI::App* check = app.add_subcommand("check", "judge a design: focus, strength, drive, ground");
  add_design(*check, typed.check);
  check
      ->add_option("--out", typed.check.out_folder, "write the report (HTML, figures, tables) to this folder")
      ->type_name("FOLDER");
  check
      ->add_option("--trace", typed.check.trace_rays,
                   "trace this many rays in every pose and wind, to confirm the light")
      ->type_name("RAYS")
      ->check(CLI::Range(std::int64_t{1000}, std::int64_t{100'000'000}));
  check->add_flag("--maps", typed.check.maps,
                  "slope, miss, light and flux maps of the worst state into --json");
  check->add_flag("--strict", typed.check.strict, "what is not judged or warned about counts as missed");

  CLI::App* stow = app.add_subcommand("stow", "wind limits, the stow trigger and what caution costs");
  add_design(*stow, typed.stow);

  CLI::App* draft = app.add_subcommand("draft", "write a commented design to start from");
  draft->add_option("KIND", typed.draft.kind, "trough, frame, or xsd (for editors)")
      ->required()
      ->type_name("")
      ->check(CLI::IsMember(draft_kinds));
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

  CLI::App* why = app.add_subcommand("why", "what a word of the report or of the design file means");
  why->add_option("WHAT", typed.why, "such as: light caught, STUCK, depth-at-tube")->type_name("");
  CLI::App* frame = app.add_subcommand("frame", "write the built frame of a row, node by node, as a design");
  frame->add_option("DESIGN", typed.frame.design, "design file")->required()->type_name("");
  frame->add_option("FILE", typed.frame.file, "file to write; never over an existing one")
      ->required()
      ->type_name("");
  frame->add_option("--elevation", typed.frame.elevation, "pose, such as 45deg; 90 deg is the zenith")
      ->type_name("ANGLE");

  CLI::App* tables =
      app.add_subcommand("tables", "wind coefficient tables and load combinations: list them, or show one");
  tables->add_option("NAME", typed.table, "name of a shipped table or set, or path of your own")
      ->type_name("");
  tables->add_option("--svg", typed.table_svg, "write a drawing of the coefficients to this file")
      ->type_name("FILE");
}

ManualOption manual_option(const CLI::Option& option) {
  ManualOption out;
  out.names = option.get_positional() ? option.get_name() : option.get_name(false, true);
  out.value = option.get_items_expected_max() == 0 ? "" : option.get_type_name();
  out.text = option.get_description();
  return out;
}

Manual manual_of(const CLI::App& app) {
  Manual manual;
  manual.about = about;
  manual.version = FOCALFRAME_VERSION;
  manual.examples = examples;
  for (const CLI::App* command : app.get_subcommands({})) {
    ManualCommand c{command->get_name(), command->get_description(), {}, {}};
    for (const CLI::Option* option : command->get_options())
      (option->get_positional() ? c.positionals : c.options).push_back(manual_option(*option));
    if (c.name == "draft") c.positionals.front().words = draft_kinds;
    manual.commands.push_back(c);
  }
  return manual;
}

int run(CLI::App& app, Typed& typed) {
  if (typed.manual || typed.completion) {
    std::cout << (typed.manual ? man_page(manual_of(app)) : bash_completion(manual_of(app)));
    return all_met;
  }
  if (app.got_subcommand("check")) return run_check(typed.check);
  if (app.got_subcommand("stow")) return run_stow(typed.stow);
  if (app.got_subcommand("modes")) return run_modes(typed.modes);
  if (app.got_subcommand("why")) return run_why(typed.why);
  if (app.got_subcommand("frame")) return run_frame(typed.frame);
  if (app.got_subcommand("tables")) return run_tables(typed.table, typed.table_svg);
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
  CLI::App app(std::string("focalframe: ") + about, "focalframe");
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
