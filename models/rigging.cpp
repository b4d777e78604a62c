#include "models/rigging.h"

#include <algorithm>
#include <cmath>

#include "fem/units.h"
#include "models/set_true.h"
#include "models/wind_load.h"

namespace focalframe::models {
namespace {

OpticalMotion weighed(const OpticsCheck& check, double elevation) {
  return check.motions(check.row().pose(elevation), weight_amplitudes(check.row(), elevation), false).front();
}

RiggingChoice judge(const OpticsCheck& check, const std::vector<OpticalMotion>& poses, double set_true) {
  RiggingChoice choice;
  choice.set_true = set_true;
  choice.mean = 0;
  const bool unloaded = std::isnan(set_true);
  const OpticalMotion set = unloaded ? OpticalMotion{} : weighed(check, set_true);
  for (const OpticalMotion& pose : poses) {
    const OpticalMotion m = unloaded ? pose : against(pose, set);
    const double caught = check.caught(check.miss(m, check.correction(check.readings(m))));
    choice.least = std::fmin(choice.least, caught);
    choice.mean += caught / static_cast<double>(poses.size());
  }
  return choice;
}

}  // namespace

Rigging best_rigging(const OpticsCheck& check, const std::vector<double>& poses, double set_true_now) {
  Rigging out;
  if (poses.empty()) return out;
  std::vector<OpticalMotion> motions;
  for (double elevation : poses) motions.push_back(weighed(check, elevation));
  out.now = judge(check, motions, set_true_now);
  if (!std::isnan(set_true_now)) out.best = out.now;
  const auto [low, high] = std::minmax_element(poses.begin(), poses.end());
  const auto better = [](const RiggingChoice& a, const RiggingChoice& b) { return a.least > b.least + 1e-9; };
  const auto try_at = [&](double angle) {
    const RiggingChoice choice = judge(check, motions, angle);
    if (std::isnan(out.best.least) || better(choice, out.best)) out.best = choice;
    return choice;
  };
  const int steps = std::max(1, static_cast<int>(std::lround((*high - *low) / (15 * deg))));
  for (int i = 0; i <= steps; ++i) out.tried.push_back(try_at(*low + (*high - *low) * i / steps));
  for (const double step : {5 * deg, 1 * deg}) {
    const double middle = out.best.set_true;
    for (int i = -4; i <= 4; ++i)
      if (i != 0) try_at(std::clamp(middle + i * step, *low, *high));
  }
  return out;
}

}  // namespace focalframe::models
