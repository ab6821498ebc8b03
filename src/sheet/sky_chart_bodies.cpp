#include <algorithm>

#include "sheet/moon_mark.hpp"
#include "sheet/sky_chart.hpp"

// Planets, Moon and Sun on a chart. A body that nobody can tell from its neighbour helps nobody:
// its name stands nearer to it than to any other bright dot, or on a leader line, or it goes
// undrawn. The rule is this project's own.

namespace duskleaf {

void SkyChart::wish_for_body(std::vector<Mark> marks, LabelRequest request) {
  for (Mark& mark : marks) bodies_.push_back({std::move(mark), wishes_.size()});
  request.nearest = true;
  request.leader = true;
  request.leader_room_mm = 1.5;
  request.ink = context_.theme.black;
  wish(std::move(request));
}

void SkyChart::add_planet(Point p, double magnitude, const std::string& name) {
  const double diameter = std::clamp(star_dot_mm(magnitude), 1.3, 2.3);
  // A ring, so that a planet differs from a star under any light.
  std::vector<Mark> marks = {
      Fill{Path::circle(p, diameter / 2 + 0.25), context_.theme.paper},
      Stroke{Path::circle(p, diameter / 2 - 0.12), 0.36, context_.theme.black, {}, false}};
  placer_.add_dot(p, diameter + 0.5, true);
  LabelRequest request;
  request.forms = {{{name}, Face::bold, context_.theme.label_pt + 0.7, 0}};
  request.importance = 1000 - magnitude;
  request.point = p;
  request.clearance_mm = diameter / 2;
  request.cost_limit = 10;
  wish_for_body(std::move(marks), std::move(request));
}

void SkyChart::add_moon(Point p, double lit, Angle bright_limb_from_up, const std::string& name) {
  constexpr double radius = 2.1;
  std::vector<Mark> marks = {Fill{Path::circle(p, radius + 0.35), context_.theme.paper}};
  draw_moon(p, radius, lit, bright_limb_from_up, context_.theme, marks);
  placer_.add_dot(p, 2 * radius + 0.7, true);
  LabelRequest request;
  request.forms = {{{name}, Face::bold, context_.theme.label_pt + 0.7, 0}};
  request.importance = 1100;
  request.point = p;
  request.clearance_mm = radius + 0.2;
  request.cost_limit = 14;
  wish_for_body(std::move(marks), std::move(request));
}

void SkyChart::add_passing_moon(Point p, double lit, Angle bright_limb_from_up,
                                const std::string& date, bool own_evening) {
  const double radius = own_evening ? 1.7 : 1.15;
  std::vector<Mark> marks = {Fill{Path::circle(p, radius + 0.35), context_.theme.paper}};
  draw_moon(p, radius, lit, bright_limb_from_up, context_.theme, marks);
  placer_.add_dot(p, 2 * radius + 0.7, true);
  LabelRequest request;
  request.forms = {{{date}, own_evening ? Face::bold : Face::regular, context_.theme.label_pt, 0}};
  request.importance = own_evening ? 1100 : 960;
  request.point = p;
  request.clearance_mm = radius + 0.1;
  request.cost_limit = 9;
  wish_for_body(std::move(marks), std::move(request));
}

void SkyChart::add_sun(Point p, const std::string& name) {
  std::vector<Mark> marks = {
      Fill{Path::circle(p, sun_radius_mm), context_.theme.paper},
      Stroke{Path::circle(p, sun_radius_mm), 0.3, context_.theme.black, {}, false},
      Fill{Path::circle(p, 0.45), context_.theme.black}};
  placer_.add_dot(p, 2 * sun_radius_mm + 0.4, true);
  LabelRequest request;
  request.forms = {{{name}, Face::bold, context_.theme.label_pt + 0.7, 0}};
  request.importance = 1090;
  request.point = p;
  request.clearance_mm = sun_radius_mm;
  request.cost_limit = 14;
  wish_for_body(std::move(marks), std::move(request));
}

}  // namespace duskleaf
