#pragma once

/// Builds the ribs of a row: pairs of arms from the tube to the rims.

#include <string>
#include <vector>

#include "models/body_maker.h"
#include "models/trough_layout.h"
#include "models/trough_ribs.h"

namespace focalframe::models {

/// - plate: upper edge along the mirror, depth by taper or down to a straight lower edge; one beam of varying
///   depth per piece of the arm, its axis at mid-depth.
/// - bent: one bar along the mirror.
/// - truss: upper chord along the mirror, lower chord under its panel points, a post at every panel point but
///   the root's, one diagonal per panel from the lower chord's inner to the upper chord's outer end. All
///   connections rigid (welded); both chords start on a rigid hub on the tube.
class RibArms {
 public:
  /// Adds the sections all ribs share. All three must outlive this.
  RibArms(const TroughDesign& design, const TroughLayout& layout, BodyMaker& make);
  /// Rib number `rib` of module `module` at `x`, on `tube_node`.
  RibPart add(int module, int rib, double x, int tube_node);

 private:
  fem::Vec3 below_mirror(double x, double y, double below) const;
  fem::Vec3 axis_point(double x, double y) const;
  void add_arm(RibPart& rib, std::size_t side, const std::string& name);
  void hold_plate(int element);
  void add_web_plane(const RibPart& rib, std::size_t side, const std::string& name);
  double held_sideways() const;

  const TroughDesign& d_;
  const TroughLayout& at_;
  BodyMaker& make_;
  std::vector<int> sections_;  ///< one per arm element
  int material_ = 0;
  int chord_ = 0, web_ = 0, web_material_ = 0;
};

}  // namespace focalframe::models
