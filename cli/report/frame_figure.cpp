#include "cli/report/frame_figure.h"

#include <algorithm>
#include <array>
#include <cmath>
#include <functional>

#include "cli/report_units.h"
#include "fem/units.h"
#include "loads/pose.h"

namespace focalframe::cli {
namespace {

using fem::Vec3;
using models::Portrait;

using Look = std::function<Point(const Vec3&)>;  ///< world point [m] -> picture plane [m], y downwards

Point along_row(const Vec3& p) { return {p.y(), -p.z()}; }   // seen along +X: +Y to the right
Point from_side(const Vec3& p) { return {p.x(), -p.z()}; }   // seen from the -Y side
Point from_above(const Vec3& p) { return {p.x(), -p.y()}; }  // +Y up
Point oblique(const Vec3& p) {
  const double c = std::cos(30 * deg), s = std::sin(30 * deg);
  return {p.x() * c + p.y() * c, -(p.z() + (p.y() - p.x()) * s * 0.55)};
}

// All lines of one state in world axes: members and the mirror's outline, at rest or moved.
struct Lines {
  std::vector<std::array<Vec3, 2>> bars;
  std::vector<std::vector<Vec3>> mirror;
};

class Placed {
 public:
  Placed(const Portrait& p, const models::PortraitState& state)
      : p_(p), state_(state), turn_(loads::world_to_collector(state.state.elevation).transpose()) {}

  Lines lines(double scale) const {
    Lines out;
    for (const auto& m : p_.members) out.bars.push_back({point(m.from, scale), point(m.to, scale)});
    for (int s = 0; s < p_.stations; ++s) {
      const bool first = s == 0 || p_.module_of_station[idx(s)] != p_.module_of_station[idx(s - 1)];
      const bool last =
          s + 1 == p_.stations || p_.module_of_station[idx(s)] != p_.module_of_station[idx(s + 1)];
      if (first) {
        rim(out, s, 0, scale);
        rim(out, s, p_.rows - 1, scale);
      }
      if (!first && !last) continue;
      std::vector<Vec3> section;
      for (int r = 0; r < p_.rows; ++r) section.push_back(mirror(s * p_.rows + r, scale));
      out.mirror.push_back(section);
    }
    return out;
  }

 private:
  static std::size_t idx(int i) { return static_cast<std::size_t>(i); }
  Vec3 world(const Vec3& own) const {
    return turn_ * (own + Vec3(0, 0, p_.axis_to_vertex)) + Vec3(0, 0, p_.axis_height);
  }
  Vec3 point(int i, double scale) const {
    const auto& point = p_.points[idx(i)];
    const Vec3 own = point.at + scale * state_.moves[idx(i)];
    return point.turns ? world(own) : own;
  }
  Vec3 mirror(int i, double scale) const { return world(p_.mirror[idx(i)] + scale * state_.mirror[idx(i)]); }
  void rim(Lines& out, int s, int row, double scale) const {
    std::vector<Vec3> line;
    const int module = p_.module_of_station[idx(s)];
    for (int k = s; k < p_.stations && p_.module_of_station[idx(k)] == module; ++k)
      line.push_back(mirror(k * p_.rows + row, scale));
    out.mirror.push_back(line);
  }

  const Portrait& p_;
  const models::PortraitState& state_;
  Eigen::Matrix3d turn_;
};

struct Window {
  double x, y, width, height;  ///< in the picture [px]
};

struct Extent {
  double x0 = 1e300, x1 = -1e300, y0 = 1e300, y1 = -1e300;
  void take(Point p) {
    x0 = std::min(x0, p.x);
    x1 = std::max(x1, p.x);
    y0 = std::min(y0, p.y);
    y1 = std::max(y1, p.y);
  }
};

void draw_view(Drawing& d, const Lines& rest, const Lines& moved, const Look& look, const Window& w,
               const std::string& title, double* scale_out = nullptr) {
  Extent e;
  for (const Lines* lines : {&rest, &moved}) {
    for (const auto& bar : lines->bars)
      for (const Vec3& p : bar) e.take(look(p));
    for (const auto& line : lines->mirror)
      for (const Vec3& p : line) e.take(look(p));
  }
  const double scale = std::min(w.width / (e.x1 - e.x0), w.height / (e.y1 - e.y0));
  if (scale_out) *scale_out = scale;
  const Point shift{w.x + (w.width - scale * (e.x1 - e.x0)) / 2,
                    w.y + (w.height - scale * (e.y1 - e.y0)) / 2};
  const auto at = [&](const Vec3& p) {
    const Point q = look(p);
    return Point{shift.x + scale * (q.x - e.x0), shift.y + scale * (q.y - e.y0)};
  };
  const auto put = [&](const Lines& lines, const char* bars, const char* mirror) {
    for (const auto& bar : lines.bars) {
      const Point a = at(bar[0]), b = at(bar[1]);
      if (std::hypot(a.x - b.x, a.y - b.y) > 0.3) d.line(a, b, bars);
    }
    for (const auto& line : lines.mirror) {
      std::vector<Point> points;
      for (const Vec3& p : line) points.push_back(at(p));
      d.path(points, mirror);
    }
  };
  put(rest, "still", "still");
  put(moved, "moved", "moved-skin");
  d.text({w.x, w.y - 8}, title, Anchor::start, "strong");
}

}  // namespace

Figure frame_figure(const Portrait& p, std::size_t state, double scale) {
  const Placed placed(p, p.states[state]);
  const Lines rest = placed.lines(0), moved = placed.lines(scale);
  Drawing d(760, 700, "The frame in four views", p.states[state].words);
  draw_view(d, rest, moved, oblique, {16, 34, 728, 280}, "oblique");
  draw_view(d, rest, moved, along_row, {16, 352, 220, 250}, "along the row, +Y to the right");
  draw_view(d, rest, moved, from_side, {264, 352, 480, 150}, "from the side, +X to the right");
  draw_view(d, rest, moved, from_above, {264, 540, 480, 120}, "from above, +Y up");
  d.line({16, 686}, {52, 686}, "still");
  d.text({58, 690}, "at rest");
  d.line({130, 686}, {166, 686}, "moved");
  d.text({172, 690}, text_of("frame, motion drawn %.0f times", scale));
  d.line({390, 686}, {426, 686}, "moved-skin");
  d.text({432, 690}, "mirror, likewise");
  return {"frame-views", "The frame at rest and moved",
          p.states[state].words +
              text_of(", motion drawn %.0f times larger. Every view has its own scale.", scale),
          std::move(d)};
}

}  // namespace focalframe::cli
