#include "sheet/sky_chart.hpp"

#include <algorithm>
#include <array>
#include <cmath>

#include "catalogue/constellations.hpp"
#include "catalogue/stars.hpp"

// Spherical astronomy: Explanatory Supplement to the Astronomical Almanac, 3rd ed. 2013, ch. 7
// (hour angle to horizon frame). Departs from it in the direction of azimuth only: from north
// through east throughout.

namespace duskleaf {
namespace {

constexpr double dot_at_zero_mm = 1.65;      // so that Sirius (-1.46) has 2.6 mm
constexpr double dot_per_magnitude = -0.14;  // log10 of the diameter

std::vector<ChartStar> find_chart_stars() {
  const auto all = stars();
  std::vector<std::uint8_t> in_figure(all.size(), 0);
  for (const Figure& figure : figures())
    for (const int star : figure.figure_stars) in_figure[static_cast<std::size_t>(star)] = 1;
  std::vector<ChartStar> found;
  for (std::size_t i = 0; i < all.size(); ++i)
    if (all[i].charted && (in_figure[i] || all[i].magnitude <= chart_limit))
      found.push_back({static_cast<int>(i), in_figure[i] != 0});
  std::stable_sort(found.begin(), found.end(), [&](const ChartStar& a, const ChartStar& b) {
    return all[static_cast<std::size_t>(a.index)].magnitude <
           all[static_cast<std::size_t>(b.index)].magnitude;
  });
  return found;
}

}  // namespace

double star_dot_mm(double magnitude) {
  return dot_at_zero_mm * std::pow(10.0, dot_per_magnitude * magnitude);
}

std::span<const ChartStar> chart_stars() {
  static const std::vector<ChartStar> found = find_chart_stars();
  return found;
}

Ink figure_ink(const Theme& theme) {
  const auto between = [](double a, double b) { return 0.45 * a + 0.55 * b; };
  return {between(theme.figure.r, theme.soft.r), between(theme.figure.g, theme.soft.g),
          between(theme.figure.b, theme.soft.b)};
}

SkyChart::SkyChart(const BlockContext& context, const LabelRegion& outline,
                   const LabelRegion& labels, Path clip, double dot_scale)
    : context_(context),
      outline_(outline),
      clip_(std::move(clip)),
      dot_scale_(dot_scale),
      placer_(context.type, labels),
      at_(stars().size()),
      bright_enough_(stars().size(), 0),
      drawn_(stars().size(), 0) {
  dots_.ink = context.theme.black;
}

bool SkyChart::holds(Point p) const { return outline_.contains({p.x, p.y, 0, 0}); }

std::optional<Point> SkyChart::drawn_star(int index) const {
  if (index < 0 || !drawn_[static_cast<std::size_t>(index)]) return std::nullopt;
  return at_[static_cast<std::size_t>(index)];
}

void SkyChart::add_stars(double faintest, double faintest_of_figures,
                         const std::function<std::optional<Point>(int star)>& project) {
  for (const auto& [index, in_figure] : chart_stars()) {
    const auto i = static_cast<std::size_t>(index);
    at_[i] = project(index);
    const double magnitude = stars()[i].magnitude;
    const double limit = in_figure ? faintest_of_figures : faintest;
    bright_enough_[i] = magnitude <= limit;
    if (!at_[i] || !bright_enough_[i] || !holds(*at_[i])) continue;
    drawn_[i] = 1;
    const double diameter = dot_scale_ * star_dot_mm(magnitude);
    dots_.dots.push_back({*at_[i], diameter});
    placer_.add_dot(*at_[i], diameter, magnitude < 3.0);
  }
}

void SkyChart::add_figures() {
  // Lines stop short of the stars, the more so the greater the dot.
  const auto gap = [&](int star) {
    return 0.5 * dot_scale_ * dot_scale_ +
           dot_scale_ * star_dot_mm(stars()[static_cast<std::size_t>(star)].magnitude) / 2;
  };
  for (const Figure& figure : figures()) {
    const auto shown = std::count_if(figure.figure_stars.begin(), figure.figure_stars.end(),
                                     [&](int s) { return drawn_star(s).has_value(); });
    if (shown < 2) continue;
    for (const auto& [one, other] : figure.lines) {
      const auto a = at_[static_cast<std::size_t>(one)], b = at_[static_cast<std::size_t>(other)];
      if (!a || !b) continue;
      if (!bright_enough_[static_cast<std::size_t>(one)] ||
          !bright_enough_[static_cast<std::size_t>(other)])
        continue;
      Point from = *a, to = *b;
      std::vector<double> shifts = {0};
      if (period_ > 0 && std::abs(to.x - from.x) > period_ / 2) {
        to.x += to.x < from.x ? period_ : -period_;
        shifts = {0, to.x > from.x ? -period_ : period_};
      }
      const double length = std::hypot(to.x - from.x, to.y - from.y);
      const double start = gap(one) / length, end = 1 - gap(other) / length;
      if ((end - start) * length < 0.4) continue;
      for (const double shift : shifts) {
        const auto at = [&](double t) {
          return Point{from.x + t * (to.x - from.x) + shift, from.y + t * (to.y - from.y)};
        };
        const Point p = at(start), q = at(end);
        if (length_inside(p, q, outline_.box) <= 0) continue;
        figure_lines_.push_back({p, q});
        placer_.add_line(p, q, 0.55);
      }
    }
  }
}

LabelForm SkyChart::plain(std::string words) const {
  return {{std::move(words)}, Face::regular, context_.theme.label_pt, 0};
}

void SkyChart::add_guide(const std::vector<std::vector<Point>>& stretches, const GuideStyle& style,
                         const std::string& label, bool first) {
  for (const auto& stretch : stretches)
    for (std::size_t i = 0; i + 1 < stretch.size(); ++i)
      placer_.add_line(stretch[i], stretch[i + 1], style.label_cost_per_mm);
  guides_.push_back({stretches, style, label, first});
}

void SkyChart::label_on_line(const std::string& words, const std::vector<Point>& places) {
  LabelRequest request;
  request.forms = {plain(words)};
  request.forms[0].size_pt = context_.theme.small_pt + 0.5;
  request.importance = 300;
  request.places = places;
  request.cost_limit = 5;
  request.ink = context_.theme.soft;
  if (!places.empty()) wish(std::move(request));
}

void SkyChart::add_mark(Mark mark, Point centre, double diameter_mm) {
  bodies_.push_back({std::move(mark), {}});
  placer_.add_dot(centre, diameter_mm, true);
}

void SkyChart::finish(std::vector<Mark>& out) {
  std::vector<Mark> texts;
  for (const Guide& guide : guides_)
    if (!guide.label.empty() && guide.first) label_guide(guide, texts);
  labels_ = placer_.place(wishes_);
  context_.tally.labels_left_out += static_cast<int>(wishes_.size() - labels_.size());
  for (const PlacedLabel& label : labels_) {
    if (label.leader) {
      Path leader;
      leader.move(label.leader->first).line(label.leader->second);
      texts.push_back(Stroke{leader, 0.2, context_.theme.black, {}, false});
    }
    for (const Text& text : label.texts) texts.push_back(text);
  }
  for (const Guide& guide : guides_)
    if (!guide.label.empty() && !guide.first) label_guide(guide, texts);

  auto group = std::make_shared<ClipGroup>();
  group->clip = clip_;
  for (const Guide& guide : guides_) {
    Path path;
    for (const auto& stretch : guide.stretches)
      for (const auto& piece : break_at(stretch, placer_.reserved(), 0.35)) {
        path.move(piece.front());
        for (std::size_t i = 1; i < piece.size(); ++i) path.line(piece[i]);
      }
    if (!path.verbs.empty())
      group->marks.push_back(
          Stroke{path, guide.style.width_mm, guide.style.ink, guide.style.dash_mm, false});
  }
  Path figure_path;
  for (const auto& line : figure_lines_)
    for (const auto& piece : break_at(line, placer_.reserved(), 0.3))
      figure_path.move(piece.front()).line(piece.back());
  if (!figure_path.verbs.empty())
    group->marks.push_back(
        Stroke{figure_path, figure_line_mm, figure_ink(context_.theme), {}, false});
  if (!dots_.dots.empty()) group->marks.push_back(dots_);
  out.push_back(group);
  std::vector<std::uint8_t> named(wishes_.size(), 0);
  for (const PlacedLabel& label : labels_) named[label.request] = 1;
  for (const Body& body : bodies_)
    if (!body.wish || named[*body.wish]) out.push_back(body.mark);
  out.insert(out.end(), texts.begin(), texts.end());
}

void SkyChart::label_guide(const Guide& guide, std::vector<Mark>& texts) {
  const double size = context_.theme.small_pt + 0.5;
  const TypeSet& type = context_.type;
  const double width = type.width(guide.label, Face::italic, size);
  const double drop = 0.55 * type.descent(Face::italic, size);
  const double top = type.ascent(Face::italic, size);
  double least = guide.first ? 16 : 7;
  std::optional<Text> best;
  std::vector<Box> best_boxes;
  for (const auto& stretch : guide.stretches) {
    for (std::size_t i = 0; i < stretch.size(); ++i) {
      std::size_t j = i;
      while (j < stretch.size() &&
             std::hypot(stretch[j].x - stretch[i].x, stretch[j].y - stretch[i].y) < width + 1)
        ++j;
      if (j == stretch.size()) break;
      Point a = stretch[i], b = stretch[j];
      if (a.x > b.x) std::swap(a, b);
      const double turn = std::atan2(a.y - b.y, b.x - a.x);  // counterclockwise, y runs down
      const double c = std::cos(turn), s = std::sin(turn);
      // How far the curve bows above and below its chord: the label stands clear of that.
      double above = 0, below = 0;
      for (std::size_t k = i; k <= j; ++k) {
        const double off = -((stretch[k].x - a.x) * s + (stretch[k].y - a.y) * c);
        above = std::max(above, off);
        below = std::max(below, -off);
      }
      for (const bool over : {true, false}) {
        const double clear = LabelPlacer::padding_mm + 0.1 + guide.style.label_lift_mm;
        const double lift = over ? above + drop + clear : -(below + top + clear);
        const Point start{a.x + 0.5 * c - lift * s, a.y - 0.5 * s - lift * c};
        // Axis-parallel boxes along the turned line of text.
        const int pieces = std::max(1, static_cast<int>(std::ceil(width / (0.8 * top))));
        std::vector<Box> boxes;
        double cost = (above + below) * 0.6 + (over ? 0 : 0.5);
        for (int k = 0; k < pieces && cost < least; ++k) {
          double x0 = 1e9, x1 = -1e9, y0 = 1e9, y1 = -1e9;
          for (const double along : {width * k / pieces, width * (k + 1) / pieces})
            for (const double across : {-drop, top}) {
              const double x = start.x + along * c - across * s;
              const double y = start.y - along * s - across * c;
              x0 = std::min(x0, x), x1 = std::max(x1, x);
              y0 = std::min(y0, y), y1 = std::max(y1, y);
            }
          boxes.push_back({x0, y0, x1 - x0, y1 - y0});
          cost += placer_.cost_of(boxes.back(), least).value_or(1e9);
        }
        if (cost >= least) continue;
        least = cost;
        best = Text{start,
                    guide.label,
                    Face::italic,
                    size,
                    guide.style.ink,
                    0,
                    turn * 180 / std::numbers::pi};
        best_boxes = boxes;
      }
    }
  }
  if (!best) {
    ++context_.tally.labels_left_out;
    return;
  }
  texts.push_back(*best);
  for (const Box& box : best_boxes) placer_.reserve(box);
}

Horizontal horizontal_of(Angle hour_angle, Angle declination, Angle latitude) {
  const double sd = sin(declination), cd = cos(declination);
  const double sh = sin(hour_angle), ch = cos(hour_angle);
  const double sp = sin(latitude), cp = cos(latitude);
  return {arcsin(sd * sp + cd * ch * cp), arctan2(-cd * sh, sd * cp - cd * ch * sp).positive()};
}

std::pair<Angle, Angle> equatorial_of(const Horizontal& place, Angle latitude) {
  const double sa = sin(place.altitude), ca = cos(place.altitude);
  const double sz = sin(place.azimuth), cz = cos(place.azimuth);
  const double sp = sin(latitude), cp = cos(latitude);
  return {arctan2(-ca * sz, sa * cp - ca * cz * sp), arcsin(sa * sp + ca * cz * cp)};
}

std::pair<Angle, Angle> ecliptic_point(Angle longitude) {
  const Angle obliquity = Angle::from_degrees(23.4393);  // IAU 2006, J2000.0
  const double s = sin(longitude);
  return {arctan2(s * cos(obliquity), cos(longitude)).positive(), arcsin(s * sin(obliquity))};
}

}  // namespace duskleaf
