#include "cli/commands.h"

#include <iostream>

#include "cli/command_check.h"
#include "cli/command_dish.h"
#include "cli/command_frame.h"
#include "cli/command_frame_file.h"
#include "cli/command_modes.h"
#include "cli/command_stow.h"
#include "cli/design_file.h"
#include "cli/exit_code.h"
#include "cli/report/out_folder.h"
#include "cli/write_file.h"

namespace focalframe::cli {
namespace {

Message about_file(const std::string& path, std::string text) {
  Message m;
  m.file = path;
  m.text = std::move(text);
  return m;
}

// Reads the design and says what is wrong with it; false = the run is over.
bool read_sound(const DesignCommand& command, DesignFile& design) {
  if (!command.json_path.empty())
    if (const std::string refusal = refuse_result_path(command.json_path, command.design); !refusal.empty()) {
      design.messages = {about_file(command.json_path, refusal)};
      std::cerr << to_text(design.messages, true);
      return false;
    }
  if (!command.out_folder.empty())
    if (const std::string refusal = refuse_report_folder(command.out_folder); !refusal.empty()) {
      design.messages = {about_file(command.out_folder, refusal)};
      std::cerr << to_text(design.messages, true);
      return false;
    }
  design = read_design(command.design);
  if (!design.sound() || !command.quiet) std::cerr << to_text(design.messages, command.verbose);
  return design.sound();
}

int warnings_in(const DesignFile& design) {
  int count = 0;
  for (const Message& m : design.messages) count += m.level == Level::warn ? 1 : 0;
  return count;
}

}  // namespace

int run_check(const DesignCommand& command) {
  DesignFile design;
  if (!read_sound(command, design)) return exit_code(design.messages);
  if (design.kind == "frame" && !command.out_folder.empty()) {
    std::cerr << to_text(
        {about_file(command.out_folder,
                    "A report folder is made for troughs. A frame's results go to the screen and, "
                    "with --json FILE, to a file.")},
        true);
    return bad_input;
  }
  if (design.kind == "frame") return run_frame_check(design, command);
  if (design.kind == "dish") return run_dish_check(design, command, warnings_in(design));
  CheckOptions options;
  options.design_path = command.design;
  options.design_text = design.text;
  options.json_path = command.json_path;
  options.out_folder = command.out_folder;
  options.trace_rays = command.trace_rays;
  options.maps = command.maps;
  options.quiet = command.quiet;
  options.verbose = command.verbose;
  options.strict = command.strict;
  options.warnings = warnings_in(design);
  return run_trough_check(design.trough, design.lines, options);
}

int run_stow(const DesignCommand& command) {
  DesignFile design;
  if (!read_sound(command, design)) return exit_code(design.messages);
  if (design.kind == "dish") return run_dish_stow(design, command);
  if (design.kind == "frame") {
    Message m = about_file(command.design,
                           "A frame of kind=\"frame\" has no drive, no poses and no wind table: "
                           "there is no wind limit to look for.");
    m.advice = "focalframe stow needs a design of kind=\"trough\"";
    std::cerr << to_text({m}, true);
    return bad_input;
  }
  return run_trough_stow(design, command);
}

int run_modes(const DesignCommand& command) {
  DesignFile design;
  if (!read_sound(command, design)) return exit_code(design.messages);
  if (design.kind == "frame") return run_frame_modes(design, command);
  if (design.kind == "dish") return run_dish_modes(design, command);
  return run_trough_modes(design, command);
}

int run_frame(const FrameCommand& command) {
  DesignFile design;
  DesignCommand reading;
  reading.design = command.design;
  if (!read_sound(reading, design)) return exit_code(design.messages);
  if (design.kind != "frame") return write_trough_frame(design, command);
  std::cerr << to_text(
      about_file(command.design, "This design is a frame already: check and modes take it."));
  return bad_input;
}

}  // namespace focalframe::cli
