#include "cli/command_frame.h"

#include <iostream>

#include "cli/exit_code.h"
#include "cli/frame_json.h"
#include "cli/frame_results.h"
#include "cli/frame_text.h"
#include "cli/input_hash.h"
#include "cli/write_file.h"
#include "fem/mechanism.h"

namespace focalframe::cli {
namespace {

Message mechanism_message(const DesignFile& design, const FrameFile& file, const fem::Mechanism& mechanism) {
  Message m;
  m.file = design.path;
  m.head = "the frame can move freely";
  m.text = mechanism.what();
  if (mechanism.node >= 0 && static_cast<std::size_t>(mechanism.node) < file.node_line.size()) {
    m.line = file.node_line[static_cast<std::size_t>(mechanism.node)];
    m.head =
        "node id=\"" + file.frame.nodes[static_cast<std::size_t>(mechanism.node)].name + "\" can move freely";
  }
  m.no_solution = true;
  return m;
}

// More than yield somewhere, or a buckling factor below 1.
bool gives_way(const FrameFile& file, const FrameResults& results) {
  for (const FrameCase& one : results.cases) {
    for (std::size_t m = 0; m < one.stresses.size(); ++m) {
      const double yield =
          file.frame.materials[static_cast<std::size_t>(file.frame.members[m].material)].yield;
      if (yield > 0 && one.stresses[m].stress > yield) return true;
    }
    if (!one.buckling.modes.empty() && one.buckling.modes.front().factor < 1) return true;
    if (one.second_order.asked && (!one.second_order.stable || one.second_order.used > 1)) return true;
  }
  return false;
}

// Reads, computes, writes JSON; `print` makes the text. Returns the exit code.
template <class Print>
int run(const DesignFile& design, const DesignCommand& command, int modes, int buckling, Print print) {
  FrameFile file = read_frame(design);
  if (has_stop(file.messages) || !command.quiet) std::cerr << to_text(file.messages, command.verbose);
  if (has_stop(file.messages)) return exit_code(file.messages);
  try {
    const FrameResults results = compute_frame(file, modes, buckling);
    const std::string hash = input_hash(design.text, "");
    if (!command.json_path.empty())
      if (const std::string problem =
              write_file(command.json_path, frame_json(design.name, hash, file, results));
          !problem.empty()) {
        Message m;
        m.file = command.json_path;
        m.text = problem;
        std::cerr << to_text(m);
        return bad_input;
      }
    const bool fails = gives_way(file, results);
    if (!command.quiet)
      std::cout << print(hash, file, results);
    else
      std::cout << design.name
                << (fails ? ": GIVES WAY: a member yields or the frame buckles in some case\n"
                          : ": solved; no member yields and nothing buckles in any case\n");
    return fails ? criterion_failed : all_met;
  } catch (const fem::Mechanism& mechanism) {
    const Message m = mechanism_message(design, file, mechanism);
    std::cerr << to_text({m}, true);
    return no_solution;
  }
}

}  // namespace

int run_frame_check(const DesignFile& design, const DesignCommand& command) {
  constexpr int modes = 6, buckling = 3;
  return run(design, command, modes, buckling,
             [&](const std::string& hash, const FrameFile& file, const FrameResults& results) {
               return frame_text(design.name, hash, file, results, command.verbose);
             });
}

int run_frame_modes(const DesignFile& design, const DesignCommand& command) {
  return run(design, command, command.count, command.count,
             [&](const std::string& hash, const FrameFile& file, const FrameResults& results) {
               return modes_text(design.name, hash, file, results);
             });
}

}  // namespace focalframe::cli
