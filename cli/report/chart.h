#pragma once

/// Charts of the report: lines over an axis, and bars against a limit.

#include <string>
#include <vector>

#include "cli/report/drawing.h"

namespace focalframe::cli {

struct Series {
  std::string name;
  std::vector<Point> points;  ///< data units
};

struct LimitLine {
  double value = 0;
  std::string name;
};

struct LineChart {
  std::string title, across, upright;  ///< names of the axes with their units
  std::vector<Series> series;          ///< at most three: each has its own dash and mark
  std::vector<LimitLine> limits;       ///< level lines
  double step_across = 0;              ///< distance of the numbers on the level axis; 0 = chosen
  bool from_zero = false;              ///< the upright axis starts at zero
};
Drawing draw(const LineChart& chart);

/// One bar per line, all on one scale; 1 = the whole limit.
struct Bar {
  std::string name, value;  ///< both printed
  double length = 0;        ///< in the scale's unit
  bool over = false;        ///< drawn as exceeding
  bool judged = true;       ///< false: grey
};

struct BarChart {
  std::string title, across;
  std::vector<Bar> bars;
  double limit = 0;  ///< upright line; 0 = none
  std::string limit_name;
};
Drawing draw(const BarChart& chart);

/// Round numbers that span [low, high] in about `count` steps.
std::vector<double> round_marks(double low, double high, int count);

}  // namespace focalframe::cli
