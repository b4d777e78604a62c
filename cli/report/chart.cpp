#include "cli/report/chart.h"

#include <algorithm>
#include <cmath>

#include "cli/report_units.h"

namespace focalframe::cli {
namespace {

constexpr double left = 62, right = 20, top = 16, bottom = 46;
const char* styles[] = {"one", "two", "three"};

// A number as short as its neighbours allow.
std::string mark_text(double value, double step) {
  const int digits = std::max(0, -static_cast<int>(std::floor(std::log10(step) + 1e-9)));
  return text_of("%.*f", digits, value == 0 ? 0.0 : value);
}

struct Frame {
  double x0, x1, y0, y1;  // data
  double width, height;   // picture
  Point at(Point p) const {
    return {left + (p.x - x0) / (x1 - x0) * (width - left - right),
            top + (y1 - p.y) / (y1 - y0) * (height - top - bottom)};
  }
};

void mark(Drawing& d, Point p, std::size_t series) {
  if (series == 0)
    d.circle(p, 2.6, "mark-one");
  else if (series == 1)
    d.box({p.x - 2.7, p.y - 2.7}, 5.4, 5.4, "mark-two");
  else
    d.path({{p.x, p.y - 3.6}, {p.x + 3.4, p.y + 2.6}, {p.x - 3.4, p.y + 2.6}}, "mark-three", true);
}

// Names sit above the plot in one row, each after a sample of its line.
void legend(Drawing& d, const std::vector<Series>& series) {
  double x = left;
  for (std::size_t i = 0; i < series.size(); ++i) {
    d.line({x, 10}, {x + 26, 10}, styles[i]);
    mark(d, {x + 13, 10}, i);
    d.text({x + 32, 14}, series[i].name, Anchor::start, styles[i]);
    x += 52 + 6.6 * static_cast<double>(series[i].name.size());
  }
}

void axes(Drawing& d, const LineChart& chart, const Frame& f, const std::vector<double>& marks_y) {
  const double step = chart.step_across;
  std::vector<double> marks_x = round_marks(f.x0, f.x1, 7);
  if (step > 0) {
    marks_x.clear();
    for (double x = std::ceil(f.x0 / step - 1e-9) * step; x <= f.x1 + 1e-9 * step; x += step)
      marks_x.push_back(x);
  }
  for (double y : marks_y) {
    d.line(f.at({f.x0, y}), f.at({f.x1, y}), "grid");
    const Point p = f.at({f.x0, y});
    d.text({p.x - 7, p.y + 4}, mark_text(y, marks_y[1] - marks_y[0]), Anchor::end);
  }
  for (double x : marks_x) {
    const Point p = f.at({x, f.y0});
    d.line(p, {p.x, p.y + 4}, "axis");
    d.text({p.x, p.y + 17}, mark_text(x, marks_x.size() > 1 ? marks_x[1] - marks_x[0] : 1), Anchor::middle);
  }
  d.line(f.at({f.x0, f.y0}), f.at({f.x1, f.y0}), "axis");
  d.text({(left + f.width - right) / 2, f.height - 10}, chart.across, Anchor::middle);
  d.upright_text({14, (top + f.height - bottom) / 2}, chart.upright);
}

}  // namespace

std::vector<double> round_marks(double low, double high, int count) {
  const double span = std::max(high - low, 1e-12 * std::max(1.0, std::abs(high)));
  const double raw = span / count, decade = std::pow(10.0, std::floor(std::log10(raw)));
  double step = 10 * decade;
  for (double m : {1.0, 2.0, 5.0})
    if (m * decade >= raw * (1 - 1e-9)) {
      step = m * decade;
      break;
    }
  std::vector<double> marks;
  const double first = std::floor(low / step + 1e-9), last = std::ceil(high / step - 1e-9);
  for (double k = first; k <= last; ++k) marks.push_back(k * step);
  if (marks.size() < 2) marks.push_back(marks.back() + step);
  return marks;
}

Drawing draw(const LineChart& chart) {
  Drawing d(640, 330, chart.title);
  double x0 = 1e300, x1 = -1e300, y0 = 1e300, y1 = -1e300;
  for (const Series& s : chart.series)
    for (const Point& p : s.points) {
      x0 = std::min(x0, p.x);
      x1 = std::max(x1, p.x);
      y0 = std::min(y0, p.y);
      y1 = std::max(y1, p.y);
    }
  for (const LimitLine& l : chart.limits) {
    y0 = std::min(y0, l.value);
    y1 = std::max(y1, l.value);
  }
  if (x0 > x1) return d;
  if (x1 - x0 < 1e-12) x1 = x0 + 1;
  if (chart.from_zero) y0 = std::min(0.0, y0);
  const std::vector<double> marks = round_marks(y0, y1, 6);
  const Frame f{x0, x1, marks.front(), marks.back(), d.width(), d.height()};
  axes(d, chart, f, marks);
  for (const LimitLine& l : chart.limits) {
    d.line(f.at({x0, l.value}), f.at({x1, l.value}), "limit");
    const Point p = f.at({x1, l.value});
    d.text({p.x, p.y - 5}, l.name, Anchor::end, "limit");
  }
  for (std::size_t i = 0; i < chart.series.size() && i < 3; ++i) {
    std::vector<Point> line;
    for (const Point& p : chart.series[i].points) line.push_back(f.at(p));
    d.path(line, styles[i]);
    if (line.size() <= 40)
      for (const Point& p : line) mark(d, p, i);
  }
  legend(d, chart.series);
  return d;
}

Drawing draw(const BarChart& chart) {
  constexpr double names = 150, values = 235, line_height = 24, head = 24, foot = 40;
  const double height = head + line_height * static_cast<double>(chart.bars.size()) + foot;
  Drawing d(640, height, chart.title);
  double most = chart.limit;
  for (const Bar& b : chart.bars)
    if (std::isfinite(b.length)) most = std::max(most, b.length);
  if (most <= 0) most = 1;
  const std::vector<double> marks = round_marks(0, most, 5);
  const double scale = (d.width() - names - values) / marks.back();
  const double floor = height - foot;
  for (double m : marks) {
    d.line({names + m * scale, head}, {names + m * scale, floor}, "grid");
    d.text({names + m * scale, floor + 15}, mark_text(m, marks[1]), Anchor::middle);
  }
  double y = head + 3;
  for (const Bar& b : chart.bars) {
    const double length = std::isfinite(b.length) ? std::max(0.0, b.length) * scale : 0;
    d.text({names - 8, y + 13}, b.name, Anchor::end, "plain");
    d.box({names, y + 2}, length, line_height - 8, b.over ? "bar-over" : b.judged ? "bar" : "bar-idle");
    d.text({d.width() - values + 16, y + 13}, b.value, Anchor::start, b.over ? "limit strong" : "note");
    y += line_height;
  }
  if (chart.limit > 0) {
    const double x = names + chart.limit * scale;
    d.line({x, head - 6}, {x, floor}, "limit");
    d.text({x, head - 11}, chart.limit_name, Anchor::middle, "limit");
  }
  d.text({names, floor + 30}, chart.across, Anchor::start);
  return d;
}

}  // namespace focalframe::cli
