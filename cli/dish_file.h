#pragma once

/// Reads on where cli/design_file.h stops for kind="dish".

#include <vector>

#include "cli/design_file.h"
#include "cli/messages.h"
#include "models/dish_design.h"

namespace focalframe::cli {

struct DishFile {
  models::DishDesign design;
  Lines lines;                    ///< the second ring's are "ring#2/radius"
  std::vector<Message> messages;  ///< sorted by line
};

/// `design.kind` is "dish". The design is valid only when there is no STOP.
DishFile read_dish(const DesignFile& design);

/// "element/attribute" of what a dish's file states in units of its own (dB, GHz, beamwidths), beside the
/// schema.
std::vector<std::string> dish_attributes_with_own_units();

}  // namespace focalframe::cli
