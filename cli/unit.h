#pragma once

/// Unit texts: "kN m", "N/mm2", "lbf in", "deg/s" -> factor to SI and dimension.

#include <array>
#include <optional>
#include <string>
#include <string_view>

namespace focalframe::cli {

/// Exponents of length, mass, time, temperature, angle. Angle counts, so that N m and N m/rad differ.
using Dimension = std::array<int, 5>;

struct Unit {
  double factor = 1;  ///< SI value of one unit
  double offset = 0;  ///< SI = factor * number + offset (degC, degF only)
  Dimension dimension{};
  bool operator==(const Unit&) const = default;
};

/// nullopt when some part is not a known unit. Accepts products by space, `*`, `·`, a `-` between
/// letters or nothing where that is unambiguous, one or more `/`, powers by `2`, `^2` or superscripts.
std::optional<Unit> parse_unit(std::string_view text);

/// The known single unit nearest to `text` in spelling; empty when none is near.
std::string nearest_unit(std::string_view text, const Dimension& wanted);

}  // namespace focalframe::cli
