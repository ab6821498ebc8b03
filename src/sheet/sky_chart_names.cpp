#include <algorithm>
#include <array>
#include <cmath>

#include "catalogue/constellations.hpp"
#include "catalogue/stars.hpp"
#include "sheet/sky_chart.hpp"

// What a chart names, and in which order of importance: planets and Moon (1000), the brightest
// stars (900), bright stars (800), landmarks (700), the main constellations (600), asterisms (450),
// fainter stars (400), the other constellations (200), curves last. The choice is this project's
// own.

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

/// Seats beside a small figure, to all four sides; none beside a large one.
std::vector<Point> seats_about(const std::vector<Point>& points, const Box& name) {
  double left = 1e9, right = -1e9, top = 1e9, bottom = -1e9;
  for (const Point& p : points) {
    left = std::min(left, p.x), right = std::max(right, p.x);
    top = std::min(top, p.y), bottom = std::max(bottom, p.y);
  }
  std::vector<Point> seats;
  if (right - left > 1.3 * name.width) return seats;
  const double x = (left + right) / 2, y = (top + bottom) / 2;
  for (const double gap : {1.2, 2.4, 4.0, 6.0})
    for (const double slip : {0.0, -2.5, 2.5, -5.0, 5.0}) {
      seats.push_back({right + gap + name.width / 2, y + slip});
      seats.push_back({left - gap - name.width / 2, y + slip});
      seats.push_back({x + 1.5 * slip, top - gap - name.height / 2});
      seats.push_back({x + 1.5 * slip, bottom + gap + name.height / 2});
    }
  return seats;
}

/// The constellations that a beginner learns first: bright, large, or of the zodiac.
bool is_main(std::string_view abbreviation) {
  constexpr std::string_view main =
      "And Aql Aqr Ari Aur Boo CMa CMi Cap Car Cas Cen Cnc CrB Cru Cyg Del Dra Eri Gem Her Hya Leo "
      "Lib Lyr Ori Peg Per Psc Sco Sgr Tau UMa UMi Vir";
  return main.find(abbreviation) != std::string_view::npos;
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
                                   Face quiet, double size_pt, double importance) {
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
    const bool main = is_main(constellation.abbreviation);
    const auto form = [&](std::vector<std::string> lines) {
      request.forms.push_back({std::move(lines), main ? face : quiet, size_pt, 0.06});
    };
    if (part.empty()) {
      form({name});
      const auto parts = words_of(name);
      if (parts.size() == 2) form(parts);
    } else {
      form({name + " " + part});
      form({name, part});
    }
    request.importance = (main ? importance : 200) - 8 * brightest +
                         0.5 * static_cast<double>(std::min<std::size_t>(points.size(), 20));
    request.places = seats_within(points);
    if (period_ > 0)
      for (Point& p : request.places) p.x -= period_ * std::floor((p.x - outline_.box.x) / period_);
    // The brighter the figure, the more its name may cover.
    request.cost_limit = main ? 9 + std::max(0.0, 1.2 * (3.5 - brightest)) : 7;
    request.ink = main ? context_.theme.blue : context_.theme.blue_soft;
    request.side_gap_mm = 2.5;
    wish(std::move(request));
  }
}

void SkyChart::name_stars(double faintest, std::size_t most, std::span<const int> always_hr) {
  std::size_t named = 0;
  for (const ChartStar& candidate : chart_stars()) {
    const int index = candidate.index;
    const Star& star = stars()[static_cast<std::size_t>(index)];
    const bool always = std::find(always_hr.begin(), always_hr.end(), star.hr) != always_hr.end();
    const auto p = drawn_star(index);
    if (!p || star.name.empty()) continue;
    if (!always && (star.magnitude > faintest || named >= most)) continue;
    ++named;
    const bool brightest = star.magnitude < 1.5 || always;
    const bool bright = star.magnitude < 1.65 || always;
    LabelRequest request;
    request.forms = {plain(std::string(star.name))};
    request.importance = (brightest ? 900 : bright ? 800 : 400) - 10 * star.magnitude;
    // Polaris stands in the very mark of the pole.
    request.nearest = !always;
    request.leader = brightest;
    request.point = *p;
    request.clearance_mm = dot_scale_ * star_dot_mm(star.magnitude) / 2;
    request.cost_limit = brightest ? 8 : bright ? 7 : 4.5;
    request.ink = context_.theme.black;
    wish(std::move(request));
  }
}

void SkyChart::name_asterisms() {
  constexpr std::array<std::string_view, 4> landmarks = {"southern-cross", "pointers-south",
                                                         "plough", "belt"};
  for (const Asterism& asterism : asterisms()) {
    const std::string key = "asterism." + std::string(asterism.key);
    if (!context_.words.has(key)) continue;
    std::vector<Point> points;
    for (const int star : asterism.asterism_stars)
      if (const auto p = drawn_star(star)) points.push_back(*p);
    if (points.size() < asterism.asterism_stars.size() || points.empty()) continue;
    LabelRequest request;
    request.forms = {{{context_.words(key)}, Face::italic, context_.theme.label_pt, 0}};
    const bool landmark =
        std::find(landmarks.begin(), landmarks.end(), asterism.key) != landmarks.end();
    request.importance = landmark ? 895 : 450;
    // A landmark smaller than its name has the name beside it.
    if (landmark) request.places = seats_about(points, placer_.measure(request.forms[0]));
    for (const Point& p : seats_within(points)) request.places.push_back(p);
    request.cost_limit = landmark ? 12 : 6;
    request.ink = landmark ? context_.theme.black : context_.theme.soft;
    request.side_gap_mm = 1.2;
    wish(std::move(request));
  }
  constexpr int hr_alcyone = 1165;
  if (const auto p = drawn_star(star_index(hr_alcyone))) {
    LabelRequest request;
    request.forms = {
        {{context_.words("asterism.pleiades")}, Face::italic, context_.theme.label_pt, 0}};
    request.importance = 700;
    request.point = *p;
    request.clearance_mm = 1.6 * dot_scale_;  // the cluster's
    request.cost_limit = 9;
    request.ink = context_.theme.black;
    request.side_gap_mm = 1.2;
    request.leader = true;
    wish(std::move(request));
  }
}

}  // namespace duskleaf
