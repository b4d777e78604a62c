#pragma once

/// Which poses and winds a dish is checked in, and with which coefficients.

#include <string>
#include <vector>

#include "loads/coefficients.h"
#include "models/dish_design.h"
#include "models/dish_wind.h"
#include "models/states.h"

namespace focalframe::models {

/// A state of a dish: wind_from counts from where the dish faces, at any azimuth; `hour` is the turn about a
/// polar axis (0 with a vertical one).
struct DishState {
  State state;
  double hour = 0;  ///< [rad]
};

/// "OPERATE 45 deg, back 135": wind on the convex side, coming from 135 deg clockwise of where the dish
/// faces; "side" within 30 deg of edge-on.
std::string place_text(const DishState& state);

/// Asked elevations, each with the wind from eight directions; with a polar mount also four hours to either
/// side of the meridian.
std::vector<DishState> dish_states(const DishDesign& design);

/// Yoke axes in world axes: the azimuth axis leaning back from the vertical by the design's tilt (a polar
/// axis leans away from the equator), turned by `hour` about itself. Rows = yoke axes.
Eigen::Matrix3d yoke_from_world(const DishDesign& design, double hour);

/// Direction the wind of a state comes from, yoke axes.
Eigen::Vector3d upwind_in_yoke(const DishDesign& design, const DishState& state);

/// Angle between optical axis and upwind direction [rad].
double dish_pitch(const DishDesign& design, const DishState& state);

/// Which coefficients a state is loaded with. Design and table must outlive it.
class DishWinds {
 public:
  DishWinds(const DishDesign& design, const loads::CoefficientTable& table);
  /// `offset`: gust angle added to the pitch [rad]; outside 0 .. 180 deg it is folded back.
  DishWind at(const DishState& state, Spread spread, double offset, bool upper) const;
  double gust_angle(StateKind kind) const;
  double size_factor(const loads::WindAtHeight& wind) const;
  const loads::CoefficientTable& table() const { return table_; }

 private:
  const DishDesign& design_;
  const loads::CoefficientTable& table_;
  loads::ZoneFactors zone_;
};

/// Poses of asked states that the table does not cover, as violations with rule "table-range".
std::vector<Violation> dish_table_gaps(const DishDesign& design, const loads::CoefficientTable& table);

}  // namespace focalframe::models
