#include "sheet/marks.hpp"

#include <cmath>
#include <gtest/gtest.h>

namespace duskleaf {
namespace {

/// A point of a cubic curve.
Point at(const Point& a, const Point& b, const Point& c, const Point& d, double t) {
  const double s = 1 - t;
  const double w[] = {s * s * s, 3 * s * s * t, 3 * s * t * t, t * t * t};
  return {w[0] * a.x + w[1] * b.x + w[2] * c.x + w[3] * d.x,
          w[0] * a.y + w[1] * b.y + w[2] * c.y + w[3] * d.y};
}

TEST(Path, ArcStaysOnItsCircle) {
  const double sweeps[][2] = {{0, 90}, {30, 400}, {200, -50}, {10, 11}};
  for (const auto& sweep : sweeps) {
    const Path arc = Path::arc({50, 80}, 20, sweep[0], sweep[1]);
    ASSERT_EQ(arc.points.size() % 3, 1U);
    for (std::size_t i = 0; i + 3 < arc.points.size(); i += 3)
      for (double t = 0; t <= 1; t += 0.125) {
        const Point p =
            at(arc.points[i], arc.points[i + 1], arc.points[i + 2], arc.points[i + 3], t);
        EXPECT_NEAR(std::hypot(p.x - 50, p.y - 80), 20, 20 * 0.0003)
            << sweep[0] << " to " << sweep[1];
      }
  }
}

TEST(Path, ArcRunsCounterclockwiseFromTheRightAsSeen) {
  const Path arc = Path::arc({50, 80}, 20, 0, 90);
  EXPECT_NEAR(arc.points.front().x, 70, 1e-12);
  EXPECT_NEAR(arc.points.front().y, 80, 1e-12);
  EXPECT_NEAR(arc.points.back().x, 50, 1e-12);
  EXPECT_NEAR(arc.points.back().y, 60, 1e-12);  // up the page
}

TEST(Path, CircleIsClosedWhereItBegan) {
  const Path circle = Path::circle({1, 2}, 3);
  EXPECT_EQ(circle.verbs.front(), Path::Verb::move);
  EXPECT_EQ(circle.verbs.back(), Path::Verb::close);
  EXPECT_EQ(circle.points.size(), 13U);
  EXPECT_NEAR(circle.points.front().x, circle.points.back().x, 1e-12);
  EXPECT_NEAR(circle.points.front().y, circle.points.back().y, 1e-12);
}

TEST(Path, PolylineOfNothingIsNothing) {
  EXPECT_TRUE(Path::polyline({}, true).verbs.empty());
  const Path open = Path::polyline({{0, 0}, {1, 1}, {2, 0}});
  EXPECT_EQ(open.verbs, (std::vector{Path::Verb::move, Path::Verb::line, Path::Verb::line}));
  EXPECT_EQ(Path::rectangle({1, 2, 3, 4}).points[2].x, 4);
  EXPECT_EQ(Path::rectangle({1, 2, 3, 4}).points[2].y, 6);
}

}  // namespace
}  // namespace duskleaf
