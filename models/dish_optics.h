#pragma once

/// From the motion of a dish's mirror points to the share of light its receiver catches.
///
/// Collector axes: vertex at the origin, z along the optical axis, focus at (0, 0, f). At a mirror point
/// `radial` is across the reflected ray in the meridian plane (outwards at the vertex), `tangential` is in
/// the sense of growing azimuth about +z. First order in the motion; error about 0.4 % of the miss at 5 mrad.

#include <Eigen/Core>
#include <optional>
#include <span>

#include "models/intercept.h"
#include "models/parabola.h"
#include "models/round_beam.h"
#include "models/sun.h"

namespace focalframe::models {

/// Where the central reflected ray passes the receiver's centre, across the ray, and how far the receiver has
/// receded from the mirror point along the optical axis (this widens the beam there) [m].
struct DishMiss {
  double radial = 0, tangential = 0, rise = 0;
};

/// Motion of mirror point, receiver and light in collector axes.
struct DishMotion {
  Eigen::Vector3d displacement = Eigen::Vector3d::Zero();  ///< of the mirror point [m]
  Eigen::Vector3d rotation = Eigen::Vector3d::Zero();      ///< of the mirror there, rotation vector [rad]
  Eigen::Vector3d receiver = Eigen::Vector3d::Zero();      ///< displacement of the receiver's centre [m]
  Eigen::Vector3d aim = Eigen::Vector3d::Zero();  ///< rotation of the light relative to the collector [rad]
};

/// At the mirror point whose undeformed place is (x, y).
DishMiss dish_miss(const Parabola& parabola, double x, double y, const DishMotion& motion);

/// Share of a Gaussian spot inside a circle about the origin: centre of the spot (x, y) and its rms widths
/// along the same axes [m]. Error below 1e-8 for spots no more than 5 times as long as wide.
double spot_inside_circle(double radius, double x, double y, double rms_x, double rms_y);

enum class PointReceiver {
  flat,    ///< circular aperture in the focal plane; nothing arrives from behind
  sphere,  ///< shows the same circle to every ray
};

/// The slope error is the 1-D rms of the mirror's normal in each of two directions; the beam it makes is
/// 2 x slope radially and 2 x slope x cos(psi/2) tangentially. `incidence` and `longitudinal_slope_rms` of
/// the error are those of a trough and must be 0. A sun that is not Gaussian needs some other error besides;
/// it is convolved to 1e-5 while these exceed 0.5 mrad.
class DishIntercept {
 public:
  DishIntercept(const Parabola& parabola, double receiver_radius, const BeamError& error,
                PointReceiver kind = PointReceiver::flat);

  /// Share caught of the light from mirror points at this distance from the axis [m].
  double at(double rho, const DishMiss& miss) const;

  /// Weighted mean over samples; all spans of one length. `weight`: area projected on the aperture.
  double mean(std::span<const double> rho, std::span<const DishMiss> miss,
              std::span<const double> weight) const;

  /// Intercept of the perfect dish between an inner radius and the rim.
  double undeformed(double inner_radius = 0) const;

 private:
  Parabola parabola_;
  double radius_;
  BeamError error_;
  PointReceiver kind_;
  double round_rms_ = 0;  ///< the part of the spread that is the same everywhere and in all directions
  std::optional<RoundBeam> beam_;  ///< sun and round part; empty for a Gaussian sun
};

/// Perfect dish and sphere receiver under a round Gaussian beam: closed form [-].
double sphere_intercept(const Parabola& parabola, double receiver_radius, double beam_rms);

/// The same for a dish so shallow that all its points are a focal length away [-]; overstates real dishes.
double paraxial_intercept(double focal_length, double receiver_radius, double beam_rms);

}  // namespace focalframe::models
