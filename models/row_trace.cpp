#include "models/row_trace.h"

#include <algorithm>
#include <cmath>

namespace focalframe::models {
namespace {

using Eigen::MatrixXd;

// Stations of the bay a point of the running mirror length lies in, and the weights of the polynomial through
// them.
struct Along {
  Eigen::Index first = 0;
  Eigen::VectorXd share;
};

Along along_at(const Skin& skin, double x) {
  const int bays = skin.bays() * skin.modules;
  const int bay = std::clamp(static_cast<int>(x / skin.bay), 0, bays - 1);
  const double g = x / skin.bay - bay;
  const auto& at = skin.bay_share;
  Along out{bay * skin.stations_per_bay, Eigen::VectorXd::Ones(skin.stations_per_bay)};
  for (std::size_t i = 0; i < at.size(); ++i)
    for (std::size_t k = 0; k < at.size(); ++k)
      if (k != i) out.share[static_cast<Eigen::Index>(i)] *= (g - at[k]) / (at[i] - at[k]);
  return out;
}

// The four rows nearest to y and the weights of the cubic through them.
struct Across {
  Eigen::Index first = 0;
  Eigen::Vector4d share;
};

Across row_at(const std::vector<double>& rows, double y) {
  const auto after = std::upper_bound(rows.begin() + 1, rows.end() - 1, y) - rows.begin();
  const auto last = static_cast<std::ptrdiff_t>(rows.size()) - 4;
  Across at{std::clamp<Eigen::Index>(after - 2, 0, last), Eigen::Vector4d::Ones()};
  for (Eigen::Index i = 0; i < 4; ++i)
    for (Eigen::Index k = 0; k < 4; ++k) {
      const double yi = rows[static_cast<std::size_t>(at.first + i)],
                   yk = rows[static_cast<std::size_t>(at.first + k)];
      if (k != i) at.share[i] *= (y - yk) / (yi - yk);
    }
  return at;
}

double between(const MatrixXd& m, const Along& along, const Across& across) {
  return across.share.dot(m.block(across.first, along.first, 4, along.share.size()) * along.share);
}

}  // namespace

RowTrace trace_row(const OpticsCheck& check, const OpticalMotion& motion, std::int64_t rays,
                   std::uint64_t seed) {
  const Skin& skin = check.row().collector().skin;
  const MatrixXd v = motion.v + motion.panel_v, w = motion.w + motion.panel_w,
                 turn = motion.turn + motion.panel_turn, along = motion.along + motion.panel_along;
  const double back = check.correction(check.readings(motion));
  TracedTrough trough;
  trough.parabola = check.parabola();
  trough.receiver_radius = check.target_half_width();
  trough.kind = check.target();
  trough.error = check.beam();
  trough.aim = back;
  trough.x_from = 0;
  trough.x_to = skin.bay * skin.bays() * skin.modules;
  trough.skin = [&](double x, double y) {
    const Along st = along_at(skin, x);
    const Across r = row_at(skin.row_y, y);
    const double slope = check.parabola().slope_angle(y), tilt = between(along, st, r);
    SkinMotion m;
    m.displacement = {0, between(v, st, r), between(w, st, r)};
    // A turn along the row is about the mirror's own line across, not about y.
    m.rotation = {between(turn, st, r), tilt * std::cos(slope), tilt * std::sin(slope)};
    return m;
  };
  trough.receiver = [&](double x) {
    const Along st = along_at(skin, x);
    const Eigen::Vector2d at = motion.receiver.middleCols(st.first, st.share.size()) * st.share;
    return Eigen::Vector3d(0, at[0], at[1]);
  };
  RowTrace out;
  out.traced = trace_rays(trough, rays, seed);
  const MatrixXd miss = check.miss(motion, back);
  out.analytic = check.caught(miss);
  const double reach = 3.29 * std::max(out.traced.standard_error, 0.5 / static_cast<double>(rays));
  out.low = out.traced.intercept - reach;
  out.high = out.traced.intercept + reach;
  out.allowance = std::max(std::abs(check.caught(1.005 * miss) - out.analytic),
                           std::abs(check.caught(0.995 * miss) - out.analytic));
  out.agrees = out.analytic > out.low - out.allowance && out.analytic < out.high + out.allowance;
  return out;
}

}  // namespace focalframe::models
