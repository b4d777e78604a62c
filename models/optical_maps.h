#pragma once

/// Maps of one state: over the aperture what the mirror does to the light, over the receiver where it lands.

#include <Eigen/Core>
#include <vector>

#include "models/optics_check.h"

namespace focalframe::models {

/// Over the aperture: matrices have one row per entry of `y` and one column per entry of `x`, the samples of
/// the check. x counts from the row's first end and jumps over the gaps between modules.
struct ApertureMaps {
  std::vector<double> x, y;     ///< along the row, across the aperture [m]
  std::vector<int> module;      ///< of every x, counted from 0
  Eigen::MatrixXd slope;        ///< transverse slope error at fixed y, panels included [rad]
  Eigen::MatrixXd slope_along;  ///< longitudinal slope error [rad]
  Eigen::MatrixXd miss;         ///< of the central ray, the collector aimed as the check aims it [m]
  Eigen::MatrixXd intercept;    ///< local share of the light caught [-]
};

/// Light over the receiver, mean over the row. Tube: `place` is the angle about its axis [rad], 0 faces the
/// mirror's vertex, positive towards +y, -pi .. pi, bins of equal width. Strip: `place` is y [m]. `flux`:
/// light per receiver area over the direct light on the aperture [-] (suns); its sum over bins times the
/// bin's width on the receiver is the intercept times the aperture width.
struct ReceiverMap {
  LineReceiver target = LineReceiver::tube;
  std::vector<double> place;  ///< middles of the bins
  double bin = not_given;     ///< width of a bin on the receiver [m]
  std::vector<double> flux;   ///< mean of the row [suns]
  std::vector<double> worst;  ///< of the module that catches least [suns]
  double peak() const;
};

ApertureMaps aperture_maps(const OpticsCheck& check, const OpticalMotion& motion);

/// Throws std::invalid_argument unless bins > 0. The glass around a tube is not in it.
ReceiverMap receiver_map(const OpticsCheck& check, const OpticalMotion& motion, int bins = 72);

}  // namespace focalframe::models
