#pragma once

/// What each part of a deformation costs in light: alone, together, and if it were mended.

#include <limits>
#include <span>
#include <string>
#include <vector>

#include "models/intercept.h"

namespace focalframe::models {

/// One cause's share of the miss of every sample [m]; shares add up to the miss.
struct MissPart {
  std::string name;
  std::vector<double> miss;
};

struct PartLoss {
  std::string name;
  double alone = std::numeric_limits<double>::quiet_NaN();   ///< intercept lost if it were the only one [-]
  double mended = std::numeric_limits<double>::quiet_NaN();  ///< intercept won by removing only this one [-]
};

struct Attribution {
  double undeformed =
      std::numeric_limits<double>::quiet_NaN();  ///< intercept at the same samples, no miss [-]
  double intercept = std::numeric_limits<double>::quiet_NaN();  ///< with all parts together [-]
  double loss = std::numeric_limits<double>::quiet_NaN();       ///< undeformed - intercept [-]
  std::vector<PartLoss> parts;
  double interaction =
      std::numeric_limits<double>::quiet_NaN();  ///< loss - sum of the losses alone [-]; negative
                                                 ///< where parts make up for each other
};

/// `weight` as in TroughIntercept::mean. Throws std::invalid_argument when parts differ in length or there
/// are none.
Attribution attribute(const TroughIntercept& intercept, std::span<const double> weight,
                      std::span<const MissPart> parts);

}  // namespace focalframe::models
