#include "sheet/moon_mark.hpp"

#include <algorithm>
#include <cmath>

// The lit part of a sphere seen from afar is bounded by half the limb and by half of an ellipse
// whose minor semiaxis is r |2k - 1| for a lit fraction k (Meeus, Astronomical Algorithms, 2nd ed.
// 1998, ch. 41 and 48).

namespace duskleaf {
namespace {
// Control points of the cubic that stands for a quarter of an ellipse; it departs by 0.03 % of the
// radius.
constexpr double quarter = 0.5522847498;
}  // namespace

void draw_moon(Point centre, double radius, double lit, Angle bright_limb_from_up,
               const Theme& theme, std::vector<Mark>& out) {
  const double k = std::clamp(lit, 0.0, 1.0);
  const double s = sin(bright_limb_from_up), c = cos(bright_limb_from_up);
  // u towards the bright limb, v a quarter turn clockwise from it as seen on the page.
  const auto at = [&](double u, double v) {
    return Point{centre.x + radius * (-s * u + c * v), centre.y + radius * (-c * u - s * v)};
  };
  out.emplace_back(Fill{Path::circle(centre, radius), theme.dark});
  if (k > 0.002) {
    const double t = -(2 * k - 1);  // the terminator's place on the line to the bright limb
    Path lit_part;
    lit_part.move(at(0, -1))
        .curve(at(quarter, -1), at(1, -quarter), at(1, 0))
        .curve(at(1, quarter), at(quarter, 1), at(0, 1))
        .curve(at(quarter * t, 1), at(t, quarter), at(t, 0))
        .curve(at(t, -quarter), at(quarter * t, -1), at(0, -1))
        .close();
    out.emplace_back(Fill{lit_part, theme.paper});
  }
  out.emplace_back(Stroke{
      Path::circle(centre, radius), std::clamp(radius * 0.09, 0.13, 0.22), theme.dark, {}, true});
}

}  // namespace duskleaf
