#pragma once

/// From the words of a profile to a cross-section.

#include "fem/frame.h"
#include "models/design.h"

namespace focalframe::models {

/// Section of a profile. Unturned, its z axis is the `depth` direction; an angle's section is in principal
/// axes, see profile_roll. Throws std::invalid_argument for an unknown shape or impossible sizes (the
/// design's validation reports those with their place first).
fem::Section section_of(const ProfileInput& profile);

/// Angle about the member's x from the direction the depth should stand in to the section's z axis: `turned`
/// and the tilt of an angle's principal axes [rad].
double profile_roll(const ProfileInput& profile);

/// Reference vector for a member along `axis` whose profile's depth stands along `up` but for its roll.
fem::Vec3 rolled_up(const ProfileInput& profile, const fem::Vec3& axis, const fem::Vec3& up);

/// Overall size of the profile along its depth direction [m].
double profile_depth(const ProfileInput& profile);

/// Centroid above the profile's underside along its depth [m] (an angle lies on the heel of its upright leg).
double profile_seat(const ProfileInput& profile);

/// Greatest thickness of its metal, for the yield stress [m]; for raw properties the stated one or NaN.
double profile_thickness(const ProfileInput& profile);

/// True for open sections whose shear centre does not lie at the centroid.
bool is_lopsided(const ProfileInput& profile);

/// Sizes only: "139.7 x 4.0 mm"
std::string sizes_text(const ProfileInput& profile);

}  // namespace focalframe::models
