#pragma once

#include <cstdint>
#include <memory>
#include <string>
#include <variant>
#include <vector>

namespace duskleaf {

/// Millimetres from the sheet's top left corner, y downward.
struct Point {
  double x = 0, y = 0;
};
struct Box {
  double x = 0, y = 0, width = 0, height = 0;
  double right() const { return x + width; }
  double bottom() const { return y + height; }
};

/// sRGB, 0..1.
struct Ink {
  double r = 0, g = 0, b = 0;
  bool operator==(const Ink&) const = default;
};

/// A path: `move`, `line`, cubic `curve` (three points), `close`.
struct Path {
  enum class Verb : std::uint8_t { move, line, curve, close };
  std::vector<Verb> verbs;
  std::vector<Point> points;

  Path& move(Point p);
  Path& line(Point p);
  Path& curve(Point control1, Point control2, Point end);
  Path& close();
  static Path polyline(const std::vector<Point>&, bool closed = false);
  static Path rectangle(const Box&);
  static Path circle(Point centre, double radius);
  /// Part of a circle, angles in degrees counterclockwise from the right as seen on the page.
  static Path arc(Point centre, double radius, double from_degrees, double to_degrees);
};

enum class Face : std::uint8_t { regular, bold, italic, light, condensed, condensed_bold };

struct Stroke {
  Path path;
  double width_mm;
  Ink ink{};
  std::vector<double> dash_mm{};  // empty: solid
  bool round = false;             // caps and joins
};
struct Fill {
  Path path;
  Ink ink{};
  bool even_odd = false;
};
/// Round dots of one ink: stars.
struct Dots {
  struct Dot {
    Point centre;
    double diameter_mm;
  };
  std::vector<Dot> dots;
  Ink ink{};
};
struct Text {
  Point start;        // left end of the baseline
  std::string words;  // UTF-8, one line
  Face face = Face::regular;
  double size_pt = 8.5;
  Ink ink{};
  double tracking_em =
      0;  // extra space after each character; keep below 0.09 so that words stay words
  double turn_degrees = 0;  // counterclockwise about `start`
};
/// A picture: PNG bytes, shared.
struct Image {
  Box box;
  std::shared_ptr<const std::string> png;
  std::string description{};
  bool grey = false;  // draw its colours as greys
};
struct Link {
  Box box;
  std::string url;
};
struct ClipGroup;
using Mark = std::variant<Stroke, Fill, Dots, Text, Image, Link, std::shared_ptr<ClipGroup>>;
struct ClipGroup {
  Path clip;
  std::vector<Mark> marks;
};

/// One page: a plain list of marks, in drawing and reading order.
struct Sheet {
  double width_mm, height_mm;
  std::string bookmark;  // empty: none
  std::vector<Mark> marks;
};
struct SheetDocument {
  std::string title, author, subject, language;  // language: BCP 47
  std::vector<Sheet> sheets;
};

}  // namespace duskleaf
