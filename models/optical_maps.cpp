#include "models/optical_maps.h"

#include <algorithm>
#include <cmath>
#include <numbers>
#include <stdexcept>

namespace focalframe::models {
namespace {

using Eigen::MatrixXd;

// Share of the light of one mirror point that lands in every bin, for the miss m of its central ray.
class Landing {
 public:
  Landing(const OpticsCheck& check, int bins) : check_(check), bins_(bins) {
    for (double y : check.row().collector().skin.row_y) {
      const double phi = check.parabola().ray_angle(y);
      spread_.emplace_back(check.beam().sun, 1 / std::cos(check.beam().incidence),
                           error_rms(check.beam(), phi));
    }
  }

  void add(int row, double miss, double weight, std::vector<double>& light) const {
    check_.target() == LineReceiver::tube ? on_tube(row, miss, weight, light)
                                          : on_strip(row, miss, weight, light);
  }

 private:
  double y_of(int row) const { return check_.row().collector().skin.row_y[static_cast<std::size_t>(row)]; }

  // The share of rays that pass the receiver's middle at less than h.
  double below(int row, double h, double miss) const {
    const double r = check_.parabola().local_focal_distance(y_of(row));
    return spread_[static_cast<std::size_t>(row)].cumulative((h - miss) / r);
  }

  // A ray that comes from the mirror at the angle phi and passes at h = R sin(b) meets the tube at the place
  // phi + b: facing direction (sin phi, -cos phi) turned by b towards (cos phi, sin phi).
  void on_tube(int row, double miss, double weight, std::vector<double>& light) const {
    const double phi = check_.parabola().ray_angle(y_of(row)), R = check_.target_half_width();
    const double width = 2 * std::numbers::pi / bins_;
    for (int k = 0; k < bins_; ++k) {
      const double from = -std::numbers::pi + k * width - phi;
      // The bin's ends as angles from the point that faces the mirror point, brought near to 0.
      const double turn = 2 * std::numbers::pi * std::round((from + width / 2) / (2 * std::numbers::pi));
      const double a = std::clamp(from - turn, -std::numbers::pi / 2, std::numbers::pi / 2);
      const double b = std::clamp(from - turn + width, -std::numbers::pi / 2, std::numbers::pi / 2);
      if (b > a)
        light[static_cast<std::size_t>(k)] +=
            weight * (below(row, R * std::sin(b), miss) - below(row, R * std::sin(a), miss));
    }
  }

  void on_strip(int row, double miss, double weight, std::vector<double>& light) const {
    const double seen = std::cos(check_.parabola().ray_angle(y_of(row)));
    if (!(seen > 0)) return;  // nothing arrives from behind
    const double half = check_.target_half_width(), width = 2 * half / bins_;
    for (int k = 0; k < bins_; ++k) {
      const double a = -half + k * width;
      light[static_cast<std::size_t>(k)] +=
          weight * (below(row, (a + width) * seen, miss) - below(row, a * seen, miss));
    }
  }

  const OpticsCheck& check_;
  int bins_;
  std::vector<BeamSpread> spread_;
};

}  // namespace

double ReceiverMap::peak() const {
  return flux.empty() ? not_given : *std::max_element(flux.begin(), flux.end());
}

ApertureMaps aperture_maps(const OpticsCheck& check, const OpticalMotion& motion) {
  const Skin& skin = check.row().collector().skin;
  ApertureMaps maps;
  maps.x = skin.station_x;
  maps.y = skin.row_y;
  for (std::size_t st = 0; st < maps.x.size(); ++st)
    maps.module.push_back(skin.module_of_station(static_cast<int>(st)));
  maps.slope = check.sections()
                   .fit(motion.v + motion.panel_v, motion.w + motion.panel_w, motion.turn + motion.panel_turn)
                   .slope_before;
  maps.slope_along = motion.along + motion.panel_along;
  maps.miss = check.miss(motion, check.correction(check.readings(motion)));
  maps.intercept.resize(maps.miss.rows(), maps.miss.cols());
  for (Eigen::Index st = 0; st < maps.miss.cols(); ++st)
    for (Eigen::Index r = 0; r < maps.miss.rows(); ++r)
      maps.intercept(r, st) = check.intercept().at(static_cast<int>(r), maps.miss(r, st));
  return maps;
}

ReceiverMap receiver_map(const OpticsCheck& check, const OpticalMotion& motion, int bins) {
  if (bins < 1) throw std::invalid_argument("a map of the receiver needs at least one bin");
  const Skin& skin = check.row().collector().skin;
  const MatrixXd miss = check.miss(motion, check.correction(check.readings(motion)));
  const Landing landing(check, bins);
  int worst = 0;
  for (int i = 1; i < skin.modules; ++i)
    if (check.caught(miss, i) < check.caught(miss, worst)) worst = i;
  ReceiverMap map;
  map.target = check.target();
  map.flux.assign(static_cast<std::size_t>(bins), 0.0);
  map.worst = map.flux;
  double area = 0, worst_area = 0;
  for (int st = 0; st < static_cast<int>(miss.cols()); ++st)
    for (int r = 0; r < skin.rows; ++r) {
      const double weight = check.weight()[static_cast<std::size_t>(skin.sample(st, r))];
      area += weight;
      landing.add(r, miss(r, st), weight, map.flux);
      if (skin.module_of_station(st) != worst) continue;
      worst_area += weight;
      landing.add(r, miss(r, st), weight, map.worst);
    }
  const bool tube = map.target == LineReceiver::tube;
  const double half = check.target_half_width(), full = tube ? 2 * std::numbers::pi : 2 * half;
  map.bin = tube ? half * full / bins : full / bins;
  for (int k = 0; k < bins; ++k) {
    map.place.push_back(-full / 2 + (k + 0.5) * full / bins);
    map.flux[static_cast<std::size_t>(k)] *= check.parabola().width / (area * map.bin);
    map.worst[static_cast<std::size_t>(k)] *= check.parabola().width / (worst_area * map.bin);
  }
  return map;
}

}  // namespace focalframe::models
