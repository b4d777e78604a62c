#include "loads/reflector_load.h"

#include "loads/pose.h"

namespace focalframe::loads {

ReflectorLoad reflector_load(const Coefficients& c, double pressure, const Reference& reference) {
  const double force = pressure * reference.area;
  return {force * c.Ca, force * c.Cs, force * reference.length * c.Cm};
}

WorldLoad world_load(const ReflectorLoad& load, const Attitude& attitude) {
  const Eigen::Vector3d in_collector(0, side_axis_along_y(attitude.wind_from) * load.side, -load.axial);
  WorldLoad world;
  world.force = world_to_collector(attitude.elevation).transpose() * in_collector;
  world.moment_vertex = upwind_side(attitude.wind_from) * load.moment;
  // r x F about +x with r = (0, 0, d) from the axis to the vertex: -d F_y.
  world.moment_axis = world.moment_vertex - attitude.axis_behind * in_collector.y();
  return world;
}

}  // namespace focalframe::loads
