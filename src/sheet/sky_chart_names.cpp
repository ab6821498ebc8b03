#include <algorithm>
#include <cmath>

#include "catalogue/constellations.hpp"
#include "catalogue/stars.hpp"
#include "sheet/moon_mark.hpp"
#include "sheet/sky_chart.hpp"

// What a chart names, and in which order of importance: planets and Moon (1000), the bright stars
// (800), constellations (600), asterisms (450), fainter stars (400), curves last. The choice is
// this project's own.

namespace duskleaf {
namespace {

/// Seats within and about a figure, nearest to its middle first.
std::vector<Point> seats_within(const std::vector<Point>& points) {
  Point mean;
  double left = 1e9, right = -1e9, top = 1e9, bottom = -1e9;
  for (const Point& p : points) {
    mean.x += p.x / static_cast<double>(points.size());
    mean.y += p.y / static_cast<double>(points.size());
    left = std::min(left, p.x), right = std::max(right, p.x);
    top = std::min(top, p.y), bottom = std::max(bottom, p.y);
  }
  constexpr double step_x = 2.6, step_y = 1.9;
  std::vector<std::pair<double, Point>> found;
  for (int i = -6; i <= 6; ++i)
    for (int j = -6; j <= 6; ++j) {
      const Point p{mean.x + i * step_x, mean.y + j * step_y};
      const double beyond_x = std::max({left - p.x, 0.0, p.x - right});
      const double beyond_y = std::max({top - p.y, 0.0, p.y - bottom});
      const double away = std::hypot(p.x - mean.x, p.y - mean.y);
      // A name beyond its figure is read as another's; it pays for each millimetre.
      if (beyond_x > 5 || beyond_y > 4.5) continue;
      found.push_back({away + 2.5 * (beyond_x + beyond_y), p});
    }
  std::stable_sort(found.begin(), found.end(),
                   [](const auto& a, const auto& b) { return a.first < b.first; });
  std::vector<Point> seats;
  for (const auto& [cost, p] : found) seats.push_back(p);
  if (seats.size() > 72) seats.resize(72);
  return seats;
}

std::vector<std::string> words_of(std::string_view text) {
  std::vector<std::string> parts;
  std::size_t at = 0;
  while (at <= text.size()) {
    const std::size_t space = std::min(text.find(' ', at), text.size());
    parts.emplace_back(text.substr(at, space - at));
    at = space + 1;
  }
  return parts;
}

}  // namespace

void SkyChart::name_constellations(const std::function<bool(int figure)>& wanted, Face face,
                                   double size_pt, double importance) {
  for (std::size_t f = 0; f < figures().size(); ++f) {
    const Figure& figure = figures()[f];
    if (!wanted(static_cast<int>(f))) continue;
    std::vector<Point> points;
    double brightest = 9;
    for (const int star : figure.figure_stars)
      if (auto p = drawn_star(star)) {
        // Across the seam of a closed chart a figure goes on beyond the end.
        if (period_ > 0 && !points.empty())
          p->x += period_ * std::round((points.front().x - p->x) / period_);
        points.push_back(*p);
        brightest = std::min(brightest, stars()[static_cast<std::size_t>(star)].magnitude);
      }
    if (points.size() < 2 || 2 * points.size() < figure.figure_stars.size()) continue;
    const Constellation& constellation =
        constellations()[static_cast<std::size_t>(figure.constellation)];
    std::string name = capitals(constellation.name);
    std::string part;
    if (!figure.part.empty()) part = capitals(figure.part);
    LabelRequest request;
    const auto form = [&](std::vector<std::string> lines) {
      request.forms.push_back({std::move(lines), face, size_pt, 0.06});
    };
    if (part.empty()) {
      form({name});
      const auto parts = words_of(name);
      if (parts.size() == 2) form(parts);
    } else {
      form({name + " " + part});
      form({name, part});
    }
    form({capitals(constellation.abbreviation)});
    request.importance = importance - 8 * brightest +
                         0.5 * static_cast<double>(std::min<std::size_t>(points.size(), 20));
    request.places = seats_within(points);
    if (period_ > 0)
      for (Point& p : request.places) p.x -= period_ * std::floor((p.x - outline_.box.x) / period_);
    // The brighter the figure, the more its name may cover.
    request.cost_limit = 9 + std::max(0.0, 1.2 * (3.5 - brightest));
    request.ink = context_.theme.blue;
    wish(std::move(request));
  }
}

void SkyChart::name_stars(double faintest, std::size_t most, std::span<const int> always_hr,
                          bool letters) {
  std::size_t named = 0;
  for (const ChartStar& candidate : chart_stars()) {
    const int index = candidate.index;
    const Star& star = stars()[static_cast<std::size_t>(index)];
    const bool always = std::find(always_hr.begin(), always_hr.end(), star.hr) != always_hr.end();
    const auto p = drawn_star(index);
    if (!p || star.name.empty()) continue;
    if (!always && (star.magnitude > faintest || named >= most)) continue;
    ++named;
    const bool bright = star.magnitude < 1.65 || always;
    LabelRequest request;
    request.forms = {plain(std::string(star.name))};
    if (letters && bright && !star.bayer.empty())
      request.forms.push_back(plain(std::string(star.bayer)));
    request.importance = (bright ? 800 : 400) - 10 * star.magnitude;
    request.point = *p;
    request.clearance_mm = dot_scale_ * star_dot_mm(star.magnitude) / 2;
    request.cost_limit = bright ? 7 : 4.5;
    request.ink = context_.theme.black;
    wish(std::move(request));
  }
}

void SkyChart::name_asterisms() {
  for (const Asterism& asterism : asterisms()) {
    const std::string key = "asterism." + std::string(asterism.key);
    if (!context_.words.has(key)) continue;
    std::vector<Point> points;
    for (const int star : asterism.asterism_stars)
      if (const auto p = drawn_star(star)) points.push_back(*p);
    if (points.size() < asterism.asterism_stars.size() || points.empty()) continue;
    LabelRequest request;
    request.forms = {{{context_.words(key)}, Face::italic, context_.theme.label_pt, 0}};
    request.importance = 450;
    request.places = seats_within(points);
    request.cost_limit = 6;
    request.ink = context_.theme.soft;
    wish(std::move(request));
  }
}

void SkyChart::add_moon(Point p, double lit, Angle bright_limb_from_up, const std::string& name,
                        double radius_mm) {
  bodies_.push_back(Fill{Path::circle(p, radius_mm + 0.35), context_.theme.paper});
  draw_moon(p, radius_mm, lit, bright_limb_from_up, context_.theme, bodies_);
  placer_.add_dot(p, 2 * radius_mm + 0.7, true);
  if (name.empty()) return;
  LabelRequest request;
  request.forms = {{{name}, Face::bold, context_.theme.label_pt + 0.7, 0}};
  request.importance = 1100;
  request.point = p;
  request.clearance_mm = radius_mm + 0.2;
  request.cost_limit = 14;
  request.ink = context_.theme.black;
  wish(std::move(request));
}

void SkyChart::add_passing_moon(Point p, double lit, Angle bright_limb_from_up,
                                const std::string& date, bool own_evening) {
  const double radius = own_evening ? 1.7 : 1.15;
  add_moon(p, lit, bright_limb_from_up, {}, radius);
  LabelRequest request;
  request.forms = {{{date}, own_evening ? Face::bold : Face::regular, context_.theme.label_pt, 0}};
  request.importance = own_evening ? 1100 : 860;
  request.point = p;
  request.clearance_mm = radius + 0.1;
  request.cost_limit = 9;
  request.ink = context_.theme.black;
  wish(std::move(request));
}

void SkyChart::add_sun(Point p, const std::string& name) {
  constexpr double radius = 1.5;
  bodies_.push_back(Fill{Path::circle(p, radius), context_.theme.paper});
  bodies_.push_back(Stroke{Path::circle(p, radius), 0.3, context_.theme.black, {}, false});
  bodies_.push_back(Fill{Path::circle(p, 0.45), context_.theme.black});
  placer_.add_dot(p, 2 * radius + 0.4, true);
  LabelRequest request;
  request.forms = {{{name}, Face::bold, context_.theme.label_pt + 0.7, 0}};
  request.importance = 1090;
  request.point = p;
  request.clearance_mm = radius;
  request.cost_limit = 14;
  request.ink = context_.theme.black;
  wish(std::move(request));
}

}  // namespace duskleaf
