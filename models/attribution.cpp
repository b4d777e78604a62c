#include "models/attribution.h"

#include <stdexcept>

namespace focalframe::models {

Attribution attribute(const TroughIntercept& intercept, std::span<const double> weight,
                      std::span<const MissPart> parts) {
  if (parts.empty()) throw std::invalid_argument("a loss needs at least one part to blame");
  std::vector<double> all(parts[0].miss.size(), 0.0);
  for (const MissPart& part : parts) {
    if (part.miss.size() != all.size()) throw std::invalid_argument("parts of the miss differ in length");
    for (std::size_t i = 0; i < all.size(); ++i) all[i] += part.miss[i];
  }
  Attribution result;
  result.undeformed = intercept.mean(std::vector<double>(all.size(), 0.0), weight);
  result.intercept = intercept.mean(all, weight);
  result.loss = result.interaction = result.undeformed - result.intercept;
  std::vector<double> without(all.size());
  for (const MissPart& part : parts) {
    for (std::size_t i = 0; i < all.size(); ++i) without[i] = all[i] - part.miss[i];
    const double alone = result.undeformed - intercept.mean(part.miss, weight);
    result.parts.push_back({part.name, alone, intercept.mean(without, weight) - result.intercept});
    result.interaction -= alone;
  }
  return result;
}

}  // namespace focalframe::models
