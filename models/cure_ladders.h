#pragma once

/// Sizes to climb when a part is too weak or too soft: for every part that a missed limit points at, the
/// sizes a workshop would try, smallest first, up to the end of the catalogue.

#include <functional>
#include <string>
#include <vector>

#include "models/assessment.h"
#include "models/design.h"

namespace focalframe::models {

struct Rung {
  std::string text;  ///< "tube 168.3 x 4.0 mm"
  std::function<void(TroughDesign&)> apply;
};

struct Ladder {
  std::string part;
  std::vector<std::string> keys;  ///< limits (beginnings of their keys) this part's size is made for
  std::vector<Rung> rungs;        ///< the first few are tried anyhow, the others only while a limit is missed
};

/// Upwards to a rating a catalogue would round to: 1, 1.2, 1.5, 2, 2.5, 3, 4, 5, 6, 8 times a power of ten.
double next_rating(double needed);

/// True when `key` begins with one of the ladder's.
bool aims_at(const Ladder& ladder, const std::string& key);

/// Ladders of the parts that the missed limits point at. Sizes that do not fit the design are left out.
std::vector<Ladder> size_ladders(const TroughDesign& design, const Assessment& assessment);

}  // namespace focalframe::models
