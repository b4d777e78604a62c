#pragma once

/// Factors into SI. Inside the program every number is SI (m, kg, s, N, Pa, rad, K): write `60.3 * mm` on the
/// way in and `x / mm` on the way out, and nowhere else.

#include <numbers>

namespace focalframe {

inline constexpr double mm = 1e-3, cm = 1e-2;
inline constexpr double kN = 1e3, MN = 1e6;
inline constexpr double kPa = 1e3, MPa = 1e6, GPa = 1e9;
inline constexpr double mrad = 1e-3, deg = std::numbers::pi / 180.0;

/// Standard gravity [m/s^2], exact by definition (3rd CGPM, 1901).
inline constexpr double standard_gravity = 9.80665;

}  // namespace focalframe
