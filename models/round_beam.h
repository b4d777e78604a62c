#pragma once

/// A round sun convolved with a round Gaussian: the beam of a point concentrator, and its share inside an
/// ellipse.

#include <vector>

#include "models/quadrature.h"
#include "models/sun.h"

namespace focalframe::models {

/// Tabulated once per sun and error; error of a share below 1e-5 while the Gaussian is wider than 0.5 mrad.
class RoundBeam {
 public:
  /// `sun` must not be Gaussian (that needs no table), `error_rms` > 0 [rad]; else std::invalid_argument.
  RoundBeam(const SunShape& sun, double error_rms);

  /// Light per solid angle at this angle from the beam's centre [1/rad^2]; its integral over the plane is 1.
  double density(double angle) const;

  /// Share of the light inside an ellipse with semi-axes along x and y; its centre seen from the beam's
  /// [rad].
  double inside_ellipse(double centre_x, double centre_y, double semi_x, double semi_y) const;

 private:
  double strip(double x, double y) const;  ///< light per x between 0 and y at this x [1/rad]

  double disc_ = 0, reach_ = 0;  ///< where most and where all of the light is [rad]
  double fine_ = 0, step_ = 0;   ///< of the two tables [rad]
  std::size_t side_ = 0;
  std::vector<double> density_;  ///< at k * fine_
  std::vector<double> strip_;    ///< at x = i * step_, y = j * step_, stored [i][j]
  Quadrature rule_;
};

}  // namespace focalframe::models
