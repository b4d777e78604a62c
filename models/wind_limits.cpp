#include "models/wind_limits.h"

#include <cmath>
#include <cstdio>

#include "models/row_winds.h"

namespace focalframe::models {

std::string limit_word(LimitKey key) {
  switch (key) {
    case LimitKey::intercept:
      return "intercept";
    case LimitKey::lost_to_frame:
      return "lost-to-frame";
    case LimitKey::slope:
      return "slope";
    case LimitKey::twist:
      return "twist";
    case LimitKey::receiver_shift:
      return "receiver-shift";
    case LimitKey::member:
      return "member";
    case LimitKey::moving_torque:
      return "moving-torque";
    case LimitKey::holding_torque:
      return "holding-torque";
    case LimitKey::joint_torque:
      return "joint-torque";
    case LimitKey::overturning:
      return "overturning";
    case LimitKey::uplift:
      return "uplift";
    case LimitKey::wind_up:
      return "wind-up";
  }
  return {};
}

bool is_optical(LimitKey key) {
  return key == LimitKey::intercept || key == LimitKey::lost_to_frame || key == LimitKey::slope ||
         key == LimitKey::twist || key == LimitKey::receiver_shift;
}

const CriterionLimit* PoseLimit::governing(bool safety_only) const {
  for (const CriterionLimit& c : criteria)
    if (!safety_only || !is_optical(c.key)) return &c;
  return nullptr;
}

AxisWind axis_wind(const TroughDesign& design) {
  loads::StatedWind any;
  any.speed = 10;
  any.averaging = 600;
  const loads::WindAtHeight wind = loads::wind_at(design.row.axis_height, any, site_of(design.site));
  AxisWind axis;
  axis.height = wind.height;
  axis.density = wind.density;
  axis.turbulence = wind.turbulence;
  axis.gust_over_mean = wind.gust_speed / wind.mean_speed;
  char text[96];
  std::snprintf(text, sizeof text, "3 s gust over 10 min mean at %.1f m, turbulence %.3f", wind.height,
                wind.turbulence);
  axis.how = text;
  if (design.wind.size_factor)
    axis.size_factor =
        loads::size_factor(design.row.modules * design.row.module_length, design.parabola.aperture,
                           wind.height, wind.turbulence, site_of(design.site));
  axis.size_factor *= design.wind.dynamic_factor;
  return axis;
}

}  // namespace focalframe::models
