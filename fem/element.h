#pragma once

/// Everything about one member that does not depend on the load: the work behind fem/beam.h, kept once per
/// member by assembly and the solvers.
///
/// Three sets of twelve motions follow each other: node freedoms (frame axes) -> the outer side of the
/// member's ends (member axes, after the rigid arms) -> the inner side (behind releases and end springs).

#include <vector>

#include "fem/beam.h"

namespace focalframe::fem {

/// One span of an unreleased beam: enough for its shape functions.
struct Span {
  double length = 0;  ///< [m]
  double phi_y = 0;   ///< 12 E Iz / (G As_y L^2): shear flexibility of bending in the x-y plane [-]
  double phi_z = 0;   ///< 12 E Iy / (G As_z L^2): the same in the x-z plane [-]
};

struct Element {
  Span span;
  Mat3 axes = Mat3::Identity();     ///< rows = member x, y, z in frame axes
  Mat12 rigid = Mat12::Zero();      ///< inner end forces per inner end motion, member axes
  Mat12 carry = Mat12::Zero();      ///< outer end motions from node freedoms
  Mat12 give = Mat12::Zero();       ///< inner motion = outer motion - give * (held inner end force)
  std::array<bool, 12> released{};  ///< end forces that are zero
  bool soft = false;                ///< any release or end spring
  Mat12 between = Mat12::Zero();    ///< end forces per outer end motion, member axes

  /// Inner end motions per outer end motion.
  Mat12 inner() const { return Mat12::Identity() - give * rigid; }
};

Span make_span(const Section& section, const Material& material, double length);
/// Stiffness of an unreleased span, member axes.
Mat12 span_stiffness(const Section& section, const Material& material, const Span& span);
/// Motion at fraction xi of a span from its end motions, all in member axes; exact for the unloaded span.
Mat6x12 span_motion(const Span& span, double xi, bool of_section);
/// Derivative of span_motion(of_section = true) along the member [1/m].
Mat6x12 span_motion_slope(const Span& span, double xi);

/// Consistent mass over node freedoms, as in fem/beam.h.
Mat12 consistent_mass(const Frame& frame, int member, const Element& element);

Element make_element(const Frame& frame, int member);
std::vector<Element> make_elements(const Frame& frame);

/// Fixed-end forces on the outer ends (nodes held) from those on the inner ends (inner ends held). Throws
/// Mechanism when a release lets the member move freely under these forces.
Vec12 released_end_force(const Frame& frame, int member, const Element& element, const Vec12& held);

}  // namespace focalframe::fem
