#include "models/stow_search.h"

#include <algorithm>
#include <cmath>
#include <cstdio>
#include <numbers>

#include "fem/units.h"

namespace focalframe::models {
namespace {

constexpr double turn = 2 * std::numbers::pi;

double tolerance_of(const TroughDesign& design) {
  return std::isnan(design.operation.stow_within) ? 0 : design.operation.stow_within;
}

Way way_to(const std::vector<PoseLimit>& map, const TroughDesign& design, double from, double stow) {
  Way way;
  way.from = from;
  way.to = stow;
  way.time = std::abs(stow - from) / design.operation.turning_rate;
  way.limit = least_limit(map, StateKind::turning, from, stow, true);
  return way;
}

// The controller knows one way: the way from the end of tracking that is farther off passes all the others.
Way worst_way(const std::vector<PoseLimit>& map, const TroughDesign& design, double stow) {
  const OperationInput& run = design.operation;
  const Way one = way_to(map, design, run.track_from, stow), other = way_to(map, design, run.track_to, stow);
  const bool first = std::abs(run.track_from - stow) > std::abs(run.track_to - stow);
  Way way = first ? one : other;
  // With the stow pose inside the tracking range neither way contains the other.
  const Way& rest = first ? other : one;
  if (rest.limit.gust < way.limit.gust) way.limit = rest.limit;
  return way;
}

class Search {
 public:
  Search(const PoseLimits& solver, const TroughDesign& design, WindLimits& out)
      : solver_(solver), design_(design), out_(out), within_(tolerance_of(design)) {}

  // Parked limits of these poses, computing what the map lacks.
  std::vector<StowPose> park(const std::vector<double>& poses) {
    std::vector<PoseTask> missing;
    for (const double pose : poses)
      for (const double e : {pose - within_, pose, pose + within_}) {
        const bool asked = std::any_of(missing.begin(), missing.end(),
                                       [&](const PoseTask& t) { return std::abs(t.elevation - e) < 1e-9; });
        if (!asked && !find_pose(parked_, StateKind::stow, e, 0) &&
            !find_pose(out_.map, StateKind::stow, e, 0))
          missing.push_back({e, {StateKind::stow}});
      }
    for (const PoseSolution& s : solve_poses(solver_, missing))
      parked_.insert(parked_.end(), s.limits.begin(), s.limits.end());
    std::vector<StowPose> out;
    for (const double pose : poses) {
      std::vector<PoseLimit> three;
      for (const double e : {pose - within_, pose, pose + within_})
        for (const double from : {0.0, std::numbers::pi}) {
          const PoseLimit* p = find_pose(out_.map, StateKind::stow, e, from);
          if (!p) p = find_pose(parked_, StateKind::stow, e, from);
          three.push_back(*p);
        }
      StowPose stow;
      stow.elevation = pose;
      stow.parked = least_limit(three, StateKind::stow, pose - within_, pose + within_, true);
      stow.way = worst_way(out_.map, design_, pose);
      out.push_back(stow);
    }
    return out;
  }

  StowPose best() {
    std::vector<double> poses;
    for (const double e : out_.elevations)
      if (e - within_ >= out_.mapped_from - 1e-9 && e + within_ <= out_.mapped_to + 1e-9) poses.push_back(e);
    StowPose best = choose(park(poses), out_.chosen);
    std::vector<double> near;
    for (int k = -4; k <= 4; ++k) {
      const double e = best.elevation + k * deg;
      if (k != 0 && e - within_ >= out_.mapped_from - 1e-9 && e + within_ <= out_.mapped_to + 1e-9)
        near.push_back(e);
    }
    return choose(park(near), best);
  }

 private:
  StowPose choose(const std::vector<StowPose>& among, StowPose best) const {
    for (const StowPose& pose : among) {
      if (!pose.parked.judged || !pose.parked.covered || !pose.way.limit.covered) continue;
      if (pose.way.limit.gust < 0.999 * out_.chosen.way.limit.gust) continue;
      const bool nearer = pose.way.time < best.way.time;
      if (pose.parked.gust > best.parked.gust * (nearer ? 1.0001 : 1.01)) best = pose;
    }
    return best;
  }

  const PoseLimits& solver_;
  const TroughDesign& design_;
  WindLimits& out_;
  double within_;
  std::vector<PoseLimit> parked_;  // poses beside the map's
};

std::string text(const char* format, double a, double b = 0, double c = 0, double d = 0) {
  char out[400];
  std::snprintf(out, sizeof out, format, a, b, c, d);
  return out;
}

}  // namespace

void find_stow(const PoseLimits& solver, const TroughDesign& design, bool search, WindLimits& out) {
  const OperationInput& run = design.operation;
  for (const double from : {run.track_from, run.track_to})
    out.ways.push_back(way_to(out.map, design, from, run.stow_at));
  out.turning = worst_way(out.map, design, run.stow_at).limit;
  if (!search) return;
  // Round the other way: the same attitude one turn further, where the drive reaches it.
  for (const double other : {run.stow_at - turn, run.stow_at + turn})
    if (other >= out.mapped_from - 1e-9 && other <= out.mapped_to + 1e-9)
      for (const double from : {run.track_from, run.track_to})
        out.ways.push_back(way_to(out.map, design, from, other));
  Search seek(solver, design, out);
  out.chosen = seek.park({run.stow_at}).front();
  out.stow = out.chosen.parked;
  out.best = seek.best();
}

std::vector<std::string> order_remarks(const TroughDesign& design, const WindLimits& w) {
  (void)design;
  std::vector<std::string> out;
  const auto at = [](const StateLimit& s) { return std::round(s.at.elevation / deg) + 0.0; };
  if (w.stow.gust < w.turning.gust) {
    out.push_back(
        text("Parked at %.0f deg it bears less (%.1f m/s) than on its way there (%.1f m/s, weakest at "
             "%.0f deg): stowing does not protect it.",
             w.chosen.elevation / deg, w.stow.gust, w.turning.gust, at(w.turning)));
    if (w.best.parked.gust > 1.02 * w.stow.gust)
      out.back() +=
          text(" Parked at %.0f deg it would bear %.1f m/s.", w.best.elevation / deg, w.best.parked.gust);
  }
  const double tracking = w.operate_safe.gust;
  if (w.turning.gust < 0.95 * tracking)
    out.push_back(
        text("On its way to stow it bears less (%.1f m/s, weakest at %.0f deg) than anywhere while it "
             "tracks (%.1f m/s): the way there, not the work, sets the trigger.",
             w.turning.gust, at(w.turning), tracking));
  if (w.stuck.gust < w.turning.gust)
    out.push_back(
        text("Should it fail to move at %.0f deg, it bears %.1f m/s, less than the %.1f m/s up to which "
             "it may be turning: a failed drive then means damage within the same storm.",
             at(w.stuck), w.stuck.gust, w.turning.gust));
  if (w.stow.asked < w.turning.asked)
    out.push_back(text("The design asks for less when parked (gust %.1f m/s) than when turning (%.1f m/s).",
                       w.stow.asked, w.turning.asked));
  if (w.stuck.asked > w.stow.asked)
    out.push_back(text("The design asks for more when stuck (gust %.1f m/s) than when parked (%.1f m/s).",
                       w.stuck.asked, w.stow.asked));
  if (w.stuck.asked < w.turning.asked)
    out.push_back(
        text("The design asks for less when stuck (gust %.1f m/s) than when turning (%.1f m/s): a row "
             "that stops on its way meets the turning wind at least.",
             w.stuck.asked, w.turning.asked));
  return out;
}

}  // namespace focalframe::models
