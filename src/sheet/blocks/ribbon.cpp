#include <algorithm>
#include <array>
#include <cmath>

#include "catalogue/constellations.hpp"
#include "catalogue/stars.hpp"
#include "ephemeris/year_ephemeris.hpp"
#include "sheet/blocks/blocks.hpp"
#include "sheet/sky_chart_ribbon.hpp"
#include "sky/moon_look.hpp"

// The sky along the celestial equator: what is up, what will be, and which month brings what.

namespace duskleaf {
namespace {

/// Heights of the title above the band and of the months' names under it.
double title_height(const BlockContext& context) {
  return 2.2 + context.type.cap_height(Face::bold, context.theme.label_pt + 1.5);
}
double months_height(const BlockContext& context) {
  return 2.4 + context.type.cap_height(Face::bold, context.theme.label_pt);
}
constexpr double ribbon_limit = 4.4;  // faintest stars drawn: all of the band, up or not

void draw_ground(const RibbonView& view, const Theme& theme, std::vector<Mark>& out) {
  auto group = std::make_shared<ClipGroup>();
  group->clip = Path::rectangle(view.band());
  group->marks.push_back(Fill{Path::rectangle(view.band()), theme.lap});
  for (const auto& region : view.above_horizon())
    group->marks.push_back(Fill{Path::polyline(region, true), theme.sky});
  out.push_back(group);
}

void add_horizons(SkyChart& chart, const RibbonView& view) {
  const BlockContext& context = chart.context();
  const Theme& theme = context.theme;
  // At a pole nothing rises or sets.
  const bool turns = std::abs(context.site.place.observer.latitude.degrees()) < 88;
  for (const bool east : {true, false})
    chart.add_guide(view.horizon(east, Angle()), {0.35, theme.blue, {}, 0.6},
                    turns ? context.words(east ? "ribbon.rising" : "ribbon.setting") : "", true);
  if (!turns) return;
  // Two hours earlier the horizon stood 30 degrees of hour angle west of where it stands now;
  // later, east.
  for (const double hours : {-2.0, 2.0}) {
    const std::string label = context.words(hours < 0 ? "ribbon.earlier" : "ribbon.later");
    for (const bool east : {true, false})
      chart.add_guide(view.horizon(east, Angle::from_hours(-hours)),
                      {0.15, theme.soft, {0.3, 0.9}, 0.1}, label, true);
  }
}

/// Says once on each side what the tone means.
void add_below_horizon(SkyChart& chart, const RibbonView& view) {
  const BlockContext& context = chart.context();
  const Angle latitude = context.site.place.observer.latitude;
  LabelForm form{{context.words("ribbon.below")}, Face::italic, context.theme.label_pt, 0};
  const double half_width = chart.placer().measure(form).width / 2;
  const double half_degrees = half_width * 360 / view.band().width;
  for (const double side : {-1.0, 1.0}) {
    LabelRequest request;
    request.forms = {form};
    // Level with the equator's neighbourhood first, then farther off; all of it under the horizon.
    for (const double declination : {-6.0, 6.0, -12.0, 12.0, -20.0, 20.0, -30.0, 30.0, -36.0, 36.0})
      for (double h = 70; h + half_degrees < 179; h += 5) {
        bool below = true;
        for (const double end : {-1.0, 1.0})
          below = below && horizontal_of(Angle::from_degrees(side * (h + end * half_degrees)),
                                         Angle::from_degrees(declination), latitude)
                                   .altitude.degrees() < -4;
        if (below)
          request.places.push_back(
              view.at(Angle::from_degrees(side * h), Angle::from_degrees(declination)));
      }
    if (request.places.empty()) continue;
    request.importance = 955;
    request.cost_limit = 16;
    request.side_gap_mm = 2;
    request.ink = context.theme.blue;
    chart.wish(std::move(request));
  }
}

void add_circles(SkyChart& chart, const RibbonView& view) {
  const BlockContext& context = chart.context();
  const Theme& theme = context.theme;
  const Box& band = view.band();
  std::vector<Point> equator;
  for (int i = 0; i <= 60; ++i)
    equator.push_back({band.x + band.width * i / 60, view.at(Angle(), Angle()).y});
  chart.add_guide({equator}, {0.25, theme.blue, {1.7, 1.0}, 0.3}, context.words("dome.equator"));
  std::vector<std::vector<Point>> ecliptic(1);
  for (int i = 0; i <= 240; ++i) {
    const Angle longitude = Angle::from_degrees(1.5 * i);
    const auto [ra, dec] = ecliptic_point(longitude);
    const Point p = view.at(view.hour_angle(ra), dec);
    if (!ecliptic.back().empty() && std::abs(ecliptic.back().back().x - p.x) > band.width / 2) {
      // Over the seam: each side goes on to the ribbon's end.
      const Point last = ecliptic.back().back();
      const double shift = p.x > last.x ? -band.width : band.width;
      ecliptic.back().push_back({p.x + shift, p.y});
      ecliptic.push_back({{last.x - shift, last.y}});
    }
    ecliptic.back().push_back(p);
  }
  chart.add_guide(ecliptic, {0.2, theme.blue_soft, {}, 0.25}, context.words("dome.ecliptic"));
}

void add_scales(SkyChart& chart, const RibbonView& view, std::vector<Mark>& out) {
  const BlockContext& context = chart.context();
  const Theme& theme = context.theme;
  const Box& band = view.band();
  Path ticks;
  const double small = theme.small_pt;
  const double height = context.type.cap_height(Face::regular, small);
  for (int hour = 0; hour < 24; ++hour) {
    const double x = view.at(view.hour_angle(Angle::from_hours(hour)), Angle()).x;
    const bool named = hour % 2 == 0;
    ticks.move({x, band.y}).line({x, band.y + (named ? 1.3 : 0.7)});
    if (!named) continue;
    const std::string words =
        context.words("ribbon.hour", {{"hour", context.words.number(hour, 0)}});
    const double width = context.type.width(words, Face::regular, small);
    const Box box{x - width / 2, band.y + 1.7, width, height};
    if (!chart.placer().cost_of(box)) continue;
    chart.placer().reserve(box);
    out.emplace_back(Text{{box.x, box.bottom()}, words, Face::regular, small, theme.soft});
  }
  for (const double declination : {-30.0, 30.0})
    for (const bool left : {true, false}) {
      const double y = view.at(Angle(), Angle::from_degrees(declination)).y;
      const double edge = left ? band.x : band.right(), inward = left ? 1 : -1;
      ticks.move({edge, y}).line({edge + inward * 1.3, y});
      std::string degrees(declination > 0 ? 1 : 0, '+');
      degrees += context.words.number(declination, 0);
      const std::string words = context.words("ribbon.degrees", {{"degrees", degrees}});
      const double width = context.type.width(words, Face::regular, small);
      const Box box{left ? edge + 1.9 : edge - 1.9 - width, y - height / 2, width, height};
      if (!chart.placer().cost_of(box)) continue;
      chart.placer().reserve(box);
      out.emplace_back(Text{{box.x, box.bottom()}, words, Face::regular, small, theme.soft});
    }
  out.emplace_back(Stroke{ticks, 0.2, theme.blue, {}, false});
}

/// Under the ribbon: which month's evening has which part of it highest.
void draw_months(const RibbonView& view, const BlockContext& context, std::vector<Mark>& out) {
  const Theme& theme = context.theme;
  const Box& band = view.band();
  Path ticks;
  // The same reading of the clock as on this page, whatever the order's hour and the law's summer
  // time.
  const Place& place = context.site.place;
  const std::chrono::minutes clock =
      place.zone.civil(context.evening().moment).time - context.evening().date;
  std::vector<std::pair<double, std::size_t>> places;
  for (std::size_t i = 0; i < context.year.evenings.size(); ++i) {
    const EveningSky& evening = context.year.evenings[i];
    if (evening.month == 0) continue;
    const Angle sidereal =
        static_cast<int>(i) == context.month_index
            ? evening.local_sidereal_time
            : context.ephemeris.apparent_sidereal_time(place.zone.instant(evening.date, clock)) +
                  place.observer.longitude;
    places.push_back({view.at(view.hour_angle(sidereal), Angle()).x, i});
  }
  std::sort(places.begin(), places.end());
  // This month's name first, then the others where there is room.
  const double size = theme.label_pt;
  std::vector<Box> used;
  const auto set = [&](double x, std::size_t index) {
    const bool now = static_cast<int>(index) == context.month_index;
    const Face face = now ? Face::bold : Face::regular;
    const std::string words = context.words.month_short(context.year.evenings[index].month);
    const double width = context.type.width(words, face, size);
    const double left = std::clamp(x - width / 2, band.x, band.right() - width);
    const Box box{left - 0.6, band.bottom(), width + 1.2, 1};
    for (const Box& other : used)
      if (other.x < box.right() && box.x < other.right()) return;
    used.push_back(box);
    ticks.move({x, band.bottom()}).line({x, band.bottom() + 1.0});
    out.emplace_back(Text{{left, band.bottom() + 1.5 + context.type.cap_height(face, size)},
                          words,
                          face,
                          size,
                          now ? theme.blue : theme.soft});
  };
  for (const auto& [x, index] : places)
    if (static_cast<int>(index) == context.month_index) set(x, index);
  for (const auto& [x, index] : places)
    if (static_cast<int>(index) != context.month_index) set(x, index);
  out.emplace_back(Stroke{ticks, 0.2, theme.blue, {}, false});
}

void draw_title(const Box& area, const BlockContext& context, std::vector<Mark>& out) {
  const Theme& theme = context.theme;
  const double size = theme.label_pt + 1.5;
  const double baseline = area.y + context.type.cap_height(Face::bold, size) + 0.3;
  const std::string title = context.words("ribbon.title");
  out.emplace_back(Text{{area.x, baseline}, title, Face::bold, size, theme.blue, 0.08});
  // The fuller of two captions that fits beside the title.
  const std::string time =
      context.words.time(context.site.place.zone.civil(context.evening().moment));
  const bool bright = context.evening().shift == EveningShift::no_stars;
  const double room = area.width - 4 - context.type.width(title, Face::bold, size, 0.08);
  std::string aside;
  double width = 0;
  for (const char* key : {"ribbon.aside", "ribbon.aside-short"}) {
    aside = context.words(bright ? "ribbon.aside-bright" : key, {{"time", time}});
    width = context.type.width(aside, Face::regular, theme.label_pt);
    if (width <= room) break;
  }
  out.emplace_back(
      Text{{area.right() - width, baseline}, aside, Face::regular, theme.label_pt, theme.soft});
}

void add_bodies(SkyChart& chart, const RibbonView& view) {
  const BlockContext& context = chart.context();
  const EveningSky& evening = context.evening();
  const auto where = [&](Body body, Ut at) { return context.ephemeris.place(body, to_tt(at)); };
  const auto point = [&](const EquatorialPlace& p) {
    return view.at(view.hour_angle(p.right_ascension), p.declination);
  };
  // None over the frame: at the seam, where the two ends show the same sky, it stands a little in.
  const Box& band = view.band();
  const auto inward = [&](Point p, double radius) {
    return Point{std::clamp(p.x, band.x + radius + 0.6, band.right() - radius - 0.6), p.y};
  };
  const auto apart = [](Point a, Point b) { return std::hypot(a.x - b.x, a.y - b.y); };
  const Point sun = inward(point(where(Body::sun, evening.moment)), SkyChart::sun_radius_mm);
  chart.add_sun(sun, context.words("body.sun"));
  std::vector<Point> taken = {sun};
  for (const PlanetEvening& planet : evening.planets) {
    if (planet.magnitude > ribbon_limit) continue;
    const Point p = inward(point(where(planet.planet, evening.moment)), 1.2);
    // In front of the Sun's disc on paper it is lost in the glare anyway.
    if (apart(p, sun) < SkyChart::sun_radius_mm + 1.3) continue;
    chart.add_planet(p, planet.magnitude,
                     context.words("body." + std::string(body_name(planet.planet))));
    taken.push_back(p);
  }
  // The Moon on this evening, and as it passes every third day at the same hour.
  const int days = days_in_month(evening.year, evening.month), today = day_of(evening.date);
  for (int day = 1; day <= days; ++day) {
    if ((day - today) % 3 != 0) continue;
    const bool own = day == today;
    const Ut at = evening.moment + Days(day - today);
    const Eigen::Vector3d moon = context.ephemeris.apparent(Body::moon, to_tt(at));
    const Eigen::Vector3d light = context.ephemeris.apparent(Body::sun, to_tt(at));
    const Angle lean = position_angle(moon, light, Eigen::Vector3d::UnitZ());
    const Point at_scale = point(to_equatorial(moon));
    const Point p = inward(at_scale, own ? 1.9 : 1.4);
    if (!own && (p.x != at_scale.x || std::any_of(taken.begin(), taken.end(), [&](Point other) {
                   return apart(p, other) < 3.2;
                 })))
      continue;
    const double cosine = moon.normalized().dot(light.normalized());
    chart.add_passing_moon(p, (1 - cosine) / 2,
                           view.faces_south() ? lean : lean + Angle::from_degrees(180),
                           context.words.number(day, 0), own);
  }
}

}  // namespace

RibbonDrawing compose_ribbon(const BlockContext& context, const Box& area, std::vector<Mark>& out) {
  const Theme& theme = context.theme;
  const EveningSky& evening = context.evening();
  const double title = title_height(context), months = months_height(context);
  const double height = std::min(area.height - title - months, area.width / 360 * 80);
  const Box band{area.x, area.y + title, area.width, height};
  const Angle latitude = context.site.place.observer.latitude;
  const RibbonView view(band, evening.local_sidereal_time, latitude);

  draw_title(area, context, out);
  draw_ground(view, theme, out);
  SkyChart chart(context, {band, {}, 0},
                 {{band.x + 0.4, band.y + 0.4, band.width - 0.8, band.height - 0.8}, {}, 0},
                 Path::rectangle(band), 0.8);
  // Figures whole, also where a star of theirs is fainter.
  chart.add_stars(ribbon_limit, 99, [&](int star) -> std::optional<Point> {
    const auto [hour_angle, declination] =
        equatorial_of(evening.stars[static_cast<std::size_t>(star)], latitude);
    if (std::abs(declination.degrees()) > 75) return std::nullopt;
    return view.at(hour_angle, declination);
  });
  chart.set_period(band.width);
  chart.add_figures();
  std::vector<Mark> scales;
  add_scales(chart, view, scales);
  add_bodies(chart, view);
  add_circles(chart, view);
  add_horizons(chart, view);
  add_below_horizon(chart, view);
  chart.name_stars(1.3, 16, {});
  chart.name_constellations(
      [](int figure) {
        const int index = figures()[static_cast<std::size_t>(figure)].constellation;
        return constellations()[static_cast<std::size_t>(index)].near_equator;
      },
      Face::condensed, Face::condensed, theme.label_pt, 850);
  chart.finish(out);
  out.insert(out.end(), scales.begin(), scales.end());
  out.emplace_back(Stroke{Path::rectangle(band), 0.3, theme.blue, {}, false});
  draw_months(view, context, out);
  return {title + height + months, {band, {}, 0}, chart.label_boxes(), chart.labels()};
}

double draw_ribbon(const BlockContext& context, const BlockOptions&, const Box& area,
                   std::vector<Mark>& out) {
  return compose_ribbon(context, area, out).height;
}

}  // namespace duskleaf
