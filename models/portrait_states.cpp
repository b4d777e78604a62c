#include "models/portrait_states.h"

#include <algorithm>
#include <cmath>
#include <set>

#include "loads/pose.h"
#include "models/row_winds.h"
#include "models/wind_load.h"

namespace focalframe::models {
namespace {

// First, middle and last of more than three poses.
std::set<double> thinned(const std::set<double>& poses, std::size_t most) {
  if (poses.size() <= most) return poses;
  if (most == 1) return {*std::next(poses.begin(), static_cast<long>(poses.size() / 2))};
  std::set<double> out;
  for (std::size_t i = 0; i < most; ++i)
    out.insert(*std::next(poses.begin(), static_cast<long>(i * (poses.size() - 1) / (most - 1))));
  return out;
}

}  // namespace

std::vector<PortraitRequest> looked_at(const TroughDesign& design, const loads::CoefficientTable& table,
                                       const RowModel& row, std::size_t many) {
  const RowWinds on_row(design, table);
  const StateWinds winds = winds_at_axis(design);
  const std::vector<State> asked = asked_states(design);
  std::vector<PortraitRequest> out;
  for (const StateKind kind : {StateKind::operate, StateKind::stow}) {
    const loads::WindAtHeight& wind = winds.of(kind);
    const bool tracking = kind == StateKind::operate;
    if (std::isnan(wind.mean_pressure)) continue;
    std::set<double> poses;
    for (const State& s : asked)
      if (s.kind == kind) poses.insert(s.elevation);
    if (row.collector().body.nodes.size() > many) poses = thinned(poses, tracking ? 3 : 1);
    const bool peak = table.kind == loads::CoefficientKind::peak;
    const double pressure = tracking || peak ? wind.mean_pressure : wind.gust_pressure;
    for (double elevation : poses) {
      const PoseModel pose = row.pose(elevation);
      const Eigen::VectorXd weight = weight_amplitudes(row, elevation);
      if (tracking) out.push_back({{kind, elevation, 0}, true, weight});
      for (const State& s : asked) {
        if (s.kind != kind || s.elevation != elevation) continue;
        const Spread spread = on_row.spreads(loads::pitch_seen_by_wind(elevation, s.wind_from)).front();
        const WindOnRow blow = on_row.at(elevation, s.wind_from, spread, 0, !tracking, pressure);
        Eigen::VectorXd both = weight + blow.pressure * wind_amplitudes(row, elevation, blow);
        add_twist_feedback(row, pose, blow, both);
        out.push_back({s, false, both});
      }
    }
  }
  return out;
}

std::size_t index_of(const std::vector<PortraitRequest>& requests, const State& state, bool calm) {
  for (std::size_t i = 0; i < requests.size(); ++i) {
    const State& s = requests[i].state;
    if (requests[i].calm == calm && s.kind == state.kind && s.elevation == state.elevation &&
        (calm || s.wind_from == state.wind_from))
      return i;
  }
  return 0;
}

}  // namespace focalframe::models
