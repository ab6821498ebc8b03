#include <algorithm>
#include <cmath>

#include "catalogue/stars.hpp"
#include "sheet/sky_chart_dome.hpp"

// How to find the pole. North: from Merak through Dubhe to Polaris. South: the Cross's long axis
// drawn out four and a half times its length, met by the perpendicular in the middle between the
// Pointers (common practice).

namespace duskleaf {
namespace {

constexpr int hr_merak = 4295, hr_dubhe = 4301, hr_polaris = 424;
constexpr int hr_gacrux = 4763, hr_acrux = 4730, hr_alpha_cen = 5459, hr_beta_cen = 5267;

/// Points on the straight way from `from` (past its dot) to `to`, as far as `share` of it.
std::vector<Point> straight(Point from, Point to, double start_gap, double end_gap) {
  const double length = std::hypot(to.x - from.x, to.y - from.y);
  std::vector<Point> line;
  if (length <= start_gap + end_gap) return line;
  const int steps = std::max(1, static_cast<int>(length));
  for (int i = 0; i <= steps; ++i) {
    const double along = start_gap + (length - start_gap - end_gap) * i / steps;
    line.push_back(
        {from.x + along / length * (to.x - from.x), from.y + along / length * (to.y - from.y)});
  }
  return line;
}

void arrow_head(SkyChart& chart, Point tip, double direction, Ink ink) {
  // direction: of flight, radians counterclockwise from the right.
  const auto at = [&](double back, double side) {
    return Point{tip.x - back * std::cos(direction) - side * std::sin(direction),
                 tip.y + back * std::sin(direction) - side * std::cos(direction)};
  };
  chart.add_mark(Fill{Path::polyline({tip, at(2.1, 0.75), at(1.6, 0), at(2.1, -0.75)}, true), ink},
                 at(1, 0), 2.2);
}

/// An arc round the pole from one page angle to another, arrow at its end; degrees counterclockwise
/// from the right.
void turning_arrow(SkyChart& chart, Point pole, double radius, double from, double to) {
  const Theme& theme = chart.context().theme;
  std::vector<Point> arc;
  const int steps = 36;
  for (int i = 0; i <= steps; ++i) {
    const double a = (from + (to - from) * i / steps) * std::numbers::pi / 180;
    arc.push_back({pole.x + radius * std::cos(a), pole.y - radius * std::sin(a)});
  }
  const double sense = to > from ? 1 : -1;
  const double end = to * std::numbers::pi / 180;
  arrow_head(chart, arc.back(), end + sense * (std::numbers::pi / 2 - 0.7 / radius), theme.blue);
  arc.pop_back();
  chart.add_guide({arc}, {0.28, theme.blue, {}, 1.5});
}

}  // namespace

void add_pole(SkyChart& chart, const DomeView& view) {
  const BlockContext& context = chart.context();
  const Theme& theme = context.theme;
  const Angle latitude = context.site.place.observer.latitude;
  const bool north = latitude.radians() >= 0;
  const Angle height = north ? latitude : -latitude;
  const auto pole = view.project({height, view.facing()});
  if (!pole) return;

  const double arm = 1.3;
  Path cross;
  cross.move({pole->x - arm, pole->y}).line({pole->x + arm, pole->y});
  cross.move({pole->x, pole->y - arm}).line({pole->x, pole->y + arm});
  chart.add_mark(Stroke{cross, 0.25, theme.blue, {}, false}, *pole, 2 * arm);

  const double radius = 12;
  if (view.middle().y - pole->y > radius + 2.5) {
    // The sky turns counterclockwise round the north pole and clockwise round the south pole.
    if (north)
      turning_arrow(chart, *pole, radius, 192, 350);
    else
      turning_arrow(chart, *pole, radius, 348, 190);
    LabelRequest turns;
    turns.forms = {{{context.words("dome.turns-1"), context.words("dome.turns-2")},
                    Face::italic,
                    theme.label_pt,
                    0}};
    turns.importance = 940;
    for (const double dy : {-5.2, -4.6, -5.8, 3.8, 5.0, 6.4})
      for (const double dx : {0.0, -2.0, 2.0, -6.0, 6.0})
        turns.places.push_back({pole->x + dx, pole->y + radius + dy});
    turns.cost_limit = 22;
    turns.ink = theme.blue;
    chart.wish(std::move(turns));
  }

  LabelRequest name;
  const std::string degrees = context.words.number(std::round(height.degrees()), 0);
  name.forms = {
      {{context.words(north ? "dome.pole-north" : "dome.pole-south", {{"height", degrees}})},
       Face::italic,
       theme.label_pt,
       0},
      {{context.words("dome.pole-short")}, Face::italic, theme.label_pt, 0}};
  name.importance = 950;
  name.point = *pole;
  name.clearance_mm = arm;
  name.cost_limit = 12;
  name.ink = theme.blue;
  chart.wish(std::move(name));

  const GuideStyle finder = {0.2, theme.blue_soft, {0.5, 0.7}, 0.5};
  const auto star = [&](int hr) { return chart.drawn_star(star_index(hr)); };
  if (north) {
    const auto merak = star(hr_merak), dubhe = star(hr_dubhe), polaris = star(hr_polaris);
    if (merak && dubhe && polaris) {
      chart.add_guide({straight(*merak, *dubhe, 0.9, 0.9)}, finder);
      chart.add_guide({straight(*dubhe, *polaris, 1.0, 1.2)}, finder,
                      context.words("dome.finder-north"));
    }
    return;
  }
  const auto gacrux = star(hr_gacrux), acrux = star(hr_acrux);
  const auto alpha = star(hr_alpha_cen), beta = star(hr_beta_cen);
  if (gacrux && acrux) {
    chart.add_guide({straight(*acrux, *pole, 1.2, 1.9)}, finder, context.words("dome.finder-south"),
                    true);
  }
  if (alpha && beta) {
    const Point between{(alpha->x + beta->x) / 2, (alpha->y + beta->y) / 2};
    chart.add_guide({straight(*alpha, *beta, 1.2, 1.2)}, finder);
    chart.add_guide({straight(between, *pole, 0.3, 2.2)}, finder,
                    context.words("dome.finder-south"));
  }
}

}  // namespace duskleaf
