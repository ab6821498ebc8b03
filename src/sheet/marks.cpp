// Circles and arcs as cubic curves, one for each quarter turn or less: the handle of an arc of
// angle a is 4/3 tan(a/4) of the radius (common practice); the curve leaves the circle by less than
// 0.03 % of the radius.
#include "sheet/marks.hpp"

#include <algorithm>
#include <cmath>
#include <numbers>

namespace duskleaf {

Path& Path::move(Point p) {
  verbs.push_back(Verb::move);
  points.push_back(p);
  return *this;
}

Path& Path::line(Point p) {
  verbs.push_back(Verb::line);
  points.push_back(p);
  return *this;
}

Path& Path::curve(Point control1, Point control2, Point end) {
  verbs.push_back(Verb::curve);
  points.insert(points.end(), {control1, control2, end});
  return *this;
}

Path& Path::close() {
  verbs.push_back(Verb::close);
  return *this;
}

Path Path::polyline(const std::vector<Point>& corners, bool closed) {
  Path path;
  path.verbs.reserve(corners.size() + 1);
  path.verbs.assign(corners.size(), Verb::line);
  path.points = corners;
  if (!corners.empty()) path.verbs.front() = Verb::move;
  if (closed && !corners.empty()) path.close();
  return path;
}

Path Path::rectangle(const Box& box) {
  return polyline(
      {{box.x, box.y}, {box.right(), box.y}, {box.right(), box.bottom()}, {box.x, box.bottom()}},
      true);
}

Path Path::circle(Point centre, double radius) {
  Path path = arc(centre, radius, 0, 360);
  return path.close();
}

Path Path::arc(Point centre, double radius, double from_degrees, double to_degrees) {
  constexpr double degree = std::numbers::pi / 180;
  const double sweep = (to_degrees - from_degrees) * degree;
  const int pieces =
      std::max(1, static_cast<int>(std::ceil(std::abs(sweep) / (std::numbers::pi / 2) - 1e-9)));
  const double step = sweep / pieces;
  const double handle = 4.0 / 3.0 * std::tan(step / 4) * radius;
  // y runs down the page, so a counterclockwise turn takes the sine upwards.
  const auto at = [&](double angle) {
    return Point{centre.x + radius * std::cos(angle), centre.y - radius * std::sin(angle)};
  };
  const auto along = [&](Point p, double angle, double length) {
    return Point{p.x - length * std::sin(angle), p.y - length * std::cos(angle)};
  };
  Path path;
  double angle = from_degrees * degree;
  path.move(at(angle));
  for (int i = 0; i < pieces; ++i) {
    const double next = from_degrees * degree + step * (i + 1);
    path.curve(along(at(angle), angle, handle), along(at(next), next, -handle), at(next));
    angle = next;
  }
  return path;
}

}  // namespace duskleaf
