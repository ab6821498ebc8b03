// The drawn Moon: its lit area is the lit fraction of the disc (Meeus, Astronomical Algorithms, 2nd
// ed. 1998, ch. 48: the fraction of the area and of the diameter perpendicular to the line of cusps
// are the same).
#include "sheet/moon_mark.hpp"

#include <cmath>
#include <gtest/gtest.h>
#include <numbers>

namespace duskleaf {
namespace {

std::vector<Point> flatten(const Path& path) {
  std::vector<Point> points;
  std::size_t at = 0;
  for (const Path::Verb verb : path.verbs) {
    if (verb == Path::Verb::move || verb == Path::Verb::line) points.push_back(path.points[at++]);
    if (verb != Path::Verb::curve) continue;
    const Point a = points.back(), b = path.points[at], c = path.points[at + 1],
                d = path.points[at + 2];
    at += 3;
    for (int i = 1; i <= 200; ++i) {
      const double t = i / 200.0, u = 1 - t;
      points.push_back(
          {u * u * u * a.x + 3 * u * u * t * b.x + 3 * u * t * t * c.x + t * t * t * d.x,
           u * u * u * a.y + 3 * u * u * t * b.y + 3 * u * t * t * c.y + t * t * t * d.y});
    }
  }
  return points;
}

struct Shape {
  double area;
  Point middle;
};

Shape shape_of(const Path& path) {
  const auto p = flatten(path);
  double twice = 0, x = 0, y = 0;
  for (std::size_t i = 0; i < p.size(); ++i) {
    const Point a = p[i], b = p[(i + 1) % p.size()];
    const double cross = a.x * b.y - b.x * a.y;
    twice += cross;
    x += (a.x + b.x) * cross;
    y += (a.y + b.y) * cross;
  }
  return {std::abs(twice) / 2, {x / (3 * twice), y / (3 * twice)}};
}

const Fill* lit_part(const std::vector<Mark>& marks, const Theme& theme) {
  for (const Mark& mark : marks)
    if (const Fill* fill = std::get_if<Fill>(&mark))
      if (fill->ink == theme.paper) return fill;
  return nullptr;
}

struct Case {
  const char* label;
  double lit, degrees;
};
class DrawnMoon : public testing::TestWithParam<Case> {};

TEST_P(DrawnMoon, HasItsLitAreaOnItsBrightSide) {
  const auto& [label, lit, degrees] = GetParam();
  const Theme theme = Theme::colour();
  std::vector<Mark> marks;
  const Point centre{30, 40};
  draw_moon(centre, 5, lit, Angle::from_degrees(degrees), theme, marks);
  const Fill* part = lit_part(marks, theme);
  ASSERT_NE(part, nullptr) << label;
  const Shape shape = shape_of(part->path);
  const double disc = std::numbers::pi * 25;
  EXPECT_NEAR(shape.area / disc, lit, 0.0015) << label;
  if (lit > 0.95) return;  // a nearly full disc has hardly a side
  // Page y runs down; the angle runs counterclockwise from up.
  const double up = centre.y - shape.middle.y, left = centre.x - shape.middle.x;
  const double drawn = std::atan2(left, up) * 180 / std::numbers::pi;
  EXPECT_NEAR(std::remainder(drawn - degrees, 360), 0, 0.01) << label;
}

INSTANTIATE_TEST_SUITE_P(Phases, DrawnMoon,
                         testing::Values(Case{"young, lit to the right", 0.05, 270},
                                         Case{"first quarter, lit to the right", 0.5, 270},
                                         Case{"first quarter, lit to the left", 0.5, 90},
                                         Case{"boat in the tropics", 0.2, 180},
                                         Case{"gibbous, leaning", 0.8, 301},
                                         Case{"old, leaning", 0.13, 57}, Case{"full", 1.0, 12}),
                         [](const auto& row) { return "Row" + std::to_string(row.index); });

TEST(DrawnMoonAtNew, HasNoLitPart) {
  const Theme theme = Theme::grey();
  std::vector<Mark> marks;
  draw_moon({0, 0}, 2, 0, Angle(), theme, marks);
  EXPECT_EQ(lit_part(marks, theme), nullptr);
  EXPECT_FALSE(marks.empty());
}

TEST(DrawnMoonTerminator, IsHalfAnEllipse) {
  const Theme theme = Theme::colour();
  for (const double lit : {0.1, 0.35, 0.7, 0.9}) {
    std::vector<Mark> marks;
    draw_moon({0, 0}, 1, lit, Angle::from_degrees(270), theme, marks);  // bright side right
    const Fill* part = lit_part(marks, theme);
    ASSERT_NE(part, nullptr);
    const double minor = std::abs(2 * lit - 1);
    for (const Point p : flatten(part->path)) {
      const double on_limb = std::abs(std::hypot(p.x, p.y) - 1);
      const double on_ellipse = std::abs(std::hypot(p.x / minor, p.y) - 1);
      EXPECT_LT(std::min(on_limb, on_ellipse), 0.0006) << lit << " at " << p.x << " " << p.y;
    }
  }
}

}  // namespace
}  // namespace duskleaf
