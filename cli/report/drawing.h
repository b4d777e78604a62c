#pragma once

/// A drawing in SVG. Colours come from classes, so that one drawing serves light and dark pages and print;
/// every series also differs by dash or mark, so that it reads without colour.

#include <string>
#include <vector>

namespace focalframe::cli {

/// Picture coordinates: x to the right, y downwards [px of the drawing's own size].
struct Point {
  double x = 0, y = 0;
};

enum class Anchor { start, middle, end };

class Drawing {
 public:
  /// `title` and `description` are what a screen reader says.
  Drawing(double width, double height, std::string title, std::string description = "");

  double width() const { return width_; }
  double height() const { return height_; }

  void line(Point a, Point b, const std::string& style);
  void path(const std::vector<Point>& points, const std::string& style, bool closed = false);
  void circle(Point centre, double radius, const std::string& style);
  void box(Point corner, double width, double height, const std::string& style);
  /// A box filled with a colour of its own ("#rrggbb"), for maps; `tip` is shown by a pointing device.
  void cell(Point corner, double width, double height, const std::string& colour, const std::string& tip);
  void text(Point at, const std::string& words, Anchor anchor = Anchor::start,
            const std::string& style = "note");
  /// Text turned a quarter to the left, for the name of an upright axis.
  void upright_text(Point at, const std::string& words, const std::string& style = "note");

  /// The element as it stands inside a page that brings drawing_style().
  std::string inside_page() const;
  /// A file of its own.
  std::string file() const;

 private:
  std::string element(bool alone) const;

  double width_, height_;
  std::string title_, description_, body_;
};

}  // namespace focalframe::cli
