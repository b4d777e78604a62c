#include "cli/report/drawing.h"

#include "cli/escaped.h"
#include "cli/report_units.h"

namespace focalframe::cli {
namespace {

std::string points_text(const std::vector<Point>& points) {
  std::string out;
  for (const Point& p : points) out += text_of("%s%.1f,%.1f", out.empty() ? "" : " ", p.x, p.y);
  return out;
}

const char* anchor_text(Anchor anchor) {
  switch (anchor) {
    case Anchor::middle:
      return " text-anchor=\"middle\"";
    case Anchor::end:
      return " text-anchor=\"end\"";
    default:
      return "";
  }
}

}  // namespace

Drawing::Drawing(double width, double height, std::string title, std::string description)
    : width_(width), height_(height), title_(std::move(title)), description_(std::move(description)) {}

void Drawing::line(Point a, Point b, const std::string& style) {
  body_ += text_of("<line class=\"%s\" x1=\"%.1f\" y1=\"%.1f\" x2=\"%.1f\" y2=\"%.1f\"/>\n", style.c_str(),
                   a.x, a.y, b.x, b.y);
}

void Drawing::path(const std::vector<Point>& points, const std::string& style, bool closed) {
  if (points.size() < 2) return;
  const std::string kind = closed ? "polygon" : "polyline";
  body_ += "<" + kind + " class=\"" + style + "\" points=\"" + points_text(points) + "\"/>\n";
}

void Drawing::circle(Point centre, double radius, const std::string& style) {
  body_ += text_of("<circle class=\"%s\" cx=\"%.1f\" cy=\"%.1f\" r=\"%.1f\"/>\n", style.c_str(), centre.x,
                   centre.y, radius);
}

void Drawing::box(Point corner, double width, double height, const std::string& style) {
  body_ += text_of("<rect class=\"%s\" x=\"%.1f\" y=\"%.1f\" width=\"%.1f\" height=\"%.1f\"/>\n",
                   style.c_str(), corner.x, corner.y, width, height);
}

void Drawing::cell(Point corner, double width, double height, const std::string& colour,
                   const std::string& tip) {
  body_ += text_of("<rect fill=\"%s\" x=\"%.1f\" y=\"%.1f\" width=\"%.1f\" height=\"%.1f\">", colour.c_str(),
                   corner.x, corner.y, width, height);
  body_ += "<title>" + escaped(tip) + "</title></rect>\n";
}

void Drawing::text(Point at, const std::string& words, Anchor anchor, const std::string& style) {
  body_ +=
      text_of("<text class=\"%s\" x=\"%.1f\" y=\"%.1f\"%s>", style.c_str(), at.x, at.y, anchor_text(anchor));
  body_ += escaped(words) + "</text>\n";
}

void Drawing::upright_text(Point at, const std::string& words, const std::string& style) {
  body_ +=
      text_of("<text class=\"%s\" transform=\"translate(%.1f,%.1f) rotate(-90)\" text-anchor=\"middle\">",
              style.c_str(), at.x, at.y);
  body_ += escaped(words) + "</text>\n";
}

std::string Drawing::element(bool alone) const {
  std::string out = "<svg xmlns=\"http://www.w3.org/2000/svg\" role=\"img\"";
  if (alone) out += text_of(" width=\"%.0f\" height=\"%.0f\"", width_, height_);
  out += text_of(" viewBox=\"0 0 %.0f %.0f\">\n<title>", width_, height_) + escaped(title_) + "</title>\n";
  if (!description_.empty()) out += "<desc>" + escaped(description_) + "</desc>\n";
  if (alone) out += std::string("<style>") + colour_properties() + drawing_style() + "</style>\n";
  if (alone) out += text_of("<rect class=\"paper\" width=\"%.0f\" height=\"%.0f\"/>\n", width_, height_);
  return out + body_ + "</svg>\n";
}

std::string Drawing::inside_page() const { return element(false); }

std::string Drawing::file() const { return "<?xml version=\"1.0\" encoding=\"UTF-8\"?>\n" + element(true); }

const char* colour_properties() {
  return R"css(
:root{--paper:#fdfcf9;--ink:#1d2327;--soft:#5a646b;--rule:#c9cdcf;--wash:#eef0ef;
--one:#14578f;--two:#b4480b;--three:#4b6b3c;--bad:#a3154a;--good:#1f6a5c}
@media (prefers-color-scheme:dark){:root{--paper:#16191b;--ink:#e8e6e1;--soft:#a9b1b5;--rule:#41484c;--wash:#22272a;
--one:#7fb8ea;--two:#f0a066;--three:#a5cc92;--bad:#ff8fb5;--good:#7fd1bf}}
@media print{:root{--paper:#fff;--ink:#000;--soft:#444;--rule:#bbb;--wash:#f2f2f2;
--one:#14578f;--two:#b4480b;--three:#4b6b3c;--bad:#a3154a;--good:#1f6a5c}}
)css";
}

const char* drawing_style() {
  return R"css(
svg text{font:12px system-ui,"Liberation Sans",sans-serif;fill:var(--ink)}
svg .note{fill:var(--soft)} svg .strong{font-weight:600} svg .small{font-size:10.5px;fill:var(--soft)}
svg .paper{fill:var(--paper)} svg .wash{fill:var(--wash)}
svg line,svg polyline{fill:none;stroke-linejoin:round;stroke-linecap:round}
svg .axis{stroke:var(--ink);stroke-width:1} svg .grid{stroke:var(--rule);stroke-width:.6}
svg .one,svg .two,svg .three{stroke-width:1.9} svg .one{stroke:var(--one)}
svg .two{stroke:var(--two);stroke-dasharray:7 3} svg .three{stroke:var(--three);stroke-dasharray:2 3}
svg .limit{stroke:var(--bad);stroke-width:1.4;stroke-dasharray:10 3 2 3} svg text.limit{stroke:none;fill:var(--bad)}
svg .mark-one{fill:var(--one)} svg .mark-two{fill:var(--paper);stroke:var(--two);stroke-width:1.6}
svg .mark-three{fill:none;stroke:var(--three);stroke-width:1.6}
svg text.one{stroke:none;fill:var(--one)} svg text.two{stroke:none;fill:var(--two)} svg text.three{stroke:none;fill:var(--three)}
svg .bar{fill:var(--one)} svg .bar-over{fill:var(--bad)} svg .bar-idle{fill:var(--rule)}
svg .still{stroke:var(--rule);stroke-width:1} svg .moved{stroke:var(--one);stroke-width:1.3}
svg .moved-skin{stroke:var(--two);stroke-width:1.1} svg .ground{stroke:var(--soft);stroke-width:1}
)css";
}

}  // namespace focalframe::cli
