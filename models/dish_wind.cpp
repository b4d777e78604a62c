#include "models/dish_wind.h"

#include <Eigen/Geometry>
#include <Eigen/LU>
#include <cmath>

#include "fem/units.h"

namespace focalframe::models {
namespace {

using Eigen::Vector3d;
using Eigen::VectorXd;
using C = DishColumns;

// Downwind direction in the aperture plane, and the axis a positive moment turns about (towards larger
// pitch).
struct WindAxes {
  Vector3d side, moment;
};

WindAxes axes_of(const DishPose& pose, const Vector3d& upwind) {
  const Vector3d w = pose.collector_from_yoke() * upwind;
  Vector3d side = Vector3d(-w.x(), -w.y(), 0);
  // Face-on and back-on any direction will do: side force and moment are zero there.
  side = side.norm() > 1e-12 ? side.normalized() : Vector3d(0, -1, 0);
  return {side, Vector3d::UnitZ().cross(side)};
}

VectorXd shape(const DishPose& pose, const DishWind& wind) {
  VectorXd a = VectorXd::Zero(C::all);
  const Vector3d side = axes_of(pose, wind.upwind).side;
  if (wind.spread != Spread::edge) {
    a[C::linear] = side.x();
    a[C::linear + 1] = side.y();
    return a;
  }
  const double to_rim = std::atan2(-side.y(), -side.x());  // the upwind rim
  for (int m = 0; m < C::edge_terms; ++m) {
    a[C::edge_cos(m)] = std::cos(m * to_rim);
    if (m > 0) a[C::edge_sin(m)] = std::sin(m * to_rim);
  }
  return a;
}

}  // namespace

Vector3d upwind_of(double wind_from) { return {std::sin(wind_from), std::cos(wind_from), 0}; }

Vector3d wind_integrals(const DishModel& model, const DishPose& pose, const DishWind& wind,
                        const VectorXd& amplitudes) {
  const WindAxes axes = axes_of(pose, wind.upwind);
  VectorXd skin = amplitudes.head(C::body);
  skin.segment<3>(C::gravity).setZero();
  skin.segment<3>(C::front_drag).setZero();
  const Eigen::Matrix<double, 6, 1> sum = model.totals() * skin;
  return {-sum[2], axes.side.dot(sum.head<3>()), axes.moment.dot(sum.tail<3>())};
}

VectorXd dish_wind_amplitudes(const DishModel& model, const DishPose& pose, const DishWind& wind,
                              DishPattern* pattern) {
  const DishCollector& c = model.collector();
  VectorXd even = VectorXd::Zero(C::all);
  even[C::uniform] = 1;
  const VectorXd shaped = shape(pose, wind);
  const Vector3d one = wind_integrals(model, pose, wind, even),
                 two = wind_integrals(model, pose, wind, shaped);
  Eigen::Matrix2d basis;
  basis << one[0], two[0], one[2], two[2];
  const loads::Coefficients& k = wind.coefficients;
  const Eigen::Vector2d share =
      basis.partialPivLu().solve(Eigen::Vector2d(k.Ca * c.area, k.Cm * c.area * c.diameter));
  VectorXd a = share[0] * even + share[1] * shaped;
  const double left_over = k.Cs * c.area - share[0] * one[1] - share[1] * two[1];
  a.segment<3>(C::vertex_force) = left_over * axes_of(pose, wind.upwind).side;
  a.segment<3>(C::front_drag) = receiver_drag * (pose.collector_from_yoke() * -wind.upwind);
  const Vector3d downwind = -(pose.yoke_from_world.transpose() * wind.upwind);
  a.segment<2>(C::base_wind) = post_drag * c.post_width * downwind.head<2>();
  if (pattern) *pattern = {share[0], share[1], left_over / c.area};
  return a;
}

VectorXd dish_weight_amplitudes(const DishPose& pose) {
  VectorXd a = VectorXd::Zero(C::all);
  const Vector3d g = pose.yoke_from_world * Vector3d(0, 0, -standard_gravity);
  a.segment<3>(C::gravity) = pose.collector_from_yoke() * g;
  a.segment<3>(C::yoke_gravity) = g;
  a[C::base_gravity] = standard_gravity;
  return a;
}

}  // namespace focalframe::models
