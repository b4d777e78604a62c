#include "models/row_modes.h"

#include <cmath>
#include <numbers>
#include <optional>

#include "fem/near_mechanism.h"
#include "fem/shape_parts.h"
#include "fem/units.h"
#include "models/full_frame.h"
#include "models/inside_proof.h"
#include "models/posed_row.h"
#include "models/states.h"
#include "models/trough.h"

namespace focalframe::models {
namespace {

// Buckling factors beyond this are of no interest: nothing is near its stability limit.
constexpr double greatest_factor = 1000;

std::string words_of(const fem::Frame& frame, const Eigen::MatrixXd& shape) {
  return fem::shape_words(frame, fem::shape_parts(frame, shape),
                          {"along the row", "across the row", "up and down"});
}

}  // namespace

RowStability row_stability(const TroughDesign& design, const loads::CoefficientTable& table, double elevation,
                           int count, int factors, bool divide) {
  fem::InsideLimits limits = collector_limits;
  if (!divide) limits.most_pieces = 1;
  const RowModel row(build_trough(design), {});
  const FullFrame full = full_frame(row.collector(), elevation);
  RowStability out;
  out.elevation = elevation;
  out.freedoms = full.frame.freedoms();
  const fem::InsideModes inside =
      count > 0 ? fem::modes_inside(full.frame, count, limits) : fem::InsideModes{};
  for (const fem::Mode& mode : inside.modes)
    out.modes.push_back({mode.frequency, mode.residual, words_of(inside.divided.frame, mode.shape)});
  out.modes_proof = proof_of(inside);

  const StateWinds winds = winds_at_axis(design);
  if (!design.wind.stow.given) return out;
  for (double from : {0.0, std::numbers::pi}) {
    auto load = wind_case(row, full, table, design, elevation, from, true, winds.stow.gust_pressure);
    if (!load) continue;
    load->gravity = {0, 0, -standard_gravity};
    std::vector<RowBuckling> found;
    const fem::InsideBuckling bows =
        fem::buckling_inside(full.frame, *load, factors, greatest_factor, limits);
    for (const fem::BucklingMode& mode : bows.modes)
      found.push_back({mode.factor, mode.residual, words_of(bows.divided.frame, mode.shape)});
    const bool worse = !found.empty() && (out.buckling.empty() || found[0].factor < out.buckling[0].factor);
    if (worse || out.load.empty()) {
      out.load = "weight and the STOW gust from the " + std::string(from == 0 ? "+Y" : "-Y") + " side";
      if (worse) out.buckling = found, out.buckling_proof = proof_of(bows);
    }
  }
  return out;
}

namespace {

std::optional<Violation> buckling_remark(const TroughDesign& design, const loads::CoefficientTable& table) {
  if (!std::isfinite(design.operation.stow_at) || !design.wind.stow.given) return std::nullopt;
  const RowStability s = row_stability(design, table, design.operation.stow_at, 0, 1, false);
  if (s.buckling.empty() || s.buckling[0].factor >= 10) return std::nullopt;
  const double factor = s.buckling[0].factor;
  Violation v;
  v.level = Violation::Level::warn;
  v.element = "ribs";
  v.head = "buckling in the stow pose";
  v.text =
      "Linear buckling at " + number_text(factor) + " times " + s.load + " (" + s.buckling[0].moves + "). ";
  v.text += factor <= 1 ? "No criterion of this check judges that: it would buckle under the load itself."
                        : "Second-order effects enlarge deflections by about " +
                              number_text(std::round(100 / (factor - 1))) +
                              " %; no criterion of this check has them.";
  v.advice = "Tie what bows (purlins, thicker or shorter ribs), then: focalframe modes";
  return v;
}

}  // namespace

std::vector<Violation> frame_remarks(const TroughDesign& design, const loads::CoefficientTable& table) {
  std::vector<Violation> remarks;
  const FullFrame full = full_frame(build_trough(design), std::numbers::pi / 2);
  if (const auto near = fem::near_mechanism(full.frame)) {
    Violation v;
    v.level = Violation::Level::warn;
    v.element = "row";
    v.head = "nearly a mechanism";
    v.text = near->what();
    remarks.push_back(v);
  }
  if (const auto buckles = buckling_remark(design, table)) remarks.push_back(*buckles);
  return remarks;
}

}  // namespace focalframe::models
