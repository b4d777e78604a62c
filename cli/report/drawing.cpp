#include "cli/report/drawing.h"

#include "cli/escaped.h"
#include "cli/report/assets.h"
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
  if (alone) out += "<style>" + asset("colours.css") + asset("drawing.css") + "</style>\n";
  if (alone) out += text_of("<rect class=\"paper\" width=\"%.0f\" height=\"%.0f\"/>\n", width_, height_);
  return out + body_ + "</svg>\n";
}

std::string Drawing::inside_page() const { return element(false); }

std::string Drawing::file() const { return "<?xml version=\"1.0\" encoding=\"UTF-8\"?>\n" + element(true); }

}  // namespace focalframe::cli
