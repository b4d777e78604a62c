#pragma once

/// Reads the <frame> of a kind="frame" design into a frame and its load cases.

#include <string>
#include <vector>

#include "cli/design_file.h"
#include "fem/frame.h"
#include "fem/load_case.h"

namespace focalframe::cli {

/// A support that moves in one load case, frame axes [m, rad].
struct SupportMovement {
  int node = 0;
  fem::Vec6 by = fem::Vec6::Zero();
};

struct FrameFile {
  fem::Frame frame;                                     ///< names of nodes and members are their ids
  std::vector<fem::LoadCase> cases;                     ///< in the order in which the file names them first
  std::vector<std::vector<SupportMovement>> movements;  ///< one list per case
  std::vector<int> node_line, member_line, joint_line;
  bool has_mass = false;
  std::vector<Message> messages;  ///< sorted by line
};

/// The frame with the support movements of a case.
fem::Frame frame_in_case(const FrameFile& file, std::size_t at);

/// `design.kind` is "frame". The frame is complete only when there is no STOP.
FrameFile read_frame(const DesignFile& design);

}  // namespace focalframe::cli
