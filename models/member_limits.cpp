#include "models/member_limits.h"

#include <algorithm>
#include <cmath>

#include "fem/section.h"
#include "models/first_crossing.h"

namespace focalframe::models {
namespace {

using Eigen::VectorXd;

// Speeds at which all members are looked at: each 1.5 times the one before (2.25 times the pressure).
constexpr double first_level = 8, level_ratio = 1.5;
constexpr double followed_from = 0.9;  // share of the limit

template <class Ends>
double stress(const fem::Section& section, const Ends& f) {
  const fem::Resultants near{-f[0], -f[1], -f[2], -f[3], -f[4], -f[5]},
      far{f[6], f[7], f[8], f[9], f[10], f[11]};
  return std::max(fem::von_mises_bound(section, near), fem::von_mises_bound(section, far));
}

const fem::Section& section_of(const fem::Frame& frame, const fem::Member& member) {
  return frame.sections[static_cast<std::size_t>(member.section)];
}

}  // namespace

MemberLimits::MemberLimits(const RowModel& row, const PoseModel& pose, const PoseWinds& winds,
                           double gathered, double on_yield)
    : row_(row), winds_(winds), gathered_(gathered), ends_(row.end_forces(pose, winds.basis())) {
  const fem::Frame& body = row.collector().body;
  for (const fem::Member& m : body.members)
    allowed_.push_back(body.materials[static_cast<std::size_t>(m.material)].yield * on_yield);
  for (std::size_t k = 0; k < row.collector().stands.size(); ++k) {
    const fem::Frame& frame = row.collector().stands[k].frame;
    stands_.push_back(row.evaluate_stand(static_cast<int>(k), pose, winds.basis()));
    stand_allowed_.push_back(frame.materials[static_cast<std::size_t>(frame.members[0].material)].yield *
                             on_yield);
  }
}

std::string MemberLimits::name(int part) const {
  const std::size_t p = static_cast<std::size_t>(part), members = allowed_.size();
  return p < members ? row_.collector().body.members[p].name
                     : row_.collector().stands[p - members].frame.members[0].name;
}

double MemberLimits::used(int part, const ActionFactors& f, const VectorXd& mix) const {
  const std::size_t p = static_cast<std::size_t>(part), members = allowed_.size();
  if (p < members) {
    const auto rows = ends_.middleRows<12>(12 * part);
    const Eigen::Matrix<double, 12, 1> ends = f.permanent * rows.col(0) + f.wind * (rows * mix);
    const fem::Frame& body = row_.collector().body;
    return stress(section_of(body, body.members[p]), ends) / allowed_[p];
  }
  const std::size_t k = p - members;
  const Stand& stand = row_.collector().stands[k];
  const Eigen::Matrix<double, 12, 1> ends =
      f.permanent * stands_[k].col(0) + f.wind * (stand.driven ? gathered_ : 1) * (stands_[k] * mix);
  return stress(section_of(stand.frame, stand.frame.members[0]), ends) / stand_allowed_[k];
}

// Appends everything that uses more than followed_from of its limit at this speed.
void MemberLimits::look(const Question& q, double speed, std::vector<Follow>& out) const {
  const fem::Frame& body = row_.collector().body;
  const int members = static_cast<int>(allowed_.size());
  for (std::size_t g = 0; g < q.gusts.size(); ++g) {
    const VectorXd mix = winds_.mix(q.gusts[g].wind, q.pressure(speed));
    const VectorXd wind = ends_ * mix;
    for (const ActionFactors& f : q.factors) {
      for (int m = 0; m < members; ++m) {
        const double allowed = allowed_[static_cast<std::size_t>(m)];
        if (!(allowed > 0)) continue;
        const Eigen::Matrix<double, 12, 1> ends =
            f.permanent * ends_.col(0).segment<12>(12 * m) + f.wind * wind.segment<12>(12 * m);
        const double share =
            stress(section_of(body, body.members[static_cast<std::size_t>(m)]), ends) / allowed;
        if (share > followed_from) out.push_back({m, static_cast<int>(g), f, share});
      }
      for (std::size_t k = 0; k < stands_.size(); ++k) {
        const int part = members + static_cast<int>(k);
        if (!(stand_allowed_[k] > 0)) continue;
        const double share = used(part, f, mix);
        if (share > followed_from) out.push_back({part, static_cast<int>(g), f, share});
      }
    }
  }
}

CriterionLimit MemberLimits::first(const Question& q) const {
  CriterionLimit best;
  std::vector<Follow> before;
  for (double level = 0;;) {
    std::vector<Follow> found;
    look(q, level, found);
    std::vector<Follow> follow = found;
    follow.insert(follow.end(), before.begin(), before.end());
    std::stable_sort(follow.begin(), follow.end(),
                     [](const Follow& a, const Follow& b) { return a.used > b.used; });
    for (const Follow& one : follow) {
      const GustWind& gust = q.gusts[static_cast<std::size_t>(one.gust)];
      const Margin margin = [&](double speed) {
        return 1 - used(one.part, one.factors, winds_.mix(gust.wind, q.pressure(speed)));
      };
      const double most = std::min(level, best.gust);
      if (std::isfinite(best.gust) && margin(most) > 1 - followed_from) continue;
      const int steps = std::max(4, static_cast<int>(std::ceil(most / 2.0)));
      const double speed = most > 0 ? first_crossing(margin, most, steps) : margin(0) < 0 ? 0 : no_limit;
      if (speed >= best.gust) continue;
      best.gust = speed;
      best.part = name(one.part);
      best.spread = gust.spread;
      best.gust_angle = gust.offset;
    }
    if (std::isfinite(best.gust) || level >= q.cap) return best;
    before = std::move(found);
    level = std::min(q.cap, level == 0 ? first_level : level * level_ratio);
  }
}

}  // namespace focalframe::models
