#include "models/limit_map.h"

#include <algorithm>
#include <atomic>
#include <cmath>
#include <numbers>
#include <set>
#include <thread>

#include "fem/units.h"
#include "loads/pose.h"
#include "models/stow_search.h"

namespace focalframe::models {
namespace {

constexpr double pi = std::numbers::pi;

bool same(double a, double b) { return std::abs(a - b) < 1e-9; }

std::pair<double, double> turning_range(const TroughDesign& design) {
  const OperationInput& run = design.operation;
  const double within = std::isnan(run.stow_within) ? 0 : run.stow_within;
  const double from = std::isnan(design.drive.turns_from) ? std::fmin(run.track_from, run.stow_at - within)
                                                          : design.drive.turns_from;
  const double to = std::isnan(design.drive.turns_to) ? std::fmax(run.track_to, run.stow_at + within)
                                                      : design.drive.turns_to;
  return {from, to};
}

}  // namespace

std::vector<double> map_elevations(const TroughDesign& design) {
  const auto [from, to] = turning_range(design);
  double step = 5 * deg;
  for (const double finer : {2.5 * deg, 1 * deg, 0.5 * deg})
    if ((to - from) / step < 36) step = finer;
  std::vector<double> out;
  const auto add = [&](double e) {
    if (e >= from - 1e-9 && e <= to + 1e-9 &&
        std::none_of(out.begin(), out.end(), [&](double other) { return same(e, other); }))
      out.push_back(e);
  };
  const OperationInput& run = design.operation;
  const double within = std::isnan(run.stow_within) ? 0 : run.stow_within;
  // The states' own poses first, so that they stand in the map as they were asked for.
  for (const double e :
       {run.track_from, run.track_to, run.stow_at, run.stow_at - within, run.stow_at + within, from, to})
    if (!std::isnan(e)) add(e);
  for (int k = static_cast<int>(std::ceil(from / step)); k * step <= to; ++k) add(k * step);
  std::sort(out.begin(), out.end());
  return out;
}

const PoseLimit* find_pose(const std::vector<PoseLimit>& map, StateKind kind, double elevation,
                           double wind_from) {
  for (const PoseLimit& limit : map)
    if (limit.kind == kind && same(limit.elevation, elevation) && same(limit.wind_from, wind_from))
      return &limit;
  return nullptr;
}

double gust_from(const PoseLimit& side, double wind_from) {
  return side.gust() / std::sqrt(loads::yaw_factor(loads::yaw(wind_from)));
}

std::vector<PoseSolution> solve_poses(const PoseLimits& solver, const std::vector<PoseTask>& tasks,
                                      bool light) {
  std::vector<PoseSolution> out(tasks.size());
  std::atomic<std::size_t> next = 0;
  const auto work = [&] {
    for (std::size_t i = next++; i < tasks.size(); i = next++)
      out[i] = solver.solve(tasks[i].elevation, tasks[i].kinds, light);
  };
  const std::size_t count =
      std::min<std::size_t>(std::max(1U, std::thread::hardware_concurrency()), tasks.size());
  std::vector<std::jthread> threads;
  for (std::size_t i = 1; i < count; ++i) threads.emplace_back(work);
  work();
  return out;
}

StateLimit least_limit(const std::vector<PoseLimit>& map, StateKind kind, double from, double to,
                       bool safety_only) {
  StateLimit out;
  out.kind = kind;
  out.from = std::min(from, to);
  out.to = std::max(from, to);
  const auto each = [&](auto&& visit) {
    for (const PoseLimit& p : map) {
      if (p.kind != kind || p.elevation < out.from - 1e-9 || p.elevation > out.to + 1e-9) continue;
      visit(p);
    }
  };
  each([&](const PoseLimit& p) {
    out.covered = out.covered && p.covered;
    const CriterionLimit* c = p.governing(safety_only);
    if (!c) return;
    if (out.judged && c->gust >= out.gust) return;
    out.judged = true;
    out.gust = c->gust;
    out.governing = *c;
    out.at = {kind, p.elevation, p.wind_from};
  });
  each([&](const PoseLimit& p) {
    for (const CriterionLimit& c : p.criteria) {
      if (c.key == out.governing.key || (safety_only && is_optical(c.key)) || c.gust >= out.next.gust)
        continue;
      out.next = c;
      out.next_at = {kind, p.elevation, p.wind_from};
    }
  });
  return out;
}

WindLimits wind_limits(const RowModel& row, const TroughDesign& design, const loads::CoefficientTable& table,
                       const MapOptions& options) {
  const PoseLimits solver(row, design, table);
  const OperationInput& run = design.operation;
  WindLimits out;
  out.axis = solver.axis();
  out.elevations = options.elevations.empty() ? map_elevations(design) : options.elevations;
  std::tie(out.mapped_from, out.mapped_to) = turning_range(design);
  const double lowest = std::min(run.stow_at, run.track_from), highest = std::max(run.stow_at, run.track_to);
  std::vector<PoseTask> tasks;
  for (const double e : out.elevations) {
    PoseTask task{e, {}};
    if (e >= run.track_from - 1e-9 && e <= run.track_to + 1e-9) task.kinds.push_back(StateKind::operate);
    if (options.whole || (e >= lowest - 1e-9 && e <= highest + 1e-9))
      task.kinds.push_back(StateKind::turning);
    if (options.whole) task.kinds.insert(task.kinds.end(), {StateKind::stow, StateKind::stuck});
    if (!task.kinds.empty()) tasks.push_back(std::move(task));
  }
  out.drive_reversal = no_limit;
  for (PoseSolution& s : solve_poses(solver, tasks, options.light)) {
    out.map.insert(out.map.end(), s.limits.begin(), s.limits.end());
    out.light.insert(out.light.end(), s.light.begin(), s.light.end());
    out.drive_reversal = std::min(out.drive_reversal, s.reversal);
  }
  out.operate = least_limit(out.map, StateKind::operate, run.track_from, run.track_to, false);
  out.operate_safe = least_limit(out.map, StateKind::operate, run.track_from, run.track_to, true);
  if (options.whole)
    out.stuck = least_limit(out.map, StateKind::stuck, out.mapped_from, out.mapped_to, false);
  find_stow(solver, design, options.whole, out);
  const StateWinds winds = winds_at_axis(design);
  out.operate.asked = out.operate_safe.asked = winds.operate.gust_speed;
  out.turning.asked = winds.turning.gust_speed;
  out.stow.asked = winds.stow.gust_speed;
  out.stuck.asked = winds.stuck.gust_speed;
  if (options.whole) out.order = order_remarks(design, out);
  return out;
}

}  // namespace focalframe::models
